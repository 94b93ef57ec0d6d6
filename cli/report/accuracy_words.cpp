// SPDX-License-Identifier: MIT
#include "cli/report/accuracy_words.hpp"

#include "cli/report/say.hpp"
#include "layout/plate/numerals.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using layout::Align;

constexpr std::array<const char*, 3> k_seasons{"at the June solstice", "at the equinox", "at the December solstice"};

/// A slip's name for people, in the words of the dial's kind.
std::string slip_words(SlipKind kind, const AccuracyPlan& plan) {
    switch (kind) {
    case SlipKind::half_shadow:
        return "half-shadow";
    case SlipKind::marking:
        return "marking";
    case SlipKind::style_height:
        return plan.by_nodus ? "nodus up/down" : "style height";
    case SlipKind::substyle:
        return plan.by_nodus ? "nodus sideways" : "substyle";
    case SlipKind::facing:
        return plan.level ? "turned" : "facing";
    case SlipKind::lean:
        return plan.level ? "level N–S" : "lean";
    case SlipKind::level:
        return "level E–W";
    case SlipKind::print:
        return "print";
    case SlipKind::position:
        return "position";
    case SlipKind::equation:
        break;
    }
    return "eq. of time";
}

/// "marking 0.5 mm": what was reckoned with.
std::string size_words(const AccuracyPlan& plan, bool inches) {
    const SlipSizes& s = plan.sizes;
    const auto degrees = [](Angle angle) { return fmt::format("{:g}°", angle.in_degrees()); };
    return fmt::format("Reckoned with: half of the Sun's width, {}'; a line {} beside its place; {} {}, {} {}; {} {}; "
                       "{} {}; a 100 mm bar "
                       "{} off one way of the paper; the place {} off in latitude and in longitude; and the years' own "
                       "equation of time.",
                       fixed(s.half_shadow.in_degrees() * 60, 0), say_length(s.marking_mm, inches),
                       plan.by_nodus ? "the nodus leaning by" : "style height off by", degrees(s.style_height),
                       plan.by_nodus ? "to a side by" : "substyle by", degrees(s.substyle),
                       plan.level ? "the plate turned by" : "facing by", degrees(s.facing),
                       plan.level ? "out of level by" : "lean by", degrees(s.lean), say_length(100 * s.print, inches),
                       degrees(s.position));
}

std::string hour_label(double time_h) {
    return layout::time_label(time_h);
}

std::string supported_words(const FaceAccuracy& face) {
    if (face.supported.empty())
        return "No run of its hours can be read to half an hour: it is lit too aslant.";
    std::string text = "It supports a reading";
    for (std::size_t i = 0; i < face.supported.size(); ++i) {
        const Supported& one = face.supported[i];
        text += fmt::format("{} to {:g} {} from {} to {}", i > 0 ? ", and" : "", one.minutes,
                            one.minutes == 1 ? "minute" : "minutes", hour_label(one.first_h), hour_label(one.last_h));
    }
    return text + ", if the work is done as said below.";
}

/// A cell with its place in the table.
struct Found {
    double minutes = -1;
    SlipKind kind = SlipKind::half_shadow;
    std::size_t line = 0, season = 0;
};

/// The largest single slip within the run that the first promise is made for.
Found largest_slip(const FaceAccuracy& face) {
    Found found;
    for (std::size_t i = 0; i < face.lines.size(); ++i) {
        const AccuracyLine& line = face.lines[i];
        if (!face.supported.empty() &&
            (line.time_h < face.supported.front().first_h || line.time_h > face.supported.front().last_h))
            continue;
        for (std::size_t season = 0; season < line.at.size(); ++season)
            for (std::size_t k = 0; line.at[season] && k < k_slips.size(); ++k)
                if (line.at[season]->minutes[k].value_or(-1) > found.minutes)
                    found = {*line.at[season]->minutes[k], k_slips[k], i, season};
    }
    return found;
}

std::string way(double mm, const char* forward, const char* backward, bool inches) {
    return say_length(std::abs(mm), inches) + ' ' + (mm < 0 ? backward : forward);
}

