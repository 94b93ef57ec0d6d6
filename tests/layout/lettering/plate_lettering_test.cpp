// SPDX-License-Identifier: MIT
#include "layout/lettering/plate_lettering.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

TEST_CASE("Italic is the font's own, or slanted by 12° where there is none and of strokes", "[layout]") {
    constexpr double k_tan_12 = 0.21256;
    for (const bool strokes : {false, true}) {
        // An I is upright: slanted, its top stands off its foot by its height.
        const std::string family = "DejaVu Sans Mono";
        const LetteredLine roman = PlateLettering{family, strokes}.line("I", 10);
        const LetteredLine italic = PlateLettering{family, strokes, true}.line("I", 10);
        CAPTURE(strokes);
        CHECK_THAT(italic.ink.height_mm(), WithinAbs(roman.ink.height_mm(), 0.3));
        CHECK(italic.ink.width_mm() > roman.ink.width_mm() + 0.8);
        if (strokes)
            CHECK_THAT(italic.ink.width_mm() - roman.ink.width_mm(), WithinAbs(10 * k_tan_12, 0.01));
        CHECK_THAT(italic.advance_mm, WithinAbs(roman.advance_mm, 0.6));
    }
    // The box of the ink is that of what is drawn.
    const LetteredLine line = PlateLettering{"EB Garamond", true, true}.line("8 xiv°", 5);
    Box box;
    for (const Glyph& glyph : line.glyphs)
        for (const Path& path : glyph.outlines) {
            Box own = bounds_of(path);
            own.left_mm += glyph.pen_x_mm;
            own.right_mm += glyph.pen_x_mm;
            box.add(own);
        }
    CHECK_THAT(box.left_mm, WithinAbs(line.ink.left_mm, 1e-9));
    CHECK_THAT(box.right_mm, WithinAbs(line.ink.right_mm, 1e-9));
    CHECK_THAT(box.top_mm, WithinAbs(line.ink.top_mm, 1e-9));
}
