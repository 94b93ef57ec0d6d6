// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "cli/design/design_error.hpp"
#include "cli/design/keys.hpp"
#include "cli/design/plain_text.hpp"
#include "engine/survey/plate_restore.hpp"

#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace dialwright::cli {

/// How an old plate stood, where that is known.
enum class Stood { unknown, upright, level };

/// What a file of an old plate's lines says (docs/restore.md).
struct RestoreFile {
    std::string file, title;
    std::optional<Place> place; ///< where it was found
    Stood stood = Stood::unknown;
    bool noon_certain = true; ///< false: numerals count right, but from which hour is not known
    PlateReadings readings;
    PlateFacts facts;
    std::vector<std::string> names; ///< of the lines, as the file has them; "?" where the hour is unreadable
    std::vector<Position> at_lines; ///< where each stands in the file
    Position at;                    ///< of the lines as a whole
    std::vector<std::pair<std::string, std::string>> plate; ///< keys of the plate for a design, and their values
};

/// The lines, or what is wrong with them: one or the other.
struct RestoreReading {
    std::optional<RestoreFile> restore;
    std::vector<DesignError> errors; ///< in the order of the file
};

[[nodiscard]] RestoreReading read_restore(std::string_view text, std::string file_name);
[[nodiscard]] RestoreReading read_restore_file(const std::filesystem::path& path);

/// All keys of such a file; docs/restore.md describes each.
[[nodiscard]] std::span<const KnownKey> restore_keys();

} // namespace dialwright::cli
