// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "cli/design/keys.hpp"
#include "cli/design/plain_text.hpp"
#include "engine/survey/dial_adjust.hpp"
#include "engine/time/zone.hpp"

#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// What a file of a dial's readings says (docs/adjust.md).
struct AdjustFile {
    std::string file, title;
    std::optional<Zone> zone; ///< the design's; always there
    DialReadings readings;
    std::vector<Position> at_readings; ///< where each stands in the file
    Position at;                       ///< of the readings as a whole
};

/// The readings, or what is wrong with them: one or the other.
struct AdjustReading {
    std::optional<AdjustFile> adjust;
    std::vector<DesignError> errors; ///< in the order of the file
};

/// @param face  of the commission, the one that was read
[[nodiscard]] AdjustReading read_adjust(std::string_view text, std::string file_name, const Commission& commission,
                                        std::size_t face);
[[nodiscard]] AdjustReading read_adjust_file(const std::filesystem::path& path, const Commission& commission,
                                             std::size_t face);

/// All keys of such a file; docs/adjust.md describes each.
[[nodiscard]] std::span<const KnownKey> adjust_keys();

} // namespace dialwright::cli
