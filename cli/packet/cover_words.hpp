// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"

#include <string>
#include <utility>
#include <vector>

namespace dialwright::cli {

/// The numbers of one face that stand beside its picture on the first page.
[[nodiscard]] std::vector<std::pair<std::string, std::string>> key_numbers(const Commission& commission,
                                                                           std::size_t face);

/// What can hurt someone in this work.
[[nodiscard]] std::vector<std::string> cautions(const Design& design);

/// What to do before anything is cut, in its order.
[[nodiscard]] std::vector<std::string> steps(const Design& design, bool has_tiles);

} // namespace dialwright::cli
