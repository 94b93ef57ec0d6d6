// SPDX-License-Identifier: MIT
#include "cli/report/sun.hpp"

#include "cli/report/json_text.hpp"
#include "cli/report/say.hpp"
#include "cli/report/text_table.hpp"
#include "engine/time/instant_text.hpp"
#include "layout/sheet/flow.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <iterator>

namespace dialwright::cli {
namespace {

using Kind = SunEvent::Kind;

bool left_out(const CivilDay& day) {
    return day.begin >= day.end;
}

bool any(const CivilDay& day, Kind kind) {
    return day.first(kind) != nullptr;
}

std::size_t count(const CivilDay& day, Kind kind) {
    return std::size_t(
        std::count_if(day.events.begin(), day.events.end(), [&](const SunEvent& event) { return event.kind == kind; }));
}

/// What is out of the common run on a date, in words; empty as a rule.
std::vector<std::string> remarks(const CivilDay& day) {
    std::vector<std::string> list;
    if (left_out(day)) {
        list.emplace_back("the zone's calendar has left this date out");
        return list;
    }
    if (!any(day, Kind::rise) && !any(day, Kind::set))
        list.emplace_back(day.up_at_begin ? "the Sun is up all day and all night" : "the Sun stays down all day");
    else if (!any(day, Kind::rise))
        list.emplace_back("the Sun does not rise on this date");
    else if (!any(day, Kind::set))
        list.emplace_back("the Sun does not set on this date");
    if (!any(day, Kind::noon))
        list.emplace_back("no noon on this date: the Sun's noons fall just before and just after it");
    for (const auto& [kind, name] :
         {std::pair{Kind::rise, "rises"}, {Kind::noon, "stands at noon"}, {Kind::set, "sets"}})
        if (count(day, kind) > 1)
            list.push_back(fmt::format("the Sun {} twice on this date", name));
    return list;
}

std::string events_text(const SunTable& table, const CivilDay& day, Kind kind) {
    std::string text;
    for (const SunEvent& event : day.events)
        if (event.kind == kind)
            text.append(text.empty() ? "" : ", ").append(say_clock(table.zone, event.at));
    return text;
}

std::string azimuth_text(const CivilDay& day, Kind kind) {
    const SunEvent* event = day.first(kind);
    return event != nullptr ? fixed(event->azimuth.in_degrees(), 1) + "°" : "";
}

std::string noon_height(const CivilDay& day) {
    const SunEvent* noon = day.first(Kind::noon);
    return noon != nullptr ? fixed(noon->altitude.in_degrees(), 2) + "°" : "";
}

/// "BST"; "GMT, BST" on a date on which the clocks change.
std::string clocks_text(const SunTable& table, const CivilDay& day) {
    if (left_out(day))
        return "";
    const std::string first = table.zone.at(day.begin).abbreviation;
    const std::string last = table.zone.at(day.end - std::chrono::seconds{1}).abbreviation;
    return first == last ? first : fmt::format("{}, {}", first, last);
}

std::string place_text(const SunTable& table) {
    return fmt::format("{}{}{}, {}, {}", table.name, table.name.empty() ? "" : ": ", say_latitude(table.site.latitude),
                       say_longitude(table.site.longitude), table.zone.name());
}

constexpr const char* k_seen = "Rise and set as people see them on a level horizon: the Sun's upper edge, with 34' of "
                               "refraction. The day's air can shift them by some tens of seconds.";
constexpr const char* k_bare = "Rise and set without refraction: the Sun's middle on the level horizon.";
constexpr const char* k_noon = "Noon is when the Sun stands in the meridian; its height there is without refraction, "
                               "as a dial is laid out. Azimuths run from true north through east.";

const char* horizon_text(const SunTable& table) {
    return table.refraction ? k_seen : k_bare;
}

std::string one_day(const SunTable& table, const CivilDay& day) {
    std::string text = fmt::format("{}\n{}\n", place_text(table), say_weekday_date(day.date));
    const auto put = std::back_inserter(text);
    for (const std::string& remark : remarks(day))
        fmt::format_to(put, "  {}\n", remark);
    if (left_out(day))
        return text;
    for (const SunEvent& event : day.events) {
        const std::string clock =
            fmt::format("{} {}", say_clock(table.zone, event.at), table.zone.at(event.at).abbreviation);
        const std::string azimuth =
            fmt::format("azimuth {}° ({})", fixed(event.azimuth.in_degrees(), 2), say_bearing(event.azimuth));
        if (event.kind == Kind::noon)
            fmt::format_to(put, "  {:<18} {}   height {}, {}\n", "noon", clock, both_ways(event.altitude),
                           event.altitude > Angle{} ? azimuth : "the Sun below the horizon");
        else
            fmt::format_to(put, "  {:<18} {}   {}\n", event.kind == Kind::rise ? "rise" : "set", clock, azimuth);
    }
    fmt::format_to(put, "  {:<18} {}\n", "day length", say_duration(day.up_for));
    fmt::format_to(put, "  {:<18} {}\n", "declination", both_ways(day.declination));
    fmt::format_to(put, "  {:<18} {}\n", "equation of time", say_equation(day.equation_of_time));
    fmt::format_to(put, "{}\n{}\n", horizon_text(table), k_noon);
    return text;
}

using Row = TableRow;

Row row_of(const SunTable& table, const CivilDay& day) {
    if (left_out(day))
        return {say_date(day.date), "", "", "", "", "", "", "", "", "", ""};
    return {say_date(day.date),
            clocks_text(table, day),
            events_text(table, day, Kind::rise),
            azimuth_text(day, Kind::rise),
            events_text(table, day, Kind::noon),
            noon_height(day),
            events_text(table, day, Kind::set),
            azimuth_text(day, Kind::set),
            say_duration(day.up_for),
            fixed(day.declination.in_degrees(), 2) + "°",
            say_equation(day.equation_of_time)};
}

const std::vector<layout::Flow::Column>& columns() {
    using layout::Align;
    static const std::vector<layout::Flow::Column> k_columns{{"date", Align::right},
                                                             {"clocks", Align::left},
                                                             {"rise", Align::left},
                                                             {"azimuth", Align::right},
                                                             {"noon", Align::left},
                                                             {"height", Align::right},
                                                             {"set", Align::left},
                                                             {"azimuth", Align::right},
                                                             {"daylight", Align::right},
                                                             {"decl.", Align::right},
                                                             {"equation of time", Align::left}};
    return k_columns;
}

std::string many_days(const SunTable& table) {
    std::vector<Row> rows;
    for (const CivilDay& day : table.days) {
        rows.push_back(row_of(table, day));
        for (std::string& remark : remarks(day))
            rows.back().push_back(std::move(remark));
    }
    return fmt::format("{}\n{}{}\n{}\n", place_text(table), text_table(columns(), rows), horizon_text(table), k_noon);
}

Json event_json(const SunTable& table, const SunEvent& event) {
    return {{"clock", iso_clock(table.zone, event.at)},
            {"instant", write_instant(std::chrono::round<std::chrono::seconds>(event.at))},
            {"azimuth_deg", json_number(event.azimuth.in_degrees())},
            {"altitude_deg", json_number(event.altitude.in_degrees())}};
}

Json events_json(const SunTable& table, const CivilDay& day, Kind kind) {
    Json list = Json::array();
    for (const SunEvent& event : day.events)
        if (event.kind == kind)
            list.push_back(event_json(table, event));
    return list;
}

double hours_of(std::chrono::microseconds length) {
    return std::chrono::duration<double, std::ratio<3600>>(length).count();
}

/// The figures of a CSV's column: of the first event, nothing without one.
std::string event_csv(const CivilDay& day, Kind kind, Angle SunEvent::*angle) {
    const SunEvent* event = day.first(kind);
    return event != nullptr ? fixed((event->*angle).in_degrees(), 4) : "";
}

std::string moments_csv(const SunTable& table, const CivilDay& day, Kind kind) {
    std::string text;
    for (const SunEvent& event : day.events)
        if (event.kind == kind)
            text.append(text.empty() ? "" : " ").append(iso_clock(table.zone, event.at));
    return text;
}

} // namespace

std::string sun_text(const SunTable& table) {
    return table.days.size() == 1 ? one_day(table, table.days.front()) : many_days(table);
}

std::string sun_json(const SunTable& table) {
    Json out;
    out["format"] = 1;
    out["site"] = {{"name", table.name},
                   {"latitude_deg", json_number(table.site.latitude.in_degrees())},
                   {"longitude_deg", json_number(table.site.longitude.in_degrees())},
                   {"zone", table.zone.name()}};
    out["refraction"] = table.refraction;
    out["days"] = Json::array();
    for (const CivilDay& day : table.days) {
        const bool there = !left_out(day);
        out["days"].push_back(
            {{"date", iso_date(day.date)},
             {"rises", events_json(table, day, Kind::rise)},
             {"noons", events_json(table, day, Kind::noon)},
             {"sets", events_json(table, day, Kind::set)},
             {"up_at_begin", there ? Json(day.up_at_begin) : Json(nullptr)},
             {"daylight_h", there ? json_number(hours_of(day.up_for)) : Json(nullptr)},
             {"declination_deg", there ? json_number(day.declination.in_degrees()) : Json(nullptr)},
             {"equation_of_time_min", there ? json_number(day.equation_of_time.in_minutes_of_time()) : Json(nullptr)},
             {"remarks", remarks(day)}});
    }
    return json_text(out);
}

std::string sun_csv(const SunTable& table) {
    std::string text = "date,rise,rise_azimuth_deg,noon,noon_altitude_deg,noon_azimuth_deg,set,set_azimuth_deg,"
                       "daylight_h,declination_deg,equation_of_time_min\n";
    for (const CivilDay& day : table.days) {
        const bool there = !left_out(day);
        fmt::format_to(std::back_inserter(text), "{},{},{},{},{},{},{},{},{},{},{}\n", iso_date(day.date),
                       moments_csv(table, day, Kind::rise), event_csv(day, Kind::rise, &SunEvent::azimuth),
                       moments_csv(table, day, Kind::noon), event_csv(day, Kind::noon, &SunEvent::altitude),
                       event_csv(day, Kind::noon, &SunEvent::azimuth), moments_csv(table, day, Kind::set),
                       event_csv(day, Kind::set, &SunEvent::azimuth), there ? fixed(hours_of(day.up_for), 4) : "",
                       there ? fixed(day.declination.in_degrees(), 4) : "",
                       there ? fixed(day.equation_of_time.in_minutes_of_time(), 4) : "");
    }
    return text;
}

layout::SheetBook sun_sheets(const SunTable& table, layout::PrintOptions options) {
    const std::string place = table.name.empty() ? say_latitude(table.site.latitude) : table.name;
    if (options.title.empty())
        options.title = "The Sun at " + place;
    layout::Flow flow{options, "The Sun at " + place};
    flow.paragraph("The Sun at " + place, "", true, 5.0);
    flow.space(0.8);
    const std::string first = say_date(table.days.front().date), last = say_date(table.days.back().date);
    flow.paragraph(
        fmt::format("{}. {}{}{}.", place_text(table), first, first == last ? "" : " to ", first == last ? "" : last));
    flow.space(2);
    std::vector<Row> rows;
    std::vector<std::string> said;
    for (const CivilDay& day : table.days) {
        rows.push_back(row_of(table, day));
        for (const std::string& remark : remarks(day))
            said.push_back(fmt::format("{}: {}.", say_date(day.date), remark));
    }
    flow.table(columns(), rows, 2.3);
    flow.space(1);
    flow.paragraph(std::string{"Clock times are the zone's, summer time included. "} + horizon_text(table) + ' ' +
                   k_noon);
    flow.paragraph("Equation of time: where the dial is fast, take it from what the dial shows; where slow, add it.");
    constexpr std::size_t k_most_said = 20;
    if (said.size() > k_most_said) {
        const std::size_t more = said.size() - k_most_said;
        said.resize(k_most_said);
        said.push_back(fmt::format("And so on {} more dates: dialwright sun says each.", more));
    }
    flow.list("Days out of the common run", said);
    flow.list("Take care", {"Never look at the Sun, not even near rising or setting: work from shadows."});
    return {options.title, "The Sun's times and heights", flow.sheets()};
}

} // namespace dialwright::cli
