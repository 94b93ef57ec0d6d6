// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <array>
#include <cstddef>

namespace dialwright::layout {

/// The order that a machine works in: what only marks the surface before what cuts the work loose. Guides, where they
/// are asked for, come before all of it.
inline constexpr std::array k_machine_order = {Layer::guide, Layer::engrave, Layer::fill,
                                               Layer::score, Layer::drill,   Layer::cut};

/// The box round what a machine works: all but the guides.
[[nodiscard]] Box bounds_for_machine(const Drawing& drawing);

/// A drawing made ready for a machine.
struct MachineWork {
    Drawing drawing;
    std::size_t dropped = 0; ///< pieces or parts of pieces that would have been worked twice
};

/// Marks in `k_machine_order`, as they stood within a layer. In `cut`, each closed contour stands alone in its mark, what
/// lies inside it before it, and one outline with all its holes before the next.
/// What would be worked twice on one layer goes: lines and arcs where they run along others, curves and contours of
/// filled shapes where all of them are equal. The wider stroke stays, else the earlier. A closed path that loses a part
/// is left open, with the end points of what it gives way to.
/// @param with_guides  guides are for the eye and are left out of files for machines by default
/// @throws ExportError  a number of the drawing is not finite
/// Accuracy: lines are one line within 0.0001 mm.
[[nodiscard]] MachineWork ready_for_machine(const Drawing& drawing, bool with_guides = false);

} // namespace dialwright::layout
