// SPDX-License-Identifier: MIT
#include "layout/drawing/kerf.hpp"

#include "layout/drawing/measures.hpp"
#include "layout/sheet/export_error.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <random>
#include <stdexcept>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

Drawing cut_out(std::vector<Path> paths) {
    return {"plate", {{Layer::cut, std::move(paths), 0.1, false, "gnomon"}}};
}

const Path& first(const Kerfed& made, std::size_t place = 0) {
    return made.drawing.marks.at(0).paths.at(place);
}

bool has_arcs(const Path& path) {
    return std::any_of(path.pieces.begin(), path.pieces.end(),
                       [](const Piece& p) { return std::holds_alternative<ArcTo>(p); });
}

/// The least and the greatest distance of the moved path from the first.
std::pair<double, double> distances(const Path& from, const Path& to) {
    const auto a = flattened(from, 1e-4), b = flattened(to, 1e-4);
    double least = 1e300, greatest = 0;
    const auto to_path = [&](Point p) {
        double nearest = 1e300;
        for (std::size_t i = 1; i < a.size(); ++i) {
            const double x = a[i].x_mm - a[i - 1].x_mm, y = a[i].y_mm - a[i - 1].y_mm, square = x * x + y * y;
            const double px = p.x_mm - a[i - 1].x_mm, py = p.y_mm - a[i - 1].y_mm;
            const double part = square > 0 ? std::clamp((px * x + py * y) / square, 0.0, 1.0) : 0.0;
            nearest = std::min(nearest, std::hypot(px - part * x, py - part * y));
        }
        return nearest;
    };
    for (std::size_t i = 1; i < b.size(); ++i) {
        for (const Point p : {b[i], Point{(b[i].x_mm + b[i - 1].x_mm) / 2, (b[i].y_mm + b[i - 1].y_mm) / 2}}) {
            least = std::min(least, to_path(p));
            greatest = std::max(greatest, to_path(p));
        }
    }
    return {least, greatest};
}

} // namespace

TEST_CASE("Outlines move out and holes in by half the kerf", "[layout]") {
    const Path plate = rectangle({0, 0, 100, 60}), hole = circle({50, 30}, 10), island = rectangle({47, 27, 53, 33});
    const Kerfed made = with_kerf(cut_out({hole, reversed(plate), island}), 0.4);
    CHECK_THAT(bounds_of(first(made, 1)).width_mm(), WithinAbs(100.4, 1e-9));
    CHECK_THAT(bounds_of(first(made, 1)).height_mm(), WithinAbs(60.4, 1e-9));
    CHECK(first(made, 1).pieces.size() == 4); // corners stay corners
    REQUIRE(first(made, 0).pieces.size() == 1);
    CHECK(has_arcs(first(made, 0)));
    CHECK_THAT(bounds_of(first(made, 0)).width_mm(), WithinAbs(19.6, 1e-9));
    CHECK_THAT(bounds_of(first(made, 2)).width_mm(), WithinAbs(6.4, 1e-9));
    CHECK(made.moved == 3);
    CHECK_THAT(made.said, Catch::Contains("0.4 mm, the whole width") && Catch::Contains("0.2 mm outside"));
}

TEST_CASE("Nothing but closed outlines that are cut moves, and nothing at all without a kerf", "[layout]") {
    Drawing drawing = cut_out({polyline({{0, 0}, {50, 0}}), rectangle({0, 10, 50, 20})});
    drawing.marks.push_back({Layer::engrave, {rectangle({5, 12, 10, 15})}, 0.1, false, "mark"});
    const Kerfed made = with_kerf(drawing, 0.2);
    CHECK(made.moved == 1);
    CHECK(made.left_alone == 1);
    CHECK(end_of(first(made)) == Point{50, 0});
    CHECK_THAT(bounds_of(made.drawing.marks[1].paths[0]).width_mm(), WithinAbs(5, 0));
    CHECK_THAT(made.said, Catch::Contains("not moved: 1"));
    const Kerfed none = with_kerf(drawing, 0);
    CHECK(none.moved == 0);
    CHECK_THAT(bounds_of(first(none, 1)).width_mm(), WithinAbs(50, 0));
}

TEST_CASE("Arcs in an outline stay arcs", "[layout]") {
    // A slot with round ends, and a plate with a bow in its side and a round notch.
    const Path slot{{20, 10},
                    {LineTo{{40, 10}}, ArcTo{{40, 16}, {40, 13}, Angle::degrees(180)}, LineTo{{20, 16}},
                     ArcTo{{20, 10}, {20, 13}, Angle::degrees(180)}},
                    true};
    const Path notched{{0, 0},
                       {LineTo{{40, 0}}, ArcTo{{60, 0}, {50, 0}, Angle::degrees(-180)}, LineTo{{100, 0}},
                        ArcTo{{100, 60}, {100, 30}, Angle::degrees(180)}, LineTo{{0, 60}}, LineTo{{0, 0}}},
                       true};
    for (const Path& path : {slot, reversed(slot), notched, reversed(notched)}) {
        for (const double kerf_mm : {0.1, 1.0, 3.0}) {
            const Kerfed made = with_kerf(cut_out({path}), kerf_mm);
            CHECK(has_arcs(first(made)));
            CHECK(first(made).pieces.size() <= 8);
            const auto [least, greatest] = distances(path, first(made));
            CHECK_THAT(least, WithinAbs(kerf_mm / 2, 3e-4));
            CHECK(greatest < kerf_mm / 2 * std::numbers::sqrt2 + 3e-4);
        }
    }
    const Kerfed made = with_kerf(cut_out({slot}), 1);
    CHECK_THAT(area_of(first(made)), WithinAbs(20 * 7 + std::numbers::pi * 3.5 * 3.5, 1e-9));
}

