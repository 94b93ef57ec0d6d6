// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "layout/plate/plate_spec.hpp"

#include <string>

namespace dialwright::layout {

/// The hour as the plate shows it: on 12 (1 to 12, noon and midnight XII) or on 24 (0 to 23, and 24 at the day's end).
/// @param hour  0 to 24
[[nodiscard]] std::string numeral(int hour, Numerals style, int count);

/// "20°": an altitude, or an azimuth from north through east.
[[nodiscard]] std::string degrees_label(Angle angle);

/// "9:15": a time on the dial, for lines between the hours.
[[nodiscard]] std::string time_label(double time_h);

} // namespace dialwright::layout
