// SPDX-License-Identifier: MIT
#include "layout/plate/tool_check.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;

namespace {

DrawnLine line(Family family, const char* label, double time_h, std::vector<PlatePoint> points) {
    DrawnLine made;
    made.family = family;
    made.label = label;
    made.time_h = time_h;
    made.width_mm = 1.0;
    made.points = std::move(points);
    return made;
}

/// Two hours that run from 20 mm to 100 mm from the dial's centre at (0, 0), `spread` apart; two date lines `gap` apart.
Face face_of(Angle spread, double gap) {
    Face face;
    face.delineation.style.centre = PlatePoint{0, 0};
    face.lines = {
        line(Family::hour, "XII", 12, {{0, 20}, {0, 100}}),
        line(Family::hour, "XI", 11, {{-20 * sin(spread), 20 * cos(spread)}, {-100 * sin(spread), 100 * cos(spread)}}),
        line(Family::date, "21 Dec", 0, {{-50, -20}, {50, -20}}),
        line(Family::date, "1 Jan", 0, {{-50, -20 - gap}, {0, -20 - gap - 5}})};
    return face;
}

FaceSpec spec_of(Tool tool, double line_mm) {
    FaceSpec spec;
    spec.plate.width_mm = spec.plate.height_mm = 240;
    spec.cutting.tool = tool;
    spec.cutting.diameter_mm = spec.cutting.line_width_mm = line_mm;
    spec.cutting.least_gap_mm = 2 * line_mm;
    return spec;
}

} // namespace

TEST_CASE("The finest line of each tool", "[layout]") {
    Cutting cutting;
    cutting.line_width_mm = 2;
    CHECK(thinnest_line_mm(cutting) == 0);
    cutting.tool = Tool::v_cutter;
    CHECK_THAT(thinnest_line_mm(cutting), WithinAbs(1, 1e-12));
    cutting.flat_mm = 1.5;
    CHECK_THAT(thinnest_line_mm(cutting), WithinAbs(1.5, 1e-12));
    cutting.tool = Tool::laser;
    cutting.diameter_mm = 0.2;
    CHECK_THAT(thinnest_line_mm(cutting), WithinAbs(0.2, 1e-12));
}

TEST_CASE("Lines that stand too close are found with their place", "[layout]") {
    const Angle spread = Angle::degrees(3);
    const auto found = close_lines(face_of(spread, 2.5), spec_of(Tool::end_mill, 1.0));
    REQUIRE(found.size() == 2);
    // Clear of each other by 2 mm, and by their own widths, from 3 / sin 3° on.
    CHECK(found[0].of_ring);
    CHECK_THAT(found[0].radius_mm, WithinAbs(3.0 / sin(spread), 1e-6));
    CHECK_THAT(found[0].reach_mm, WithinAbs(100, 1e-6));
    CHECK_THAT(found[1].gap_mm, WithinAbs(1.5, 1e-6)); // 2.5 mm less the widths
    CHECK(found[1].kinds == "date lines");
    CHECK_THAT(found[1].at.x_mm, WithinAbs(-50, 0.5));
    CHECK(close_lines(face_of(spread, 3.5), spec_of(Tool::end_mill, 1.0)).size() == 1);
    // Where no tool is named, date lines alone.
    CHECK(close_lines(face_of(spread, 2.5), spec_of(Tool::any, 1.0)).size() == 1);
}

TEST_CASE("The place is told as the reader stands", "[layout]") {
    FaceSpec spec = spec_of(Tool::any, 1.0);
    spec.reader_up = Angle::degrees(180);
    const auto found = close_lines(face_of(Angle::degrees(15), 2.5), spec);
    REQUIRE(found.size() == 1);
    CHECK_THAT(found[0].at.x_mm, WithinAbs(50, 0.5));
    CHECK(found[0].at.y_mm > 0);
}

TEST_CASE("Sentences for the maker", "[layout]") {
    Face face = face_of(Angle::degrees(3), 2.5);
    const auto told = tool_warnings(face, spec_of(Tool::end_mill, 1.0));
    REQUIRE(told.size() == 2);
    CHECK_THAT(told[0], Contains("\"hour line XI\"") && Contains("\"borders: inner: 58 mm\" would part them"));
    CHECK_THAT(told[1], Contains("1.50 mm between them 50 mm left and 20 mm down from the plate's middle"));
    CHECK(tool_warnings(face_of(Angle::degrees(15), 4.0), spec_of(Tool::any, 1.0)).empty());

    // A letter with a hairline of 0.2 mm and an eye of 0.4 mm under a tool of 0.5 mm.
    face = face_of(Angle::degrees(15), 9.0);
    const auto hairline = [](double x) { return rectangle({x, 10, x + 8, 10.2}); };
    face.drawing.marks.push_back({Layer::engrave, {rectangle({0, 5, 2, 15}), hairline(2)}, 0.0, true, "label H"});
    face.lettering = {{0, "label", 5.0}};
    const auto letters = tool_warnings(face, spec_of(Tool::laser, 0.5));
    REQUIRE(letters.size() == 1);
    CHECK_THAT(letters[0], Contains("no line finer than 0.50 mm") && Contains("in \"label H\"") &&
                               Contains("6 mm right and 10 mm up from the plate's middle") && Contains("would do"));
    CHECK(tool_warnings(face, spec_of(Tool::laser, 0.15)).empty());
    CHECK(tool_warnings(face, spec_of(Tool::any, 0.5)).empty());
}

TEST_CASE("A gnomon's gap that is too narrow is told", "[layout]") {
    Face face = face_of(Angle::degrees(15), 9.0);
    face.lines.push_back(line(Family::hour, "XII", 12, {{3, 20}, {3, 100}}));
    CHECK(tool_warnings(face, spec_of(Tool::laser, 1.0)).empty()); // 2 mm of stock between lines of 1 mm, as wanted
    const auto told = tool_warnings(face, spec_of(Tool::laser, 1.2));
    REQUIRE(told.size() == 1);
    CHECK_THAT(told[0], Contains("leaves 2.00 mm between the two lines of XII") && Contains("wants 2.40 mm"));
    CHECK(tool_warnings(face, spec_of(Tool::any, 1.2)).empty());
}

TEST_CASE("A tool that parts no hours", "[layout]") {
    CHECK_FALSE(parts_no_hours(face_of(Angle::degrees(3), 9), spec_of(Tool::end_mill, 1.0)));
    CHECK(parts_no_hours(face_of(Angle::degrees(3), 9), spec_of(Tool::end_mill, 2.5))); // 6 / sin 3° is 115 mm
    CHECK_FALSE(parts_no_hours(face_of(Angle::degrees(3), 9), spec_of(Tool::any, 2.5)));
}
