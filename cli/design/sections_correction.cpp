// SPDX-License-Identifier: MIT
// The plate that says how to come from the dial to the clock.
#include "cli/design/sections.hpp"

#include <array>

namespace dialwright::cli {

namespace {

constexpr std::array<Choice<CorrectionForm>, 3> k_forms = {
    {{"graph", CorrectionForm::graph}, {"ring", CorrectionForm::ring}, {"table", CorrectionForm::table}}};

constexpr std::array<Choice<TableSteps>, 4> k_dates = {{{"each 5 days", TableSteps::five_days},
                                                        {"each 10 days", TableSteps::ten_days},
                                                        {"each 15 days", TableSteps::fifteen_days},
                                                        {"whole minutes", TableSteps::whole_minutes}}};

constexpr double k_least_side_mm = 40.0;

/// A dial whose hours need no plate, or for which no plate can be made.
void check_time(const Design& design, const Section& correction) {
    if (correction.state().faulty("hours: time"))
        return;
    const std::optional<HourTime> time = corrected_time(design);
    if (!time)
        correction.error_here(
            "hours that count from the Sun's rising or setting become clock time by no minutes of a date",
            "leave the section out, or draw hours of the Sun as well, as in \"also: sun: yes\"");
    else if (*time == HourTime::clock)
        correction.error_here("a dial of clock time needs no correction: it shows the clock's time itself",
                              "leave the section out");
}

} // namespace

void read_correction(Design& design, const Section& top) {
    const Section correction{top.entry("correction"), "correction", top.state()};
    CorrectionMade& made = design.correction;
    made.wanted = correction.given();
    if (!made.wanted)
        return;
    made.form = correction.choice<CorrectionForm>("form", k_forms).value_or(made.form);
    if (made.form == CorrectionForm::ring) {
        made.width_mm = made.height_mm =
            correction.length("diameter", k_least_side_mm, k_largest_plate_mm).value_or(0.0);
        correction.refuse({"width", "height"}, "a ring is round", "give \"diameter\"");
    } else {
        made.width_mm = correction.length("width", k_least_side_mm, k_largest_plate_mm).value_or(0.0);
        made.height_mm = correction.length("height", k_least_side_mm, k_largest_plate_mm).value_or(0.0);
        correction.refuse({"diameter"}, "a graph or a table stands on a rectangle", "give \"width\" and \"height\"");
    }
    made.letter_height_mm = correction.length("letter height", 0.5, 1000.0).value_or(0.0);
    made.dates = correction.choice<TableSteps>("dates", k_dates);
    if (made.form != CorrectionForm::table)
        correction.refuse({"dates"}, "only a table names dates", "leave it out, or give \"form: table\"");
    check_time(design, correction);
}

std::optional<HourTime> corrected_time(const Design& design) {
    if (has_correction(design.hours.time))
        return design.hours.time;
    for (const MoreHours& more : design.also.hours)
        if (has_correction(more.time))
            return more.time;
    return std::nullopt;
}

} // namespace dialwright::cli
