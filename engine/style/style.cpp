// SPDX-License-Identifier: MIT
//
// Notation: p' the style's direction with p'·n ≥ 0, q the Sun on the equator at hour angle H, a = p'·n, b = q·n.
// A Sun at declination δ stands at s = cos δ q ± sin δ p'. Its shadow of the nodus lies, from the centre, at
//     h (p'/a − s/(s·n)) = h cos δ (b p' − a q) / (a (s·n)),
// so that all shadows of the hour fall on the half-line along D = b p' − a q, on the side where the plate is lit
// (s·n > 0). D never divides by a, and becomes the style's own direction where a = 0.
#include "engine/style/style.hpp"

namespace dialwright {

Style style_of(const PlateFrame& frame, double nodus_height_mm, Angle latitude) {
    constexpr double k_square = 1e-12; // sine: nearer to square than this the substyle has no direction
    const Eigen::Vector3d north = north_pole(latitude).enu;
    const double north_sine = north.dot(frame.n);
    constexpr double k_parallel = 1e-12;
    const bool north_side = std::abs(north_sine) > k_parallel ? north_sine > 0 : latitude >= Angle{};

    Style style;
    style.towards_nodus = north_side ? north : Eigen::Vector3d(-north);
    const double along_u = style.towards_nodus.dot(frame.u), along_v = style.towards_nodus.dot(frame.v);
    const double flat = std::hypot(along_u, along_v);
    const double sine = std::abs(north_sine);
    style.height = arc_tangent(sine, flat);
    style.substyle = flat > k_square ? arc_tangent(along_u, along_v).positive_turn() : Angle{};

    // The Sun in the style's plane on the nodus' side: the plate's normal without its part along the axis.
    Eigen::Vector3d facing = frame.n - frame.n.dot(north) * north;
    if (flat > k_square)
        style.substyle_hour_angle = to_sky({facing.normalized()}, latitude).hour_angle;

    const double reach = nodus_height_mm / (sine > 0 ? sine : 1e-300);
    if (reach * flat < k_centre_at_infinity_mm)
        style.centre = PlatePoint{0.0 - reach * along_u, 0.0 - reach * along_v};
    return style;
}

std::optional<Angle> hour_line_direction(const PlateFrame& frame, const Style& style, Angle latitude,
                                         Angle hour_angle) {
    const Eigen::Vector3d q = to_site({hour_angle, Angle{}}, latitude).enu;
    const double a = style.towards_nodus.dot(frame.n), b = q.dot(frame.n);
    constexpr double k_in_plane = 1e-12;
    if (std::hypot(a, b) < k_in_plane)
        return std::nullopt;
    const Eigen::Vector3d along = b * style.towards_nodus - a * q;
    return arc_tangent(along.dot(frame.u), along.dot(frame.v)).positive_turn();
}

} // namespace dialwright
