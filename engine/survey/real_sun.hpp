// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/refraction.hpp"
#include "engine/sun/apparent_sun.hpp"

#include <span>
#include <vector>

namespace dialwright {

/// The Sun that throws a real shadow near one instant, for clocks that may be some minutes off.
struct RealSun {
    Instant at;
    SkyPlace place;          ///< at that instant, without air
    double hour_rate = 0.0;  ///< radians of hour angle in a second
    double drift_rate = 0.0; ///< radians of declination in a second

    [[nodiscard]] SkyPlace later(double seconds) const {
        return {place.hour_angle + Angle::radians(hour_rate * seconds),
                place.declination + Angle::radians(drift_rate * seconds)};
    }
    /// Towards the Sun as the air shows it.
    [[nodiscard]] SiteDirection seen(const LatitudeSines& latitude, double seconds_later = 0.0) const {
        return lifted_by_air(to_site(later(seconds_later), latitude));
    }
};

/// The Suns of readings at a site, in their order.
/// @throws std::invalid_argument  an instant lies outside the years of apparent_sun()
[[nodiscard]] std::vector<RealSun> real_suns(const Site& site, std::span<const Instant> instants);

} // namespace dialwright
