// SPDX-License-Identifier: MIT
#include "layout/sheet/tile_map.hpp"

#include <algorithm>

namespace dialwright::layout {
namespace {

constexpr double k_map_mm = 120.0;
constexpr double k_least_mm = 0.6; // what is smaller on the map is left off it

/// The tile's share of the whole: to the seams, or to the grid's outer sides.
Box share_of(const TileGrid& grid, int row, int column) {
    const Box tile = grid.box(row, column);
    return {column == 0 ? tile.left_mm : grid.seam_x(column),
            row == grid.rows - 1 ? tile.bottom_mm : grid.seam_y(row + 1),
            column == grid.columns - 1 ? tile.right_mm : grid.seam_x(column + 1),
            row == 0 ? tile.top_mm : grid.seam_y(row)};
}

} // namespace

void draw_tile_map(Tiling& tiling, const Drawing& drawing, const TileGrid& grid, const std::vector<bool>& used,
                   bool turned) {
    const Box whole = grid.whole();
    const double scale = k_map_mm / std::max(whole.width_mm(), whole.height_mm());
    tiling.map_box = {0, 0, whole.width_mm() * scale, whole.height_mm() * scale};
    const Point shift{-whole.left_mm * scale, -whole.bottom_mm * scale};
    const Placing on_work{turned ? Angle::degrees(90) : Angle{}, shift, scale, scale, false};
    const Placing on_grid{{}, shift, scale, scale, false};
    for (const Mark& mark : drawing.marks) {
        const Box box = bounds_of(mark);
        if (std::max(box.width_mm(), box.height_mm()) * scale < k_least_mm) {
            continue;
        }
        Mark small = on_work(mark);
        small.layer = Layer::guide;
        small.width_mm = std::clamp(small.width_mm, 0.08, 0.25);
        tiling.map.push_back(std::move(small));
    }
    Mark outlines{Layer::engrave, {}, 0.2, false, "sheets"}, crossed{Layer::guide, {}, 0.15, false, "blank sheets"};
    for (int row = 0; row < grid.rows; ++row) {
        for (int column = 0; column < grid.columns; ++column) {
            const Box share = bounds_of(on_grid(rectangle(share_of(grid, row, column))));
            outlines.paths.push_back(rectangle(share));
            const bool blank = !used[grid.index(row, column)];
            if (blank) {
                crossed.paths.push_back(polyline({{share.left_mm, share.bottom_mm}, {share.right_mm, share.top_mm}}));
                crossed.paths.push_back(polyline({{share.left_mm, share.top_mm}, {share.right_mm, share.bottom_mm}}));
            }
            const double size = std::clamp(std::min(share.width_mm(), share.height_mm()) / 3, 2.5, 6.0);
            const std::string label = used.size() == 1 ? std::string{} : tile_label(row, column);
            if (!label.empty()) {
                tiling.map_notes.push_back(
                    {{share.middle().x_mm, share.middle().y_mm - size * 0.36}, label, size, Align::middle, !blank, {}});
            }
        }
    }
    tiling.map.push_back(std::move(crossed));
    tiling.map.push_back(std::move(outlines));
}

} // namespace dialwright::layout
