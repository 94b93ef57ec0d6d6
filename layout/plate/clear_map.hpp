// SPDX-License-Identifier: MIT
#pragma once

#include "layout/plate/outline.hpp"

#include <array>
#include <vector>

namespace dialwright::layout {

/// A box that stands at a turn: a label's or a numeral's room.
struct TurnedBox {
    Point middle;
    double half_width_mm = 0.0, half_height_mm = 0.0;
    Angle turn; ///< anticlockwise

    [[nodiscard]] std::array<Point, 4> corners() const; ///< anticlockwise
    [[nodiscard]] bool overlaps(const TurnedBox& other) const;
};

/// How far each place on the plate is from the nearest line, letter or border: where there is room for a label.
/// A raster; distances are right to about one cell.
class ClearMap {
  public:
    ClearMap(const Outline& free_inside, double cell_mm);

    void block(const Polyline& line);
    void block(const TurnedBox& box);
    /// Call after blocking, before asking.
    void measure();

    /// 0 on blocked places and outside.
    [[nodiscard]] double clearance_mm(Point p) const;
    /// The least clearance in the box; less than `wanted_mm` is not looked into further.
    [[nodiscard]] double clearance_mm(const TurnedBox& box, double wanted_mm = 0.0) const;
    [[nodiscard]] double cell_mm() const { return cell_mm_; }

  private:
    [[nodiscard]] std::size_t index(int column, int row) const {
        return std::size_t(row) * std::size_t(columns_) + std::size_t(column);
    }
    void block(Point p);

    double cell_mm_;
    Point corner_;
    int columns_, rows_;
    std::vector<float> distance_;
};

} // namespace dialwright::layout
