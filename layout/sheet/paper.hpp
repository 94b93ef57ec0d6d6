// SPDX-License-Identifier: MIT
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::layout {

/// A paper that printers take. Sides in mm, the shorter first. A roll is as long as the work needs, up to `long_mm`.
struct Paper {
    std::string name;
    double short_mm = 210.0, long_mm = 297.0;
    bool roll = false; ///< `short_mm` is the width of the roll, always across the page
};

/// "A4", "a3", "Letter", "Tabloid", "B2", "roll 610 mm", "roll 24 in", without regard to case; nothing when unknown.
/// Sources, from memory: ISO 216 (A and B), ANSI/ASME Y14.1 (Letter to ANSI E, ARCH A to E).
[[nodiscard]] std::optional<Paper> paper_named(std::string_view name);
/// All names, for messages and the reference; rolls by two examples.
[[nodiscard]] std::vector<std::string> paper_names();

} // namespace dialwright::layout
