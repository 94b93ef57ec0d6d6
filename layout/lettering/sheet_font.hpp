// SPDX-License-Identifier: MIT
#pragma once

#include <cstdint>
#include <map>
#include <set>
#include <string>
#include <string_view>
#include <unordered_map>

namespace dialwright::layout {

/// The font of the notes on paper: its file, and how far each character moves the pen. All sizes in thousandths of the em.
struct SheetFont {
    std::string file; ///< a TrueType file
    std::string name; ///< PostScript name
    int ascent = 0, descent = 0, left = 0, bottom = 0, right = 0, top = 0;
    std::unordered_map<char32_t, std::uint16_t> advances; ///< rounded down
    [[nodiscard]] bool has(char32_t character) const { return advances.count(character) != 0; }
};

/// A font file that holds some characters only, and which of its glyphs draws each.
struct FontSubset {
    std::string file; ///< bytes of a TrueType file
    std::map<char32_t, std::uint32_t> glyphs;
};

/// Liberation Sans, else DejaVu Sans, else what the system has for sans-serif in a TrueType file. Liberation Sans has
/// every sign the sheets use (° ′ ″ δ φ − × ½ → accents, Greek, Cyrillic) in the smallest file.
/// Looked for once in the program's run and then kept: a file of the system, the same for every caller.
/// @throws LetteringError  no such font is installed; the message names the package to install
[[nodiscard]] const SheetFont& sheet_font(bool bold);

/// @param characters  that the font has
/// @throws LetteringError  the font's file can't be read or cut down
[[nodiscard]] FontSubset subset_of(const SheetFont& font, const std::set<char32_t>& characters);

/// Takes the first character off a UTF-8 text; U+FFFD for bytes that are not UTF-8. The text must not be empty.
[[nodiscard]] char32_t take_character(std::string_view& text);

} // namespace dialwright::layout
