// SPDX-License-Identifier: MIT
#include "engine/dial/delineation.hpp"
#include "tests/engine/cast/brute_walk.hpp"
#include "tests/engine/random_plates.hpp"

#include <catch2/catch.hpp>

#include <algorithm>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

namespace {

constexpr PlateBox k_window{-400, -400, 400, 400};

const MeanYear& mean_year() {
    static const MeanYear year{2025, 2044};
    return year;
}

DialPlan plan_at(double latitude, double longitude, const Attitude& attitude = {}) {
    DialPlan plan;
    plan.site = {Angle::degrees(latitude), Angle::degrees(longitude)};
    plan.attitude = attitude;
    plan.nodus_height_mm = 100;
    return plan;
}

std::vector<double> times_of(const Delineation& dial) {
    std::vector<double> times;
    for (const DialLine& line : dial.lines)
        if (line.family != Family::date)
            times.push_back(line.time_h);
    return times;
}

const DialLine& line_at(const Delineation& dial, double time_h) {
    const auto found = std::find_if(dial.lines.begin(), dial.lines.end(), [time_h](const DialLine& line) {
        return line.family != Family::date && std::abs(line.time_h - time_h) < 1e-9;
    });
    REQUIRE(found != dial.lines.end());
    return *found;
}

} // namespace

TEST_CASE("A level dial in the north of England: the hours that are ever lit", "[engine][dial]") {
    // At 54° N the Sun of the June solstice rises at cos H = −tan 54° tan 23.44°, H = 126.6°: 3 h 34 m to 20 h 26 m.
    DialPlan plan = plan_at(54, -2);
    CHECK(times_of(delineate(plan, mean_year(), k_window)).front() == 4);
    CHECK(times_of(delineate(plan, mean_year(), k_window)).back() == 20);
    CHECK(delineate(plan, mean_year(), k_window).unlit_hours.empty());
    plan.hours.divide_min = 5;
    const auto times = times_of(delineate(plan, mean_year(), k_window));
    CHECK_THAT(times.front(), WithinAbs(3 + 35.0 / 60, 1e-9));
    CHECK_THAT(times.back(), WithinAbs(20 + 25.0 / 60, 1e-9));
    CHECK(times.size() == 203);
    CHECK(std::is_sorted(times.begin(), times.end()));
    plan.hours.first_h = 3;
    plan.hours.last_h = 21;
    CHECK(delineate(plan, mean_year(), k_window).unlit_hours == std::vector<double>{3, 21});
}

TEST_CASE("Each division knows the coarsest step that it belongs to", "[engine][dial]") {
    DialPlan plan = plan_at(40, 0);
    plan.hours.divide_min = 5;
    const Delineation dial = delineate(plan, mean_year(), k_window);
    CHECK(line_at(dial, 9).step_min == 60);
    CHECK(line_at(dial, 9.5).step_min == 30);
    CHECK(line_at(dial, 9.25).step_min == 15);
    CHECK(line_at(dial, 9 + 10.0 / 60).step_min == 10);
    CHECK(line_at(dial, 9 + 5.0 / 60).step_min == 5);
    plan.hours.divide_min = 1;
    const Delineation fine = delineate(plan, mean_year(), k_window);
    CHECK(line_at(fine, 9 + 4.0 / 60).step_min == 2);
    CHECK(line_at(fine, 9 + 7.0 / 60).step_min == 1);
}

