// SPDX-License-Identifier: MIT
#include "engine/sun/solar_day.hpp"

#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

Angle altitude_at(const Site& site, Instant utc) {
    return to_site(sky_place(apparent_sun(utc), site.longitude), site.latitude).altitude();
}

Site place(double latitude_deg, double longitude_deg) {
    return {Angle::degrees(latitude_deg), Angle::degrees(longitude_deg)};
}

Instant noon_of(year_month_day date) {
    return Instant{sys_days{date}} + 12h;
}

} // namespace

TEST_CASE("at rise and set the Sun stands at the standard altitude, at noon in the meridian", "[engine][solar_day]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_real_distribution<double> latitude{-89.0, 89.0}, longitude{-180.0, 180.0};
    std::uniform_int_distribution<std::int64_t> any{0, 4'000'000'000};
    for (int i = 0; i < 300; ++i) {
        const Site site = place(latitude(random), longitude(random));
        const Instant about{seconds{any(random)}};
        CAPTURE(site.latitude.in_degrees(), site.longitude.in_degrees(), write_instant(about));
        const SolarDay day = solar_day(site, about);
        CHECK(abs(about - day.noon) < 12h + 1min);
        const SkyPlace at_noon = sky_place(apparent_sun(day.noon), site.longitude);
        CHECK_THAT(at_noon.hour_angle.in_hours() * 3600.0, WithinAbs(0.0, 0.01));
        CHECK(at_noon.declination == day.declination);
        for (const auto& passage : {day.rise, day.set})
            if (passage) {
                // A hundredth of a second is 0.15", less where the Sun climbs aslant.
                CHECK_THAT((altitude_at(site, passage->at) - k_upper_edge_altitude).in_arcseconds(),
                           WithinAbs(0.0, 0.2));
            }
        if (day.rise) {
            CHECK(day.rise->at < day.noon);
            CHECK(day.rise->azimuth < Angle::degrees(180.1));
        }
        if (day.set) {
            CHECK(day.set->at > day.noon);
            CHECK(day.set->azimuth > Angle::degrees(179.9));
        }
        const bool up_at_noon = altitude_at(site, day.noon) > k_upper_edge_altitude;
        CHECK((day.light == SolarDay::Light::stays_down) == !up_at_noon);
        CHECK((day.light == SolarDay::Light::rises_and_sets) == (day.rise || day.set));
    }
}

TEST_CASE("the Sun is found down before its rise and up after, minute by minute", "[engine][solar_day]") {
    for (const double latitude : {-68.5, -33.9, 0.0, 54.2, 66.2, 70.0})
        for (const unsigned month_number : {1U, 3U, 6U, 9U, 12U}) {
            const Site site = place(latitude, 10.0);
            CAPTURE(latitude, month_number);
            const SolarDay day = solar_day(site, noon_of(2026y / month{month_number} / 21));
            for (Instant utc = day.noon - 11h - 50min; utc < day.noon + 11h + 50min; utc += 7min) {
                const bool up = altitude_at(site, utc) > k_upper_edge_altitude;
                const bool expected = day.light != SolarDay::Light::stays_down && (!day.rise || utc > day.rise->at) &&
                                      (!day.set || utc < day.set->at);
                CHECK(up == expected);
            }
        }
}

TEST_CASE("the midnight Sun and the polar night are told apart", "[engine][solar_day]") {
    const Site north = place(70.0, 20.0);
    CHECK(solar_day(north, noon_of(2026y / 6 / 21)).light == SolarDay::Light::stays_up);
    CHECK(solar_day(north, noon_of(2026y / 12 / 21)).light == SolarDay::Light::stays_down);
    CHECK(solar_day(place(-70.0, 20.0), noon_of(2026y / 12 / 21)).light == SolarDay::Light::stays_up);
    CHECK(solar_day(place(90.0, 0.0), noon_of(2026y / 6 / 21)).light == SolarDay::Light::stays_up);
    CHECK(solar_day(place(-90.0, 0.0), noon_of(2026y / 6 / 21)).light == SolarDay::Light::stays_down);
    // Walked from day to day, each season ends once, and no day is lost on the way.
    int days_up = 0, days_down = 0, days_between = 0;
    for (int d = 0; d < 365; ++d) {
        const SolarDay day = solar_day(north, noon_of(2026y / 1 / 1) + days{d});
        days_up += day.light == SolarDay::Light::stays_up;
        days_down += day.light == SolarDay::Light::stays_down;
        days_between += day.light == SolarDay::Light::rises_and_sets;
    }
    CHECK(days_up + days_down + days_between == 365);
    CHECK(days_up > 60);
    CHECK(days_down > 50);
}

TEST_CASE("refraction and the Sun's edge lengthen the day by minutes", "[engine][solar_day]") {
    const Site site = place(54.2, -2.5);
    const Instant about = noon_of(2026y / 3 / 20);
    const SolarDay seen = solar_day(site, about), bare = solar_day(site, about, Angle{});
    // 50' at the equinox: 50/15/cos φ minutes at either end.
    const double minutes_seen = duration<double, std::ratio<60>>(bare.rise->at - seen.rise->at).count();
    CHECK_THAT(minutes_seen, WithinAbs(50.0 / 15.0 / cos(site.latitude), 0.05));
    CHECK_THAT(bare.rise->azimuth.in_degrees(), WithinAbs(90.0, 0.5));
    CHECK_THAT(bare.set->azimuth.in_degrees(), WithinAbs(270.0, 0.5));
}

TEST_CASE("a civil date has the noon of its own clocks", "[engine][solar_day]") {
    struct Case {
        const char* zone;
        double latitude, longitude;
    };
    for (const Case& c : {Case{"Europe/London", 54.2, -2.5}, Case{"America/Los_Angeles", 37.0, -120.0},
                          Case{"Pacific/Auckland", -41.0, 175.0}, Case{"Pacific/Kiritimati", 2.0, -157.0}}) {
        const Zone zone = Zone::find(c.zone).value();
        for (const year_month_day date : {2026y / 1 / 1, 2026y / 3 / 29, 2026y / 6 / 21, 2026y / 10 / 25}) {
            const SolarDay day = solar_day(place(c.latitude, c.longitude), date, zone);
            CAPTURE(c.zone, write_instant(day.noon));
            CHECK(floor<days>(zone.to_clock(day.noon)) == local_days{date});
        }
    }
}

TEST_CASE("a table gives the same day", "[engine][solar_day]") {
    const Almanac almanac{sys_days{2025y / 12 / 29}, sys_days{2027y / 1 / 4}};
    for (int d = 0; d < 365; d += 9) {
        const Instant about = noon_of(2026y / 1 / 1) + days{d};
        const SolarDay direct = solar_day(place(54.2, -2.5), about),
                       table = solar_day(place(54.2, -2.5), about, almanac);
        CHECK(abs(direct.noon - table.noon) < 20ms);
        CHECK(abs(direct.rise->at - table.rise->at) < 50ms);
        CHECK(abs(direct.set->at - table.set->at) < 50ms);
    }
}
