// SPDX-License-Identifier: MIT
#include "engine/site/site.hpp"

#include <catch2/catch.hpp>

#include <random>

using namespace dialwright;
using Catch::WithinAbs;

namespace {

void check_direction(const SiteDirection& d, double east, double north, double up) {
    CHECK_THAT(d.enu.x(), WithinAbs(east, 1e-15));
    CHECK_THAT(d.enu.y(), WithinAbs(north, 1e-15));
    CHECK_THAT(d.enu.z(), WithinAbs(up, 1e-15));
}

} // namespace

TEST_CASE("the cardinal places of the sky stand where they must", "[engine][site]") {
    const Angle none{}, quarter = Angle::degrees(90.0);
    SECTION("at the equator") {
        check_direction(to_site({none, none}, none), 0, 0, 1);
        check_direction(to_site({quarter, none}, none), -1, 0, 0);
        check_direction(to_site({-quarter, none}, none), 1, 0, 0);
        check_direction(to_site({none, quarter}, none), 0, 1, 0);
    }
    SECTION("at the poles the pole is overhead") {
        check_direction(to_site({none, quarter}, quarter), 0, 0, 1);
        check_direction(to_site({none, -quarter}, -quarter), 0, 0, 1);
    }
    SECTION("at 50 degrees north") {
        const Angle latitude = Angle::degrees(50.0);
        const SiteDirection noon = to_site({none, none}, latitude);
        CHECK_THAT(noon.azimuth().in_degrees(), WithinAbs(180.0, 1e-12));
        CHECK_THAT(noon.altitude().in_degrees(), WithinAbs(40.0, 1e-12));
        CHECK_THAT(to_site({quarter, none}, latitude).azimuth().in_degrees(), WithinAbs(270.0, 1e-12));
        CHECK_THAT(to_site({none, quarter}, latitude).altitude().in_degrees(), WithinAbs(50.0, 1e-12));
        check_direction(to_site({none, quarter}, latitude), north_pole(latitude).enu.x(), north_pole(latitude).enu.y(),
                        north_pole(latitude).enu.z());
    }
    SECTION("azimuth and altitude") {
        check_direction(direction_at(quarter, none), 1, 0, 0);
        check_direction(direction_at(Angle::degrees(180.0), none), 0, -1, 0);
        check_direction(direction_at(none, quarter), 0, 0, 1);
    }
}

TEST_CASE("sky to site and back is the same place", "[engine][site]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937 random{seed};
    std::uniform_real_distribution<double> turn{-179.999, 179.999}, half{-89.9, 89.9};
    for (int i = 0; i < 1000; ++i) {
        const SkyPlace sky{Angle::degrees(turn(random)), Angle::degrees(half(random))};
        const Angle latitude = Angle::degrees(half(random));
        const SiteDirection direction = to_site(sky, latitude);
        const SkyPlace back = to_sky(direction, latitude);
        CHECK_THAT(direction.enu.norm(), WithinAbs(1.0, 1e-14));
        CHECK_THAT((back.hour_angle - sky.hour_angle).signed_turn().in_degrees(), WithinAbs(0.0, 1e-10));
        CHECK_THAT(back.declination.in_degrees(), WithinAbs(sky.declination.in_degrees(), 1e-10));
    }
}

TEST_CASE("north and south are mirror images", "[engine][site]") {
    for (double h = -170.0; h < 180.0; h += 35.0)
        for (double d = -23.0; d <= 23.0; d += 11.5) {
            const SiteDirection north = to_site({Angle::degrees(h), Angle::degrees(d)}, Angle::degrees(33.0));
            const SiteDirection south = to_site({Angle::degrees(h), Angle::degrees(-d)}, Angle::degrees(-33.0));
            check_direction(south, north.enu.x(), -north.enu.y(), north.enu.z());
        }
}
