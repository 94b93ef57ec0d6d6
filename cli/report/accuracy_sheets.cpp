// SPDX-License-Identifier: MIT
#include "cli/report/accuracy_words.hpp"
#include "layout/chart/accuracy_chart.hpp"
#include "layout/sheet/flow.hpp"
#include "layout/sheet/note_width.hpp"

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
    layout::put_chart(flow, layout::accuracy_chart(plan));
}

/// The largest letters in which a table stands on a page of this width.
double size_that_fits(const std::vector<layout::Flow::Column>& columns, const std::vector<TableRow>& rows,
                      double width_mm) {
    constexpr double k_gap_mm = 3.5, k_largest_mm = 2.5, k_least_mm = 1.7; // of the columns; of the letters
    double at_one_mm = 0;
    for (std::size_t i = 0; i < columns.size(); ++i) {
        double most = layout::note_width_mm(columns[i].head, 1.0, true);
        for (const TableRow& row : rows)
            most = std::max(most, layout::note_width_mm(row[i], 1.0));
        at_one_mm += most;
    }
    const double room = width_mm - k_gap_mm * double(columns.size());
    return std::clamp(room / std::max(at_one_mm, 1.0), k_least_mm, k_largest_mm);
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
        const auto columns = accuracy_columns(faces[i]);
        const auto rows = accuracy_rows(faces[i]);
        flow.table(columns, rows, size_that_fits(columns, rows, flow.width()));
        flow.space(1);
        flow.paragraph(k_accuracy_note, "", false, 2.5);
        for (layout::Sheet& sheet : flow.sheets())
            sheets.push_back(std::move(sheet));
    }
    return sheets;
}

} // namespace dialwright::cli
