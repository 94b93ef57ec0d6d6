// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <cstddef>
#include <string>
#include <vector>

namespace dialwright::layout {

/// A drawing whose cut-through outlines allow for the width that the cut takes away.
struct Kerfed {
    Drawing drawing;
    std::size_t moved = 0;      ///< outlines that were moved, slots that are open at the part's edge among them
    std::size_t left_alone = 0; ///< other open lines of the layer `cut`, which have no side to move to
    std::string said;           ///< for the report: what was done, and that the number is the whole width of the cut
};

/// Moves the closed paths of the layer `cut` by half the kerf, outlines outward and holes inward, so that the part comes
/// out as drawn. An outline in a hole is again an outline. A slot that is
/// open at the part's edge, an open path that comes from outside all outlines and leaves again, moves as a hole does. Other layers stay as they are.
/// Lines stay lines and arcs arcs. A corner that the path goes round outside stays a corner up to a right angle and gets
/// an arc where it is sharper. Where pieces vanish or paths cross, and for curves, the path becomes chords.
/// @param kerf_mm  whole width of the cut, measured on the machine and its stock; 0 for none, never below
/// @throws ExportError  the kerf is wider than a part, does not pass a gap in its outline, or closes a hole; it names the part
/// @throws std::invalid_argument  kerf_mm is below zero or no number
/// Accuracy: lines and arcs 1e-9 mm; where it becomes chords 0.004 mm.
[[nodiscard]] Kerfed with_kerf(const Drawing& drawing, double kerf_mm);

} // namespace dialwright::layout
