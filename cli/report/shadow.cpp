// SPDX-License-Identifier: MIT
#include "cli/report/shadow.hpp"
#include "cli/report/say.hpp"

#include "engine/sun/almanac.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>
#include <iterator>

namespace dialwright::cli {
namespace {

/// One face's caster with what a reading needs.
struct Reader {
    const FacePlan* plan;
    Caster<Plane> caster;
};

std::string reading_json(std::optional<double> hours) {
    return hours ? '"' + say_clock(*hours) + '"' : "null";
}

std::string reading_text(std::optional<double> hours) {
    return hours ? say_clock(*hours) : "none";
}

} // namespace

std::vector<ShadowReport> shadow_reports(const Commission& commission, std::span<const Instant> instants,
                                         std::optional<std::size_t> face) {
    std::vector<Reader> readers;
    for (const FacePlan& plan : commission.plans)
        readers.push_back({&plan, caster_of(plan.dial)});
    const Site& site = commission.design.place.site;
    const auto suns = apparent_suns(instants);
    std::vector<ShadowReport> reports;
    reports.reserve(instants.size());
    for (std::size_t i = 0; i < instants.size(); ++i) {
        ShadowReport report;
        report.at = instants[i];
        report.sun = suns[i];
        report.sky = sky_place(suns[i], site.longitude);
        report.towards_sun = to_site(report.sky, site.latitude);
        const std::size_t first = face.value_or(0), last = face.value_or(readers.size() - 1);
        report.face = first;
        for (std::size_t k = first; k <= last && !report.lit; ++k)
            if (const auto cast = readers[k].caster.cast(report.sky, Light::seen)) {
                report.face = k;
                report.lit = true;
                report.shadow = cast->point;
                const DialPlan& dial = readers[k].plan->dial;
                const double day = commission.year.day_of(report.at);
                report.reads_h = reading_of(dial, dial.hours.time, commission.year, report.sky, day);
                for (const HourPlan& more : dial.more_hours)
                    report.also_reads_h.push_back(reading_of(dial, more.time, commission.year, report.sky, day));
            }
        reports.push_back(report);
    }
    return reports;
}

std::string shadow_json(const Commission& commission, const std::vector<ShadowReport>& reports,
                        std::span<const std::string> texts) {
    fmt::memory_buffer out;
    const auto put = std::back_inserter(out);
    const bool several = commission.plans.size() > 1;
    fmt::format_to(put, "[");
    for (std::size_t i = 0; i < reports.size(); ++i) {
        const ShadowReport& r = reports[i];
        fmt::format_to(put, "{}{{\"at\":\"{}\",", i == 0 ? "\n" : ",\n", texts[i]);
        if (several)
            fmt::format_to(put, "\"face\":\"{}\",", commission.plans[r.face].name);
        fmt::format_to(put,
                       "\"sun\":{{\"altitude_deg\":{},\"azimuth_deg\":{},\"declination_deg\":{},\"hour_angle_deg\":{},"
                       "\"equation_of_time_min\":{}}},\"lit\":{},",
                       fixed(r.towards_sun.altitude().in_degrees(), 7), fixed(r.towards_sun.azimuth().in_degrees(), 7),
                       fixed(r.sky.declination.in_degrees(), 7), fixed(r.sky.hour_angle.in_degrees(), 7),
                       fixed(r.sun.equation_of_time.in_minutes_of_time(), 6), r.lit);
        if (r.shadow)
            fmt::format_to(put, "\"shadow_mm\":[{},{}],\"reads\":{}", fixed(r.shadow->u_mm, 6),
                           fixed(r.shadow->v_mm, 6), reading_json(r.reads_h));
        else
            fmt::format_to(put, "\"shadow_mm\":null,\"reads\":null");
        const auto& more = commission.plans[r.face].dial.more_hours;
        for (std::size_t k = 0; k < more.size(); ++k)
            fmt::format_to(put, "{}\"{}\":{}", k == 0 ? ",\"also\":{" : ",", say_time(more[k].time),
                           r.lit ? reading_json(r.also_reads_h[k]) : "null");
        fmt::format_to(put, "{}", more.empty() ? "}" : "}}");
    }
    fmt::format_to(put, "\n]\n");
    return fmt::to_string(out);
}

std::string shadow_text(const Commission& commission, const std::vector<ShadowReport>& reports) {
    fmt::memory_buffer out;
    const auto put = std::back_inserter(out);
    const bool several = commission.plans.size() > 1;
    const auto zone = Zone::find(commission.design.place.zone);
    fmt::format_to(put, "{:<26} {:>9} {:>9} {:>9} {:>10}  {:>9} {:>9}  {:<9}{}\n", "clock", "altitude", "azimuth",
                   "decl.", "hour ang.", "u mm", "v mm", "reads", several ? " face" : "");
    for (const ShadowReport& r : reports) {
        const auto degrees = [](Angle a) { return fixed(a.in_degrees(), 3) + "°"; };
        fmt::format_to(put, "{:<26} {:>9} {:>9} {:>9} {:>10}  ", zone ? say_moment(*zone, r.at) : write_instant(r.at),
                       degrees(r.towards_sun.altitude()), degrees(r.towards_sun.azimuth()), degrees(r.sky.declination),
                       degrees(r.sky.hour_angle));
        if (r.shadow)
            fmt::format_to(put, "{:>9} {:>9}  {:<9}", fixed(r.shadow->u_mm, 2), fixed(r.shadow->v_mm, 2),
                           reading_text(r.reads_h));
        else
            fmt::format_to(put, "{:>9} {:>9}  {:<9}", "", "", r.towards_sun.enu.z() > 0 ? "unlit" : "Sun down");
        fmt::format_to(put, "{}", several ? " " + commission.plans[r.face].name : "");
        const auto& more = commission.plans[r.face].dial.more_hours;
        for (std::size_t k = 0; k < more.size() && r.lit; ++k)
            fmt::format_to(put, "  {} {}", say_time(more[k].time), reading_text(r.also_reads_h[k]));
        fmt::format_to(put, "\n");
    }
    return fmt::to_string(out);
}

} // namespace dialwright::cli
