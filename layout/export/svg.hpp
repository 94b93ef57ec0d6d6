// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"
#include "layout/export/layer_table.hpp"

#include <optional>
#include <string>

namespace dialwright::layout {

struct SvgOptions {
    LayerTable layers = usual_layers();
    /// One width for all strokes; > 0. Some machines' programs cut only what is as thin as a hair. Nothing: each its own.
    std::optional<double> hairline_mm;
    bool with_guides = false;
};

/// The drawing as an SVG file: width and height in mm, a viewBox in the same numbers, flat paths with presentation
/// attributes, one named group a workshop layer, made ready by `ready_for_machine()`. No text, style sheet, transform, use
/// or clip path. Same drawing, same bytes.
/// @param frame  what of the drawing's plane is shown (its box, a margin around it); y is turned over here
/// @throws ExportError  the frame is empty, a number is not finite, or an option is unfit
/// Accuracy: 0.0001 mm as written.
[[nodiscard]] std::string svg_of(const Drawing& drawing, const Box& frame, const SvgOptions& options = {});

} // namespace dialwright::layout
