// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design_error.hpp"
#include "cli/plan/face_plans.hpp"

#include <initializer_list>
#include <string>
#include <vector>

namespace dialwright::cli {

/// An error at a key of the design file, or where its section would stand.
[[nodiscard]] DesignError error_at(const Design& design, const std::string& key, std::string message, std::string hint);

/// The first of the keys that the file gives; the last where it gives none.
[[nodiscard]] std::string first_given(const Design& design, std::initializer_list<const char*> keys);
/// Borders that leave no field, at the first of their keys that is given.
[[nodiscard]] DesignError borders_error(const Design& design, std::string message);

/// The same errors, sorted as they stand in the file.
[[nodiscard]] std::vector<DesignError> in_order(std::vector<DesignError> errors);

/// What the sky does not allow: a plate that the Sun never lights, hours that are never lit. Where there is such an
/// error, also what is wrong with the fonts and the borders, which the drawing would have told.
[[nodiscard]] std::vector<DesignError> what_cannot_be(const Design& design, const MeanYear& year,
                                                      const std::vector<FacePlan>& plans);

/// Which texts no font at hand can set, each at its own key; `otherwise` at the font's where each by itself can be set.
[[nodiscard]] std::vector<DesignError> what_cannot_be_lettered(const Design& design, const std::string& otherwise);

/// What fell off the plate: no hour line on it; a given nodus that throws every date line off it. One that throws some
/// off is told in the face's warnings.
[[nodiscard]] std::vector<DesignError> what_misses_the_plate(const Design& design, const MeanYear& year,
                                                             const std::vector<FacePlan>& plans,
                                                             std::vector<layout::Face>& faces);

} // namespace dialwright::cli
