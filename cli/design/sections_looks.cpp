// SPDX-License-Identifier: MIT
// How each family of lines is drawn: its weight, and the part of the year that it is drawn for.
#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <array>

namespace dialwright::cli {

namespace {

constexpr std::array<std::pair<std::string_view, double>, 3> k_weights = {
    {{"fine", 0.3}, {"plain", 0.5}, {"bold", 0.9}}};

/// "fine", "plain" or "bold" as shares of the tool's line, or a length.
Read<LineWeight> weight_of(std::string_view text) {
    for (const auto& [word, share] : k_weights)
        if (text == word)
            return LineWeight{0.0, share};
    const Read<double> mm = length_mm(text);
    if (!mm)
        return Trouble{in_quotes(text) + " is no weight", "give fine, plain, bold, or a width as in 0.3 mm"};
    if (*mm < 0.05 || *mm > 10.0)
        return Trouble{in_quotes(text) + " is no width of a line", "give 0.05 mm to 10 mm"};
    return LineWeight{*mm, 0.0};
}

Read<DayRange> day_range(std::string_view text) {
    const std::size_t at = text.find(" to ");
    const std::string hint = "give two days, as in 21 March to 23 September";
    if (at == std::string_view::npos)
        return Trouble{in_quotes(text) + " is no part of the year", hint};
    const auto first = day_of_year(text.substr(0, at)), last = day_of_year(text.substr(at + 4));
    if (!first || !last)
        return Trouble{(first ? last : first).trouble().message, hint};
    if (*first == *last)
        return Trouble{in_quotes(text) + " is one day, on which a line is a point", hint};
    return DayRange{*first, *last};
}

using HourRange = std::pair<double, double>;

/// "9 to 15".
Read<HourRange> hour_range(std::string_view text) {
    const std::size_t at = text.find(" to ");
    const std::string hint = "give two hours, as in 9 to 15";
    if (at == std::string_view::npos)
        return Trouble{in_quotes(text) + " is no part of the day", hint};
    const auto first = hour_of_day(text.substr(0, at)), last = hour_of_day(text.substr(at + 4));
    if (!first || !last)
        return Trouble{(first ? last : first).trouble().message, hint};
    if (!(*first < *last))
        return Trouble{in_quotes(text) + " ends before it starts", "give the earlier hour first"};
    return HourRange{*first, *last};
}

/// The ring's hours keep to a part of the year where the nodus' shadow is what is read.
void read_ring_extent(Design& design, const Section& extents) {
    if (!extents.has("hours"))
        return;
    const auto between = extents.read<DayRange>("hours", day_range);
    const bool nodus = !has_straight_lines(design.hours.time) || design.hours.reach == HourExtent::nodus ||
                       !has_style(design.gnomon.kind);
    if (!nodus && !extents.state().faulty("hours: reach") && !extents.state().faulty("hours: time"))
        extents.error("hours", "the hour lines run to the border, as the style's shadow does all year",
                      "give \"hours: reach: season\", or leave this out");
    else if (between)
        design.hours.look.between = *between;
}

/// The look of a family by its key; null where the design draws no such lines.
FamilyLook* look_of(Design& design, std::string_view key) {
    Also& also = design.also;
    if (key == "altitudes")
        return also.altitudes.empty() ? nullptr : &also.altitude_look;
    if (key == "azimuths")
        return also.azimuths.empty() ? nullptr : &also.azimuth_look;
    if (key == "noon at")
        return also.noons.empty() ? nullptr : &also.noon_look;
    for (const auto& [word, time] : k_hour_times)
        if (word == key)
            for (MoreHours& hours : also.hours)
                if (hours.time == time)
                    return &hours.look;
    return nullptr;
}

constexpr std::array<std::string_view, 10> k_families = {"sun",          "zone",       "clock",   "since sunrise",
                                                         "since sunset", "hours left", "unequal", "altitudes",
                                                         "azimuths",     "noon at"};

void read_looks_of(Design& design, const Section& section, std::string_view key, bool is_weight) {
    if (!section.has(key))
        return;
    FamilyLook* look = look_of(design, key);
    if (look == nullptr) {
        const std::string drawn = fmt::format("also: {}", key);
        if (!section.state().faulty(drawn))
            section.error(key, "the design draws no such lines beside the hours of the ring",
                          fmt::format("draw them under \"also\", as \"{}\", or leave this out", key));
        return;
    }
    if (!is_weight) {
        if (const auto range = section.read<DayRange>(key, day_range))
            look->between = *range;
    } else {
        section.read_into(look->weight, key, weight_of);
    }
}

} // namespace

void read_looks(Design& design, const Section& top) {
    const Section weights{top.entry("weights"), "weights", top.state()},
        extents{top.entry("extents"), "extents", top.state()};
    weights.read_into(design.hours.look.weight, "hours", weight_of);
    weights.read_into(design.dates.weight, "dates", weight_of);
    read_ring_extent(design, extents);
    if (const auto hours = extents.read<HourRange>("dates", hour_range))
        design.dates.hours = *hours;
    for (const std::string_view key : k_families) {
        read_looks_of(design, weights, key, true);
        read_looks_of(design, extents, key, false);
    }
}

} // namespace dialwright::cli
