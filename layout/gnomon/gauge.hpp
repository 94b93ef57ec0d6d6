// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"

namespace dialwright::layout {

/// A set-square that proves an angle on the work. Lengths in millimetres; 0 where the program is to find them.
struct GaugePlan {
    Angle angle;
    std::string words = "style height"; ///< written under the angle
    double edge_mm = 0.0; ///< length of the edge at the angle; found: 120 mm, or more until it rises 30 mm
    double under_mm =
        0.0; ///< by which the edge runs below the angle's own line, square to it: half of a rod's diameter
    double letter_mm = 7.0; ///< capitals of the angle; smaller where it has no room
    std::string family = "EB Garamond";
    double rounding_mm = 2.0;
    bool inches = false;
};

/// Frame: the angle's corner (the dial's centre) at the origin, the base along x, which stands on the face along the
/// substyle. The thin toe is cut off, so that it clears the joint at the centre and does not break.
struct Gauge {
    Part part;                ///< drawing: "gauge"
    Point edge_from, edge_to; ///< of the straight edge that proves the angle, before its corners are rounded
};

/// @throws GnomonError  an angle outside 1° to 89°, or a gauge too small for its lettering
/// @throws LetteringError
[[nodiscard]] Gauge gauge_of(const GaugePlan& plan);

/// For a plate whose substyle is not its noon line: lies on the face, base along the noon line, edge along the substyle.
/// @param from_noon  turn from the noon line to the substyle, clockwise positive as the reader sees it; the gauge is
///                   turned over for a turn the other way, and its words say which
/// @return as gauge_of; throws where the turn is under 1° or over 89°, either way
[[nodiscard]] Gauge substyle_gauge(Angle from_noon, GaugePlan plan);

} // namespace dialwright::layout
