// SPDX-License-Identifier: MIT
#pragma once

#include "engine/surface/plate_frame.hpp"

#include <optional>

namespace dialwright {

/// The polar style of a flat plate: the line through the nodus along the Earth's axis. docs/mathematics.md, 4.
struct Style {
    Eigen::Vector3d towards_nodus; ///< unit vector along the style from the plate outward (site frame); where the style
                                   ///< is parallel to the plate, towards the elevated pole
    Angle height;                  ///< between style and plate, 0° to 90°
    Angle substyle;            ///< direction from the centre to the nodus' foot, clockwise from +v, in [0°, 360°);
                               ///< 0° where the style stands square on the plate
    Angle substyle_hour_angle; ///< of the Sun in the style's own plane, on the nodus' side, [−180°, 180°)
    std::optional<PlatePoint> centre; ///< nothing where it lies more than k_centre_at_infinity_mm away
};
inline constexpr double k_centre_at_infinity_mm = 1e7;

[[nodiscard]] Style style_of(const PlateFrame& frame, double nodus_height_mm, Angle latitude);

/// The direction in which an hour's line runs from the centre, on the half on which shadows fall while the plate is
/// lit: clockwise from +v, in [0°, 360°). Finite for every plate: parallel lines where the centre is at infinity.
/// @return nothing where the Sun of this hour angle runs in the plate's own plane all year
[[nodiscard]] std::optional<Angle> hour_line_direction(const PlateFrame& frame, const Style& style, Angle latitude,
                                                       Angle hour_angle);

} // namespace dialwright
