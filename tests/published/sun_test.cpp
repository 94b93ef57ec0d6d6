// SPDX-License-Identifier: MIT
#include "engine/sun/almanac.hpp"
#include "engine/sun/mean_year.hpp"
#include "engine/sun/solar_day.hpp"
#include "engine/time/instant_text.hpp"
#include "tests/published/published.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <functional>
#include <stdexcept>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

Instant instant(const std::string& text) {
    const auto read = read_instant(text);
    if (!read)
        throw std::runtime_error("not an instant: " + text);
    return *read;
}

Site site_of(const published::Case& c) {
    return {Angle::degrees(c.number("latitude_deg")), Angle::degrees(c.number("longitude_deg"))};
}

/// From the geocentric altitude to what NREL's report calls the topocentric zenith: parallax, then refraction
/// (section 3.14 of the report, from memory).
double refracted_zenith_deg(const published::Case& c, Angle altitude) {
    const double seen = (altitude - Angle::arcseconds(8.794) * cos(altitude)).in_degrees();
    const double refraction = c.number("pressure_mbar") / 1010.0 * 283.0 / (273.0 + c.number("temperature_c")) * 1.02 /
                              (60.0 * tan(Angle::degrees(seen + 10.3 / (seen + 5.11))));
    return 90.0 - seen - refraction;
}

double value_at_instant(const published::Case& c, const std::string& name) {
    const ApparentSun sun = apparent_sun(instant(c.text("at")));
    if (name == "declination_deg")
        return sun.declination.in_degrees();
    if (name == "declination_arcsec")
        return sun.declination.in_arcseconds();
    if (name == "classical_equation_of_time_s") // see apparent_sun.hpp
        return sun.equation_of_time.in_minutes_of_time() * 60.0 + c.number("tt_minus_ut_s") / 365.2422;
    const SkyPlace sky = sky_place(sun, site_of(c).longitude);
    const SiteDirection direction = to_site(sky, site_of(c).latitude);
    if (name == "local_hour_angle_deg")
        return sky.hour_angle.in_degrees();
    if (name == "azimuth_deg")
        return direction.azimuth().in_degrees();
    if (name == "topocentric_zenith_deg")
        return refracted_zenith_deg(c, direction.altitude());
    throw std::runtime_error("unknown expectation: " + name);
}

void check_instant(const published::Case& c) {
    for (const auto& expected : c.expected) {
        CAPTURE(expected.name);
        CHECK_THAT(value_at_instant(c, expected.name), WithinAbs(expected.number(), expected.within.value()));
    }
}

void check_rise_and_set(const published::Case& c) {
    const SolarDay day = solar_day(site_of(c), instant(c.text("about")));
    for (const auto& expected : c.expected) {
        CAPTURE(expected.name);
        const auto& passage = expected.name == "rise" ? day.rise : day.set;
        REQUIRE((expected.name == "rise" || expected.name == "set"));
        REQUIRE(passage.has_value() != expected.nothing());
        if (passage)
            CHECK_THAT(duration<double>(passage->at - instant(expected.value)).count(),
                       WithinAbs(0.0, expected.within.value()));
    }
}

/// A year's equation of time as seconds on each date, noon UT, the dates counted from 1 January of a common year.
using DailyEquation = std::function<double(int day)>;

int day_in_year(const std::string& month_and_day) { // mm-dd
    const Instant at = instant("2026-" + month_and_day.substr(0, 5) + "T00:00:00Z");
    return static_cast<int>(floor<days>(at - Instant{sys_days{2026y / 1 / 1}}).count());
}

void check_year(const published::Case& c, const DailyEquation& equation_s) {
    for (const auto& expected : c.expected) {
        CAPTURE(expected.name, expected.value);
        const int day = day_in_year(expected.value);
        if (expected.name == "extreme") {
            const double value = published::Expectation{"", expected.value.substr(6), {}}.number();
            const double way = value > equation_s(day - 20) ? 1.0 : -1.0; // a highest or a lowest value
            int best = day - 20;
            for (int other = day - 20; other <= day + 20; ++other)
                best = way * equation_s(other) > way * equation_s(best) ? other : best;
            CHECK_THAT(equation_s(best), WithinAbs(value, expected.within.value()));
            CHECK(std::abs(best - day) <= 2);
        } else {
            REQUIRE(expected.name == "zero");
            const int slack = static_cast<int>(expected.within.value());
            CHECK(equation_s(day - slack) * equation_s(day + slack) < 0.0);
        }
    }
}

void check_calendar_year(const published::Case& c) {
    const year y{static_cast<int>(c.number("year"))};
    const Instant start = sys_days{y / 1 / 1};
    const Almanac almanac{start - days{40}, start + days{400}};
    check_year(
        c, [&](int day) { return almanac.at(start + days{day} + 12h).equation_of_time.in_minutes_of_time() * 60.0; });
}

void check_mean_year(const published::Case& c) {
    const MeanYear mean{static_cast<int>(c.number("first_year")), static_cast<int>(c.number("last_year"))};
    check_year(c, [&](int day) { return mean.at(day + 0.75).equation_of_time.in_minutes_of_time() * 60.0; });
}

} // namespace

TEST_CASE("the Sun is where published sources say", "[published][sun]") {
    const std::map<std::string, void (*)(const published::Case&)> checks{
        {"place at an instant", check_instant},
        {"rise and set", check_rise_and_set},
        {"equation of time through a year", check_calendar_year},
        {"equation of time through a mean year", check_mean_year},
    };
    for (const published::Case& c : published::cases_in("sun")) {
        CAPTURE(c.file, c.source, c.check);
        REQUIRE(checks.count(c.check) == 1);
        REQUIRE_FALSE(c.expected.empty());
        checks.at(c.check)(c);
    }
}
