// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

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

} // namespace dialwright::layout
