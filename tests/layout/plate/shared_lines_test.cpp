// SPDX-License-Identifier: MIT
#include "layout/plate/shared_lines.hpp"

#include <catch2/catch.hpp>

#include <cmath>

using namespace dialwright;
using namespace dialwright::layout;

namespace {

DialLine hour(HourTime time, int set) {
    DialLine line;
    line.family = family_of(time);
    line.time = time;
    line.set = set;
    return line;
}

/// An arc of a circle of radius 100 mm, in chords within 0.002 mm of it.
Polyline arc(double from, double to, double radius = 100) {
    Polyline line;
    for (int i = 0; i <= 100; ++i) {
        const double turn = from + (to - from) * i / 100;
        line.push_back({radius * std::cos(turn), radius * std::sin(turn)});
    }
    return line;
}

} // namespace

TEST_CASE("A line along another family's is had already; beside it, or of the same family, it is not", "[layout]") {
    const DialLine set_hour = hour(HourTime::since_sunset, 1), left_hour = hour(HourTime::to_sunset, 2);
    SharedLines shared;
    shared.add(set_hour, "20", {{0, 0}, {100, 50}});
    CHECK(shared.has(left_hour, "4", {{0, 0}, {100, 50}}));
    CHECK(shared.has(left_hour, "4", {{20, 10}, {80, 40}}));
    CHECK_FALSE(shared.has(left_hour, "4", {{0, 0.05}, {100, 50.05}}));
    CHECK_FALSE(shared.has(left_hour, "4", {{200, 100}, {300, 150}})); // goes on where the other ends
    CHECK_FALSE(shared.has(set_hour, "4", {{0, 0}, {100, 50}}));
    REQUIRE(shared.told().size() == 1);
    CHECK(shared.told()[0] == "one line serves for hour since sunset 20 and hour to sunset 4: it is cut once");
}

TEST_CASE("Curves along each other are one as well", "[layout]") {
    const DialLine set_hour = hour(HourTime::since_sunset, 1), left_hour = hour(HourTime::to_sunset, 2);
    SharedLines shared;
    shared.add(set_hour, "20", arc(0, 1));
    CHECK(shared.has(left_hour, "4", arc(0.2, 0.7)));
    CHECK_FALSE(shared.has(left_hour, "4", arc(0.2, 0.7, 100.1)));
    CHECK_FALSE(shared.has(left_hour, "4", arc(0.5, 1.5)));
}

TEST_CASE("Families that share their lines are told as families", "[layout]") {
    const DialLine sun = hour(HourTime::sun, 1), ring = hour(HourTime::zone, 0);
    std::vector<DialLine> suns(5, sun), rings(5, ring);
    SharedLines shared;
    for (std::size_t i = 0; i < 5; ++i) {
        const Polyline line{{double(i) * 10, 0}, {double(i) * 10, 100}};
        shared.add(rings[i], "9", line);
        CHECK(shared.has(suns[i], "9", line));
    }
    REQUIRE(shared.told().size() == 1);
    CHECK(shared.told()[0] ==
          "the hours of the chapter ring and the hours by the Sun lie on the same lines, 5 of them: each "
          "is cut once and bears both labels; one of the two families would do");
}
