// SPDX-License-Identifier: MIT
#include "cli/readings/given.hpp"

#include <catch2/catch.hpp>

using Catch::Matchers::WithinAbs;
using namespace dialwright;
using namespace dialwright::cli;

namespace {

void check(const Read<Known>& read, double value, double give) {
    if (!read)
        FAIL(read.trouble().message);
    CHECK_THAT(read->value, WithinAbs(value, 1e-9));
    CHECK_THAT(read->give, WithinAbs(give, 1e-9));
}

} // namespace

TEST_CASE("A figure and its ±, however that is typed", "[readings]") {
    check(given_length_mm("100 mm ± 0.5 mm", 9), 100, 0.5);
    check(given_length_mm("10 cm +- 1/2 mm", 9), 100, 0.5);
    check(given_length_mm("4 in +/- 1/64 in", 9), 101.6, 25.4 / 64);
    check(given_length_mm("100 mm", 0.7), 100, 0.7);
    check(given_angle_deg("37° 30' ± 1°", 9), 37.5, 1);
    check(given_angle_deg("-0.2 ± 0.1", 9), -0.2, 0.1);
    check(given_bearing_deg("S 21° E ± 2°", 9), 159, 2);
    check(given_east_deg("1° 30' W ± 30'", 9), -1.5, 0.5);
    check(given_latitude_deg("54° N", 0.1), 54, 0.1);
    check(given_lean_deg("0° 30' forward ± 0.2°", 9), -0.5, 0.2);
    CHECK(*give_seconds("± 5 s") == 5);
    CHECK(*give_seconds("1 min") == 60);
    CHECK(*give_length_mm("0.5 mm") == 0.5);
    CHECK(*give_angle_deg("± 0.3°") == 0.3);
    CHECK_THAT((Known{0, 1.959964}.deviation()), WithinAbs(1, 1e-9));
}

TEST_CASE("A ± of nothing, or without a unit, is refused", "[readings]") {
    CHECK_THAT(given_length_mm("100 mm ± 0 mm", 9).trouble().message,
               Catch::Contains("nothing is measured without one"));
    CHECK_THAT(given_length_mm("100 mm ± 0.5", 9).trouble().message, Catch::Contains("has no unit"));
    CHECK_FALSE(given_angle_deg("± 1°", 9));
    CHECK_FALSE(given_bearing_deg("north ± some", 9));
    CHECK_FALSE(give_seconds("5"));
    CHECK_FALSE(give_seconds("-5 s"));
}
