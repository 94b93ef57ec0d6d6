// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/site/site.hpp"
#include "engine/time/instant.hpp"

namespace dialwright {

/// The Sun's geocentric apparent place at one instant: light-time, aberration, precession and nutation applied;
/// no parallax (at most 8.8″), no refraction.
struct ApparentSun {
    Angle declination;          ///< north positive, true equator of date
    Angle greenwich_hour_angle; ///< west of Greenwich positive, in [0°, 360°)
    Angle equation_of_time;     ///< apparent − mean solar time: positive when a dial is fast of the mean Sun
};

/// The years whose instants are accepted: 1800 up to the end of 2199. The theory is stated for 1900 to 2100.
inline constexpr int k_first_sun_year = 1800;
inline constexpr int k_last_sun_year = 2199;

/// @throws std::invalid_argument  the instant lies outside the years 1800 to 2199
[[nodiscard]] ApparentSun apparent_sun(Instant utc);

/// The Sun in the sky frame of a place at `longitude` (east positive); hour angle in [−180°, 180°).
[[nodiscard]] inline SkyPlace sky_place(const ApparentSun& sun, Angle longitude) {
    return {(sun.greenwich_hour_angle + longitude).signed_turn(), sun.declination};
}

/// The hour angle of the mean Sun at Greenwich: UTC less twelve hours, in [0°, 360°).
[[nodiscard]] Angle mean_greenwich_hour_angle(Instant utc);

} // namespace dialwright
