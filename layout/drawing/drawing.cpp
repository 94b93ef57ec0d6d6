// SPDX-License-Identifier: MIT
#include "layout/drawing/drawing.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

// Geometry of paths. An arc runs round its centre with its start's radius; its last point is the stored one, so that
// ends that meet stay the same number whatever the rounding of sines and cosines.

namespace dialwright::layout {
namespace {

constexpr double k_pi = std::numbers::pi;

Point on_arc(Point start, const ArcTo& arc, double part) {
    const double turn = arc.sweep.in_radians() * part;
    const double x = start.x_mm - arc.centre.x_mm, y = start.y_mm - arc.centre.y_mm;
    const double c = std::cos(turn), s = std::sin(turn);
    return {arc.centre.x_mm + x * c - y * s, arc.centre.y_mm + x * s + y * c};
}

void add_arc(Box& box, Point start, const ArcTo& arc) {
    box.add(arc.to);
    const double x = start.x_mm - arc.centre.x_mm, y = start.y_mm - arc.centre.y_mm;
    const double radius = std::hypot(x, y);
    const double from = std::atan2(y, x);
    const double low = std::min(from, from + arc.sweep.in_radians());
    const double high = std::max(from, from + arc.sweep.in_radians());
    // The farthest points left, right, up and down that the arc runs through.
    constexpr std::array<Point, 4> k_ways{{{1, 0}, {0, 1}, {-1, 0}, {0, -1}}};
    const double first = std::ceil(low / (k_pi / 2));
    for (int step = 0; step < 5; ++step) {
        const double quarter = first + step;
        if (quarter * (k_pi / 2) > high) {
            break;
        }
        const int way = ((static_cast<int>(quarter) % 4) + 4) % 4;
        const Point towards = k_ways[static_cast<std::size_t>(way)];
        box.add(Point{arc.centre.x_mm + radius * towards.x_mm, arc.centre.y_mm + radius * towards.y_mm});
    }
}

double on_cubic(double a, double b, double c, double d, double t) {
    const double s = 1.0 - t;
    return s * s * s * a + 3 * s * s * t * b + 3 * s * t * t * c + t * t * t * d;
}

/// Parameters in (0, 1) at which one coordinate of a cubic stands still.
std::array<double, 2> still_points(double a, double b, double c, double d) {
    // The derivative over 3: A t² + B t + C, solved without the loss of the small root.
    const double A = d - 3 * c + 3 * b - a, B = 2 * (c - 2 * b + a), C = b - a;
    const double under_root = B * B - 4 * A * C;
    if (under_root < 0) {
        return {-1, -1};
    }
    const double q = -0.5 * (B + std::copysign(std::sqrt(under_root), B));
    return {A != 0 ? q / A : -1, q != 0 ? C / q : -1};
}

void add_curve(Box& box, Point start, const CurveTo& curve) {
    box.add(curve.to);
    const auto at = [&](double t) {
        return Point{on_cubic(start.x_mm, curve.control_1.x_mm, curve.control_2.x_mm, curve.to.x_mm, t),
                     on_cubic(start.y_mm, curve.control_1.y_mm, curve.control_2.y_mm, curve.to.y_mm, t)};
    };
    const auto in_x = still_points(start.x_mm, curve.control_1.x_mm, curve.control_2.x_mm, curve.to.x_mm);
    const auto in_y = still_points(start.y_mm, curve.control_1.y_mm, curve.control_2.y_mm, curve.to.y_mm);
    for (const double t : {in_x[0], in_x[1], in_y[0], in_y[1]}) {
        if (t > 0 && t < 1) {
            box.add(at(t));
        }
    }
}

void flatten_arc(std::vector<Point>& points, Point start, const ArcTo& arc, double tolerance_mm) {
    const double radius = std::hypot(start.x_mm - arc.centre.x_mm, start.y_mm - arc.centre.y_mm);
    const double sweep = std::abs(arc.sweep.in_radians());
    // A chord over the angle a lies radius (1 − cos a/2) from its arc.
    const double widest = radius > tolerance_mm ? 2 * std::acos(1 - tolerance_mm / radius) : k_pi / 2;
    const int count = std::max(1, static_cast<int>(std::ceil(std::min(sweep / widest, 1e6))));
    for (int i = 1; i < count; ++i) {
        points.push_back(on_arc(start, arc, static_cast<double>(i) / count));
    }
    points.push_back(arc.to);
}

void flatten_curve(std::vector<Point>& points, Point start, const CurveTo& curve, double tolerance_mm) {
    const auto bend = [](Point a, Point b, Point c) {
        return std::hypot(a.x_mm - 2 * b.x_mm + c.x_mm, a.y_mm - 2 * b.y_mm + c.y_mm);
    };
    // A chord over a step h of the parameter lies within h²/8 of the greatest second derivative.
    const double greatest =
        6 * std::max(bend(start, curve.control_1, curve.control_2), bend(curve.control_1, curve.control_2, curve.to));
    const double steps = std::ceil(std::sqrt(greatest / (8 * tolerance_mm)));
    const int count = std::max(1, static_cast<int>(std::min(steps, 1e6)));
    for (int i = 1; i < count; ++i) {
        const double t = static_cast<double>(i) / count;
        points.push_back({on_cubic(start.x_mm, curve.control_1.x_mm, curve.control_2.x_mm, curve.to.x_mm, t),
                          on_cubic(start.y_mm, curve.control_1.y_mm, curve.control_2.y_mm, curve.to.y_mm, t)});
    }
    points.push_back(curve.to);
}

} // namespace

void Box::add(Point p) {
    left_mm = std::min(left_mm, p.x_mm);
    right_mm = std::max(right_mm, p.x_mm);
    bottom_mm = std::min(bottom_mm, p.y_mm);
    top_mm = std::max(top_mm, p.y_mm);
}

void Box::add(const Box& other) {
    left_mm = std::min(left_mm, other.left_mm);
    right_mm = std::max(right_mm, other.right_mm);
    bottom_mm = std::min(bottom_mm, other.bottom_mm);
    top_mm = std::max(top_mm, other.top_mm);
}

Box Box::grown(double by_mm) const {
    return empty() ? *this : Box{left_mm - by_mm, bottom_mm - by_mm, right_mm + by_mm, top_mm + by_mm};
}

bool Box::meets(const Box& other) const {
    return !empty() && !other.empty() && left_mm <= other.right_mm && other.left_mm <= right_mm &&
           bottom_mm <= other.top_mm && other.bottom_mm <= top_mm;
}

bool Box::contains(Point p) const {
    return left_mm <= p.x_mm && p.x_mm <= right_mm && bottom_mm <= p.y_mm && p.y_mm <= top_mm;
}

bool Box::contains(const Box& other) const {
    return !other.empty() && left_mm <= other.left_mm && other.right_mm <= right_mm && bottom_mm <= other.bottom_mm &&
           other.top_mm <= top_mm;
}

std::string_view name_of(Layer layer) {
    switch (layer) {
    case Layer::cut:
        return "cut";
    case Layer::engrave:
        return "engrave";
    case Layer::fill:
        return "fill";
    case Layer::drill:
        return "drill";
    case Layer::score:
        return "score";
    case Layer::guide:
        return "guide";
    }
    return "";
}

Point end_of(const Piece& piece) {
    return std::visit([](const auto& any) { return any.to; }, piece);
}

Point end_of(const Path& path) {
    return path.pieces.empty() ? path.start : end_of(path.pieces.back());
}

Box bounds_of(Point start, const Piece& piece) {
    Box box;
    box.add(start);
    if (const auto* arc = std::get_if<ArcTo>(&piece)) {
        add_arc(box, start, *arc);
    } else if (const auto* curve = std::get_if<CurveTo>(&piece)) {
        add_curve(box, start, *curve);
    } else {
        box.add(end_of(piece));
    }
    return box;
}

Box bounds_of(const Path& path) {
    Box box;
    box.add(path.start);
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        box.add(bounds_of(at, piece));
        at = end_of(piece);
    }
    return box;
}

