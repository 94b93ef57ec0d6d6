// SPDX-License-Identifier: MIT
#pragma once

#include "engine/cast/caster.hpp"
#include "engine/surface/plane.hpp"

#include <vector>

namespace dialwright {

/// An upright box in the plate frame, outside which nothing is drawn.
struct PlateBox {
    double left_mm = 0.0, bottom_mm = 0.0, right_mm = 0.0, top_mm = 0.0;

    [[nodiscard]] bool contains(PlatePoint p) const {
        return p.u_mm >= left_mm && p.u_mm <= right_mm && p.v_mm >= bottom_mm && p.v_mm <= top_mm;
    }
};

using PlatePolyline = std::vector<PlatePoint>;

/// How far a drawn chord may lie from the true curve.
inline constexpr double k_chord_tolerance_mm = 0.004;

/// The shadow of a path: one polyline for each unbroken stretch of the path that is lit, seen, inside the window and
/// cast by one edge. A straight shadow has two points.
/// @param window  plate frame; finite
/// @return plate frame, mm, in the order of the path's parameter; empty where nothing is to be drawn
/// Accuracy: vertices within 1e-6 mm of the shadow, chords within tolerance_mm of the curve, ends within 1e-6 mm of
/// where the light or the window ends. Behind a skyline, light or dark that lasts for less than a quarter of a step of
/// the path (1½ minutes of a date line) may be left out.
template <Surface S>
[[nodiscard]] std::vector<PlatePolyline> trace(const Caster<S>& caster, const SunPath& path, const PlateBox& window,
                                               double tolerance_mm = k_chord_tolerance_mm);

extern template std::vector<PlatePolyline> trace<Plane>(const Caster<Plane>&, const SunPath&, const PlateBox&, double);

} // namespace dialwright
