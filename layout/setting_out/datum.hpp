// SPDX-License-Identifier: MIT
#pragma once

#include "layout/plate/outline.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// Where a point of a border is, for a rule laid along it.
struct BorderPlace {
    std::string side;      ///< "top edge", "side BC", "edge" of a round plate
    std::string from;      ///< "upper left corner", "corner B", "top mark"
    std::string way;       ///< on a round border "left" or "right" of the mark
    double along_mm = 0.0; ///< along the side; on a round border straight across (the chord that dividers take)
};

/// "top edge 214.3 mm from the upper left corner"; "edge 96.0 mm left of the top mark, straight across".
[[nodiscard]] std::string say_place(const BorderPlace& place, bool inches);

/// A border with the names that a mason measures by: on an upright rectangle its sides and corners, on another polygon
/// letters clockwise from the corner at the lower left, on a round border its top mark. Points are as the reader sees the plate.
class Datum {
  public:
    /// @param what  "edge" or "border"
    Datum(Outline border, std::string what);

    [[nodiscard]] const Outline& border() const { return border_; }
    /// From which x and y are measured: a corner, or the middle of a round border.
    [[nodiscard]] Point origin() const { return marks_.front().at; }
    [[nodiscard]] const std::string& name_of_origin() const { return marks_.front().name; }

    /// @param p  on the border
    [[nodiscard]] BorderPlace place_of(Point p) const;
    /// Two marks, well apart, from which a point is found by two distances.
    struct NamedPoint {
        std::string name;
        Point at;
    };
    [[nodiscard]] std::vector<NamedPoint> pair_of_marks() const;
    /// Sentences that prove the border itself: its diagonals, its width and height.
    [[nodiscard]] std::vector<std::string> checks(bool inches) const;

  private:
    void name_corners();
    Outline border_;
    std::string what_;
    bool upright_rectangle_ = false;
    std::vector<Point> corners_;    ///< clockwise from the lower left one
    std::vector<NamedPoint> marks_; ///< the origin first, then the border's corners or marks
};

} // namespace dialwright::layout
