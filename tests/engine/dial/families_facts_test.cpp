// SPDX-License-Identifier: MIT
//
// Facts about the families of lines that must come out whatever the plate: where lines meet, which are straight, which
// agree with each other, and what there is at the poles and on the horizon.
#include "engine/dial/delineation.hpp"
#include "tests/engine/dial/family_definitions.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::test;
using Catch::Matchers::WithinAbs;

TEST_CASE("The Sun on the horizon itself draws nothing", "[engine][dial]") {
    for (const double latitude : {-50.0, 0.0, 52.0, 70.0})
        for (const double azimuth : {0.0, 90.0, 157.0, 250.0}) {
            DialPlan plan;
            plan.site.latitude = Angle::degrees(latitude);
            plan.attitude = {Angle::degrees(azimuth), Angle{}};
            plan.nodus_height_mm = 100;
            ask_for_every_family(plan);
            plan.altitudes = {Angle{}};
            for (HourPlan& hours : plan.more_hours) {
                hours.first_h = 0;
                hours.last_h = 24;
            }
            CAPTURE(latitude, azimuth);
            for (const DialLine& line : delineate(plan, mean_year(), k_window).lines) {
                CAPTURE(int(line.family), line.time_h);
                CHECK(line.family != Family::altitude);
                CHECK_FALSE((line.family == Family::since_sunrise && (line.time_h == 0 || line.time_h == 24)));
                CHECK_FALSE((line.family == Family::since_sunset && line.time_h == 24));
                CHECK_FALSE((line.family == Family::to_sunset && (line.time_h == 0 || line.time_h == 24)));
                CHECK_FALSE((line.family == Family::unequal_hour && (line.time_h == 0 || line.time_h == 12)));
            }
        }
}

TEST_CASE("Each line in a thick gnomon's own plane has two sides, of every family", "[engine][dial]") {
    DialPlan plan;
    plan.site.latitude = Angle::degrees(52);
    plan.attitude = {Angle::degrees(180), Angle{}};
    plan.nodus_height_mm = 100;
    plan.gnomon_thickness_mm = 6;
    ask_for_every_family(plan);
    int found = 0;
    for (const DialLine& line : delineate(plan, mean_year(), k_window).lines)
        if ((line.family == Family::hour && line.time_h == 12) ||
            (line.family == Family::unequal_hour && line.time_h == 6) ||
            (line.family == Family::azimuth && line.level == Angle::degrees(180))) {
            ++found;
            CAPTURE(int(line.family));
            REQUIRE(line.pieces.size() == 2);
            for (const PlatePolyline& piece : line.pieces)
                for (const PlatePoint p : piece)
                    CHECK_THAT(std::abs(p.u_mm), WithinAbs(3, 1e-6));
            CHECK(line.pieces[0][0].u_mm * line.pieces[1][0].u_mm < 0);
        }
    CHECK(found == 3);
}

TEST_CASE("Hours from a level horizon and azimuths are straight; from the seen rise they bend", "[engine][dial]") {
    constexpr int k_seed = 603;
    RandomPlates random{k_seed};
    double most_bent_mm = 0;
    for (int i = 0; i < k_plans; ++i) {
        DialPlan plan = random_plan(random);
        ask_for_every_family(plan);
        INFO(told(k_seed, i, plan));
        const auto dial = delineate(plan, mean_year(), k_window);
        for (const DialLine& line : dial.lines) {
            const bool from_horizon = line.family == Family::since_sunrise || line.family == Family::since_sunset ||
                                      line.family == Family::to_sunset;
            for (const PlatePolyline& piece : line.pieces)
                if (line.family == Family::azimuth || (from_horizon && plan.horizon == Angle{}))
                    REQUIRE(piece.size() == 2);
                else if (from_horizon && length_mm(piece) > 1)
                    for (const PlatePoint p : piece)
                        most_bent_mm = std::max(most_bent_mm, off_line_mm(p, piece));
        }
    }
    CHECK(most_bent_mm > 0.1);
}

TEST_CASE("On the equinox unequal hours, hours from rise and hours to set agree with the Sun's own", "[engine][path]") {
    const Season season{Angle::degrees(-23.44), Angle::degrees(23.44)};
    for (const double degrees : {-60.0, -23.44, 0.0, 37.0, 66.0}) {
        const Angle latitude = Angle::degrees(degrees);
        for (int k = 0; k <= 12; ++k) {
            CAPTURE(degrees, k);
            for (const SunPath& path :
                 {rise_path(Angle::hours(k), latitude, season, {}), unequal_hour_path(k / 12.0, latitude, season, {}),
                  set_path(Angle::hours(12 - k), latitude, season, {})})
                CHECK_THAT(path.at(0)->hour_angle.in_hours(), WithinAbs(k - 6, 1e-12));
        }
    }
}

