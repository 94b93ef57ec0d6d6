// SPDX-License-Identifier: MIT
#include "cli/report/sunlight.hpp"

#include "cli/report/json_text.hpp"
#include "cli/report/say.hpp"
#include "cli/report/sunlight_months.hpp"
#include "cli/report/text_table.hpp"

#include <fmt/format.h>
#include <iterator>

namespace dialwright::cli {
namespace {

using namespace std::chrono;

Json face_json(const LightYear& year) {
    const LightFace& face = year.face;
    Json out{{"name", face.name},
             {"year", year.year},
             {"site",
              {{"latitude_deg", json_number(face.site.latitude.in_degrees())},
               {"longitude_deg", json_number(face.site.longitude.in_degrees())},
               {"zone", face.zone.name()}}},
             {"plate",
              {{"normal_azimuth_deg", json_number(face.attitude.normal_azimuth.in_degrees())},
               {"normal_altitude_deg", json_number(face.attitude.normal_altitude.in_degrees())}}}};
    const auto totals = [](const LightTotals& sum) {
        return Json{{"up_h", json_number(sum.up_h)},
                    {"facing_h", json_number(sum.facing_h)},
                    {"lit_h", json_number(sum.lit_h)},
                    {"days_lit", sum.days_lit}};
    };
    out["total"] = totals(total_of(year));
    out["months"] = Json::array();
    for (const LightTotals& month : months_of(year))
        out["months"].push_back(totals(month));
    out["days"] = Json::array();
    for (const LightDay& day : year.days) {
        Json spans = Json::array();
        for (const TimeSpan& span : day.lit)
            spans.push_back({iso_clock(face.zone, span.from), iso_clock(face.zone, span.to)});
        out["days"].push_back({{"date", iso_date(day.date)},
                               {"up_h", json_number(hours_of(day.up))},
                               {"facing_h", json_number(hours_of(day.facing))},
                               {"lit_h", json_number(hours_of(day.lit_for))},
                               {"lit", std::move(spans)}});
    }
    return out;
}

/// A text that a comma may stand in.
std::string csv_text(const std::string& text) {
    std::string quoted = "\"";
    for (const char c : text)
        quoted.append(c == '"' ? 2 : 1, c);
    return quoted + '"';
}

} // namespace

LightYear light_year(LightFace face, int year) {
    const auto begin_of = [&](sys_days date) {
        return face.zone.to_utc(ClockReading{local_days{date.time_since_epoch()}}).first;
    };
    const sys_days first = sys_days{std::chrono::year{year} / January / 1},
                   last = sys_days{std::chrono::year{year + 1} / January / 1};
    const Instant from = begin_of(first), to = begin_of(last);
    const Almanac almanac{from - days{1}, to + days{1}};
    // A day more on either side: the chart's days are those of standard time.
    LightYear made{
        face,
        year,
        plate_light(face.site, frame_of(face.attitude), face.skyline, almanac, from - hours{23}, to + hours{23}),
        {}};
    for (sys_days date = first; date < last; date += days{1}) {
        LightDay day;
        day.date = date;
        day.begin = begin_of(date);
        day.end = begin_of(date + days{1});
        day.lit = spans_within(made.light.lit, day.begin, day.end);
        day.up = time_within(made.light.up, day.begin, day.end);
        day.facing = time_within(made.light.facing, day.begin, day.end);
        day.lit_for = time_within(made.light.lit, day.begin, day.end);
        made.days.push_back(std::move(day));
    }
    return made;
}

std::string sunlight_text(const std::vector<LightYear>& years) {
    std::string text;
    const auto put = std::back_inserter(text);
    if (years.size() > 1)
        fmt::format_to(put, "Hours of Sun on the face\n{}\n",
                       text_table(compared_columns(years), compared_rows(years), 2));
    for (const LightYear& year : years) {
        fmt::format_to(put, "{}\n{}", face_heading(year), text_table(month_columns(), month_rows(year), 2));
        for (const std::string& remark : light_remarks(year))
            fmt::format_to(put, "  {}\n", remark);
        fmt::format_to(put, "  Lit, by the clock:\n{}\n", text_table(day_columns(), day_rows(year), 4));
    }
    return text + k_light_note + '\n';
}

std::string sunlight_json(const std::vector<LightYear>& years) {
    Json out{{"format", 1}, {"faces", Json::array()}};
    for (const LightYear& year : years)
        out["faces"].push_back(face_json(year));
    return json_text(out);
}

std::string sunlight_csv(const std::vector<LightYear>& years) {
    std::string text = "face,date,up_h,facing_h,lit_h,first,last,spans\n";
    for (const LightYear& year : years)
        for (const LightDay& day : year.days)
            fmt::format_to(std::back_inserter(text), "{},{},{},{},{},{},{},{}\n", csv_text(year.face.name),
                           iso_date(day.date), fixed(hours_of(day.up), 4), fixed(hours_of(day.facing), 4),
                           fixed(hours_of(day.lit_for), 4),
                           day.lit.empty() ? "" : iso_clock(year.face.zone, day.lit.front().from),
                           day.lit.empty() ? "" : iso_clock(year.face.zone, day.lit.back().to), day.lit.size());
    return text;
}

} // namespace dialwright::cli
