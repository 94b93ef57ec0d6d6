// SPDX-License-Identifier: MIT
#include "layout/drawing/clipping.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <random>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

double length_of(const std::vector<Path>& paths) {
    double length = 0;
    for (const Path& path : paths) {
        const auto points = flattened(path, 1e-5);
        for (std::size_t i = 1; i < points.size(); ++i) {
            length += std::hypot(points[i].x_mm - points[i - 1].x_mm, points[i].y_mm - points[i - 1].y_mm);
        }
    }
    return length;
}

double area_of(const std::vector<Point>& ring) {
    double twice = 0;
    for (std::size_t i = 0; i < ring.size(); ++i) {
        const Point a = ring[i], b = ring[(i + 1) % ring.size()];
        twice += a.x_mm * b.y_mm - b.x_mm * a.y_mm;
    }
    return twice / 2;
}

const Box k_box{-10, -5, 10, 5};

} // namespace

TEST_CASE("A line is cut at the box's sides and keeps its direction", "[layout]") {
    const auto through = line_inside(Point{20, 10}, Point{-20, -10}, k_box);
    REQUIRE(through);
    CHECK_THAT(through->first.x_mm, WithinAbs(10, 1e-12));
    CHECK_THAT(through->second.y_mm, WithinAbs(-5, 1e-12));
    CHECK_FALSE(line_inside(Point{-20, 6}, Point{20, 6}, k_box));
    CHECK(line_inside(Point{-20, 5}, Point{20, 5}, k_box)); // along a side is inside
    const auto whole = line_inside(Point{1, 1}, Point{2, 2}, k_box);
    REQUIRE(whole);
    CHECK(whole->second == Point{2, 2});
}

TEST_CASE("Arcs are cut into arcs", "[layout]") {
    // A circle of radius 8 sticks out above and below: two arcs stay, each of 2 asin(5/8).
    const auto parts = line_inside(circle({0, 0}, 8), k_box);
    CHECK_THAT(length_of(parts), WithinAbs(8 * 4 * std::asin(5.0 / 8), 1e-3));
    for (const Path& part : parts) {
        for (const Piece& piece : part.pieces) {
            CHECK(std::holds_alternative<ArcTo>(piece));
        }
        CHECK_FALSE(part.closed);
    }
    CHECK(line_inside(circle({0, 0}, 30), k_box).empty());
    CHECK(line_inside(circle({40, 0}, 8), k_box).empty());
    const auto inside = line_inside(circle({0, 0}, 4), k_box);
    REQUIRE(inside.size() == 1);
    CHECK(inside[0].closed);
}

TEST_CASE("What is kept of random paths is what lies inside", "[layout]") {
    std::mt19937 random{7};
    INFO("seed 7");
    std::uniform_real_distribution<double> any(-15, 15), turn(-359, 359);
    for (int i = 0; i < 300; ++i) {
        const Point start{any(random), any(random)};
        ArcTo arc{{}, {any(random), any(random)}, Angle::degrees(turn(random))};
        arc.to = point_at(start, {start, arc.centre, arc.sweep * 2.0}, 0.5);
        const Path path{start,
                        {arc, LineTo{{any(random), any(random)}},
                         CurveTo{{any(random), any(random)}, {any(random), any(random)}, {any(random), any(random)}}},
                        false};
        double inside = 0;
        const auto points = flattened(path, 1e-5);
        for (std::size_t k = 1; k < points.size(); ++k) {
            if (const auto part = line_inside(points[k - 1], points[k], k_box)) {
                inside += std::hypot(part->second.x_mm - part->first.x_mm, part->second.y_mm - part->first.y_mm);
            }
        }
        const auto parts = line_inside(path, k_box);
        CHECK_THAT(length_of(parts), WithinAbs(inside, 0.01));
        for (const Path& part : parts) {
            CHECK(k_box.grown(1e-9).contains(bounds_of(part)));
        }
    }
}

TEST_CASE("A ring is cut to the box with its area and its hand", "[layout]") {
    const std::vector<Point> square{{-20, -20}, {0, -20}, {0, 20}, {-20, 20}};
    CHECK_THAT(area_of(ring_inside(square, k_box)), WithinAbs(100, 1e-9));
    const std::vector<Point> other{square.rbegin(), square.rend()};
    CHECK_THAT(area_of(ring_inside(other, k_box)), WithinAbs(-100, 1e-9));
    CHECK(ring_inside({{20, 20}, {30, 20}, {30, 30}}, k_box).empty());
    CHECK_THAT(area_of(ring_inside({{-99, -99}, {99, -99}, {99, 99}, {-99, 99}}, k_box)), WithinAbs(200, 1e-9));
}

TEST_CASE("Windings are counted", "[layout]") {
    const std::vector<Point> square{{0, 0}, {2, 0}, {2, 2}, {0, 2}};
    CHECK(winding_round(square, {1, 1}) == 1);
    CHECK(winding_round({square.rbegin(), square.rend()}, {1, 1}) == -1);
    CHECK(winding_round(square, {3, 1}) == 0);
}
