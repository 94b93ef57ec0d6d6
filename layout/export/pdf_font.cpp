// SPDX-License-Identifier: MIT
#include "layout/export/pdf_font.hpp"

#include "layout/sheet/export_error.hpp"

#include <fmt/format.h>
#include <hpdf_doc.h>

namespace dialwright::layout {
namespace {

HPDF_Dict object(HPDF_Doc document) {
    HPDF_Dict dict = HPDF_Dict_New(document->mmgr);
    if (dict == nullptr || HPDF_Xref_Add(document->xref, dict) != HPDF_OK) {
        throw ExportError("The PDF could not be made: the PDF library has no memory left.");
    }
    return dict;
}

HPDF_Array array_in(HPDF_Doc document, HPDF_Dict dict, const char* key) {
    HPDF_Array array = HPDF_Array_New(document->mmgr);
    HPDF_Dict_Add(dict, key, array);
    return array;
}

/// UTF-16, big end first, in hexadecimal.
std::string utf16(char32_t c) {
    const auto number = static_cast<std::uint32_t>(c);
    return number <= 0xFFFF ? fmt::format("{:04X}", number)
                            : fmt::format("{:04X}{:04X}", 0xD800 + ((number - 0x10000) >> 10U),
                                          0xDC00 + ((number - 0x10000) & 0x3FFU));
}

} // namespace

std::u32string note_characters(std::string_view text, const SheetFont& font) {
    std::u32string out;
    while (!text.empty()) {
        const char32_t character = take_character(text);
        out += font.has(character) ? character : U'?';
    }
    return out;
}

PdfFont::PdfFont(HPDF_Doc document, const SheetFont& font, const std::set<char32_t>& characters)
    : document_{document}, sheet_font_{font}, subset_{subset_of(font, characters)} {
    const std::string name = "DIALWR+" + font.name;
    font_ = object(document);
    HPDF_Dict_AddName(font_, "Type", "Font");
    HPDF_Dict_AddName(font_, "Subtype", "Type0");
    HPDF_Dict_AddName(font_, "BaseFont", name.c_str());
    HPDF_Dict_AddName(font_, "Encoding", "Identity-H");
    HPDF_Array_Add(array_in(document, font_, "DescendantFonts"), descendant(name));
    HPDF_Dict_Add(font_, "ToUnicode", to_unicode());
}

HPDF_Dict PdfFont::descendant(const std::string& name) const {
    HPDF_Dict dict = object(document_);
    HPDF_Dict_AddName(dict, "Type", "Font");
    HPDF_Dict_AddName(dict, "Subtype", "CIDFontType2");
    HPDF_Dict_AddName(dict, "BaseFont", name.c_str());
    HPDF_Dict_AddName(dict, "CIDToGIDMap", "Identity");
    HPDF_Dict system = HPDF_Dict_New(document_->mmgr);
    HPDF_Dict_Add(dict, "CIDSystemInfo", system);
    HPDF_Dict_Add(system, "Registry", HPDF_String_New(document_->mmgr, "Adobe", nullptr));
    HPDF_Dict_Add(system, "Ordering", HPDF_String_New(document_->mmgr, "Identity", nullptr));
    HPDF_Dict_AddNumber(system, "Supplement", 0);
    HPDF_Dict_Add(dict, "FontDescriptor", descriptor(name));
    HPDF_Array widths = array_in(document_, dict, "W");
    std::map<std::uint32_t, HPDF_INT32> by_glyph;
    for (const auto& [character, glyph] : subset_.glyphs) {
        by_glyph[glyph] = sheet_font_.advances.at(character);
    }
    for (const auto& [glyph, advance] : by_glyph) {
        HPDF_Array_AddNumber(widths, static_cast<HPDF_INT32>(glyph));
        HPDF_Array one = HPDF_Array_New(document_->mmgr);
        HPDF_Array_Add(widths, one);
        HPDF_Array_AddNumber(one, advance);
    }
    return dict;
}

HPDF_Dict PdfFont::descriptor(const std::string& name) const {
    HPDF_Dict dict = object(document_);
    HPDF_Dict_AddName(dict, "Type", "FontDescriptor");
    HPDF_Dict_AddName(dict, "FontName", name.c_str());
    HPDF_Dict_AddNumber(dict, "Flags", 4); // its own set of glyphs
    HPDF_Array box = array_in(document_, dict, "FontBBox");
    for (const int side : {sheet_font_.left, sheet_font_.bottom, sheet_font_.right, sheet_font_.top}) {
        HPDF_Array_AddNumber(box, side);
    }
    HPDF_Dict_AddNumber(dict, "ItalicAngle", 0);
    HPDF_Dict_AddNumber(dict, "Ascent", sheet_font_.ascent);
    HPDF_Dict_AddNumber(dict, "Descent", sheet_font_.descent);
    HPDF_Dict_AddNumber(dict, "CapHeight", 729); // of Liberation Sans; readers use it only to replace a missing font
    HPDF_Dict_AddNumber(dict, "StemV", 80);
    HPDF_Dict file = stream_of(subset_.file);
    HPDF_Dict_AddNumber(file, "Length1", static_cast<HPDF_INT32>(subset_.file.size()));
    HPDF_Dict_Add(dict, "FontFile2", file);
    return dict;
}

HPDF_Dict PdfFont::to_unicode() const {
    std::string map =
        "/CIDInit /ProcSet findresource begin\n12 dict begin\nbegincmap\n/CIDSystemInfo << /Registry (Adobe) "
        "/Ordering (UCS) /Supplement 0 >> def\n/CMapName /Adobe-Identity-UCS def\n/CMapType 2 def\n"
        "1 begincodespacerange\n<0000> <FFFF>\nendcodespacerange\n";
    // A block takes at most a hundred lines.
    std::size_t left = subset_.glyphs.size(), in_block = 0;
    for (const auto& [character, glyph] : subset_.glyphs) {
        if (in_block == 0) {
            in_block = std::min<std::size_t>(left, 100);
            map += fmt::format("{} beginbfchar\n", in_block);
        }
        map += fmt::format("<{:04X}> <{}>\n", glyph, utf16(character));
        --left;
        if (--in_block == 0) {
            map += "endbfchar\n";
        }
    }
    map += "endcmap\nCMapName currentdict /CMap defineresource pop\nend\nend\n";
    return stream_of(map);
}

HPDF_Dict PdfFont::stream_of(const std::string& bytes) const {
    HPDF_Dict dict = HPDF_DictStream_New(document_->mmgr, document_->xref);
    if (dict == nullptr) {
        throw ExportError("The PDF could not be made: the PDF library has no memory left.");
    }
    dict->filter = HPDF_STREAM_FILTER_FLATE_DECODE;
    HPDF_Stream_Write(dict->stream, reinterpret_cast<const HPDF_BYTE*>(bytes.data()),
                      static_cast<HPDF_UINT>(bytes.size()));
    return dict;
}

std::string PdfFont::shown(std::string_view text) const {
    std::string out = "<";
    for (const char32_t character : note_characters(text, sheet_font_)) {
        const auto found = subset_.glyphs.find(character);
        const std::uint32_t glyph = found != subset_.glyphs.end() ? found->second : 0U;
        for (const unsigned shift : {12U, 8U, 4U, 0U})
            out += "0123456789ABCDEF"[(glyph >> shift) & 15U];
    }
    return out + ">";
}

} // namespace dialwright::layout
