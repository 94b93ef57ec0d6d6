// SPDX-License-Identifier: MIT
#include "layout/lettering/plate_lettering.hpp"

#include "layout/lettering/font_files.hpp"

namespace dialwright::layout {
namespace {

constexpr double k_slant = 0.2126; // tan 12°, as italics commonly lean (common practice, no source)

Point slanted(Point p) {
    return {p.x_mm + k_slant * p.y_mm, p.y_mm};
}

Path slanted(const Path& path) {
    Path made{slanted(path.start), {}, path.closed};
    Point from = path.start;
    for (const Piece& piece : path.pieces) {
        if (const auto* line = std::get_if<LineTo>(&piece))
            made.pieces.push_back(LineTo{slanted(line->to)});
        else if (const auto* curve = std::get_if<CurveTo>(&piece))
            made.pieces.push_back(CurveTo{slanted(curve->control_1), slanted(curve->control_2), slanted(curve->to)});
        else
            for (const CurveTo& part : curves_of(from, std::get<ArcTo>(piece)))
                made.pieces.push_back(CurveTo{slanted(part.control_1), slanted(part.control_2), slanted(part.to)});
        from = end_of(piece);
    }
    return made;
}

LetteredLine slanted(LetteredLine line) {
    line.ink = {};
    for (Glyph& glyph : line.glyphs)
        for (Path& path : glyph.outlines) {
            path = slanted(path);
            Box box = bounds_of(path);
            box.left_mm += glyph.pen_x_mm;
            box.right_mm += glyph.pen_x_mm;
            line.ink.add(box);
        }
    return line;
}

} // namespace

PlateLettering::PlateLettering(std::string_view family, bool single_strokes, bool italic) {
    if (single_strokes)
        strokes_.emplace();
    else
        outlines_.emplace(family, italic);
    slanted_ = italic && (single_strokes || font_file(family, true) == font_file(family, false));
}

LetteredLine PlateLettering::line(std::string_view text, double size_mm, double tracking_mm) const {
    LetteredLine made =
        strokes_ ? strokes_->line(text, size_mm, tracking_mm) : outlines_->line(text, size_mm, tracking_mm);
    return slanted_ ? slanted(std::move(made)) : made;
}

} // namespace dialwright::layout