std::string place_words(PlatePoint at, const AccuracyPlan& plan, bool inches) {
    constexpr double k_on_it_mm = 0.05;
    std::vector<std::string> parts;
    if (std::abs(at.u_mm) >= k_on_it_mm)
        parts.push_back(plan.level ? way(at.u_mm, "east", "west", inches) : way(at.u_mm, "right", "left", inches));
    if (std::abs(at.v_mm) >= k_on_it_mm)
        parts.push_back(plan.level ? way(at.v_mm, "north", "south", inches) : way(at.v_mm, "up", "down", inches));
    return parts.empty() ? "at the foot of the nodus" : fmt::format("{} of the nodus' foot", fmt::join(parts, ", "));
}

/// What is gained by proving a slip to be nothing; empty where that is less than the next finer reading.
std::string proved_words(const FaceAccuracy& face, SlipKind kind) {
    const auto proved = supported_readings(without(face.lines, kind));
    if (proved.empty() || face.supported.empty() || proved.front().minutes >= face.supported.front().minutes)
        return "";
    const Supported& one = proved.front();
    return fmt::format(" Were it proved to be nothing, the reading would be good to {:g} {} from {} to {}.",
                       one.minutes, one.minutes == 1 ? "minute" : "minutes", hour_label(one.first_h),
                       hour_label(one.last_h));
}

/// The season in which an hour's total is the largest; nothing where it is never lit.
std::optional<std::size_t> worst_season(const AccuracyLine& line) {
    std::optional<std::size_t> worst;
    for (std::size_t i = 0; i < line.at.size(); ++i)
        if (line.at[i] && (!worst || line.at[i]->total_min > line.at[*worst]->total_min))
            worst = i;
    return worst;
}

std::string minutes_text(double minutes) {
    return minutes > 99.95 ? std::string{"over 99"} : fixed(minutes, minutes < 9.995 ? 2 : 1);
}

std::vector<SlipKind> shown_slips(const FaceAccuracy& face) {
    std::vector<SlipKind> shown;
    for (const SlipKind kind : k_slips)
        if (kind != SlipKind::level || face.plan.level)
            shown.push_back(kind);
    return shown;
}

} // namespace

const char* slip_name(SlipKind kind) {
    static constexpr const char* k_names[] = {"half_shadow", "marking", "style_height", "substyle", "facing",
                                              "lean",        "level",   "print",        "position", "equation"};
    return k_names[static_cast<std::size_t>(kind)];
}

std::vector<std::string> accuracy_words(const Commission& commission, const FaceAccuracy& face) {
    const bool inches = commission.design.units == Units::inches;
    std::vector<std::string> list{supported_words(face)};
    if (const Found most = largest_slip(face); most.minutes >= 0) {
        const AccuracyCell& cell = *face.lines[most.line].at[most.season];
        list.push_back(fmt::format("What matters most there: {}, {} min at {} {}, read {}.{}",
                                   slip_words(most.kind, face.plan), fixed(most.minutes, 1), face.labels[most.line],
                                   k_seasons[most.season], place_words(cell.at, face.plan, inches),
                                   proved_words(face, most.kind)));
    }
    list.push_back(size_words(face.plan, inches));
    return list;
}

std::vector<layout::Flow::Column> accuracy_columns(const FaceAccuracy& face) {
    std::vector<layout::Flow::Column> columns{
        {"hour", Align::left}, {"June", Align::right}, {"equinox", Align::right}, {"Dec.", Align::right}};
    for (const SlipKind kind : shown_slips(face))
        columns.push_back({slip_words(kind, face.plan), Align::right});
    columns.push_back({"most", Align::left});
    return columns;
}

std::vector<TableRow> accuracy_rows(const FaceAccuracy& face) {
    std::vector<TableRow> rows;
    for (std::size_t i = 0; i < face.lines.size(); ++i) {
        const AccuracyLine& line = face.lines[i];
        const auto worst = worst_season(line);
        if (!worst)
            continue;
        rows.push_back({face.labels[i]});
        for (const auto& cell : line.at)
            rows.back().push_back(cell ? minutes_text(cell->total_min) : "–");
        const AccuracyCell& cell = *line.at[*worst];
        for (const SlipKind kind : shown_slips(face)) {
            const auto& minutes = cell.minutes[static_cast<std::size_t>(kind)];
            rows.back().push_back(minutes ? minutes_text(*minutes) : "–");
        }
        rows.back().push_back(slip_words(cell.most, face.plan));
    }
    return rows;
}

} // namespace dialwright::cli
