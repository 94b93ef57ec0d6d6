// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"
#include "layout/lettering/font_files.hpp"

#include <cstdint>
#include <memory>
#include <string_view>
#include <vector>

struct hb_font_t;

namespace dialwright::layout {

/// One face of a font file, open for shaping and for outlines. In this header a `Point` holds units of the font, x to
/// the right and y up from the base line; `Lettering` scales them.
class FontFace {
  public:
    /// A glyph's contours: closed, outer ones anticlockwise, inner ones clockwise.
    struct Shape {
        std::vector<Path> outlines;
        Box box;
    };

    /// Nothing if the file cannot be read or holds no outlines that can be shaped.
    [[nodiscard]] static std::unique_ptr<FontFace> opened(const FontFile& file);
    ~FontFace();
    FontFace(const FontFace&) = delete;
    FontFace& operator=(const FontFace&) = delete;

    /// Exact: straight lines stay so and quadratic curves become the cubic ones that run through the same points. A
    /// glyph that is a picture or colour only has no outlines. Kept after the first call.
    [[nodiscard]] const Shape& shape(std::uint32_t glyph) const;
    /// Whether the face draws a letter with its marks, be it as one glyph or as several; a space draws nothing.
    [[nodiscard]] bool draws(std::u32string_view letter) const;
    /// Height of the outline of H; failing that the font's own statement, failing that 0.7 em.
    [[nodiscard]] double cap_height() const;
    [[nodiscard]] hb_font_t* shaper() const;

  private:
    struct Handles;
    explicit FontFace(std::unique_ptr<Handles> handles);
    std::unique_ptr<Handles> handles_;
};

} // namespace dialwright::layout
