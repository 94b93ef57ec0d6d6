// SPDX-License-Identifier: MIT
#include "layout/drawing/measures.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <numbers>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

/// The route by chords.
double area_by_chords(const Path& path) {
    const auto p = flattened(path, 1e-6);
    double sum = 0;
    for (std::size_t i = 1; i < p.size(); ++i)
        sum += p[i - 1].x_mm * p[i].y_mm - p[i - 1].y_mm * p[i].x_mm;
    return sum / 2;
}

double length_by_chords(const Path& path) {
    const auto p = flattened(path, 1e-7);
    double sum = 0;
    for (std::size_t i = 1; i < p.size(); ++i)
        sum += std::hypot(p[i].x_mm - p[i - 1].x_mm, p[i].y_mm - p[i - 1].y_mm);
    return sum;
}

} // namespace

TEST_CASE("Lengths and areas of lines, arcs and curves", "[layout]") {
    const Path half{{10, 0}, {ArcTo{{-10, 0}, {0, 0}, Angle::degrees(180)}, LineTo{{10, 0}}}, true};
    CHECK_THAT(length_of(half), WithinAbs(10 * std::numbers::pi + 20, 1e-9));
    CHECK_THAT(area_of(half), WithinAbs(50 * std::numbers::pi, 1e-9));
    CHECK_THAT(area_of(reversed(half)), WithinAbs(-50 * std::numbers::pi, 1e-9));
    CHECK_THAT(area_of(circle({500, -300}, 20)), WithinAbs(400 * std::numbers::pi, 1e-9));
    const Path bow{{5, 5}, {CurveTo{{5, 30}, {47, 33}, {40, 5}}, LineTo{{5, 5}}}, true};
    CHECK_THAT(area_of(bow), WithinAbs(area_by_chords(bow), 1e-3));
    CHECK_THAT(area_of(reversed(bow)), WithinAbs(-area_of(bow), 1e-9));
}

TEST_CASE("Lengths of curves that bow, double back, or stand still on the way", "[layout]") {
    for (const CurveTo& curve : {CurveTo{{5, 30}, {47, 33}, {40, 5}}, CurveTo{{45, 40}, {5, 40}, {40, 5}},
                                 CurveTo{{40, 5}, {5, 5}, {40, 5}}, CurveTo{{5, 5}, {5.2, 5}, {5.3, 5.4}},
                                 CurveTo{{5, 5}, {5, 5}, {5, 5}}, CurveTo{{100, 5}, {-60, 5.001}, {40, 5}}}) {
        const Path path{{5, 5}, {curve}, false};
        const double length = length_by_chords(path);
        CHECK_THAT(length_of(path), WithinAbs(length, 1e-4 * length));
        CHECK_THAT(length_of(reversed(path)), WithinAbs(length, 1e-4 * length));
    }
}

TEST_CASE("A contour knows what goes round it", "[layout]") {
    const Path plate = rectangle({0, 0, 100, 100}), hole = circle({50, 50}, 30), island = rectangle({45, 45, 55, 55}),
               other = rectangle({200, 0, 300, 100}), slit = polyline({{10, 10}, {12, 10}});
    const auto nests = nests_of({&island, &plate, &hole, &other, &slit, &plate});
    CHECK(nests[1].depth == 0);
    CHECK(nests[5].depth == 0);
    CHECK(nests[3].depth == 0);
    CHECK(nests[3].outermost == 3);
    CHECK(nests[4].outermost == 1);
    const auto once = nests_of({&island, &plate, &hole});
    CHECK(once[0].depth == 2);
    CHECK(once[2].depth == 1);
    CHECK(once[0].outermost == 1);
}
