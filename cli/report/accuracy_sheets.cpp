// SPDX-License-Identifier: MIT
#include "cli/report/accuracy_words.hpp"
#include "layout/chart/accuracy_chart.hpp"
#include "layout/sheet/flow.hpp"

#include <algorithm>

namespace dialwright::cli {
namespace {

void put_chart(layout::Flow& flow, const FaceAccuracy& face) {
    layout::AccuracyChartPlan plan;
    plan.seasons = {"June solstice", "equinox", "December solstice"};
    plan.width_mm = flow.width();
    plan.height_mm = std::min(0.45 * flow.width(), 85.0);
    if (!face.supported.empty())
        plan.supported_min = face.supported.front().minutes;
    for (std::size_t i = 0; i < face.lines.size(); ++i) {
        layout::AccuracyChartPlan::Hour hour{face.labels[i], {}};
        for (std::size_t season = 0; season < 3; ++season)
            if (const auto& cell = face.lines[i].at[season])
                hour.minutes[season] = cell->total_min;
        if (face.lines[i].worst_min() > 0)
            plan.hours.push_back(std::move(hour));
    }
    if (plan.hours.empty())
        return;
    const layout::AccuracyChart chart = layout::accuracy_chart(plan);
    flow.need(chart.box.height_mm() + 2);
    flow.space(chart.box.height_mm() + 1);
    const layout::Placing placing{{}, {flow.left(), flow.y()}, 1.0, 1.0, false};
    for (const layout::Mark& mark : chart.marks)
        flow.sheet().furniture.push_back(placing(mark));
    for (layout::Note note : chart.notes) {
        note.at = placing(note.at);
        flow.sheet().notes.push_back(std::move(note));
    }
}

} // namespace

std::vector<layout::Sheet> accuracy_sheets(const Commission& commission, const std::vector<FaceAccuracy>& faces,
                                           const layout::PrintOptions& options) {
    std::vector<layout::Sheet> sheets;
    for (std::size_t i = 0; i < faces.size(); ++i) {
        const std::string& name = commission.plans[i].spec.name;
        const std::string title = "How good it will be" + (name.empty() ? "" : ", " + name);
        layout::Flow flow{options, title};
        flow.paragraph(title, "", true, 4.6);
        flow.space(1);
        const auto words = accuracy_words(commission, faces[i]);
        for (std::size_t k = 0; k < words.size(); ++k)
            flow.paragraph(words[k], "", k == 0);
        flow.space(2);
        put_chart(flow, faces[i]);
        flow.space(2);
        flow.paragraph("Minutes of error of each hour line: all slips by squares at the three seasons, then each slip "
                       "at the hour's worst season.",
                       "", false, 2.5);
        flow.table(accuracy_columns(faces[i]), accuracy_rows(faces[i]), 2.0);
        flow.space(1);
        flow.paragraph(k_accuracy_note, "", false, 2.5);
        for (layout::Sheet& sheet : flow.sheets())
            sheets.push_back(std::move(sheet));
    }
    return sheets;
}

} // namespace dialwright::cli
