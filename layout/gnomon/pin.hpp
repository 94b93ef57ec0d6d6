// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"

namespace dialwright::layout {

/// A pin whose tip is the nodus. Lengths in millimetres; 0 where the program is to find them.
struct PinPlan {
    Angle to_face =
        Angle::degrees(90);       ///< between pin and face: 90° for a pin square on the plate; for a plumb one the
                                  ///< altitude of the plate's normal
    double nodus_height_mm = 0.0; ///< square above the face
    double diameter_mm = 0.0, plate_thickness_mm = 0.0;
    double embedment_mm =
        0.0; ///< along the pin; found: through a plate that it crosses in four diameters, else four diameters
    double beyond_mm = 0.0; ///< how far it stands out behind the plate, a second nodus at its end
    bool rounded = true;    ///< the tip a half round that ends at the nodus
    bool inches = false;
};

/// Frame: x along the face from where the pin's axis enters it towards the nodus' foot, y above the face.
struct Pin {
    Part part;                                                  ///< drawing: "pin"
    double above_mm = 0.0, embedment_mm = 0.0, length_mm = 0.0; ///< along the pin
    Point nodus;
};

/// @throws GnomonError  with a message for the maker
[[nodiscard]] Pin pin_of(const PinPlan& plan);

} // namespace dialwright::layout
