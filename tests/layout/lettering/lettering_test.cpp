// SPDX-License-Identifier: MIT
#include "layout/lettering/lettering.hpp"

#include "layout/lettering/font_files.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <sstream>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;

namespace {

Box box_of(const std::vector<Path>& paths) {
    Box box;
    for (const Path& path : paths)
        box.add(bounds_of(path));
    return box;
}

Box box_of_points(const std::vector<Path>& paths) {
    Box box;
    for (const Path& path : paths)
        for (const Point point : flattened(path, 1e-4))
            box.add(point);
    return box;
}

void check_same(const Box& one, const Box& other, double within_mm) {
    CHECK_THAT(one.left_mm, WithinAbs(other.left_mm, within_mm));
    CHECK_THAT(one.bottom_mm, WithinAbs(other.bottom_mm, within_mm));
    CHECK_THAT(one.right_mm, WithinAbs(other.right_mm, within_mm));
    CHECK_THAT(one.top_mm, WithinAbs(other.top_mm, within_mm));
}

/// In units of the font, read from its file without FreeType and HarfBuzz.
struct Facts {
    double em = 0, capital = 0, plain = 0, kerned = 0, left = 0, bottom = 0, right = 0, top = 0;
};
Facts facts_of(const std::string& path, const std::string& text) {
    const std::string command = "/usr/bin/python3 '" DIALWRIGHT_SOURCE_DIR
                                "/tests/layout/lettering/truetype_facts.py' '" +
                                path + "' '" + text + "'";
    FILE* pipe = popen(command.c_str(), "r");
    REQUIRE(pipe != nullptr);
    char line[200] = "";
    REQUIRE(std::fgets(line, sizeof line, pipe) != nullptr);
    REQUIRE(pclose(pipe) == 0);
    Facts facts;
    std::istringstream{line} >> facts.em >> facts.capital >> facts.plain >> facts.kerned >> facts.left >>
        facts.bottom >> facts.right >> facts.top;
    REQUIRE(facts.em > 0);
    return facts;
}

bool same(const std::vector<Path>& one, const std::vector<Path>& other) {
    const auto points = [](const std::vector<Path>& paths) {
        std::vector<Point> all;
        for (const Path& path : paths) {
            all.push_back(path.start);
            for (const Piece& piece : path.pieces) {
                if (const auto* curve = std::get_if<CurveTo>(&piece))
                    all.insert(all.end(), {curve->control_1, curve->control_2});
                all.push_back(end_of(piece));
            }
        }
        return all;
    };
    return points(one) == points(other);
}

} // namespace

TEST_CASE("The capitals are as high as asked", "[layout][lettering]") {
    for (const char* family : {"EB Garamond", "DejaVu Sans", "GFS Didot", "Liberation Serif"}) {
        CAPTURE(family);
        const Lettering font(family);
        for (const double size_mm : {2.5, 8.0, 40.0}) {
            const LetteredLine line = font.line("H", size_mm);
            CHECK_THAT(line.ink.height_mm(), WithinAbs(size_mm, 0.001));
            CHECK_THAT(box_of_points(line.glyphs.at(0).outlines).height_mm(), WithinAbs(size_mm, 0.001));
        }
    }
    CHECK_THROWS_AS(Lettering("DejaVu Sans").line("H", 0.0), std::invalid_argument);
    CHECK_THROWS_AS(Lettering("DejaVu Sans").line("H", std::nan("")), std::invalid_argument);
}

TEST_CASE("Advances, kerning and boxes are those in the font's tables", "[layout][lettering]") {
    for (const char* family : {"DejaVu Sans", "Liberation Serif"}) {
        const Lettering font(family);
        for (const char* text : {"AVATAR", "To Wave", "Hamburg", "XII", "O", "VIIII"}) {
            CAPTURE(family, text);
            const Facts facts = facts_of(font.file(), text);
            const double unit_mm = 10.0 / facts.capital;
            const LetteredLine line = font.line(text, 10.0);
            CHECK_THAT(line.advance_mm, WithinAbs(facts.kerned * unit_mm, 1e-9));
            const Box first = box_of(line.glyphs.at(0).outlines);
            check_same(first,
                       {facts.left * unit_mm, facts.bottom * unit_mm, facts.right * unit_mm, facts.top * unit_mm},
                       0.5 * unit_mm); // the file rounds the box of a curve to whole units
        }
    }
    // Kerning is at work: some pair above is not plain.
    const Facts facts = facts_of(font_file("DejaVu Sans").path, "AVATAR");
    CHECK(facts.kerned < facts.plain - 100);
}

