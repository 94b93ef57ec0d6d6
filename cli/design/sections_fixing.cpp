// SPDX-License-Identifier: MIT
#include "cli/design/plain_text.hpp"
#include "cli/design/sections.hpp"

#include <fmt/format.h>

namespace dialwright::cli {

namespace {

/// A run of dates that still goes on one fixing sheet.
constexpr int k_most_days = 31;
constexpr double k_most_degrees = 5.0;

/// How far off an angle may be: 0° to 5°. Leaves `target` as it is when the key is not there or its value is wrong.
void read_slip(Angle& target, const Section& section, std::string_view key) {
    const auto angle = section.read(key, plain_angle);
    if (!angle)
        return;
    if (*angle < Angle{} || *angle > Angle::degrees(k_most_degrees))
        section.error(key, in_quotes(*section.text(key)) + " is not how far off this may be",
                      fmt::format("give 0° to {:g}°", k_most_degrees));
    else
        target = *angle;
}

} // namespace

void read_fixing(Design& design, const Section& top) {
    using namespace std::chrono;
    const Section fixing{top.entry("fixing"), "fixing", top.state()};
    if (!fixing.given())
        return;
    const auto first = fixing.read("on", calendar_date), last = fixing.read("to", calendar_date);
    if (!fixing.has("on")) {
        fixing.missing("on", "name the day of fixing, as in \"on: 2027-06-14\"");
        return;
    }
    if (!first || (fixing.has("to") && !last))
        return;
    const auto days = last ? (sys_days{*last} - sys_days{*first}).count() + 1 : 1;
    if (days < 1)
        fixing.error("to", in_quotes(*fixing.text("to")) + " is before the first date",
                     "give the later date to \"to\"");
    else if (days > k_most_days)
        fixing.error("to", fmt::format("{} is {} days after the first date", in_quotes(*fixing.text("to")), days - 1),
                     fmt::format("give at most {} days", k_most_days));
    else
        design.fixing = {*first, last ? *last : *first};
}

void read_accuracy(Design& design, const Section& top) {
    const Section accuracy{top.entry("accuracy"), "accuracy", top.state()};
    if (!accuracy.given())
        return;
    Tolerances& slips = design.tolerances;
    slips.marking_mm = accuracy.length("marking", 0.0, 20.0).value_or(slips.marking_mm);
    read_slip(slips.style_height, accuracy, "style height");
    read_slip(slips.substyle, accuracy, "substyle");
    read_slip(slips.facing, accuracy, "facing");
    read_slip(slips.lean, accuracy, "lean");
    slips.print_mm = accuracy.length("print", 0.0, 5.0).value_or(slips.print_mm);
    read_slip(slips.position, accuracy, "position");
}

} // namespace dialwright::cli
