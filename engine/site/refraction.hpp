// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/site.hpp"

namespace dialwright {

/// How much the air lifts the Sun, by its altitude without air: 34′ on the level horizon, 1′ at 45°, none overhead. For
/// readings of real shadows; lines are drawn without it (docs/mathematics.md, 6). 1010 mbar and 10 °C; the day's own air differs
/// by a tenth, more near the horizon.
/// Accuracy: 0.2′ against tables of the standard air. Below −1° the value at −1°.
/// Source: Sæmundsson 1986, in Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 16 (from memory).
/// Test: tests/engine/site/refraction_test.cpp
[[nodiscard]] inline Angle refraction(Angle true_altitude) {
    const double h = std::fmax(-1.0, true_altitude.in_degrees());
    const double minutes = 1.02 / tan(Angle::degrees(h + 10.3 / (h + 5.11)));
    return Angle::degrees(std::fmax(0.0, minutes) / 60.0);
}

/// Where a real Sun is seen that stands in a direction without air.
[[nodiscard]] inline SiteDirection lifted_by_air(const SiteDirection& sun) {
    const Angle altitude = sun.altitude();
    return direction_at(sun.azimuth(), altitude + refraction(altitude));
}

} // namespace dialwright