Path polyline(const std::vector<Point>& points, bool closed) {
    Path path;
    if (points.empty()) {
        return path;
    }
    path.start = points.front();
    path.closed = closed;
    path.pieces.reserve(points.size());
    for (std::size_t i = 1; i < points.size(); ++i) {
        path.pieces.emplace_back(LineTo{points[i]});
    }
    if (closed && points.back() != points.front()) {
        path.pieces.emplace_back(LineTo{points.front()});
    }
    return path;
}

Path circle(Point centre, double radius_mm) {
    const Point start{centre.x_mm + radius_mm, centre.y_mm};
    return {start, {ArcTo{start, centre, Angle::radians(2 * k_pi)}}, true};
}

Path rectangle(const Box& box) {
    return polyline({{box.left_mm, box.bottom_mm},
                     {box.right_mm, box.bottom_mm},
                     {box.right_mm, box.top_mm},
                     {box.left_mm, box.top_mm}},
                    true);
}

void flatten(std::vector<Point>& points, Point start, const Piece& piece, double tolerance_mm) {
    if (const auto* arc = std::get_if<ArcTo>(&piece)) {
        flatten_arc(points, start, *arc, tolerance_mm);
    } else if (const auto* curve = std::get_if<CurveTo>(&piece)) {
        flatten_curve(points, start, *curve, tolerance_mm);
    } else {
        points.push_back(end_of(piece));
    }
}

std::vector<Point> flattened(const Path& path, double tolerance_mm) {
    std::vector<Point> points{path.start};
    points.reserve(path.pieces.size() + 1);
    for (const Piece& piece : path.pieces) {
        const Point at = points.back();
        flatten(points, at, piece, tolerance_mm);
    }
    return points;
}

