// SPDX-License-Identifier: MIT
#include "engine/base/angle.hpp"

#include <catch2/catch.hpp>

#include <numbers>
#include <type_traits>

using namespace dialwright;
using Catch::WithinAbs;

// What makes no sense does not compile.
static_assert(!std::is_convertible_v<double, Angle>);
static_assert(!std::is_convertible_v<Angle, double>);
static_assert(!std::is_constructible_v<Angle, double>);

TEST_CASE("an angle reads the same in every unit", "[engine][angle]") {
    CHECK_THAT(Angle::degrees(180.0).in_radians(), WithinAbs(std::numbers::pi, 1e-15));
    CHECK_THAT(Angle::hours(6.0).in_degrees(), WithinAbs(90.0, 1e-12));
    CHECK_THAT(Angle::minutes_of_time(4.0).in_degrees(), WithinAbs(1.0, 1e-14));
    CHECK_THAT(Angle::arcseconds(3600.0).in_degrees(), WithinAbs(1.0, 1e-14));
    CHECK_THAT(Angle::degrees(15.0).in_hours(), WithinAbs(1.0, 1e-14));
    CHECK_THAT(Angle::degrees(1.0).in_minutes_of_time(), WithinAbs(4.0, 1e-13));
    CHECK_THAT(Angle::degrees(1.0).in_arcseconds(), WithinAbs(3600.0, 1e-9));
}

TEST_CASE("angles are taken round the turn into their half-open ranges", "[engine][angle]") {
    for (double degrees = -1080.0; degrees <= 1080.0; degrees += 7.5) {
        CAPTURE(degrees);
        const Angle a = Angle::degrees(degrees);
        CHECK(a.signed_turn() >= Angle::radians(-std::numbers::pi));
        CHECK(a.signed_turn() < Angle::radians(std::numbers::pi));
        CHECK(a.positive_turn() >= Angle::radians(0.0));
        CHECK(a.positive_turn() < Angle::radians(2.0 * std::numbers::pi));
        CHECK_THAT(sin(a.signed_turn()), WithinAbs(sin(a), 1e-12));
        CHECK_THAT(cos(a.positive_turn()), WithinAbs(cos(a), 1e-12));
    }
    CHECK(Angle::radians(std::numbers::pi).signed_turn() == Angle::radians(-std::numbers::pi));
    CHECK(Angle::radians(-std::numbers::pi).signed_turn() == Angle::radians(-std::numbers::pi));
    CHECK(Angle::radians(-0.0).positive_turn() == Angle::radians(0.0));
    // So little below zero that a whole turn more rounds to the turn itself.
    CHECK(Angle::radians(-1e-18).positive_turn() == Angle::radians(0.0));
}

TEST_CASE("inverse functions bear values a rounding error beyond one", "[engine][angle]") {
    CHECK_THAT(arc_sine(1.0 + 1e-15).in_degrees(), WithinAbs(90.0, 1e-12));
    CHECK_THAT(arc_cosine(-1.0 - 1e-15).in_degrees(), WithinAbs(180.0, 1e-12));
    CHECK_THAT(arc_tangent(-1.0, 0.0).in_degrees(), WithinAbs(-90.0, 1e-12));
    CHECK(abs(Angle::degrees(-3.0)) == Angle::degrees(3.0));
    CHECK(-Angle::degrees(2.0) < Angle::degrees(1.0));
    CHECK_THAT(Angle::degrees(30.0) / Angle::degrees(15.0), WithinAbs(2.0, 1e-15));
}
