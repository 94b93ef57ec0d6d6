// SPDX-License-Identifier: MIT
#pragma once

#include <string>
#include <string_view>

namespace dialwright::layout {

/// Adds a number as files for machines want it: fixed point, idle zeros left off (at least `least` decimals stay), no
/// exponent, no "-0", whatever the locale.
/// @param decimals  0 to 10
/// @throws ExportError  not finite, or beyond ±10 km
void add_number(std::string& text, double value, int decimals, int least = 0);

/// Letters a to z in capitals, all others as they are.
[[nodiscard]] std::string in_capitals(std::string_view text);

} // namespace dialwright::layout
