// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/site.hpp"

#include <Eigen/Core>

namespace dialwright {

/// Which way a plate looks: azimuth of its outward normal (from north through east) and that normal's altitude
/// (0° upright, 90° level and face up; positive leans back, negative overhangs).
struct Attitude {
    Angle normal_azimuth;
    Angle normal_altitude = Angle::degrees(90);
};

/// A point of the work, millimetres in the plate frame, from the foot of the nodus.
struct PlatePoint {
    double u_mm = 0.0;
    double v_mm = 0.0;
    friend constexpr bool operator==(const PlatePoint&, const PlatePoint&) = default;
};

/// The plate frame's unit vectors in the site frame: n outward, v up the steepest slope (true north where the plate is
/// level), u = v × n to the right of a reader who faces the plate. docs/conventions.md, 1.
struct PlateFrame {
    Eigen::Vector3d u, v, n;
};

/// Within this of level, a plate counts as level and its v is true north.
inline constexpr Angle k_level_tolerance = Angle::arcseconds(0.01);

[[nodiscard]] inline PlateFrame frame_of(const Attitude& attitude) {
    const bool level = abs(attitude.normal_altitude) > Angle::degrees(90) - k_level_tolerance;
    const bool face_up = attitude.normal_altitude > Angle{};
    if (level) {
        const double up = face_up ? 1.0 : -1.0;
        return {{up, 0, 0}, {0, 1, 0}, {0, 0, up}};
    }
    const double sa = sin(attitude.normal_azimuth), ca = cos(attitude.normal_azimuth);
    const double st = sin(attitude.normal_altitude), ct = cos(attitude.normal_altitude);
    return {{-ca, sa, 0}, {-st * sa, -st * ca, ct}, {ct * sa, ct * ca, st}};
}

/// A plate in the plane of the equator whose face is lit while the Sun stands on the elevated pole's side (`summer`),
/// or on the other.
[[nodiscard]] inline Attitude equatorial_attitude(Angle latitude, bool summer_face) {
    const bool north = latitude >= Angle{};
    const Angle altitude = abs(latitude);
    const Angle elevated_pole_azimuth = Angle::degrees(north ? 0 : 180);
    if (summer_face)
        return {elevated_pole_azimuth, altitude};
    return {(elevated_pole_azimuth + Angle::degrees(180)).positive_turn(), -altitude};
}

} // namespace dialwright
