// SPDX-License-Identifier: MIT
#pragma once

#include "layout/chart/chart.hpp"

#include <array>
#include <optional>
#include <string>
#include <vector>

namespace dialwright::layout {

/// Minutes of error over the hours, one bar for each of three seasons.
struct AccuracyChartPlan {
    struct Hour {
        std::string label;
        std::array<std::optional<double>, 3> minutes; ///< nothing where the hour is unlit
    };
    std::vector<Hour> hours;
    std::array<std::string, 3> seasons;
    double supported_min = 0.0; ///< a line across at what the dial supports; 0: none
    double width_mm = 170.0, height_mm = 70.0;
};

/// Its lower left corner is at (0, 0). Bars over a quarter of an hour are cut off there, with their minutes above them.
[[nodiscard]] Chart accuracy_chart(const AccuracyChartPlan& plan);

} // namespace dialwright::layout
