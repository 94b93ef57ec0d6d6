// SPDX-License-Identifier: MIT
#include "layout/export/plain_number.hpp"

#include "layout/sheet/export_error.hpp"
#include "layout/text/figures.hpp"

#include <cmath>

namespace dialwright::layout {

void add_number(std::string& text, double value, int decimals, int least) {
    if (!std::isfinite(value) || std::abs(value) > 1e7)
        throw ExportError("A line of the drawing runs off to infinity, so no file for a machine was made.");
    if (!append_fixed(text, value, decimals, least))
        throw ExportError("A line of the drawing is too long for its decimals, so no file for a machine was made.");
}

std::string in_capitals(std::string_view text) {
    std::string capitals{text};
    for (char& c : capitals)
        c = c >= 'a' && c <= 'z' ? static_cast<char>(c - 'a' + 'A') : c;
    return capitals;
}

} // namespace dialwright::layout
