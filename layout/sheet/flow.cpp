// SPDX-License-Identifier: MIT
#include "layout/sheet/flow.hpp"

#include "layout/sheet/measuring.hpp"
#include "layout/sheet/note_width.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_gutter_mm = 3.2;     // between two columns of a table
constexpr double k_block_gutter_mm = 8; // between two blocks of one table

Mark rule(Point from, Point to) {
    return {Layer::guide, {polyline({from, to})}, 0.15, false, "rule"};
}

} // namespace

Flow::Flow(const PrintOptions& options, std::string page_title)
    : options_{options}, page_title_{std::move(page_title)} {
    begin();
}

void Flow::begin() {
    Sheet sheet;
    sheet.width_mm = options_.paper.short_mm;
    sheet.height_mm = options_.paper.roll ? std::min(options_.paper.long_mm, 1.4142 * options_.paper.short_mm)
                                          : options_.paper.long_mm;
    sheet.paper = options_.paper.name;
    sheet.title = sheets_.empty() ? page_title_ : fmt::format("{}, page {}", page_title_, sheets_.size() + 1);
    const double m = options_.margin_mm;
    sheet.printable = {m, m, sheet.width_mm - m, sheet.height_mm - m};
    const SheetWords words{paper_words(options_, sheet.width_mm, sheet.height_mm), options_.title, "", 1, 1};
    const Surround surround = surround_of(sheet.width_mm, sheet.height_mm, m, options_.inches, words);
    field_ = opening_of(sheet.width_mm, sheet.height_mm, m, surround);
    furnish(sheet, field_, surround, words);
    field_.left_mm += 2;
    field_.right_mm -= 1;
    y_ = field_.top_mm;
    sheets_.push_back(std::move(sheet));
}

void Flow::need(double mm) {
    if (y_ - mm < field_.bottom_mm && y_ < field_.top_mm)
        begin();
}

void Flow::note(Point at, std::string text, double size_mm, bool bold, Align align) {
    sheet().notes.push_back({at, std::move(text), size_mm, align, bold, {}});
}

void Flow::paragraph(const std::string& text, const std::string& first, bool bold, double size_mm) {
    const double inset = first.empty() ? 0.0 : note_width_mm(first, size_mm) + 1.2;
    const double step = k_line_mm * size_mm / k_text_mm;
    bool opening = true;
    for (const std::string& line : wrapped(text, width() - inset, size_mm, bold)) {
        need(step);
        y_ -= step;
        if (opening && !first.empty())
            note({field_.left_mm, y_}, first, size_mm, bold);
        note({field_.left_mm + inset, y_}, line, size_mm, bold);
        opening = false;
    }
}

void Flow::heading(const std::string& text) {
    need(14);
    space(2.6);
    paragraph(text, "", true, 3.4);
    space(0.6);
}

void Flow::list(const std::string& title, const std::vector<std::string>& items, bool numbered) {
    if (items.empty())
        return;
    heading(title);
    int number = 0;
    for (const std::string& item : items)
        paragraph(item, numbered ? fmt::format("{}.", ++number) : "•");
}

namespace {

/// How wide each column is, and the table, on a page of this width.
struct Widths {
    std::vector<double> columns;
    double all = 0;
};

Widths widths_of(const std::vector<Flow::Column>& columns, const std::vector<std::vector<std::string>>& rows,
                 double size_mm, double page_mm) {
    Widths widths;
    for (std::size_t i = 0; i < columns.size(); ++i) {
        double most = note_width_mm(columns[i].head, size_mm, true);
        for (const auto& row : rows)
            if (i < row.size())
                most = std::max(most, note_width_mm(row[i], size_mm));
        widths.columns.push_back(most);
        widths.all += most + (i > 0 ? k_gutter_mm : 0.0);
    }
    if (widths.all > page_mm && !columns.empty()) { // the widest gives way
        double& widest = *std::max_element(widths.columns.begin(), widths.columns.end());
        const double over = std::min(widths.all - page_mm, widest - 15);
        widest -= over;
        widths.all -= over;
    }
    return widths;
}

} // namespace

