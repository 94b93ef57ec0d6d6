// SPDX-License-Identifier: MIT
#include "layout/plate/clear_map.hpp"

#include "layout/plate/points.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::layout {
namespace {

/// Halves go up; where the map ends is asked afterwards, so numbers beyond it need only stay beyond it.
int nearest(double cells) {
    constexpr double k_far = 1e6;
    return int(std::floor(std::clamp(cells, -k_far, k_far) + 0.5));
}

} // namespace

std::array<Point, 4> TurnedBox::corners() const {
    const Point x = {half_width_mm * cos(turn), half_width_mm * sin(turn)};
    const Point y = {-half_height_mm * sin(turn), half_height_mm * cos(turn)};
    return {middle - x - y, middle + x - y, middle + x + y, middle - x + y};
}

bool TurnedBox::overlaps(const TurnedBox& other) const {
    // Nearly all boxes are far apart: told without roots and turns.
    const Point apart = other.middle - middle;
    const double reach = half_width_mm + half_height_mm + other.half_width_mm + other.half_height_mm;
    if (dot(apart, apart) > reach * reach)
        return false;
    const auto mine = corners(), theirs = other.corners();
    const auto apart_along = [&](Angle axis_turn) {
        const Point axis{cos(axis_turn), sin(axis_turn)};
        const auto span = [&](const std::array<Point, 4>& points) {
            double low = 1e300, high = -1e300;
            for (const Point& p : points) {
                low = std::min(low, dot(axis, p));
                high = std::max(high, dot(axis, p));
            }
            return std::pair{low, high};
        };
        const auto [low_a, high_a] = span(mine);
        const auto [low_b, high_b] = span(theirs);
        return high_a < low_b || high_b < low_a;
    };
    const Angle quarter = Angle::degrees(90);
    return !(apart_along(turn) || apart_along(turn + quarter) || apart_along(other.turn) ||
             apart_along(other.turn + quarter));
}

ClearMap::ClearMap(const Outline& free_inside, double cell_mm) : cell_mm_{cell_mm} {
    const Box box = free_inside.box();
    corner_ = {box.left_mm - cell_mm, box.bottom_mm - cell_mm};
    columns_ = int(box.width_mm() / cell_mm) + 3;
    rows_ = int(box.height_mm() / cell_mm) + 3;
    distance_.assign(std::size_t(columns_) * std::size_t(rows_), 0.0F);
    // One row of cells is inside between each pair of crossings of its middle line.
    std::vector<double> t;
    for (int row = 0; row < rows_; ++row) {
        const double y = corner_.y_mm + row * cell_mm;
        const Point a{corner_.x_mm, y}, b{corner_.x_mm + columns_ * cell_mm, y};
        t.clear();
        free_inside.crossings(a, b, t);
        std::sort(t.begin(), t.end());
        for (std::size_t k = 0; k + 1 < t.size(); ++k) { // a row through a corner crosses there twice, or touches
            if (!free_inside.contains(between(a, b, (t[k] + t[k + 1]) / 2)))
                continue;
            const int from = int(std::ceil(t[k] * columns_)), to = int(std::floor(t[k + 1] * columns_));
            for (int column = from; column <= to && column < columns_; ++column)
                distance_[index(column, row)] = 1e9F;
        }
    }
}

void ClearMap::block(Point p) {
    const int column = nearest((p.x_mm - corner_.x_mm) / cell_mm_);
    const int row = nearest((p.y_mm - corner_.y_mm) / cell_mm_);
    if (column >= 0 && column < columns_ && row >= 0 && row < rows_)
        distance_[index(column, row)] = 0.0F;
}

void ClearMap::block(const Polyline& line) {
    for (std::size_t i = 0; i + 1 < line.size(); ++i) {
        const int parts = std::max(1, int(distance(line[i], line[i + 1]) / (0.5 * cell_mm_)));
        for (int k = 0; k <= parts; ++k)
            block(between(line[i], line[i + 1], double(k) / parts));
    }
}

void ClearMap::block(const TurnedBox& box) {
    const Point x{cos(box.turn), sin(box.turn)}, y = left_of(x);
    const double step = 0.5 * cell_mm_;
    for (double along = -box.half_width_mm; along <= box.half_width_mm; along += step)
        for (double up = -box.half_height_mm; up <= box.half_height_mm; up += step)
            block(box.middle + along * x + up * y);
}

void ClearMap::measure() {
    // Two sweeps with the weights 1 and √2: right to 8 %.
    const float straight = float(cell_mm_), slant = float(cell_mm_ * std::sqrt(2.0));
    const auto sweep = [&](int row, int column, int back) {
        float& here = distance_[index(column, row)];
        const auto take = [&](int c, int r, float more) {
            if (c >= 0 && c < columns_ && r >= 0 && r < rows_)
                here = std::min(here, distance_[index(c, r)] + more);
        };
        take(column - back, row, straight);
        take(column, row - back, straight);
        take(column - back, row - back, slant);
        take(column + back, row - back, slant);
    };
    for (int row = 0; row < rows_; ++row)
        for (int column = 0; column < columns_; ++column)
            sweep(row, column, 1);
    for (int row = rows_ - 1; row >= 0; --row)
        for (int column = columns_ - 1; column >= 0; --column)
            sweep(row, column, -1);
}

double ClearMap::clearance_mm(Point p) const {
    const int column = nearest((p.x_mm - corner_.x_mm) / cell_mm_);
    const int row = nearest((p.y_mm - corner_.y_mm) / cell_mm_);
    const bool on_map = column >= 0 && column < columns_ && row >= 0 && row < rows_;
    return on_map ? double(distance_[index(column, row)]) : 0.0;
}

double ClearMap::clearance_mm(const TurnedBox& box, double wanted_mm) const {
    const Point x{cos(box.turn), sin(box.turn)}, y = left_of(x);
    const auto parts = [&](double half) { return std::max(2, int(std::ceil(2 * half / cell_mm_))); };
    const int across = parts(box.half_width_mm), up = parts(box.half_height_mm);
    double least = 1e300;
    for (int i = 0; i <= across && least > 0; ++i)
        for (int k = 0; k <= up && least >= wanted_mm; ++k)
            least = std::min(least, clearance_mm(box.middle + (2.0 * i / across - 1) * box.half_width_mm * x +
                                                 (2.0 * k / up - 1) * box.half_height_mm * y));
    return least;
}

} // namespace dialwright::layout
