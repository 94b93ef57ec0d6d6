// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <string>

namespace dialwright::layout {

/// The drawing as an SVG file: width and height in mm, a viewBox in the same numbers, flat paths with presentation
/// attributes, one named group a workshop layer. No text, style sheet, transform, use or clip path. Same drawing, same bytes.
/// @param frame  what of the drawing's plane is shown (its box, a margin around it); y is turned over here. Groups in
///               the order of work: guide, fill, score, engrave, drill, cut; within a group as the drawing has them
/// @throws ExportError  the frame is empty, or a number is not finite
/// Accuracy: 0.0001 mm as written.
[[nodiscard]] std::string svg_of(const Drawing& drawing, const Box& frame);

} // namespace dialwright::layout
