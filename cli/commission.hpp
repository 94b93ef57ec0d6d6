// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/read_design.hpp"
#include "cli/plan/face_plans.hpp"

#include <filesystem>
#include <optional>

namespace dialwright::cli {

/// A design that has been read, checked against the sky, and drawn.
struct Commission {
    Design design;
    MeanYear year;
    std::vector<FacePlan> plans;     ///< the nodus' height filled in
    std::vector<layout::Face> faces; ///< beside their plans
};

/// Reads a design file and draws its faces; tells on stderr what is wrong with it.
/// @return nothing after an error has been told
[[nodiscard]] std::optional<Commission> take_commission(const std::filesystem::path& file);

} // namespace dialwright::cli
