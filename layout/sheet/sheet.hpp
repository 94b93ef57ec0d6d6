// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <memory>
#include <string>
#include <vector>

namespace dialwright::layout {

enum class Align { left, middle, right };

/// Live text on a sheet of paper (never on the work). `at` is on the base line.
struct Note {
    Point at;
    std::string text;
    double size_mm = 3.0; ///< height of the em
    Align align = Align::left;
    bool bold = false;
    Angle turn; ///< anticlockwise about `at`
};

/// A part of the work seen on a sheet: the drawing, placed, and clipped to `opening` (page millimetres).
struct Window {
    std::shared_ptr<const Drawing> drawing;
    Placing placing;
    Box opening;
};

/// One sheet of paper, origin at its lower left corner.
struct Sheet {
    double width_mm = 210.0, height_mm = 297.0;
    std::string paper; ///< "A4", "own size 420 × 420 mm"
    std::string title; ///< the page's label and bookmark
    std::string label; ///< of a tile: "B3"
    /// What is drawn comes to paper this much larger, about the page's middle, so that a printer that is off brings it out
    /// true: 1 / (measured / printed). Everything else here is in true millimetres.
    double stretch_x = 1.0, stretch_y = 1.0;
    Box printable;               ///< nothing may be drawn outside it
    std::vector<Window> windows; ///< the work
    std::vector<Mark> furniture; ///< bars, crosses, frames, pictures, tables' rules: page millimetres
    std::vector<Note> notes;
};

/// All sheets of one PDF.
struct SheetBook {
    std::string title;
    std::string subject;
    std::vector<Sheet> sheets;
    bool layers = false; ///< each workshop layer can be shown and printed by itself in the viewer
};

} // namespace dialwright::layout
