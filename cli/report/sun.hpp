// SPDX-License-Identifier: MIT
#pragma once

#include "engine/sun/civil_day.hpp"
#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// What the Sun does at a place, on one date or on each of a run of dates.
struct SunTable {
    std::string name; ///< of the place; may be empty
    Site site;
    Zone zone;
    bool refraction = true; ///< rise and set as people see them; else the Sun's middle on the bare horizon
    std::vector<CivilDay> days;
};

/// For people: one date in lines, more as a table.
[[nodiscard]] std::string sun_text(const SunTable& table);
/// For programs: docs/output-formats.md.
[[nodiscard]] std::string sun_json(const SunTable& table);
[[nodiscard]] std::string sun_csv(const SunTable& table);
/// The table on paper.
[[nodiscard]] layout::SheetBook sun_sheets(const SunTable& table, layout::PrintOptions options);

} // namespace dialwright::cli
