// SPDX-License-Identifier: MIT
#include "layout/gnomon/part.hpp"

#include "tests/layout/gnomon/shapes.hpp"

using namespace shapes;

TEST_CASE("a rounded polygon keeps its sides and its arcs touch them", "[gnomon]") {
    const Path path = rounded_polygon({{{0, 0}, 3}, {{40, 0}, 5}, {{50, 30}, 0}, {{25, 12}, 4}, {{0, 30}, 100}});
    check_outline(path);
    CHECK(arcs(path) == 4);
    CHECK(touching_arcs(path, 1e-9) == 4);
    const Box box = bounds_of(path);
    CHECK_THAT(box.right_mm, WithinAbs(50, 1e-9));
    CHECK_THAT(box.bottom_mm, WithinAbs(0, 1e-9));
}

TEST_CASE("a bar's half round ends where its axis does", "[gnomon]") {
    const Point from{1, 2}, to{31, 42};
    const Path path = bar_outline(from, to, 8, false, true);
    check_outline(path);
    CHECK(touching_arcs(path, 1e-9) == 1);
    double reach = 0, aside = 0;
    for (const Point& p : flattened(path, 1e-4)) {
        reach = std::max(reach, dot(p - from, unit(to - from)));
        aside = std::max(aside, std::abs(cross(p - from, unit(to - from))));
    }
    CHECK_THAT(reach, WithinAbs(50, 1e-3));
    CHECK_THAT(aside, WithinAbs(4, 1e-9));
}