TEST_CASE("The ink box is that of the outlines", "[layout][lettering]") {
    for (const char* family : {"EB Garamond", "DejaVu Sans", "GFS Didot"}) {
        const LetteredLine line = Lettering(family).line("Qu\u00e6 fugit, \u1f6d\u03c1\u03b1 \u2014 f", 7.0, 0.4);
        check_same(line.ink, box_of(set_straight(line, {}, {})), 1e-9);
        check_same(line.ink, box_of_points(set_straight(line, {}, {})), 2e-4);
    }
    const LetteredLine space = Lettering("EB Garamond").line(" ", 7.0);
    CHECK(space.ink.empty());
    CHECK(space.advance_mm > 0.5);
    const LetteredLine nothing = Lettering("EB Garamond").line("", 7.0);
    CHECK(nothing.glyphs.empty());
    CHECK(nothing.advance_mm == 0.0);
}

TEST_CASE("Mottos with accents and in Greek are whole", "[layout][lettering]") {
    for (const char* family : {"EB Garamond", "GFS Didot", "DejaVu Sans"})
        for (const char* text :
             {"\u03a9\u03a1\u0391 \u03a0\u0391\u039d\u03a4\u0391 \u03a6\u0395\u03a1\u0395\u0399", "\u1f6d\u03c1\u03b1",
              "Zeit \u2014 \u00c7elebi \u00c5ngstr\u00f6m", "54\u00b0 14\u2032 N"}) {
            CAPTURE(family, text);
            const LetteredLine line = Lettering(family).line(text, 6.0);
            std::size_t inked = 0, spaces = 0;
            for (const Glyph& glyph : line.glyphs)
                ++(glyph.outlines.empty() ? spaces : inked);
            const std::string_view view{text};
            CHECK(spaces == static_cast<std::size_t>(std::count(view.begin(), view.end(), ' ')));
            CHECK(inked >= 3);
        }
}

TEST_CASE("A letter with a combining accent is one glyph with the accent above", "[layout][lettering]") {
    for (const char* family : {"EB Garamond", "GFS Didot", "DejaVu Sans"}) {
        CAPTURE(family);
        const Lettering font(family);
        const LetteredLine whole = font.line("\u00e9", 10.0), parts = font.line("e\u0301", 10.0);
        REQUIRE(parts.glyphs.size() == 1);
        CHECK_THAT(parts.advance_mm, WithinAbs(whole.advance_mm, 1e-9));
        check_same(parts.ink, whole.ink, 0.2);
        // No font has this one whole.
        const LetteredLine rare = font.line("x\u0301", 10.0), plain = font.line("x", 10.0);
        REQUIRE(rare.glyphs.size() == 1);
        CHECK(rare.ink.top_mm > plain.ink.top_mm + 1.0);
    }
}

TEST_CASE("Hebrew stands from right to left, with a font that stands in", "[layout][lettering]") {
    for (const char* family : {"DejaVu Sans", "EB Garamond"}) {
        CAPTURE(family);
        const Lettering font(family);
        const LetteredLine word = font.line("\u05d0\u05d9", 10.0); // alef is wide, yod narrow
        REQUIRE(word.glyphs.size() == 2);
        CHECK(same(word.glyphs[0].outlines, font.line("\u05d9", 10.0).glyphs.at(0).outlines));
        CHECK(same(word.glyphs[1].outlines, font.line("\u05d0", 10.0).glyphs.at(0).outlines));
        const LetteredLine mixed = font.line("\u05d0 12", 10.0);
        REQUIRE(mixed.glyphs.size() == 4);
        CHECK(same(mixed.glyphs[0].outlines, font.line("1", 10.0).glyphs.at(0).outlines));
        CHECK(same(mixed.glyphs[3].outlines, font.line("\u05d0", 10.0).glyphs.at(0).outlines));
    }
}

TEST_CASE("Figures are as high as capitals where the font has such", "[layout][lettering]") {
    // EB Garamond's figures hang below the line unless lining ones are asked for.
    for (const char* family : {"EB Garamond", "GFS Didot", "DejaVu Sans"}) {
        CAPTURE(family);
        const Box ink = Lettering(family).line("1234567890", 10.0).ink;
        CHECK(ink.bottom_mm > -0.8); // round figures reach below the line; old-style ones hang by 3 mm
        CHECK_THAT(ink.top_mm, WithinAbs(10.0, 0.8));
    }
}

TEST_CASE("Tracking stands between glyphs and keeps letters apart", "[layout][lettering]") {
    const Lettering font("EB Garamond");
    const LetteredLine close = font.line("XIV", 8.0), wide = font.line("XIV", 8.0, 1.5);
    CHECK_THAT(wide.advance_mm, WithinAbs(close.advance_mm + 3.0, 1e-9));
    CHECK_THAT(wide.glyphs.at(2).pen_x_mm, WithinAbs(close.glyphs.at(2).pen_x_mm + 3.0, 1e-9));
    CHECK_THAT(wide.glyphs.at(1).advance_mm, WithinAbs(close.glyphs.at(1).advance_mm, 1e-9));
    const Lettering didot("GFS Didot");
    CHECK(didot.line("fi", 8.0).glyphs.size() == 1);
    CHECK(didot.line("fi", 8.0, 0.2).glyphs.size() == 2);
}

