// SPDX-License-Identifier: MIT
#pragma once

#include "engine/style/style.hpp"

namespace dialwright {

/// Which edge of a gnomon of real thickness throws the shadow's bounding line: `left` and `right` as a reader who looks
/// along the substyle from the centre sees them.
enum class Edge { left, right };

/// The two casting edges of a gnomon: a plate of metal that stands on the substyle, its top as wide as it is thick.
///
/// The Sun's side of the gnomon's plane alone does not decide. Where the Sun shines on the narrow top (less than 6 h
/// from the substyle's hour), the shadow ends at the edge away from the Sun; where it shines from below the top
/// (more than 6 h away: a level dial before 6 in the morning), light passes under it and the shadow ends at the
/// edge nearer to the Sun. docs/mathematics.md, 5. Source: derived there; the handbook rule that a level dial's hours before VI
/// and after VI are drawn through from the other centre says the same (Waugh 1973, from memory).
class GnomonEdges {
  public:
    /// @param thickness_mm  ≥ 0
    GnomonEdges(const PlateFrame& frame, const Style& style, Angle latitude, double thickness_mm);

    [[nodiscard]] double thickness_mm() const { return thickness_mm_; }
    /// The edge that bounds the shadow; right throughout where the gnomon has no thickness and the edges are one.
    [[nodiscard]] Edge casting(const SiteDirection& sun) const;
    /// The same for an hour: the Sun's declination does not matter.
    [[nodiscard]] Edge casting(Angle hour_angle) const;
    /// How far the casting edge stands from the middle of the gnomon, plate frame.
    [[nodiscard]] PlatePoint shift(Edge edge) const;
    /// True where the Sun stands in the gnomon's own plane, so that both edges cast (the two sides of the noon gap).
    [[nodiscard]] bool both_cast(Angle hour_angle) const;

  private:
    Angle latitude_;
    double thickness_mm_;
    PlatePoint right_;             ///< unit, plate frame
    Eigen::Vector3d to_the_right_; ///< the same, site frame
    Eigen::Vector3d
        above_the_top_; ///< towards the Sun of the substyle's hour at the equinox: square to the gnomon's top
};

} // namespace dialwright
