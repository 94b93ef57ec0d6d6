// SPDX-License-Identifier: MIT
#include "layout/lettering/font_face.hpp"

#include "layout/lettering/text_runs.hpp"

#include <algorithm>
#include <ft2build.h>
#include <hb-ot.h>
#include <unordered_map>
#include FT_FREETYPE_H
#include FT_OUTLINE_H
#include FT_TRUETYPE_TABLES_H

namespace dialwright::layout {
namespace {

struct Release {
    void operator()(hb_blob_t* blob) const { hb_blob_destroy(blob); }
    void operator()(hb_font_t* font) const { hb_font_destroy(font); }
    void operator()(hb_buffer_t* buffer) const { hb_buffer_destroy(buffer); }
    void operator()(FT_Library library) const { FT_Done_FreeType(library); }
    void operator()(FT_Face face) const { FT_Done_Face(face); }
};
template <typename T>
using Owned = std::unique_ptr<T, Release>;

Point point(const FT_Vector* at) {
    return {static_cast<double>(at->x), static_cast<double>(at->y)};
}

/// What FreeType calls back while it walks an outline.
struct Walk {
    std::vector<Path> paths;

    Point pen() const { return end_of(paths.back()); }
    void add(const Piece& piece) { paths.back().pieces.push_back(piece); }

