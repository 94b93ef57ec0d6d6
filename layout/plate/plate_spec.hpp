// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"

#include <optional>
#include <string>
#include <vector>

namespace dialwright::layout {

/// What the maker says of the plate, apart from what the Sun draws on it. Lengths are millimetres.

enum class PlateShape { round, oval, rectangle, octagon, polygon };
struct PlatePointMm {
    double right_mm = 0.0, up_mm = 0.0;
};
struct Plate {
    PlateShape shape = PlateShape::round;
    double width_mm = 0.0, height_mm = 0.0; ///< round: both the diameter; octagon: both across flats
    std::vector<PlatePointMm> corners;      ///< polygon, any turn, from the maker's own origin
    std::optional<PlatePointMm> centre;     ///< where the dial's centre (or the nodus' foot where there is none) stands
                                            ///< from the middle of the plate's box
    std::string material;
    double thickness_mm = 0.0; ///< 0: not known
};

struct Borders {
    double margin_mm = 0.0;       ///< plate's edge to the outer border
    double chapter_ring_mm = 0.0; ///< between outer and inner line of the ring that holds the numerals
    double inner_mm = 0.0;        ///< radius of the border round the centre at which lines stop
};

/// What throws the shadow.
enum class GnomonKind {
    edge,        ///< a plate of metal whose top edge is the style
    rod,         ///< a round rod along the style
    pin,         ///< square on the plate; its tip is the nodus
    upright_pin, ///< plumb; its tip is the nodus
    disc         ///< a pierced disc; its hole is the nodus and throws a spot
};
/// Pins and discs throw no style's shadow: hour lines then run no farther than the nodus' own shadow does.
[[nodiscard]] constexpr bool has_style(GnomonKind kind) {
    return kind == GnomonKind::edge || kind == GnomonKind::rod;
}

/// What on the gnomon throws the point that the date lines are read by.
enum class NodusKind { notch, ball, tip, hole };

struct Gnomon {
    GnomonKind kind = GnomonKind::edge;
    NodusKind nodus = NodusKind::notch;
    std::optional<double> nodus_height_mm;
    double thickness_mm = 0.0;
    std::optional<double> foot_mm;          ///< length of the foot along the substyle, from the centre
    JointOptions joint{FootKind::plain, 0}; ///< of an edge; its count is that of holes or tenons
    double rounding_mm = 3.0; ///< of an edge's tip and corners; a pin's tip is a half round unless it is 0
    double ball_mm = 0.0;     ///< diameter of the ball at the nodus; 0: found
    double socket_mm = 0.0;   ///< of a rod or a pin, along it in the plate; 0: found
    double strut_mm = 0.0;    ///< where a strut holds the rod, along the substyle; 0: none
};

enum class Numerals { roman, roman_iiii, arabic };
enum class NumeralStand { along_border, upright };
struct LetteringChoice {
    std::string family = "EB Garamond";
    double numeral_height_mm = 0.0; ///< capitals
    double label_height_mm = 0.0;
    std::string motto;
    double motto_height_mm = 0.0;
    std::string place_line; ///< empty: none
    bool legend = true;     ///< lines that tell families' figures apart, where there are several
};

/// What the lines are cut with.
enum class Tool {
    any,      ///< not said: nothing is checked against it
    v_cutter, ///< a pointed cutter that turns: width = flat + 2 · depth · tan(angle / 2)
    end_mill,
    laser,
    chisel ///< by hand: the line is a V of the chisel's own angle
};

struct Cutting {
    Tool tool = Tool::any;
    Angle point_angle;           ///< between the two sides of a V
    double depth_mm = 0.0;       ///< of the lines
    double flat_mm = 0.0;        ///< at a V cutter's point
    double diameter_mm = 0.0;    ///< of an end mill or a laser's spot
    bool single_strokes = false; ///< lettering for an engraving point, in place of outlines
    double line_width_mm = 0.4;  ///< the tool's own line: hour lines; finer ones are never thinner than half of it
    double least_gap_mm = 0.8;   ///< clear material between two lines
};

/// Widths that the maker names for families of lines; 0: by the order of weight.
struct LineWidths {
    double hours_mm = 0.0, dates_mm = 0.0, altitudes_mm = 0.0, azimuths_mm = 0.0, noons_mm = 0.0;
    std::vector<double> more_hours_mm; ///< beside the plan's more_hours
};

} // namespace dialwright::layout
