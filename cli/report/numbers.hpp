// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"

#include <string>

namespace dialwright::cli {

/// What was computed, for people. Degrees and minutes beside decimals, millimetres to a tenth.
[[nodiscard]] std::string numbers_text(const Commission& commission);
/// For programs: docs/output-formats.md. One line of JSON, always valid: what has no value is null.
[[nodiscard]] std::string numbers_json(const Commission& commission);
/// The hour lines as a table with a heading row.
[[nodiscard]] std::string hour_lines_csv(const Commission& commission);

} // namespace dialwright::cli
