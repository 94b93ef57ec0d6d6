// SPDX-License-Identifier: MIT
#include "engine/survey/dial_adjust.hpp"
#include "engine/survey/real_sun.hpp"
#include "engine/time/instant_text.hpp"
#include "tests/engine/random_plates.hpp"

#include <Eigen/Geometry>
#include <catch2/catch.hpp>

#include <cmath>
#include <random>

using Catch::Matchers::WithinAbs;
using namespace dialwright;

namespace {

DialPlan level_at(double latitude, double longitude = -0.7) {
    DialPlan plan;
    plan.site = {Angle::degrees(latitude), Angle::degrees(longitude)};
    plan.nodus_height_mm = 100;
    return plan;
}

const MeanYear& year() {
    static const MeanYear made{2025, 2044};
    return made;
}

/// What a dial that stands so would be read as, each hour of a day.
DialReadings readings_of(const DialPlan& plan, const Misfixing& misfixing, const char* noon) {
    DialReadings readings;
    readings.plan = plan;
    std::vector<Instant> times;
    for (int hour = -7; hour <= 7; ++hour)
        times.push_back(*read_instant(noon) + std::chrono::hours{hour});
    const LatitudeSines latitude{plan.site.latitude};
    for (const RealSun& sun : real_suns(plan.site, times)) {
        const SiteDirection seen = sun.seen(latitude);
        if (seen.enu.z() < 0.1 || seen.enu.dot(frame_of(plan.attitude).n) < 0.1)
            continue;
        readings.readings.push_back(
            {sun.at, std::fmod(*reading_of_misfixed(plan, year(), misfixing, seen, year().day_of(sun.at)), 12.0)});
    }
    return readings;
}

} // namespace

TEST_CASE("A dial that stands right reads its own time", "[adjust]") {
    const DialPlan plan = level_at(54.5);
    for (const double hour_angle : {-70.0, -10.0, 0.0, 44.0}) {
        const SkyPlace sky{Angle::degrees(hour_angle), Angle::degrees(12)};
        CHECK_THAT(*reading_of_misfixed(plan, year(), {}, to_site(sky, plan.site.latitude), 100),
                   WithinAbs(12 + hour_angle / 15, 1e-9));
    }
}

TEST_CASE("Misfixings move a reading as plain reasoning says", "[adjust]") {
    const DialPlan plan = level_at(54.5);
    const auto reads = [&](const Misfixing& misfixing, double hour_angle, double declination) {
        return *reading_of_misfixed(
            plan, year(), misfixing,
            to_site({Angle::degrees(hour_angle), Angle::degrees(declination)}, plan.site.latitude), 100);
    };
    // Turned anticlockwise, its noon line points west of north: the noon shadow falls on an afternoon line.
    Misfixing turned;
    turned.turn_deg = 2;
    CHECK(reads(turned, 0, 20) > 12.05);
    // Its west edge low (the pole's plate leans west): hours as at a place further west would be; noon comes earlier there.
    Misfixing right_high;
    right_high.right_deg = 1;
    CHECK(reads(right_high, 0, 0) < 12);
    // North edge high does not touch noon, and nothing at the equinox beyond the second order.
    Misfixing top_high;
    top_high.top_deg = 1;
    CHECK_THAT(reads(top_high, 0, 20), WithinAbs(12, 1e-9));
    CHECK_THAT(reads(top_high, 60, 0), WithinAbs(16, 2e-3));
    CHECK(std::abs(reads(top_high, 60, 20) - 16) > 0.01);
    // A style too steep leaves noon alone, and draws the morning's shadow on too early a line.
    Misfixing steep;
    steep.style_height_deg = 3;
    CHECK_THAT(reads(steep, 0, 10), WithinAbs(12, 1e-9));
    Misfixing leaning;
    leaning.style_right_deg = 2;
    CHECK(std::abs(reads(leaning, 0, 10) - 12) > 0.02);
}

TEST_CASE("Exact readings give the misfixing back", "[adjust]") {
    const Misfixing cases[] = {{2.5, -0.8, 0.6, 0, 0}, {-4, 0, 0, 0, 0}, {0, 1.5, -1.2, 0, 0}};
    for (const double latitude : {54.5, -33.0})
        for (const double altitude : {90.0, 0.0})
            for (const Misfixing& truth : cases) {
                DialPlan plan = level_at(latitude);
                if (altitude == 0)
                    plan.attitude = {Angle::degrees(latitude > 0 ? 165 : 10), Angle{}};
                const DialAdjustment made = adjust_dial(
                    readings_of(plan, truth, latitude > 0 ? "2027-06-21T12:00:00Z" : "2027-01-05T12:00:00Z"), year());
                REQUIRE_FALSE(made.answers.empty());
                const AdjustAnswer& answer = made.answers.front();
                INFO(latitude << " " << altitude << " " << truth.turn_deg);
                CHECK(answer.fault == AdjustAnswer::Fault::fixing);
                CHECK(std::abs(answer.turn.value - truth.turn_deg) < answer.turn.range + 0.05);
                CHECK(std::abs(answer.top.value - truth.top_deg) < answer.top.range + 0.05);
                CHECK(std::abs(answer.right.value - truth.right_deg) < answer.right.range + 0.05);
            }
}

