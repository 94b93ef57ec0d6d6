// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"

#include <memory>
#include <string>
#include <vector>

namespace dialwright::cli {

/// One drawing of a commission at full scale: a plate, a gnomon, a gauge, a correction plate. Every sheet and every file for a machine is
/// made from the list of them.
struct WorkPiece {
    std::string stem;  ///< of its files: "plate-upper"
    std::string title; ///< on its sheets: "Plate, upper face"
    std::shared_ptr<const layout::Drawing> drawing;
    bool for_machine = true;            ///< false: the side of solid work, which no machine cuts from this file
    bool is_plate = false;              ///< the dial's own
    const layout::Part* part = nullptr; ///< what is said of it; none for a plate, and none for the correction plate
    std::size_t face = 0;
};

/// Plates first, then what belongs to their gnomons, then the correction plate.
[[nodiscard]] std::vector<WorkPiece> work_pieces(const Commission& commission);

/// A drawing turned over about its upright axis.
[[nodiscard]] std::shared_ptr<const layout::Drawing> mirrored(const layout::Drawing& drawing);

} // namespace dialwright::cli
