// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/site/site.hpp"
#include "engine/time/instant.hpp"

#include <chrono>

namespace dialwright {

/// The Sun's geocentric apparent place at one instant: light-time, aberration, precession and nutation applied;
/// no parallax (at most 8.8″), no refraction.
struct ApparentSun {
    Angle declination;          ///< north positive, true equator of date
    Angle greenwich_hour_angle; ///< west of Greenwich positive, in [0°, 360°)
    Angle equation_of_time;     ///< apparent − mean solar time: positive when a dial is fast of the mean Sun
};

/// The years whose instants are accepted, and a margin for tables that reach over their ends.
inline constexpr int k_first_sun_year = 1800;
inline constexpr int k_last_sun_year = 2199;
inline constexpr std::chrono::days k_sun_margin{10};

/// The Sun at an instant, straight from the theory: about 40 µs. For many instants use Almanac or apparent_suns().
/// @throws std::invalid_argument  the instant lies outside the years 1800 to 2199 and their margin
/// The equation of time is the Sun's hour angle less that of UTC − 12 h. The classical definition (Meeus, ch. 28; NREL)
/// takes the Sun's mean longitude for the mean Sun, at TT; a clock's mean Sun runs on UT1. The two differ by
/// (TT − UT1)/365, 0.19 s today: this E is what a dial and a clock show.
/// Accuracy: 0.02″ by the theory's own statement while leap seconds are known and UT1 = UTC; apparent_sun.cpp says what
/// that assumption costs. Against libnova's ephemeris over 1972–2035: 0.14″ in declination, 0.22″ in hour angle.
/// Source: IAU SOFA, through ERFA. Tests: tests/published/sun, tests/against/libnova.cpp, tests/against/ephem_sun.py
[[nodiscard]] ApparentSun apparent_sun(Instant utc);

/// The Sun in the sky frame of a place at `longitude` (east positive); hour angle in [−180°, 180°).
[[nodiscard]] inline SkyPlace sky_place(const ApparentSun& sun, Angle longitude) {
    return {(sun.greenwich_hour_angle + longitude).signed_turn(), sun.declination};
}

/// The hour angle of the mean Sun at Greenwich: UTC less twelve hours, in [0°, 360°).
[[nodiscard]] Angle mean_greenwich_hour_angle(Instant utc);

} // namespace dialwright
