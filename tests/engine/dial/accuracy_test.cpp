// SPDX-License-Identifier: MIT
#include "engine/dial/accuracy.hpp"

#include <catch2/catch.hpp>

#include <cmath>

using namespace dialwright;
using Catch::WithinAbs;

namespace {

const MeanYear& mean_year() {
    static const MeanYear k_year{2027, 2046};
    return k_year;
}

std::optional<double> slip(const AccuracyCell& cell, SlipKind kind) {
    return cell.minutes[static_cast<std::size_t>(kind)];
}

/// A plate with a line for each hour from 6 to 18, read 100 mm from the pivot.
AccuracyPlan plan_of(double latitude_deg, Attitude attitude, HourTime time = HourTime::sun) {
    AccuracyPlan plan;
    plan.dial.site = {Angle::degrees(latitude_deg), Angle{}};
    plan.dial.attitude = attitude;
    plan.dial.nodus_height_mm = 40;
    plan.dial.hours.time = time;
    const Style style = style_of(frame_of(attitude), 40, plan.dial.site.latitude);
    plan.pivot_mm = {style.centre->u_mm, style.centre->v_mm, 0};
    plan.stretch_from = *style.centre;
    plan.at_outer_end = true;
    for (int hour = 6; hour <= 18; ++hour)
        if (const auto way =
                hour_line_direction(frame_of(attitude), style, plan.dial.site.latitude, Angle::hours(hour - 12)))
            plan.lines.push_back(
                {double(hour), {style.centre->u_mm + 100 * sin(*way), style.centre->v_mm + 100 * cos(*way)}, 100.0});
    return plan;
}

AccuracyLine line_of(double time_h, double minutes) {
    AccuracyLine line{time_h, {}};
    if (minutes > 0) {
        AccuracyCell cell;
        cell.minutes[0] = minutes;
        cell.total_min = minutes;
        line.at[1] = cell;
    }
    return line;
}

} // namespace

TEST_CASE("an equatorial plate's slips can be told by hand", "[engine][accuracy]") {
    const Angle latitude = Angle::degrees(50);
    const AccuracyPlan plan = plan_of(50, equatorial_attitude(latitude, true));
    const auto lines = accuracy_of(plan, mean_year());
    REQUIRE(lines.size() == 13);
    for (const AccuracyLine& line : lines) {
        CAPTURE(line.time_h);
        CHECK_FALSE(line.at[2]); // in December the Sun is on the other side
        REQUIRE(line.at[0]);
        const AccuracyCell& june = *line.at[0];
        const Angle declination = mean_year().obliquity();
        // Source: the Sun's width, 32' (common almanacs' mean); an hour angle of 1° is 4 minutes.
        CHECK_THAT(*slip(june, SlipKind::half_shadow), WithinAbs(4 * 16.0 / 60.0 / cos(declination), 1e-3));
        // Half a millimetre at 100 mm is 0.2865°, and the worse way of two a two-hundredth more at most.
        CHECK_THAT(*slip(june, SlipKind::marking), WithinAbs(4 * 0.5 / 100 * 180 / M_PI, 6e-3));
        CHECK_THAT(*slip(june, SlipKind::position), WithinAbs(0.04, 0.01));
        CHECK_FALSE(slip(june, SlipKind::level));
        CHECK(*slip(june, SlipKind::equation) < 0.3);
        double squares = 0;
        for (const auto& minutes : june.minutes)
            squares += minutes.value_or(0) * minutes.value_or(0);
        CHECK_THAT(june.total_min, WithinAbs(std::sqrt(squares), 1e-12));
        for (const auto& minutes : june.minutes)
            CHECK(minutes.value_or(0) <= *slip(june, june.most));
    }
    // At noon, turned about the plumb line by 1°: hour angle by sin H cos δ = sin(1°) cos a.
    const AccuracyCell& noon = *lines[6].at[0];
    const Angle altitude = Angle::degrees(90) - latitude + mean_year().obliquity();
    const double expected =
        arc_sine(sin(Angle::degrees(1)) * cos(altitude) / cos(mean_year().obliquity())).in_minutes_of_time();
    CHECK_THAT(*slip(noon, SlipKind::facing), WithinAbs(expected, 0.002));
}

