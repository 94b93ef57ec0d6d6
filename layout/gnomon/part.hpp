// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <string>
#include <utility>
#include <vector>

namespace dialwright::layout {

/// One piece of the gnomon, or a tool to make or check it, at full scale. Side views have x along the substyle from the
/// start of the gnomon's foot and y above the plate's face; the plate's own marks are in the seat frame (seat.hpp).
struct Part {
    std::string title;             ///< "The gnomon", for its sheet
    std::vector<Drawing> drawings; ///< the first is the part; then what belongs to it
    bool from_sheet = false;       ///< its cut lines are outlines for a machine; else they are the sides of solid work
    std::vector<Mark> plate_marks; ///< slots and holes that the plate gets for it: seat frame
    std::vector<std::pair<std::string, std::string>> particulars; ///< name and value, for the sheet's table
    std::vector<std::string> cautions;
    std::vector<std::string> notes; ///< how to make and fit it
};

/// Follows an outline with lines and with arcs that touch them.
class Pen {
  public:
    explicit Pen(Point start) : path_{start, {}, false}, at_{start} {}

    [[nodiscard]] Point at() const { return at_; }
    void line_to(Point to); ///< nothing where the pen stands there already
    /// Round `centre` from where the pen stands; the end is taken as given.
    void arc_to(Point to, Point centre, bool anticlockwise);
    /// Towards `corner`, and round it with an arc that touches both ways. Where they have no room, the arc is smaller:
    /// it takes at most all of the way to the corner and half of the way on to `next`.
    void round_corner(Point corner, Point next, double radius_mm);
    /// Back to the start.
    [[nodiscard]] Path closed();

  private:
    Path path_;
    Point at_;
};

struct Corner {
    Point at;
    double radius_mm = 0.0;
};
/// A closed outline with rounded corners; at most half of each side goes into an arc.
[[nodiscard]] Path rounded_polygon(const std::vector<Corner>& corners);

/// The side of a round bar between the ends of its axis, either end flat or a half round that ends there.
[[nodiscard]] Path bar_outline(Point from, Point to, double diameter_mm, bool round_from, bool round_to);

/// A line between two points with a short stroke across each end, on the guide layer.
[[nodiscard]] Mark dimension(Point from, Point to, std::string name);
/// A cross on a layer.
[[nodiscard]] Mark cross_mark(Layer layer, Point at, double arm_mm, std::string name);
/// A drilled hole seen from above: its circle, and a cross through its centre on the same layer.
void add_hole(std::vector<Mark>& marks, Point at, double diameter_mm, const std::string& name);

inline constexpr double k_thin_mm = 0.15; ///< width of what is only looked at
inline constexpr double k_cut_mm = 0.2;

} // namespace dialwright::layout
