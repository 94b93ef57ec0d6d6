// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "layout/plate/face.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// What the engine and the layout need to make one face of a design.
struct FacePlan {
    std::string name; ///< "upper", "lower"; empty for a dial with one face
    DialPlan dial;
    layout::FaceSpec spec;
};

/// The faces of a design, in the order in which they are made: an equatorial dial of both faces has two.
/// @param design  with a zone that the time zone database knows
[[nodiscard]] std::vector<FacePlan> face_plans(const Design& design, const MeanYear& year);

/// A face's name, as FacePlan has it, and which way it looks.
struct FaceAttitude {
    std::string name;
    Attitude attitude;
};
/// The same faces, for what is asked of a wall before there is a dial.
[[nodiscard]] std::vector<FaceAttitude> face_attitudes(const Design& design);

/// The date lines that a design asks for: label and mean declination. Lines that coincide share one label.
[[nodiscard]] DatePlan date_plan(const Design& design, const MeanYear& year);

} // namespace dialwright::cli