TEST_CASE("A zone's lines are the site's, shifted by the longitude", "[engine][dial]") {
    DialPlan plan = plan_at(54, -2);
    plan.zone_meridian = Angle{};
    plan.hours.time = HourTime::zone;
    // 2° west of the meridian the Sun is 8 minutes late: its noon shadow falls at 12:08 of the zone's apparent time.
    CHECK_THAT(hour_angle_of(HourTime::zone, 12, plan.site, plan.zone_meridian).in_degrees(), WithinAbs(-2, 1e-12));
    CHECK_THAT(time_of(HourTime::zone, Angle{}, plan.site, plan.zone_meridian), WithinAbs(12 + 8.0 / 60, 1e-12));
    CHECK_THAT(time_of(HourTime::sun, Angle{}, plan.site, plan.zone_meridian), WithinAbs(12, 1e-12));
    const Delineation dial = delineate(plan, mean_year(), k_window);
    CHECK_THAT(line_at(dial, 12).hour_angle.in_degrees(), WithinAbs(-2, 1e-12));
    CHECK(times_of(dial).front() == 4); // 3 h 34 m is 3 h 42 m here
    for (int i = 0; i < 48; ++i) {
        const Angle hour = Angle::hours(-12 + 0.5 * i);
        const double time = time_of(HourTime::zone, hour, plan.site, plan.zone_meridian);
        CHECK((time >= 0 && time < 24));
        CHECK_THAT(
            (hour_angle_of(HourTime::zone, time, plan.site, plan.zone_meridian) - hour).signed_turn().in_degrees(),
            WithinAbs(0, 1e-10));
    }
}

TEST_CASE("The noon line of a thick gnomon has two sides", "[engine][dial]") {
    DialPlan plan = plan_at(54, -2);
    plan.gnomon_thickness_mm = 6;
    const Delineation dial = delineate(plan, mean_year(), k_window);
    const DialLine& noon = line_at(dial, 12);
    REQUIRE(noon.pieces.size() == 2);
    for (const PlatePolyline& piece : noon.pieces) {
        REQUIRE(piece.size() == 2);
        CHECK_THAT(piece[0].u_mm, WithinAbs(piece[1].u_mm, 1e-6));
    }
    CHECK_THAT(noon.pieces[0][0].u_mm, WithinAbs(-3, 1e-6));
    CHECK_THAT(noon.pieces[1][0].u_mm, WithinAbs(3, 1e-6));
    REQUIRE(dial.style.centre);
    const DialLine& nine = line_at(dial, 9);
    CHECK(nine.pieces.size() == 1);
    // The lines of the morning start at the left centre, those before 6 at the right one.
    const auto starts_at = [&](double time_h, double u) {
        const PlatePolyline& piece = line_at(dial, time_h).pieces.front();
        const auto from = [&](PlatePoint p) { return std::hypot(p.u_mm - u, p.v_mm - dial.style.centre->v_mm); };
        return std::min(from(piece.front()), from(piece.back())) < 1e-6;
    };
    CHECK(starts_at(9, -3));
    CHECK(starts_at(6, -3));
    CHECK(starts_at(5, 3));
    CHECK(starts_at(15, 3));
    CHECK(starts_at(18, 3));
    CHECK(starts_at(19, -3));
}

TEST_CASE("A wall facing north has no noon, a wall facing east no afternoon", "[engine][dial]") {
    DialPlan north = plan_at(54, -2, {Angle{}, Angle{}});
    const auto times = times_of(delineate(north, mean_year(), k_window));
    // In June the Sun crosses the prime vertical at cos H = tan 23.44° / tan 54°: at 7 h 14 m and 16 h 46 m.
    for (const double time : times)
        CHECK((time <= 7 || time >= 17));
    CHECK(times.front() == 4);
    CHECK(times.back() == 20);
    north.hours.first_h = 10;
    north.hours.last_h = 14;
    CHECK(delineate(north, mean_year(), k_window).unlit_hours.size() == 5);
    const auto east = times_of(delineate(plan_at(54, -2, {Angle::degrees(90), Angle{}}), mean_year(), k_window));
    CHECK(east.front() == 4);
    CHECK(east.back() == 11);
}

TEST_CASE("A lit hour whose line misses the plate is not called unlit", "[engine][dial]") {
    // The 11 o'clock line of an east wall runs h cot 15° = 373 mm from the style's.
    DialPlan plan = plan_at(54, -2, {Angle::degrees(90), Angle{}});
    plan.hours.first_h = 9;
    plan.hours.last_h = 13;
    const PlateBox small{-100, -100, 150, 100};
    for (const HourTime time : {HourTime::sun, HourTime::clock}) {
        plan.hours.time = time;
        const Delineation dial = delineate(plan, mean_year(), small);
        CHECK(dial.outside_hours == (time == HourTime::sun ? std::vector<double>{11} : std::vector<double>{11, 12}));
        CHECK(dial.unlit_hours == (time == HourTime::sun ? std::vector<double>{12, 13} : std::vector<double>{13}));
    }
    plan.hours.divide_min = 7;
    CHECK_THROWS_AS(delineate(plan, mean_year(), small), std::invalid_argument);
    plan.hours.divide_min = 0;
    CHECK_THROWS_AS(delineate(plan, mean_year(), small), std::invalid_argument);
}

