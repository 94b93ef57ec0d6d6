// SPDX-License-Identifier: MIT
#pragma once

#include "cli/readings/restore_readings.hpp"
#include "layout/sheet/tiling.hpp"

#include <optional>
#include <string>
#include <vector>

namespace dialwright::cli {

/// One plate that the lines allow, and what speaks for it.
struct RestoreWay {
    PlateSolution solution;
    std::vector<std::string> speaks; ///< for or against it, in words
    int signs = 0;                   ///< how many facts it did not suppose come out right
    bool supposed_known = false;     ///< the file says that its fact is true
    bool for_this_place = false;
};

struct RestoreReport {
    std::vector<DesignError> errors; ///< the lines give no answer
    std::vector<RestoreWay> ways;    ///< the likeliest first
    std::vector<std::string> notes;
    bool settled = false; ///< the first way stands out from the others
};
[[nodiscard]] RestoreReport report_on(const RestoreFile& file, const std::optional<PlateFigure>& figure);

[[nodiscard]] std::string restore_text(const RestoreFile& file, const PlateFigure& figure, const RestoreReport& report);
/// docs/output-formats.md.
[[nodiscard]] std::string restore_json(const RestoreFile& file, const PlateFigure& figure, const RestoreReport& report);
/// The same on paper, with a picture of the lines as they are and as they should be.
[[nodiscard]] std::vector<layout::Sheet> restore_sheets(const RestoreFile& file, const PlateFigure& figure,
                                                        const RestoreReport& report,
                                                        const layout::PrintOptions& options);
/// "if it stood upright", and what follows from it, a line a figure: "latitude     53° 47' N ± 35'".
[[nodiscard]] std::string heading_of(const RestoreFile& file, const RestoreWay& way);
[[nodiscard]] std::vector<std::string> words_of(const RestoreFile& file, const RestoreWay& way);

/// A design file that cuts the plate again.
[[nodiscard]] std::string recut_design(const RestoreFile& file, const RestoreWay& way);

/// "upright", "level", "lean", "latitude", "sun".
[[nodiscard]] const char* fact_name(PlateSolution::Fact fact);

} // namespace dialwright::cli
