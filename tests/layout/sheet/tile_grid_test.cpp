// SPDX-License-Identifier: MIT
#include "layout/sheet/tile_grid.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <random>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

TEST_CASE("Labels count rows in letters and columns in numbers", "[layout]") {
    CHECK(tile_label(0, 0) == "A1");
    CHECK(tile_label(1, 2) == "B3");
    CHECK(tile_label(25, 9) == "Z10");
    CHECK(tile_label(26, 0) == "AA1");
    CHECK(tile_label(27, 0) == "AB1");
}

TEST_CASE("The grid covers the work with the fewest boxes, and its overlaps are as asked", "[layout]") {
    const Box work{-100, 20, 300, 520};
    const TileGrid grid = grid_over(work, 150, 200, 10);
    CHECK(grid.columns == 3); // 150 + 2 × 140 = 430 ≥ 400
    CHECK(grid.rows == 3);    // 200 + 2 × 190 = 580 ≥ 500
    CHECK(grid.whole().contains(work));
    CHECK_THAT(grid.box(0, 0).right_mm - grid.box(0, 1).left_mm, WithinAbs(10, 1e-9));
    CHECK_THAT(grid.box(1, 0).top_mm - grid.box(0, 0).bottom_mm, WithinAbs(10, 1e-9));
    CHECK_THAT(grid.seam_x(1), WithinAbs(grid.box(0, 1).left_mm + 5, 1e-9));
    CHECK_THAT(grid.seam_y(2), WithinAbs(grid.box(2, 0).top_mm - 5, 1e-9));
    CHECK(grid_over({0, 0, 150, 200}, 150, 200, 10).columns == 1);
    CHECK(grid_over({0, 0, 290, 200}, 150, 200, 10).columns == 2);
    CHECK(grid_over({0, 0, 290.1, 200}, 150, 200, 10).columns == 3);
}

TEST_CASE("A box counts as used when something comes into it, and only then", "[layout]") {
    std::mt19937 random{11};
    INFO("seed 11");
    std::uniform_real_distribution<double> any(-300, 300), size(1, 200);
    for (int i = 0; i < 60; ++i) {
        Drawing drawing;
        const bool filled = i % 2 == 0;
        Mark mark{Layer::engrave, {circle({any(random), any(random)}, size(random))}, 1.0, filled, ""};
        if (!filled) {
            mark.paths.push_back(polyline({{any(random), any(random)}, {any(random), any(random)}}));
        }
        drawing.marks = {mark};
        const FlatDrawing flat{drawing};
        const bool turned = i % 3 == 0;
        const Placing placing{turned ? Angle::degrees(90) : Angle{}, {}, 1, 1, false};
        const TileGrid grid = grid_over({-300, -300, 300, 300}, 70, 50, 10);
        const auto used = occupied(grid, flat, turned);
        for (int row = 0; row < grid.rows; ++row) {
            for (int column = 0; column < grid.columns; ++column) {
                const Box box = grid.box(row, column);
                // Brute force: walk the marks finely; for a disc also ask for the nearest point of the box.
                bool found = false, near = false;
                for (const Path& path : placing(mark).paths) {
                    const auto points = flattened(path, 1e-4);
                    for (std::size_t k = 1; k < points.size(); ++k) {
                        const double length =
                            std::hypot(points[k].x_mm - points[k - 1].x_mm, points[k].y_mm - points[k - 1].y_mm);
                        for (int s = 0, n = 1 + static_cast<int>(length / 0.2); s <= n; ++s) {
                            const double t = static_cast<double>(s) / n;
                            const Point p{points[k - 1].x_mm + t * (points[k].x_mm - points[k - 1].x_mm),
                                          points[k - 1].y_mm + t * (points[k].y_mm - points[k - 1].y_mm)};
                            found = found || box.grown(filled ? 0.0 : 0.5).contains(p);
                            near = near || box.grown(1.0).contains(p);
                        }
                    }
                }
                if (filled) {
                    const Point centre = placing(Point{bounds_of(mark).middle()});
                    const Point p{std::clamp(centre.x_mm, box.left_mm, box.right_mm),
                                  std::clamp(centre.y_mm, box.bottom_mm, box.top_mm)};
                    found = std::hypot(p.x_mm - centre.x_mm, p.y_mm - centre.y_mm) < bounds_of(mark).width_mm() / 2;
                    near = near || found;
                }
                if (found) {
                    CHECK(used[grid.index(row, column)]);
                }
                if (!near) {
                    CHECK_FALSE(used[grid.index(row, column)]);
                }
            }
        }
    }
}
