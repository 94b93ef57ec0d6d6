// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/read_design.hpp"
#include "cli/plan/face_plans.hpp"
#include "layout/gnomon/gnomon_parts.hpp"

#include <filesystem>
#include <optional>

namespace dialwright::cli {

/// A design that has been read, checked against the sky, and drawn.
struct Commission {
    Design design;
    MeanYear year;
    std::vector<FacePlan> plans;                    ///< the nodus' height filled in
    std::vector<layout::Face> faces;                ///< beside their plans
    std::vector<std::vector<layout::Part>> gnomons; ///< the parts of each face's gnomon, beside their plans
    std::optional<Correction> correction;           ///< from the dial to the clock; nothing where hours have none
    std::optional<layout::CorrectionPlate> correction_plate; ///< where the design asks for one
};

/// A commission, or what is wrong with its design: one or the other, never both, never neither.
struct CommissionTaking {
    std::optional<Commission> commission;
    std::vector<DesignError> errors; ///< in the order of the file
};

/// Checks a design against the sky and draws its faces.
[[nodiscard]] CommissionTaking take_commission(DesignReading reading);

/// The same from a design file; tells on stderr what is wrong with it.
/// @return nothing after an error has been told
[[nodiscard]] std::optional<Commission> take_commission(const std::filesystem::path& file);

/// The face of that name; tells on stderr of a name that the design's faces have not.
[[nodiscard]] std::optional<std::size_t> face_named(const Commission& commission, const std::string& name);

/// Each error on a line of stderr.
void tell(const std::vector<DesignError>& errors);

} // namespace dialwright::cli
