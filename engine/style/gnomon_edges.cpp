// SPDX-License-Identifier: MIT
#include "engine/style/gnomon_edges.hpp"

#include <Eigen/Geometry>

#include <cmath>

namespace dialwright {
namespace {
constexpr double k_in_plane = 1e-9; // sine
}

GnomonEdges::GnomonEdges(const PlateFrame& frame, const Style& style, Angle latitude, double thickness_mm)
    : thickness_mm_{thickness_mm}, right_{cos(style.substyle), -sin(style.substyle)},
      substyle_hour_angle_{style.substyle_hour_angle}, hour_sense_{1.0} {
    // The Sun moves along s × north as its hour angle grows, and at the substyle's hour s is n without its part along
    // the axis. The shadow moves the other way.
    const Eigen::Vector3d right = right_.u_mm * frame.u + right_.v_mm * frame.v;
    const Eigen::Vector3d sun_moves = frame.n.cross(north_pole(latitude).enu);
    hour_sense_ = sun_moves.dot(right) <= 0 ? 1.0 : -1.0;
}

Edge GnomonEdges::casting(Angle hour_angle) const {
    if (!(thickness_mm_ > 0))
        return Edge::right;
    const Angle from_substyle = hour_angle - substyle_hour_angle_;
    const bool shadow_to_right = sin(from_substyle) * hour_sense_ >= 0;
    // Exactly 6 h away both edges' shadows fall on one line across the substyle: it starts on the side to which it runs.
    const bool above_top = cos(from_substyle) > -k_in_plane;
    return shadow_to_right == above_top ? Edge::right : Edge::left;
}

PlatePoint GnomonEdges::shift(Edge edge) const {
    const double half = edge == Edge::right ? thickness_mm_ / 2 : -thickness_mm_ / 2;
    return {half * right_.u_mm, half * right_.v_mm};
}

bool GnomonEdges::both_cast(Angle hour_angle) const {
    return thickness_mm_ > 0 && std::abs(sin(hour_angle - substyle_hour_angle_)) < k_in_plane;
}

} // namespace dialwright
