// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <optional>
#include <utility>

namespace dialwright::layout {

/// The part of a straight line inside a box (its sides included), in the line's own direction; nothing if it misses.
/// Source: Liang and Barsky, ACM Transactions on Graphics 3 (1984) 1–22 (from memory).
[[nodiscard]] std::optional<std::pair<Point, Point>> line_inside(Point from, Point to, const Box& box);

/// The parts of a line that are inside a box, in order, each an open path unless the whole path is inside. Lines and
/// arcs stay what they are; a curve that crosses a side becomes chords.
/// Accuracy: 0.0005 mm.
[[nodiscard]] std::vector<Path> line_inside(const Path& path, const Box& box);

/// What is inside the box of the shape that the points go round (the last joins the first), as one ring with the same
/// windings; runs along the box's sides where the shape leaves it. Empty if nothing is inside.
/// Source: Sutherland and Hodgman, Communications of the ACM 17 (1974) 32–42 (from memory).
[[nodiscard]] std::vector<Point> ring_inside(const std::vector<Point>& ring, const Box& box);

/// How many times the ring goes round the point, anticlockwise positive.
[[nodiscard]] int winding_round(const std::vector<Point>& ring, Point p);

} // namespace dialwright::layout
