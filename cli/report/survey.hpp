// SPDX-License-Identifier: MIT
#pragma once

#include "cli/readings/survey_readings.hpp"
#include "cli/report/text_table.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <utility>
#include <vector>

namespace dialwright::cli {

/// What a survey is good for.
struct SurveyVerdict {
    std::vector<DesignError> errors; ///< the readings give no answer
    std::vector<std::string> notes;  ///< there is one, and the maker should know this
    bool good_to_cut = false;        ///< one answer, near enough for a dial
};
[[nodiscard]] SurveyVerdict verdict_on(const SurveyFile& file, const WallSurvey& survey);

/// Keys of a design's `dial` and their values, from the likeliest answer; the lean only where the readings tell it.
[[nodiscard]] std::vector<std::pair<std::string, std::string>> dial_values(const WallSurvey& survey);

[[nodiscard]] std::string survey_text(const SurveyFile& file, const WallSurvey& survey, const SurveyVerdict& verdict);
/// docs/output-formats.md.
[[nodiscard]] std::string survey_json(const SurveyFile& file, const WallSurvey& survey, const SurveyVerdict& verdict);

/// The same on paper, with a picture of the shadows.
[[nodiscard]] std::vector<layout::Sheet> survey_sheets(const SurveyFile& file, const WallSurvey& survey,
                                                       const SurveyVerdict& verdict,
                                                       const layout::PrintOptions& options);
/// Each shadow, and how far an answer leaves it off.
struct ShadowTable {
    std::vector<layout::Flow::Column> columns;
    std::vector<TableRow> rows;
};
[[nodiscard]] ShadowTable shadow_table(const SurveyFile& file, const WallAnswer& answer);
/// "the clock was 4 min 50 s slow (± 12 s)": what has to be wrong for an answer.
[[nodiscard]] std::string fault_words(const WallAnswer& answer);

} // namespace dialwright::cli