TEST_CASE("morning and afternoon of a plate that faces the meridian are alike", "[engine][accuracy]") {
    AccuracyPlan plan = plan_of(-33, {Angle{}, Angle::degrees(0)});
    plan.level = false;
    const auto lines = accuracy_of(plan, mean_year());
    for (std::size_t i = 0; i < lines.size(); ++i)
        for (std::size_t season = 0; season < 3; ++season) {
            const auto &one = lines[i].at[season], &other = lines[lines.size() - 1 - i].at[season];
            REQUIRE(one.has_value() == other.has_value());
            if (one)
                CHECK_THAT(one->total_min - other->total_min, WithinAbs(0.0, 1e-6));
        }
}

TEST_CASE("a slip of twice the size is twice the error, one of nothing none", "[engine][accuracy]") {
    AccuracyPlan plan = plan_of(52, {Angle::degrees(157), Angle{}});
    const auto once = accuracy_of(plan, mean_year());
    plan.sizes.marking_mm *= 2;
    plan.sizes.style_height = plan.sizes.style_height * 2;
    plan.sizes.facing = Angle{};
    const auto twice = accuracy_of(plan, mean_year());
    for (std::size_t i = 0; i < once.size(); ++i)
        for (std::size_t season = 0; season < 3; ++season)
            if (once[i].at[season]) {
                for (const SlipKind kind : {SlipKind::marking, SlipKind::style_height}) {
                    const double small = *slip(*once[i].at[season], kind);
                    CHECK_THAT(*slip(*twice[i].at[season], kind), WithinAbs(2 * small, 0.02 * small + 0.02));
                }
                CHECK_THAT(*slip(*twice[i].at[season], SlipKind::facing), WithinAbs(0, 1e-9));
                CHECK_FALSE(slip(*without(once, SlipKind::print)[i].at[season], SlipKind::print));
                CHECK(without(once, SlipKind::facing)[i].at[season]->total_min < once[i].at[season]->total_min);
            }
}

TEST_CASE("curves and hours from the horizon have their own errors", "[engine][accuracy]") {
    for (const HourTime time :
         {HourTime::clock, HourTime::unequal, HourTime::since_sunrise, HourTime::to_sunset, HourTime::since_sunset}) {
        CAPTURE(int(time));
        AccuracyPlan plan = plan_of(45, {}, time);
        plan.by_nodus = true;
        plan.level = true;
        plan.lines.clear();
        for (int hour = 1; hour < 24; ++hour)
            plan.lines.push_back({double(hour), {}, 1e4});
        int cells = 0;
        for (const AccuracyLine& line : accuracy_of(plan, mean_year()))
            for (const auto& cell : line.at)
                if (cell) {
                    ++cells;
                    CHECK(std::isfinite(cell->total_min));
                    CHECK(cell->total_min > 0.3);
                    CHECK(slip(*cell, SlipKind::equation));
                }
        CHECK(cells > 15);
    }
}

TEST_CASE("what the dial supports is a run of hours", "[engine][accuracy]") {
    // Seven lit lines: 2 minutes are kept to by five of them in one run, 6 by all.
    std::vector<AccuracyLine> lines{line_of(5, 0),   line_of(6, 5.5),  line_of(7, 1.9),  line_of(8, 1.2),
                                    line_of(9, 0.9), line_of(10, 1.1), line_of(11, 2.0), line_of(12, 4)};
    const auto found = supported_readings(lines);
    REQUIRE(found.size() == 2);
    CHECK(found[0].minutes == 2);
    CHECK(found[0].first_h == 7);
    CHECK(found[0].last_h == 11);
    CHECK(found[1].minutes == 6);
    CHECK(found[1].first_h == 6);
    CHECK(found[1].last_h == 12);
    CHECK(supported_readings({line_of(8, 0)}).empty());
    CHECK(supported_readings({line_of(8, 45)}).empty());
    CHECK(supported_readings({line_of(8, 0.5)}).size() == 1);
}
