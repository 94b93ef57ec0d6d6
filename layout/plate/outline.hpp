// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"
#include "layout/plate/plate_spec.hpp"

#include <functional>
#include <optional>
#include <vector>

namespace dialwright::layout {

using Polyline = std::vector<Point>;

/// A closed border: a circle, or a polygon with its corners anticlockwise. Work frame: millimetres from the middle of
/// the plate's box, x right, y up, as the reader of the plate frame sees it.
class Outline {
  public:
    static Outline round(Point centre, double radius_mm);
    /// @param corners  three or more, either way round, not crossing
    static Outline polygon(std::vector<Point> corners);
    /// The plate's edge. A polygon is shifted so that the middle of its box is the origin.
    static Outline of(const Plate& plate);

    [[nodiscard]] bool is_round() const { return corners_.empty(); }
    [[nodiscard]] Point centre() const { return centre_; }
    [[nodiscard]] double radius_mm() const { return radius_mm_; }
    [[nodiscard]] const std::vector<Point>& corners() const { return corners_; }

    [[nodiscard]] Box box() const;
    [[nodiscard]] bool contains(Point p) const;
    /// Distance to the border, either side.
    [[nodiscard]] double distance_mm(Point p) const;
    [[nodiscard]] Path path() const;

    /// The border that runs `by_mm` inside this one, corners mitred; of several parts the largest.
    /// @return nothing if no part is left
    [[nodiscard]] std::optional<Outline> inset(double by_mm) const;

    /// Parameters t in (0, 1) at which a + t (b − a) crosses the border.
    void crossings(Point a, Point b, std::vector<double>& t) const;

    /// Where a ray from inside leaves the border for the last time, and the border's outward normal there.
    struct Exit {
        Point at;
        Point normal; ///< unit
    };
    [[nodiscard]] std::optional<Exit> exit(Point from, Point direction) const;

  private:
    Point centre_;
    double radius_mm_ = 0.0;
    std::vector<Point> corners_;
};

/// Where lines may be drawn: inside every outline of `inside`, outside every one of `outside`.
struct Region {
    std::vector<Outline> inside, outside;
    [[nodiscard]] bool contains(Point p) const;
};

/// The parts of a line in a region, in the line's order. Ends lie on the borders within 1e-9 mm.
[[nodiscard]] std::vector<Polyline> clipped(const Polyline& line, const Region& region);

[[nodiscard]] double length_mm(const Polyline& line);

} // namespace dialwright::layout
