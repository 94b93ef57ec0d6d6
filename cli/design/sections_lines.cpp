// SPDX-License-Identifier: MIT
// Which lines the dial bears: hours and dates.
#include "cli/design/sections.hpp"
#include "engine/time/zone.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <chrono>
#include <vector>

namespace dialwright::cli {

namespace {

constexpr std::array<Choice<Numerals>, 3> k_numerals = {
    {{"roman", Numerals::roman}, {"roman iiii", Numerals::roman_iiii}, {"arabic", Numerals::arabic}}};
constexpr std::array<Choice<NumeralStand>, 2> k_stands = {
    {{"along border", NumeralStand::along_border}, {"upright", NumeralStand::upright}}};
constexpr std::array<Choice<HalfYear>, 3> k_curves = {{{"whole", HalfYear::whole},
                                                       {"december to june", HalfYear::december_to_june},
                                                       {"june to december", HalfYear::june_to_december}}};
constexpr std::array<Choice<HourExtent>, 2> k_reaches = {{{"style", HourExtent::style}, {"season", HourExtent::nodus}}};
constexpr std::array<Choice<bool>, 2> k_rises = {{{"level horizon", false}, {"seen", true}}};
constexpr std::array k_divisions_min = {60, 30, 15, 10, 5, 2, 1};
constexpr std::size_t k_most_days = 100;
constexpr std::size_t k_longest_label = 80;

void read_division(Design& design, const Section& hours) {
    const auto division = hours.read("divide", minutes);
    if (!division)
        return;
    if (std::find(k_divisions_min.begin(), k_divisions_min.end(), *division) == k_divisions_min.end())
        hours.error("divide", in_quotes(*hours.text("divide")) + " does not divide an hour as dials do",
                    "give 60, 30, 15, 10, 5, 2 or 1 min");
    else
        design.hours.divide_min = *division;
}

void read_first_and_last(Hours& made, const Section& hours) {
    const auto hour = [&](std::string_view key) {
        return hours.read<double>(key, [&](std::string_view text) { return hour_on(made.time, text); });
    };
    made.first_h = hour("from");
    made.last_h = hour("to");
    if (made.first_h && made.last_h && *made.first_h > *made.last_h)
        hours.error("to",
                    fmt::format("the hours end at {}, before they start at {}", hour_text(*made.last_h),
                                hour_text(*made.first_h)),
                    "give \"from\" the earlier hour; afternoon hours as in 20:00 or 8 pm");
}

void read_reach(Design& design, const Section& hours) {
    const auto reach = hours.choice<HourExtent>("reach", k_reaches);
    if (!reach)
        return;
    design.hours.reach = *reach;
    if (*reach == HourExtent::style && !has_style(design.gnomon.kind) && !hours.state().faulty("gnomon: kind"))
        hours.error("reach", "a pin or a disc has no style to throw a whole line",
                    "give season, or make the gnomon \"kind: edge\" or \"kind: rod\"");
}

/// The zone's clocks are put forward at some time of the year.
bool has_summer_time(const Zone& zone, int year) {
    using namespace std::chrono;
    const Instant first{sys_days{std::chrono::year{year} / January / 1}};
    const Instant next{sys_days{std::chrono::year{year + 1} / January / 1}};
    const std::vector<Instant> changes = zone.changes(first, next);
    const auto in_summer_time = [&](Instant at) { return zone.at(at).summer_time > seconds{0}; };
    return in_summer_time(first) || std::any_of(changes.begin(), changes.end(), in_summer_time);
}

void read_summer_numerals(Design& design, const Section& hours) {
    hours.read_into(design.hours.summer_numerals, "summer numerals", yes_or_no);
    if (!design.hours.summer_numerals || hours.state().faulty("hours: time"))
        return;
    const int year = design.years.first;
    const auto zone = Zone::find(design.place.zone);
    if (design.hours.time != HourTime::zone && design.hours.time != HourTime::clock)
        hours.error("summer numerals", "only the zone's own time has a summer time",
                    "leave the key out, or give \"time: zone\" or \"time: clock\"");
    else if (zone && !has_summer_time(*zone, year))
        hours.error("summer numerals", fmt::format("{} has no summer time in {}", zone->name(), year),
                    "leave the key out");
}

/// An item of "days": a plain date, or a date with its label.
std::optional<NamedDay> read_named_day(const Node& item, ReadingState& state) {
    const std::string hint = "write \"- 14 June\", or \"- {on: 14 June, label: the name}\"";
    if (item.kind == Node::Kind::text) {
        const auto day = day_of_year(item.text);
        if (day)
            return NamedDay{*day, day_text(*day)};
        state.error(item.at, "dates: days", day.trouble().message, day.trouble().hint);
        return std::nullopt;
    }
    if (item.kind == Node::Kind::refused)
        return std::nullopt;
    if (item.kind != Node::Kind::mapping) {
        state.error(item.at, "dates: days", fmt::format("{} stands where a day is wanted", kind_name(item)), hint);
        return std::nullopt;
    }
    const Section section{item, "dates: days", state};
    if (!section.has("on"))
        section.missing("on", hint);
    const auto day = section.read("on", day_of_year);
    const auto label = section.line("label", k_longest_label);
    if (!day)
        return std::nullopt;
    return NamedDay{*day, label.value_or(day_text(*day))};
}

void read_days(Design& design, const Section& dates) {
    const Entry* entry = dates.entry("days");
    if (entry == nullptr || entry->value.kind == Node::Kind::refused)
        return;
    const Node& list = entry->value;
    if (list.kind != Node::Kind::list || list.items.size() > k_most_days) {
        const std::string found = list.kind == Node::Kind::list
                                      ? fmt::format("{} days are given", list.items.size())
                                      : fmt::format("{} stands where a list of days is wanted", kind_name(list));
        dates.error("days", found, fmt::format("give a list of at most {}, as in [14 June, 1 May]", k_most_days));
        return;
    }
    for (const Node& item : list.items) {
        const auto named = read_named_day(item, dates.state());
        if (!named)
            continue;
        const auto same = [&](const NamedDay& other) { return other.day == named->day; };
        if (std::any_of(design.dates.days.begin(), design.dates.days.end(), same))
            dates.state().error(item.at, "dates: days", day_text(named->day) + " is given twice", "keep one of them");
        else
            design.dates.days.push_back(*named);
    }
}

} // namespace

void read_hours(Design& design, const Section& top) {
    const Section hours{top.entry("hours"), "hours", top.state()};
    Hours& made = design.hours;
    made.time = hours.choice<HourTime>("time", k_hour_times).value_or(made.time);
    read_first_and_last(made, hours);
    read_division(design, hours);
    made.numerals = hours.choice<Numerals>("numerals", k_numerals).value_or(made.numerals);
    if (const auto count = hours.read("count", whole_number)) {
        if (*count == 12 || *count == 24)
            made.count = *count;
        else
            hours.error("count", fmt::format("hours are not counted to {}", *count), "give 12 or 24");
    }
    made.stand = hours.choice<NumeralStand>("stand", k_stands).value_or(made.stand);
    made.curves = hours.choice<HalfYear>("curves", k_curves).value_or(made.curves);
    hours.read_into(made.noon_mark, "noon mark", yes_or_no);
    read_reach(design, hours);
    read_summer_numerals(design, hours);
    made.seen_rise = hours.choice<bool>("rise and set", k_rises).value_or(made.seen_rise);
}

void read_dates(Design& design, const Section& top) {
    const Section dates{top.entry("dates"), "dates", top.state()};
    Dates& made = design.dates;
    dates.read_into(made.solstices, "solstices", yes_or_no);
    dates.read_into(made.equinoxes, "equinoxes", yes_or_no);
    dates.read_into(made.signs, "signs", yes_or_no);
    dates.read_into(made.months, "months", yes_or_no);
    read_days(design, dates);
    dates.read_into(made.labels, "labels", yes_or_no);
}

} // namespace dialwright::cli
