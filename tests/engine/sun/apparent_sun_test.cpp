// SPDX-License-Identifier: MIT
// Values from outside stand in tests/published/sun and tests/against; here are the laws.
#include "engine/sun/apparent_sun.hpp"

#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

TEST_CASE("the Sun's hour angle is that of the mean Sun and the equation of time", "[engine][sun]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_int_distribution<std::int64_t> any{-5'000'000'000, 7'000'000'000};
    for (int i = 0; i < 500; ++i) {
        const Instant utc{seconds{any(random)}};
        const ApparentSun sun = apparent_sun(utc);
        CAPTURE(write_instant(utc));
        const Angle both = mean_greenwich_hour_angle(utc) + sun.equation_of_time;
        CHECK_THAT((sun.greenwich_hour_angle - both).signed_turn().in_arcseconds(), WithinAbs(0.0, 1e-6));
        CHECK(std::abs(sun.declination.in_degrees()) < 23.47);
        CHECK(std::abs(sun.equation_of_time.in_minutes_of_time()) < 17.0);
        CHECK(sun.greenwich_hour_angle >= Angle{});
        CHECK(sun.greenwich_hour_angle < Angle::degrees(360.0));
    }
}

TEST_CASE("the mean Sun stands at Greenwich at noon", "[engine][sun]") {
    const Instant noon = Instant{sys_days{2026y / 6 / 21}} + 12h;
    CHECK_THAT(mean_greenwich_hour_angle(noon).in_degrees(), WithinAbs(0.0, 1e-12));
    CHECK_THAT(mean_greenwich_hour_angle(noon + 6h).in_degrees(), WithinAbs(90.0, 1e-12));
    CHECK_THAT(mean_greenwich_hour_angle(noon - 1h).in_degrees(), WithinAbs(345.0, 1e-12));
    CHECK_THAT(mean_greenwich_hour_angle(Instant{sys_days{1911y / 6 / 21}}).in_degrees(), WithinAbs(180.0, 1e-12));
}

TEST_CASE("the Sun moves smoothly from second to second", "[engine][sun]") {
    // Across the leap second at the end of 2016, UTC and so the Sun's place take one second's step: 0.045".
    const Instant start = Instant{sys_days{2016y / 12 / 31}} + 23h + 59min + 50s;
    for (int i = 0; i < 20; ++i) {
        const ApparentSun now = apparent_sun(start + seconds{i}), next = apparent_sun(start + seconds{i + 1});
        CHECK_THAT((next.equation_of_time - now.equation_of_time).in_arcseconds(), WithinAbs(0.0, 0.06));
        CHECK_THAT((next.declination - now.declination).in_arcseconds(), WithinAbs(0.0, 0.03));
    }
}

TEST_CASE("a longitude turns the hour angle and nothing else", "[engine][sun]") {
    const ApparentSun sun = apparent_sun(Instant{sys_days{2026y / 3 / 1}} + 15h);
    const SkyPlace greenwich = sky_place(sun, Angle{}), east = sky_place(sun, Angle::degrees(170.0));
    CHECK_THAT((east.hour_angle - greenwich.hour_angle).positive_turn().in_degrees(), WithinAbs(170.0, 1e-10));
    CHECK(east.declination == greenwich.declination);
    CHECK(east.hour_angle < Angle::degrees(180.0));
}

TEST_CASE("years without a theory are refused", "[engine][sun]") {
    CHECK_NOTHROW(apparent_sun(Instant{sys_days{1800y / 1 / 1}}));
    CHECK_NOTHROW(apparent_sun(Instant{sys_days{2199y / 12 / 31}}));
    CHECK_THROWS_AS(apparent_sun(Instant{sys_days{1799y / 12 / 1}}), std::invalid_argument);
    CHECK_THROWS_AS(apparent_sun(Instant{sys_days{2200y / 2 / 1}}), std::invalid_argument);
    CHECK_THROWS_AS(apparent_sun(Instant::max()), std::invalid_argument);
    CHECK_THROWS_AS(apparent_sun(Instant::min()), std::invalid_argument);
}
