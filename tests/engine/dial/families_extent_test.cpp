// SPDX-License-Identifier: MIT
//
// Families that are drawn for a part of the year only.
#include "engine/dial/delineation.hpp"
#include "tests/engine/dial/family_plans.hpp"

#include <catch2/catch.hpp>

#include <map>
#include <tuple>

using namespace dialwright;
using namespace dialwright::test;
using Catch::Matchers::WithinAbs;

namespace {

constexpr PlateBox k_window{-400, -400, 400, 400};

void draw_between(DialPlan& plan, std::optional<Season> between) {
    plan.altitudes_between = plan.azimuths_between = plan.noons_between = between;
    for (HourPlan& hours : plan.more_hours)
        hours.between = between;
}

using Name = std::tuple<Family, int, std::string, double, double>;
std::map<Name, double> lengths_of(const Delineation& dial) {
    std::map<Name, double> lengths;
    for (const DialLine& line : dial.lines)
        if (line.set > 0 || !is_hour(line.family))
            for (const PlatePolyline& piece : line.pieces)
                for (std::size_t k = 1; k < piece.size(); ++k)
                    lengths[{line.family, line.set, line.label, line.time_h, line.level.in_degrees()}] +=
                        std::hypot(piece[k].u_mm - piece[k - 1].u_mm, piece[k].v_mm - piece[k - 1].v_mm);
    return lengths;
}

} // namespace

TEST_CASE("the parts of the year make the whole lines, and each holds its own Suns alone", "[families]") {
    const int seed = 31;
    RandomPlates random{seed};
    for (int i = 0; i < 40; ++i) {
        DialPlan plan = random_plan(random);
        plan.gnomon_thickness_mm = 0;
        ask_for_every_family(plan);
        HourPlan clock;
        clock.time = HourTime::clock;
        clock.half_year = HalfYear::december_to_june;
        plan.more_hours.push_back(clock);
        plan.noons = {{"elsewhere", plan.site.longitude + random.degrees(-60, 60)}};
        plan.hours.extent = HourExtent::nodus;
        INFO(told(seed, i, plan));
        const Angle most = mean_year().obliquity(), cut = random.degrees(-20, 20);
        const auto whole = lengths_of(delineate(plan, mean_year(), k_window));
        std::map<Name, double> parts;
        for (const Season& season : {Season{-most, cut}, Season{cut, most}}) {
            draw_between(plan, season);
            const Delineation dial = delineate(plan, mean_year(), k_window);
            for (const auto& [name, length] : lengths_of(dial))
                parts[name] += length;
            for (const DialLine& line : dial.lines) {
                if ((line.set == 0 && is_hour(line.family)) || line.family == Family::date)
                    continue;
                for (const PlatePolyline& piece : line.pieces)
                    for (const PlatePoint& p : piece) {
                        const Eigen::Vector3d sun = sun_above(plan, dial.frame, p, {});
                        const Angle latitude = plan.site.latitude;
                        const Angle declination =
                            arc_sine(std::clamp(sun.y() * cos(latitude) + sun.z() * sin(latitude), -1.0, 1.0));
                        // The walk stops within a hair of a millimetre, which is more of an angle the nearer it is.
                        constexpr Angle k_hair = Angle::degrees(0.02);
                        REQUIRE(declination > season.least - k_hair);
                        REQUIRE(declination < season.greatest + k_hair);
                    }
            }
            draw_between(plan, std::nullopt);
        }
        for (const auto& [name, length] : whole) {
            INFO("family " << int(std::get<0>(name)) << " set " << std::get<1>(name) << " time " << std::get<3>(name)
                           << " level " << std::get<4>(name));
            // Chords within 0.01 mm of a tightly bent clock curve differ by as much in length, part by part.
            CHECK_THAT(parts[name], WithinAbs(length, 0.05 + 2e-3 * length));
        }
    }
}
