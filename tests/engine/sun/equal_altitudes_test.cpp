// SPDX-License-Identifier: MIT
#include "engine/sun/equal_altitudes.hpp"

#include <catch2/catch.hpp>

#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

SiteDirection towards_sun(const Site& site, Instant at) {
    return to_site(sky_place(apparent_sun(at), site.longitude), site.latitude);
}

} // namespace

TEST_CASE("at both moments the Sun is equally high, and the middle is the meridian but for what is told",
          "[engine][equal_altitudes]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_real_distribution<double> latitude{-66, 66}, longitude{-180, 180};
    std::uniform_int_distribution<int> any_day{0, 7000}, before{20, 400};
    int found = 0;
    for (int i = 0; i < 200; ++i) {
        const Site site{Angle::degrees(latitude(random)), Angle::degrees(longitude(random))};
        const Instant about = sys_days{2020y / 1 / 1} + days{any_day(random)};
        const Almanac almanac{about - days{3}, about + days{3}};
        const Instant noon = solar_day(site, about, almanac).noon;
        const auto pair = equal_altitudes(site, noon, minutes{before(random)}, almanac);
        if (!pair)
            continue;
        ++found;
        CAPTURE(site.latitude.in_degrees(), site.longitude.in_degrees());
        CHECK(pair->before < noon);
        CHECK(pair->after > noon);
        const SiteDirection first = towards_sun(site, pair->before), second = towards_sun(site, pair->after);
        // A hundredth of a second is 0.15" of the Sun's way.
        CHECK_THAT((first.altitude() - second.altitude()).in_arcseconds(), WithinAbs(0, 0.2));
        CHECK_THAT((first.altitude() - pair->altitude).in_arcseconds(), WithinAbs(0, 0.1));
        // Half of the way round from one shadow to the other, taken back by what is told, is north or south.
        const Angle middle = first.azimuth() + (second.azimuth() - first.azimuth()).positive_turn() / 2.0;
        const Angle meridian = (middle - pair->middle_off).signed_turn();
        CHECK_THAT(sin(meridian), WithinAbs(0, 1e-6));
        CHECK(abs(pair->middle_off) < Angle::degrees(10));
    }
    CHECK(found > 100);
}

TEST_CASE("the middle is off to the side to which the Sun's declination moves", "[engine][equal_altitudes]") {
    const Site site{Angle::degrees(52), Angle{}};
    const auto off = [&](year_month_day date) {
        const Almanac almanac{sys_days{date} - days{3}, sys_days{date} + days{3}};
        const Instant noon = solar_day(site, sys_days{date} + hours{12}, almanac).noon;
        return equal_altitudes(site, noon, minutes{180}, almanac).value().middle_off.in_degrees();
    };
    // In March the Sun comes down to a height later than it rose to it: farther to the west, and its shadow to the east.
    CHECK(off(2027y / 3 / 21) > 0.05);
    CHECK(off(2027y / 9 / 23) < -0.05);
    CHECK_THAT(off(2027y / 6 / 21), WithinAbs(0, 0.01));
}

TEST_CASE("no pair where there is none", "[engine][equal_altitudes]") {
    const Instant day = sys_days{2027y / 12 / 21} + hours{12};
    const Almanac almanac{day - days{3}, day + days{3}};
    const Site north{Angle::degrees(60), Angle{}}, tropic{Angle::degrees(-23.43), Angle{}};
    CHECK_FALSE(equal_altitudes(north, solar_day(north, day, almanac).noon, minutes{300}, almanac));  // before sunrise
    CHECK_FALSE(equal_altitudes(tropic, solar_day(tropic, day, almanac).noon, minutes{60}, almanac)); // overhead
}
