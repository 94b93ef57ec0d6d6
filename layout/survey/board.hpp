// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/tiling.hpp"

#include <vector>

namespace dialwright::layout {

/// The board for the survey of a wall, at full scale on the paper of the options: the peg's hole, a grid of millimetres to
/// the right and down of it, the line that the plumb line must cover; then how it is used, and room for readings.
/// @throws ExportError  the paper is too small for a board
[[nodiscard]] std::vector<Sheet> survey_board(const PrintOptions& options);

/// The board itself, millimetres from the peg's hole, x right and y up: `beside_mm` to either side, `above_mm` and `below_mm`
/// (all multiples of 10).
[[nodiscard]] Drawing board_drawing(double beside_mm, double above_mm, double below_mm);

} // namespace dialwright::layout
