// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/dial/delineation.hpp"
#include "engine/surface/plate_frame.hpp"

#include <string>

namespace dialwright::cli {

/// Numbers as people of the trade read them.

/// "12° 27.3'"; with the sign before it where it is negative.
[[nodiscard]] std::string degrees_minutes(Angle angle);
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
/// "46.3 mm", or "46.3 mm (1 53/64 in)".
[[nodiscard]] std::string say_length(double mm, bool inches);
/// The trade's words for a kind of time and for a family of lines: "since sunrise", "altitude".
[[nodiscard]] const char* say_time(HourTime time);
[[nodiscard]] const char* say_family(Family family);
/// "HH:MM:SS" of hours in the day, to the nearest second, 24 h as 00:00:00.
[[nodiscard]] std::string say_clock(double hours);
/// A fixed-point number for a file: no exponent, no "-0".
[[nodiscard]] std::string fixed(double value, int decimals);

} // namespace dialwright::cli
