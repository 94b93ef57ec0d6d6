// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "layout/sheet/tiling.hpp"

namespace dialwright::cli {

/// How a design wants its sheets laid out.
[[nodiscard]] layout::PrintOptions print_options(const Design& design);

} // namespace dialwright::cli
