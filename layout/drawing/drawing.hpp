// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"

#include <string>
#include <string_view>
#include <variant>
#include <vector>

namespace dialwright::layout {

/// A point of a drawing or of a page: millimetres, x to the right, y up.
struct Point {
    double x_mm = 0.0;
    double y_mm = 0.0;
    friend constexpr bool operator==(const Point&, const Point&) = default;
};

/// An upright box; empty until something is added.
struct Box {
    double left_mm = 1e300, bottom_mm = 1e300, right_mm = -1e300, top_mm = -1e300;

    [[nodiscard]] bool empty() const { return left_mm > right_mm || bottom_mm > top_mm; }
    [[nodiscard]] double width_mm() const { return empty() ? 0.0 : right_mm - left_mm; }
    [[nodiscard]] double height_mm() const { return empty() ? 0.0 : top_mm - bottom_mm; }
    [[nodiscard]] Point middle() const { return {(left_mm + right_mm) / 2, (bottom_mm + top_mm) / 2}; }
    void add(Point p);
    void add(const Box& other);
    [[nodiscard]] Box grown(double by_mm) const;
    [[nodiscard]] bool meets(const Box& other) const;
    [[nodiscard]] bool contains(Point p) const;
    [[nodiscard]] bool contains(const Box& other) const;
};

/// What happens to a mark in the workshop. `guide` marks are looked at and never cut.
enum class Layer { cut, engrave, fill, drill, score, guide };
inline constexpr Layer k_layers[] = {Layer::cut, Layer::engrave, Layer::fill, Layer::drill, Layer::score, Layer::guide};
[[nodiscard]] std::string_view name_of(Layer layer);

struct LineTo {
    Point to;
};
/// Round `centre` through `sweep` (anticlockwise positive, up to a full turn) to `to`, which is stored so that ends
/// that meet are the same number.
struct ArcTo {
    Point to;
    Point centre;
    Angle sweep;
};
/// A cubic Bézier curve.
struct CurveTo {
    Point control_1, control_2, to;
};
using Piece = std::variant<LineTo, ArcTo, CurveTo>;

/// A run of lines, arcs and curves. A closed path ends where it starts (its last piece says so).
struct Path {
    Point start;
    std::vector<Piece> pieces;
    bool closed = false;
};

[[nodiscard]] Point end_of(const Piece& piece);
[[nodiscard]] Point end_of(const Path& path);
/// The exact box of the line, without the width of the stroke: of a piece that begins at `start`, of a path.
[[nodiscard]] Box bounds_of(Point start, const Piece& piece);
[[nodiscard]] Box bounds_of(const Path& path);
[[nodiscard]] Path polyline(const std::vector<Point>& points, bool closed = false);
[[nodiscard]] Path circle(Point centre, double radius_mm);
[[nodiscard]] Path rectangle(const Box& box);
/// Points along the path, its ends included, no farther from it than `tolerance_mm` (> 0).
[[nodiscard]] std::vector<Point> flattened(const Path& path, double tolerance_mm);
/// The same for one piece: its points after `start` are added to `points`.
void flatten(std::vector<Point>& points, Point start, const Piece& piece, double tolerance_mm);
/// The point after a part (0 to 1) of an arc that begins at `start`.
[[nodiscard]] Point point_at(Point start, const ArcTo& arc, double part);
/// The arc as cubics of at most 30°. Accuracy: 4e-7 of the radius (0.0004 mm at 1 m).
[[nodiscard]] std::vector<CurveTo> curves_of(Point start, const ArcTo& arc);

/// A stroke of a width, or a filled shape (non-zero winding over all its paths).
struct Mark {
    Layer layer = Layer::engrave;
    std::vector<Path> paths;
    double width_mm = 0.3; ///< of the stroke; not used when filled
    bool filled = false;
    std::string name; ///< what it is, for people and for layers in files: "hour line XI", "motto"
};

/// Everything on one piece of work, in millimetres of the work. Knows nothing of dials or of paper.
struct Drawing {
    std::string name;
    std::vector<Mark> marks;
};
/// Box of all marks, widths of strokes included.
[[nodiscard]] Box bounds_of(const Mark& mark);
[[nodiscard]] Box bounds_of(const Drawing& drawing);

/// Whether all its numbers are numbers. Boxes do not tell: what is no number falls through every comparison.
[[nodiscard]] bool is_finite(const Mark& mark);

/// A placing of a drawing on a page: mirror (x → −x) if asked, turn, scale along the page, shift, in this order.
struct Placing {
    Angle turn;
    Point shift;
    double scale_x = 1.0, scale_y = 1.0; ///< along the page's x and y, after the turn
    bool mirrored = false;
    [[nodiscard]] Point operator()(Point p) const;
    [[nodiscard]] Path operator()(const Path& path) const; ///< arcs stay arcs where both scales are equal, else curves
    [[nodiscard]] Mark operator()(const Mark& mark) const; ///< the stroke's width by the mean of both scales
};

} // namespace dialwright::layout
