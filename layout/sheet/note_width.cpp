// SPDX-License-Identifier: MIT
#include "layout/sheet/note_width.hpp"

#include "layout/lettering/sheet_font.hpp"

namespace dialwright::layout {

double note_width_mm(std::string_view text, double size_mm, bool bold) {
    const SheetFont& font = sheet_font(bold);
    long thousandths = 0;
    while (!text.empty()) {
        const auto found = font.advances.find(take_character(text));
        // A character that the font lacks is printed as "?", see the PDF's notes.
        thousandths += found != font.advances.end() ? found->second : font.advances.at(U'?');
    }
    return static_cast<double>(thousandths) * size_mm / 1000.0;
}

} // namespace dialwright::layout
