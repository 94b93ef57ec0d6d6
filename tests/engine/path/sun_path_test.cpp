// SPDX-License-Identifier: MIT
#include "engine/path/sun_path.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

TEST_CASE("An hour's path keeps its hour, a date's its declination", "[engine][path]") {
    const Angle hour = Angle::hours(2.25), declination = Angle::degrees(-11.47);
    const SunPath nodus = hour_path_of_nodus(hour, {Angle::degrees(-23), Angle::degrees(22)});
    CHECK(nodus.great_circle);
    CHECK(nodus.light == Light::seen);
    CHECK_THAT(nodus.at(nodus.first)->declination.in_degrees(), WithinAbs(-23, 1e-12));
    CHECK_THAT(nodus.at(nodus.last)->declination.in_degrees(), WithinAbs(22, 1e-12));
    const SunPath style = hour_path_of_style(hour);
    CHECK(style.great_circle);
    CHECK(style.light == Light::plate_only);
    CHECK_THAT(style.at(style.last)->declination.in_degrees(), WithinAbs(90, 1e-12));
    const SunPath date = declination_path(declination);
    CHECK_FALSE(date.great_circle);
    CHECK(declination_path(Angle{}).great_circle);
    for (const double part : {0.0, 0.3, 1.0}) {
        CHECK(nodus.at(nodus.first + part * (nodus.last - nodus.first))->hour_angle == hour);
        CHECK(style.at(style.first + part * (style.last - style.first))->hour_angle == hour);
        const SkyPlace sun = *date.at(date.first + part * (date.last - date.first));
        CHECK(sun.declination == declination);
        CHECK_THAT(sun.hour_angle.in_degrees(), WithinAbs(-180 + 360 * part, 1e-10));
    }
}

TEST_CASE("A clock-time curve is the mean year's, and closes after it", "[engine][path]") {
    const MeanYear year{2025, 2044};
    const double december = year.december_solstice_day();
    const SunPath curve = mean_time_path(Angle::hours(3), year, december - year.length_days(), december);
    const SkyPlace first = *curve.at(curve.first), last = *curve.at(curve.last);
    CHECK_THAT((last.hour_angle - first.hour_angle).in_arcseconds(), WithinAbs(0, 1e-6));
    CHECK_THAT((last.declination - first.declination).in_arcseconds(), WithinAbs(0, 1e-6));
    // Early in November the dial is 16 min fast of the clock: at mean 3 h the apparent Sun is past 3 h.
    const double november = year.day_of(std::chrono::November / 3);
    CHECK_THAT(curve.at(november)->hour_angle.in_minutes_of_time(), WithinAbs(180 + 16.4, 0.1));
}
