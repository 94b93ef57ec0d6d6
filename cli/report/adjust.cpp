// SPDX-License-Identifier: MIT
#include "cli/report/adjust.hpp"
#include "cli/design/quantity.hpp"
#include "cli/report/json_text.hpp"
#include "cli/report/lines_of_text.hpp"
#include "cli/report/ranges.hpp"
#include "cli/report/say.hpp"
#include "cli/report/text_table.hpp"
#include "engine/time/instant_text.hpp"
#include "layout/plate/outline.hpp"
#include "layout/sheet/flow.hpp"

#include <cmath>

namespace dialwright::cli {
namespace {

using Fault = AdjustAnswer::Fault;

std::string title_of(const AdjustFile& file, const Commission& commission) {
    return file.title.empty() ? commission.design.title : file.title;
}

std::vector<TableRow> reading_rows(const AdjustFile& file, const DialAdjustment& found) {
    std::vector<TableRow> rows;
    const AdjustAnswer& first = found.answers.front();
    for (std::size_t i = 0; i < file.readings.readings.size(); ++i) {
        const DialReading& reading = file.readings.readings[i];
        rows.push_back({std::to_string(i + 1), say_moment(*file.zone, reading.at), hour_text(reading.reads_h),
                        say_signed(found.as_designed_min[i], 1), say_signed(first.off_min[i], 1),
                        first.stray[i] ? "left out" : ""});
    }
    return rows;
}

const char* fault_name(Fault fault) {
    static constexpr const char* k_names[] = {"fixing", "level", "style", "both"};
    return k_names[std::size_t(fault)];
}

Json answer_json(const AdjustAnswer& answer, const AdjustWords& words) {
    return {{"fault", fault_name(answer.fault)},
            {"turn_deg", json_found(answer.turn)},
            {"top_deg", json_found(answer.top)},
            {"right_deg", json_found(answer.right)},
            {"style_height_deg", json_found(answer.style_height)},
            {"style_side_deg", json_found(answer.style_right)},
            {"clock_slow_s", json_found(answer.clock_s)},
            {"scatter_min", answer.scatter_min > 0 ? json_number(answer.scatter_min) : Json{}},
            {"steps", words.steps}};
}

std::string sentence(const std::string& text) {
    std::string made = with_capital(text);
    made += '.';
    return made;
}

} // namespace

std::string adjust_text(const AdjustFile& file, const DialAdjustment& found, const AdjustReport& report,
                        const Commission& commission) {
    LinesOfText text;
    text.line("{}", title_of(file, commission));
    text.line("  every ± here holds 19 times in 20");
    for (const AdjustWords& way : report.ways) {
        text.gap();
        text.line("{}", way.if_so.empty() ? "As it stands:" : with_capital(way.if_so) + ":");
        for (const std::string& one : way.stands)
            text.line("  {}", one);
        if (way.steps.empty() && !way.proved_off)
            text.line("  nothing that these readings prove wrong");
        for (std::size_t i = 0; i < way.steps.size(); ++i)
            text.line("  {} {}", i == 0 ? "do:" : "   ", way.steps[i]);
    }
    text.gap();
    using layout::Align;
    text.add(text_table({{"", Align::right},
                         {"clock"},
                         {"read", Align::right},
                         {"off, min", Align::right},
                         {"left, min", Align::right}},
                        reading_rows(file, found), 2));
    text.line("  off: from what the dial should read; left: from what it would read as it is said to stand first");
    if (found.checked)
        text.line("  scatter {} min", fixed(found.answers.front().scatter_min, 1));
    return text.taken();
}

std::string adjust_json(const AdjustFile& file, const DialAdjustment& found, const AdjustReport& report,
                        const Commission& commission) {
    Json out{{"format", 1}, {"title", title_of(file, commission)}, {"checked", found.checked}};
    Json answers = Json::array();
    for (std::size_t i = 0; i < found.answers.size(); ++i)
        answers.push_back(answer_json(found.answers[i], report.ways[i]));
    out["answers"] = std::move(answers);
    out["if_level"] = found.if_level ? answer_json(*found.if_level, report.ways.back()) : Json{};
    out["style_shows_from_deg"] = found.style_asked && found.checked ? json_number(found.style_told_deg) : Json{};
    Json readings = Json::array();
    for (std::size_t i = 0; i < file.readings.readings.size(); ++i)
        readings.push_back({{"at", write_instant(file.readings.readings[i].at)},
                            {"reads_h", json_number(file.readings.readings[i].reads_h)},
                            {"off_min", json_number(found.as_designed_min[i])},
                            {"left_min", json_number(found.answers.front().off_min[i])},
                            {"left_out", bool(found.answers.front().stray[i])}});
    out["readings"] = std::move(readings);
    out["notes"] = report.notes;
    return json_text(out);
}

std::vector<layout::Sheet> adjust_sheets(const AdjustFile& file, const AdjustReport& report,
                                         const Commission& commission, const layout::PrintOptions& options) {
    layout::Flow flow{options, "Adjusting the dial"};
    flow.heading("Adjusting the dial: " + title_of(file, commission));
    flow.paragraph(
        "Every ± holds 19 times in 20. Never look at the Sun: work from the shadow. A heavy plate wants help or gear; "
        "see that it can't slide or fall while it is loose.");
    for (const AdjustWords& way : report.ways) {
        flow.heading(way.if_so.empty() ? "As it stands" : with_capital(way.if_so));
        std::vector<std::string> stands, steps;
        for (const std::string& one : way.stands)
            stands.push_back(sentence(one));
        for (const std::string& one : way.steps)
            steps.push_back(sentence(one));
        if (steps.empty() && !way.proved_off)
            steps.push_back("Nothing that the readings prove wrong.");
        flow.list("", stands);
        flow.list("What to do", steps, true);
    }
    flow.list("Mind", report.notes);
    flow.heading("Readings after");
    const std::string blank = "..............................";
    flow.table({{"day"}, {"clock"}, {"dial reads"}}, std::vector<std::vector<std::string>>(12, {blank, blank, blank}));
    return flow.sheets();
}

namespace {

/// What a remounted plate wants, in words, and the rise of its wedge.
struct MovedWords {
    std::string turn, wedge;
    double rise_mm = 0;
};

MovedWords moved_words(const Commission& commission, const DialPlan& plan, const Remounting& made) {
    const bool level = abs(plan.attitude.normal_altitude) > Angle::degrees(89.9);
    const layout::Box box = layout::Outline::of(commission.design.plate).box();
    constexpr double k_nothing_deg = 0.5 / 60;
    MovedWords words;
    const double turn = made.turn.in_degrees(), wedge = made.wedge.in_degrees();
    words.turn = std::abs(turn) < k_nothing_deg
                     ? "no turn in its own plane"
                     : fmt::format("turn it {}° {} in its own plane, as seen {}", fixed(std::abs(turn), 2),
                                   turn > 0 ? "anticlockwise" : "clockwise", level ? "from above" : "by who faces it");
    if (wedge < k_nothing_deg) {
        words.wedge = "no wedge";
        return words;
    }
    // How far the plate reaches along the wedge.
    const double across =
        box.width_mm() * std::abs(sin(made.wedge_towards)) + box.height_mm() * std::abs(cos(made.wedge_towards));
    words.rise_mm = across * tan(made.wedge);
    const std::string rise =
        made.wedge < Angle::degrees(80)
            ? fmt::format(", {} over {} of plate", say_length(words.rise_mm, commission.design.units == Units::inches),
                          say_length(across, commission.design.units == Units::inches))
            : std::string{};
    words.wedge = fmt::format("then {} {}° {} its edge towards {}{}", level ? "a wedge of" : "tilt it by",
                              fixed(wedge, 2), level ? "under" : "outwards at",
                              level ? say_bearing(made.wedge_towards)
                                    : fixed(made.wedge_towards.in_degrees(), 1) + "° clockwise from its top",
                              rise);
    return words;
}

} // namespace

std::string moved_text(const Commission& commission, const DialPlan& plan, const Site& there, Angle zone_meridian) {
    const Remounting made = remounted(plan, there, zone_meridian);
    const MovedWords words = moved_words(commission, plan, made);
    LinesOfText text;
    text.line("{}, cut for {}, {}", commission.design.title, say_latitude(plan.site.latitude),
              say_longitude(plan.site.longitude));
    text.line("  to serve at  {}, {}", say_latitude(there.latitude), say_longitude(there.longitude));
    text.line("  from how it stands by the design:");
    text.line("  1. {}", words.turn);
    text.line("  2. {}", words.wedge);
    text.line("  its plate then is {}", say_attitude(made.attitude));
    if (plan.hours.time == HourTime::sun)
        text.line("  it shows the Sun's time of its new place");
    else if (plan.hours.time == HourTime::zone || plan.hours.time == HourTime::clock)
        text.line("  it shows the time of the meridian {}", say_longitude(zone_meridian));
    if (!plan.hours.first_h)
        text.line("  hours that the Sun reaches there but not at the old place have no lines");
    return text.taken();
}

std::string moved_json(const Commission& commission, const DialPlan& plan, const Site& there, Angle zone_meridian) {
    const Remounting made = remounted(plan, there, zone_meridian);
    const MovedWords words = moved_words(commission, plan, made);
    const Json out{{"format", 1},
                   {"title", commission.design.title},
                   {"latitude_deg", json_number(there.latitude.in_degrees())},
                   {"longitude_deg", json_number(there.longitude.in_degrees())},
                   {"turn_deg", json_number(made.turn.in_degrees())},
                   {"wedge_deg", json_number(made.wedge.in_degrees())},
                   {"wedge_towards_deg", json_number(made.wedge_towards.in_degrees())},
                   {"rise_mm", json_number(words.rise_mm)},
                   {"normal_azimuth_deg", json_number(made.attitude.normal_azimuth.in_degrees())},
                   {"normal_altitude_deg", json_number(made.attitude.normal_altitude.in_degrees())}};
    return json_text(out);
}

} // namespace dialwright::cli
