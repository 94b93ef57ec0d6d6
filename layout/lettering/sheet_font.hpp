// SPDX-License-Identifier: MIT
#pragma once

#include <cstdint>
#include <string>
#include <string_view>
#include <unordered_map>

namespace dialwright::layout {

/// The font of the notes on paper: its file, and how far each character moves the pen.
struct SheetFont {
    std::string file;                                     ///< a TrueType file
    std::unordered_map<char32_t, std::uint16_t> advances; ///< thousandths of the em, rounded down as PDF writes them
    [[nodiscard]] bool has(char32_t character) const { return advances.count(character) != 0; }
};

/// Liberation Sans, else DejaVu Sans, else what the system has for sans-serif in a TrueType file. Liberation Sans has
/// every sign the sheets use (° ′ ″ δ φ − × ½ → accents, Greek, Cyrillic) in the smallest file.
/// Looked for once in the program's run and then kept: a file of the system, the same for every caller.
/// @throws LetteringError  no such font is installed; the message names the package to install
[[nodiscard]] const SheetFont& sheet_font(bool bold);

/// Takes the first character off a UTF-8 text; U+FFFD for bytes that are not UTF-8. The text must not be empty.
[[nodiscard]] char32_t take_character(std::string_view& text);

} // namespace dialwright::layout
