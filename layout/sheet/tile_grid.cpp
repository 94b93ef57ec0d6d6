// SPDX-License-Identifier: MIT
#include "layout/sheet/tile_grid.hpp"

#include "layout/drawing/clipping.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::layout {
namespace {

constexpr double k_tolerance_mm = 0.02;

Point turn_quarter(Point p) {
    return {-p.y_mm, p.x_mm};
}

Box turn_quarter(const Box& box) {
    return box.empty() ? box : Box{-box.top_mm, box.left_mm, -box.bottom_mm, box.right_mm};
}

/// First and last index of the boxes that an interval may come into, a box wider on both sides for rounding.
struct Range {
    int first, last;
};
Range boxes_met(double low, double high, double origin, double step, double size, int count) {
    const double first = std::ceil((low - origin - size) / step) - 1, last = std::floor((high - origin) / step) + 1;
    const double top = count - 1;
    return {static_cast<int>(std::clamp(first, 0.0, top)), static_cast<int>(std::clamp(last, 0.0, top))};
}

class Occupancy {
  public:
    explicit Occupancy(const TileGrid& grid)
        : grid_{grid}, found_(static_cast<std::size_t>(grid.rows) * static_cast<std::size_t>(grid.columns)) {}

    /// Calls for each box that is still free and that the given box may meet.
    template <class Test>
    void each_free(const Box& box, Test test) {
        const Range columns =
            boxes_met(box.left_mm, box.right_mm, grid_.left_mm, grid_.step_x_mm, grid_.width_mm, grid_.columns);
        const Range rows =
            boxes_met(-box.top_mm, -box.bottom_mm, -grid_.top_mm, grid_.step_y_mm, grid_.height_mm, grid_.rows);
        for (int row = rows.first; row <= rows.last; ++row) {
            for (int column = columns.first; column <= columns.last; ++column) {
                if (!found_[grid_.index(row, column)] && test(grid_.box(row, column))) {
                    found_[grid_.index(row, column)] = true;
                }
            }
        }
    }
    [[nodiscard]] bool any_free(const Box& box) {
        bool any = false;
        each_free(box, [&](const Box&) {
            any = true;
            return false;
        });
        return any;
    }
    [[nodiscard]] std::vector<bool> take() { return std::move(found_); }

  private:
    const TileGrid& grid_;
    std::vector<bool> found_;
};

void mark_lines(Occupancy& occupancy, const std::vector<Point>& line, double reach_mm) {
    for (std::size_t i = 1; i < line.size(); ++i) {
        Box box;
        box.add(line[i - 1]);
        box.add(line[i]);
        occupancy.each_free(box.grown(reach_mm), [&](const Box& tile) {
            return line_inside(line[i - 1], line[i], tile.grown(reach_mm)).has_value();
        });
    }
}

/// A box that no edge comes into is inside the shape or outside it as a whole.
void mark_inside(Occupancy& occupancy, const FlatDrawing::Part& part, const Box& box,
                 const std::vector<std::vector<Point>>& rings) {
    occupancy.each_free(box, [&](const Box& tile) {
        int turns = 0;
        for (const std::vector<Point>& ring : rings) {
            turns += winding_round(ring, tile.middle());
        }
        return part.filled && turns != 0;
    });
}

} // namespace

FlatDrawing::FlatDrawing(const Drawing& drawing) {
    for (const Mark& mark : drawing.marks) {
        Part part;
        part.box = bounds_of(mark);
        part.reach_mm = (mark.filled ? 0.0 : mark.width_mm / 2) + k_tolerance_mm;
        part.filled = mark.filled;
        for (const Path& path : mark.paths) {
            part.lines.push_back(flattened(path, k_tolerance_mm));
        }
        box_.add(part.box);
        parts_.push_back(std::move(part));
    }
}

Box TileGrid::box(int row, int column) const {
    const double left = left_mm + column * step_x_mm, top = top_mm - row * step_y_mm;
    return {left, top - height_mm, left + width_mm, top};
}

Box TileGrid::whole() const {
    Box all = box(0, 0);
    all.add(box(rows - 1, columns - 1));
    return all;
}

double TileGrid::seam_x(int index) const {
    return left_mm + index * step_x_mm + (width_mm - step_x_mm) / 2;
}

double TileGrid::seam_y(int index) const {
    return top_mm - index * step_y_mm - (height_mm - step_y_mm) / 2;
}

TileGrid grid_over(const Box& work, double width_mm, double height_mm, double overlap_mm) {
    const auto count = [](double side, double box, double step) {
        // A hair's breadth more than fits is rounding, not a reason for another sheet.
        return side <= box ? 1 : 1 + static_cast<int>(std::min(1e6, std::ceil((side - box) / step - 1e-9)));
    };
    TileGrid grid;
    grid.width_mm = width_mm;
    grid.height_mm = height_mm;
    grid.step_x_mm = width_mm - overlap_mm;
    grid.step_y_mm = height_mm - overlap_mm;
    grid.columns = count(work.width_mm(), width_mm, grid.step_x_mm);
    grid.rows = count(work.height_mm(), height_mm, grid.step_y_mm);
    const Point middle = work.middle();
    grid.left_mm = middle.x_mm - (width_mm + (grid.columns - 1) * grid.step_x_mm) / 2;
    grid.top_mm = middle.y_mm + (height_mm + (grid.rows - 1) * grid.step_y_mm) / 2;
    return grid;
}

std::vector<bool> occupied(const TileGrid& grid, const FlatDrawing& drawing, bool turned) {
    Occupancy occupancy{grid};
    for (const FlatDrawing::Part& part : drawing.parts()) {
        // Most marks stand where others have been found already.
        if (!occupancy.any_free(turned ? turn_quarter(part.box) : part.box)) {
            continue;
        }
        std::vector<std::vector<Point>> lines = part.lines;
        Box box;
        for (std::vector<Point>& line : lines) {
            for (Point& p : line) {
                p = turned ? turn_quarter(p) : p;
                box.add(p);
            }
        }
        for (std::vector<Point>& line : lines) {
            if (part.filled) {
                line.push_back(line.front()); // a filled shape is closed whatever its path says
            }
            mark_lines(occupancy, line, part.reach_mm);
        }
        if (part.filled) {
            mark_inside(occupancy, part, box, lines);
        }
    }
    return occupancy.take();
}

std::string tile_label(int row, int column) {
    std::string letters;
    for (int left = row; left >= 0; left = left / 26 - 1) {
        letters.insert(letters.begin(), static_cast<char>('A' + left % 26));
    }
    return letters + std::to_string(column + 1);
}

} // namespace dialwright::layout
