// SPDX-License-Identifier: MIT
#pragma once

#include "cli/report/fixing.hpp"
#include "cli/report/text_table.hpp"

namespace dialwright::cli {

// What text and paper have in common.

/// How a table of quarter hours names where the shadow falls, and which way it is to be moved.
struct PlateWords {
    std::string right, up;         ///< "right", "up" or "east", "north"
    std::string turn, tip, roll;   ///< heads of the answers
    std::string tip_way, roll_way; ///< "top back", "north edge down"
};
[[nodiscard]] PlateWords plate_words(const Design& design);

/// "11:54.8": hours and minutes to a tenth.
[[nodiscard]] std::string reading_words(double hours);

[[nodiscard]] std::vector<layout::Flow::Column> noon_columns();
[[nodiscard]] TableRow noon_row(const Fixing& fixing, const FixingDate& date);
[[nodiscard]] std::vector<layout::Flow::Column> pair_columns();
[[nodiscard]] std::vector<TableRow> pair_rows(const Fixing& fixing, const FixingDate& date);
[[nodiscard]] std::vector<layout::Flow::Column> answer_columns(const Fixing& fixing);
[[nodiscard]] std::vector<TableRow> answer_rows(const Fixing& fixing, std::size_t face);

/// How north is found, how the plate is levelled or plumbed, which way to move it.
[[nodiscard]] std::string north_words();
[[nodiscard]] std::vector<std::string> level_words(const Fixing& fixing, std::size_t face);
[[nodiscard]] std::vector<std::string> move_words(const Fixing& fixing, std::size_t face);

} // namespace dialwright::cli
