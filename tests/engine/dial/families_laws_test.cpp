// SPDX-License-Identifier: MIT
//
// Laws that whole delineations keep, every family at once, over random plates: a mirror in the meridian, one in the
// equator, the two faces of a slab, and a plate carried to where it lies level.
#include "engine/dial/delineation.hpp"
#include "tests/engine/cast/brute_walk.hpp"
#include "tests/engine/dial/family_plans.hpp"

#include <catch2/catch.hpp>

#include <functional>

using namespace dialwright;
using namespace dialwright::test;
using Catch::Matchers::WithinAbs;

namespace {

#ifdef DIALWRIGHT_FEWER_CASES
constexpr int k_plans = 15;
#else
constexpr int k_plans = 100;
#endif
constexpr PlateBox k_window{-400, -400, 400, 400};
constexpr double k_same_mm = 0.01;

/// A plan with every family, dates and a noon elsewhere, sun hours between the solstices.
DialPlan full_plan(RandomPlates& random) {
    DialPlan plan = random_plan(random);
    ask_for_every_family(plan);
    plan.hours.extent = HourExtent::nodus;
    plan.noons = {{"elsewhere", plan.site.longitude + random.degrees(-60, 60)}};
    plan.dates.lines = {{"a", random.degrees(-23.4, 23.4)}, {"b", Angle{}}};
    return plan;
}

double length_of(const std::vector<PlatePolyline>& pieces) {
    double length = 0;
    for (const PlatePolyline& piece : pieces)
        for (std::size_t k = 1; k < piece.size(); ++k)
            length += std::hypot(piece[k].u_mm - piece[k - 1].u_mm, piece[k].v_mm - piece[k - 1].v_mm);
    return length;
}

/// Each line of `dial` has its image in `other`: renamed, and with the points moved.
void require_image(const Delineation& dial, const Delineation& other, const std::function<DialLine(DialLine)>& renamed,
                   const std::function<PlatePoint(PlatePoint)>& moved) {
    for (const DialLine& line : dial.lines) {
        INFO("family " << int(line.family) << ", time " << line.time_h << ", level " << line.level.in_degrees());
        const DialLine* image = line_named(other, renamed(line));
        if (!image && length_of(line.pieces) < k_same_mm)
            continue;
        REQUIRE(image);
        REQUIRE_THAT(length_of(image->pieces), WithinAbs(length_of(line.pieces), 0.05));
        for (const PlatePolyline& piece : line.pieces)
            for (const PlatePoint p : piece)
                REQUIRE(distance_mm(moved(p), image->pieces) < k_same_mm);
    }
}

} // namespace

TEST_CASE("East and west change places in the mirror of the meridian", "[engine][dial]") {
    constexpr int k_seed = 621;
    RandomPlates random{k_seed};
    for (int i = 0; i < k_plans; ++i) {
        const DialPlan plan = full_plan(random);
        INFO(told(k_seed, i, plan));
        DialPlan mirrored = plan;
        mirrored.attitude.normal_azimuth = (-plan.attitude.normal_azimuth).positive_turn();
        mirrored.noons[0].longitude = plan.site.longitude - (plan.noons[0].longitude - plan.site.longitude);
        const auto renamed = [](DialLine line) {
            const Family family = line.family;
            if (family == Family::hour || family == Family::place_noon)
                line.time_h = line.time_h == 0 ? 0 : 24 - line.time_h;
            if (family == Family::unequal_hour)
                line.time_h = 12 - line.time_h;
            if (family == Family::since_sunrise)
                line.family = Family::to_sunset, line.set = 3;
            if (family == Family::to_sunset)
                line.family = Family::since_sunrise, line.set = 1;
            if (family == Family::azimuth)
                line.level = -line.level;
            return line;
        };
        Delineation dial = delineate(plan, mean_year(), k_window);
        std::erase_if(dial.lines,
                      [](const DialLine& line) { return line.family == Family::since_sunset; }); // mirrors to none here
        require_image(dial, delineate(mirrored, mean_year(), k_window), renamed, [](PlatePoint p) {
            return PlatePoint{-p.u_mm, p.v_mm};
        });
    }
}

TEST_CASE("North and south change places with the seasons in the mirror of the equator", "[engine][dial]") {
    constexpr int k_seed = 622;
    RandomPlates random{k_seed};
    for (int i = 0; i < k_plans; ++i) {
        const DialPlan plan = full_plan(random);
        INFO(told(k_seed, i, plan));
        DialPlan mirrored = plan;
        mirrored.site.latitude = -plan.site.latitude;
        mirrored.attitude.normal_azimuth = (Angle::degrees(180) - plan.attitude.normal_azimuth).positive_turn();
        for (DatePlan::Line& date : mirrored.dates.lines)
            date.declination = -date.declination;
        const bool level = abs(plan.attitude.normal_altitude) > Angle::degrees(90) - k_level_tolerance;
        const auto renamed = [](DialLine line) {
            if (line.family == Family::azimuth)
                line.level = Angle::degrees(180) - line.level;
            return line;
        };
        require_image(delineate(plan, mean_year(), k_window), delineate(mirrored, mean_year(), k_window), renamed,
                      [level](PlatePoint p) {
                          return level ? PlatePoint{p.u_mm, -p.v_mm} : PlatePoint{-p.u_mm, p.v_mm};
                      });
    }
}

