// SPDX-License-Identifier: MIT
#include "layout/lettering/sheet_font.hpp"

#include "layout/lettering/font_files.hpp"
#include "layout/lettering/lettering.hpp"

#include <fontconfig/fontconfig.h>
#include <ft2build.h>
#include FT_FREETYPE_H
#include FT_ADVANCES_H
#include <hb-subset.h>

#include <memory>

namespace dialwright::layout {
namespace {

using Pattern = std::unique_ptr<FcPattern, decltype(&FcPatternDestroy)>;

using Face = std::unique_ptr<hb_face_t, decltype(&hb_face_destroy)>;

struct Found {
    std::string family, file;
};

Found nearest_font(const char* family, bool bold) {
    const Pattern wanted{FcPatternCreate(), &FcPatternDestroy};
    FcPatternAddString(wanted.get(), FC_FAMILY, reinterpret_cast<const FcChar8*>(family));
    FcPatternAddInteger(wanted.get(), FC_WEIGHT, bold ? FC_WEIGHT_BOLD : FC_WEIGHT_REGULAR);
    FcPatternAddString(wanted.get(), FC_FONTFORMAT, reinterpret_cast<const FcChar8*>("TrueType"));
    FcConfigSubstitute(font_list(), wanted.get(), FcMatchPattern);
    FcDefaultSubstitute(wanted.get());
    FcResult result = FcResultMatch;
    const Pattern match{FcFontMatch(font_list(), wanted.get(), &result), &FcPatternDestroy};
    FcChar8* name = nullptr;
    FcChar8* file = nullptr;
    if (!match || FcPatternGetString(match.get(), FC_FAMILY, 0, &name) != FcResultMatch ||
        FcPatternGetString(match.get(), FC_FILE, 0, &file) != FcResultMatch) {
        return {};
    }
    return {reinterpret_cast<const char*>(name), reinterpret_cast<const char*>(file)};
}

/// libharu embeds single TrueType files only.
bool is_plain_truetype(const std::string& file) {
    return file.size() > 4 && file.substr(file.size() - 4) == ".ttf";
}

std::string file_of_sheet_font(bool bold) {
    for (const char* family : {"Liberation Sans", "DejaVu Sans"}) {
        const Found found = nearest_font(family, bold);
        if (found.family == family && is_plain_truetype(found.file)) {
            return found.file;
        }
    }
    const Found found = nearest_font("sans-serif", bold);
    if (!is_plain_truetype(found.file)) {
        throw LetteringError("No font for the notes on the sheets is installed: install the package fonts-liberation.");
    }
    return found.file;
}

SheetFont read_sheet_font(bool bold) {
    SheetFont font;
    font.file = file_of_sheet_font(bold);
    FT_Library library = nullptr;
    FT_Face face = nullptr;
    if (FT_Init_FreeType(&library) != 0) {
        throw LetteringError("The font library could not be started.");
    }
    const std::unique_ptr<FT_LibraryRec_, decltype(&FT_Done_FreeType)> library_end{library, &FT_Done_FreeType};
    if (FT_New_Face(library, font.file.c_str(), 0, &face) != 0) {
        throw LetteringError("The font file " + font.file + " can't be read.");
    }
    const std::unique_ptr<FT_FaceRec_, decltype(&FT_Done_Face)> face_end{face, &FT_Done_Face};
    const auto thousandths = [face](FT_Long units) { return static_cast<int>(units * 1000 / face->units_per_EM); };
    const char* name = FT_Get_Postscript_Name(face);
    font.name = name != nullptr ? name : "SheetFont";
    font.ascent = thousandths(face->ascender);
    font.descent = thousandths(face->descender);
    font.left = thousandths(face->bbox.xMin);
    font.bottom = thousandths(face->bbox.yMin);
    font.right = thousandths(face->bbox.xMax);
    font.top = thousandths(face->bbox.yMax);
    font.advances.reserve(4096);
    FT_UInt glyph = 0;
    for (FT_ULong c = FT_Get_First_Char(face, &glyph); glyph != 0; c = FT_Get_Next_Char(face, c, &glyph)) {
        FT_Fixed advance = 0;
        if (c >= 0x20 && c <= 0xFFFF && FT_Get_Advance(face, glyph, FT_LOAD_NO_SCALE, &advance) == 0) {
            font.advances[static_cast<char32_t>(c)] = static_cast<std::uint16_t>(advance * 1000 / face->units_per_EM);
        }
    }
    return font;
}

} // namespace

const SheetFont& sheet_font(bool bold) {
    if (bold) {
        static const SheetFont k_bold = read_sheet_font(true);
        return k_bold;
    }
    static const SheetFont k_regular = read_sheet_font(false);
    return k_regular;
}

FontSubset subset_of(const SheetFont& font, const std::set<char32_t>& characters) {
    const std::unique_ptr<hb_blob_t, decltype(&hb_blob_destroy)> whole{hb_blob_create_from_file(font.file.c_str()),
                                                                       &hb_blob_destroy};
    const Face face{hb_face_create(whole.get(), 0), &hb_face_destroy};
    const std::unique_ptr<hb_subset_input_t, decltype(&hb_subset_input_destroy)> wanted{
        hb_subset_input_create_or_fail(), &hb_subset_input_destroy};
    if (!wanted) {
        throw LetteringError("The font of the notes could not be cut down: no memory is left.");
    }
    for (const char32_t character : characters) {
        hb_set_add(hb_subset_input_unicode_set(wanted.get()), character);
    }
    // Notes are set glyph by glyph, so what the font knows of ligatures and kerning is left out.
    for (const char* table : {"GSUB", "GPOS", "GDEF"}) {
        hb_set_add(hb_subset_input_set(wanted.get(), HB_SUBSET_SETS_DROP_TABLE_TAG), hb_tag_from_string(table, 4));
    }
    hb_subset_input_set_flags(wanted.get(), HB_SUBSET_FLAGS_NO_HINTING | HB_SUBSET_FLAGS_NOTDEF_OUTLINE);
    const Face part{hb_subset_or_fail(face.get(), wanted.get()), &hb_face_destroy};
    if (!part) {
        throw LetteringError("The font file " + font.file + " can't be read.");
    }
    FontSubset subset;
    const std::unique_ptr<hb_blob_t, decltype(&hb_blob_destroy)> bytes{hb_face_reference_blob(part.get()),
                                                                       &hb_blob_destroy};
    unsigned int length = 0;
    const char* data = hb_blob_get_data(bytes.get(), &length);
    subset.file.assign(data, length);
    const std::unique_ptr<hb_font_t, decltype(&hb_font_destroy)> sized{hb_font_create(part.get()), &hb_font_destroy};
    for (const char32_t character : characters) {
        hb_codepoint_t glyph = 0;
        hb_font_get_nominal_glyph(sized.get(), character, &glyph);
        subset.glyphs[character] = glyph;
    }
    return subset;
}

char32_t take_character(std::string_view& text) {
    const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
    const unsigned char first = byte(0);
    const std::size_t length = first < 0x80   ? 1
                               : first < 0xC2 ? 0
                               : first < 0xE0 ? 2
                               : first < 0xF0 ? 3
                               : first < 0xF5 ? 4
                                              : 0;
    bool good = length != 0 && length <= text.size();
    char32_t character = length <= 1 ? first : first & (0xFFU >> (length + 1));
    for (std::size_t i = 1; good && i < length; ++i) {
        good = (byte(i) & 0xC0U) == 0x80U;
        character = (character << 6U) | (byte(i) & 0x3FU);
    }
    constexpr char32_t k_least[] = {0, 0, 0x80, 0x800, 0x10000};
    good = good && character >= k_least[length] && character <= 0x10FFFF && (character < 0xD800 || character > 0xDFFF);
    text.remove_prefix(good ? length : 1);
    return good ? character : 0xFFFD;
}

} // namespace dialwright::layout
