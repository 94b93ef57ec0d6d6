// SPDX-License-Identifier: MIT
#include "layout/lettering/stroke_lettering.hpp"

#include "layout/lettering/stroke_shapes.hpp"
#include "layout/lettering/text_runs.hpp"

#include <algorithm>
#include <cmath>
#include <hb.h>
#include <optional>
#include <stdexcept>
#include <utility>

namespace dialwright::layout {
namespace {

/// A letter and the marks on it, taken apart by Unicode's canonical decomposition.
std::u32string taken_apart(char32_t character) {
    hb_codepoint_t first = 0, mark = 0;
    if (hb_unicode_decompose(hb_unicode_funcs_get_default(), character, &first, &mark) == 0)
        return {character};
    std::u32string parts = taken_apart(first);
    if (mark != 0)
        parts += static_cast<char32_t>(mark);
    return parts;
}

/// Characters that are told to a typesetter and never seen.
bool is_unseen(char32_t character) {
    return hb_unicode_general_category(hb_unicode_funcs_get_default(), character) ==
               HB_UNICODE_GENERAL_CATEGORY_FORMAT ||
           (character >= 0xFE00 && character <= 0xFE0F);
}

/// A mark that is another one by its form: Greek tonos and oxia are the acute accent.
char32_t as_stroked(char32_t mark) {
    return mark == 0x342 ? char32_t{0x303} : mark;
}

void slash(StrokeShape& shape) {
    Box ink;
    for (const Path& stroke : shape.strokes)
        ink.add(bounds_of(stroke));
    shape.strokes.push_back(polyline({{ink.left_mm, ink.bottom_mm - 1}, {ink.right_mm, ink.top_mm + 1}}));
}

} // namespace

struct StrokeLettering::Letters {
    std::vector<StrokeShape> latin, greek;

    [[nodiscard]] std::optional<StrokeShape> shape(char32_t character) const;

