// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"

#include <Eigen/Core>

namespace dialwright {

/// Where the dial stands: geodetic, north and east positive.
struct Site {
    Angle latitude;
    Angle longitude;
};

/// A place in the sky frame: hour angle west of the site's meridian, declination north of the equator.
struct SkyPlace {
    Angle hour_angle;
    Angle declination;
};

/// A unit vector in the site frame: (east, north, up), right-handed.
struct SiteDirection {
    Eigen::Vector3d enu = Eigen::Vector3d::UnitZ();

    [[nodiscard]] Angle altitude() const { return arc_tangent(enu.z(), std::hypot(enu.x(), enu.y())); }
    /// From north through east, in [0°, 360°); 0° at the zenith.
    [[nodiscard]] Angle azimuth() const { return arc_tangent(enu.x(), enu.y()).positive_turn(); }
};

/// The direction at an azimuth (from north through east) and an altitude.
[[nodiscard]] inline SiteDirection direction_at(Angle azimuth, Angle altitude) {
    return {{cos(altitude) * sin(azimuth), cos(altitude) * cos(azimuth), sin(altitude)}};
}

/// A latitude's sine and cosine, for many places of the sky at one site.
struct LatitudeSines {
    double sine, cosine;
    explicit LatitudeSines(Angle latitude) : sine{sin(latitude)}, cosine{cos(latitude)} {}
};

/// From the sky frame to the site frame. No refraction, no parallax.
/// Source: docs/conventions.md, 2 (spherical triangle pole–zenith–Sun).
[[nodiscard]] inline SiteDirection to_site(const SkyPlace& sky, const LatitudeSines& latitude) {
    const double sd = sin(sky.declination), cd = cos(sky.declination);
    const double sh = sin(sky.hour_angle), ch = cos(sky.hour_angle);
    const double sp = latitude.sine, cp = latitude.cosine;
    return {{-cd * sh, cp * sd - sp * cd * ch, sp * sd + cp * cd * ch}};
}
[[nodiscard]] inline SiteDirection to_site(const SkyPlace& sky, Angle latitude) {
    return to_site(sky, LatitudeSines{latitude});
}

/// From the site frame to the sky frame; hour angle in [−180°, 180°).
[[nodiscard]] inline SkyPlace to_sky(const SiteDirection& direction, Angle latitude) {
    const double sp = sin(latitude), cp = cos(latitude);
    const double east = direction.enu.x(), north = direction.enu.y(), up = direction.enu.z();
    const double along_pole = cp * north + sp * up;
    const double to_equator = cp * up - sp * north;
    return {arc_tangent(-east, to_equator).signed_turn(), arc_tangent(along_pole, std::hypot(east, to_equator))};
}

/// The north celestial pole as seen from the site: (0, cos φ, sin φ).
[[nodiscard]] inline SiteDirection north_pole(Angle latitude) {
    return {{0.0, cos(latitude), sin(latitude)}};
}

} // namespace dialwright