TEST_CASE("What has run of the day and what is left of it make the day", "[engine][dial]") {
    constexpr int k_seed = 604;
    RandomPlates random{k_seed};
    int compared = 0;
    for (int i = 0; i < 2000; ++i) {
        const DialPlan plan = random_plan(random);
        const double declination = Angle::degrees(random.number(-23.44, 23.44)).in_radians();
        const auto set = setting_of(plan, declination);
        if (!set)
            continue;
        ++compared;
        const SkyPlace sun{Angle::radians(*set * random.number(-0.999, 0.999)), Angle::radians(declination)};
        INFO(told(k_seed, i, plan) << ", hour angle " << sun.hour_angle.in_degrees());
        const auto reads = [&](HourTime time) { return reading_of(plan, time, mean_year(), sun, 100).value(); };
        const double day_h = 2 * Angle::radians(*set).in_hours();
        REQUIRE_THAT(reads(HourTime::since_sunrise) + reads(HourTime::to_sunset), WithinAbs(day_h, 1e-6));
        REQUIRE_THAT(reads(HourTime::since_sunset) + reads(HourTime::to_sunset), WithinAbs(24, 1e-9));
        REQUIRE_THAT(reads(HourTime::unequal), WithinAbs(12 * reads(HourTime::since_sunrise) / day_h, 1e-6));
    }
    CHECK(compared > 1000);
}

TEST_CASE("A reading is the line on which the shadow falls", "[engine][dial]") {
    constexpr int k_seed = 605;
    RandomPlates random{k_seed};
    for (int i = 0; i < 500; ++i) {
        const DialPlan plan = random_plan(random);
        const SkyPlace sun{random.degrees(-180, 180), random.degrees(-23.44, 23.44)};
        if (!(to_site(sun, plan.site.latitude).enu.z() > 0))
            continue;
        INFO(told(k_seed, i, plan));
        for (const HourTime time :
             {HourTime::since_sunrise, HourTime::since_sunset, HourTime::to_sunset, HourTime::unequal}) {
            const auto reading = reading_of(plan, time, mean_year(), sun, 100);
            const bool rises = setting_of(plan, sun.declination.in_radians()).has_value();
            REQUIRE(reading.has_value() == rises);
            if (!reading)
                continue;
            REQUIRE((*reading >= 0 && *reading < 24));
            DialLine line;
            line.family = family_of(time);
            line.time_h = *reading;
            REQUIRE(astray(plan, line, sun) < 1e-9);
        }
    }
}

TEST_CASE("Noon at a place 15° east is the site's XI, 15° west its I", "[engine][dial]") {
    constexpr int k_seed = 606;
    RandomPlates random{k_seed};
    for (int i = 0; i < 100; ++i) {
        DialPlan plan = random_plan(random);
        plan.noons = {{"east", (plan.site.longitude + Angle::degrees(15)).signed_turn()},
                      {"west", (plan.site.longitude - Angle::degrees(15)).signed_turn()}};
        INFO(told(k_seed, i, plan));
        const Delineation dial = delineate(plan, mean_year(), k_window);
        for (const auto& [name, time_h] : {std::pair{"east", 11.0}, std::pair{"west", 13.0}}) {
            const auto of = [&](auto is) { return std::find_if(dial.lines.begin(), dial.lines.end(), is); };
            const auto noon = of([&, label = std::string{name}](const DialLine& line) { return line.label == label; });
            const auto hour =
                of([&, at = time_h](const DialLine& line) { return line.family == Family::hour && line.time_h == at; });
            REQUIRE((noon == dial.lines.end()) == (hour == dial.lines.end()));
            if (noon == dial.lines.end())
                continue;
            REQUIRE_THAT(noon->time_h, WithinAbs(time_h, 1e-9));
            REQUIRE(noon->pieces.size() == hour->pieces.size());
            for (std::size_t k = 0; k < noon->pieces.size(); ++k)
                for (const PlatePoint p : noon->pieces[k])
                    REQUIRE(distance_mm(p, hour->pieces) < 1e-6);
        }
    }
}