TEST_CASE("Dates that the Sun never shows are named", "[engine][dial]") {
    const auto dated = [](const Attitude& attitude) {
        DialPlan plan = plan_at(54, -2, attitude);
        plan.dates.lines = {
            {"June", Angle::degrees(23.44)}, {"equinox", Angle{}}, {"December", Angle::degrees(-23.44)}};
        return delineate(plan, mean_year(), k_window);
    };
    const auto unlit = [](const Delineation& dial) {
        std::vector<std::string> names;
        for (const MissedLine& missed : dial.missed) {
            CHECK(missed.line.family == Family::date);
            CHECK_FALSE(missed.lit);
            names.push_back(missed.line.label);
        }
        return names;
    };
    CHECK(unlit(dated({Angle::degrees(180), Angle{}})).empty());
    CHECK(unlit(dated(equatorial_attitude(Angle::degrees(54), true))) ==
          std::vector<std::string>{"equinox", "December"});
    CHECK(unlit(dated(equatorial_attitude(Angle::degrees(54), false))) == std::vector<std::string>{"June", "equinox"});
    CHECK(unlit(dated({Angle{}, Angle{}})) == std::vector<std::string>{"equinox", "December"});
}

TEST_CASE("Lines that the Sun shows outside the plate alone are told apart from unlit ones", "[engine][dial]") {
    DialPlan plan = plan_at(54, -2, {Angle::degrees(180), Angle{}});
    plan.dates.lines = {{"June", Angle::degrees(23.44)}};
    plan.altitudes = {Angle::degrees(10), Angle::degrees(80)};
    plan.azimuths = {Angle::degrees(0), Angle::degrees(180)};
    HourPlan left;
    left.time = HourTime::to_sunset;
    left.first_h = left.last_h = 20;
    plan.more_hours = {left};
    // Far up the wall no shadow falls at all.
    const auto missed = delineate(plan, mean_year(), {-100, 900, 100, 1000}).missed;
    REQUIRE(missed.size() == 6);
    CHECK((missed[0].line.family == Family::to_sunset && missed[0].line.time_h == 20 && !missed[0].lit));
    CHECK((missed[1].line.level == Angle::degrees(10) && missed[1].lit));
    CHECK((missed[2].line.level == Angle::degrees(80) && !missed[2].lit)); // the Sun stands no higher than 59.4°
    CHECK((missed[3].line.family == Family::azimuth && !missed[3].lit));
    CHECK((missed[4].line.level == Angle::degrees(180) && missed[4].lit));
    CHECK((missed[5].line.family == Family::date && missed[5].lit));
}

TEST_CASE("A clock-time curve that is lit for some days about a solstice is drawn", "[engine][dial]") {
    // Over a hill the Sun of noon shows for a few days at midsummer only: 36° + 23.44° high.
    DialPlan plan = plan_at(54, 0, {});
    plan.zone_meridian = Angle{};
    plan.hours.time = HourTime::clock;
    plan.hours.first_h = plan.hours.last_h = 12;
    plan.skyline = Skyline{{{Angle::degrees(10), Angle::degrees(59.40)}, {Angle::degrees(350), Angle::degrees(59.40)}}};
    const Delineation dial = delineate(plan, mean_year(), k_window);
    REQUIRE(dial.lines.size() == 1);
    REQUIRE(dial.lines[0].pieces.size() == 1);
    CHECK(dial.lines[0].pieces[0].size() > 2);
}

