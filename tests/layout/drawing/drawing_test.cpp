// SPDX-License-Identifier: MIT
#include "layout/drawing/drawing.hpp"
#include "layout/drawing/layers.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <limits>
#include <random>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

/// A piece of every kind, with arcs both ways round.
Path mixed_path() {
    return {{10, 0},
            {LineTo{{30, 5}}, ArcTo{{20, 15}, {20, 5}, Angle::degrees(90)}, CurveTo{{10, 40}, {-30, 40}, {-20, 0}},
             ArcTo{{0, 0}, {-10, 0}, Angle::degrees(-180)}, ArcTo{{0, 0}, {0, -3}, Angle::degrees(-360)}},
            false};
}

Point on_mixed_curve(double t) {
    const double s = 1 - t;
    return {s * s * s * 20 + 3 * s * s * t * 10 + 3 * s * t * t * -30 + t * t * t * -20,
            s * s * s * 15 + 3 * s * s * t * 40 + 3 * s * t * t * 40};
}

} // namespace

TEST_CASE("A box holds what was added to it", "[layout]") {
    Box box;
    CHECK(box.empty());
    CHECK(box.width_mm() == 0);
    CHECK(box.grown(5).empty());
    CHECK_FALSE(box.meets(Box{-1, -1, 1, 1}));
    box.add(Point{1, 2});
    CHECK_FALSE(box.empty());
    box.add(Box{-3, 0, -2, 1});
    CHECK(box.width_mm() == 4);
    CHECK(box.height_mm() == 2);
    CHECK(box.contains(Point{0, 1}));
    CHECK(box.contains(Box{-3, 0, 1, 2}));
    CHECK_FALSE(box.contains(Box{-3, 0, 1.1, 2}));
    CHECK(box.meets(Box{1, 2, 5, 5}));
}

TEST_CASE("Bounds of arcs and curves are exact", "[layout]") {
    // Against a fine walk along random arcs and cubics.
    std::mt19937 random{20240601};
    INFO("seed 20240601");
    std::uniform_real_distribution<double> any(-100, 100), turn(-360, 360);
    for (int i = 0; i < 500; ++i) {
        const Point start{any(random), any(random)}, centre{any(random), any(random)};
        ArcTo arc{{}, centre, Angle::degrees(i < 8 ? (i - 4) * 90.0 : turn(random))};
        arc.to = point_at(start, {start, centre, arc.sweep * 1.000001}, 1 / 1.000001);
        const CurveTo curve{{any(random), any(random)}, {any(random), any(random)}, {any(random), any(random)}};
        for (const Piece& piece : {Piece{arc}, Piece{curve}}) {
            const Box box = bounds_of(start, piece);
            Box walked;
            for (const Point p : flattened({start, {piece}, false}, 1e-4)) {
                walked.add(p);
            }
            CHECK_THAT(box.left_mm, WithinAbs(walked.left_mm, 1e-4));
            CHECK_THAT(box.right_mm, WithinAbs(walked.right_mm, 1e-4));
            CHECK_THAT(box.bottom_mm, WithinAbs(walked.bottom_mm, 1e-4));
            CHECK_THAT(box.top_mm, WithinAbs(walked.top_mm, 1e-4));
        }
    }
    const Box round = bounds_of(circle({3, 4}, 10));
    CHECK(round.left_mm == -7);
    CHECK(round.top_mm == 14);
    CHECK(round.bottom_mm == -6);
}

TEST_CASE("Flattened points stay within the tolerance", "[layout]") {
    for (const double tolerance : {1.0, 0.1, 0.01, 0.001}) {
        const auto points = flattened(circle({0, 0}, 200), tolerance);
        for (std::size_t i = 1; i < points.size(); ++i) {
            const double middle =
                std::hypot((points[i].x_mm + points[i - 1].x_mm) / 2, (points[i].y_mm + points[i - 1].y_mm) / 2);
            CHECK(200 - middle <= tolerance * 1.000001);
        }
        CHECK(points.front() == points.back());
    }
    // The cubic of the mixed path, walked finely.
    const auto chords = flattened({{20, 15}, {CurveTo{{10, 40}, {-30, 40}, {-20, 0}}}, false}, 0.01);
    for (int i = 0; i <= 1000; ++i) {
        const Point p = on_mixed_curve(i / 1000.0);
        double nearest = 1e9;
        for (std::size_t k = 1; k < chords.size(); ++k) {
            const double x = chords[k].x_mm - chords[k - 1].x_mm, y = chords[k].y_mm - chords[k - 1].y_mm;
            const double px = p.x_mm - chords[k - 1].x_mm, py = p.y_mm - chords[k - 1].y_mm;
            const double part = std::min(1.0, std::max(0.0, (px * x + py * y) / (x * x + y * y)));
            nearest = std::min(nearest, std::hypot(px - part * x, py - part * y));
        }
        CHECK(nearest < 0.01);
    }
}

