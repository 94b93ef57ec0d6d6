// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <cstddef>
#include <vector>

namespace dialwright::layout {

/// Leaves each line of the marks, which are all of one layer, to be drawn once; returns how many pieces or parts of
/// pieces went. The rules stand at `ready_for_machine()`.
std::size_t draw_once(std::vector<Mark>& marks);

} // namespace dialwright::layout
