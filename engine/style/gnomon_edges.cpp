// SPDX-License-Identifier: MIT
#include "engine/style/gnomon_edges.hpp"

#include <cmath>

namespace dialwright {

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
    const Angle from_substyle = hour_angle - substyle_hour_angle_;
    const bool positive = sin(from_substyle * 2.0) * hour_sense_ >= 0;
    return positive ? Edge::right : Edge::left;
}

PlatePoint GnomonEdges::shift(Edge edge) const {
    const double half = edge == Edge::right ? thickness_mm_ / 2 : -thickness_mm_ / 2;
    return {half * right_.u_mm, half * right_.v_mm};
}

bool GnomonEdges::both_cast(Angle hour_angle) const {
    constexpr double k_in_plane = 1e-9;
    return thickness_mm_ > 0 && std::abs(sin(hour_angle - substyle_hour_angle_)) < k_in_plane;
}

} // namespace dialwright