TEST_CASE("At an equinox a level dial's tilts are not told, and its turn is if a level finds it right", "[adjust]") {
    const Misfixing truth{3, 0, 0, 0, 0};
    const DialAdjustment made = adjust_dial(readings_of(level_at(54.5), truth, "2027-03-20T12:00:00Z"), year());
    REQUIRE_FALSE(made.answers.empty());
    CHECK_FALSE(made.answers.front().top.told);
    REQUIRE(made.if_level);
    CHECK_THAT(made.if_level->turn.value, WithinAbs(3, 0.1));
    CHECK(made.if_level->turn.range < 0.5);
}

TEST_CASE("A bent style is told from a dial that is tilted", "[adjust]") {
    const DialAdjustment made =
        adjust_dial(readings_of(level_at(54.5), {0, 0, 0, 4, 0}, "2027-06-21T12:00:00Z"), year());
    REQUIRE_FALSE(made.answers.empty());
    CHECK(made.answers.front().fault == AdjustAnswer::Fault::style);
    CHECK_THAT(made.answers.front().style_height.value, WithinAbs(4, 0.2));
}

TEST_CASE("A moved dial reads the time of its new place", "[adjust]") {
    std::mt19937 random{11};
    std::uniform_real_distribution<double> degrees{-1, 1};
    for (int round = 0; round < 300; ++round) {
        DialPlan plan = level_at(65 * degrees(random), 170 * degrees(random));
        plan.zone_meridian = Angle::degrees(15 * std::round(11 * degrees(random)));
        plan.hours.time = round % 2 == 0 ? HourTime::sun : HourTime::zone;
        if (round % 3 != 0)
            plan.attitude = {Angle::degrees(180 + 180 * degrees(random)), Angle::degrees(60 * degrees(random))};
        const Site there{Angle::degrees(65 * degrees(random)),
                         plan.site.longitude + Angle::degrees(30 * degrees(random))};
        const Angle meridian = plan.zone_meridian + Angle::degrees(15);
        const Remounting made = remounted(plan, there, meridian);
        // Rebuilt as a fitter does it: turned in its own plane, then its edge raised.
        const PlateFrame frame = frame_of(plan.attitude);
        const Eigen::Vector3d edge = sin(made.wedge_towards) * frame.u + cos(made.wedge_towards) * frame.v;
        const Eigen::Matrix3d mounting = (Eigen::AngleAxisd{made.wedge.in_radians(), edge.cross(frame.n)} *
                                          Eigen::AngleAxisd{made.turn.in_radians(), frame.n})
                                             .toRotationMatrix();
        CHECK_THAT((mounting * frame.n - frame_of(made.attitude).n).norm(), WithinAbs(0, 1e-9));
        const SkyPlace sky{Angle::degrees(100 * degrees(random)), Angle::degrees(23 * degrees(random))};
        const Eigen::Vector3d seen = mounting.transpose() * to_site(sky, there.latitude).enu;
        const Angle shown = to_sky({seen}, plan.site.latitude).hour_angle;
        CHECK_THAT(std::remainder(time_of(plan.hours.time, shown, plan.site, plan.zone_meridian) -
                                      time_of(plan.hours.time, sky.hour_angle, there, meridian),
                                  24.0),
                   WithinAbs(0, 1e-9));
    }
}

TEST_CASE("A level dial moved south wants a wedge of the latitudes' difference under its south edge", "[adjust]") {
    const DialPlan plan = level_at(54);
    const Remounting made = remounted(plan, {Angle::degrees(50), plan.site.longitude}, Angle{});
    CHECK_THAT(made.wedge.in_degrees(), WithinAbs(4, 1e-9));
    CHECK_THAT(made.wedge_towards.in_degrees(), WithinAbs(180, 1e-9));
    CHECK_THAT(made.turn.in_degrees(), WithinAbs(0, 1e-9));
    const Remounting stays = remounted(plan, plan.site, Angle{});
    CHECK_THAT(stays.wedge.in_degrees(), WithinAbs(0, 1e-6));
}
