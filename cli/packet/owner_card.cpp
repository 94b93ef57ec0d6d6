// SPDX-License-Identifier: MIT
//
// The owner's card is for one who has never read a dial: how the shadow is read, how the reading becomes clock time, with
// an example, and what the dial wants of its owner. Care of metal and stone: common practice, no source.
#include "cli/packet/owner_card.hpp"

#include "cli/plan/correction_plan.hpp"
#include "cli/report/say.hpp"
#include "layout/correction/words.hpp"
#include "layout/sheet/flow.hpp"

#include <cmath>
#include <fmt/format.h>
#include <stdexcept>

namespace dialwright::cli {
namespace {

using layout::Drawing;
using layout::Flow;

std::string what_it_is(const Design& design) {
    static constexpr const char* k_kinds[] = {"A level dial", "A dial on a wall", "A leaning dial",
                                              "An equatorial dial"};
    std::string text = k_kinds[static_cast<std::size_t>(design.dial.kind)];
    if (!design.place.name.empty())
        text += " at " + design.place.name;
    text += fmt::format(" ({}, {}), made for this place alone. ", say_latitude(design.place.site.latitude),
                        say_longitude(design.place.site.longitude));
    switch (design.hours.time) {
    case HourTime::sun:
        return text + "It shows the Sun’s own time here: at twelve the Sun stands in the meridian.";
    case HourTime::zone:
        return text + "It shows the Sun’s time, shifted by the longitude to the meridian of the zone’s clocks.";
    case HourTime::clock:
        return text + "It shows the standard time of the zone’s clocks, by hours that are curves through the year.";
    case HourTime::since_sunrise:
        return text + "It counts equal hours since the Sun rose.";
    case HourTime::since_sunset:
        return text + "It counts equal hours since the Sun last set.";
    case HourTime::to_sunset:
        return text + "It counts the equal hours that are left until the Sun sets.";
    case HourTime::unequal:
        break;
    }
    return text + "It parts the day from sunrise to sunset into twelve hours, long in summer and short in winter.";
}

std::vector<std::string> how_to_read(const Design& design) {
    static constexpr const char* k_nodi[] = {"notch", "ball", "tip", "hole"};
    const std::string nodus = k_nodi[static_cast<std::size_t>(design.gnomon.nodus)];
    const std::string spot = design.gnomon.nodus == NodusKind::hole ? "the spot of light from the gnomon’s hole"
                                                                    : "the shadow of the gnomon’s " + nodus;
    const bool by_style =
        has_style(design.gnomon.kind) && (design.hours.time == HourTime::sun || design.hours.time == HourTime::zone);
    std::vector<std::string> list;
    if (!by_style)
        list.push_back(fmt::format("The time is where {} stands among the hour lines.", spot));
    else if (design.gnomon.kind == GnomonKind::rod)
        list.push_back("The time is where the middle of the rod’s shadow lies among the hour lines.");
    else
        list.push_back("The time is where the shadow of the gnomon’s straight edge lies among the hour lines.");
    list.push_back(
        "Between two lines, judge by eye how far the shadow has gone from one to the next. Its edge is soft: "
        "read its middle.");
    if (design.hours.time == HourTime::clock)
        list.push_back(
            design.hours.curves == HalfYear::whole
                ? "An hour’s curve is crossed twice a year: one side of it serves from December to June, the "
                  "other from June to December."
                : fmt::format("These curves serve from {} alone.", design.hours.curves == HalfYear::december_to_june
                                                                       ? "December to June"
                                                                       : "June to December"));
    if (design.dates.solstices || design.dates.equinoxes || design.dates.signs || design.dates.months ||
        !design.dates.days.empty())
        list.push_back(fmt::format("The season is where {} stands among the lines that cross the hours.", spot));
    return list;
}

std::string clock_of(double hours) {
    return say_clock(hours).substr(0, 5);
}

/// "On 11 February the dial shows 11:00. Add 14: clock time is 11:14."
std::string example(const Correction& correction, std::chrono::month_day date, double dial_h, bool summer) {
    const double minutes = std::round(correction.add_min(date));
    const std::string change = minutes == 0  ? "Nothing is added or taken"
                               : minutes > 0 ? "Add " + layout::minutes_figure(minutes)
                                             : "Take " + layout::minutes_figure(minutes);
    const double ahead_h = summer ? double(correction.summer().ahead.count()) / 3600 : 0.0;
    const std::string more =
        summer ? fmt::format(", and add {} for summer time", layout::say_ahead(correction.summer().ahead)) : "";
    return fmt::format("On {} the dial shows {}. {}{}{}: clock time is {}{}.", layout::say_date(date), clock_of(dial_h),
                       change, minutes == 0 || std::abs(minutes) >= 60 ? "" : " minutes", more,
                       clock_of(dial_h + minutes / 60 + ahead_h),
                       correction.summer().kind == SummerTime::Kind::irregular ? ", standard time" : "");
}

/// A date in the middle of summer time.
std::chrono::month_day summer_day(const SummerTime& summer) {
    const bool south = summer.begins.month > summer.ends.month;
    return south ? std::chrono::January / 15 : std::chrono::July / 15;
}

std::vector<std::string> examples(const Correction& correction, const Design& design) {
    const SummerTime& summer = correction.summer();
    // In the other half of the year, on the day that differs most from the dial.
    const bool south = summer.kind == SummerTime::Kind::yearly && summer.begins.month > summer.ends.month;
    const std::chrono::month_day winter = south ? std::chrono::July / 26 : std::chrono::February / 11;
    std::vector<std::string> list{example(correction, winter, 11, false)};
    if (summer.kind == SummerTime::Kind::yearly && !design.hours.summer_numerals)
        list.push_back(example(correction, summer_day(summer), 15, true));
    return list;
}

/// Months side by side, their tenth days below each other.
void put_table(Flow& flow, const Correction& correction) {
    std::vector<Flow::Column> columns{{"", layout::Align::right}};
    for (unsigned month = 1; month <= 12; ++month)
        columns.push_back({std::string{layout::month_name(month)}.substr(0, 3), layout::Align::right});
    std::vector<std::vector<std::string>> rows;
    for (const unsigned day : {1U, 11U, 21U}) {
        std::vector<std::string> row{fmt::format("{}", day)};
        for (unsigned month = 1; month <= 12; ++month)
            row.push_back(layout::add_or_take(correction.add_min(std::chrono::month{month} / std::chrono::day{day})));
        rows.push_back(std::move(row));
    }
    flow.table(columns, rows, 2.5);
}

/// The graph as it stands on paper: no outline to cut.
std::shared_ptr<const Drawing> graph_for_paper(const Correction& correction, const Design& design) {
    layout::CorrectionSpec spec = correction_spec(design);
    spec.form = CorrectionForm::graph;
    spec.width_mm = 180;
    spec.height_mm = 78;
    spec.sentences = false;
    spec.letter_height_mm = 2.4;
    spec.cutting = {};
    spec.cutting.line_width_mm = 0.25;
    spec.cutting.least_gap_mm = 0.35;
    try {
        auto drawing = std::make_shared<Drawing>(layout::draw_correction(correction, spec).drawing);
        std::erase_if(drawing->marks, [](const layout::Mark& mark) { return mark.layer == layout::Layer::cut; });
        return drawing;
    } catch (const std::invalid_argument&) {
        return nullptr; // letters too wide for the picture: the table says the same
    }
}

void put_correction(Flow& flow, const Commission& commission) {
    const Design& design = commission.design;
    flow.heading("From the dial to the clock");
    if (!commission.correction) {
        flow.paragraph(
            "These hours are longer or shorter, or begin at another moment, from day to day: no minutes of a "
            "date turn them into clock time.");
        return;
    }
    const Correction& correction = *commission.correction;
    flow.paragraph(layout::say_rule(correction, 1e-9));
    if (const std::string summer = layout::say_summer(correction.summer(), design.hours.summer_numerals);
        !summer.empty())
        flow.paragraph(summer);
    else
        flow.paragraph("The zone keeps no summer time.");
    for (const std::string& limit : layout::say_limits(correction))
        flow.paragraph(limit);
    if (!correction.is_needed())
        return;
    for (const std::string& one : examples(correction, design))
        flow.paragraph(one, "•");
    flow.space(1.5);
    if (const auto graph = graph_for_paper(correction, design)) {
        const double width = std::min(flow.width(), 180.0);
        flow.picture(graph, width, width * 78 / 180);
    }
    flow.space(2);
    put_table(flow, correction);
    const auto spread = correction.spread();
    flow.paragraph(fmt::format("Whole minutes; the mean of {} to {}, from which a single year differs by at most {} s. "
                               "Between two days the minutes lie between theirs.",
                               design.years.first, design.years.last, std::ceil(spread.seconds)));
}

void put_care(Flow& flow) {
    flow.list("What the dial wants of you",
              {"Never look at the Sun, not to read the dial and not to check it: its shadow says all.",
               "Mind the gnomon’s tip and edges, and show them to children. Metal in the Sun can burn.",
               "Wash it with water and a soft brush. No acid, no wire, no polish in the lines; leave the patina.",
               "Hang nothing from the gnomon: bent by a degree, it is wrong by minutes. If the dial has been moved or "
               "struck, have it tried against a clock before it is fixed again.",
               "Do not turn it to follow summer time: what the clocks add is added in the mind."});
    flow.heading("Whom to ask");
    flow.space(2);
    flow.paragraph(
        "Made by  .............................................................  in the year  ..............");
    flow.space(1);
    flow.paragraph("With this card belongs the design file: from it the dial can be made again.");
}

} // namespace

std::vector<layout::Sheet> owner_card(const Commission& commission, const layout::PrintOptions& options) {
    const Design& design = commission.design;
    Flow flow{options, "For the owner"};
    flow.paragraph(design.title, "", true, 5);
    flow.paragraph("For the owner of this dial");
    flow.space(1);
    flow.heading("What it is");
    flow.paragraph(what_it_is(design));
    flow.list("How to read it", how_to_read(design));
    put_correction(flow, commission);
    put_care(flow);
    return flow.sheets();
}

} // namespace dialwright::cli
