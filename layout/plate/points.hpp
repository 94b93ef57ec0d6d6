// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <cmath>

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
    return std::hypot(p.x_mm, p.y_mm);
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
/// The unit vector at a direction that runs clockwise from +y, as directions on a plate do.
[[nodiscard]] inline Point clockwise_from_up(Angle direction) {
    return {sin(direction), cos(direction)};
}
/// Anticlockwise from +x.
[[nodiscard]] inline Angle turn_of(Point p) {
    return arc_tangent(p.y_mm, p.x_mm);
}

} // namespace dialwright::layout
