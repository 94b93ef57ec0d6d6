// SPDX-License-Identifier: MIT
#include "layout/drawing/offset.hpp"

#include "layout/drawing/measures.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <polyclipping/clipper.hpp>

// The path is walked anticlockwise, its outer side on the right hand. Each piece moves to the right by the distance; then
// each pair of neighbours is joined: where they come apart a corner or an arc fills the gap, where they overlap both end
// at their crossing.

namespace dialwright::layout {
namespace {

constexpr double k_pi = std::numbers::pi;
constexpr double k_scale = 1e6;     ///< Clipper works in whole numbers: nanometres
constexpr double k_fine_mm = 0.002; ///< of chords
constexpr double k_smooth = 1e-7;   ///< radians between two pieces that run on into each other

Point operator+(Point a, Point b) {
    return {a.x_mm + b.x_mm, a.y_mm + b.y_mm};
}
Point operator-(Point a, Point b) {
    return {a.x_mm - b.x_mm, a.y_mm - b.y_mm};
}
Point operator*(double k, Point a) {
    return {k * a.x_mm, k * a.y_mm};
}
double dot(Point a, Point b) {
    return a.x_mm * b.x_mm + a.y_mm * b.y_mm;
}
double cross(Point a, Point b) {
    return a.x_mm * b.y_mm - a.y_mm * b.x_mm;
}
double size(Point a) {
    return std::hypot(a.x_mm, a.y_mm);
}
Point right_of(Point way) {
    return {way.y_mm, -way.x_mm};
}

/// A line or an arc with the ways it sets out and comes in, as unit vectors.
struct Edge {
    Point from, to;
    bool round = false;
    Point centre;
    double sweep = 0; ///< radians, as before it was moved
    Point sets_out, comes_in;
};

Point along_arc(Point p, Point centre, double sweep) {
    const Point r = p - centre;
    const Point left{-r.y_mm / size(r), r.x_mm / size(r)};
    return sweep > 0 ? left : -1.0 * left;
}

std::optional<std::vector<Edge>> edges_of(const Path& path) {
    std::vector<Edge> edges;
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        Edge edge{at, end_of(piece), false, {}, 0, {}, {}};
        at = edge.to;
        if (std::holds_alternative<CurveTo>(piece))
            return std::nullopt;
        if (const auto* arc = std::get_if<ArcTo>(&piece)) {
            edge.round = true;
            edge.centre = arc->centre;
            edge.sweep = arc->sweep.in_radians();
            if (size(edge.from - edge.centre) < 1e-9 || edge.sweep == 0)
                return std::nullopt;
            edge.sets_out = along_arc(edge.from, edge.centre, edge.sweep);
            edge.comes_in = along_arc(edge.to, edge.centre, edge.sweep);
        } else {
            const double length = size(edge.to - edge.from);
            if (length < 1e-9)
                continue;
            edge.sets_out = edge.comes_in = (1 / length) * (edge.to - edge.from);
        }
        edges.push_back(edge);
    }
    if (edges.empty() || size(edges.back().to - edges.front().from) > 1e-9)
        return std::nullopt;
    return edges;
}

/// To the right by the distance; false if an arc's radius vanishes.
bool move(Edge& edge, double by_mm) {
    if (edge.round) {
        const double radius = size(edge.from - edge.centre), moved = radius + (edge.sweep > 0 ? by_mm : -by_mm);
        if (moved < 1e-6)
            return false;
    }
    edge.from = edge.from + by_mm * right_of(edge.sets_out);
    edge.to = edge.to + by_mm * right_of(edge.comes_in);
    return true;
}

/// Where the carriers of two edges cross.
std::vector<Point> crossings(const Edge& a, const Edge& b) {
    if (a.round && !b.round)
        return crossings(b, a);
    if (!a.round && !b.round) {
        const double across = cross(a.sets_out, b.sets_out);
        if (std::abs(across) < 1e-12)
            return {};
        return {a.from + (cross(b.from - a.from, b.sets_out) / across) * a.sets_out};
    }
    // The foot of the second circle's centre on the line; of two circles, on the line through their crossings.
    const double r = size(b.from - b.centre);
    Point foot, way;
    if (!a.round) {
        way = a.sets_out;
        foot = a.from + dot(b.centre - a.from, way) * way;
    } else {
        const double apart = size(b.centre - a.centre), ra = size(a.from - a.centre);
        if (apart < 1e-9)
            return {};
        const Point towards = (1 / apart) * (b.centre - a.centre);
        foot = a.centre + ((apart * apart + ra * ra - r * r) / (2 * apart)) * towards;
        way = right_of(towards);
    }
    const double off = size(foot - b.centre), square = r * r - off * off;
    if (square < 0)
        return {};
    return {foot + std::sqrt(square) * way, foot - std::sqrt(square) * way};
}

/// Whether an edge that was cut short still runs its own way; sets an arc's new sweep.
bool still_runs(Edge& edge, double first_sweep) {
    if (!edge.round)
        return dot(edge.to - edge.from, edge.sets_out) > 1e-9;
    const Point a = edge.from - edge.centre, b = edge.to - edge.centre;
    double sweep = std::atan2(cross(a, b), dot(a, b));
    if (first_sweep > 0 && sweep < first_sweep - k_pi)
        sweep += 2 * k_pi;
    if (first_sweep < 0 && sweep > first_sweep + k_pi)
        sweep -= 2 * k_pi;
    edge.sweep = sweep;
    return sweep * first_sweep > 0 && std::abs(sweep) <= std::abs(first_sweep) + 1e-6;
}

/// Joins two neighbours that met at `corner`; what fills a gap goes to `filling`.
bool join(Edge& a, Edge& b, Point corner, double by_mm, std::vector<Edge>& filling) {
    const double turn = std::atan2(cross(a.comes_in, b.sets_out), dot(a.comes_in, b.sets_out));
    if (std::abs(turn) < k_smooth) {
        b.from = a.to;
        return true;
    }
    if (turn * by_mm > 0) { // apart
        if (std::abs(turn) <= k_pi / 2 + 1e-9 && !a.round && !b.round) {
            a.to = b.from = crossings(a, b).front();
        } else {
            filling.push_back({a.to, b.from, true, corner, turn, {}, {}});
        }
        return true;
    }
    const std::vector<Point> found = crossings(a, b);
    if (found.empty())
        return false;
    a.to = b.from = *std::min_element(found.begin(), found.end(),
                                      [&](Point p, Point q) { return size(p - corner) < size(q - corner); });
    return true;
}

ClipperLib::Path ring_of(const Path& path, double fine_mm = k_fine_mm) {
    ClipperLib::Path ring;
    for (const Point p : flattened(path, fine_mm))
        ring.emplace_back(std::llround(p.x_mm * k_scale), std::llround(p.y_mm * k_scale));
    return ring;
}

/// A path that crosses itself has loops that what it goes round has not, or has once where the path goes round twice.
bool goes_round_once(const Path& path) {
    const ClipperLib::Path ring = ring_of(path);
    ClipperLib::Paths simple;
    ClipperLib::SimplifyPolygon(ring, simple, ClipperLib::pftPositive);
    const double own = ClipperLib::Area(ring) / (k_scale * k_scale);
    constexpr double k_rounding_mm = 3 / k_scale;
    return simple.size() == 1 && std::abs(ClipperLib::Area(simple.front()) / (k_scale * k_scale) - own) <=
                                     k_rounding_mm * length_of(path) + 1e-6;
}

} // namespace

