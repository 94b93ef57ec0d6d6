// SPDX-License-Identifier: MIT
#pragma once

#include "cli/report/shadow.hpp"
#include "engine/sun/civil_day.hpp"
#include "engine/sun/equal_altitudes.hpp"
#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// A quarter hour of the clock at which some face is lit.
struct FixingRow {
    ShadowReport shadow;
    bool on_plate = false; ///< the nodus' shadow falls within the plate's edge
};

/// One date of fixing.
struct FixingDate {
    CivilDay day;
    std::vector<FixingRow> rows;
    std::vector<EqualAltitudes> pairs; ///< the earliest first
};

/// How the reading of a face answers to its being moved, minutes of the reading for a degree: positive where it goes on
/// (the dial gets faster). Derivatives of the engine's own reading.
struct FixingAnswer {
    Instant at;
    double reads_h = 0;
    double turn_min = 0; ///< about the plumb line, clockwise as seen from above
    double tip_min = 0;  ///< the top back, away from its reader; of a level plate the north edge down
    double roll_min = 0; ///< in its own plane, clockwise as its reader sees it; of a level plate the east edge down
};

/// What the fitter needs on the day: docs/fixing.md.
struct Fixing {
    const Commission* commission = nullptr;
    Zone zone;
    std::vector<FixingDate> dates;
    std::vector<std::vector<FixingAnswer>> answers; ///< of each face, at the whole hours of the first date
};

inline constexpr int k_most_fixing_days = 31; ///< a run that still goes on one sheet

/// @param first, last  at most k_most_fixing_days
[[nodiscard]] Fixing fixing_of(const Commission& commission, std::chrono::year_month_day first,
                               std::chrono::year_month_day last);

/// For people. For programs: docs/output-formats.md. A quarter hour a row.
[[nodiscard]] std::string fixing_text(const Fixing& fixing);
[[nodiscard]] std::string fixing_json(const Fixing& fixing);
[[nodiscard]] std::string fixing_csv(const Fixing& fixing);
/// The fixing sheet: two pages at most of A4 or larger. What has no room on it is left out in this order: dates in the middle of the
/// run, every other quarter hour, the gauge, which the packet has on a page of its own.
[[nodiscard]] std::vector<layout::Sheet> fixing_sheets(const Fixing& fixing, const layout::PrintOptions& options);

} // namespace dialwright::cli