    static int move(const FT_Vector* to, void* walk) {
        auto& self = *static_cast<Walk*>(walk);
        self.paths.push_back({point(to), {}, true});
        return 0;
    }
    static int line(const FT_Vector* to, void* walk) {
        auto& self = *static_cast<Walk*>(walk);
        if (self.pen() != point(to))
            self.add(LineTo{point(to)});
        return 0;
    }
    static int quadratic(const FT_Vector* control, const FT_Vector* to, void* walk) {
        auto& self = *static_cast<Walk*>(walk);
        const Point from = self.pen(), q = point(control), end = point(to);
        const auto towards = [&q](Point p) {
            return Point{(p.x_mm + 2.0 * q.x_mm) / 3.0, (p.y_mm + 2.0 * q.y_mm) / 3.0};
        };
        self.add(CurveTo{towards(from), towards(end), end});
        return 0;
    }
    static int cubic(const FT_Vector* one, const FT_Vector* two, const FT_Vector* to, void* walk) {
        auto& self = *static_cast<Walk*>(walk);
        self.add(CurveTo{point(one), point(two), point(to)});
        return 0;
    }
};

std::vector<Path> walked(FT_Outline& outline) {
    // TrueType fonts turn the other way than PostScript ones; letters of both may overlap in one filled mark.
    if (FT_Outline_Get_Orientation(&outline) == FT_ORIENTATION_TRUETYPE)
        FT_Outline_Reverse(&outline);
    const FT_Outline_Funcs calls{Walk::move, Walk::line, Walk::quadratic, Walk::cubic, 0, 0};
    Walk walk;
    if (FT_Outline_Decompose(&outline, &calls, &walk) != 0)
        return {};
    std::erase_if(walk.paths, [](const Path& path) { return path.pieces.empty(); });
    for (Path& path : walk.paths)
        if (end_of(path) != path.start)
            path.pieces.push_back(LineTo{path.start});
    return std::move(walk.paths);
}

} // namespace

struct FontFace::Handles {
    Owned<hb_blob_t> bytes; ///< outlives the two that read from it
    Owned<hb_font_t> font;
    Owned<std::remove_pointer_t<FT_Library>> library;
    Owned<std::remove_pointer_t<FT_Face>> face;
    std::unordered_map<std::uint32_t, Shape> shapes;
};

FontFace::FontFace(std::unique_ptr<Handles> handles) : handles_{std::move(handles)} {}
FontFace::~FontFace() = default;

std::unique_ptr<FontFace> FontFace::opened(const FontFile& file) {
    auto handles = std::make_unique<Handles>();
    handles->bytes.reset(hb_blob_create_from_file_or_fail(file.path.c_str()));
    if (!handles->bytes)
        return nullptr;
    hb_face_t* shaped = hb_face_create(handles->bytes.get(), static_cast<unsigned>(file.index & 0xFFFF));
    handles->font.reset(hb_font_create(shaped));
    const unsigned glyphs = hb_face_get_glyph_count(shaped);
    hb_face_destroy(shaped); // the font keeps it
    if (file.index >> 16 != 0)
        hb_font_set_var_named_instance(handles->font.get(), static_cast<unsigned>(file.index >> 16) - 1U);

    FT_Library library = nullptr;
    if (glyphs == 0 || FT_Init_FreeType(&library) != 0)
        return nullptr;
    handles->library.reset(library);
    unsigned length = 0;
    const char* data = hb_blob_get_data(handles->bytes.get(), &length);
    FT_Face face = nullptr;
    if (FT_New_Memory_Face(library, reinterpret_cast<const FT_Byte*>(data), static_cast<FT_Long>(length), file.index,
                           &face) != 0)
        return nullptr;
    handles->face.reset(face);
    if (!FT_IS_SCALABLE(face) || face->units_per_EM == 0)
        return nullptr;
    return std::unique_ptr<FontFace>{new FontFace{std::move(handles)}};
}

const FontFace::Shape& FontFace::shape(std::uint32_t glyph) const {
    const auto [place, is_new] = handles_->shapes.try_emplace(glyph);
    FT_Face face = handles_->face.get();
    if (is_new && FT_Load_Glyph(face, glyph, FT_LOAD_NO_SCALE | FT_LOAD_NO_HINTING | FT_LOAD_NO_BITMAP) == 0 &&
        face->glyph->format == FT_GLYPH_FORMAT_OUTLINE) {
        place->second.outlines = walked(face->glyph->outline);
        for (const Path& path : place->second.outlines)
            place->second.box.add(bounds_of(path));
    }
    return place->second;
}

bool FontFace::draws(std::u32string_view letter) const {
    // Most letters are plain: one glyph for each character, found in the font's own table.
    const auto plain = [this](char32_t character) {
        hb_codepoint_t glyph = 0;
        return hb_font_get_nominal_glyph(shaper(), static_cast<hb_codepoint_t>(character), &glyph) != 0 &&
               (is_space(character) || joins_letter_before(character) || !shape(glyph).outlines.empty());
    };
    if (std::all_of(letter.begin(), letter.end(), plain))
        return true;
    // The font may have the accented letter whole, or only its parts, or a space of another width.
    const Owned<hb_buffer_t> buffer{hb_buffer_create()};
    for (std::size_t i = 0; i < letter.size(); ++i)
        hb_buffer_add(buffer.get(), static_cast<hb_codepoint_t>(letter[i]), static_cast<unsigned>(i));
    hb_buffer_set_content_type(buffer.get(), HB_BUFFER_CONTENT_TYPE_UNICODE);
    hb_buffer_set_script(buffer.get(), static_cast<hb_script_t>(scripts_of(letter).front()));
    hb_buffer_set_direction(buffer.get(), HB_DIRECTION_LTR);
    hb_shape(shaper(), buffer.get(), nullptr, 0);
    unsigned count = 0;
    const hb_glyph_info_t* glyphs = hb_buffer_get_glyph_infos(buffer.get(), &count);
    const bool unseen = is_space(letter.front()) || joins_letter_before(letter.front());
    bool inked = false;
    for (unsigned i = 0; i < count; ++i) {
        if (glyphs[i].codepoint == 0)
            return false;
        inked = inked || !shape(glyphs[i].codepoint).outlines.empty();
    }
    return inked || unseen;
}

double FontFace::cap_height() const {
    hb_codepoint_t glyph = 0;
    if (hb_font_get_nominal_glyph(shaper(), 'H', &glyph) != 0 && !shape(glyph).box.empty())
        return shape(glyph).box.height_mm();
    const auto* table = static_cast<const TT_OS2*>(FT_Get_Sfnt_Table(handles_->face.get(), FT_SFNT_OS2));
    if (table != nullptr && table->version >= 2 && table->version != 0xFFFF && table->sCapHeight > 0)
        return table->sCapHeight;
    return 0.7 * handles_->face->units_per_EM;
}

hb_font_t* FontFace::shaper() const {
    return handles_->font.get();
}

} // namespace dialwright::layout
