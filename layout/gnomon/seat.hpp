// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"
#include "layout/plate/face.hpp"

#include <optional>

namespace dialwright::layout {

/// Where a gnomon stands on its plate. The seat frame has its origin at `start`, x along the substyle, y to its left.
struct GnomonSeat {
    Point start; ///< of the gnomon's foot: the centre where it is on the field. Work frame, before the page is turned
    Point along; ///< unit, along the substyle towards the nodus' foot
    double foot_mm = 0.0;
    double nodus_along_mm = 0.0, nodus_height_mm = 0.0;
    double behind_mm = 0.0; ///< from the start back along the substyle to the plate's edge
    Angle style_height;
    bool centre_on_plate = false;
};

/// The seat of a style that does not stand square on the plate. A foot of no length lies evenly beneath the nodus, one and
/// a half times as long as that is high.
/// @param centre  where it is on the field
/// @param foot    of the nodus; both in the work frame
[[nodiscard]] GnomonSeat seat_on(const Rings& rings, std::optional<Point> centre, Point foot, const Style& style,
                                 double foot_mm, double nodus_height_mm);
/// The seat of an edge or a rod, at the very place where the face's drawing has it.
/// @return nothing where the style stands square on the plate, or the gnomon has no style
[[nodiscard]] std::optional<GnomonSeat> seat_of(const Face& face, const FaceSpec& spec);

/// Marks of the seat frame in the work frame.
[[nodiscard]] std::vector<Mark> on_plate(const std::vector<Mark>& marks, const GnomonSeat& seat);

/// The joint of a face's edge gnomon: what the design leaves open of it comes from the seat.
[[nodiscard]] Joint joint_on(const GnomonSeat& seat, const Gnomon& gnomon, double plate_thickness_mm);

/// How long a style must be from the centre so that, at every whole hour on the plate, its shadow reaches from the
/// centre to the field's border on every day on which the hour is lit. A shadow is never shorter than the style times the
/// cosine of the obliquity, so this is at most 1.09 times the longest hour line.
/// @param plan  as the face was drawn from
/// @return 0 where the centre is off the plate
[[nodiscard]] double least_style_mm(DialPlan plan, const Face& face, const FaceSpec& spec);

} // namespace dialwright::layout