TEST_CASE("What cannot be drawn is refused by name", "[layout][lettering]") {
    CHECK_THROWS_AS(Lettering("No Such Family"), LetteringError);
    const Lettering font("EB Garamond");
    CHECK_THROWS_WITH(font.line("ab\uE123", 5.0), Contains("U+E123") && Contains("\uE123"));
    CHECK_THROWS_WITH(font.line("\xE9t\xE9", 5.0), Contains("UTF-8"));
    CHECK_THROWS_WITH(font.line("one\ntwo", 5.0), Contains("U+000A"));
    CHECK_NOTHROW(font.line("one", 5.0)); // and the font goes on working
}

TEST_CASE("The same line is the same outlines", "[layout][lettering]") {
    const char* text = "Hora fugit \u05d0 \u03a9";
    const Lettering font("EB Garamond"), again("eb garamond");
    const auto paths = [&](const Lettering& by) { return set_straight(by.line(text, 6.0, 0.1), {}, {}); };
    CHECK(same(paths(font), paths(font)));
    CHECK(same(paths(font), paths(again)));
}

TEST_CASE("A straight line starts where it is put and runs where it is turned", "[layout][lettering]") {
    const LetteredLine line = Lettering("DejaVu Sans").line("Hora", 6.0);
    check_same(box_of(set_straight(line, {10.0, 20.0}, {})),
               {10.0 + line.ink.left_mm, 20.0 + line.ink.bottom_mm, 10.0 + line.ink.right_mm, 20.0 + line.ink.top_mm},
               1e-9);
    check_same(box_of(set_straight(line, {10.0, 20.0}, Angle::degrees(90))),
               {10.0 - line.ink.top_mm, 20.0 + line.ink.left_mm, 10.0 - line.ink.bottom_mm, 20.0 + line.ink.right_mm},
               1e-9);
}

TEST_CASE("On a circle the middle letter stands upright at the middle", "[layout][lettering]") {
    // DejaVu's H, I and O are symmetric about the middle of their advance to a unit or two of the font.
    const Lettering font("DejaVu Sans");
    const LetteredLine line = font.line("OIO", 6.0), one = font.line("I", 6.0);
    const double radius_mm = 80.0;
    const Point centre{3.0, -4.0};
    const auto middle_letter = [&](Angle at, bool inward) {
        const LetteredLine alone{{line.glyphs.at(1)}, line.advance_mm, {}};
        return box_of(set_on_circle(alone, centre, radius_mm, at, inward));
    };
    const double half = one.ink.width_mm() / 2.0;
    const auto check_at = [&](const Box& box, Point least, Point most) {
        check_same(
            box, {centre.x_mm + least.x_mm, centre.y_mm + least.y_mm, centre.x_mm + most.x_mm, centre.y_mm + most.y_mm},
            0.01);
    };
    check_at(middle_letter(Angle::degrees(90), false), {-half, 80.0}, {half, 86.0});
    check_at(middle_letter(Angle::degrees(0), false), {80.0, -half}, {86.0, half});
    check_at(middle_letter(Angle::degrees(-90), true), {-half, -80.0}, {half, -74.0});
    check_at(middle_letter(Angle::degrees(180), true), {-80.0, -half}, {-74.0, half});
}

TEST_CASE("On a circle letters advance along it, clockwise or with heads inward anticlockwise", "[layout][lettering]") {
    const Lettering font("DejaVu Sans");
    const double radius_mm = 50.0;
    const LetteredLine line = font.line("IIIIIII", 4.0, 1.0);
    for (const bool inward : {false, true}) {
        const std::vector<Path> paths = set_on_circle(line, {}, radius_mm, Angle::degrees(30), inward);
        REQUIRE(paths.size() == 7); // I is one contour
        const double base_mm = line.glyphs[1].pen_x_mm - line.glyphs[0].pen_x_mm;
        for (std::size_t i = 0; i < paths.size(); ++i) {
            const Box box = bounds_of(paths[i]);
            const Angle expected = Angle::degrees(30) + Angle::radians((inward ? 1.0 : -1.0) * base_mm *
                                                                       (static_cast<double>(i) - 3.0) / radius_mm);
            const Point m = box.middle(); // a turned rectangle keeps its middle
            CHECK_THAT(arc_tangent(m.y_mm, m.x_mm).in_degrees(), WithinAbs(expected.in_degrees(), 0.02));
            CHECK_THAT(std::hypot(m.x_mm, m.y_mm), WithinAbs(inward ? 48.0 : 52.0, 0.001));
        }
    }
    CHECK_THROWS_AS(set_on_circle(line, {}, 0.0, {}, false), std::invalid_argument);
}
