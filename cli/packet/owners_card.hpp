// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "layout/sheet/tiling.hpp"

#include <vector>

namespace dialwright::cli {

/// The owner's card, to print and give away: what the dial is, how it is read, how the reading becomes clock time through
/// the year, and what the dial wants.
/// @throws layout::ExportError  margins leave no room on the paper
[[nodiscard]] std::vector<layout::Sheet> owners_card(const Commission& commission, const layout::PrintOptions& options);

} // namespace dialwright::cli