TEST_CASE("Date lines may run between two hours alone", "[engine][dial]") {
    DialPlan plan = plan_at(54, -2, {Angle::degrees(170), Angle{}});
    plan.dates.lines = {{"June", Angle::degrees(23.44)}, {"equinox", Angle{}}};
    plan.dates.first = Angle::hours(-3);
    plan.dates.last = Angle::hours(2);
    const Caster<Plane> caster = caster_of(plan);
    const Delineation dial = delineate(plan, mean_year(), {-4000, -4000, 4000, 4000});
    int dates = 0;
    for (const DialLine& line : dial.lines)
        if (line.family == Family::date) {
            ++dates;
            REQUIRE(line.pieces.size() == 1);
            std::vector<PlatePoint> ends{line.pieces[0].front(), line.pieces[0].back()};
            for (const double hour : {-3.0, 2.0}) {
                const auto shadow = caster.cast({Angle::hours(hour), *line.declination}, Light::seen);
                REQUIRE(shadow.has_value());
                const auto off = [&](PlatePoint p) {
                    return std::hypot(p.u_mm - shadow->point.u_mm, p.v_mm - shadow->point.v_mm);
                };
                CHECK(std::min(off(ends[0]), off(ends[1])) < 1e-6);
            }
        }
    CHECK(dates == 2);
}

TEST_CASE("An equatorial dial's lit hours turn with its face", "[engine][dial]") {
    const auto summer =
        times_of(delineate(plan_at(54, -2, equatorial_attitude(Angle::degrees(54), true)), mean_year(), k_window));
    const auto winter =
        times_of(delineate(plan_at(54, -2, equatorial_attitude(Angle::degrees(54), false)), mean_year(), k_window));
    CHECK((summer.front() == 4 && summer.back() == 20));
    CHECK((winter.front() >= 6 && winter.back() <= 18));
}

TEST_CASE("Half-year curves are the halves of the whole", "[engine][dial]") {
    DialPlan plan = plan_at(40, 1);
    plan.hours.time = HourTime::clock;
    const Delineation whole = delineate(plan, mean_year(), k_window);
    plan.hours.half_year = HalfYear::december_to_june;
    const Delineation spring = delineate(plan, mean_year(), k_window);
    plan.hours.half_year = HalfYear::june_to_december;
    const Delineation autumn = delineate(plan, mean_year(), k_window);
    for (const double time_h : {8.0, 12.0, 16.0}) {
        std::vector<PlatePolyline> halves = line_at(spring, time_h).pieces;
        for (const PlatePolyline& piece : line_at(autumn, time_h).pieces)
            halves.push_back(piece);
        CAPTURE(time_h);
        for (const PlatePolyline& piece : line_at(whole, time_h).pieces)
            for (const PlatePoint p : piece)
                CHECK(test::distance_mm(p, halves) < 0.01);
        for (const PlatePolyline& piece : halves)
            for (const PlatePoint p : piece)
                CHECK(test::distance_mm(p, line_at(whole, time_h).pieces) < 0.01);
    }
}

TEST_CASE("A dial reads the line on which its shadow falls", "[engine][dial]") {
    constexpr int k_seed = 501;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 300; ++i) {
        DialPlan plan = plan_at(random.number(-60, 60), random.number(-180, 180));
        plan.zone_meridian = plan.site.longitude + random.degrees(-20, 20);
        const double day = random.number(0, 365.25);
        const MeanYear::Season season = mean_year().at(day);
        const SkyPlace sun{random.degrees(-75, 75), season.declination};
        CAPTURE(k_seed, i, day);
        REQUIRE_THAT(*reading_of(plan, plan.hours.time, mean_year(), sun, day),
                     WithinAbs(12 + sun.hour_angle.in_hours(), 1e-9));
        plan.hours.time = HourTime::zone;
        const double zone_time = 12 + (sun.hour_angle - plan.site.longitude + plan.zone_meridian).in_hours();
        REQUIRE_THAT(*reading_of(plan, plan.hours.time, mean_year(), sun, day), WithinAbs(zone_time, 1e-9));
        // The clock's curve through this shadow, by trying the curves of a whole minute's neighbourhood: the one whose
        // point at this declination and half of the year is the shadow's own.
        plan.hours.time = HourTime::clock;
        const double reading = *reading_of(plan, plan.hours.time, mean_year(), sun, day);
        const double expected = zone_time - season.equation_of_time.in_hours();
        REQUIRE_THAT(reading, WithinAbs(expected, 0.1 / 3600));
    }
}