std::optional<Path> offset_by_pieces(const Path& path, double by_mm) {
    auto found = edges_of(area_of(path) < 0 ? reversed(path) : path);
    if (!found)
        return std::nullopt;
    std::vector<Edge>& edges = *found;
    std::vector<Point> corners;
    for (Edge& edge : edges) {
        corners.push_back(edge.from);
        if (!move(edge, by_mm))
            return std::nullopt;
    }
    const std::vector<Edge> moved = edges;
    std::vector<std::vector<Edge>> fillings(edges.size());
    for (std::size_t i = 0; i < edges.size() && edges.size() > 1; ++i) {
        const std::size_t next = (i + 1) % edges.size();
        if (!join(edges[i], edges[next], corners[next], by_mm, fillings[i]))
            return std::nullopt;
    }
    if (edges.size() == 1) { // a circle by itself ends where it starts
        edges[0].to = edges[0].from;
        if (!edges[0].round)
            return std::nullopt;
    }
    Path made{edges.front().from, {}, true};
    const auto add = [&](const Edge& edge) {
        if (edge.round)
            made.pieces.emplace_back(ArcTo{edge.to, edge.centre, Angle::radians(edge.sweep)});
        else
            made.pieces.emplace_back(LineTo{edge.to});
    };
    for (std::size_t i = 0; i < edges.size(); ++i) {
        const bool changed = edges[i].from != moved[i].from || edges[i].to != moved[i].to;
        if (changed && edges.size() > 1 && !still_runs(edges[i], moved[i].sweep))
            return std::nullopt;
        add(edges[i]);
        for (const Edge& edge : fillings[i])
            add(edge);
    }
    return goes_round_once(made) ? std::optional{made} : std::nullopt;
}

