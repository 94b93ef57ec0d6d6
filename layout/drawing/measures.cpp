// SPDX-License-Identifier: MIT
#include "layout/drawing/measures.hpp"

#include "layout/drawing/clipping.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>

namespace dialwright::layout {
namespace {

double radius_of(Point start, const ArcTo& arc) {
    return std::hypot(start.x_mm - arc.centre.x_mm, start.y_mm - arc.centre.y_mm);
}

/// Of a cubic from part `low` to `high`, by Gauss and Legendre's rule of four points, halved until halves and whole agree.
double length_of(Point start, const CurveTo& curve, double low, double high, int halvings = 0) {
    constexpr std::array<double, 2> k_at{0.339981043584856, 0.861136311594053}, // Abramowitz and Stegun, table 25.4
        k_weight{0.652145154862546, 0.347854845137454};
    const Point c1 = curve.control_1, c2 = curve.control_2, to = curve.to;
    const auto speed = [&](double t) {
        const double u = 1 - t, a = 3 * u * u, b = 6 * u * t, c = 3 * t * t;
        const double x = a * (c1.x_mm - start.x_mm) + b * (c2.x_mm - c1.x_mm) + c * (to.x_mm - c2.x_mm);
        const double y = a * (c1.y_mm - start.y_mm) + b * (c2.y_mm - c1.y_mm) + c * (to.y_mm - c2.y_mm);
        return std::sqrt(x * x + y * y);
    };
    const auto by_rule = [&](double from, double until) {
        const double middle = (from + until) / 2, half = (until - from) / 2;
        double sum = 0;
        for (std::size_t i = 0; i < k_at.size(); ++i)
            sum += k_weight[i] * (speed(middle - k_at[i] * half) + speed(middle + k_at[i] * half));
        return half * sum;
    };
    constexpr double k_agree = 2e-5; // the halves are then closer by far
    constexpr int k_most = 12;       // at a point where the curve turns back
    const double middle = (low + high) / 2, whole = by_rule(low, high);
    const double halves = by_rule(low, middle) + by_rule(middle, high);
    constexpr int k_least = 1; // a curve that turns back at its quarters makes the first two agree by chance
    if ((halvings >= k_least && std::abs(halves - whole) <= k_agree * halves) || halvings == k_most)
        return halves;
    return length_of(start, curve, low, middle, halvings + 1) + length_of(start, curve, middle, high, halvings + 1);
}

double length_of(Point start, const Piece& piece) {
    if (const auto* arc = std::get_if<ArcTo>(&piece))
        return radius_of(start, *arc) * std::abs(arc->sweep.in_radians());
    if (const auto* curve = std::get_if<CurveTo>(&piece))
        return length_of(start, *curve, 0, 1);
    const Point to = end_of(piece);
    return std::hypot(to.x_mm - start.x_mm, to.y_mm - start.y_mm);
}

double cross(Point a, Point b) {
    return a.x_mm * b.y_mm - a.y_mm * b.x_mm;
}

/// Twice what lies between a piece and the origin.
double doubled_area(Point a, const Piece& piece, Point origin) {
    const auto from = [&](Point p) { return Point{p.x_mm - origin.x_mm, p.y_mm - origin.y_mm}; };
    const Point p = from(a), q = from(end_of(piece));
    if (const auto* arc = std::get_if<ArcTo>(&piece)) {
        // ∮ x dy − y dx: the sector seen from the centre, and the centre's own share of the chord.
        const double radius = radius_of(a, *arc);
        const Point chord{q.x_mm - p.x_mm, q.y_mm - p.y_mm};
        return cross(from(arc->centre), chord) + radius * radius * arc->sweep.in_radians();
    }
    if (const auto* curve = std::get_if<CurveTo>(&piece)) {
        // The integral of a cubic's x dy − y dx, from its Bernstein polynomials.
        const Point c1 = from(curve->control_1), c2 = from(curve->control_2);
        return (6 * cross(p, c1) + 3 * cross(p, c2) + cross(p, q) + 3 * cross(c1, c2) + 3 * cross(c1, q) +
                6 * cross(c2, q)) /
               10;
    }
    return cross(p, q);
}

Point middle_of_first(const Path& path) {
    if (path.pieces.empty())
        return path.start;
    const Piece& piece = path.pieces.front();
    if (const auto* arc = std::get_if<ArcTo>(&piece))
        return point_at(path.start, *arc, 0.5);
    if (const auto* curve = std::get_if<CurveTo>(&piece)) {
        const auto at = [](double a, double b, double c, double d) { return (a + 3 * b + 3 * c + d) / 8; };
        return {at(path.start.x_mm, curve->control_1.x_mm, curve->control_2.x_mm, curve->to.x_mm),
                at(path.start.y_mm, curve->control_1.y_mm, curve->control_2.y_mm, curve->to.y_mm)};
    }
    const Point to = end_of(piece);
    return {(path.start.x_mm + to.x_mm) / 2, (path.start.y_mm + to.y_mm) / 2};
}

} // namespace

double length_of(const Path& path) {
    double sum = 0;
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        sum += length_of(at, piece);
        at = end_of(piece);
    }
    return sum;
}

double area_of(const Path& path) {
    double sum = 0;
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        sum += doubled_area(at, piece, path.start);
        at = end_of(piece);
    }
    return sum / 2;
}

Path reversed(const Path& path) {
    Path turned{end_of(path), {}, path.closed};
    turned.pieces.reserve(path.pieces.size());
    for (std::size_t i = path.pieces.size(); i-- > 0;) {
        const Point to = i == 0 ? path.start : end_of(path.pieces[i - 1]);
        if (const auto* arc = std::get_if<ArcTo>(&path.pieces[i]))
            turned.pieces.emplace_back(ArcTo{to, arc->centre, -arc->sweep});
        else if (const auto* curve = std::get_if<CurveTo>(&path.pieces[i]))
            turned.pieces.emplace_back(CurveTo{curve->control_2, curve->control_1, to});
        else
            turned.pieces.emplace_back(LineTo{to});
    }
    return turned;
}

std::vector<Nest> nests_of(const std::vector<const Path*>& paths) {
    constexpr double k_fine_mm = 0.01;
    std::vector<Box> boxes;
    std::transform(paths.begin(), paths.end(), std::back_inserter(boxes), [](const Path* p) { return bounds_of(*p); });
    std::vector<std::vector<Point>> rings(paths.size());
    std::vector<Nest> nests(paths.size());
    const auto alike = [](const Box& a, const Box& b) {
        return a.grown(1e-6).contains(b) && b.grown(1e-6).contains(a);
    };
    for (std::size_t i = 0; i < paths.size(); ++i) {
        nests[i].outermost = i;
        double widest = 0;
        const Point inside = middle_of_first(*paths[i]);
        for (std::size_t j = 0; j < paths.size(); ++j) {
            // One contour drawn twice lies in neither.
            if (j == i || !paths[j]->closed || !boxes[j].contains(boxes[i]) || alike(boxes[i], boxes[j]))
                continue;
            if (rings[j].empty())
                rings[j] = flattened(*paths[j], k_fine_mm);
            if (winding_round(rings[j], inside) == 0)
                continue;
            ++nests[i].depth;
            const double size = boxes[j].width_mm() + boxes[j].height_mm();
            if (size > widest) {
                widest = size;
                nests[i].outermost = j;
            }
        }
    }
    return nests;
}

} // namespace dialwright::layout
