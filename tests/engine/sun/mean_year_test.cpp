// SPDX-License-Identifier: MIT
#include "engine/sun/mean_year.hpp"

#include "engine/sun/apparent_sun.hpp"

#include <catch2/catch.hpp>

#include <cmath>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

/// The mean as it is defined: each date's own places, over all years that have the date.
MeanYear::Season mean_of_dates(int first_year, int last_year, month_day date, hours hour) {
    Angle declination, equation;
    int count = 0;
    for (int y = first_year; y <= last_year; ++y) {
        const year_month_day day{year{y}, date.month(), date.day()};
        if (!day.ok())
            continue;
        const ApparentSun sun = apparent_sun(Instant{sys_days{day}} + hour);
        declination += sun.declination;
        equation += sun.equation_of_time;
        ++count;
    }
    return {declination / count, equation / count};
}

void compare_with_dates(int first_year, int last_year, double declination_arcsec, double equation_s) {
    const MeanYear mean{first_year, last_year};
    for (int d = 0; d < 366; ++d) {
        const year_month_day day{sys_days{2024y / 1 / 1} + days{d}};
        const month_day date = day.month() / day.day();
        if (date == February / 29)
            continue;
        CAPTURE(first_year, last_year, static_cast<unsigned>(date.month()), static_cast<unsigned>(date.day()));
        const auto expected = mean_of_dates(first_year, last_year, date, 12h);
        const auto found = mean.at(mean.day_of(date));
        CHECK_THAT((found.declination - expected.declination).in_arcseconds(), WithinAbs(0.0, declination_arcsec));
        CHECK_THAT((found.equation_of_time - expected.equation_of_time).in_minutes_of_time() * 60.0,
                   WithinAbs(0.0, equation_s));
    }
}

} // namespace

TEST_CASE("the mean year is the mean of each date over the years", "[engine][mean_year]") {
    // What is left is the drift of the calendar, spread over the year (1.2"), and the Moon's sway.
    compare_with_dates(2021, 2040, 2.0, 0.15);
    compare_with_dates(1973, 1992, 2.0, 0.15);
    // One leap cycle alone evens out less of the Moon's sway.
    compare_with_dates(2025, 2028, 4.0, 0.5);
}

TEST_CASE("other hours of the day follow too", "[engine][mean_year]") {
    const MeanYear mean{2021, 2040};
    for (const month_day date : {February / 28, March / 1, December / 31, January / 1, September / 23})
        for (const int hour : {0, 6, 18, 23}) {
            CAPTURE(static_cast<unsigned>(date.month()), static_cast<unsigned>(date.day()), hour);
            const auto expected = mean_of_dates(2021, 2040, date, hours{hour});
            const auto found = mean.at(mean.day_of(date, hour));
            CHECK_THAT((found.declination - expected.declination).in_arcseconds(), WithinAbs(0.0, 2.5));
        }
}

TEST_CASE("29 February lies between its neighbours, near the mean of the leap years", "[engine][mean_year]") {
    const MeanYear mean{2021, 2040};
    const auto expected = mean_of_dates(2021, 2040, February / 29, 12h);
    const auto found = mean.at(mean.day_of(February / 29));
    // The leap years of this span lie a year and a half after its middle: 0.012 days of drift, 16".
    CHECK_THAT((found.declination - expected.declination).in_arcseconds(), WithinAbs(0.0, 21.0));
    CHECK(mean.day_of(February / 29) > mean.day_of(February / 28));
    CHECK(mean.day_of(February / 29) < mean.day_of(March / 1));
}

TEST_CASE("a date is found again from its day", "[engine][mean_year]") {
    const MeanYear mean{2021, 2040};
    for (int d = 0; d < 366; ++d) {
        const year_month_day day{sys_days{2024y / 1 / 1} + days{d}};
        const month_day date = day.month() / day.day();
        for (const double hour : {0.001, 12.0, 23.999})
            if (date != February / 29 || hour == 12.0)
                CHECK(mean.date_of(mean.day_of(date, hour)) == date);
        CHECK(mean.date_of(mean.day_of(date) + 3.0 * mean.length_days()) == date);
        CHECK(mean.date_of(mean.day_of(date) - mean.length_days()) == date);
    }
    CHECK(mean.date_of(-1e-12) == December / 31);
    CHECK(mean.date_of(-1e-300) == December / 31); // a rounding error short of the turn of the year
    CHECK_THAT(mean.day_of(January / 1, 0.0), WithinAbs(0.0, 0.0));
    CHECK_THAT(mean.day_of(March / 1, 0.0), WithinAbs(59.25, 0.0));
    CHECK_THAT(mean.day_of(December / 31, 24.0), WithinAbs(365.25, 1e-12));
}

