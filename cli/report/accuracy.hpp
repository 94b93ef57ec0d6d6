// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "engine/dial/accuracy.hpp"
#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <vector>

namespace dialwright::cli {

/// How good a face will be: docs/accuracy.md.
struct FaceAccuracy {
    AccuracyPlan plan;
    std::vector<std::string> labels; ///< of the plan's lines, as the plate has them
    std::vector<AccuracyLine> lines;
    std::vector<Supported> supported;
};
[[nodiscard]] std::vector<FaceAccuracy> accuracy_of(const Commission& commission);

/// For people. For programs: docs/output-formats.md. An hour line at a season a row.
[[nodiscard]] std::string accuracy_text(const Commission& commission, const std::vector<FaceAccuracy>& faces);
[[nodiscard]] std::string accuracy_json(const Commission& commission, const std::vector<FaceAccuracy>& faces);
[[nodiscard]] std::string accuracy_csv(const Commission& commission, const std::vector<FaceAccuracy>& faces);
/// A page for each face: what it supports, the chart, the table.
[[nodiscard]] std::vector<layout::Sheet> accuracy_sheets(const Commission& commission,
                                                         const std::vector<FaceAccuracy>& faces,
                                                         const layout::PrintOptions& options);

} // namespace dialwright::cli
