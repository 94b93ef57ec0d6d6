// SPDX-License-Identifier: MIT
#pragma once

#include "cli/readings/adjust_readings.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// One way in which a dial may stand, in words.
struct AdjustWords {
    std::string if_so;               ///< what it supposes; empty for what needs no supposing
    std::vector<std::string> stands; ///< how it stands, each with its ±
    bool proved_off = false;         ///< the dial does not stand right, whichever step is the one
    std::vector<std::string> steps;  ///< what the fitter does, in this order; empty where nothing is proved wrong
};

/// What the readings are good for, and what is to be done.
struct AdjustReport {
    std::vector<DesignError> errors; ///< the readings give no answer
    std::vector<AdjustWords> ways;   ///< the likeliest first
    std::vector<std::string> notes;  ///< what the fitter should know
};
[[nodiscard]] AdjustReport report_on(const AdjustFile& file, const DialAdjustment& found, const Commission& commission);

[[nodiscard]] std::string adjust_text(const AdjustFile& file, const DialAdjustment& found, const AdjustReport& report,
                                      const Commission& commission);
/// docs/output-formats.md.
[[nodiscard]] std::string adjust_json(const AdjustFile& file, const DialAdjustment& found, const AdjustReport& report,
                                      const Commission& commission);
/// What to do, on paper for the fitter, with room for the next readings.
[[nodiscard]] std::vector<layout::Sheet> adjust_sheets(const AdjustFile& file, const AdjustReport& report,
                                                       const Commission& commission,
                                                       const layout::PrintOptions& options);

/// A dial of the design, mounted to serve at another place.
[[nodiscard]] std::string moved_text(const Commission& commission, const DialPlan& plan, const Site& there,
                                     Angle zone_meridian);
[[nodiscard]] std::string moved_json(const Commission& commission, const DialPlan& plan, const Site& there,
                                     Angle zone_meridian);

} // namespace dialwright::cli