TEST_CASE("The clock's reading lies on the traced curve", "[engine][dial]") {
    constexpr int k_seed = 502;
    test::RandomPlates random{k_seed};
    int compared = 0;
    for (int i = 0; i < 200; ++i) {
        DialPlan plan = plan_at(random.number(-60, 60), 0, {random.degrees(0, 360), random.degrees(-30, 90)});
        plan.hours.time = HourTime::clock;
        const Caster<Plane> caster = caster_of(plan);
        const double day = random.number(0, 365);
        const SkyPlace sun{random.degrees(-75, 75), mean_year().at(day).declination};
        const auto shadow = caster.cast(sun, Light::seen);
        if (!shadow || !k_window.contains(shadow->point))
            continue;
        ++compared;
        const Angle mean = hour_angle_of(HourTime::clock, *reading_of(plan, plan.hours.time, mean_year(), sun, day),
                                         plan.site, plan.zone_meridian);
        const double june = mean_year().june_solstice_day(), december = mean_year().december_solstice_day();
        const double length = mean_year().length_days();
        const SunPath half = day < june       ? mean_time_path(mean, mean_year(), december - length, june)
                             : day < december ? mean_time_path(mean, mean_year(), june, december)
                                              : mean_time_path(mean, mean_year(), december, june + length);
        CAPTURE(k_seed, i, day);
        REQUIRE(test::distance_mm(shadow->point, trace(caster, half, k_window)) < 0.01);
    }
    CHECK(compared > 30);
}

TEST_CASE("An instant's own Sun beyond the mean solstice still reads", "[engine][dial]") {
    DialPlan plan = plan_at(54, 0);
    plan.hours.time = HourTime::clock;
    const double june = mean_year().june_solstice_day();
    const SkyPlace sun{Angle::hours(1), mean_year().obliquity() + Angle::arcseconds(10)};
    for (const double day : {june - 1, june, june + 1}) {
        const double expected = 13 - mean_year().at(june).equation_of_time.in_hours();
        CHECK_THAT(*reading_of(plan, plan.hours.time, mean_year(), sun, day), WithinAbs(expected, 1.0 / 3600));
    }
    const double december = mean_year().december_solstice_day();
    const SkyPlace low{Angle::hours(1), -mean_year().obliquity() - Angle::arcseconds(10)};
    const double expected = 13 - mean_year().at(december).equation_of_time.in_hours();
    CHECK_THAT(*reading_of(plan, plan.hours.time, mean_year(), low, 360), WithinAbs(expected, 1.0 / 3600));
    CHECK_THAT(*reading_of(plan, plan.hours.time, mean_year(), low, 350), WithinAbs(expected, 1.0 / 3600));
}

TEST_CASE("Poles and equator delineate without a number that is not one", "[engine][dial]") {
    for (const double latitude : {90.0, -90.0, 0.0})
        for (const double altitude : {90.0, 45.0, 0.0, -45.0, -90.0})
            for (const double azimuth : {0.0, 90.0, 180.0, 270.0, 33.0})
                for (const HourTime time : {HourTime::sun, HourTime::clock}) {
                    DialPlan plan = plan_at(latitude, 10, {Angle::degrees(azimuth), Angle::degrees(altitude)});
                    plan.gnomon_thickness_mm = 5;
                    plan.hours.time = time;
                    plan.dates.lines = {
                        {"June", Angle::degrees(23.44)}, {"equinox", Angle{}}, {"May", Angle::degrees(20)}};
                    CAPTURE(latitude, altitude, azimuth, int(time));
                    for (const DialLine& line : delineate(plan, mean_year(), k_window).lines)
                        for (const PlatePolyline& piece : line.pieces)
                            for (const PlatePoint p : piece) {
                                REQUIRE((std::isfinite(p.u_mm) && std::isfinite(p.v_mm)));
                                REQUIRE(std::abs(p.u_mm) <= 400.000001);
                                REQUIRE(std::abs(p.v_mm) <= 400.000001);
                            }
                }
}
