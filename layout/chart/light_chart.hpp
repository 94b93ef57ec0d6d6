// SPDX-License-Identifier: MIT
#pragma once

#include "layout/chart/chart.hpp"

#include <vector>

namespace dialwright::layout {

/// A stretch of a day, in hours from its midnight.
struct HourSpan {
    double from_h = 0.0, to_h = 24.0;
};

/// One day of a light chart, by a clock that keeps one time all year.
struct LightChartDay {
    std::vector<HourSpan> lit;    ///< the plate has Sun
    std::vector<HourSpan> shaded; ///< it would, but for the skyline
    std::vector<HourSpan> behind; ///< the Sun is up, on the other side of the plate
    double noon_h = 12.0;         ///< the Sun's noon
};

struct LightChartPlan {
    std::vector<LightChartDay> days; ///< from 1 January to 31 December
    double width_mm = 170.0, height_mm = 110.0;
    double summer_shift_h = 0.0; ///< > 0: the right side's hours are those of summer time
};

/// Months across, hours up: when a plate is lit through the year. Its lower left corner is at (0, 0); hours and months are
/// noted beside and under it, the words for the three tones under these.
[[nodiscard]] Chart light_chart(const LightChartPlan& plan);

} // namespace dialwright::layout
