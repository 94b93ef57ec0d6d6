// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design_error.hpp"

#include <filesystem>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// A file's bytes, or why there are none.
struct FileText {
    std::optional<std::string> text;
    std::vector<DesignError> errors;
};

/// Reads a whole file of at most 1 MB; what is longer comes with one byte more than that, for who reads it to refuse.
/// @param what  "design file", for messages
[[nodiscard]] FileText read_text_file(const std::filesystem::path& path, std::string_view what);

/// In the order of the file; the first hundred.
[[nodiscard]] std::vector<DesignError> first_errors(std::vector<DesignError> errors);

} // namespace dialwright::cli
