// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"

#include <optional>
#include <utility>
#include <vector>

namespace dialwright::cli {

/// Twice the area, positive when the corners run anticlockwise; mm².
[[nodiscard]] double twice_area_mm2(const std::vector<PlatePointMm>& corners);

/// Two sides that cross or touch other than at a corner they share, or fold back on each other, or a side without
/// length (both numbers equal). Side i runs from corner i to the next, counted from 0; the first such pair is given.
/// Accuracy: sides that come nearer than about 1e-9 of the plate's size count as touching.
[[nodiscard]] std::optional<std::pair<std::size_t, std::size_t>>
first_sides_in_trouble(const std::vector<PlatePointMm>& corners);

} // namespace dialwright::cli
