// SPDX-License-Identifier: MIT
#include "cli/report/fixing_words.hpp"

#include "cli/report/say.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using layout::Align;

std::string degrees_text(double degrees, int decimals) {
    return fixed(degrees, decimals) + "°";
}

/// "+2.61", "-0.40".
std::string signed_text(double minutes) {
    const std::string text = fixed(minutes, 2);
    return text.starts_with('-') ? text : "+" + text;
}

/// A wedge or a shift over a length, for an angle.
std::string over(double length_mm, Angle angle, bool inches) {
    return say_length(length_mm * tan(abs(angle)), inches);
}

/// One motion of the plate: the hour at which it tells most, and what to do there.
struct Motion {
    double FixingAnswer::*rate;
    std::string forward, backward; ///< "clockwise as seen from above", and the other way
    double arm_mm;                 ///< how far from the axis the plate's edge is
    std::string where;             ///< "at the plate's edge, 180.0 mm from its middle"
};

std::string motion_text(const Motion& motion, const std::vector<FixingAnswer>& answers, const Zone& zone, bool inches) {
    const auto rate_of = [&](const FixingAnswer& answer) { return answer.*motion.rate; };
    const FixingAnswer& most =
        *std::max_element(answers.begin(), answers.end(), [&](const FixingAnswer& a, const FixingAnswer& b) {
            return std::abs(rate_of(a)) < std::abs(rate_of(b));
        });
    const double rate = rate_of(most);
    constexpr double k_no_answer = 0.05; // minutes a degree
    if (std::abs(rate) < k_no_answer)
        return fmt::format("Moved {}, it reads the same all day: only level and plumb line can tell.", motion.forward);
    const Angle a_minute = Angle::degrees(1 / std::abs(rate));
    const bool both_signs = std::any_of(answers.begin(), answers.end(), [&](const FixingAnswer& answer) {
        return rate_of(answer) * rate < 0 && std::abs(rate_of(answer)) > k_no_answer;
    });
    const std::string& when_slow = rate > 0 ? motion.forward : motion.backward;
    return fmt::format("Where it is slow at {}, move it {}: {} ({} {}) is a minute. Where it is fast, the other way.{}",
                       say_clock(zone, most.at).substr(0, 5), when_slow, degrees_text(a_minute.in_degrees(), 2),
                       over(motion.arm_mm, a_minute, inches), motion.where,
                       both_signs ? " At other hours it may be the other way about: the table's sign tells." : "");
}

} // namespace

PlateWords plate_words(const Design& design) {
    if (design.dial.kind == DialKind::level)
        return {"east",           "north",           "turned clockwise", "north edge down",
                "east edge down", "north edge down", "east edge down"};
    return {"right",
            "up",
            "turned clockwise (from above)",
            "top back",
            "rolled clockwise",
            "top back",
            "rolled clockwise in its own plane"};
}

std::string reading_words(double hours) {
    const long tenths = ((std::lround(hours * 600) % 14400) + 14400) % 14400;
    return fmt::format("{}:{:02}.{}", tenths / 600, tenths / 10 % 60, tenths % 10);
}

std::vector<layout::Flow::Column> noon_columns() {
    return {{"date", Align::right},
            {"local noon by the clock", Align::left},
            {"Sun's height", Align::right},
            {"the dial then reads", Align::right},
            {"equation of time", Align::left}};
}

TableRow noon_row(const Fixing& fixing, const FixingDate& date) {
    const SunEvent* noon = date.day.first(SunEvent::Kind::noon);
    if (noon == nullptr)
        return {say_date(date.day.date), "none on this date", "", "", ""};
    const Instant at[] = {noon->at};
    const ShadowReport then = shadow_reports(*fixing.commission, at, std::nullopt).front();
    return {say_date(date.day.date), say_clock(fixing.zone, noon->at) + ' ' + fixing.zone.at(noon->at).abbreviation,
            degrees_text(noon->altitude.in_degrees(), 2), then.reads_h ? reading_words(*then.reads_h) : "unlit",
            say_equation(date.day.equation_of_time)};
}

std::vector<layout::Flow::Column> pair_columns() {
    return {{"before noon", Align::left},
            {"after noon", Align::left},
            {"Sun's height", Align::right},
            {"shadow of a 100 mm peg", Align::right},
            {"the middle lies off the meridian by", Align::right}};
}

std::vector<TableRow> pair_rows(const Fixing& fixing, const FixingDate& date) {
    std::vector<TableRow> rows;
    for (const EqualAltitudes& pair : date.pairs) {
        const double off = pair.middle_off.in_degrees();
        rows.push_back({say_clock(fixing.zone, pair.before), say_clock(fixing.zone, pair.after),
                        degrees_text(pair.altitude.in_degrees(), 2), fixed(100 / tan(pair.altitude), 1) + " mm",
                        std::abs(off) < 0.005 ? "nothing"
                                              : fmt::format("{} {}", degrees_text(std::abs(off), 2),
                                                            off > 0 ? "clockwise" : "anticlockwise")});
    }
    return rows;
}

