// SPDX-License-Identifier: MIT
#include "cli/report/restore.hpp"
#include "cli/design/quantity.hpp"
#include "cli/report/json_text.hpp"
#include "cli/report/lines_of_text.hpp"
#include "cli/report/ranges.hpp"
#include "cli/report/say.hpp"
#include "cli/report/text_table.hpp"
#include "engine/time/zone.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::cli {
namespace {

using Fact = PlateSolution::Fact;

std::string supposed(const RestoreFile& file, Fact fact) {
    switch (fact) {
    case Fact::upright:
        return file.readings.up_known ? "if it stood upright" : "if it stood upright and kept its own place's time";
    case Fact::level:
        return "if it lay level";
    case Fact::lean:
        return "if it leaned as was measured";
    case Fact::latitude:
        return "if it was made for the latitude of where it was found";
    case Fact::sun_time:
        break;
    }
    return "if it kept its own place's time by the Sun, and leaned";
}

std::string say_found_latitude(const Found& found) {
    return latitude_text(to_minutes(found.value)) + " " + say_give(found.range);
}

std::string say_ahead(const RestoreFile& file, const Found& found) {
    const std::string give = fmt::format("± {} min", fixed(std::max(0.1, found.range), 1));
    const std::string besides = file.noon_certain ? "" : ", and whole hours that its numerals don't tell";
    if (std::abs(found.value) <= found.range)
        return fmt::format("the place's own by the Sun, {}{}", give, besides);
    return fmt::format("{} min {} the place's own Sun, {}{} (cut for a meridian {} further {})",
                       fixed(std::abs(found.value), 1), found.value > 0 ? "ahead of" : "behind", give, besides,
                       say_arc(found.value / 4), found.value > 0 ? "east" : "west");
}

std::string hour_words(double hours) {
    const long minutes = std::lround(hours * 60) % 720;
    return fmt::format("{}:{:02}", minutes / 60 == 0 ? 12 : minutes / 60, minutes % 60);
}

void say_lines(LinesOfText& text, const RestoreFile& file, const PlateFigure& figure) {
    text.gap();
    using layout::Align;
    std::vector<TableRow> rows;
    for (std::size_t i = 0; i < file.names.size(); ++i) {
        const bool unread = !file.readings.lines[i].hour_h && figure.hour_h[i];
        rows.push_back({file.names[i], figure.hour_h[i] ? hour_words(*figure.hour_h[i]) : "",
                        say_signed(figure.off_deg[i], 2) + "°",
                        figure.off_mm[i] != 0.0 ? say_signed(figure.off_mm[i], 1) : ""});
        if (figure.stray[i] || unread)
            rows.back().push_back(figure.stray[i] ? "cut or read wrong" : "unreadable: nearest this");
    }
    text.add(text_table({{"line"}, {"hour", Align::right}, {"off", Align::right}, {"off, mm", Align::right}}, rows, 2));
    text.line("  off: as it is, less as it should be, clockwise");
}

Json way_json(const RestoreWay& way) {
    const PlateSolution& one = way.solution;
    return {{"if", fact_name(one.fact)},
            {"known", way.supposed_known},
            {"signs", way.signs},
            {"for_this_place", way.for_this_place},
            {"latitude_deg", json_found(one.latitude_deg)},
            {"facing_deg", one.facing_deg ? json_found(*one.facing_deg) : Json{}},
            {"lean_deg", json_found(one.lean_deg)},
            {"ahead_min", json_found(one.ahead_min)},
            {"speaks", way.speaks}};
}

} // namespace

std::string heading_of(const RestoreFile& file, const RestoreWay& way) {
    std::string text = supposed(file, way.solution.fact);
    if (way.supposed_known)
        text += " (which is known)";
    return text;
}

std::vector<std::string> words_of(const RestoreFile& file, const RestoreWay& way) {
    const PlateSolution& one = way.solution;
    std::vector<std::string> words;
    words.push_back("latitude     " + (one.latitude_deg.told ? say_found_latitude(one.latitude_deg)
                                                             : latitude_text(to_minutes(one.latitude_deg.value))));
    if (one.facing_deg)
        words.push_back("facing       " + say_facing(*one.facing_deg));
    if (one.lean_deg.told)
        words.push_back("lean         " + say_lean(one.lean_deg));
    words.push_back("hours        " +
                    (one.ahead_min.told ? say_ahead(file, one.ahead_min) : std::string{"the place's own by the Sun"}));
    return words;
}

