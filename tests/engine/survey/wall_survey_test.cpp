// SPDX-License-Identifier: MIT
#include "engine/surface/plane.hpp"
#include "engine/survey/wall_survey.hpp"
#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <chrono>
#include <cmath>

using Catch::Matchers::WithinAbs;
using namespace dialwright;
using Fault = WallAnswer::Fault;

namespace {

/// Shadows without scatter, each half hour of a day on which the wall is well lit, by a clock that is `slow_s` slow.
WallReadings shadows_of(const Site& site, const Attitude& wall, const char* noon, double slow_s = 0) {
    WallReadings readings;
    readings.site = site;
    const Plane plane{frame_of(wall), readings.peg_mm};
    std::vector<Instant> times;
    for (int half = -20; half <= 20; ++half)
        times.push_back(*read_instant(noon) + half * std::chrono::minutes{30});
    const LatitudeSines latitude{site.latitude};
    for (const RealSun& sun : real_suns(site, times)) {
        const SiteDirection seen = sun.seen(latitude, slow_s);
        if (seen.enu.z() < 0.12 || plane.light(seen) < 0.25)
            continue;
        const PlatePoint at = *plane.shadow_of_nodus(seen);
        readings.shadows.push_back({sun.at, at.u_mm, -at.v_mm});
    }
    return readings;
}

struct Case {
    double latitude, longitude, facing, lean;
    const char* noon;
};
constexpr Case k_cases[] = {{51.5, -2.2, 157, 1.5, "2027-05-03T12:00:00Z"},
                            {-33.0, 22.5, 20, -4, "2027-02-11T10:30:00Z"},
                            {64.0, 20.0, 270, 0, "2027-06-21T11:00:00Z"},
                            {2.0, 104.0, 95, 30, "2027-09-23T05:00:00Z"},
                            {54.0, 0.0, 10, 0, "2027-06-21T12:00:00Z"}};

WallReadings readings_of(const Case& one) {
    return shadows_of({Angle::degrees(one.latitude), Angle::degrees(one.longitude)},
                      {Angle::degrees(one.facing), Angle::degrees(one.lean)}, one.noon);
}

} // namespace

TEST_CASE("Exact shadows give facing and lean back, on any wall", "[survey]") {
    for (const Case& one : k_cases) {
        const WallReadings readings = readings_of(one);
        INFO(one.latitude << " " << one.facing << ": " << readings.shadows.size() << " shadows");
        REQUIRE(readings.shadows.size() >= 3);
        const WallSurvey survey = survey_wall(readings);
        REQUIRE(survey.answers.size() == 1);
        CHECK(survey.checked);
        CHECK_FALSE(survey.too_scattered);
        const WallAnswer& answer = survey.answers.front();
        CHECK(answer.fault == Fault::none);
        CHECK_THAT(std::remainder(answer.facing_deg.value - one.facing, 360), WithinAbs(0, 0.01));
        CHECK_THAT(answer.lean_deg.value, WithinAbs(one.lean, 0.01));
        CHECK(answer.facing_deg.told);
        CHECK(answer.facing_deg.range > 0.02); // the peg, the foot and the plumb line keep their ±
        CHECK(std::none_of(answer.stray.begin(), answer.stray.end(), [](bool stray) { return stray; }));
        REQUIRE(survey.next);
        CHECK(survey.next->facing_range_deg <= answer.facing_deg.range * 1.001);
    }
}

TEST_CASE("A bad reading is pointed out, and does not spoil the rest", "[survey]") {
    for (const Case& one : k_cases) {
        WallReadings readings = readings_of(one);
        if (readings.shadows.size() < 6)
            continue;
        readings.shadows[2].right_mm += 25;
        const WallAnswer answer = survey_wall(readings).answers.front();
        CHECK(answer.stray[2]);
        CHECK_THAT(answer.off_right_mm[2], WithinAbs(25, 0.5));
        CHECK_THAT(std::remainder(answer.facing_deg.value - one.facing, 360), WithinAbs(0, 0.02));
    }
}

TEST_CASE("Offsets with a wrong sign are named", "[survey]") {
    WallReadings readings = readings_of(k_cases[0]);
    for (PegShadow& shadow : readings.shadows)
        shadow.right_mm = -shadow.right_mm;
    CHECK(survey_wall(readings).swap == WallSurvey::Swap::left_for_right);
    readings = readings_of(k_cases[0]);
    for (PegShadow& shadow : readings.shadows)
        shadow.down_mm = -shadow.down_mm;
    CHECK(survey_wall(readings).swap == WallSurvey::Swap::up_for_down);
}

TEST_CASE("A clock ten minutes slow is never passed over on a wall where it shows", "[survey]") {
    const WallReadings readings =
        shadows_of({Angle::degrees(51.5), Angle{}}, {Angle::degrees(180), Angle{}}, "2027-04-20T12:00:00Z", 600);
    const WallSurvey survey = survey_wall(readings);
    REQUIRE(survey.clock_told_s < 600);
    bool found = false;
    for (const WallAnswer& answer : survey.answers)
        found =
            found || (answer.fault == Fault::clock && std::abs(answer.clock_s.value - 600) < answer.clock_s.range + 1 &&
                      std::abs(answer.facing_deg.value - 180) < answer.facing_deg.range);
    CHECK(found);
    // By the shadows alone a crooked board would do as well; a lean by plumb line parts them.
    WallReadings plumbed = readings;
    plumbed.lean_deg = Known{0, 0.05};
    const WallSurvey better = survey_wall(plumbed);
    CHECK(better.answers.size() <= survey.answers.size());
}

TEST_CASE("Grazing moments and a compass give a facing, and claim no more", "[survey]") {
    WallReadings readings;
    readings.site = {Angle::degrees(51.5), Angle{}};
    readings.bearing_deg = Known{170, 3};
    const WallSurvey compass = survey_wall(readings);
    REQUIRE(compass.answers.size() == 1);
    CHECK_THAT(compass.answers[0].facing_deg.value, WithinAbs(170, 0.1));
    CHECK_THAT(compass.answers[0].facing_deg.range, WithinAbs(3, 0.05));
    CHECK_FALSE(compass.answers[0].lean_deg.told);
    CHECK_FALSE(compass.checked);

    // The Sun enters the plane of an upright wall that faces 170 when it stands at azimuth 80 or 260.
    const LatitudeSines latitude{readings.site.latitude};
    Instant at = *read_instant("2027-05-10T04:00:00Z");
    for (const double azimuth : {80.0, 260.0}) {
        const Instant end = at + std::chrono::hours{16};
        for (; at < end; at += std::chrono::seconds{10})
            if (const auto sun = real_suns(readings.site, std::vector<Instant>{at})[0].seen(latitude);
                std::abs(sun.azimuth().in_degrees() - azimuth) < 0.05)
                break;
        REQUIRE(at < end);
        readings.grazings.push_back({at, azimuth < 180, Angle::degrees(0.5)});
    }
    // The moments alone, with a plumb wall, tell even which side of the building it is.
    readings.bearing_deg.reset();
    readings.lean_deg = Known{0, 0.3};
    CHECK_THAT(survey_wall(readings).answers.front().facing_deg.value, WithinAbs(170, 0.3));
    readings.lean_deg.reset();
    readings.bearing_deg = Known{165, 10};
    const WallAnswer grazed = survey_wall(readings).answers.front();
    CHECK_THAT(grazed.facing_deg.value, WithinAbs(170, 0.3));
    CHECK(grazed.facing_deg.range < 1.0);
}
