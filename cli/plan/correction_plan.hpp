// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "engine/dial/correction.hpp"

#include <optional>

namespace dialwright::cli {

/// From the design's hours to its zone's clock; nothing where its hours have no correction by the date alone.
[[nodiscard]] std::optional<Correction> correction_of(const Design& design, const MeanYear& year, Angle zone_meridian);

/// The correction plate that the design asks for.
[[nodiscard]] layout::CorrectionSpec correction_spec(const Design& design);

} // namespace dialwright::cli
