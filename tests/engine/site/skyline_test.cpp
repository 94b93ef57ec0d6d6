// SPDX-License-Identifier: MIT
#include "engine/site/skyline.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

namespace {
Skyline::Mark mark(double azimuth, double altitude) {
    return {Angle::degrees(azimuth), Angle::degrees(altitude)};
}
double altitude(const Skyline& skyline, double azimuth) {
    return skyline.altitude_at(Angle::degrees(azimuth)).in_degrees();
}
} // namespace

TEST_CASE("A skyline runs straight from mark to mark and round through north", "[engine][site]") {
    const Skyline skyline{{mark(20, 10), mark(100, 30), mark(340, 6)}};
    CHECK_FALSE(skyline.flat());
    for (const double turn : {-360.0, 0.0, 360.0}) {
        CHECK_THAT(altitude(skyline, 20 + turn), WithinAbs(10, 1e-10));
        CHECK_THAT(altitude(skyline, 60 + turn), WithinAbs(20, 1e-10));
        CHECK_THAT(altitude(skyline, 100 + turn), WithinAbs(30, 1e-10));
        CHECK_THAT(altitude(skyline, 220 + turn), WithinAbs(18, 1e-10));
        CHECK_THAT(altitude(skyline, 340 + turn), WithinAbs(6, 1e-10));
        CHECK_THAT(altitude(skyline, 350 + turn), WithinAbs(7, 1e-10));
        CHECK_THAT(altitude(skyline, 0 + turn), WithinAbs(8, 1e-10));
        CHECK_THAT(altitude(skyline, 19.5 + turn), WithinAbs(9.95, 1e-10));
    }
}

TEST_CASE("A Sun is seen above the skyline and hidden beneath it", "[engine][site]") {
    const Skyline skyline{{mark(0, 10), mark(180, 10)}};
    for (const double azimuth : {0.0, 77.0, 180.0, 181.0, 359.9}) {
        CHECK(skyline.clearance(direction_at(Angle::degrees(azimuth), Angle::degrees(10.001))) > 0);
        CHECK(skyline.clearance(direction_at(Angle::degrees(azimuth), Angle::degrees(9.999))) < 0);
        CHECK(Skyline{}.clearance(direction_at(Angle::degrees(azimuth), Angle::degrees(0.001))) > 0);
        CHECK(Skyline{}.clearance(direction_at(Angle::degrees(azimuth), Angle::degrees(-0.001))) < 0);
    }
    CHECK(skyline.clearance({{0, 0, 1}}) > 0); // the zenith has no azimuth
}

TEST_CASE("What is seen is what stands clear", "[engine][site]") {
    const Skyline skyline{{mark(20, 10), mark(100, 30), mark(340, 6)}};
    for (double azimuth = 0; azimuth < 360; azimuth += 1)
        for (double height = -5; height < 40; height += 0.37) {
            const SiteDirection sun = direction_at(Angle::degrees(azimuth), Angle::degrees(height));
            REQUIRE(skyline.sees(sun) == (skyline.clearance(sun) > 1e-12));
            REQUIRE(Skyline{}.sees(sun) == (height > 0));
        }
}

TEST_CASE("A skyline that cannot be is refused", "[engine][site]") {
    using Marks = std::vector<Skyline::Mark>;
    CHECK_THROWS_AS((Skyline{Marks{mark(0, 1)}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{Marks{}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{{mark(10, 1), mark(10, 2)}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{{mark(20, 1), mark(10, 2)}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{{mark(0, 1), mark(360, 2)}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{{mark(0, 1), mark(90, 90)}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{{mark(0, -1), mark(90, 9)}}), std::invalid_argument);
    CHECK_THROWS_AS((Skyline{{mark(0, std::nan("")), mark(90, 9)}}), std::invalid_argument);
    CHECK_NOTHROW(Skyline{{mark(-10, 1), mark(349, 2)}});
}
