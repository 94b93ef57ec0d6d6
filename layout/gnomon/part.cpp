// SPDX-License-Identifier: MIT
#include "layout/gnomon/part.hpp"

#include "layout/plate/points.hpp"

#include <algorithm>
#include <numbers>

namespace dialwright::layout {

void Pen::line_to(Point to) {
    if (to == at_)
        return;
    path_.pieces.emplace_back(LineTo{to});
    at_ = to;
}

void Pen::arc_to(Point to, Point centre, bool anticlockwise) {
    const double turn = std::atan2(cross(at_ - centre, to - centre), dot(at_ - centre, to - centre));
    const double whole = 2 * std::numbers::pi;
    const double sweep = anticlockwise ? (turn > 0 ? turn : turn + whole) : (turn < 0 ? turn : turn - whole);
    path_.pieces.emplace_back(ArcTo{to, centre, Angle::radians(sweep)});
    at_ = to;
}

void Pen::round_corner(Point corner, Point next, double radius_mm) {
    const Point in = corner - at_, out = next - corner;
    const double turn = std::atan2(cross(in, out), dot(in, out));
    const double tangent =
        std::tan(std::abs(turn) / 2); // of half the turn: from the corner to where the arc begins, over the radius
    if (!(radius_mm > 0) || tangent < 1e-9)
        return line_to(corner);
    const double trim = std::min({radius_mm * tangent, length(in), length(out) / 2});
    const double radius = trim / tangent;
    const Point begin = corner - trim * unit(in), end = corner + trim * unit(out);
    const Point centre = begin + (turn > 0 ? radius : -radius) * left_of(unit(in));
    if (distance(begin, at_) > 1e-9)
        line_to(begin);
    arc_to(end, centre, turn > 0);
}

Path Pen::closed() {
    line_to(path_.start);
    path_.closed = true;
    return path_;
}

Path rounded_polygon(const std::vector<Corner>& corners) {
    // From the middle of the last side, so that every corner has half a side each way.
    const std::size_t n = corners.size();
    const Point start = between(corners[n - 1].at, corners[0].at, 0.5);
    Pen pen{start};
    for (std::size_t i = 0; i < n; ++i) {
        const Point corner = corners[i].at, next = corners[(i + 1) % n].at, before = corners[(i + n - 1) % n].at;
        const Point in = corner - before, out = next - corner;
        const double tangent = std::tan(std::abs(std::atan2(cross(in, out), dot(in, out))) / 2);
        const double most = std::min(length(in), length(out)) / 2;
        pen.round_corner(corner, next, std::min(corners[i].radius_mm, tangent > 0 ? most / tangent : 0.0));
    }
    return pen.closed();
}

Path bar_outline(Point from, Point to, double diameter_mm, bool round_from, bool round_to) {
    const double r = diameter_mm / 2;
    const Point along = unit(to - from), side = r * left_of(along);
    const Point first = round_from ? from + r * along : from, last = round_to ? to - r * along : to;
    Pen pen{first - side};
    pen.line_to(last - side);
    if (round_to)
        pen.arc_to(last + side, last, true);
    else
        pen.line_to(last + side);
    pen.line_to(first + side);
    if (round_from)
        pen.arc_to(first - side, first, true);
    return pen.closed();
}

Mark dimension(Point from, Point to, std::string name) {
    const Point across = 1.5 * left_of(unit(to - from));
    return {Layer::guide,
            {polyline({from, to}), polyline({from - across, from + across}), polyline({to - across, to + across})},
            k_thin_mm,
            false,
            std::move(name)};
}

Mark cross_mark(Layer layer, Point at, double arm_mm, std::string name) {
    const Point x{arm_mm, 0}, y{0, arm_mm};
    return {layer, {polyline({at - x, at + x}), polyline({at - y, at + y})}, k_thin_mm, false, std::move(name)};
}

void add_hole(std::vector<Mark>& marks, Point at, double diameter_mm, const std::string& name) {
    marks.push_back({Layer::drill, {circle(at, diameter_mm / 2)}, k_thin_mm, false, name});
    marks.push_back(cross_mark(Layer::drill, at, 0.9 * diameter_mm, name + " centre"));
}

} // namespace dialwright::layout