  private:
    [[nodiscard]] const StrokeShape& ascii(char32_t c) const { return latin[c - U' ']; }
    [[nodiscard]] std::optional<StrokeShape> greek_shape(char32_t c) const;
    [[nodiscard]] StrokeShape joined(char32_t a, char32_t b) const;
    [[nodiscard]] std::optional<StrokeShape> made_of_others(char32_t c) const;
};

/// The file holds Α to Ω in the places of A to X, and α to ω in those of a to x; it has no final sigma.
std::optional<StrokeShape> StrokeLettering::Letters::greek_shape(char32_t c) const {
    const bool small = c >= U'α' && c <= U'ω', capital = c >= U'Α' && c <= U'Ω';
    if ((!small && !capital) || c == U'ς' || c == 0x3A2)
        return std::nullopt;
    const char32_t place = c - (small ? U'α' : U'Α');
    const char32_t after_sigma = place > 17 ? 1 : 0;
    return greek[place - after_sigma + (small ? U'a' : U'A') - U' '];
}

StrokeShape StrokeLettering::Letters::joined(char32_t a, char32_t b) const {
    StrokeShape made = ascii(a);
    const StrokeShape& second = ascii(b);
    Box left, right;
    for (const Path& stroke : made.strokes)
        left.add(bounds_of(stroke));
    for (const Path& stroke : second.strokes)
        right.add(bounds_of(stroke));
    const double by = left.right_mm - right.left_mm; // side by side, touching
    for (const Path& stroke : second.strokes)
        made.strokes.push_back(Placing{{}, {by, 0}}(stroke));
    made.advance = second.advance + by;
    return made;
}

std::optional<StrokeShape> StrokeLettering::Letters::made_of_others(char32_t c) const {
    const auto with = [&](char32_t letter, std::vector<Point> stroke) {
        StrokeShape made = ascii(letter);
        made.strokes.push_back(polyline(stroke));
        return made;
    };
    const auto upside_down = [&](char32_t sign) {
        StrokeShape made = ascii(sign);
        for (Path& stroke : made.strokes)
            stroke = Placing{Angle::degrees(180), {made.advance, k_stroke_small}}(stroke);
        return made;
    };
    switch (c) {
    case U'Ø':
    case U'ø': {
        StrokeShape made = ascii(c == U'Ø' ? U'O' : U'o');
        slash(made);
        return made;
    }
    case U'Ł':
        return with(U'L', {{1, 8}, {10, 14}});
    case U'ł':
        return with(U'l', {{1, 8}, {ascii(U'l').advance - 1, 13}});
    case U'Đ':
    case U'Ð':
        return with(U'D', {{0, 11}, {11, 11}});
    case U'đ':
        return with(U'd', {{9, 17}, {18, 17}});
    case U'Æ':
        return joined(U'A', U'E');
    case U'æ':
        return joined(U'a', U'e');
    case U'Œ':
        return joined(U'O', U'E');
    case U'œ':
        return joined(U'o', U'e');
    case U'ı': {
        StrokeShape made = ascii(U'i');
        std::erase_if(made.strokes, [](const Path& stroke) { return bounds_of(stroke).bottom_mm > k_stroke_small; });
        return made;
    }
    case U'¡':
        return upside_down(U'!');
    case U'¿':
        return upside_down(U'?');
    case U'…': {
        StrokeShape made;
        for (int i = 0; i < 3; ++i) {
            for (const Path& stroke : ascii(U'.').strokes)
                made.strokes.push_back(Placing{{}, {made.advance, 0}}(stroke));
            made.advance += ascii(U'.').advance;
        }
        return made;
    }
    default:
        return std::nullopt;
    }
}

std::optional<StrokeShape> StrokeLettering::Letters::shape(char32_t c) const {
    if (is_space(c))
        return StrokeShape{{}, ascii(U' ').advance};
    if (auto own = own_shape(c))
        return own;
    if (c > U' ' && c < 0x7F)
        return ascii(c);
    if (auto greek_one = greek_shape(c))
        return greek_one;
    return made_of_others(c);
}

StrokeLettering::StrokeLettering(StrokeFace face) : letters_{std::make_unique<Letters>()} {
    letters_->latin = stroke_file(face == StrokeFace::roman ? "rowmans" : "futural");
    letters_->greek = stroke_file("greeks");
}

StrokeLettering::~StrokeLettering() = default;
StrokeLettering::StrokeLettering(StrokeLettering&&) noexcept = default;
StrokeLettering& StrokeLettering::operator=(StrokeLettering&&) noexcept = default;

LetteredLine StrokeLettering::line(std::string_view text, double size_mm, double tracking_mm) const {
    if (!(size_mm > 0.0) || !std::isfinite(size_mm) || !std::isfinite(tracking_mm))
        throw std::invalid_argument("the size of lettering must be above zero, its tracking finite");
    std::u32string characters;
    for (const char32_t c : decoded(text))
        characters += is_unseen(c) ? std::u32string{} : own_shape(c) ? std::u32string{c} : taken_apart(c);
    const double scale = size_mm / k_stroke_capitals;
    LetteredLine line;
    const auto missing = [](char32_t c) {
        return LetteringError("the single-stroke letters have no " + named(c) +
                              ": change the text, or take lettering in outlines");
    };
    for (std::size_t i = 0; i < characters.size();) {
        const char32_t letter = characters[i];
        std::optional<StrokeShape> shape = letters_->shape(letter);
        if (!shape)
            throw missing(letter);
        for (++i; i < characters.size() && joins_letter_before(characters[i]); ++i) {
            const char32_t mark = as_stroked(characters[i]);
            if (!is_accent(mark))
                throw missing(characters[i]);
            add_accent(*shape, letter, mark);
        }
        Glyph& glyph = line.glyphs.emplace_back();
        glyph.pen_x_mm = line.glyphs.size() > 1 ? line.advance_mm + tracking_mm : 0.0;
        glyph.advance_mm = shape->advance * scale;
        line.advance_mm = glyph.pen_x_mm + glyph.advance_mm;
        for (const Path& stroke : shape->strokes) {
            glyph.outlines.push_back(Placing{{}, {}, scale, scale}(stroke));
            line.ink.add(bounds_of(Placing{{}, {glyph.pen_x_mm, 0}}(glyph.outlines.back())));
        }
    }
    return line;
}

} // namespace dialwright::layout