TEST_CASE("An arc's cubics stay on its circle", "[layout]") {
    const Point start{1000, 0};
    for (const double degrees : {0.05, 29.9, 30.0, 30.1, 90.0, -200.0, 360.0}) {
        ArcTo arc{{}, {0, 0}, Angle::degrees(degrees)};
        arc.to = {1000 * cos(arc.sweep), 1000 * sin(arc.sweep)};
        const auto curves = curves_of(start, arc);
        CHECK(curves.size() == static_cast<std::size_t>(std::max(1.0, std::ceil(std::abs(degrees) / 30 - 1e-6))));
        CHECK(curves.back().to == arc.to);
        Point at = start;
        for (const CurveTo& curve : curves) {
            for (const Point p : flattened({at, {curve}, false}, 1e-3)) {
                CHECK_THAT(std::hypot(p.x_mm, p.y_mm), WithinAbs(1000, 0.0004));
            }
            at = curve.to;
        }
    }
}

TEST_CASE("Placing puts points, arcs and widths where it says", "[layout]") {
    const Path path = mixed_path();
    for (const bool mirrored : {false, true}) {
        for (const double scale_y : {1.02, 1.03}) {
            const Placing placing{Angle::degrees(37), {12, -5}, 1.02, scale_y, mirrored};
            const Path placed = placing(path);
            // Equal parts of the path must land on equal parts of the placed path: compare fine walks by nearness.
            const auto walked = flattened(path, 1e-4), drawn = flattened(placed, 1e-4);
            for (std::size_t i = 0; i < walked.size(); i += 7) {
                const Point p = placing(walked[i]);
                double nearest = 1e9;
                for (const Point q : drawn) {
                    nearest = std::min(nearest, std::hypot(p.x_mm - q.x_mm, p.y_mm - q.y_mm));
                }
                CHECK(nearest < 0.15); // steps of the walk are 0.1 mm and less
            }
            const bool has_arc = std::holds_alternative<ArcTo>(placed.pieces[1]);
            CHECK(has_arc == (scale_y == 1.02));
            if (has_arc) {
                CHECK_THAT(std::get<ArcTo>(placed.pieces[1]).sweep.in_degrees(), WithinAbs(mirrored ? -90 : 90, 1e-9));
            }
        }
    }
    const Point p = Placing{Angle::degrees(90), {10, 20}, 2, 3, true}(Point{1, 5});
    CHECK_THAT(p.x_mm, WithinAbs(10 - 2 * 5, 1e-12)); // mirrored to (-1, 5), turned to (-5, -1)
    CHECK_THAT(p.y_mm, WithinAbs(20 - 3 * 1, 1e-12));
    CHECK_THAT((Placing{{}, {}, 0.25, 0.25, false}(Mark{Layer::cut, {path}, 0.4, false, ""}).width_mm),
               WithinAbs(0.1, 1e-12));
}

TEST_CASE("A mark with a number that is none is found out", "[layout]") {
    const double none = std::numeric_limits<double>::quiet_NaN(), endless = std::numeric_limits<double>::infinity();
    Mark mark{Layer::engrave, {mixed_path()}, 0.3, false, ""};
    CHECK(is_finite(mark));
    mark.paths[0].start.x_mm = none;
    CHECK_FALSE(is_finite(mark));
    mark.paths[0] = mixed_path();
    std::get<ArcTo>(mark.paths[0].pieces[1]).sweep = Angle::radians(endless);
    CHECK_FALSE(is_finite(mark));
}

TEST_CASE("Bounds of marks carry the stroke's width", "[layout]") {
    const Mark stroke{Layer::cut, {circle({0, 0}, 10)}, 1.0, false, ""},
        shape{Layer::cut, {circle({0, 0}, 10)}, 1.0, true, ""};
    CHECK(bounds_of(stroke).right_mm == 10.5);
    CHECK(bounds_of(shape).right_mm == 10);
    CHECK(bounds_of(Drawing{}).empty());
}

TEST_CASE("Layers differ in name, tone and lightness", "[layout]") {
    for (const Layer a : k_layers) {
        for (const Layer b : k_layers) {
            if (a != b) {
                CHECK(name_of(a) != name_of(b));
                CHECK(std::abs(tone_of(a).lightness() - tone_of(b).lightness()) >= 0.09);
            }
        }
    }
    CHECK(tone_of(Layer::engrave).lightness() == 0);
}
