// SPDX-License-Identifier: MIT
#pragma once

#include "engine/light/plate_light.hpp"
#include "engine/time/zone.hpp"
#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// A wall, or a face of a dial, that is asked for its light.
struct LightFace {
    std::string name; ///< "Harrowgarth gable, front face"; for a wall without a design which way it looks
    Site site;
    Zone zone;
    Attitude attitude;
    Skyline skyline;
};

struct LightDay {
    std::chrono::year_month_day date;
    Instant begin, end;
    std::vector<TimeSpan> lit;
    std::chrono::microseconds up{0}, facing{0}, lit_for{0};
};

/// The light on one face through the dates of a year, by its zone's clocks.
struct LightYear {
    LightFace face;
    int year = 0;
    PlateLight light;
    std::vector<LightDay> days;
};
[[nodiscard]] LightYear light_year(LightFace face, int year);

/// For people: each face's months and chosen days; of several also side by side.
[[nodiscard]] std::string sunlight_text(const std::vector<LightYear>& years);
/// For programs: docs/output-formats.md.
[[nodiscard]] std::string sunlight_json(const std::vector<LightYear>& years);
/// A date and face a row.
[[nodiscard]] std::string sunlight_csv(const std::vector<LightYear>& years);
/// A page with a chart for each face; of several one more before them, side by side.
[[nodiscard]] layout::SheetBook sunlight_sheets(const std::vector<LightYear>& years, layout::PrintOptions options);

} // namespace dialwright::cli
