// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/survey/found.hpp"

#include <string>

namespace dialwright::cli {

// Found figures with their ±, as people of the trade read them. Every ± holds 19 times in 20.

/// "37'", "1° 20'": without its sign.
[[nodiscard]] std::string say_arc(double degrees);
/// "± 23'", "± 1° 20'"; never less than 1'.
[[nodiscard]] std::string say_give(double range_deg);
/// "S 23° 25' E ± 23'".
[[nodiscard]] std::string say_facing(const Found& azimuth_deg);
/// "0° 18' back ± 20'".
[[nodiscard]] std::string say_lean(const Found& lean_deg);
/// "4 min 50 s"; "12 s".
[[nodiscard]] std::string say_seconds(double seconds);
/// Degrees with two decimals and their ±: "156.58° ± 0.38°".
[[nodiscard]] std::string say_decimal(const Found& degrees);
/// To the nearest minute of arc.
[[nodiscard]] Angle to_minutes(double degrees);

/// "+1.3", "-0.4": always with its sign.
[[nodiscard]] std::string say_signed(double value, int decimals);
/// The text with its first letter a capital, as a heading or a sentence begins.
[[nodiscard]] std::string with_capital(const std::string& text);

} // namespace dialwright::cli
