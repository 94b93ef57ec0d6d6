// SPDX-License-Identifier: MIT
#include "engine/surface/plate_frame.hpp"
#include "tests/engine/random_plates.hpp"

#include <Eigen/Geometry>
#include <catch2/catch.hpp>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

TEST_CASE("A plate frame is right-handed, v climbs and u is level", "[engine][surface]") {
    constexpr int k_seed = 101;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 2000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const PlateFrame frame = frame_of(attitude);
        CAPTURE(k_seed, i, attitude.normal_azimuth.in_degrees(), attitude.normal_altitude.in_degrees());
        REQUIRE((frame.v.cross(frame.n) - frame.u).norm() < 1e-15);
        REQUIRE_THAT(frame.u.norm(), WithinAbs(1, 1e-15));
        REQUIRE_THAT(frame.v.norm(), WithinAbs(1, 1e-15));
        REQUIRE_THAT(frame.v.dot(frame.n), WithinAbs(0, 1e-15));
        REQUIRE_THAT(frame.u.z(), WithinAbs(0, 1e-15));
        REQUIRE(frame.v.z() >= 0);
        const Eigen::Vector3d normal = direction_at(attitude.normal_azimuth, attitude.normal_altitude).enu;
        REQUIRE((frame.n - normal).norm() < 1e-15);
    }
}

TEST_CASE("The cardinal plates look where the conventions say", "[engine][surface]") {
    const PlateFrame level = frame_of({Angle::degrees(77), Angle::degrees(90)});
    CHECK(level.u == Eigen::Vector3d(1, 0, 0));
    CHECK(level.v == Eigen::Vector3d(0, 1, 0));
    const PlateFrame ceiling = frame_of({Angle{}, Angle::degrees(-90)});
    CHECK(ceiling.u == Eigen::Vector3d(-1, 0, 0));
    CHECK(ceiling.v == Eigen::Vector3d(0, 1, 0));
    const PlateFrame south_wall = frame_of({Angle::degrees(180), Angle{}});
    CHECK((south_wall.u - Eigen::Vector3d(1, 0, 0)).norm() < 1e-15);
    CHECK((south_wall.v - Eigen::Vector3d(0, 0, 1)).norm() < 1e-15);
    const PlateFrame east_wall =
        frame_of({Angle::degrees(90), Angle{}}); // its reader looks west: north is on the right
    CHECK((east_wall.u - Eigen::Vector3d(0, 1, 0)).norm() < 1e-15);
    const PlateFrame reclining = frame_of({Angle::degrees(180), Angle::degrees(30)});
    CHECK(reclining.n.z() > 0);
    CHECK(reclining.v.y() > 0); // its upper edge leans north, away from the reader
}

TEST_CASE("Equatorial faces stand square to the Earth's axis, the summer face towards the elevated pole",
          "[engine][surface]") {
    for (const double degrees : {90.0, 66.56, 54.0, 0.1, 0.0, -0.1, -33.0, -90.0}) {
        const Angle latitude = Angle::degrees(degrees);
        const Eigen::Vector3d pole = north_pole(latitude).enu * (degrees >= 0 ? 1.0 : -1.0);
        CAPTURE(degrees);
        CHECK((frame_of(equatorial_attitude(latitude, true)).n - pole).norm() < 1e-15);
        CHECK((frame_of(equatorial_attitude(latitude, false)).n + pole).norm() < 1e-15);
    }
}
