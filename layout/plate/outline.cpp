// SPDX-License-Identifier: MIT
#include "layout/plate/outline.hpp"

#include "layout/plate/points.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <polyclipping/clipper.hpp>
#include <stdexcept>

namespace dialwright::layout {
namespace {

double doubled_area(const std::vector<Point>& corners) {
    double sum = 0;
    for (std::size_t i = 0; i < corners.size(); ++i)
        sum += cross(corners[i], corners[(i + 1) % corners.size()]);
    return sum;
}

/// An ellipse as so many sides that none leaves it by more than 2 µm.
std::vector<Point> oval(double half_width_mm, double half_height_mm) {
    constexpr double k_sagitta_mm = 0.002;
    const double largest = std::max(half_width_mm, half_height_mm);
    const int quarter = std::max(32, int(std::ceil(std::numbers::pi / 4 / std::acos(1 - k_sagitta_mm / largest))));
    std::vector<Point> corners;
    for (int i = 0; i < 4 * quarter; ++i) {
        const double turn = i * std::numbers::pi / (2 * quarter);
        corners.push_back({half_width_mm * std::cos(turn), half_height_mm * std::sin(turn)});
    }
    return corners;
}

std::vector<Point> octagon(double across_mm) {
    const double radius = across_mm / 2 / std::cos(std::numbers::pi / 8);
    std::vector<Point> corners;
    for (int i = 0; i < 8; ++i) {
        const double turn = (i + 0.5) * std::numbers::pi / 4;
        corners.push_back({radius * std::cos(turn), radius * std::sin(turn)});
    }
    return corners;
}

} // namespace

Outline Outline::round(Point centre, double radius_mm) {
    Outline made;
    made.centre_ = centre;
    made.radius_mm_ = radius_mm;
    return made;
}

Outline Outline::polygon(std::vector<Point> corners) {
    if (corners.size() < 3)
        throw std::invalid_argument("a polygon has at least three corners");
    if (doubled_area(corners) < 0)
        std::reverse(corners.begin(), corners.end());
    Outline made;
    made.corners_ = std::move(corners);
    made.centre_ = made.box().middle();
    return made;
}

Outline Outline::of(const Plate& plate) {
    const double w = plate.width_mm / 2, h = plate.height_mm / 2;
    switch (plate.shape) {
    case PlateShape::round:
        return round({}, w);
    case PlateShape::oval:
        return polygon(oval(w, h));
    case PlateShape::rectangle:
        return polygon({{-w, -h}, {w, -h}, {w, h}, {-w, h}});
    case PlateShape::octagon:
        return polygon(octagon(plate.width_mm));
    case PlateShape::polygon:
        break;
    }
    std::vector<Point> corners;
    Box box;
    for (const PlatePointMm& corner : plate.corners) {
        corners.push_back({corner.right_mm, corner.up_mm});
        box.add(corners.back());
    }
    for (Point& corner : corners)
        corner = corner - box.middle();
    return polygon(std::move(corners));
}

Box Outline::box() const {
    if (is_round())
        return Box{centre_.x_mm - radius_mm_, centre_.y_mm - radius_mm_, centre_.x_mm + radius_mm_,
                   centre_.y_mm + radius_mm_};
    Box box;
    for (const Point& corner : corners_)
        box.add(corner);
    return box;
}

bool Outline::contains(Point p) const {
    if (is_round())
        return distance(p, centre_) <= radius_mm_;
    bool inside = false;
    for (std::size_t i = 0, j = corners_.size() - 1; i < corners_.size(); j = i++) {
        const Point& a = corners_[i];
        const Point& b = corners_[j];
        if ((a.y_mm > p.y_mm) != (b.y_mm > p.y_mm) &&
            p.x_mm < (b.x_mm - a.x_mm) * (p.y_mm - a.y_mm) / (b.y_mm - a.y_mm) + a.x_mm)
            inside = !inside;
    }
    return inside;
}

double Outline::distance_mm(Point p) const {
    if (is_round())
        return std::abs(distance(p, centre_) - radius_mm_);
    double best = 1e300;
    for (std::size_t i = 0; i < corners_.size(); ++i)
        best = std::min(best, distance_to_side(p, corners_[i], corners_[(i + 1) % corners_.size()]));
    return best;
}

Path Outline::path() const {
    return is_round() ? circle(centre_, radius_mm_) : polyline(corners_, true);
}

std::optional<Outline> Outline::inset(double by_mm) const {
    if (by_mm == 0)
        return *this;
    if (is_round())
        return radius_mm_ > by_mm ? std::optional{round(centre_, radius_mm_ - by_mm)} : std::nullopt;
    constexpr double k_scale = 1e6; // Clipper works in whole numbers: nanometres
    ClipperLib::Path ring;
    for (const Point& corner : corners_)
        ring.emplace_back(std::llround(corner.x_mm * k_scale), std::llround(corner.y_mm * k_scale));
    ClipperLib::ClipperOffset offset{/*MiterLimit*/ 20.0};
    offset.AddPath(ring, ClipperLib::jtMiter, ClipperLib::etClosedPolygon);
    ClipperLib::Paths made;
    offset.Execute(made, -by_mm * k_scale);
    const auto largest = std::max_element(made.begin(), made.end(), [](const auto& a, const auto& b) {
        return std::abs(ClipperLib::Area(a)) < std::abs(ClipperLib::Area(b));
    });
    if (largest == made.end() || largest->size() < 3)
        return std::nullopt;
    std::vector<Point> corners;
    for (const ClipperLib::IntPoint& p : *largest)
        corners.push_back({double(p.X) / k_scale, double(p.Y) / k_scale});
    return polygon(std::move(corners));
}

void Outline::crossings(Point a, Point b, std::vector<double>& t) const {
    const Point d = b - a;
    const auto take = [&](double at) {
        if (at > 0 && at < 1)
            t.push_back(at);
    };
    if (is_round()) {
        const Point from = a - centre_;
        const double qa = dot(d, d), qb = dot(from, d), qc = dot(from, from) - radius_mm_ * radius_mm_;
        const double under_root = qb * qb - qa * qc;
        if (qa <= 0 || under_root <= 0)
            return;
        const double root = std::sqrt(under_root);
        take((-qb - root) / qa);
        take((-qb + root) / qa);
        return;
    }
    for (std::size_t i = 0; i < corners_.size(); ++i) {
        const Point p = corners_[i], side = corners_[(i + 1) % corners_.size()] - p;
        const double turn = cross(d, side);
        if (turn == 0)
            continue;
        const double on_side = cross(p - a, d) / turn;
        if (on_side >= 0 && on_side <= 1)
            take(cross(p - a, side) / turn);
    }
}

std::optional<Outline::Exit> Outline::exit(Point from, Point direction) const {
    const Box reach = box();
    const double far = 2 * (reach.width_mm() + reach.height_mm()) + distance(from, centre_);
    const Point end = from + far * unit(direction);
    std::vector<double> t;
    crossings(from, end, t);
    if (t.empty())
        return std::nullopt;
    const Point at = between(from, end, *std::max_element(t.begin(), t.end()));
    if (is_round())
        return Exit{at, (1 / radius_mm_) * (at - centre_)};
    // The side nearest to the point has its normal to the right of its run.
    Exit best{at, {}};
    double nearest = 1e300;
    for (std::size_t i = 0; i < corners_.size(); ++i) {
        const Point p = corners_[i], next = corners_[(i + 1) % corners_.size()];
        if (const double off = distance_to_side(at, p, next); off < nearest) {
            nearest = off;
            best.normal = right_of(unit(next - p));
        }
    }
    return best;
}

bool Region::contains(Point p) const {
    return std::all_of(inside.begin(), inside.end(), [&](const Outline& o) { return o.contains(p); }) &&
           std::none_of(outside.begin(), outside.end(), [&](const Outline& o) { return o.contains(p); });
}

std::vector<Polyline> clipped(const Polyline& line, const Region& region) {
    Box reach;
    for (const Point& p : line)
        reach.add(p);
    std::vector<const Outline*> outlines; // those that the line can meet
    Region near;
    near.inside = region.inside;
    for (const Outline& outline : region.outside)
        if (outline.box().meets(reach))
            near.outside.push_back(outline);
    for (const auto* list : {&near.inside, &near.outside})
        for (const Outline& outline : *list)
            outlines.push_back(&outline);

    std::vector<Polyline> kept;
    std::vector<double> t;
    bool drawing = false;
    for (std::size_t i = 0; i + 1 < line.size(); ++i) {
        const Point a = line[i], b = line[i + 1];
        t.assign({0.0, 1.0});
        for (const Outline* outline : outlines)
            outline->crossings(a, b, t);
        std::sort(t.begin(), t.end());
        for (std::size_t k = 0; k + 1 < t.size(); ++k) {
            if (t[k + 1] - t[k] < 1e-12)
                continue;
            if (!near.contains(between(a, b, (t[k] + t[k + 1]) / 2))) {
                drawing = false;
                continue;
            }
            if (!drawing)
                kept.push_back({t[k] == 0 ? a : between(a, b, t[k])});
            const Point end = t[k + 1] == 1 ? b : between(a, b, t[k + 1]);
            // Several crossings on one straight stretch must not leave corners in it.
            if (drawing && k > 0 && t[k] > 0)
                kept.back().back() = end;
            else
                kept.back().push_back(end);
            drawing = true;
        }
    }
    std::erase_if(kept, [](const Polyline& piece) { return length_mm(piece) < 1e-6; });
    return kept;
}

double length_mm(const Polyline& line) {
    double sum = 0;
    for (std::size_t i = 0; i + 1 < line.size(); ++i)
        sum += distance(line[i], line[i + 1]);
    return sum;
}

} // namespace dialwright::layout
