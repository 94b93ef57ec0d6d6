// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/section.hpp"

namespace dialwright::cli {

/// Fills in what the file leaves open, by the plate's smaller side where a length is wanted, in round figures of the
/// design's units, and notes each filling in `design.assumed`. Needs a plate with a size.
void fill_defaults(Design& design, const ReadingState& state);

} // namespace dialwright::cli
