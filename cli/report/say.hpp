// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/dial/delineation.hpp"
#include "engine/surface/plate_frame.hpp"
#include "engine/time/zone.hpp"
#include "layout/text/figures.hpp"

#include <string>

namespace dialwright::cli {

/// Numbers as people of the trade read them.

using layout::degrees_minutes;
using layout::fixed;
using layout::say_length;
/// "54.4500° (54° 27.0')".
[[nodiscard]] std::string both_ways(Angle angle);
/// "54° 27.0' N".
[[nodiscard]] std::string say_latitude(Angle latitude);
[[nodiscard]] std::string say_longitude(Angle longitude);
/// "S 23.0° E" for a facing; "south" and so on at the quarters.
[[nodiscard]] std::string say_bearing(Angle azimuth);
/// Which way a plate looks, in a sentence part: "level, face up", "upright, facing S 23.0° E", "leaning back 35.0°, facing south".
[[nodiscard]] std::string say_attitude(const Attitude& attitude);
/// "+3 m 39 s, dial fast".
[[nodiscard]] std::string say_equation(Angle equation_of_time);
/// A kind of time as designs name it: "since sunrise".
[[nodiscard]] const char* say_time(HourTime time);
/// "HH:MM:SS" of hours in the day, to the nearest second, 24 h as 00:00:00.
[[nodiscard]] std::string say_clock(double hours);
/// What the zone's clocks show, to the nearest second: "2027-06-14T13:04:07 BST".
[[nodiscard]] std::string say_moment(const Zone& zone, Instant at);
/// The same without date and zone: "13:04:07".
[[nodiscard]] std::string say_clock(const Zone& zone, Instant at);
/// With the date and the zone's offset, for programs: "2027-06-14T13:04:07+01:00".
[[nodiscard]] std::string iso_clock(const Zone& zone, Instant at);
/// "17 h 12 m", to the nearest minute.
[[nodiscard]] std::string say_duration(std::chrono::microseconds length);
/// "14 Jun 2027", and with its day of the week before it.
[[nodiscard]] std::string say_date(std::chrono::year_month_day date);
[[nodiscard]] std::string say_weekday_date(std::chrono::year_month_day date);
/// "2027-06-14".
[[nodiscard]] std::string iso_date(std::chrono::year_month_day date);

} // namespace dialwright::cli
