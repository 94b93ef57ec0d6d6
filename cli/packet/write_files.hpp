// SPDX-License-Identifier: MIT
#pragma once

#include <filesystem>
#include <stdexcept>
#include <string>
#include <vector>

namespace dialwright::cli {

struct WriteError : std::runtime_error {
    using std::runtime_error::runtime_error;
};

struct OutputFile {
    std::string name; ///< within the folder
    std::string bytes;
};

/// Writes all files of a packet into a folder (made if it is not there), or none: each is written beside its name,
/// pushed to the disk and checked, and only when all are there do they take their names. Other files in the folder stay.
/// @throws WriteError  with the path and the reason; what was there before is as it was
void write_files(const std::filesystem::path& folder, const std::vector<OutputFile>& files);

} // namespace dialwright::cli
