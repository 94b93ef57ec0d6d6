// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/quantity.hpp"
#include "engine/survey/known.hpp"

#include <string_view>

namespace dialwright::cli {

// Readers of measured quantities: a value, and after "±" (or "+-", "+/-") how far it may be off, 19 times in 20. Where that is
// left out it is `give`.

/// Millimetres from "100 mm ± 0.5 mm".
[[nodiscard]] Read<Known> given_length_mm(std::string_view text, double give_mm);
/// Degrees from "37° ± 1°".
[[nodiscard]] Read<Known> given_angle_deg(std::string_view text, double give_deg);
/// Degrees from north through east, from "S 21° E ± 2°".
[[nodiscard]] Read<Known> given_bearing_deg(std::string_view text, double give_deg);
/// Degrees, east positive, from "1° 30' W ± 0.5°".
[[nodiscard]] Read<Known> given_east_deg(std::string_view text, double give_deg);
/// Degrees, north positive.
[[nodiscard]] Read<Known> given_latitude_deg(std::string_view text, double give_deg);
/// Degrees from upright, back positive, from "0° 30' back ± 0.2°".
[[nodiscard]] Read<Known> given_lean_deg(std::string_view text, double give_deg);

/// Only the ±, with or without its sign: "± 0.3°", "5 s".
[[nodiscard]] Read<double> give_length_mm(std::string_view text);
[[nodiscard]] Read<double> give_angle_deg(std::string_view text);
[[nodiscard]] Read<double> give_seconds(std::string_view text);

} // namespace dialwright::cli
