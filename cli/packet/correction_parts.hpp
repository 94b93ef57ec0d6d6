// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "layout/sheet/tiling.hpp"

#include <memory>
#include <string>
#include <vector>

namespace dialwright::cli {

/// What the packet holds of the correction from dial to clock.
struct CorrectionParts {
    /// A plate to cut.
    struct Part {
        std::string file;    ///< without its ending: "correction-graph"
        std::string title;   ///< of its sheets: "correction graph"
        std::string purpose; ///< "the correction plate for a machine, …"
        std::shared_ptr<const layout::Drawing> drawing;
    };
    std::vector<Part> parts;           ///< those that the design asks for: one, or none
    std::vector<std::string> warnings; ///< of the plate
    std::vector<layout::Sheet> card;   ///< the owner's, to print and give away
};

/// The drawings lie in the commission.
/// @param options  paper and margins; the title is the card's own
/// @throws layout::ExportError  margins leave no room on the paper
[[nodiscard]] CorrectionParts correction_parts(const Commission& commission, layout::PrintOptions options);

} // namespace dialwright::cli
