// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "layout/sheet/tiling.hpp"

#include <vector>

namespace dialwright::cli {

/// The page that goes with the dial: what it is, how it is read, from the dial to the clock with graph, table and an
/// example, what it wants of its owner, whom to ask.
/// @throws layout::ExportError  margins leave no room on the paper
[[nodiscard]] std::vector<layout::Sheet> owner_card(const Commission& commission, const layout::PrintOptions& options);

} // namespace dialwright::cli