std::vector<Path> offset_by_chords(const Path& path, double by_mm) {
    const ClipperLib::Path ring = ring_of(area_of(path) < 0 ? reversed(path) : path);
    ClipperLib::ClipperOffset offset{2.0, k_fine_mm * k_scale};
    offset.AddPath(ring, ClipperLib::jtRound, ClipperLib::etClosedPolygon);
    ClipperLib::Paths found;
    offset.Execute(found, by_mm * k_scale);
    std::vector<Path> made;
    for (const ClipperLib::Path& one : found) {
        std::vector<Point> corners;
        for (const ClipperLib::IntPoint& p : one)
            corners.push_back({static_cast<double>(p.X) / k_scale, static_cast<double>(p.Y) / k_scale});
        made.push_back(polyline(corners, true));
    }
    return made;
}

DiscFit fit_of_disc(const std::vector<Path>& shapes, double radius_mm) {
    constexpr double k_square = k_scale * k_scale, k_near = 0.45;
    const double fine_mm = radius_mm / 15;
    ClipperLib::Clipper clipper;
    for (const Path& shape : shapes)
        clipper.AddPath(ring_of(shape, fine_mm), ClipperLib::ptSubject, true);
    ClipperLib::Paths simple, within, missed;
    clipper.Execute(ClipperLib::ctUnion, simple, ClipperLib::pftNonZero, ClipperLib::pftNonZero);
    const auto moved = [&](const ClipperLib::Paths& rings, double by_mm) {
        ClipperLib::ClipperOffset offset{2.0, fine_mm * k_scale};
        offset.AddPaths(rings, ClipperLib::jtRound, ClipperLib::etClosedPolygon);
        ClipperLib::Paths made;
        offset.Execute(made, by_mm * k_scale);
        return made;
    };
    within = moved(moved(simple, -radius_mm), (1 + k_near) * radius_mm);
    clipper.Clear();
    clipper.AddPaths(simple, ClipperLib::ptSubject, true);
    clipper.AddPaths(within, ClipperLib::ptClip, true);
    clipper.Execute(ClipperLib::ctDifference, missed, ClipperLib::pftNonZero, ClipperLib::pftNonZero);

    DiscFit fit;
    for (ClipperLib::Path& ring : simple) {
        const double area = ClipperLib::Area(ring) / k_square;
        fit.area_mm2 += area;
        if (area >= 0)
            continue;
        ++fit.eyes;
        ClipperLib::ReversePath(ring);
        fit.lost_eyes += moved({ring}, -radius_mm).empty();
    }
    double largest = 0;
    for (const ClipperLib::Path& ring : missed) {
        const double area = ClipperLib::Area(ring) / k_square;
        fit.missed_mm2 += area;
        if (area <= largest)
            continue;
        largest = area;
        Box box;
        for (const ClipperLib::IntPoint& p : ring)
            box.add(Point{static_cast<double>(p.X) / k_scale, static_cast<double>(p.Y) / k_scale});
        fit.worst = box.middle();
    }
    return fit;
}

} // namespace dialwright::layout