TEST_CASE("The two faces of a slab carry the two halves of the same lines", "[engine][dial]") {
    constexpr int k_seed = 623;
    RandomPlates random{k_seed};
    int on_both = 0;
    for (int i = 0; i < k_plans; ++i) {
        DialPlan front = full_plan(random);
        front.gnomon_thickness_mm = 0;
        front.horizon = {};
        DialPlan back = front;
        back.attitude = {(front.attitude.normal_azimuth + Angle::degrees(180)).positive_turn(),
                         -front.attitude.normal_altitude};
        INFO(told(k_seed, i, front));
        const Delineation a = delineate(front, mean_year(), k_window), b = delineate(back, mean_year(), k_window);
        // The back's nodus stands as far behind the slab as the front's before it: a straight line of the front goes on
        // there after half a turn about the foot.
        for (const DialLine& line : a.lines) {
            const DialLine* other = line_named(b, line);
            const bool straight =
                line.family != Family::altitude && line.family != Family::unequal_hour && line.family != Family::date;
            if (!other || !straight || length_mm(line.pieces[0]) < 1 || length_mm(other->pieces[0]) < 1)
                continue;
            INFO("family " << int(line.family) << ", time " << line.time_h << ", level " << line.level.in_degrees());
            ++on_both;
            for (const PlatePoint p : other->pieces[0]) {
                const Eigen::Vector3d turned_about = -(p.u_mm * b.frame.u + p.v_mm * b.frame.v);
                REQUIRE(off_line_mm({turned_about.dot(a.frame.u), turned_about.dot(a.frame.v)}, line.pieces[0]) < 1e-4);
            }
        }
        // Every seen Sun lights one face, and only one.
        for (int k = 0; k < 50; ++k) {
            const SkyPlace sun{random.degrees(-180, 180), random.degrees(-23.4, 23.4)};
            const bool seen = to_site(sun, front.site.latitude).enu.z() > 1e-9;
            if (seen && std::abs(to_site(sun, front.site.latitude).enu.dot(a.frame.n)) > 1e-9)
                REQUIRE(caster_of(front).cast(sun, Light::seen).has_value() !=
                        caster_of(back).cast(sun, Light::seen).has_value());
        }
    }
    CHECK(on_both > 200);
}

TEST_CASE("A plate is the level dial of the place where it would lie level", "[engine][dial]") {
    constexpr int k_seed = 624;
    RandomPlates random{k_seed};
    int compared = 0;
    for (int i = 0; i < 4 * k_plans; ++i) {
        DialPlan plan = random_plan(random);
        plan.gnomon_thickness_mm = 0;
        INFO(told(k_seed, i, plan));
        const PlateFrame frame = frame_of(plan.attitude);
        const SkyPlace normal = to_sky({frame.n}, plan.site.latitude);
        DialPlan level = plan;
        level.attitude = {};
        level.site = {normal.declination, (plan.site.longitude - normal.hour_angle).signed_turn()};
        // The same moments on both: apparent time of the plate's own meridian.
        plan.hours.time = level.hours.time = HourTime::zone;
        plan.zone_meridian = level.zone_meridian = plan.site.longitude;
        const Delineation here = delineate(plan, mean_year(), k_window),
                          there = delineate(level, mean_year(), k_window);
        // v of the level plate is north there: the pole's part in the plate.
        const Eigen::Vector3d north = north_pole(plan.site.latitude).enu;
        if (std::hypot(north.dot(frame.u), north.dot(frame.v)) < 1e-6)
            continue;
        const Angle turn = arc_tangent(north.dot(frame.u), north.dot(frame.v)); // clockwise from v
        const auto turned = [&](PlatePoint p) {
            return PlatePoint{p.u_mm * cos(turn) + p.v_mm * sin(turn), p.v_mm * cos(turn) - p.u_mm * sin(turn)};
        };
        REQUIRE_THAT(here.style.height.in_degrees(), WithinAbs(there.style.height.in_degrees(), 1e-6));
        if (here.style.centre && there.style.centre &&
            std::hypot(here.style.centre->u_mm, here.style.centre->v_mm) < 1e4) {
            const PlatePoint centre = turned(*there.style.centre);
            REQUIRE(std::hypot(centre.u_mm - here.style.centre->u_mm, centre.v_mm - here.style.centre->v_mm) < 1e-5);
        }
        for (const DialLine& line : here.lines)
            if (const DialLine* other = line_named(there, line);
                other && length_mm(line.pieces[0]) > 1 && length_mm(other->pieces[0]) > 1) {
                ++compared;
                INFO("hour " << line.time_h);
                // Where the style is parallel to the plate its lines run both ways, told by whichever pole is up at the site.
                const Angle apart = *line.direction - *other->direction - turn;
                REQUIRE_THAT(here.style.centre ? apart.signed_turn().in_degrees() : 90 * sin(apart),
                             WithinAbs(0, 1e-6));
                for (const PlatePoint p : other->pieces[0])
                    REQUIRE(off_line_mm(turned(p), line.pieces[0]) < 1e-4);
            }
    }
    CHECK(compared > 500);
}
