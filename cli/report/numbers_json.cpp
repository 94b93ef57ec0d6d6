// SPDX-License-Identifier: MIT
#include "cli/report/families.hpp"
#include "cli/report/json_text.hpp"
#include "cli/report/numbers.hpp"
#include "cli/report/say.hpp"
#include "layout/correction/words.hpp"
#include "layout/plate/family_words.hpp"

#include <fmt/format.h>

namespace dialwright::cli {
namespace {

Json number(double value) {
    return json_number(value);
}

Json point(PlatePoint p) {
    return Json::array({number(p.u_mm), number(p.v_mm)});
}

Json points(const std::vector<PlatePoint>& line) {
    Json list = Json::array();
    for (const PlatePoint& p : line)
        list.push_back(point(p));
    return list;
}

Json style_json(const Style& style) {
    return {{"height_deg", number(style.height.in_degrees())},
            {"substyle_deg", number(style.substyle.in_degrees())},
            {"substyle_hour_angle_deg", number(style.substyle_hour_angle.in_degrees())},
            {"centre_mm", style.centre ? point(*style.centre) : Json(nullptr)}};
}

bool has_hour_angle(const layout::DrawnLine& line) {
    return !counts_from_horizon(line.family);
}

/// A line that is neither one of the ring's hours nor a date: with its time, or with the angle that it stands for.
Json more_line(const layout::DrawnLine& line) {
    Json out{{"family", layout::words_of(line.family, line.time).name}, {"label", line.label}};
    if (is_hour(line.family))
        out["time_h"] = number(line.time_h);
    else if (line.family == Family::place_noon)
        out["hour_angle_deg"] = number(line.hour_angle.in_degrees());
    else
        out["level_deg"] = number(line.level.in_degrees());
    out["points_mm"] = points(line.points);
    return out;
}

/// How each family is drawn.
Json families_json(const FacePlan& plan, const layout::Face& face) {
    Json list = Json::array();
    for (const DrawnFamily& family : drawn_families(plan, face))
        list.push_back(
            {{"family", family.name},
             {"in_ring", family.in_ring},
             {"width_mm", family.width_mm > 0 ? number(family.width_mm) : Json(nullptr)},
             {"declinations_deg", family.between ? Json::array({number(family.between->least.in_degrees()),
                                                                number(family.between->greatest.in_degrees())})
                                                 : Json(nullptr)},
             {"figures", family.figures.empty() ? Json(nullptr) : Json(family.figures)}});
    return list;
}

void add_face(Json& out, const FacePlan& plan, const layout::Face& face) {
    const Attitude& attitude = plan.dial.attitude;
    out["plate"] = {{"normal_azimuth_deg", number(attitude.normal_azimuth.in_degrees())},
                    {"normal_altitude_deg", number(attitude.normal_altitude.in_degrees())},
                    {"middle_mm", point({-face.placement.foot.x_mm, -face.placement.foot.y_mm})}};
    out["nodus"] = {{"height_mm", number(face.placement.nodus_height_mm)}};
    out["gnomon"] = {{"thickness_mm", number(plan.dial.gnomon_thickness_mm)}, {"foot_mm", number(face.gnomon_foot_mm)}};
    out["style"] = style_json(face.delineation.style);
    out["families"] = families_json(plan, face);
    out["hour_lines"] = Json::array();
    out["date_lines"] = Json::array();
    out["more_lines"] = Json::array();
    for (const layout::DrawnLine& line : face.lines) {
        if (line.family == Family::date)
            out["date_lines"].push_back({{"label", line.label},
                                         {"declination_deg", number(line.declination.value_or(Angle{}).in_degrees())},
                                         {"points_mm", points(line.points)}});
        else if (line.set == 0 && is_hour(line.family))
            out["hour_lines"].push_back(
                {{"label", line.label},
                 {"time_h", number(line.time_h)},
                 {"hour_angle_deg", has_hour_angle(line) ? number(line.hour_angle.in_degrees()) : Json(nullptr)},
                 {"angle_deg", line.direction ? number(line.direction->in_degrees()) : Json(nullptr)},
                 {"points_mm", points(line.points)}});
        else
            out["more_lines"].push_back(more_line(line));
    }
}

/// [azimuth, altitude] of each mark; empty for the flat horizon.
Json skyline_json(const Design& design) {
    Json list = Json::array();
    for (const Skyline::Mark& mark : design.place.skyline)
        list.push_back(Json::array({number(mark.azimuth.in_degrees()), number(mark.altitude.in_degrees())}));
    return list;
}

Json equation_json(const MeanYear& year) {
    Json list = Json::array();
    static constexpr unsigned k_days[] = {31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31};
    for (unsigned month = 1; month <= 12; ++month)
        for (unsigned day = 1; day <= k_days[month - 1]; ++day) {
            const auto mean = year.at(year.day_of(std::chrono::month{month} / std::chrono::day{day}));
            list.push_back({{"date", fmt::format("{:02}-{:02}", month, day)},
                            {"minutes", number(mean.equation_of_time.in_minutes_of_time())},
                            {"declination_deg", number(mean.declination.in_degrees())}});
        }
    return list;
}

std::string day_code(std::chrono::month_day date) {
    return fmt::format("{:02}-{:02}", unsigned(date.month()), unsigned(date.day()));
}

Json summer_json(const SummerTime& summer, bool summer_numerals) {
    static constexpr const char* k_kinds[] = {"none", "yearly", "irregular"};
    const bool yearly = summer.kind == SummerTime::Kind::yearly;
    return {{"kind", k_kinds[static_cast<std::size_t>(summer.kind)]},
            {"ahead_min", number(double(summer.ahead.count()) / 60)},
            {"begins", yearly ? Json(layout::say_day(summer.begins)) : Json(nullptr)},
            {"ends", yearly ? Json(layout::say_day(summer.ends)) : Json(nullptr)},
            {"since", summer.since},
            {"words", layout::say_summer(summer, summer_numerals)}};
}

Json correction_json(const Commission& commission) {
    if (!commission.correction)
        return nullptr;
    const Correction& correction = *commission.correction;
    const auto spread = correction.spread();
    Json out{{"time", say_time(correction.time())},
             {"longitude_min", number(correction.longitude_min())},
             {"words", layout::say_rule(correction, 1e-9)},
             {"summer_time", summer_json(correction.summer(), commission.design.hours.summer_numerals)},
             {"spread_s", number(spread.seconds)},
             {"spread_date", day_code(spread.date)},
             {"days", Json::array()}};
    for (const std::chrono::month_day date : dates_of_year())
        out["days"].push_back({{"date", day_code(date)}, {"add_min", number(correction.add_min(date))}});
    return out;
}

} // namespace

std::string numbers_json(const Commission& commission) {
    const Design& design = commission.design;
    Json out;
    out["format"] = 1;
    out["title"] = design.title;
    out["site"] = {{"latitude_deg", number(design.place.site.latitude.in_degrees())},
                   {"longitude_deg", number(design.place.site.longitude.in_degrees())},
                   {"zone", design.place.zone},
                   {"zone_meridian_deg", number(commission.plans.front().dial.zone_meridian.in_degrees())},
                   {"skyline_deg", skyline_json(design)}};
    out["horizon_deg"] = number(commission.plans.front().dial.horizon.in_degrees());
    out["time"] = say_time(design.hours.time);
    out["years"] = {design.years.first, design.years.last};
    if (commission.faces.size() == 1) {
        add_face(out, commission.plans.front(), commission.faces.front());
    } else {
        out["faces"] = Json::array();
        for (std::size_t i = 0; i < commission.faces.size(); ++i) {
            Json face;
            face["face"] = commission.plans[i].name;
            add_face(face, commission.plans[i], commission.faces[i]);
            out["faces"].push_back(std::move(face));
        }
    }
    out["correction"] = correction_json(commission);
    out["equation_of_time"] = equation_json(commission.year);
    return json_text(out);
}

std::string hour_lines_csv(const Commission& commission) {
    std::string text =
        "face,label,time_h,hour_angle_deg,angle_deg,inner_u_mm,inner_v_mm,outer_u_mm,outer_v_mm,points\n";
    for (std::size_t i = 0; i < commission.faces.size(); ++i)
        for (const layout::DrawnLine& line : commission.faces[i].lines) {
            if (line.set != 0 || !is_hour(line.family))
                continue;
            const PlatePoint a = line.points.front(), b = line.points.back();
            text +=
                fmt::format("{},{},{},{},{},{},{},{},{},{}\n", commission.plans[i].name, line.label,
                            fixed(line.time_h, 6), has_hour_angle(line) ? fixed(line.hour_angle.in_degrees(), 6) : "",
                            line.direction ? fixed(line.direction->in_degrees(), 6) : "", fixed(a.u_mm, 4),
                            fixed(a.v_mm, 4), fixed(b.u_mm, 4), fixed(b.v_mm, 4), line.points.size());
        }
    return text;
}

} // namespace dialwright::cli
