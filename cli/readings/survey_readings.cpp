// SPDX-License-Identifier: MIT
#include "cli/readings/survey_readings.hpp"
#include "cli/design/file_text.hpp"
#include "cli/design/sections.hpp"
#include "cli/readings/given.hpp"
#include "cli/readings/readings.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>

namespace dialwright::cli {
namespace {

constexpr auto k_keys = std::to_array<KnownKey>({
    {"", "title"},
    {"", "day"},

    {"", "place"},
    {"place", "name"},
    {"place", "latitude"},
    {"place", "longitude"},
    {"place", "zone"},
    {"place", "skyline"},

    {"", "peg"},
    {"", "foot"},
    {"", "level"},
    {"", "clock"},
    {"", "lean"},

    {"", "shadows"},
    {"shadows", "at"},
    {"shadows", "right"},
    {"shadows", "down"},

    {"", "grazing"},
    {"grazing", "begins"},
    {"grazing", "ceases"},
    {"grazing", "within"},

    {"", "compass"},
    {"compass", "bearing"},
    {"compass", "variation"},
});

constexpr std::size_t k_most_readings = 500;
constexpr double k_least_peg_mm = 5, k_most_peg_mm = 5000, k_most_offset_mm = 20000;
constexpr double k_peg_give_mm = 0.5, k_lean_give_deg = 0.3, k_bearing_give_deg = 3, k_variation_give_deg = 0.5;
/// The moment at which light that grazes a wall begins or ends is judged to a Sun's width: common practice, no source.
constexpr double k_grazing_give_deg = 0.5;
constexpr const char* k_shadow_hint = "- {at: 2027-05-03 10:12:30, right: 34 mm, down: 81.5 mm}";
constexpr const char* k_grazing_hint = "- {begins: 2027-05-03 08:02}";

void read_shadows(SurveyFile& made, const Section& top, std::optional<std::chrono::year_month_day> day) {
    if (const Entry* entry = top.entry("shadows"))
        made.at = entry->at;
    for (const Node* node : mappings_at(top, "shadows", "shadow", k_most_readings, k_shadow_hint)) {
        const Section reading{*node, "shadows", top.state()};
        const auto at = read_time(reading, "at", day, *made.zone);
        for (const std::string_view key : {"right", "down"})
            if (!reading.has(key))
                reading.missing(
                    key, fmt::format("write \"{}\"; what lies to the left, or up, is below zero", k_shadow_hint));
        const auto right = reading.length("right", -k_most_offset_mm, k_most_offset_mm);
        const auto down = reading.length("down", -k_most_offset_mm, k_most_offset_mm);
        if (!at || !check_sun_up(reading, "at", made.place.site, *at, *made.zone) || !right || !down)
            continue;
        made.readings.shadows.push_back({*at, *right, *down});
        made.at_shadows.push_back(node->at);
    }
}

void read_grazings(SurveyFile& made, const Section& top, std::optional<std::chrono::year_month_day> day) {
    for (const Node* node : mappings_at(top, "grazing", "moment", k_most_readings, k_grazing_hint)) {
        const Section reading{*node, "grazing", top.state()};
        const bool begins = reading.has("begins");
        if (begins == reading.has("ceases")) {
            reading.error_here(
                "this moment is not said to be the one or the other",
                fmt::format("give when light along the wall begins, or ceases, as in \"{}\"", k_grazing_hint));
            continue;
        }
        const std::string_view key = begins ? "begins" : "ceases";
        const auto at = read_time(reading, key, day, *made.zone);
        const auto within = reading.read("within", give_seconds);
        if (!at || !check_sun_up(reading, key, made.place.site, *at, *made.zone))
            continue;
        // The Sun goes a quarter of a degree in a minute, and no faster past a wall.
        const double give_deg = within ? std::hypot(*within / 240, 0.1) : k_grazing_give_deg;
        made.readings.grazings.push_back({*at, begins, Angle::degrees(give_deg)});
    }
}

void read_compass(SurveyFile& made, const Section& top) {
    const Section compass{top.entry("compass"), "compass", top.state()};
    if (!compass.given())
        return;
    for (const std::string_view key : {"bearing", "variation"})
        if (!compass.has(key))
            compass.missing(key, "a compass needs both: \"bearing: S 21° E ± 3°\", as the needle shows it, and "
                                 "\"variation: 1° 30' W\", from the year's chart for the place");
    const auto bearing = read_given(compass, "bearing", given_bearing_deg, k_bearing_give_deg);
    const auto variation = read_given(compass, "variation", given_east_deg, k_variation_give_deg);
    if (!bearing || !variation)
        return;
    made.by_compass = true;
    made.readings.bearing_deg = Known{bearing->value + variation->value, std::hypot(bearing->give, variation->give)};
}

void read_ways_of_measuring(SurveyFile& made, const Section& top) {
    WallReadings& readings = made.readings;
    if (const auto peg = read_given(top, "peg", given_length_mm, k_peg_give_mm)) {
        readings.peg_mm = peg->value;
        readings.peg_give_mm = peg->give;
        if (peg->value < k_least_peg_mm || peg->value > k_most_peg_mm)
            top.error("peg", in_quotes(*top.text("peg")) + " is no peg's length",
                      "give 5 mm to 5 m, from the wall to the tip");
    }
    top.read_into(readings.foot_give_mm, "foot", give_length_mm);
    if (const auto level = top.read("level", give_angle_deg))
        readings.level_give = Angle::degrees(*level);
    top.read_into(readings.clock_give_s, "clock", give_seconds);
    readings.lean_deg = read_given(top, "lean", given_lean_deg, k_lean_give_deg);
}

/// What cannot be settled by so few, whatever they are.
void check_enough(const SurveyFile& made, const Section& top) {
    const WallReadings& readings = made.readings;
    const std::size_t shadows = readings.shadows.size();
    constexpr const char* k_more = "take three at least, better six, an hour and more apart: some while the Sun stands "
                                   "well to one side of the wall, some on the other";
    if (top.has("shadows")) {
        if (shadows < 3)
            top.error("shadows", shadows == 1 ? "one shadow alone checks nothing" : "two shadows alone check nothing",
                      k_more);
        if (!top.has("peg"))
            top.missing("peg", "give the peg's length, from the wall to its tip, as in \"peg: 100 mm ± 0.5 mm\"");
    } else if (readings.grazings.empty() && !readings.bearing_deg && top.state().errors.empty()) {
        top.error_here("there is no reading of the wall here",
                       std::string{"give \"shadows:\" with items like "} + k_shadow_hint);
    }
}

} // namespace

std::span<const KnownKey> survey_keys() {
    return k_keys;
}

SurveyReading read_survey(std::string_view text, std::string file_name) {
    DocumentReading document =
        read_document(text, file_name, "start with the place and the peg: \"place:\", \"peg:\" and \"shadows:\"");
    ReadingState state;
    state.file = std::move(file_name);
    state.keys = k_keys;
    state.whose = "a wall survey";
    state.errors = std::move(document.errors);
    SurveyFile made;
    made.file = state.file;
    if (document.root) {
        const Section top{*document.root, "", state};
        Design holder;
        read_place(holder, top);
        made.place = holder.place;
        made.readings.site = holder.place.site;
        made.zone = Zone::find(holder.place.zone);
        if (const auto title = top.line("title", 200))
            made.title = *title;
        const auto day = read_day(top);
        read_ways_of_measuring(made, top);
        read_compass(made, top);
        if (made.zone && !state.faulty("place: latitude") && !state.faulty("place: longitude")) {
            read_shadows(made, top, day);
            read_grazings(made, top, day);
            if (state.errors.empty())
                check_enough(made, top);
        }
    }
    if (!state.errors.empty() || !made.zone)
        return {std::nullopt, first_errors(std::move(state.errors))};
    return {std::move(made), {}};
}

SurveyReading read_survey_file(const std::filesystem::path& path) {
    FileText file = read_text_file(path, "file of readings");
    if (!file.text)
        return {std::nullopt, std::move(file.errors)};
    return read_survey(*file.text, path.string());
}

} // namespace dialwright::cli
