// SPDX-License-Identifier: MIT
#pragma once

#include "cli/report/sunlight.hpp"
#include "cli/report/text_table.hpp"

#include <array>
#include <string>
#include <vector>

namespace dialwright::cli {

/// Hours of one month, or of the year.
struct LightTotals {
    double up_h = 0, facing_h = 0, lit_h = 0;
    int days = 0, days_lit = 0;
};
[[nodiscard]] std::array<LightTotals, 12> months_of(const LightYear& year);
[[nodiscard]] LightTotals total_of(const LightYear& year);
[[nodiscard]] double hours_of(std::chrono::microseconds length);

/// What text and paper have in common.
[[nodiscard]] std::string face_heading(const LightYear& year);
[[nodiscard]] const std::vector<layout::Flow::Column>& month_columns();
[[nodiscard]] std::vector<TableRow> month_rows(const LightYear& year); ///< twelve, and the year
[[nodiscard]] const std::vector<layout::Flow::Column>& day_columns();
[[nodiscard]] std::vector<TableRow> day_rows(const LightYear& year); ///< the 1st, 11th and 21st of each month
[[nodiscard]] std::vector<layout::Flow::Column> compared_columns(const std::vector<LightYear>& years);
[[nodiscard]] std::vector<TableRow> compared_rows(const std::vector<LightYear>& years);
/// Seasons without light, what the skyline costs.
[[nodiscard]] std::vector<std::string> light_remarks(const LightYear& year);

inline constexpr const char* k_light_note = "Hours for which the Sun's middle stands where it lights the face, under a "
                                            "clear sky and without refraction. A Sun that "
                                            "grazes the face, or has just risen, throws no shadow to read: take a "
                                            "quarter of an hour off at such ends. Trees in leaf, "
                                            "eaves and houses that are not in the skyline take more.";

} // namespace dialwright::cli
