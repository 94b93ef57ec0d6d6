// SPDX-License-Identifier: MIT
#include "cli/report/say.hpp"

#include "engine/time/instant_text.hpp"
#include "layout/correction/words.hpp"
#include "layout/plate/family_words.hpp"

#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

std::string unsigned_degrees_minutes(Angle angle) {
    return degrees_minutes(abs(angle));
}

} // namespace

std::string both_ways(Angle angle) {
    return fmt::format("{}° ({})", fixed(angle.in_degrees(), 4), degrees_minutes(angle));
}

std::string say_latitude(Angle latitude) {
    return unsigned_degrees_minutes(latitude) + (latitude < Angle{} ? " S" : " N");
}
std::string say_longitude(Angle longitude) {
    return unsigned_degrees_minutes(longitude) + (longitude < Angle{} ? " W" : " E");
}

std::string say_bearing(Angle azimuth) {
    static constexpr const char* k_quarters[] = {"north", "east", "south", "west"};
    const double tenths = std::fmod(std::round(azimuth.positive_turn().in_degrees() * 10), 3600.0);
    if (std::fmod(tenths, 900.0) == 0)
        return k_quarters[std::size_t(tenths / 900)];
    const double degrees = tenths / 10;
    const bool north = degrees < 90 || degrees > 270;
    const double from_meridian = north ? (degrees < 90 ? degrees : 360 - degrees) : std::abs(degrees - 180);
    return fmt::format("{} {:.1f}° {}", north ? "N" : "S", from_meridian, degrees < 180 ? "E" : "W");
}

std::string say_attitude(const Attitude& attitude) {
    const double altitude = attitude.normal_altitude.in_degrees();
    if (std::abs(altitude) > 89.9999)
        return altitude > 0 ? "level, face up" : "level, face down";
    const std::string facing = "facing " + say_bearing(attitude.normal_azimuth);
    if (std::abs(altitude) < 0.005)
        return "upright, " + facing;
    return fmt::format("leaning {} {} from upright, {}", altitude > 0 ? "back" : "forward",
                       degrees_minutes(abs(attitude.normal_altitude)), facing);
}

std::string say_equation(Angle equation) {
    const double seconds = std::round(equation.in_minutes_of_time() * 60);
    const double size = std::abs(seconds);
    if (size == 0)
        return "0 m 00 s";
    return fmt::format("{}{:.0f} m {:02.0f} s, dial {}", seconds < 0 ? "-" : "+", std::floor(size / 60),
                       std::fmod(size, 60.0), seconds < 0 ? "slow" : "fast");
}

const char* say_time(HourTime time) {
    return layout::words_of(time).name;
}

std::string say_clock(double hours) {
    const long seconds = ((std::lround(hours * 3600) % 86400) + 86400) % 86400;
    return fmt::format("{:02}:{:02}:{:02}", seconds / 3600, seconds / 60 % 60, seconds % 60);
}

namespace {

/// The reading of the zone's clocks, written as an instant of their own.
std::string local_text(const Zone& zone, Instant at) {
    const Instant whole = std::chrono::round<std::chrono::seconds>(at);
    return write_instant(whole + zone.at(at).from_utc);
}

} // namespace

std::string say_moment(const Zone& zone, Instant at) {
    return local_text(zone, at).substr(0, 19) + ' ' + zone.at(at).abbreviation;
}

std::string say_clock(const Zone& zone, Instant at) {
    return local_text(zone, at).substr(11, 8);
}

std::string iso_clock(const Zone& zone, Instant at) {
    const long offset = zone.at(at).from_utc.count(), size = std::abs(offset);
    const std::string seconds =
        size % 60 != 0 ? fmt::format(":{:02}", size % 60) : ""; // before zones kept whole minutes
    return fmt::format("{}{}{:02}:{:02}{}", local_text(zone, at).substr(0, 19), offset < 0 ? '-' : '+', size / 3600,
                       size / 60 % 60, seconds);
}

std::string say_duration(std::chrono::microseconds length) {
    const auto minutes = std::chrono::round<std::chrono::minutes>(length).count();
    return fmt::format("{} h {:02} m", minutes / 60, minutes % 60);
}

std::string say_date(std::chrono::year_month_day date) {
    return fmt::format("{} {}", layout::say_date(date.month() / date.day(), true), int(date.year()));
}

std::string say_weekday_date(std::chrono::year_month_day date) {
    static constexpr const char* k_days[] = {"Sunday",   "Monday", "Tuesday", "Wednesday",
                                             "Thursday", "Friday", "Saturday"};
    return std::string{k_days[std::chrono::weekday{std::chrono::sys_days{date}}.c_encoding()]} + ' ' + say_date(date);
}

std::string iso_date(std::chrono::year_month_day date) {
    return fmt::format("{:04}-{:02}-{:02}", int(date.year()), unsigned(date.month()), unsigned(date.day()));
}

} // namespace dialwright::cli
