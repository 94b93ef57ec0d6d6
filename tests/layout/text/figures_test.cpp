// SPDX-License-Identifier: MIT
#include "layout/text/figures.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::layout;

TEST_CASE("numbers are written as the trade reads them", "[text]") {
    CHECK(fixed(-0.04, 1) == "0.0");
    CHECK(fixed(-12.34, 1) == "-12.3");
    CHECK(degrees_minutes(Angle::degrees(52.2583)) == "52° 15.5'");
    CHECK(degrees_minutes(Angle::degrees(-0.25)) == "-0° 15.0'");
    CHECK(degrees_minutes(Angle::degrees(59.99999)) == "60° 00.0'");
    CHECK(degrees_minutes(Angle::degrees(-1e-7)) == "0° 00.0'");
}

TEST_CASE("lengths are read off a rule in sixty-fourths", "[text]") {
    CHECK(sixty_fourths(25.4) == "1");
    CHECK(sixty_fourths(0) == "0");
    CHECK(sixty_fourths(25.4 * 1.5) == "1 1/2");
    CHECK(sixty_fourths(-25.4 * 3 / 8) == "-3/8");
    CHECK(sixty_fourths(25.4 * 117 / 64) == "1 53/64");
    CHECK(sixty_fourths(0.1) == "0");
    CHECK(say_length(46.3, false) == "46.3 mm");
    CHECK(say_length(46.3, true) == "46.3 mm (1 53/64 in)");
}
