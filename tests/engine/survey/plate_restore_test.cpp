// SPDX-License-Identifier: MIT
#include "engine/style/style.hpp"
#include "engine/survey/plate_restore.hpp"

#include <catch2/catch.hpp>

#include <cmath>

using Catch::Matchers::WithinAbs;
using namespace dialwright;
using Fact = PlateSolution::Fact;

namespace {

struct Truth {
    double latitude, facing, lean, ahead_min;
};

/// Lines from the plate's centre, by their numerals, exact.
PlateReadings lines_of(const Truth& truth, int first, int last) {
    const PlateFrame frame = frame_of({Angle::degrees(truth.facing), Angle::degrees(truth.lean)});
    const Style style = style_of(frame, 100, Angle::degrees(truth.latitude));
    PlateReadings readings;
    for (int hour = first; hour <= last; ++hour) {
        const Angle hour_angle = Angle::degrees(15.0 * (hour - 12) - truth.ahead_min / 4);
        PlateLine line;
        line.hour_h = (hour + 11) % 12 + 1;
        line.direction_deg =
            hour_line_direction(frame, style, Angle::degrees(truth.latitude), hour_angle)->in_degrees();
        readings.lines.push_back(line);
    }
    return readings;
}

const PlateSolution* by(const std::vector<PlateSolution>& solutions, Fact fact, double lean = 0, double latitude = 0) {
    const PlateSolution* best = nullptr;
    for (const PlateSolution& one : solutions)
        if (one.fact == fact && (latitude == 0 || one.latitude_deg.value * latitude > 0) &&
            (best == nullptr || std::abs(one.lean_deg.value - lean) < std::abs(best->lean_deg.value - lean)))
            best = &one;
    return best;
}

void check(const PlateSolution* one, const Truth& truth) {
    REQUIRE(one != nullptr);
    CHECK_THAT(one->latitude_deg.value, WithinAbs(truth.latitude, 1e-3));
    if (truth.lean < 89) {
        REQUIRE(one->facing_deg);
        CHECK_THAT(std::remainder(one->facing_deg->value - truth.facing, 360), WithinAbs(0, 1e-3));
    }
    CHECK_THAT(one->lean_deg.value, WithinAbs(truth.lean, 1e-3));
    CHECK_THAT(one->ahead_min.value, WithinAbs(truth.ahead_min, 0.01));
}

} // namespace

TEST_CASE("Exact lines give an upright plate back, and its figure is the style's", "[restore]") {
    for (const Truth& truth : {Truth{52, 157, 0, 0}, Truth{-34, 20, 0, 12}, Truth{60, 215, 0, -30},
                               Truth{12, 185, 0, 5}, Truth{50, 340, 0, 0}}) {
        INFO(truth.latitude << " " << truth.facing);
        const bool north = truth.facing == 340;
        const PlateReadings readings = lines_of(truth, north ? 3 : 7, north ? 8 : 16);
        const auto figure = figure_of(readings);
        REQUIRE(figure);
        const PlateFrame frame = frame_of({Angle::degrees(truth.facing), Angle{}});
        const Style style = style_of(frame, 100, Angle::degrees(truth.latitude));
        CHECK_THAT(figure->style_height_deg.value, WithinAbs(style.height.in_degrees(), 1e-3));
        // Where only hours far from the substyle's are left, its two ends look alike: then both plates are given.
        CHECK(figure->side_told == !north);
        CHECK_THAT(std::remainder(figure->substyle_deg.value - style.substyle.in_degrees(), north ? 180 : 360),
                   WithinAbs(0, 1e-2));
        check(by(solutions_of(*figure, true, {}), Fact::upright, 0, truth.latitude), truth);
    }
}

TEST_CASE("Level and leaning plates come back by the fact that is true of them", "[restore]") {
    const Truth level{47, 0, 90, 0};
    const auto flat = figure_of(lines_of(level, 5, 19));
    REQUIRE(flat);
    check(by(solutions_of(*flat, true, {}), Fact::level), level);

    const Truth leaning{47, 200, 35, 0};
    const auto figure = figure_of(lines_of(leaning, 7, 17));
    REQUIRE(figure);
    PlateFacts facts;
    facts.latitude_deg = Known{47, 0.01};
    facts.lean_deg = Known{35, 0.2};
    const auto solutions = solutions_of(*figure, true, facts);
    check(by(solutions, Fact::latitude, 35), leaning);
    check(by(solutions, Fact::lean), leaning);
    check(by(solutions, Fact::sun_time), leaning);
    // Every one of them has the same lines: a level plate at the style's height.
    REQUIRE(by(solutions, Fact::level));
    CHECK_THAT(std::abs(by(solutions, Fact::level)->latitude_deg.value),
               WithinAbs(figure->style_height_deg.value, 1e-6));
}

