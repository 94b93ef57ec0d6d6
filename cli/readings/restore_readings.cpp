// SPDX-License-Identifier: MIT
#include "cli/readings/restore_readings.hpp"
#include "cli/design/file_text.hpp"
#include "cli/design/sections.hpp"
#include "cli/readings/given.hpp"
#include "cli/readings/readings.hpp"

#include <fmt/format.h>

#include <array>
#include <cctype>
#include <cmath>

namespace dialwright::cli {
namespace {

constexpr auto k_keys = std::to_array<KnownKey>({
    {"", "title"},         {"", "stood"},          {"", "lean"},           {"", "up"},
    {"", "noon"},          {"", "origin"},         {"", "hours apart"},    {"", "gap"},

    {"", "place"},         {"place", "name"},      {"place", "latitude"},  {"place", "longitude"},
    {"place", "zone"},     {"place", "skyline"},

    {"", "lines"},         {"lines", "hour"},      {"lines", "direction"}, {"lines", "further"},
    {"lines", "points"},

    {"", "style"},         {"style", "height"},    {"style", "substyle"},

    {"", "plate"},         {"plate", "shape"},     {"plate", "diameter"},  {"plate", "width"},
    {"plate", "height"},   {"plate", "across"},    {"plate", "corners"},   {"plate", "centre"},
    {"plate", "material"}, {"plate", "thickness"},
});

constexpr std::size_t k_most_lines = 200, k_most_points = 20, k_least_lines = 4;
constexpr double k_style_give_deg = 1.0, k_substyle_give_deg = 2.0, k_lean_give_deg = 0.5;
/// A building's place by a map, and a dial maker's latitude of old: common practice, no source.
constexpr double k_latitude_give_deg = 0.05;
constexpr double k_farthest_mm = 20000;
constexpr const char* k_line_hint = "- {hour: IX, direction: 312.5°}";

constexpr std::array<Choice<Stood>, 3> k_stood = {
    {{"upright", Stood::upright}, {"level", Stood::level}, {"unknown", Stood::unknown}}};
constexpr std::array<Choice<bool>, 2> k_certain = {{{"certain", true}, {"uncertain", false}}};
constexpr std::array<Choice<bool>, 2> k_up = {{{"known", true}, {"unknown", false}}};
constexpr std::array<Choice<bool>, 2> k_origin = {{{"centre", true}, {"anywhere", false}}};

/// 1 to 12 of "IX", "IIII", "xii".
std::optional<int> roman(std::string_view text) {
    static constexpr std::array<std::string_view, 13> k_numerals = {"IIII", "I",    "II", "III", "IV", "V",  "VI",
                                                                    "VII",  "VIII", "IX", "X",   "XI", "XII"};
    std::string upper{text};
    for (char& c : upper)
        c = static_cast<char>(std::toupper(static_cast<unsigned char>(c)));
    for (std::size_t i = 0; i < k_numerals.size(); ++i)
        if (k_numerals[i] == upper)
            return i == 0 ? 4 : int(i);
    return std::nullopt;
}

/// An hour by its numeral; below zero where it is "?".
Read<double> hour_of_line(std::string_view text) {
    if (text == "?" || text == "unreadable")
        return -1.0;
    if (const auto numeral = roman(text))
        return double(*numeral);
    const Read<double> hour = hour_of_day(text);
    if (hour)
        return hour;
    return Trouble{in_quotes(text) + " is not an hour of a dial",
                   "write it as in IX, 9, 9:30, or ? where it can't be read"};
}

std::vector<PlatePoint> read_points(const Section& line, std::size_t least) {
    std::vector<PlatePoint> points;
    for (const Node& item :
         list_at(line, "points", "point", least, k_most_points, "[[12 mm, -40 mm], [31 mm, -110 mm]]"))
        if (const auto p = read_point(item, "lines: points", k_farthest_mm, line.state()))
            points.push_back({p->right_mm, p->up_mm});
    return points;
}

/// Where a line runs: by one of three keys. False after an error.
bool read_run(PlateLine& made, const Section& line, std::optional<double>& last_deg, bool origin_is_centre) {
    const int ways = int(line.has("direction")) + int(line.has("further")) + int(line.has("points"));
    if (ways != 1) {
        line.error_here(ways == 0 ? "this line has no place on the plate"
                                  : "this line has its place by more than one key",
                        fmt::format("give one of direction, further or points, as in \"{}\"", k_line_hint));
        return false;
    }
    if (line.has("points")) {
        made.points = read_points(line, origin_is_centre ? 1 : 2);
        return !made.points.empty();
    }
    if (line.has("direction")) {
        const auto direction = line.read("direction", plain_angle);
        if (!direction)
            return false;
        made.direction_deg = direction->in_degrees();
    } else {
        const auto further = line.read("further", plain_angle);
        if (!further)
            return false;
        if (!last_deg) {
            line.error("further", "no line before this one is given by an angle",
                       "give the first line \"direction: 0°\"");
            return false;
        }
        made.direction_deg = *last_deg + further->in_degrees();
    }
    last_deg = made.direction_deg;
    return true;
}

void read_lines(RestoreFile& made, const Section& top) {
    if (const Entry* entry = top.entry("lines"))
        made.at = entry->at;
    else
        top.missing("lines", std::string{"give \"lines:\" with items like "} + k_line_hint);
    std::optional<double> last_deg;
    for (const Node* node : mappings_at(top, "lines", "line", k_most_lines, k_line_hint)) {
        const Section line{*node, "lines", top.state()};
        PlateLine one;
        const auto hour = line.read("hour", hour_of_line);
        if (!read_run(one, line, last_deg, made.readings.origin_is_centre) || (line.has("hour") && !hour))
            continue;
        if (hour && *hour >= 0)
            one.hour_h = *hour;
        made.names.push_back(one.hour_h ? *line.text("hour") : "?");
        made.readings.lines.push_back(std::move(one));
        made.at_lines.push_back(node->at);
    }
}

/// The plate's keys, checked as a design's are, and kept as they are written.
void read_plate_size(RestoreFile& made, const Section& top) {
    const Entry* entry = top.entry("plate");
    if (entry == nullptr)
        return;
    Design holder;
    read_plate(holder, top);
    for (const Entry& key : entry->value.entries)
        if (key.value.kind == Node::Kind::text)
            made.plate.emplace_back(key.key, key.value.text);
}

void read_facts(RestoreFile& made, const Section& top) {
    PlateReadings& readings = made.readings;
    if (const auto stood = top.choice<Stood>("stood", k_stood))
        made.stood = *stood;
    if (const auto certain = top.choice<bool>("noon", k_certain))
        made.noon_certain = *certain;
    if (const auto known = top.choice<bool>("up", k_up))
        readings.up_known = *known;
    if (const auto centre = top.choice<bool>("origin", k_origin))
        readings.origin_is_centre = *centre;
    if (const auto apart = top.read("hours apart", minutes))
        readings.hours_apart = *apart / 60.0;
    if (const auto gap = top.length("gap", 0, 500))
        readings.gap_mm = *gap;
    made.facts.lean_deg = read_given(top, "lean", given_lean_deg, k_lean_give_deg);
    const Section style{top.entry("style"), "style", top.state()};
    if (style.given()) {
        readings.style_height_deg = read_given(style, "height", given_angle_deg, k_style_give_deg);
        readings.substyle_deg = read_given(style, "substyle", given_angle_deg, k_substyle_give_deg);
    }
    if (top.has("place")) {
        Design holder;
        read_place(holder, top);
        made.place = holder.place;
        made.facts.latitude_deg = Known{holder.place.site.latitude.in_degrees(), k_latitude_give_deg};
    }
}

void check_enough(RestoreFile& made, const Section& top) {
    std::size_t readable = 0;
    for (const PlateLine& line : made.readings.lines)
        readable += line.hour_h ? 1U : 0U;
    const std::size_t count = readable > 0 ? readable : made.readings.lines.size();
    if (top.has("lines") && count < k_least_lines)
        top.error(
            "lines", fmt::format("{} line{} can be anything", count, count == 1 ? "" : "s with their hours"),
            "give four at least, better eight, over as much of the day as the plate has; where no hour can be read, "
            "leave all hours out and give the lines in their order");
    if (readable == 0)
        made.noon_certain = false;
}

} // namespace

std::span<const KnownKey> restore_keys() {
    return k_keys;
}

RestoreReading read_restore(std::string_view text, std::string file_name) {
    DocumentReading document = read_document(text, file_name, "start with the plate's lines: \"lines:\"");
    ReadingState state;
    state.file = std::move(file_name);
    state.keys = k_keys;
    state.whose = "an old plate";
    state.errors = std::move(document.errors);
    RestoreFile made;
    made.file = state.file;
    if (document.root) {
        const Section top{*document.root, "", state};
        if (const auto title = top.line("title", 200))
            made.title = *title;
        read_facts(made, top);
        read_lines(made, top);
        read_plate_size(made, top);
        if (state.errors.empty())
            check_enough(made, top);
    }
    if (!state.errors.empty() || !document.root)
        return {std::nullopt, first_errors(std::move(state.errors))};
    return {std::move(made), {}};
}

RestoreReading read_restore_file(const std::filesystem::path& path) {
    FileText file = read_text_file(path, "file of a plate's lines");
    if (!file.text)
        return {std::nullopt, std::move(file.errors)};
    return read_restore(*file.text, path.string());
}

} // namespace dialwright::cli
