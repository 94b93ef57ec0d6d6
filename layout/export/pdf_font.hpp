// SPDX-License-Identifier: MIT
#pragma once

#include "layout/lettering/sheet_font.hpp"

#include <hpdf.h>

#include <set>
#include <string>

namespace dialwright::layout {

/// The characters of a note, "?" for those that the font lacks. UTF-8 in.
[[nodiscard]] std::u32string note_characters(std::string_view text, const SheetFont& font);

/// A font in a PDF, cut down to the characters that its notes use, with its way back to Unicode for searching and
/// copying. The library could embed the file by itself, but takes 17 ms for two fonts (it looks up all 65,536
/// characters one by one) and writes a way back that readers complain of; this takes 2 ms.
/// Source: ISO 32000-1:2008, 9.7 (composite fonts) and 9.10.3 (ToUnicode).
class PdfFont {
  public:
    PdfFont(HPDF_Doc document, const SheetFont& font, const std::set<char32_t>& characters);

    /// For the page's resources.
    [[nodiscard]] HPDF_Dict get() const { return font_; }
    [[nodiscard]] const SheetFont& sheet_font() const { return sheet_font_; }
    /// The text as a PDF string of glyphs: "<00410042>".
    [[nodiscard]] std::string shown(std::string_view text) const;

  private:
    [[nodiscard]] HPDF_Dict descriptor(const std::string& name) const;
    [[nodiscard]] HPDF_Dict descendant(const std::string& name) const;
    [[nodiscard]] HPDF_Dict to_unicode() const;
    [[nodiscard]] HPDF_Dict stream_of(const std::string& bytes) const;

    HPDF_Doc document_;
    const SheetFont& sheet_font_;
    FontSubset subset_;
    HPDF_Dict font_ = nullptr;
};

} // namespace dialwright::layout
