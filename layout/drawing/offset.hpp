// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <cstddef>
#include <optional>
#include <vector>

namespace dialwright::layout {

/// The closed path moved outward by a distance (inward if below zero), piece by piece: lines stay lines, arcs arcs.
/// Nothing where that does not answer: a curve in the path, a piece that vanishes, two that no longer meet or
/// that cross.
/// @param path  closed; either way round
[[nodiscard]] std::optional<Path> offset_by_pieces(const Path& path, double by_mm);

/// The same for any closed path, as polygons: none, one, or several where it falls apart or closes on itself; holes run
/// clockwise. Corners are rounded. Accuracy: 0.004 mm.
[[nodiscard]] std::vector<Path> offset_by_chords(const Path& path, double by_mm);

/// How a disc fits into filled shapes: what a round tool of its size clears of them, and which of their eyes it spares.
struct DiscFit {
    double area_mm2 = 0.0; ///< of the shapes
    double missed_mm2 =
        0.0;     ///< farther than 0.45 of the radius from all places that a disc within the shapes covers: a
                 ///< hairline is missed, the corner of a right angle (0.41 of the radius) is not
    Point worst; ///< the middle of the box of the largest part missed
    std::size_t eyes = 0, lost_eyes = 0; ///< holes, and those that hold no disc
};

/// @param shapes  closed; non-zero winding over them all, holes run the other way
/// @param radius_mm  > 0
/// Accuracy: 1/15 of the radius.
[[nodiscard]] DiscFit fit_of_disc(const std::vector<Path>& shapes, double radius_mm);

} // namespace dialwright::layout
