// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "cli/design/design_error.hpp"

#include <filesystem>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// A whole design, or what is wrong with it: one or the other, never both, never neither.
struct DesignReading {
    std::optional<Design> design;
    std::vector<DesignError> errors; ///< in the order of the file; the first hundred
};

/// Reads a design file's text (docs/design-file.md) and fills in what it leaves open. Checks each value by itself and
/// those that must agree with each other; whether the Sun ever reaches the dial is not asked here.
/// @param file_name  for messages
/// Never throws for what is in the text.
[[nodiscard]] DesignReading read_design(std::string_view text, std::string file_name);

/// The same from a file; one that can't be read, a folder, or one over 1 MB is an error.
[[nodiscard]] DesignReading read_design_file(const std::filesystem::path& path);

} // namespace dialwright::cli
