// SPDX-License-Identifier: MIT
#pragma once

#include "engine/sun/solar_day.hpp"

#include <chrono>
#include <optional>

namespace dialwright {

/// Two instants of a day, before and after noon, at which the Sun stands equally high: a peg's shadow is equally long, and
/// the middle between its two directions is the meridian but for what the Sun's declination has changed.
struct EqualAltitudes {
    Instant before, after;
    Angle altitude;                      ///< no refraction, which is the same for both
    Angle before_azimuth, after_azimuth; ///< of the Sun
    Angle middle_off; ///< from the meridian to the middle between the two shadows, clockwise as seen from above
};

/// @param noon         an upper transit, as solar_day() gives it
/// @param before_noon  > 0, under eight hours
/// @return nothing where the Sun is down then, stands within a degree of overhead, or does not come down to the altitude
///         again within twelve hours
/// Accuracy: 0.01 s. Test: tests/against/ephem_fixing.py
[[nodiscard]] std::optional<EqualAltitudes> equal_altitudes(const Site& site, Instant noon,
                                                            std::chrono::minutes before_noon, const Almanac& almanac);

} // namespace dialwright
