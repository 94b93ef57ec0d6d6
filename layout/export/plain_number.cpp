// SPDX-License-Identifier: MIT
#include "layout/export/plain_number.hpp"

#include "layout/sheet/export_error.hpp"

#include <fmt/format.h>

#include <cmath>

namespace dialwright::layout {

void add_number(std::string& text, double value, int decimals, int least) {
    if (!std::isfinite(value) || std::abs(value) > 1e7)
        throw ExportError("A line of the drawing runs off to infinity, so no file for a machine was made.");
    char digits[48];
    char* end = fmt::format_to_n(digits, sizeof digits, "{:.{}f}", value, decimals).out;
    for (int left = decimals; left > least && end[-1] == '0'; --left)
        --end;
    if (end[-1] == '.')
        --end;
    std::string_view written{digits, static_cast<std::size_t>(end - digits)};
    if (written.front() == '-' && written.find_first_not_of("-0.") == std::string_view::npos)
        written.remove_prefix(1);
    text += written;
}

std::string in_capitals(std::string_view text) {
    std::string capitals{text};
    for (char& c : capitals)
        c = c >= 'a' && c <= 'z' ? static_cast<char>(c - 'a' + 'A') : c;
    return capitals;
}

} // namespace dialwright::layout
