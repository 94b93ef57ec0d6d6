// SPDX-License-Identifier: MIT
#pragma once

#include "cli/packet/work_pieces.hpp"
#include "layout/setting_out/setting_out.hpp"
#include "layout/sheet/tiling.hpp"

#include <vector>

namespace dialwright::cli {

/// Every part of the gnomon: what it is, how it is made and fitted, what is dangerous in it, and its drawing at full
/// scale, or on tiles where no page has room for it.
[[nodiscard]] std::vector<layout::Sheet>
gnomon_pages(const Commission& commission, const std::vector<WorkPiece>& pieces, const layout::PrintOptions& options);

/// The numbers for setting a plate out by hand.
/// @param divisions  lines finer than an hour as well
[[nodiscard]] layout::SettingOut setting_out_of(const Commission& commission, std::size_t face, bool divisions);
/// The same on paper, hours and dates alone.
[[nodiscard]] std::vector<layout::Sheet> setting_out_pages(const Commission& commission, std::size_t face,
                                                           const layout::PrintOptions& options);

} // namespace dialwright::cli
