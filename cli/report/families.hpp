// SPDX-License-Identifier: MIT
#pragma once

#include "cli/plan/face_plans.hpp"

#include <optional>
#include <string>
#include <vector>

namespace dialwright::cli {

/// A family of lines as it is drawn on a face.
struct DrawnFamily {
    std::string name;  ///< as designs name it: "sun", "since sunrise", "altitude", "date"
    std::string lines; ///< "hours since sunrise"
    bool in_ring = false;
    double width_mm = 0.0;         ///< of its widest line; 0 where all lie on the lines of another family
    std::optional<Season> between; ///< declinations that it is drawn for; nothing: the whole year
    std::string figures; ///< how its labels are set: "figures, italic"; empty where they are words or numerals
    std::string sample;  ///< one of these labels
};

/// In the order of the face's lines.
[[nodiscard]] std::vector<DrawnFamily> drawn_families(const FacePlan& plan, const layout::Face& face);

/// "declinations -23.4° to 0.0°".
[[nodiscard]] std::string say_between(const Season& season);

} // namespace dialwright::cli
