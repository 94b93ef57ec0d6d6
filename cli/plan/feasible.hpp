// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design_error.hpp"
#include "cli/plan/face_plans.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// An error at a key of the design file, or where its section would stand.
[[nodiscard]] DesignError error_at(const Design& design, const std::string& key, std::string message, std::string hint);

/// What the sky does not allow: a plate that the Sun never lights, hours that are never lit.
[[nodiscard]] std::vector<DesignError> what_cannot_be(const Design& design, const MeanYear& year, const std::vector<FacePlan>& plans);

/// What fell off the plate: no hour line on it; a given nodus that throws every date line off it.
[[nodiscard]] std::vector<DesignError> what_misses_the_plate(const Design& design, const std::vector<FacePlan>& plans, const std::vector<layout::Face>& faces);

} // namespace dialwright::cli
