// SPDX-License-Identifier: MIT
#include "cli/plan/correction_plan.hpp"

#include "cli/design/sections.hpp"

namespace dialwright::cli {

std::optional<Correction> correction_of(const Design& design, const MeanYear& year, Angle zone_meridian) {
    const std::optional<HourTime> time = corrected_time(design);
    const std::optional<Zone> zone = Zone::find(design.place.zone);
    if (!time || !zone)
        return std::nullopt;
    return Correction{year, *time, design.place.site.longitude, zone_meridian,
                      summer_time_of(*zone, design.years.first, design.years.last)};
}

layout::CorrectionSpec correction_spec(const Design& design) {
    const CorrectionMade& made = design.correction;
    layout::CorrectionSpec spec;
    spec.form = made.form;
    spec.width_mm = made.width_mm;
    spec.height_mm = made.height_mm;
    spec.letter_height_mm = made.letter_height_mm;
    spec.steps = made.dates;
    spec.family = design.lettering.family;
    spec.cutting = design.cutting;
    spec.summer_numerals = design.hours.summer_numerals;
    return spec;
}

} // namespace dialwright::cli
