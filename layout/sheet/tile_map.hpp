// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/tile_grid.hpp"
#include "layout/sheet/tiling.hpp"

namespace dialwright::layout {

/// Fills in the tiling's map: the work in the guides' pale tone, the sheets' outlines along the seams, their labels;
/// blank sheets crossed out.
/// @param used    for each tile of the grid whether it is printed
/// @param turned  the work lies a quarter turn anticlockwise under the grid
void draw_tile_map(Tiling& tiling, const Drawing& drawing, const TileGrid& grid, const std::vector<bool>& used,
                   bool turned);

} // namespace dialwright::layout