void Flow::table(const std::vector<Column>& columns, const std::vector<std::vector<std::string>>& rows,
                 double size_mm) {
    Widths widths = widths_of(columns, rows, size_mm, width());
    // A page too narrow for so many columns, though the widest has given way: smaller letters.
    for (constexpr double k_least_mm = 1.1; widths.all > width() + 0.01 && size_mm > k_least_mm;) {
        size_mm *= 0.95;
        widths = widths_of(columns, rows, size_mm, width());
    }
    const double step = k_line_mm * size_mm / k_text_mm;
    const std::size_t blocks =
        rows.size() < 16
            ? 1
            : std::max<std::size_t>(1, std::size_t((width() + k_block_gutter_mm) / (widths.all + k_block_gutter_mm)));
    const double block_step = blocks > 1 ? (width() + k_block_gutter_mm) / double(blocks) : 0;
    const auto put_row = [&](double left, double top, const std::vector<std::string>& cells, bool bold) {
        double x = left;
        double lowest = top;
        for (std::size_t i = 0; i < columns.size(); ++i) {
            double y = top;
            const Align align = columns[i].align;
            const double at = align == Align::right ? x + widths.columns[i]
                                                    : (align == Align::middle ? x + widths.columns[i] / 2 : x);
            if (i < cells.size() && !cells[i].empty())
                for (const std::string& line : wrapped(cells[i], widths.columns[i] + 0.01, size_mm, bold)) {
                    y -= step;
                    note({at, y}, line, size_mm, bold, align);
                }
            lowest = std::min(lowest, y);
            x += widths.columns[i] + k_gutter_mm;
        }
        return std::min(lowest, top - step);
    };
    std::size_t next = 0;
    while (next < rows.size()) {
        need(4 * step);
        const double top = y_;
        const auto on_page = std::max<std::size_t>(1, std::size_t((room() - 1.5) / step) - 1);
        const std::size_t left_over = rows.size() - next;
        const std::size_t in_block = std::min(on_page, (left_over + blocks - 1) / blocks);
        double lowest = top;
        for (std::size_t block = 0; block < blocks && next < rows.size(); ++block) {
            const double left = field_.left_mm + double(block) * block_step;
            std::vector<std::string> heads;
            for (const Column& column : columns)
                heads.push_back(column.head);
            double y = put_row(left, top, heads, true) - 1.1;
            sheet().furniture.push_back(rule({left, y}, {left + widths.all, y}));
            y -= 0.4;
            for (std::size_t i = 0; i < in_block && next < rows.size(); ++i, ++next) {
                if (i > 0 && y - step < field_.bottom_mm)
                    break; // rows of several lines fill the page sooner
                y = put_row(left, y, rows[next], false);
            }
            lowest = std::min(lowest, y);
        }
        y_ = lowest - 1;
    }
}

void Flow::place(const std::shared_ptr<const Drawing>& drawing, Point lower_left, double width_mm, double height_mm,
                 double scale) {
    const Point middle = bounds_of(*drawing).middle();
    Placing placing{{}, {}, scale, scale, false};
    placing.shift = {lower_left.x_mm + width_mm / 2 - scale * middle.x_mm,
                     lower_left.y_mm + height_mm / 2 - scale * middle.y_mm};
    sheet().windows.push_back(
        {drawing, placing,
         Box{lower_left.x_mm, lower_left.y_mm, lower_left.x_mm + width_mm, lower_left.y_mm + height_mm}});
}

void Flow::picture(const std::shared_ptr<const Drawing>& drawing, double width_mm, double height_mm,
                   const std::string& under) {
    need(height_mm + (under.empty() ? 1 : 5.5));
    const Box box = bounds_of(*drawing);
    const double scale = std::min(width_mm / box.width_mm(), height_mm / box.height_mm());
    y_ -= height_mm + 1;
    place(drawing, {field_.left_mm, y_}, width_mm, height_mm, scale);
    if (under.empty())
        return;
    y_ -= 4;
    note({field_.left_mm, y_}, under, 2.5);
}

bool Flow::full_size(const std::shared_ptr<const Drawing>& drawing, const std::string& under) {
    const Box box = bounds_of(*drawing).grown(0.5);
    const double words = under.empty() ? 2 : 6.5;
    if (box.width_mm() > width() || box.height_mm() + words > whole_room())
        return false;
    need(box.height_mm() + words);
    y_ -= box.height_mm() + 1;
    place(drawing, {field_.left_mm + (width() - box.width_mm()) / 2, y_}, box.width_mm(), box.height_mm(), 1.0);
    if (!under.empty()) {
        y_ -= 4.5;
        note({field_.left_mm, y_}, under, 2.5);
    }
    return true;
}

} // namespace dialwright::layout
