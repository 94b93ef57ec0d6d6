// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "cli/design/design_error.hpp"
#include "cli/design/keys.hpp"
#include "cli/design/plain_text.hpp"
#include "engine/survey/wall_survey.hpp"
#include "engine/time/zone.hpp"

#include <filesystem>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// What a file of a wall's readings says (docs/survey.md).
struct SurveyFile {
    std::string file, title;
    Place place;
    std::optional<Zone> zone; ///< always there
    WallReadings readings;
    bool by_compass = false;
    std::vector<Position> at_shadows; ///< where each stands in the file
    Position at;                      ///< of the shadows as a whole
};

/// The readings, or what is wrong with them: one or the other.
struct SurveyReading {
    std::optional<SurveyFile> survey;
    std::vector<DesignError> errors; ///< in the order of the file
};

[[nodiscard]] SurveyReading read_survey(std::string_view text, std::string file_name);
[[nodiscard]] SurveyReading read_survey_file(const std::filesystem::path& path);

/// All keys of such a file; docs/survey.md describes each.
[[nodiscard]] std::span<const KnownKey> survey_keys();

} // namespace dialwright::cli
