// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"
#include "layout/gnomon/seat.hpp"

namespace dialwright::layout {

/// What shows the nodus on a style's edge. Either is centred on the style's own line, so the nodus is the middle of its mouth.
enum class NodusMark {
    none,
    v_notch,   ///< lets a spot of light through the shadow
    round_seat ///< half round: for light, or to hold a bead or a cross wire of the same diameter
};

/// A gnomon cut from a sheet, its upper edge the style. Frame: x along the substyle from the start of the foot, y above
/// the plate's face. Lengths in millimetres; 0 where the program is to find them.
struct EdgeGnomonPlan {
    Angle style_height;
    double nodus_height_mm = 0.0;
    double nodus_along_mm =
        0.0; ///< of the nodus' foot. The style meets the face at the start of the foot, or passes above it
             ///< where the centre is off the plate
    double foot_mm = 0.0;
    double thickness_mm = 0.0, plate_thickness_mm = 0.0;
    double style_end_mm = 0.0; ///< of the style's straight edge, along the substyle; it may overhang the foot
    double least_style_mm =
        0.0; ///< the style's least length from where it meets the face or passes over the foot's start
    NodusMark nodus = NodusMark::v_notch;
    double notch_width_mm = 0.0; ///< along the style; of a round seat the diameter
    double notch_depth_mm = 0.0; ///< of a V
    double rounding_mm = 3.0;    ///< radius of the tip, and of the upper front corner; 0: sharp
    JointOptions joint;
    bool inches = false; ///< particulars say inches too
};

struct EdgeGnomon {
    Part part; ///< drawings: "gnomon"; with a flange also "gnomon flange"
    Joint joint;
    Point nodus, style_start, style_end; ///< of the straight edge: its lower and upper end
};

/// @throws GnomonError  with a message for the maker: a style height outside 0° to 89°, a nodus that is not on
///                                the gnomon, a notch deeper than half of it, a foot's joint that does not fit, …
[[nodiscard]] EdgeGnomon edge_gnomon(const EdgeGnomonPlan& plan);

/// The plan of a face's own gnomon, long enough for its shadow to reach the border at every hour.
/// @return nothing where the face has no edge gnomon
[[nodiscard]] std::optional<EdgeGnomonPlan> edge_gnomon_plan(const DialPlan& plan, const Face& face,
                                                             const FaceSpec& spec);

} // namespace dialwright::layout
