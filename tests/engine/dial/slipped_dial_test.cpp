// SPDX-License-Identifier: MIT
#include "engine/dial/slipped_dial.hpp"

#include <catch2/catch.hpp>

#include <random>

using namespace dialwright;
using Catch::WithinAbs;

namespace {

const MeanYear& mean_year() {
    static const MeanYear k_year{2027, 2030};
    return k_year;
}

DialPlan plan_at(double latitude_deg, Attitude attitude) {
    DialPlan plan;
    plan.site = {Angle::degrees(latitude_deg), Angle::degrees(-1.9)};
    plan.attitude = attitude;
    plan.nodus_height_mm = 40;
    return plan;
}

Attitude wall(double facing_deg, double lean_deg = 0) {
    return {Angle::degrees(facing_deg), Angle::degrees(lean_deg)};
}

SkyPlace sun(double hour_angle_deg, double declination_deg) {
    return {Angle::degrees(hour_angle_deg), Angle::degrees(declination_deg)};
}

} // namespace

TEST_CASE("without a slip a dial reads what its plan says", "[engine][slip]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_real_distribution<double> latitude{-66, 66}, facing{0, 360}, lean{-30, 89}, hour{-150, 150},
        declination{-23.4, 23.4}, place{-200, 200};
    int lit = 0;
    for (int i = 0; i < 3000; ++i) {
        DialPlan plan = plan_at(latitude(random), wall(facing(random), lean(random)));
        plan.gnomon_thickness_mm = i % 2 == 0 ? 0 : 6;
        const SkyPlace at = sun(hour(random), declination(random));
        const PlatePoint where{place(random), place(random)};
        const double day = mean_year().day_of_declination(at.declination, i % 3 == 0).value();
        for (const HourTime time : {HourTime::sun, HourTime::zone, HourTime::clock, HourTime::unequal})
            for (const bool by_nodus : {true, false}) {
                const SlippedDial dial{plan, mean_year(), time, by_nodus};
                const auto reads = dial.reads(at, day, {}, where);
                const auto meant = reading_of(plan, time, mean_year(), at, day);
                if (!(dial.caster().surface().light(to_site(at, plan.site.latitude)) > 0.02) || !reads || !meant)
                    continue;
                ++lit;
                // By the curve of clock time near a solstice a rounding of the declination is a long stretch of days.
                CHECK_THAT(dial.minutes_between(*meant, *reads), WithinAbs(0.0, time == HourTime::clock ? 0.02 : 1e-5));
            }
    }
    CHECK(lit > 3000);
}

TEST_CASE("slips that can be told by hand", "[engine][slip]") {
    const double day = mean_year().june_solstice_day();
    // An equatorial plate turned in its own plane by 1°: 4 minutes at every hour.
    const DialPlan round = plan_at(50, equatorial_attitude(Angle::degrees(50), true));
    const SlippedDial equatorial{round, mean_year(), HourTime::sun, false};
    for (const double hour : {-60.0, 0.0, 45.0}) {
        const Slip slip{turn_about(equatorial.caster().surface().frame().n, Angle::degrees(1))};
        const auto error = equatorial.error_min(sun(hour, 20), day, slip, {0, 80});
        REQUIRE(error);
        // Anticlockwise round the north pole: the plate follows the stars backwards, and the Sun comes later to each line.
        CHECK_THAT(*error, WithinAbs(4.0, 1e-6));
    }
    // A level dial turned clockwise by 1° as seen from above, at noon: to the dial the Sun stands 1° east of south, at its
    // own altitude a. tan H = sin A / (cos A sin φ + tan a cos φ), A from south through west.
    // Source: Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 13 (from memory).
    const DialPlan level = plan_at(50, {});
    const SlippedDial dial{level, mean_year(), HourTime::sun, false};
    const auto turned = dial.error_min(sun(0, 10), day, {turn_about_plumb(Angle::degrees(1))}, {0, 80});
    REQUIRE(turned);
    const Angle phi = Angle::degrees(50), azimuth = Angle::degrees(-1), altitude = Angle::degrees(90 - 50 + 10);
    const Angle hour = arc_tangent(sin(azimuth), cos(azimuth) * sin(phi) + tan(altitude) * cos(phi));
    CHECK_THAT(*turned, WithinAbs(hour.in_minutes_of_time(), 1e-6));
    // A polar turn: about the Earth's axis a dial is off by the turn alone, whatever it is.
    const DialPlan declining = plan_at(-35, wall(20, 10));
    const SlippedDial on_wall{declining, mean_year(), HourTime::sun, false};
    const Slip slip{turn_about(north_pole(declining.site.latitude).enu, Angle::degrees(-0.5))};
    const auto polar = on_wall.error_min(sun(10, -10), day, slip, {10, -60});
    REQUIRE(polar);
    CHECK_THAT(*polar, WithinAbs(-2.0, 1e-6));
}

TEST_CASE("a style that turns about itself changes nothing; lines that move do", "[engine][slip]") {
    const DialPlan plan = plan_at(52, wall(157));
    const SlippedDial dial{plan, mean_year(), HourTime::sun, false};
    const double day = mean_year().march_equinox_day();
    const Style& style = dial.style();
    REQUIRE(style.centre);
    Slip about_itself{};
    about_itself.style_turned = turn_about(style.towards_nodus, Angle::degrees(3));
    about_itself.pivot_mm = {style.centre->u_mm, style.centre->v_mm, 0};
    const PlatePoint at{30, -70};
    CHECK_THAT(*dial.error_min(sun(20, 0), day, about_itself, at), WithinAbs(0.0, 1e-9));
    // Scaled about the centre, straight hours stay what they are; stretched one way they do not.
    Slip scaled{};
    scaled.stretch_u = scaled.stretch_v = 1.01;
    scaled.stretch_from = *style.centre;
    CHECK_THAT(*dial.error_min(sun(20, 0), day, scaled, at), WithinAbs(0.0, 1e-9));
    scaled.stretch_v = 1.0;
    CHECK(std::abs(*dial.error_min(sun(20, 0), day, scaled, at)) > 0.05);
    // Moved along their own hour line nothing, across it something.
    const auto shadow = dial.caster().cast(sun(20, 0), Light::plate_only);
    REQUIRE(shadow);
    const double du = shadow->point.u_mm - style.centre->u_mm, dv = shadow->point.v_mm - style.centre->v_mm,
                 reach = std::hypot(du, dv);
    Slip moved{};
    moved.moved_mm = {0.5 * du / reach, 0.5 * dv / reach};
    CHECK_THAT(*dial.error_min(sun(20, 0), day, moved, shadow->point), WithinAbs(0.0, 1e-9));
    moved.moved_mm = {-0.5 * dv / reach, 0.5 * du / reach};
    CHECK(std::abs(*dial.error_min(sun(20, 0), day, moved, shadow->point)) > 0.2);
    // Unlit: nothing.
    CHECK_FALSE(dial.reads(sun(170, 0), day, {}, at));
}
