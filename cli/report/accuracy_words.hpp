// SPDX-License-Identifier: MIT
#pragma once

#include "cli/report/accuracy.hpp"
#include "cli/report/text_table.hpp"

#include <array>

namespace dialwright::cli {

inline constexpr std::array<const char*, 3> k_season_keys{"june", "equinox", "december"};

/// A slip's name for programs: "style_height".
[[nodiscard]] const char* slip_name(SlipKind kind);
/// What text and paper have in common: what the dial supports, what matters most and where, what was reckoned with.
[[nodiscard]] std::vector<std::string> accuracy_words(const Commission& commission, const FaceAccuracy& face);
[[nodiscard]] std::vector<layout::Flow::Column> accuracy_columns(const FaceAccuracy& face);
[[nodiscard]] std::vector<TableRow> accuracy_rows(const FaceAccuracy& face);

inline constexpr const char* k_accuracy_note =
    "Each slip is taken at its full size, the worse of its two ways, through the dial's own reading; independent slips "
    "add by "
    "squares. A slip that is proved to be smaller goes into the design's accuracy section. Haze, a rough face and "
    "the eye's own habit are not in it.";

} // namespace dialwright::cli