Point point_at(Point start, const ArcTo& arc, double part) {
    return part >= 1.0 ? arc.to : part <= 0.0 ? start : on_arc(start, arc, part);
}

std::vector<CurveTo> curves_of(Point start, const ArcTo& arc) {
    const double sweep = arc.sweep.in_radians();
    const int count = std::max(1, static_cast<int>(std::ceil(std::abs(sweep) / (k_pi / 6) - 1e-9)));
    // A cubic that meets the arc at its ends and in its middle has handles 4/3 tan(a/4) long.
    const double handle = 4.0 / 3.0 * std::tan(sweep / count / 4);
    std::vector<CurveTo> curves;
    curves.reserve(static_cast<std::size_t>(count));
    Point at = start;
    for (int i = 1; i <= count; ++i) {
        const Point to = i == count ? arc.to : on_arc(start, arc, static_cast<double>(i) / count);
        const Point c = arc.centre;
        curves.push_back({{at.x_mm - handle * (at.y_mm - c.y_mm), at.y_mm + handle * (at.x_mm - c.x_mm)},
                          {to.x_mm + handle * (to.y_mm - c.y_mm), to.y_mm - handle * (to.x_mm - c.x_mm)},
                          to});
        at = to;
    }
    return curves;
}

Box bounds_of(const Mark& mark) {
    Box box;
    for (const Path& path : mark.paths) {
        box.add(bounds_of(path));
    }
    return mark.filled ? box : box.grown(mark.width_mm / 2);
}

Box bounds_of(const Drawing& drawing) {
    Box box;
    for (const Mark& mark : drawing.marks) {
        box.add(bounds_of(mark));
    }
    return box;
}

bool is_finite(const Mark& mark) {
    const auto good = [](Point p) { return std::isfinite(p.x_mm) && std::isfinite(p.y_mm); };
    const auto good_piece = [&](const Piece& piece) {
        if (const auto* arc = std::get_if<ArcTo>(&piece)) {
            return good(arc->to) && good(arc->centre) && std::isfinite(arc->sweep.in_radians());
        }
        if (const auto* curve = std::get_if<CurveTo>(&piece)) {
            return good(curve->control_1) && good(curve->control_2) && good(curve->to);
        }
        return good(end_of(piece));
    };
    return std::isfinite(mark.width_mm) && std::all_of(mark.paths.begin(), mark.paths.end(), [&](const Path& path) {
               return good(path.start) && std::all_of(path.pieces.begin(), path.pieces.end(), good_piece);
           });
}

namespace {

/// A placing with its sine and cosine taken once.
struct Placed {
    explicit Placed(const Placing& placing)
        : p{placing}, c{cos(placing.turn)}, s{sin(placing.turn)}, hand{placing.mirrored ? -1.0 : 1.0} {}
    [[nodiscard]] Point operator()(Point q) const {
        const double x = hand * q.x_mm;
        return {p.scale_x * (x * c - q.y_mm * s) + p.shift.x_mm, p.scale_y * (x * s + q.y_mm * c) + p.shift.y_mm};
    }
    [[nodiscard]] CurveTo operator()(const CurveTo& curve) const {
        return {(*this)(curve.control_1), (*this)(curve.control_2), (*this)(curve.to)};
    }
    const Placing& p;
    double c, s, hand;
};

} // namespace

Point Placing::operator()(Point p) const {
    return Placed{*this}(p);
}

Path Placing::operator()(const Path& path) const {
    const Placed place{*this};
    const bool arcs_stay = scale_x == scale_y;
    Path placed;
    placed.start = place(path.start);
    placed.closed = path.closed;
    placed.pieces.reserve(path.pieces.size());
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        if (const auto* arc = std::get_if<ArcTo>(&piece)) {
            if (arcs_stay) {
                placed.pieces.emplace_back(
                    ArcTo{place(arc->to), place(arc->centre), mirrored ? -arc->sweep : arc->sweep});
            } else {
                for (const CurveTo& curve : curves_of(at, *arc)) {
                    placed.pieces.emplace_back(place(curve));
                }
            }
        } else if (const auto* curve = std::get_if<CurveTo>(&piece)) {
            placed.pieces.emplace_back(place(*curve));
        } else {
            placed.pieces.emplace_back(LineTo{place(end_of(piece))});
        }
        at = end_of(piece);
    }
    return placed;
}

Mark Placing::operator()(const Mark& mark) const {
    Mark placed{mark.layer, {}, mark.width_mm * std::sqrt(scale_x * scale_y), mark.filled, mark.name};
    placed.paths.reserve(mark.paths.size());
    for (const Path& path : mark.paths) {
        placed.paths.push_back((*this)(path));
    }
    return placed;
}

} // namespace dialwright::layout
