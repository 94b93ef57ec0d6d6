// SPDX-License-Identifier: MIT
//
// Each family of lines by a route of its own: the Sun is found again from every drawn point, and asked whether it keeps
// the family's definition; Suns chosen by the definition must have their shadows on the drawn lines.
#include "engine/dial/delineation.hpp"
#include "tests/engine/dial/family_definitions.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::test;

namespace {

/// The least of `astray` over the gnomon's edges that may have cast the point, in mm on the plate; 1e9 where no Sun that
/// counts could have cast it.
double astray_mm(const DialPlan& plan, const Caster<Plane>& caster, const Delineation& dial, const DialLine& line,
                 PlatePoint p) {
    double least = 1e9;
    for (const Edge edge : {Edge::left, Edge::right}) {
        const SiteDirection sun{sun_above(plan, dial.frame, p, caster.edges().shift(edge))};
        const SkyPlace sky = to_sky(sun, plan.site.latitude);
        const bool of_style =
            line.family == Family::hour || line.family == Family::place_noon; // runs on beyond the Sun's own
        const bool counts =
            of_style || (sun.enu.z() > -1e-8 && abs(sky.declination) < dial.season.greatest + Angle::radians(1e-8));
        const Angle hour = of_style ? line.hour_angle : sky.hour_angle;
        const PlatePoint right = caster.edges().shift(Edge::right);
        const double between =
            to_site({hour, Angle{}}, plan.site.latitude).enu.dot(right.u_mm * dial.frame.u + right.v_mm * dial.frame.v);
        const double above_top =
            cos(hour - dial.style.substyle_hour_angle); // the edges change places 6 h from the substyle's hour
        const bool at_a_change = std::abs(between) < 1e-6 || std::abs(above_top) < 1e-6;
        if (!counts || (caster.edges().casting(hour) != edge && !at_a_change))
            continue;
        const double square = 1 / std::pow(sun.enu.dot(dial.frame.n), 2); // a turn by e moves the shadow by h e / sin²
        least = std::min(least, plan.nodus_height_mm * square * astray(plan, line, sky));
    }
    return least;
}

/// How far the shadow of a Sun lies from the pieces of the line that it belongs to; 0 where it throws none that counts.
double missed_mm(const DialPlan& plan, const Caster<Plane>& caster, const Delineation& dial, const DialLine& name,
                 const SkyPlace& sun) {
    const SiteDirection direction = to_site(sun, plan.site.latitude);
    if (!(direction.enu.z() > 1e-7) || !(direction.enu.dot(dial.frame.n) > 1e-7) ||
        abs(sun.declination) > dial.season.greatest - Angle::radians(1e-9))
        return 0;
    const auto shadow = caster.cast(sun, Light::seen);
    constexpr double k_inner_mm = 399.999;
    if (!shadow || std::max(std::abs(shadow->point.u_mm), std::abs(shadow->point.v_mm)) > k_inner_mm)
        return 0;
    const DialLine* line = line_named(dial, name);
    return line ? distance_mm(shadow->point, line->pieces) : 1e9;
}

} // namespace

TEST_CASE("Every point of every family is the shadow of a Sun that keeps the definition", "[engine][dial]") {
    constexpr int k_seed = 601;
    RandomPlates random{k_seed};
    std::array<int, 10> drawn{};
    for (int i = 0; i < k_plans; ++i) {
        DialPlan plan = random_plan(random);
        ask_for_every_family(plan);
        plan.noons = {{"elsewhere", plan.site.longitude + random.degrees(-60, 60)}};
        plan.dates.lines = {{"any", random.degrees(-23.4, 23.4)}, {"equinox", Angle{}}};
        INFO(told(k_seed, i, plan));
        const Delineation dial = delineate(plan, mean_year(), k_window);
        const Caster<Plane> caster = caster_of(plan);
        for (const DialLine& line : dial.lines) {
            INFO("family " << int(line.family) << ", time " << line.time_h << ", level " << line.level.in_degrees());
            ++drawn[std::size_t(line.family)];
            for (const PlatePolyline& piece : line.pieces)
                for (const PlatePoint p : piece) {
                    INFO("at " << p.u_mm << ", " << p.v_mm);
                    REQUIRE((std::abs(p.u_mm) <= 400.000001 && std::abs(p.v_mm) <= 400.000001));
                    REQUIRE(astray_mm(plan, caster, dial, line, p) < 1e-4);
                }
        }
    }
    for (const Family family :
         {Family::hour, Family::date, Family::since_sunrise, Family::since_sunset, Family::to_sunset,
          Family::unequal_hour, Family::altitude, Family::azimuth, Family::place_noon})
        CHECK(drawn[std::size_t(family)] > 50);
}

TEST_CASE("Every Sun of an hour from rise or set, of an altitude or an azimuth has its shadow on the line",
          "[engine][dial]") {
    constexpr int k_seed = 602;
    RandomPlates random{k_seed};
    const double obliquity = mean_year().obliquity().in_radians();
    for (int i = 0; i < k_plans; ++i) {
        DialPlan plan = random_plan(random);
        ask_for_every_family(plan);
        INFO(told(k_seed, i, plan));
        const Delineation dial = delineate(plan, mean_year(), k_window);
        const Caster<Plane> caster = caster_of(plan);
        for (int set = 1; set <= 4; ++set) {
            const HourTime time = plan.more_hours[std::size_t(set - 1)].time;
            for (int k = 0; k < (time == HourTime::unequal ? 12 : 24); ++k)
                for (int j = 0; j < 40; ++j) {
                    // Evenly, and crowded to the ends of the season and of the range in which the Sun rises.
                    const double limit =
                        std::min(obliquity, (Angle::degrees(90) - abs(plan.site.latitude)).in_radians());
                    const double near_end = std::pow(10.0, random.number(-4, -1));
                    const double declination = j < 20 ? random.number(-obliquity, obliquity)
                                                      : (j % 2 == 0 ? limit - near_end : near_end - limit);
                    const auto sun = sun_of_hour(plan, time, k, declination);
                    if (!sun)
                        continue;
                    DialLine name;
                    name.family = family_of(time);
                    name.set = set;
                    name.time_h = k;
                    INFO("family " << int(name.family) << ", hour " << k << ", declination "
                                   << sun->declination.in_degrees());
                    REQUIRE(missed_mm(plan, caster, dial, name, *sun) < 0.01);
                }
        }
        for (const bool azimuths : {false, true})
            for (const Angle level : azimuths ? plan.azimuths : plan.altitudes)
                for (int j = 0; j < 60; ++j) {
                    DialLine name;
                    name.family = azimuths ? Family::azimuth : Family::altitude;
                    name.level = level;
                    const Angle altitude =
                        j % 2 == 0 ? random.degrees(0, 90) : Angle::degrees(std::pow(10.0, random.number(-4, 0)));
                    const SiteDirection sun =
                        azimuths ? direction_at(level, altitude) : direction_at(random.degrees(0, 360), level);
                    INFO("azimuths: " << azimuths << ", level " << level.in_degrees() << ", altitude "
                                      << altitude.in_degrees());
                    REQUIRE(missed_mm(plan, caster, dial, name, to_sky(sun, plan.site.latitude)) < 0.01);
                }
    }
}
