// SPDX-License-Identifier: MIT
#include "layout/drawing/measures.hpp"

#include "layout/drawing/clipping.hpp"

#include <algorithm>
#include <cmath>
#include <iterator>

namespace dialwright::layout {
namespace {

double radius_of(Point start, const ArcTo& arc) {
    return std::hypot(start.x_mm - arc.centre.x_mm, start.y_mm - arc.centre.y_mm);
}

/// Of a cubic: half chord and half polygon of its controls, of halves of halves until the two are nearly one. What is left
/// out shrinks with the fourth power of the turn that a part makes (Gravesen, Adaptive subdivision and the length and
/// energy of Bézier curves, 1997; from memory).
double length_of(Point start, const CurveTo& curve, int halvings = 0) {
    const auto apart = [](Point p, Point q) {
        const double x = p.x_mm - q.x_mm, y = p.y_mm - q.y_mm;
        return std::sqrt(x * x + y * y);
    };
    const auto middle = [](Point p, Point q) { return Point{(p.x_mm + q.x_mm) / 2, (p.y_mm + q.y_mm) / 2}; };
    constexpr double k_nearly = 0.001;
    constexpr int k_most = 12; // at a point where the curve turns back
    const Point c1 = curve.control_1, c2 = curve.control_2, to = curve.to;
    const double chord = apart(start, to), polygon = apart(start, c1) + apart(c1, c2) + apart(c2, to);
    if (polygon - chord <= k_nearly * polygon || halvings == k_most)
        return (chord + polygon) / 2;
    const Point a = middle(start, c1), b = middle(c1, c2), c = middle(c2, to), ab = middle(a, b), bc = middle(b, c);
    const Point halfway = middle(ab, bc);
    return length_of(start, {a, ab, halfway}, halvings + 1) + length_of(halfway, {bc, c, to}, halvings + 1);
}

double length_of(Point start, const Piece& piece) {
    if (const auto* arc = std::get_if<ArcTo>(&piece))
        return radius_of(start, *arc) * std::abs(arc->sweep.in_radians());
    if (const auto* curve = std::get_if<CurveTo>(&piece))
        return length_of(start, *curve);
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
