// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/flow.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

using TableRow = std::vector<std::string>;

/// A table for people in characters of one width: the same columns and rows that a Flow sets on paper. A row that has
/// more cells than there are columns ends with them, as remarks.
/// @param indent  of each line, in spaces
[[nodiscard]] std::string text_table(const std::vector<layout::Flow::Column>& columns,
                                     const std::vector<TableRow>& rows, std::size_t indent = 0);

} // namespace dialwright::cli
