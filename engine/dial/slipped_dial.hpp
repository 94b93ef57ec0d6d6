// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"

#include <optional>

namespace dialwright {

/// How a dial that stands differs from its plan. Turns are rotation vectors in the site frame, radians: along the axis,
/// as long as the angle, right-handed.
struct Slip {
    Eigen::Vector3d turned = Eigen::Vector3d::Zero();       ///< the whole dial as one piece
    Eigen::Vector3d style_turned = Eigen::Vector3d::Zero(); ///< style and nodus alone, before the dial is turned
    Eigen::Vector3d pivot_mm = Eigen::Vector3d::Zero();     ///< about which they turn: plate frame (u, v, above)
    double stretch_u = 1.0, stretch_v = 1.0;                ///< of the lines on the plate, from `stretch_from`
    PlatePoint stretch_from{};
    PlatePoint moved_mm{}; ///< the lines on the plate, as a whole
};

/// A rotation vector's parts that are asked for most.
[[nodiscard]] inline Eigen::Vector3d turn_about(const Eigen::Vector3d& axis, Angle angle) {
    return angle.in_radians() * axis;
}
/// About the plumb line, clockwise as seen from above: a wall's facing grows by it.
[[nodiscard]] inline Eigen::Vector3d turn_about_plumb(Angle clockwise) {
    return turn_about(Eigen::Vector3d::UnitZ(), -clockwise);
}

/// What a dial shows that is not quite as its plan has it: the true Sun throws the shadow of the style or nodus as they
/// stand, and the shadow is read by the lines as they were cut.
class SlippedDial {
  public:
    /// @param by_nodus  read by the shadow of the nodus alone, as pins, discs and curves are; else by that of the whole style
    SlippedDial(const DialPlan& plan, const MeanYear& year, HourTime time, bool by_nodus);

    [[nodiscard]] const Caster<Plane>& caster() const { return caster_; }
    [[nodiscard]] const Style& style() const { return style_; }
    [[nodiscard]] bool by_nodus() const { return by_nodus_; }
    /// Nodus of the edge that casts, plate frame (u, v, above).
    [[nodiscard]] Eigen::Vector3d nodus_mm(const SiteDirection& sun) const;

    /// The dial's own time by the lines as cut, on its scale; for hours that wrap in [0, 24).
    /// @param day  of the mean year, as reading_of() takes it
    /// @param at   where on the plate it is read, plate frame: of a style's shadow the point nearest to here; not used
    ///             by a nodus
    /// @return nothing where the plate is unlit, or hours have no reading that day
    /// Without a slip it is what reading_of() says. Tests: tests/engine/dial/slipped_dial_test.cpp
    [[nodiscard]] std::optional<double> reads(const SkyPlace& sun, double day, const Slip& slip, PlatePoint at) const;

    /// The line of the plan on which a point of the plate lies.
    [[nodiscard]] std::optional<double> reading_at(PlatePoint point, const Eigen::Vector3d& nodus_mm, double day) const;

    /// By how many minutes a slip puts the reading off: positive where it makes the dial fast.
    [[nodiscard]] std::optional<double> error_min(const SkyPlace& sun, double day, const Slip& slip,
                                                  PlatePoint at) const;
    /// From one reading to another, minutes; round the dial where its hours wrap.
    [[nodiscard]] double minutes_between(double from_h, double to_h) const;

  private:
    [[nodiscard]] Eigen::Vector3d to_plate(const Eigen::Vector3d& site) const;

    const DialPlan& plan_;
    const MeanYear& year_;
    HourTime time_;
    bool by_nodus_;
    Caster<Plane> caster_;
    Style style_;
};

} // namespace dialwright
