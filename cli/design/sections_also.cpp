// SPDX-License-Identifier: MIT
// What is drawn beside the hours of the chapter ring: other hours, altitude circles, azimuth lines, noon elsewhere.
#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

namespace dialwright::cli {

namespace {

constexpr std::size_t k_most_lines = 40;
constexpr std::size_t k_longest_name = 80;

/// Whole hours; nothing: all that are ever lit.
struct HoursAsked {
    std::optional<double> first_h, last_h;
};

Read<double> whole_hour(HourTime time, std::string_view text) {
    const Read<double> hour = hour_on(time, text);
    if (hour && *hour != std::floor(*hour))
        return Trouble{in_quotes(text) + " is not a whole hour", "these lines stand at whole hours, as in 9 to 15"};
    return hour;
}

/// "yes", "12", "9 to 15"; nothing for "no".
Read<std::optional<HoursAsked>> hours_asked(HourTime time, std::string_view text) {
    if (const Read<bool> wanted = yes_or_no(text))
        return *wanted ? std::optional{HoursAsked{}} : std::nullopt;
    for (const std::string_view join : {" to ", "–", "-"}) {
        const std::size_t at = text.find(join);
        if (at == std::string_view::npos || at == 0)
            continue;
        const Read<double> first = whole_hour(time, text.substr(0, at));
        const Read<double> last = whole_hour(time, text.substr(at + join.size()));
        if (!first || !last)
            return first ? last.trouble() : first.trouble();
        if (*first > *last)
            return Trouble{fmt::format("{} ends before it starts", in_quotes(text)), "give the earlier hour first"};
        return std::optional{HoursAsked{*first, *last}};
    }
    if (text.find_first_of("0123456789") == std::string_view::npos && text != "noon")
        return Trouble{in_quotes(text) + " is neither yes nor an hour", "give yes, one hour, or a range as in 9 to 15"};
    const Read<double> only = whole_hour(time, text);
    if (!only)
        return only.trouble();
    return std::optional{HoursAsked{*only, *only}};
}

void read_more_hours(Design& design, const Section& also, std::string_view key, HourTime time) {
    const auto asked =
        also.read<std::optional<HoursAsked>>(key, [&](std::string_view text) { return hours_asked(time, text); });
    if (!asked || !*asked)
        return;
    if (time == design.hours.time && !also.state().faulty("hours: time")) {
        also.error(key, "the chapter ring has it already", "leave it out, or give \"hours: time\" another");
        return;
    }
    const HalfYear curves = time == HourTime::clock ? design.hours.curves : HalfYear::whole;
    design.also.hours.push_back({time, (*asked)->first_h, (*asked)->last_h, curves, {}});
}

/// A family of lines that stand at angles: how it is named and what may be given.
struct AngleLines {
    std::string_view key;
    std::string_view example;
    double least_deg, most_deg; ///< of "each", from and up to
    bool round;                 ///< all round the horizon
};
constexpr AngleLines k_altitudes{"altitudes", "[15°, 30°, 45°], or \"each 10°\"", 0.0, 90.0, false};
constexpr AngleLines k_azimuths{"azimuths", "[S 30° E, south, 210°], or \"each 15°\"", 0.0, 360.0, true};

/// The degrees after "each"; nothing for a text that does not start so.
std::optional<std::string_view> after_each(const Entry& entry) {
    const std::string_view text = entry.value.text;
    if (entry.value.kind != Node::Kind::text || !text.starts_with("each "))
        return std::nullopt;
    return text.substr(5);
}

/// The multiples of a step: altitudes above the horizon and below the zenith, azimuths once round from north.
Read<std::vector<Angle>> multiples(std::string_view step_text, const AngleLines& lines) {
    const Read<Angle> read = plain_angle(step_text);
    if (!read)
        return read.trouble();
    const double step = read->in_degrees();
    const std::string shown = in_quotes(step_text);
    if (!(step > 0.0) || step >= lines.most_deg)
        return Trouble{shown + " is no step", fmt::format("give more than 0° and less than {}°", lines.most_deg)};
    const double steps = lines.most_deg / step;
    if (lines.round && std::abs(steps - std::round(steps)) > 1e-9)
        return Trouble{shown + " does not go evenly round the horizon", "give a whole part of 360°, as in each 15°"};
    // A step too many would lie at the zenith, or at north again.
    const auto last = static_cast<long long>(std::min(1e9, std::ceil(steps - 1e-9))) - 1;
    const auto count = static_cast<std::size_t>(lines.round ? last + 1 : last);
    if (count > k_most_lines)
        return Trouble{fmt::format("each {} makes {} lines", shown, count),
                       fmt::format("give a larger step, for at most {} lines", k_most_lines)};
    std::vector<Angle> angles;
    for (long long i = lines.round ? 0 : 1; i <= last; ++i)
        angles.push_back(Angle::degrees(step * static_cast<double>(i)));
    return angles;
}

Read<Angle> altitude_of_circle(std::string_view text) {
    const Read<Angle> angle = plain_angle(text);
    if (angle && !(*angle > Angle{} && *angle < Angle::degrees(90)))
        return Trouble{in_quotes(text) + " is no altitude that a line can show", "give more than 0° and less than 90°"};
    return angle;
}

void read_angle_lines(std::vector<Angle>& made, const Section& also, const AngleLines& lines) {
    const Entry* entry = also.entry(lines.key);
    if (entry == nullptr)
        return;
    const std::string key = full_name("also", lines.key);
    if (const auto step = after_each(*entry)) {
        const Read<std::vector<Angle>> angles = multiples(*step, lines);
        if (angles)
            made = *angles;
        else
            also.error(lines.key, angles.trouble().message, angles.trouble().hint);
        return;
    }
    for (const Node& item : list_at(also, lines.key, "line", 1, k_most_lines, std::string{lines.example})) {
        if (item.kind == Node::Kind::refused)
            continue;
        if (item.kind != Node::Kind::text) {
            also.state().error(item.at, key, fmt::format("{} stands where an angle is wanted", kind_name(item)),
                               fmt::format("write it as in {}", lines.example));
            continue;
        }
        const Read<Angle> angle = lines.round ? bearing(item.text) : altitude_of_circle(item.text);
        if (!angle)
            also.state().error(item.at, key, angle.trouble().message, angle.trouble().hint);
        else if (std::find(made.begin(), made.end(), *angle) != made.end())
            also.state().error(item.at, key, in_quotes(item.text) + " is given twice", "keep one of them");
        else
            made.push_back(*angle);
    }
}

/// An item of "noon at": a place's name and its longitude.
std::optional<PlaceNoon> read_noon(const Node& item, ReadingState& state) {
    const std::string hint = "write \"- {name: the place, longitude: 12° 29' E}\"";
    if (item.kind == Node::Kind::refused)
        return std::nullopt;
    if (item.kind != Node::Kind::mapping) {
        state.error(item.at, "also: noon at", fmt::format("{} stands where a place is wanted", kind_name(item)), hint);
        return std::nullopt;
    }
    const Section section{item, "also: noon at", state};
    for (const std::string_view key : {"name", "longitude"})
        if (!section.has(key))
            section.missing(key, hint);
    const auto name = section.line("name", k_longest_name);
    const auto place_longitude = section.read("longitude", longitude);
    if (!name || !place_longitude)
        return std::nullopt;
    return PlaceNoon{*name, *place_longitude};
}

void read_noons(Design& design, const Section& also) {
    std::vector<PlaceNoon>& made = design.also.noons;
    for (const Node& item :
         list_at(also, "noon at", "place", 1, k_most_lines, "[{name: the place, longitude: 12° 29' E}]")) {
        const auto noon = read_noon(item, also.state());
        if (!noon)
            continue;
        const auto same = std::find_if(made.begin(), made.end(), [&](const PlaceNoon& other) {
            return abs((other.longitude - noon->longitude).signed_turn()) < Angle::degrees(1e-9);
        });
        if (same != made.end())
            also.state().error(
                item.at, "also: noon at",
                fmt::format("{} has noon with {}: the two are one line", in_quotes(noon->name), in_quotes(same->name)),
                "keep one of them, or put both names in it");
        else
            made.push_back(*noon);
    }
}

/// Keys of the hours that say something of lines which the design does not draw.
void check_hours_keys(const Design& design, ReadingState& state) {
    if (state.faulty("hours: time"))
        return;
    const auto error_at = [&](std::string_view key, std::string message, std::string hint) {
        if (const auto given = state.given.find(key); given != state.given.end())
            state.error(given->second, std::string{key}, std::move(message), std::move(hint));
    };
    if (!draws_any(design, {HourTime::clock}))
        error_at("hours: curves", "only clock time has curves", "leave the key out, or give \"time: clock\"");
    if (!counts_from_the_horizon(design))
        error_at("hours: rise and set", "no hours here count from the Sun's rising or setting",
                 "leave the key out, or give \"time: since sunrise\" or its like");
}

} // namespace

bool draws_any(const Design& design, std::initializer_list<HourTime> times) {
    return std::any_of(times.begin(), times.end(), [&](HourTime time) {
        const std::vector<MoreHours>& more = design.also.hours;
        return design.hours.time == time ||
               std::any_of(more.begin(), more.end(), [&](const MoreHours& hours) { return hours.time == time; });
    });
}

bool draws_straight_hours(const Design& design) {
    return draws_any(design, {HourTime::sun, HourTime::zone}) || !design.also.noons.empty();
}

bool counts_from_the_horizon(const Design& design) {
    return counts_from_horizon(design.hours.time) ||
           std::any_of(design.also.hours.begin(), design.also.hours.end(),
                       [](const MoreHours& more) { return counts_from_horizon(more.time); });
}

void read_also(Design& design, const Section& top) {
    const Section also{top.entry("also"), "also", top.state()};
    if (also.given())
        for (const Entry& entry : top.entry("also")->value.entries) // the file's order is the order of drawing
            for (const auto& [key, time] : k_hour_times)
                if (entry.key == key)
                    read_more_hours(design, also, key, time);
    read_angle_lines(design.also.altitudes, also, k_altitudes);
    read_angle_lines(design.also.azimuths, also, k_azimuths);
    read_noons(design, also);
    check_hours_keys(design, top.state());
}

} // namespace dialwright::cli
