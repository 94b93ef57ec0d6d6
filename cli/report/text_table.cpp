// SPDX-License-Identifier: MIT
#include "cli/report/text_table.hpp"

#include <algorithm>

namespace dialwright::cli {
namespace {

/// How many characters a text shows: its bytes without those that go on with a character of UTF-8.
std::size_t shown_width(const std::string& text) {
    return std::size_t(std::count_if(text.begin(), text.end(),
                                     [](char c) { return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U; }));
}

} // namespace

std::string text_table(const std::vector<layout::Flow::Column>& columns, const std::vector<TableRow>& rows,
                       std::size_t indent) {
    TableRow heads;
    std::vector<std::size_t> widths;
    for (const auto& column : columns) {
        heads.push_back(column.head);
        widths.push_back(shown_width(column.head));
    }
    for (const TableRow& row : rows)
        for (std::size_t i = 0; i < std::min(row.size(), widths.size()); ++i)
            widths[i] = std::max(widths[i], shown_width(row[i]));
    std::string text;
    const auto put = [&](const TableRow& row) {
        std::string line(indent, ' ');
        for (std::size_t i = 0; i < row.size(); ++i) {
            const bool remark = i >= widths.size();
            const std::string gap(remark ? 0 : widths[i] - shown_width(row[i]), ' ');
            const bool right = !remark && columns[i].align == layout::Align::right;
            line.append(i > 0 ? "  " : "").append(right ? gap : row[i]).append(right ? row[i] : gap);
        }
        line.erase(line.find_last_not_of(' ') + 1);
        text.append(line).append("\n");
    };
    put(heads);
    for (const TableRow& row : rows)
        put(row);
    return text;
}

} // namespace dialwright::cli