TEST_CASE("Azimuth lines run together in the foot of a plumb line from the nodus", "[engine][dial]") {
    constexpr int k_seed = 607;
    RandomPlates random{k_seed};
    int compared = 0;
    for (int i = 0; i < 200; ++i) {
        DialPlan plan = random_plan(random);
        plan.gnomon_thickness_mm = 0;
        ask_for_every_family(plan);
        INFO(told(k_seed, i, plan));
        const Delineation dial = delineate(plan, mean_year(), k_window);
        // Straight down from the nodus to the plate: h n − t z with t = h / n_z.
        const double up = dial.frame.n.z();
        if (std::abs(up) < 0.05)
            continue;
        const PlatePoint plumb{-100 * dial.frame.u.z() / up, -100 * dial.frame.v.z() / up};
        for (const DialLine& line : dial.lines)
            if (line.family == Family::azimuth)
                for (const PlatePolyline& piece : line.pieces)
                    if (length_mm(piece) > 1) {
                        ++compared;
                        REQUIRE(off_line_mm(plumb, piece) < 1e-4);
                    }
    }
    CHECK(compared > 500);
    // Level: the shadow of a Sun in the azimuth A falls the other way, A + 180° from north.
    DialPlan level;
    level.site.latitude = Angle::degrees(45);
    level.nodus_height_mm = 100;
    level.azimuths = {Angle::degrees(120), Angle::degrees(180), Angle::degrees(240)};
    for (const DialLine& line : delineate(level, mean_year(), k_window).lines)
        if (line.family == Family::azimuth)
            for (const PlatePoint p : line.pieces.front())
                CHECK_THAT((arc_tangent(-p.u_mm, -p.v_mm) - line.level).signed_turn().in_degrees(), WithinAbs(0, 1e-9));
}

TEST_CASE("A meridian line's yearly curve holds the shadow of clock noon on every date", "[engine][dial]") {
    for (const double latitude : {52.0, -34.0, 10.0})
        for (const Attitude& attitude :
             {Attitude{}, Attitude{Angle::degrees(latitude > 0 ? 180 : 0), Angle::degrees(12)}}) {
            DialPlan plan;
            plan.site = {Angle::degrees(latitude), Angle::degrees(9.5)};
            plan.zone_meridian = Angle::degrees(15);
            plan.attitude = attitude;
            plan.nodus_height_mm = 100;
            plan.hours.first_h = plan.hours.last_h = 12;
            HourPlan clock = plan.hours;
            clock.time = HourTime::clock;
            plan.more_hours = {clock};
            const Delineation dial = delineate(plan, mean_year(), {-1000, -1000, 1000, 1000});
            const auto curve = std::find_if(dial.lines.begin(), dial.lines.end(),
                                            [](const DialLine& line) { return line.family == Family::clock_hour; });
            REQUIRE(curve != dial.lines.end());
            const Caster<Plane> caster = caster_of(plan);
            int shadows = 0;
            for (int day = 0; day < 365; ++day) {
                // Twelve by clocks an hour ahead of UT is 11h UT.
                const MeanYear::Season season = mean_year().at(mean_year().day_of(mean_year().date_of(day), 11));
                const SkyPlace sun{season.equation_of_time + plan.site.longitude - plan.zone_meridian,
                                   season.declination};
                CAPTURE(latitude, day);
                if (const auto shadow = caster.cast(sun, Light::seen); shadow && std::abs(shadow->point.v_mm) < 1000) {
                    ++shadows;
                    REQUIRE(distance_mm(shadow->point, curve->pieces) < 0.005);
                }
            }
            CHECK(shadows > 180);
        }
}

TEST_CASE("Poles, polar day and the zenith give finite lines or none", "[engine][dial]") {
    for (const double latitude : {90.0, -90.0, 89.95, -89.95, 70.0, -70.0, 66.56, 23.44, 0.0})
        for (const double altitude : {90.0, 0.0, -35.0, 47.0, -90.0})
            for (const double horizon_arcmin : {0.0, -50.0}) {
                DialPlan plan;
                plan.site.latitude = Angle::degrees(latitude);
                plan.attitude = {Angle::degrees(200), Angle::degrees(altitude)};
                plan.nodus_height_mm = 100;
                plan.gnomon_thickness_mm = 5;
                plan.horizon = Angle::degrees(horizon_arcmin / 60);
                ask_for_every_family(plan);
                plan.altitudes.push_back(Angle::degrees(90));
                plan.altitudes.push_back(Angle{});
                CAPTURE(latitude, altitude, horizon_arcmin);
                for (const DialLine& line : delineate(plan, mean_year(), k_window).lines) {
                    CAPTURE(int(line.family), line.time_h, line.level.in_degrees());
                    REQUIRE_FALSE(line.pieces.empty());
                    for (const PlatePolyline& piece : line.pieces) {
                        double extent_mm = 0;
                        for (const PlatePoint p : piece) {
                            REQUIRE((std::isfinite(p.u_mm) && std::isfinite(p.v_mm)));
                            REQUIRE((std::abs(p.u_mm) <= 400.000001 && std::abs(p.v_mm) <= 400.000001));
                            extent_mm = std::max(extent_mm, std::hypot(p.u_mm - piece[0].u_mm, p.v_mm - piece[0].v_mm));
                        }
                        REQUIRE(extent_mm > 0); // a dot is no line
                    }
                }
            }
}
