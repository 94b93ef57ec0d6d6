// SPDX-License-Identifier: MIT
#include "engine/site/refraction.hpp"

#include <catch2/catch.hpp>

using Catch::Matchers::WithinAbs;
using namespace dialwright;

TEST_CASE("Refraction is that of the tables", "[site][published]") {
    // Meeus, Astronomical Algorithms, ex. 16.a: true altitude 33′14.76″ is lifted by 24.618′ (from memory).
    CHECK_THAT(refraction(Angle::degrees(0.5541)).in_degrees() * 60, WithinAbs(24.618, 0.05));
    // Handbook tables of the standard air (from memory): 5.3′ at 10°, 1.0′ at 45°, nothing overhead.
    CHECK_THAT(refraction(Angle::degrees(10 - 5.3 / 60)).in_degrees() * 60, WithinAbs(5.3, 0.2));
    CHECK_THAT(refraction(Angle::degrees(45)).in_degrees() * 60, WithinAbs(1.0, 0.05));
    CHECK_THAT(refraction(Angle::degrees(90)).in_degrees() * 60, WithinAbs(0.0, 0.01));
}

TEST_CASE("The air lifts the Sun straight up, and it stays finite below the horizon", "[site]") {
    for (const double altitude : {-40.0, -5.2, -1.0, 0.0, 7.0, 60.0}) {
        const SiteDirection sun = direction_at(Angle::degrees(123), Angle::degrees(altitude));
        const SiteDirection seen = lifted_by_air(sun);
        CHECK_THAT(seen.azimuth().in_degrees(), WithinAbs(123, 1e-9));
        CHECK(seen.altitude() >= sun.altitude());
        CHECK(seen.altitude().in_degrees() < altitude + 1.0);
    }
}