TEST_CASE("Whatever the outline, its moved path keeps half the kerf away", "[layout]") {
    const unsigned seed = 20260621;
    INFO("seed " << seed);
    std::mt19937 random{seed};
    std::uniform_real_distribution<double> radius{30, 60}, kerf{0.05, 4};
    for (int round = 0; round < 60; ++round) {
        std::vector<Point> corners;
        const int count = 3 + round % 12;
        for (int i = 0; i < count; ++i) {
            const double r = radius(random), a = 2 * std::numbers::pi * i / count;
            corners.push_back({r * std::cos(a), r * std::sin(a)});
        }
        const Path star = polyline(corners, true);
        const double kerf_mm = kerf(random);
        const bool is_hole = round % 2 == 1;
        const Kerfed made =
            with_kerf(is_hole ? cut_out({star, rectangle({-90, -90, 90, 90})}) : cut_out({star}), kerf_mm);
        const auto [least, greatest] = distances(star, first(made));
        CHECK_THAT(least, WithinAbs(kerf_mm / 2, 0.005));
        const double side = (is_hole ? -1 : 1) * (std::abs(area_of(first(made))) - std::abs(area_of(star)));
        CHECK(side > 0);
    }
}

TEST_CASE("Curves become chords at the right distance", "[layout]") {
    const Path bow{{5, 5}, {CurveTo{{5, 30}, {40, 30}, {40, 5}}, LineTo{{5, 5}}}, true};
    const auto [least, greatest] = distances(bow, first(with_kerf(cut_out({bow}), 1)));
    CHECK_THAT(least, WithinAbs(0.5, 0.005));
    CHECK_THAT(greatest, WithinAbs(0.5, 0.005));
}

TEST_CASE("A slot that is open at the part's edge narrows as a hole does", "[layout]") {
    const Path slot = polyline({{-0.5, 27}, {40, 27}, {40, 33}, {-0.5, 33}});
    const Kerfed made = with_kerf(cut_out({rectangle({0, 0, 100, 60}), slot}), 0.4);
    CHECK(made.moved == 2);
    CHECK(made.left_alone == 0);
    CHECK(made.said.find("not moved") == std::string::npos);
    std::vector<Point> corners;
    for (const Mark& mark : made.drawing.marks)
        for (const Path& path : mark.paths)
            if (!path.closed) {
                corners.push_back(path.start);
                for (const Piece& piece : path.pieces)
                    corners.push_back(end_of(piece));
            }
    const std::vector<Point> wanted{{-0.5, 27.2}, {39.8, 27.2}, {39.8, 32.8}, {-0.5, 32.8}};
    REQUIRE(corners.size() == wanted.size());
    for (std::size_t i = 0; i < wanted.size(); ++i) {
        CHECK_THAT(corners[i].x_mm, WithinAbs(wanted[i].x_mm, 1e-9));
        CHECK_THAT(corners[i].y_mm, WithinAbs(wanted[i].y_mm, 1e-9));
    }
    CHECK_THROWS_WITH(with_kerf(cut_out({rectangle({0, 0, 100, 60}), slot}), 7), Catch::Contains("closes a hole"));
    // A saw's cut across the part is no slot.
    CHECK(with_kerf(cut_out({rectangle({0, 0, 100, 60}), polyline({{-1, 30}, {101, 30}})}), 0.4).left_alone == 1);
}

TEST_CASE("A kerf that a part does not bear is said, with the part's name", "[layout]") {
    const Catch::Matchers::StdString::ContainsMatcher part = Catch::Contains("\"gnomon\"");
    CHECK_THROWS_WITH(with_kerf(cut_out({rectangle({0, 0, 50, 2})}), 2.5), part && Catch::Contains("wider than"));
    CHECK_THROWS_WITH(with_kerf(cut_out({rectangle({0, 0, 50, 50}), circle({20, 20}, 1)}), 2.5),
                      part && Catch::Contains("closes a hole"));
    // A mouth of 1 mm into a chamber; a hole of two chambers with 1 mm between.
    const Path mouth = polyline({{0, 0},
                                 {50, 0},
                                 {50, 50},
                                 {25.5, 50},
                                 {25.5, 40},
                                 {40, 40},
                                 {40, 10},
                                 {10, 10},
                                 {10, 40},
                                 {24.5, 40},
                                 {24.5, 50},
                                 {0, 50}},
                                true);
    CHECK_THROWS_WITH(with_kerf(cut_out({mouth}), 2), part && Catch::Contains("gap"));
    CHECK_NOTHROW(with_kerf(cut_out({mouth}), 0.5));
    const Path two = polyline({{5, 5},
                               {20, 5},
                               {20, 12},
                               {25, 12},
                               {25, 5},
                               {40, 5},
                               {40, 20},
                               {25, 20},
                               {25, 13},
                               {20, 13},
                               {20, 20},
                               {5, 20}},
                              true);
    CHECK_THROWS_WITH(with_kerf(cut_out({rectangle({0, 0, 50, 50}), two}), 1.5), part && Catch::Contains("narrowest"));
    CHECK_THROWS_AS(with_kerf(cut_out({mouth}), -0.1), std::invalid_argument);
    CHECK_THROWS_AS(with_kerf(cut_out({mouth}), std::numeric_limits<double>::quiet_NaN()), std::invalid_argument);
}
