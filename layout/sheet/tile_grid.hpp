// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// A drawing as chords, for asking quickly where it has marks.
class FlatDrawing {
  public:
    explicit FlatDrawing(const Drawing& drawing);

    struct Part {
        Box box;             ///< with the stroke's width
        double reach_mm = 0; ///< half the stroke's width, and the flattening's tolerance
        bool filled = false;
        std::vector<std::vector<Point>> lines;
    };
    [[nodiscard]] const std::vector<Part>& parts() const { return parts_; }
    [[nodiscard]] const Box& box() const { return box_; }

  private:
    std::vector<Part> parts_;
    Box box_;
};

/// Equal boxes in rows (from the top) and columns (from the left) over a plane, each next one a step away.
struct TileGrid {
    int rows = 1, columns = 1;
    double left_mm = 0, top_mm = 0;      ///< of the first box
    double width_mm = 0, height_mm = 0;  ///< of a box
    double step_x_mm = 0, step_y_mm = 0; ///< > 0; less than the box by the overlap

    [[nodiscard]] Box box(int row, int column) const;
    [[nodiscard]] Box whole() const;
    /// Where the middle lines of the overlaps run; index 0 and the last are as far inside the grid's outer sides.
    [[nodiscard]] double seam_x(int index) const; ///< 0 to columns, from the left
    [[nodiscard]] double seam_y(int index) const; ///< 0 to rows, from the top
    [[nodiscard]] std::size_t index(int row, int column) const {
        return static_cast<std::size_t>(row) * static_cast<std::size_t>(columns) + static_cast<std::size_t>(column);
    }
};

/// The fewest boxes of a size that cover `work`, which lies in the middle of them.
[[nodiscard]] TileGrid grid_over(const Box& work, double width_mm, double height_mm, double overlap_mm);

/// For each box, row by row, whether anything of the drawing comes into it. The grid lies in the drawing's plane after a
/// quarter turn anticlockwise if `turned`. Accuracy: a mark nearer than 0.02 mm to a box may count as in it.
[[nodiscard]] std::vector<bool> occupied(const TileGrid& grid, const FlatDrawing& drawing, bool turned);

/// "B3": the row's letter from the top, the column's number from the left; after Z comes AA.
[[nodiscard]] std::string tile_label(int row, int column);

} // namespace dialwright::layout
