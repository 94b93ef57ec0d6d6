// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"

namespace dialwright::layout {

/// A round rod whose axis is the style. Frame as an edge gnomon's: x along the substyle from the start of the seat, y above
/// the face. Where the axis meets the face at the start, the rod stands in a socket; where it passes above, because the
/// centre is off the plate, it stands on two struts. Lengths in millimetres; 0 where the program is to find them.
struct RodPlan {
    Angle style_height;
    double nodus_height_mm = 0.0, nodus_along_mm = 0.0;
    double diameter_mm = 0.0, plate_thickness_mm = 0.0;
    double exposed_mm =
        0.0;              ///< from the face (or the lower end) to the tip along the axis; found: the tip is the nodus
    double bead_mm = 0.0; ///< diameter of a bead that shows the nodus; 0: the tip does
    double socket_mm =
        0.0; ///< along the axis; found: five diameters, or right through where those would break out behind
    double strut_at_mm = 0.0; ///< along the substyle, of a strut beside the socket; 0: none
    double strut_diameter_mm = 0.0, strut_embedment_mm = 0.0;
    double jig_width_mm = 0.0, jig_guide_mm = 0.0; ///< of the drilling jig: across, and the drill's way through it
    bool inches = false;
};

struct Strut {
    double along_mm = 0.0; ///< where it stands on the substyle
    Point meets;           ///< the rod's axis
    double above_mm = 0.0; ///< from the face to the rod's underside, on its own axis
    double embedment_mm = 0.0;
};

struct RodGnomon {
    Part part; ///< drawings: "gnomon rod" with its struts; with a socket also "drilling jig"
    double exposed_mm = 0.0, socket_mm = 0.0, length_mm = 0.0; ///< length: both, as the rod is cut
    Point nodus;
    std::vector<Strut> struts;
};

/// @throws GnomonError  with a message for the maker: a rod that ends before its nodus, a socket deeper than the
///                                plate, a style too flat for a socket, …
[[nodiscard]] RodGnomon rod_gnomon(const RodPlan& plan);

/// A wedge block that stands on the substyle and leads the drill into the plate at the style height: its side (bore and
/// drill's axis through the origin), and below it the footprint with its centre line and the bore's mouth.
[[nodiscard]] Drawing drilling_jig(Angle style_height, double diameter_mm, double width_mm, double guide_mm);

} // namespace dialwright::layout
