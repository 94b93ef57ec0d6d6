// SPDX-License-Identifier: MIT
#include "engine/style/gnomon_edges.hpp"

#include <cmath>

namespace dialwright {
namespace {
constexpr double k_in_plane = 1e-9; // sine
}

GnomonEdges::GnomonEdges(const PlateFrame& frame, const Style& style, Angle latitude, double thickness_mm)
    : latitude_{latitude}, thickness_mm_{thickness_mm}, right_{cos(style.substyle), -sin(style.substyle)},
      to_the_right_{right_.u_mm * frame.u + right_.v_mm * frame.v},
      above_the_top_{to_site({style.substyle_hour_angle, Angle{}}, latitude).enu} {}

Edge GnomonEdges::casting(const SiteDirection& sun) const {
    if (!(thickness_mm_ > 0))
        return Edge::right;
    const bool shadow_to_right = sun.enu.dot(to_the_right_) <= 0;
    // Exactly 6 h away both edges' shadows fall on one line across the substyle: it starts on the side to which it runs.
    const bool above_top = sun.enu.dot(above_the_top_) > -k_in_plane;
    return shadow_to_right == above_top ? Edge::right : Edge::left;
}

Edge GnomonEdges::casting(Angle hour_angle) const {
    return casting(to_site({hour_angle, Angle{}}, latitude_));
}

PlatePoint GnomonEdges::shift(Edge edge) const {
    const double half = edge == Edge::right ? thickness_mm_ / 2 : -thickness_mm_ / 2;
    return {half * right_.u_mm, half * right_.v_mm};
}

bool GnomonEdges::both_cast(Angle hour_angle) const {
    const double side = to_site({hour_angle, Angle{}}, latitude_).enu.dot(to_the_right_);
    return thickness_mm_ > 0 && std::abs(side) < k_in_plane;
}

} // namespace dialwright
