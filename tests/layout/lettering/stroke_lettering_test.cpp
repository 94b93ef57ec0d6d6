// SPDX-License-Identifier: MIT
#include "layout/lettering/stroke_lettering.hpp"

#include "layout/lettering/stroke_shapes.hpp"

#include <catch2/catch.hpp>

#include <string>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

TEST_CASE("Single-stroke capitals are as high as asked, on the base line", "[layout]") {
    for (const StrokeFace face : {StrokeFace::roman, StrokeFace::plain}) {
        const StrokeLettering strokes{face};
        const LetteredLine line = strokes.line("HIEX", 7.5);
        CHECK(line.glyphs.size() == 4);
        CHECK_THAT(line.ink.bottom_mm, WithinAbs(0, 1e-9));
        CHECK_THAT(line.ink.top_mm, WithinAbs(7.5, 1e-9));
        const LetteredLine wide = strokes.line("HIEX", 7.5, 1.0);
        CHECK_THAT(wide.advance_mm, WithinAbs(line.advance_mm + 3, 1e-9));
        CHECK_THAT(strokes.line("x", 21).ink.top_mm, WithinAbs(14, 1e-9));
    }
}

TEST_CASE("Strokes are open, each drawn once", "[layout]") {
    const LetteredLine line =
        StrokeLettering{}.line("ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789", 10);
    for (const Glyph& glyph : line.glyphs) {
        CHECK_FALSE(glyph.outlines.empty());
        for (const Path& stroke : glyph.outlines)
            CHECK_FALSE(stroke.closed);
    }
}

TEST_CASE("Letters of the languages that dials speak have strokes", "[layout]") {
    const StrokeLettering strokes;
    for (const char* words : {"54° 27′ 12″ · 51–52", "Été, où, ça, naïve, œuvre", "ÀÂÄÅÃ ÇÉÈÊË ÍÌÎÏ ÑÓÒÔÖÕ ÚÙÛÜ ÝŸ",
                              "größer Straße", "smørrebrød Ærø þórður Þing ð", "kůň ďábel říčka ťal ĺ ľ Ľ",
                              "żółć gęślą jaźń Łódź", "őrült tűz", "ūdeņš ķēve ģimene", "ışık Iğdır şeker",
                              "¿Qué? ¡Sí! «eñe» “yes” ‘no’ „so“ … ½ × ± −", "Ἀλλά τὸ φῶς", "ΩΡΑΙ ώρα Σωκράτης ΰ"}) {
        INFO(words);
        if (std::string{words}.starts_with("Ἀ"))
            CHECK_THROWS_WITH(strokes.line(words, 5), Catch::Contains("U+0313")); // breathings are not drawn
        else
            CHECK_NOTHROW(strokes.line(words, 5));
    }
}

TEST_CASE("An accent stands over its letter, composed or not, and takes the place of a dot", "[layout]") {
    const StrokeLettering strokes;
    const LetteredLine composed = strokes.line("é", 21), apart = strokes.line("e\u0301", 21),
                       plain = strokes.line("e", 21);
    REQUIRE(composed.glyphs.size() == 1);
    REQUIRE(apart.glyphs.size() == 1);
    CHECK(composed.glyphs[0].outlines.size() == plain.glyphs[0].outlines.size() + 1);
    CHECK(apart.ink.top_mm == composed.ink.top_mm);
    const Box accent = bounds_of(composed.glyphs[0].outlines.back());
    CHECK(accent.bottom_mm > plain.ink.top_mm + 1);
    CHECK_THAT(accent.middle().x_mm, WithinAbs(plain.ink.middle().x_mm, 1.0));
    CHECK(strokes.line("í", 21).glyphs[0].outlines.size() == strokes.line("ı", 21).glyphs[0].outlines.size() + 1);
    CHECK(strokes.line("ç", 21).ink.bottom_mm < -4);
    CHECK(strokes.line("É", 21).ink.top_mm > 25);
    CHECK(strokes.line("°", 21).glyphs[0].outlines.size() == 1);
}

TEST_CASE("Greek letters are those of the Greek file", "[layout]") {
    const StrokeLettering strokes;
    const auto greek = stroke_file("greeks");
    const auto same = [&](const char* text, char place) {
        const LetteredLine line = strokes.line(text, 21);
        const StrokeShape& shape = greek.at(static_cast<std::size_t>(place - ' '));
        REQUIRE(line.glyphs.at(0).outlines.size() == shape.strokes.size());
        CHECK_THAT(line.advance_mm, WithinAbs(shape.advance, 1e-9));
        CHECK(bounds_of(line.glyphs[0].outlines[0]).right_mm == bounds_of(shape.strokes[0]).right_mm);
    };
    same("Γ", 'C');
    same("Σ", 'R');
    same("Ω", 'X');
    same("σ", 'r');
    same("τ", 's');
    same("ω", 'x');
}

TEST_CASE("A character without strokes is named", "[layout]") {
    const StrokeLettering strokes;
    CHECK_THROWS_WITH(strokes.line("12 時", 5), Catch::Contains("\"時\" (U+6642)"));
    CHECK_THROWS_AS(strokes.line("Ж", 5), LetteringError);
    CHECK_THROWS_AS(strokes.line("\xff", 5), LetteringError);
    CHECK_THROWS_AS(strokes.line("a", 0), std::invalid_argument);
    CHECK(strokes.line("", 5).glyphs.empty());
}

TEST_CASE("Single strokes are set on a circle as outlines are", "[layout]") {
    const LetteredLine line = StrokeLettering{}.line("XII", 5);
    Box box;
    for (const Path& stroke : set_on_circle(line, {0, 0}, 100, Angle::degrees(90), false))
        box.add(bounds_of(stroke));
    CHECK_THAT(box.top_mm, WithinAbs(105, 0.05));
    CHECK_THAT(box.middle().x_mm, WithinAbs(0, 0.5));
}