TEST_CASE("the year closes, and its rates are its slopes", "[engine][mean_year]") {
    const MeanYear mean{2021, 2040};
    for (double day = -10.0; day < 380.0; day += 3.7) {
        const auto here = mean.at(day), next_year = mean.at(day + mean.length_days());
        CHECK_THAT((here.declination - next_year.declination).in_arcseconds(), WithinAbs(0.0, 1e-6));
        CHECK_THAT((here.equation_of_time - next_year.equation_of_time).in_arcseconds(), WithinAbs(0.0, 1e-6));
        const auto before = mean.at(day - 0.01), after = mean.at(day + 0.01), rate = mean.rate_at(day);
        CHECK_THAT((after.declination - before.declination).in_arcseconds() / 0.02,
                   WithinAbs(rate.declination.in_arcseconds(), 1e-3));
        CHECK_THAT((after.equation_of_time - before.equation_of_time).in_arcseconds() / 0.02,
                   WithinAbs(rate.equation_of_time.in_arcseconds(), 1e-3));
    }
}

TEST_CASE("solstices and equinoxes are where the declination says", "[engine][mean_year]") {
    const MeanYear mean{2021, 2040};
    CHECK(mean.date_of(mean.march_equinox_day()) == March / 20);
    CHECK(mean.date_of(mean.june_solstice_day()) == June / 21);
    CHECK(mean.date_of(mean.september_equinox_day()) == September / 22);
    CHECK(mean.date_of(mean.december_solstice_day()) == December / 21);
    CHECK_THAT(mean.at(mean.march_equinox_day()).declination.in_arcseconds(), WithinAbs(0.0, 0.01));
    CHECK_THAT(mean.at(mean.september_equinox_day()).declination.in_arcseconds(), WithinAbs(0.0, 0.01));
    CHECK_THAT(mean.rate_at(mean.june_solstice_day()).declination.in_arcseconds(), WithinAbs(0.0, 1e-4));
    CHECK_THAT(mean.rate_at(mean.december_solstice_day()).declination.in_arcseconds(), WithinAbs(0.0, 1e-4));
    // Mean obliquity of the ecliptic: 84381.448" − 46.815" T (IAU 1976; Meeus, ch. 22, from memory), here T = 0.305.
    // The mean of a solstice date falls short of it by up to 2", as the Sun is past or before the solstice in most
    // years; nutation, averaged over its 18.6 years, leaves under 1".
    CHECK_THAT(mean.obliquity().in_arcseconds(), WithinAbs(84381.448 - 46.815 * 0.305 - 1.0, 3.0));
    CHECK(mean.obliquity() > mean.at(mean.june_solstice_day() + 3.0).declination);
}

TEST_CASE("a declination is found twice a year, or never", "[engine][mean_year]") {
    const MeanYear mean{2021, 2040};
    for (double degrees = -23.4; degrees <= 23.4; degrees += 0.9) {
        CAPTURE(degrees);
        const Angle wanted = Angle::degrees(degrees);
        for (const bool north : {true, false}) {
            const auto day = mean.day_of_declination(wanted, north);
            REQUIRE(day);
            CHECK(*day >= 0.0);
            CHECK(*day < mean.length_days());
            CHECK_THAT((mean.at(*day).declination - wanted).in_arcseconds(), WithinAbs(0.0, 0.01));
            CHECK((mean.rate_at(*day).declination > Angle{}) == north);
        }
    }
    CHECK_FALSE(mean.day_of_declination(Angle::degrees(23.5), true));
    CHECK_FALSE(mean.day_of_declination(Angle::degrees(-24.0), false));
    CHECK(mean.day_of_declination(mean.obliquity(), true).has_value());
    CHECK(mean.day_of_declination(-mean.obliquity(), false).has_value());
}

TEST_CASE("a span that is no whole number of leap cycles is refused", "[engine][mean_year]") {
    CHECK_THROWS_AS(MeanYear(2021, 2039), std::invalid_argument);
    CHECK_THROWS_AS(MeanYear(2021, 2021), std::invalid_argument);
    CHECK_THROWS_AS(MeanYear(2040, 2021), std::invalid_argument);
    CHECK_THROWS_AS(MeanYear(1900, 1903), std::invalid_argument);
    CHECK_THROWS_AS(MeanYear(2097, 2100), std::invalid_argument);
    CHECK_NOTHROW(MeanYear(1901, 1904));
    CHECK_NOTHROW(MeanYear(2093, 2096));
}
