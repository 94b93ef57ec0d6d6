// SPDX-License-Identifier: MIT
#include "engine/time/instant.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

TEST_CASE("days are counted from noon of 1 January 2000", "[engine][time]") {
    CHECK_THAT(days_from_j2000(Instant{sys_days{2000y / 1 / 1}} + 12h), WithinAbs(0.0, 0.0));
    CHECK_THAT(days_from_j2000(Instant{sys_days{2000y / 1 / 1}}), WithinAbs(-0.5, 0.0));
    // The Julian date of 1957 October 4.81 is 2436116.31 (Meeus, Astronomical Algorithms, example 7.a; from memory).
    const Instant launch = Instant{sys_days{1957y / 10 / 4}} + microseconds{69'984'000'000};
    CHECK_THAT(days_from_j2000(launch), WithinAbs(2436116.31 - 2451545.0, 1e-9));
}

TEST_CASE("days and instants turn into one another", "[engine][time]") {
    for (double day = -70000.0; day < 70000.0; day += 1234.56789)
        CHECK_THAT(days_from_j2000(instant_from_j2000(day)), WithinAbs(day, 1e-11));
}
