// SPDX-License-Identifier: MIT
#include "cli/report/say.hpp"
#include "cli/report/sunlight.hpp"
#include "cli/report/sunlight_months.hpp"
#include "engine/sun/solar_day.hpp"
#include "layout/chart/light_chart.hpp"
#include "layout/sheet/flow.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using namespace std::chrono;

/// The zone's time of the chart: the standard time that holds on 1 January or 1 July, whichever is the smaller.
seconds chart_offset(const LightYear& year) {
    const Zone& zone = year.face.zone;
    return zone.at(sys_days{std::chrono::year{year.year} / January / 1}).standard();
}

double summer_shift_h(const LightYear& year) {
    double most = 0;
    for (const LightDay& day : year.days)
        most = std::max(most, duration<double, std::ratio<3600>>(year.face.zone.at(day.begin).summer_time).count());
    return most;
}

std::vector<layout::HourSpan> hour_spans(const std::vector<TimeSpan>& spans, Instant midnight) {
    std::vector<layout::HourSpan> list;
    for (const TimeSpan& span : spans_within(spans, midnight, midnight + hours{24}))
        list.push_back({hours_of(span.from - midnight), hours_of(span.to - midnight)});
    return list;
}

layout::LightChartPlan chart_plan(const LightYear& year) {
    layout::LightChartPlan plan;
    plan.summer_shift_h = summer_shift_h(year);
    const Site& site = year.face.site;
    const Almanac almanac{year.days.front().begin - days{3}, year.days.back().end + days{3}};
    const seconds offset = chart_offset(year);
    for (const LightDay& day : year.days) {
        const Instant midnight = Instant{sys_days{day.date}} - offset;
        layout::LightChartDay chart;
        // Later tones lie on the earlier: the whole of the Sun's day, of it what faces, of it what is lit.
        chart.behind = hour_spans(year.light.up, midnight);
        chart.shaded = hour_spans(year.light.facing, midnight);
        chart.lit = hour_spans(year.light.lit, midnight);
        const Instant noon = solar_day(site, midnight + hours{12}, almanac).noon;
        chart.noon_h = std::fmod(hours_of(noon - midnight) + 24.0, 24.0);
        plan.days.push_back(std::move(chart));
    }
    return plan;
}

void put_chart(layout::Flow& flow, const LightYear& year) {
    layout::LightChartPlan plan = chart_plan(year);
    plan.width_mm = flow.width();
    plan.height_mm = std::min(0.62 * flow.width(), 120.0);
    layout::put_chart(flow, layout::light_chart(plan));
}

} // namespace

layout::SheetBook sunlight_sheets(const std::vector<LightYear>& years, layout::PrintOptions options) {
    if (options.title.empty())
        options.title = fmt::format("Sunlight in {}", years.front().year);
    std::vector<layout::Sheet> sheets;
    const auto take = [&](layout::Flow& flow) {
        for (layout::Sheet& sheet : flow.sheets())
            sheets.push_back(std::move(sheet));
    };
    if (years.size() > 1) {
        layout::Flow flow{options, "Sunlight compared"};
        flow.paragraph("Sunlight compared", "", true, 5.0);
        flow.paragraph("Hours of Sun on each face.");
        flow.space(1);
        flow.table(compared_columns(years), compared_rows(years));
        flow.paragraph(k_light_note);
        take(flow);
    }
    for (const LightYear& year : years) {
        layout::Flow flow{options, "Sunlight: " + year.face.name};
        flow.paragraph("When it is lit: " + year.face.name, "", true, 5.0);
        flow.space(0.6);
        flow.paragraph(face_heading(year) + ". Clock times are those of " + year.face.zone.name() + ".");
        flow.space(1.5);
        put_chart(flow, year);
        flow.space(2);
        flow.table(month_columns(), month_rows(year), 2.5);
        for (const std::string& remark : light_remarks(year))
            flow.paragraph(remark, "", true);
        flow.space(1);
        flow.table(day_columns(), day_rows(year), 2.3);
        flow.space(1);
        flow.paragraph(k_light_note, "", false, 2.5);
        take(flow);
    }
    return {options.title, "When a dial's plate is lit", std::move(sheets)};
}

} // namespace dialwright::cli
