// SPDX-License-Identifier: MIT
#include "cli/report/fixing.hpp"

#include "cli/report/fixing_words.hpp"
#include "cli/report/json_text.hpp"
#include "cli/report/say.hpp"
#include "engine/dial/slipped_dial.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>
#include <iterator>

namespace dialwright::cli {
namespace {

using namespace std::chrono;

/// A Sun lower than this throws shadows too long and too faint to fix a dial by. Common practice, no source.
constexpr Angle k_least_height = Angle::degrees(8);
constexpr int k_before_noon_min[] = {240, 180, 150, 120, 90, 60};
/// Enough for a derivative, small enough that the reading runs straight over it.
constexpr Angle k_small_turn = Angle::degrees(0.05);

std::vector<FixingRow> rows_of(const Commission& commission, const CivilDay& day) {
    std::vector<Instant> instants;
    for (Instant at = day.begin; at < day.end; at += minutes{15})
        instants.push_back(at);
    std::vector<layout::Outline> edges;
    for (const FacePlan& plan : commission.plans)
        edges.push_back(layout::Rings::of(plan.spec).edge);
    std::vector<FixingRow> rows;
    for (ShadowReport& report : shadow_reports(commission, instants, std::nullopt))
        if (report.lit && report.shadow) {
            const layout::Point at = layout::to_work(*report.shadow, commission.faces[report.face].placement.foot);
            const bool on_plate = edges[report.face].contains(at);
            rows.push_back({std::move(report), on_plate});
        }
    return rows;
}

std::vector<EqualAltitudes> pairs_of(const Site& site, const CivilDay& day, const Almanac& almanac) {
    std::vector<EqualAltitudes> pairs;
    const SunEvent* noon = day.first(SunEvent::Kind::noon);
    for (const int before : k_before_noon_min)
        if (noon != nullptr)
            if (const auto pair = equal_altitudes(site, noon->at, minutes{before}, almanac);
                pair && pair->altitude > k_least_height)
                pairs.push_back(*pair);
    return pairs;
}

std::vector<FixingAnswer> answers_of(const Commission& commission, std::size_t face, const CivilDay& day) {
    const FacePlan& plan = commission.plans[face];
    const bool by_nodus =
        !has_style(commission.design.gnomon.kind) || commission.design.hours.reach == HourExtent::nodus;
    const SlippedDial dial{plan.dial, commission.year, plan.dial.hours.time, by_nodus};
    const PlateFrame& frame = dial.caster().surface().frame();
    const bool level = commission.design.dial.kind == DialKind::level;
    std::vector<Instant> instants;
    for (Instant at = day.begin; at < day.end; at += hours{1})
        instants.push_back(at);
    std::vector<FixingAnswer> answers;
    for (const ShadowReport& report : shadow_reports(commission, instants, face)) {
        if (!report.lit || !report.shadow || !report.reads_h || report.towards_sun.altitude() < k_least_height)
            continue;
        const double mean_day = commission.year.day_of(report.at);
        const auto rate = [&](const Eigen::Vector3d& axis) {
            Slip ahead, behind;
            ahead.turned = turn_about(axis, k_small_turn);
            behind.turned = turn_about(axis, -k_small_turn);
            const auto more = dial.error_min(report.sky, mean_day, ahead, *report.shadow);
            const auto less = dial.error_min(report.sky, mean_day, behind, *report.shadow);
            return more && less ? (*more - *less) / (2 * k_small_turn.in_degrees()) : 0.0;
        };
        answers.push_back({report.at, *report.reads_h, rate(-Eigen::Vector3d::UnitZ()), rate(-frame.u),
                           rate(level ? frame.v : Eigen::Vector3d(-frame.n))});
    }
    return answers;
}

Json row_json(const Fixing& fixing, const FixingRow& row) {
    const ShadowReport& shadow = row.shadow;
    Json out{{"clock", iso_clock(fixing.zone, shadow.at)}, {"instant", write_instant(shadow.at)}};
    if (fixing.commission->plans.size() > 1)
        out["face"] = fixing.commission->plans[shadow.face].name;
    out["reads"] = shadow.reads_h ? Json(say_clock(*shadow.reads_h)) : Json(nullptr);
    out["shadow_mm"] = {json_number(shadow.shadow->u_mm), json_number(shadow.shadow->v_mm)};
    out["on_plate"] = row.on_plate;
    out["sun_altitude_deg"] = json_number(shadow.towards_sun.altitude().in_degrees());
    out["sun_azimuth_deg"] = json_number(shadow.towards_sun.azimuth().in_degrees());
    return out;
}

Json date_json(const Fixing& fixing, const FixingDate& date) {
    Json out{{"date", iso_date(date.day.date)}, {"noon", nullptr}};
    if (const SunEvent* noon = date.day.first(SunEvent::Kind::noon))
        out["noon"] = iso_clock(fixing.zone, noon->at);
    out["equation_of_time_min"] = json_number(date.day.equation_of_time.in_minutes_of_time());
    out["rows"] = Json::array();
    for (const FixingRow& row : date.rows)
        out["rows"].push_back(row_json(fixing, row));
    out["equal_altitudes"] = Json::array();
    for (const EqualAltitudes& pair : date.pairs)
        out["equal_altitudes"].push_back({{"before", iso_clock(fixing.zone, pair.before)},
                                          {"after", iso_clock(fixing.zone, pair.after)},
                                          {"altitude_deg", json_number(pair.altitude.in_degrees())},
                                          {"before_azimuth_deg", json_number(pair.before_azimuth.in_degrees())},
                                          {"after_azimuth_deg", json_number(pair.after_azimuth.in_degrees())},
                                          {"middle_off_deg", json_number(pair.middle_off.in_degrees())}});
    return out;
}

std::vector<TableRow> quarter_rows(const Fixing& fixing, const FixingDate& date) {
    const bool inches = fixing.commission->design.units == Units::inches;
    std::vector<TableRow> rows;
    for (const FixingRow& row : date.rows) {
        const ShadowReport& shadow = row.shadow;
        rows.push_back(
            {say_clock(fixing.zone, shadow.at).substr(0, 5), shadow.reads_h ? reading_words(*shadow.reads_h) : "none",
             layout::bare_length(shadow.shadow->u_mm, inches), layout::bare_length(shadow.shadow->v_mm, inches),
             fixed(shadow.towards_sun.altitude().in_degrees(), 1) + "°",
             fixed(shadow.towards_sun.azimuth().in_degrees(), 1) + "°"});
        if (fixing.commission->plans.size() > 1)
            rows.back().push_back(fixing.commission->plans[shadow.face].name);
        if (!row.on_plate)
            rows.back().push_back("off the plate");
    }
    return rows;
}

} // namespace

Fixing fixing_of(const Commission& commission, year_month_day first, year_month_day last) {
    const Design& design = commission.design;
    const Site& site = design.place.site;
    Fixing fixing{&commission, Zone::find(design.place.zone).value(), {}, {}};
    const Almanac almanac{sys_days{first} - days{3}, sys_days{last} + days{4}};
    for (CivilDay& day : civil_days(site, fixing.zone, first, last)) {
        FixingDate date;
        if (day.begin < day.end) {
            date.rows = rows_of(commission, day);
            date.pairs = pairs_of(site, day, almanac);
        }
        date.day = std::move(day);
        fixing.dates.push_back(std::move(date));
    }
    for (std::size_t face = 0; face < commission.plans.size(); ++face)
        fixing.answers.push_back(answers_of(commission, face, fixing.dates.front().day));
    return fixing;
}

std::string fixing_text(const Fixing& fixing) {
    using layout::Align;
    const Design& design = fixing.commission->design;
    const PlateWords words = plate_words(design);
    const bool inches = design.units == Units::inches;
    const std::string unit = inches ? " in" : " mm";
    std::string text = fmt::format("Fixing {} at {}, {}, {}\n", design.title, say_latitude(design.place.site.latitude),
                                   say_longitude(design.place.site.longitude), design.place.zone);
    const auto put = std::back_inserter(text);
    std::vector<TableRow> noons;
    for (const FixingDate& date : fixing.dates)
        noons.push_back(noon_row(fixing, date));
    fmt::format_to(put, "\nLocal noon\n{}", text_table(noon_columns(), noons, 2));
    for (const FixingDate& date : fixing.dates) {
        fmt::format_to(put, "\n{}: what the dial must read, and where the nodus' shadow falls, {} from its foot\n",
                       say_weekday_date(date.day.date), inches ? "inches" : "mm");
        fmt::format_to(put, "{}",
                       date.rows.empty() ? std::string{"  the Sun does not light it on this date\n"}
                                         : text_table({{"clock", Align::left},
                                                       {"reads", Align::right},
                                                       {words.right + unit, Align::right},
                                                       {words.up + unit, Align::right},
                                                       {"Sun's height", Align::right},
                                                       {"azimuth", Align::right}},
                                                      quarter_rows(fixing, date), 2));
        if (!date.pairs.empty())
            fmt::format_to(put, "  North by equal shadows of a peg on a level board\n{}",
                           text_table(pair_columns(), pair_rows(fixing, date), 4));
    }
    fmt::format_to(put, "\n{}\n", north_words());
    for (std::size_t face = 0; face < fixing.answers.size(); ++face) {
        const std::string& name = fixing.commission->plans[face].spec.name;
        fmt::format_to(put, "\n{}\n", name.empty() ? "Level and plumb" : "Level and plumb, " + name);
        for (const std::string& line : level_words(fixing, face))
            fmt::format_to(put, "  {}\n", line);
        if (fixing.answers[face].empty())
            continue;
        fmt::format_to(put, "\nMinutes by which the reading goes on for a degree\n{}",
                       text_table(answer_columns(fixing), answer_rows(fixing, face), 2));
        for (const std::string& line : move_words(fixing, face))
            fmt::format_to(put, "  {}\n", line);
    }
    return text + "\nNever look at the Sun to align a dial: work from the shadow.\n";
}

std::string fixing_json(const Fixing& fixing) {
    Json out{{"format", 1}, {"title", fixing.commission->design.title}, {"dates", Json::array()}};
    for (const FixingDate& date : fixing.dates)
        out["dates"].push_back(date_json(fixing, date));
    out["answers"] = Json::array();
    for (std::size_t face = 0; face < fixing.answers.size(); ++face)
        for (const FixingAnswer& answer : fixing.answers[face]) {
            Json one{{"clock", iso_clock(fixing.zone, answer.at)}};
            if (fixing.answers.size() > 1)
                one["face"] = fixing.commission->plans[face].name;
            one["reads"] = say_clock(answer.reads_h);
            one["turn_min_per_deg"] = json_number(answer.turn_min);
            one["tip_min_per_deg"] = json_number(answer.tip_min);
            one["roll_min_per_deg"] = json_number(answer.roll_min);
            out["answers"].push_back(std::move(one));
        }
    return json_text(out);
}

std::string fixing_csv(const Fixing& fixing) {
    std::string text = "date,clock,face,reads,u_mm,v_mm,on_plate,sun_altitude_deg,sun_azimuth_deg\n";
    for (const FixingDate& date : fixing.dates)
        for (const FixingRow& row : date.rows) {
            const ShadowReport& shadow = row.shadow;
            fmt::format_to(std::back_inserter(text), "{},{},{},{},{},{},{},{},{}\n", iso_date(date.day.date),
                           iso_clock(fixing.zone, shadow.at), fixing.commission->plans[shadow.face].name,
                           shadow.reads_h ? say_clock(*shadow.reads_h) : "", fixed(shadow.shadow->u_mm, 3),
                           fixed(shadow.shadow->v_mm, 3), row.on_plate ? "yes" : "no",
                           fixed(shadow.towards_sun.altitude().in_degrees(), 4),
                           fixed(shadow.towards_sun.azimuth().in_degrees(), 4));
        }
    return text;
}

} // namespace dialwright::cli
