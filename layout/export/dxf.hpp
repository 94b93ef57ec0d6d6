// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"
#include "layout/export/layer_table.hpp"

#include <string>

namespace dialwright::layout {

struct DxfOptions {
    LayerTable layers = usual_layers();
    /// Chords for arcs too, for machines that can't follow an arc.
    bool chords_only = false;
    /// How far a chord may lie from its curve or arc; > 0.
    double flatten_mm = 0.01;
    bool with_guides = false;
    /// The point of the drawing that the file calls (0, 0).
    Point origin;
};

/// The drawing as an ASCII DXF of release 12 (AC1009), in millimetres, y up: LINE, ARC, CIRCLE, and POLYLINE of the old
/// style, flagged closed where the path is, its arcs as bulges, so that ends that meet are the same digits. Curves, and so
/// outlines of letters, become chords; filled shapes become closed contours. Every workshop layer stands in the LAYER table.
/// Made ready by `ready_for_machine()`. No text, no block, no width. Same drawing, same bytes.
/// @throws ExportError  nothing for a machine to do, a number that is not finite, `layers` or `flatten_mm` unfit
/// Accuracy: points 0.00005 mm as written, arcs 0.0001 mm at 1 m of radius; chords within `flatten_mm`.
/// Source: the DXF reference for release 12 (from memory); tests read it back with ezdxf.
[[nodiscard]] std::string dxf_of(const Drawing& drawing, const DxfOptions& options = {});

} // namespace dialwright::layout
