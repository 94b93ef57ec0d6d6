// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <cstddef>
#include <vector>

namespace dialwright::layout {

/// Length of the line. Lines and arcs exactly, curves to 0.01 %.
[[nodiscard]] double length_of(const Path& path);

/// What a closed path goes round, in mm²; above zero anticlockwise. Lines, arcs and curves exactly.
[[nodiscard]] double area_of(const Path& path);

/// The same line walked from its other end.
[[nodiscard]] Path reversed(const Path& path);

/// Where a contour lies among others.
struct Nest {
    std::size_t depth = 0;     ///< how many closed contours go round it: even for an outline, odd for a hole
    std::size_t outermost = 0; ///< the index of the one that has all the others in it; its own if nothing goes round it
};

/// One for each path. Only closed paths hold others. Contours are taken not to cross each other: one lies in another
/// if its box and the middle of its first piece do.
[[nodiscard]] std::vector<Nest> nests_of(const std::vector<const Path*>& paths);

} // namespace dialwright::layout
