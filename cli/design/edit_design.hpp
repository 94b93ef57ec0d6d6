// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design_error.hpp"

#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace dialwright::cli {

/// A design file's text with some values changed, or why it could not be.
struct DesignEdit {
    std::string text;
    std::vector<DesignError> errors;
};

/// Writes the values of keys of `dial` into a design file's text. A key that is there gets its value exchanged, one that is not is
/// added below the one before it, or below `kind`; every other byte stays, comments and line ends included.
/// @param values  keys and their values as the design file has them, in the order in which new ones are added
/// An error for a text that is no readable design before or after, or whose dial can't have such keys.
[[nodiscard]] DesignEdit with_dial_values(std::string_view text, const std::string& file,
                                          const std::vector<std::pair<std::string, std::string>>& values);

} // namespace dialwright::cli