TEST_CASE("A wall that faces east has parallel lines, and no answer is lost", "[restore]") {
    // Hour lines of a direct east wall: parallel to the axis, h cot H apart (gnomonics, the classical form).
    const double latitude = 51, h = 120;
    PlateReadings readings;
    for (int hour = 5; hour <= 11; ++hour) {
        const double across = h / std::tan((12 - hour) * 15 * std::acos(-1.0) / 180);
        const double c = std::cos(latitude * std::acos(-1.0) / 180), s = std::sin(latitude * std::acos(-1.0) / 180);
        // Who faces the wall has north on the right: the axis rises to the right, and shadows of the morning Sun go down to the north.
        PlateLine line;
        line.hour_h = hour;
        for (const double along : {-60.0, 140.0})
            line.points.push_back({along * c - across * -s + 30, along * s - across * c - 20});
        readings.lines.push_back(line);
    }
    const auto figure = figure_of(readings);
    REQUIRE(figure);
    CHECK_THAT(figure->style_height_deg.value, WithinAbs(0, 1e-3));
    const auto solutions = solutions_of(*figure, true, {});
    const PlateSolution* upright = by(solutions, Fact::upright);
    REQUIRE(upright);
    REQUIRE(upright->facing_deg);
    const bool east =
        std::abs(upright->facing_deg->value - 90) < 0.01 && std::abs(upright->latitude_deg.value - latitude) < 0.01;
    INFO(upright->facing_deg->value << " " << upright->latitude_deg.value << " " << upright->ahead_min.value);
    CHECK(east);
    CHECK_THAT(upright->ahead_min.value, WithinAbs(0, 0.01));
}

TEST_CASE("Points from anywhere, in two half-dials, find the centre", "[restore]") {
    const Truth truth{52, 157, 0, 0};
    PlateReadings directions = lines_of(truth, 7, 16), readings;
    const PlateFrame frame = frame_of({Angle::degrees(truth.facing), Angle{}});
    const Style style = style_of(frame, 100, Angle::degrees(truth.latitude));
    readings.gap_mm = 8;
    for (int i = 0; i < 10; ++i) {
        const Angle direction = Angle::degrees(*directions.lines[std::size_t(i)].direction_deg);
        const Angle right = style.substyle + Angle::degrees(90);
        // The shadow falls to the right or the left of the substyle, and starts from that edge.
        const double side = sin(direction - style.substyle) > 0 ? 4 : -4;
        PlateLine line;
        line.hour_h = (i + 7 + 11) % 12 + 1;
        for (const double reach : {70.0, 250.0})
            line.points.push_back(
                {40 + side * sin(right) + reach * sin(direction), -15 + side * cos(right) + reach * cos(direction)});
        readings.lines.push_back(line);
    }
    const auto figure = figure_of(readings);
    REQUIRE(figure);
    REQUIRE(figure->centre);
    CHECK_THAT(figure->centre->u_mm, WithinAbs(40, 0.01));
    CHECK_THAT(figure->centre->v_mm, WithinAbs(-15, 0.01));
    check(by(solutions_of(*figure, true, {}), Fact::upright), truth);
}

TEST_CASE("A line cut wrong is found, an unreadable one named", "[restore]") {
    PlateReadings readings = lines_of({52, 157, 0, 0}, 7, 16);
    *readings.lines[3].direction_deg += 5;
    readings.lines[6].hour_h.reset();
    const auto figure = figure_of(readings);
    REQUIRE(figure);
    CHECK(figure->stray[3]);
    CHECK_THAT(figure->off_deg[3], WithinAbs(5, 0.05));
    REQUIRE(figure->hour_h[6]);
    CHECK_THAT(*figure->hour_h[6], WithinAbs(1, 1e-9));
    CHECK(std::count(figure->stray.begin(), figure->stray.end(), true) == 1);
}

TEST_CASE("Lines without any hour, in their order, give the plate but for whole hours", "[restore]") {
    const Truth truth{52, 157, 0, 0};
    PlateReadings readings = lines_of(truth, 7, 16);
    for (PlateLine& line : readings.lines)
        line.hour_h.reset();
    const auto figure = figure_of(readings);
    REQUIRE(figure);
    const auto solutions = solutions_of(*figure, true, {});
    const PlateSolution* upright = by(solutions, Fact::upright);
    REQUIRE(upright);
    CHECK_THAT(upright->latitude_deg.value, WithinAbs(52, 1e-3));
    CHECK_THAT(std::remainder(upright->ahead_min.value, 60), WithinAbs(0, 0.01));
}
