// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"
#include "layout/plate/points.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

// Measures drawings from their paths alone, by routes of its own.
namespace shapes {

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

inline const Mark& mark(const Drawing& drawing, const std::string& name) {
    const auto found =
        std::find_if(drawing.marks.begin(), drawing.marks.end(), [&](const Mark& m) { return m.name == name; });
    if (found == drawing.marks.end())
        FAIL("no mark \"" << name << "\" in the drawing \"" << drawing.name << "\"");
    return *found;
}
inline const Path& outline(const Drawing& drawing, const std::string& name) {
    const Mark& found = mark(drawing, name);
    REQUIRE(found.layer == Layer::cut);
    REQUIRE(found.paths.size() == 1);
    return found.paths.front();
}

/// True if no two sides of the closed ring cross or come within 1e-7 mm, but for neighbours at their common corner.
inline bool stands_clear_of_itself(const std::vector<Point>& ring) {
    const std::size_t n = ring.size() - 1; // the last is the first
    constexpr double k_touch = 1e-7;
    const auto away = [](Point p, Point a, Point b) {
        const double part = std::clamp(dot(p - a, b - a) / dot(b - a, b - a), 0.0, 1.0);
        return distance(p, a + part * (b - a));
    };
    const auto side_of = [](Point a, Point b, Point p) { return cross(b - a, p - a); };
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t k = i + 2; k < n; ++k) {
            if (i == 0 && k == n - 1)
                continue;
            const Point a = ring[i], b = ring[i + 1], c = ring[k], d = ring[k + 1];
            if (side_of(a, b, c) * side_of(a, b, d) > 0 || side_of(c, d, a) * side_of(c, d, b) > 0)
                continue; // one lies wholly to a side of the other
            const bool in_line = std::abs(side_of(a, b, c)) < k_touch * distance(a, b) &&
                                 std::abs(side_of(a, b, d)) < k_touch * distance(a, b);
            const double near = std::min({away(a, c, d), away(b, c, d), away(c, a, b), away(d, a, b)});
            if (!in_line || near < k_touch)
                return false;
        }
    return true;
}

inline double doubled_area(const std::vector<Point>& ring) {
    double sum = 0;
    for (std::size_t i = 0; i + 1 < ring.size(); ++i)
        sum += cross(ring[i], ring[i + 1]);
    return sum;
}

inline void check_outline(const Path& path) {
    REQUIRE(path.closed);
    REQUIRE(end_of(path) == path.start);
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        const Point to = end_of(piece);
        if (const auto* arc = std::get_if<ArcTo>(&piece))
            CHECK_THAT(distance(at, arc->centre),
                       WithinAbs(distance(to, arc->centre), 1e-9)); // both ends on one circle
        else
            CHECK(distance(at, to) > 1e-9);
        at = to;
    }
    const auto ring = flattened(path, 0.005);
    CHECK(stands_clear_of_itself(ring));
    CHECK(doubled_area(ring) > 0); // anticlockwise
}

/// The direction in which a piece begins and ends, unit.
inline std::pair<Point, Point> directions(Point start, const Piece& piece) {
    if (const auto* arc = std::get_if<ArcTo>(&piece)) {
        const double hand = arc->sweep.in_radians() > 0 ? 1.0 : -1.0;
        return {hand * left_of(unit(start - arc->centre)), hand * left_of(unit(arc->to - arc->centre))};
    }
    return {unit(end_of(piece) - start), unit(end_of(piece) - start)};
}

/// Arcs of a radius that leave and join their neighbours without a corner: how many there are.
inline int touching_arcs(const Path& path, double tolerance) {
    const std::size_t n = path.pieces.size();
    std::vector<Point> starts{path.start};
    for (const Piece& piece : path.pieces)
        starts.push_back(end_of(piece));
    int count = 0;
    for (std::size_t i = 0; i < n; ++i) {
        if (!std::holds_alternative<ArcTo>(path.pieces[i]))
            continue;
        const std::size_t before = (i + n - 1) % n, after = (i + 1) % n;
        const auto [begins, ends] = directions(starts[i], path.pieces[i]);
        const Point in = directions(starts[before], path.pieces[before]).second,
                    out = directions(starts[after], path.pieces[after]).first;
        count += distance(in, begins) < tolerance && distance(ends, out) < tolerance;
    }
    return count;
}
inline int arcs(const Path& path) {
    return int(std::count_if(path.pieces.begin(), path.pieces.end(),
                             [](const Piece& p) { return std::holds_alternative<ArcTo>(p); }));
}

/// The longest straight stretch of a path whose direction is within 0.5° of an angle (either way round): its own angle in
/// [0°, 180°) and length, stretches on one line taken together from end to end.
struct Stretch {
    double degrees = 0.0, length_mm = 0.0;
    Point from, to;
};
inline Stretch longest_at(const Path& path, double degrees) {
    Stretch best;
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        const Point to = end_of(piece);
        if (std::holds_alternative<LineTo>(piece)) {
            const Point d = to - at;
            double turn = std::atan2(d.y_mm, d.x_mm) * 180 / std::numbers::pi;
            turn = std::fmod(turn + 360, 180);
            const double off = std::abs(std::remainder(turn - degrees, 180.0));
            if (off < 0.5 && length(d) > best.length_mm)
                best = {turn, length(d), at, to};
        }
        at = to;
    }
    return best;
}

/// Circles on the drill layer, centre and diameter.
inline std::vector<std::pair<Point, double>> holes(const std::vector<Mark>& marks) {
    std::vector<std::pair<Point, double>> found;
    for (const Mark& m : marks)
        if (m.layer == Layer::drill && m.paths.size() == 1 && m.paths.front().closed) {
            const Box box = bounds_of(m.paths.front());
            found.emplace_back(box.middle(), box.width_mm());
        }
    return found;
}

} // namespace shapes