std::string restore_text(const RestoreFile& file, const PlateFigure& figure, const RestoreReport& report) {
    LinesOfText text;
    text.line("{}", file.title.empty() ? file.file : file.title);
    const auto strays = std::count(figure.stray.begin(), figure.stray.end(), true);
    text.line("  lines        {}, {} left out", file.names.size(), strays);
    if (figure.centre_told)
        text.line("  style height {}, {}", say_arc(figure.style_height_deg.value),
                  say_give(figure.style_height_deg.range));
    else
        text.line("  style height parallel to the plate within {}", say_arc(figure.style_height_deg.range));
    if (figure.substyle_deg.told)
        text.line("  substyle     {}, {}, clockwise from up", say_arc(figure.substyle_deg.value),
                  say_give(figure.substyle_deg.range));
    if (std::any_of(file.readings.lines.begin(), file.readings.lines.end(),
                    [](const PlateLine& line) { return line.hour_h.has_value(); }))
        text.line("  its hour     {} by the numerals, ± {} min", hour_words(figure.substyle_hour_h.value),
                  fixed(std::max(0.1, 60 * figure.substyle_hour_h.range), 1));
    text.line("  hours run    {}", figure.clockwise ? "clockwise: the style points to the north pole"
                                                    : "anticlockwise: the style points to the south pole");
    if (figure.centre)
        text.line("  centre       {} mm right, {} mm up of the origin", fixed(figure.centre->u_mm, 1),
                  fixed(figure.centre->v_mm, 1));
    text.line("  every ± here holds 19 times in 20");
    for (const RestoreWay& way : report.ways) {
        text.gap();
        text.line("{}:", heading_of(file, way));
        for (const std::string& one : words_of(file, way))
            text.line("  {}", one);
        for (const std::string& sign : way.speaks)
            text.line("  - {}", sign);
    }
    say_lines(text, file, figure);
    return text.taken();
}

std::string restore_json(const RestoreFile& file, const PlateFigure& figure, const RestoreReport& report) {
    Json out{{"format", 1}, {"title", file.title}, {"checked", figure.fit.checked()}};
    out["figure"] = {
        {"style_height_deg", json_found(figure.style_height_deg)},
        {"substyle_deg", json_found(figure.substyle_deg)},
        {"substyle_hour_h", json_found(figure.substyle_hour_h)},
        {"clockwise", figure.clockwise},
        {"centre_mm",
         figure.centre ? Json::array({json_number(figure.centre->u_mm), json_number(figure.centre->v_mm)}) : Json{}}};
    Json ways = Json::array();
    for (const RestoreWay& way : report.ways)
        ways.push_back(way_json(way));
    out["ways"] = std::move(ways);
    out["settled"] = report.settled;
    Json lines = Json::array();
    for (std::size_t i = 0; i < file.names.size(); ++i)
        lines.push_back({{"hour", file.names[i]},
                         {"hour_h", figure.hour_h[i] ? json_number(*figure.hour_h[i]) : Json{}},
                         {"off_deg", json_number(figure.off_deg[i])},
                         {"off_mm", figure.off_mm[i] != 0.0 ? json_number(figure.off_mm[i]) : Json{}},
                         {"left_out", bool(figure.stray[i])}});
    out["lines"] = std::move(lines);
    out["notes"] = report.notes;
    return json_text(out);
}

std::string recut_design(const RestoreFile& file, const RestoreWay& way) {
    const PlateSolution& one = way.solution;
    const std::string zone_name = file.place ? file.place->zone : "Etc/UTC";
    const auto zone = Zone::find(zone_name);
    const Angle meridian = zone ? zone->meridian(2027) : Angle{};
    const bool own_time = !one.ahead_min.told || std::abs(one.ahead_min.value) <= one.ahead_min.range;
    Angle longitude = file.place ? file.place->site.longitude : Angle{};
    if (!own_time)
        longitude = (meridian - Angle::degrees(one.ahead_min.value / 4)).signed_turn();
    LinesOfText text;
    text.line("# Cut again from the lines of an old plate, {}.", supposed(file, one.fact));
    if (way.for_this_place)
        text.line("# The latitude is that of the lines; that of the place is {}.",
                  latitude_text(file.place->site.latitude));
    if (!own_time)
        text.line("# The longitude is the one that the lines are shifted for, counted from the zone's meridian.");
    if (!file.title.empty())
        text.line("title: {}", Json(file.title).dump(-1, ' ', false, Json::error_handler_t::replace));
    text.line("place:");
    text.line("  latitude: {}", latitude_text(Angle::degrees(one.latitude_deg.value)));
    text.line("  longitude: {}", longitude_text(longitude));
    text.line("  zone: {}", zone_name);
    text.line("dial:");
    constexpr double k_wall_deg = 45;
    if (!one.facing_deg) {
        text.line("  kind: level");
    } else {
        text.line("  kind: {}", std::abs(one.lean_deg.value) <= k_wall_deg ? "wall" : "leaning");
        text.line("  facing: {}", bearing_text(Angle::degrees(one.facing_deg->value)));
        text.line("  lean: {}", lean_text(Angle::degrees(one.lean_deg.value)));
    }
    text.line("plate:");
    if (file.plate.empty())
        text.line("  diameter: 300 mm");
    for (const auto& [key, value] : file.plate)
        text.line("  {}: {}", key, Json(value).dump(-1, ' ', false, Json::error_handler_t::replace));
    text.line("hours:");
    text.line("  time: {}", own_time ? "sun" : "zone");
    return text.taken();
}

} // namespace dialwright::cli
