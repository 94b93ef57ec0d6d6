// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/paper.hpp"
#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

namespace dialwright::layout {

/// What a printer makes of a length, found by measuring a print: measured / printed, 1 for one that is true. Tied to the
/// way that paper takes through the printer, whichever way the page lies: sheets go in by their short side.
struct Compensation {
    double across = 1.0; ///< across the feed: along the short side of a sheet, across a roll
    double along = 1.0;  ///< along the feed
    [[nodiscard]] bool none() const { return across == 1.0 && along == 1.0; }
};
/// Farther off than this, something else is wrong: the page was fitted to the paper.
inline constexpr double k_most_compensation = 0.05;

/// Stretches the sheet against the printer's error.
void compensate(Sheet& sheet, const Compensation& compensation, bool roll);

/// The margin to lay sheets out with, so that they stay inside the printer's own after they are stretched.
[[nodiscard]] double margin_for(const Compensation& compensation, const Paper& paper, double margin_mm);

/// One page with two long bars, as long as the paper lets them be, and what to do with it: how a printer's error is found.
/// @throws ExportError  margins leave no room on the paper
[[nodiscard]] Sheet calibration_sheet(const PrintOptions& options);

} // namespace dialwright::layout
