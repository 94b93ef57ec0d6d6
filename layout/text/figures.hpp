// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"

#include <string>

namespace dialwright::layout {

/// Numbers as people of the trade read them.

/// A fixed-point number for a file: no exponent, no "-0".
[[nodiscard]] std::string fixed(double value, int decimals);
/// Adds a fixed-point number without idle zeros, but for `least` decimals, and without "-0": many of them at little cost.
/// @param decimals  0 to 10
/// @return false, and nothing is added, where its digits are more than a double has, or it is not finite
[[nodiscard]] bool append_fixed(std::string& text, double value, int decimals, int least);
/// "12° 27.3'"; with the sign before it where it is negative.
[[nodiscard]] std::string degrees_minutes(Angle angle);
/// The length to the nearest 1/64 inch, as a rule shows it: "1 53/64", "-3/8", "0".
[[nodiscard]] std::string sixty_fourths(double mm);
/// For a table of one unit: "46.3", or "1 53/64".
[[nodiscard]] std::string bare_length(double mm, bool inches);
/// "46.3 mm", or "46.3 mm (1 53/64 in)".
[[nodiscard]] std::string say_length(double mm, bool inches);

} // namespace dialwright::layout
