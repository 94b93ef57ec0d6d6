// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

namespace dialwright::layout {

[[nodiscard]] constexpr Point operator+(Point a, Point b) {
    return {a.x_mm + b.x_mm, a.y_mm + b.y_mm};
}
[[nodiscard]] constexpr Point operator-(Point a, Point b) {
    return {a.x_mm - b.x_mm, a.y_mm - b.y_mm};
}
[[nodiscard]] constexpr Point operator*(double k, Point p) {
    return {k * p.x_mm, k * p.y_mm};
}
[[nodiscard]] constexpr double dot(Point a, Point b) {
    return a.x_mm * b.x_mm + a.y_mm * b.y_mm;
}
/// Positive where b lies anticlockwise of a.
[[nodiscard]] constexpr double cross(Point a, Point b) {
    return a.x_mm * b.y_mm - a.y_mm * b.x_mm;
}
[[nodiscard]] inline double length(Point p) {
    return std::sqrt(p.x_mm * p.x_mm + p.y_mm * p.y_mm); // plates are far from where this loses figures
}
[[nodiscard]] inline double distance(Point a, Point b) {
    return length(b - a);
}
[[nodiscard]] constexpr Point between(Point a, Point b, double part) {
    return a + part * (b - a);
}
[[nodiscard]] inline Point unit(Point p) {
    return (1.0 / length(p)) * p;
}
/// A quarter turn anticlockwise.
[[nodiscard]] constexpr Point left_of(Point p) {
    return {-p.y_mm, p.x_mm};
}
/// A quarter turn clockwise.
[[nodiscard]] constexpr Point right_of(Point p) {
    return {p.y_mm, -p.x_mm};
}
/// From a point to the stretch from a to b.
[[nodiscard]] inline double distance_to_side(Point p, Point a, Point b) {
    const Point run = b - a;
    const double square = dot(run, run);
    return distance(p, square > 0 ? a + std::clamp(dot(p - a, run) / square, 0.0, 1.0) * run : a);
}
/// From a point to a line of two points or more.
[[nodiscard]] inline double distance_to(Point p, const std::vector<Point>& line) {
    double least = 1e300;
    for (std::size_t i = 0; i + 1 < line.size(); ++i)
        least = std::min(least, distance_to_side(p, line[i], line[i + 1]));
    return least;
}
/// The unit vector at a direction that runs clockwise from +y, as directions on a plate do.
[[nodiscard]] inline Point clockwise_from_up(Angle direction) {
    return {sin(direction), cos(direction)};
}
/// Anticlockwise from +x.
[[nodiscard]] inline Angle turn_of(Point p) {
    return arc_tangent(p.y_mm, p.x_mm);
}

} // namespace dialwright::layout
