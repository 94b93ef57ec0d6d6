// SPDX-License-Identifier: MIT
#pragma once

#include "engine/surface/surface.hpp"

namespace dialwright {

/// A flat plate with a nodus above it.
class Plane {
  public:
    static constexpr bool straight_paths = true;

    /// @param nodus_height_mm  above the plate; > 0
    /// @throws std::invalid_argument  nodus_height_mm is not a number > 0
    Plane(const PlateFrame& frame, double nodus_height_mm);

    [[nodiscard]] const PlateFrame& frame() const { return frame_; }
    [[nodiscard]] double nodus_height_mm() const { return nodus_height_mm_; }

    /// Sine of the Sun's height above the plate's own plane.
    [[nodiscard]] double light(const SiteDirection& sun) const { return sun.enu.dot(frame_.n); }

    /// Where the nodus throws its shadow.
    /// @param sun         towards the Sun, unit vector, site frame; no refraction; the site's horizon is not asked
    /// @param shifted_mm  the nodus' foot, plate frame
    /// @return mm in the plate frame; nothing where the plate's face is unlit
    /// Accuracy: 1e-9 of the result while the Sun is 0.01° or more above the plate's plane.
    /// Source: Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 58. Test: tests/published/dial/meeus_58.txt
    [[nodiscard]] std::optional<PlatePoint> shadow_of_nodus(const SiteDirection& sun,
                                                            PlatePoint shifted_mm = {}) const {
        const double height = light(sun);
        if (!(height > 0))
            return std::nullopt;
        const double reach = -nodus_height_mm_ / height;
        return PlatePoint{shifted_mm.u_mm + reach * sun.enu.dot(frame_.u),
                          shifted_mm.v_mm + reach * sun.enu.dot(frame_.v)};
    }

  private:
    PlateFrame frame_;
    double nodus_height_mm_;
};
static_assert(Surface<Plane>);

} // namespace dialwright