std::vector<layout::Flow::Column> answer_columns(const Fixing& fixing) {
    const PlateWords words = plate_words(fixing.commission->design);
    return {{"clock", Align::left},
            {"reads", Align::right},
            {words.turn, Align::right},
            {words.tip, Align::right},
            {words.roll, Align::right}};
}

std::vector<TableRow> answer_rows(const Fixing& fixing, std::size_t face) {
    std::vector<TableRow> rows;
    for (const FixingAnswer& answer : fixing.answers[face])
        rows.push_back({say_clock(fixing.zone, answer.at).substr(0, 5), reading_words(answer.reads_h),
                        signed_text(answer.turn_min), signed_text(answer.tip_min), signed_text(answer.roll_min)});
    return rows;
}

std::string north_words() {
    return "At local noon the shadow of a plumb line lies along true north and south: mark two points of it. Or stand "
           "a peg "
           "plumb on a level board and mark its shadow's tip at a time before noon in the table of equal shadows; draw "
           "the "
           "circle round the peg through the mark, and mark where the tip comes to the circle again, near the time "
           "after noon. "
           "The middle between the two shadows is the meridian, but for the angle in the last column, as seen from "
           "above. "
           "Two pairs that agree are proof.";
}

std::vector<std::string> level_words(const Fixing& fixing, std::size_t face) {
    const Commission& commission = *fixing.commission;
    const Design& design = commission.design;
    const bool inches = design.units == Units::inches;
    const Attitude& attitude = commission.plans[face].dial.attitude;
    const double width = design.plate.width_mm, height = design.plate.height_mm;
    const Angle a_millimetre = arc_tangent(1, width);
    const std::string fine = fmt::format("1 mm over the plate's width of {} is {}.", say_length(width, inches),
                                         degrees_text(a_millimetre.in_degrees(), 2));
    std::vector<std::string> list;
    if (design.dial.kind == DialKind::level) {
        list.push_back(
            "Lay a spirit level on the plate along north and south, and again along east and west; turn it end "
            "for end to prove it. " +
            fine);
    } else {
        list.push_back("The plate's level edge first: a spirit level along its foot, turned end for end. " + fine);
        const Angle lean = attitude.normal_altitude;
        const Angle slope = Angle::degrees(90) - abs(lean);
        if (abs(lean) < Angle::degrees(0.02))
            list.push_back(
                "It stands upright: a plumb line hung before it keeps the same distance from top to bottom.");
        else
            list.push_back(fmt::format(
                "It leans {} by {}: over its height of {} a plumb line's distance changes by {}. Against the level its "
                "slope is {}.",
                lean > Angle{} ? "back" : "forward", degrees_minutes(abs(lean)), say_length(height, inches),
                say_length(height * sin(abs(lean)), inches), degrees_minutes(slope)));
        list.push_back(fmt::format("It looks to azimuth {} ({}).",
                                   degrees_text(attitude.normal_azimuth.in_degrees(), 2),
                                   say_bearing(attitude.normal_azimuth)));
    }
    const Style& style = commission.faces[face].delineation.style;
    if (!has_style(design.gnomon.kind))
        list.push_back(fmt::format("The nodus stands {} above the plate, square over its foot.",
                                   say_length(commission.faces[face].placement.nodus_height_mm, inches)));
    else if (style.height < Angle::degrees(89.9))
        list.push_back(
            fmt::format("The style stands {} above the plate over the substyle: prove it with the gauge. A gap of "
                        "1 mm at 120 mm along the gauge's edge is 0.48°.",
                        degrees_minutes(style.height)));
    else
        list.emplace_back("The style stands square on the plate: prove it with a square from two sides.");
    return list;
}

std::vector<std::string> move_words(const Fixing& fixing, std::size_t face) {
    const std::vector<FixingAnswer>& answers = fixing.answers[face];
    if (answers.empty())
        return {};
    const Design& design = fixing.commission->design;
    const bool inches = design.units == Units::inches, level = design.dial.kind == DialKind::level;
    const double width = design.plate.width_mm, height = design.plate.height_mm;
    const std::string at_edge = fmt::format("at {} from its middle", say_length(width / 2, inches));
    const std::vector<Motion> motions{
        {&FixingAnswer::turn_min, "clockwise as seen from above", "anticlockwise as seen from above", width / 2,
         at_edge},
        {&FixingAnswer::tip_min, level ? "with its north edge down" : "with its top back, away from you",
         level ? "with its north edge up" : "with its top forward, towards you", height,
         fmt::format("over its {} of {}", level ? "depth" : "height", say_length(height, inches))},
        {&FixingAnswer::roll_min, level ? "with its east edge down" : "clockwise in its own plane as you face it",
         level ? "with its east edge up" : "anticlockwise in its own plane as you face it", level ? width : width / 2,
         level ? fmt::format("over its width of {}", say_length(width, inches)) : at_edge}};
    std::vector<std::string> list{
        "Level or plumb it by the tool first, and turn it by the Sun last. Fast: it reads more than "
        "the table says; slow: less."};
    for (const Motion& motion : motions)
        list.push_back(motion_text(motion, answers, fixing.zone, inches));
    return list;
}

} // namespace dialwright::cli
