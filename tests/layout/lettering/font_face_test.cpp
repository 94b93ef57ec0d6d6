// SPDX-License-Identifier: MIT
#include "layout/lettering/font_face.hpp"

#include <catch2/catch.hpp>

#include <cmath>

using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

/// Twice the area inside, anticlockwise positive.
double turn_of(const Path& path) {
    const std::vector<Point> points = flattened(path, 1.0);
    double sum = 0.0;
    for (std::size_t i = 0; i < points.size(); ++i) {
        const Point a = points[i], b = points[(i + 1) % points.size()];
        sum += a.x_mm * b.y_mm - b.x_mm * a.y_mm;
    }
    return sum;
}

} // namespace

TEST_CASE("A file that is no font opens nothing", "[layout][lettering]") {
    CHECK(FontFace::opened({"/nowhere/at-all.ttf", 0}) == nullptr);
    CHECK(FontFace::opened({DIALWRIGHT_SOURCE_DIR "/CMakeLists.txt", 0}) == nullptr);
    CHECK(FontFace::opened({font_file("DejaVu Sans").path, 99}) == nullptr);
}

TEST_CASE("Contours close and turn one way in TrueType and PostScript fonts", "[layout][lettering]") {
    for (const char* family : {"DejaVu Sans", "Liberation Serif", "EB Garamond", "GFS Didot"}) {
        CAPTURE(family);
        const auto face = FontFace::opened(font_file(family));
        REQUIRE(face);
        std::size_t turned_back = 0;
        for (std::uint32_t glyph = 1; glyph < 120; ++glyph) {
            double all = 0.0;
            for (const Path& path : face->shape(glyph).outlines) {
                REQUIRE(path.closed);
                REQUIRE(end_of(path) == path.start);
                all += turn_of(path);
                turned_back += turn_of(path) < 0.0 ? 1U : 0U;
            }
            CHECK(all >= 0.0);
        }
        CHECK(turned_back > 10); // the counters of A, B, D, O …
    }
}

TEST_CASE("Letters are drawn whole or not at all", "[layout][lettering]") {
    const auto face = FontFace::opened(font_file("GFS Didot"));
    REQUIRE(face);
    CHECK(face->draws(U"A"));
    CHECK(face->draws(U" "));
    CHECK(face->draws(U"\u2009")); // a thin space, which HarfBuzz can make
    CHECK(face->draws(U"e\u0301"));
    CHECK(face->draws(U"\u1f6d"));
    CHECK_FALSE(face->draws(U"\u05d0"));
    CHECK_FALSE(face->draws(U"\uE123"));
    CHECK_FALSE(face->draws(U"A\u05b0"));
}

TEST_CASE("Glyphs that the font lacks have no outlines", "[layout][lettering]") {
    const auto face = FontFace::opened(font_file("DejaVu Sans"));
    REQUIRE(face);
    CHECK(face->shape(0xFFFFFF).outlines.empty());
    CHECK(face->shape(0xFFFFFF).box.empty());
    CHECK_THAT(face->cap_height(), WithinAbs(1493.0, 0.0)); // see truetype_facts.py
}
