// SPDX-License-Identifier: MIT
#include "cli/report/ranges.hpp"
#include "cli/report/say.hpp"
#include "cli/report/survey.hpp"
#include "layout/sheet/flow.hpp"

#include <cmath>
#include <memory>

namespace dialwright::cli {
namespace {

using layout::Drawing;
using layout::Flow;
using layout::Layer;
using layout::Mark;
using layout::Point;

constexpr double k_picture_mm = 100;

Mark stroke(Layer layer, double width_mm, const char* name) {
    Mark mark;
    mark.layer = layer;
    mark.width_mm = width_mm;
    mark.name = name;
    return mark;
}

/// Where the shadows lay, as crosses, and where the answer puts them, as rings; the peg's foot as a dot.
std::shared_ptr<const Drawing> picture_of(const SurveyFile& file, const WallAnswer& answer) {
    double size_mm = 1;
    for (const PegShadow& shadow : file.readings.shadows)
        size_mm = std::max({size_mm, std::abs(shadow.right_mm), std::abs(shadow.down_mm)});
    const double arm = size_mm / 40, line = size_mm / 300;
    Mark measured = stroke(Layer::engrave, 1.6 * line, "measured"), computed = stroke(Layer::cut, line, "computed");
    Mark peg = stroke(Layer::drill, line, "peg");
    peg.paths.push_back(layout::circle({}, arm / 2));
    peg.filled = true;
    for (std::size_t i = 0; i < file.readings.shadows.size(); ++i) {
        const PegShadow& shadow = file.readings.shadows[i];
        const Point at{shadow.right_mm, -shadow.down_mm};
        measured.paths.push_back(layout::polyline({{at.x_mm - arm, at.y_mm}, {at.x_mm + arm, at.y_mm}}));
        measured.paths.push_back(layout::polyline({{at.x_mm, at.y_mm - arm}, {at.x_mm, at.y_mm + arm}}));
        computed.paths.push_back(
            layout::circle({at.x_mm - answer.off_right_mm[i], at.y_mm + answer.off_down_mm[i]}, arm));
    }
    Mark plumb = stroke(Layer::guide, line, "plumb line");
    plumb.paths.push_back(layout::polyline({{0, 0}, {0, -size_mm}}));
    return std::make_shared<Drawing>(Drawing{"shadows", {plumb, computed, measured, peg}});
}

} // namespace

std::vector<layout::Sheet> survey_sheets(const SurveyFile& file, const WallSurvey& survey, const SurveyVerdict& verdict,
                                         const layout::PrintOptions& options) {
    Flow flow{options, "Survey"};
    flow.heading("Survey: " + (file.title.empty() ? file.file : file.title));
    flow.paragraph(say_latitude(file.place.site.latitude) + ", " + say_longitude(file.place.site.longitude) +
                   ". Every ± holds 19 times in 20.");
    for (const WallAnswer& answer : survey.answers) {
        std::vector<std::string> lines{"Facing " + say_facing(answer.facing_deg)};
        lines.push_back(answer.lean_deg.told
                            ? "Lean " + say_lean(answer.lean_deg)
                            : std::string{"The lean is not told: measure it with a plumb line and a rule."});
        flow.list(survey.answers.size() > 1 ? "If " + fault_words(answer) : std::string{"The wall"}, lines);
    }
    flow.list("Mind", verdict.notes);
    const WallAnswer& first = survey.answers.front();
    if (!file.readings.shadows.empty()) {
        flow.heading("Shadows");
        ShadowTable table = shadow_table(file, first);
        table.columns.push_back({""});
        for (TableRow& row : table.rows)
            row.resize(table.columns.size());
        flow.table(table.columns, table.rows);
        flow.space(4);
        flow.picture(picture_of(file, first), k_picture_mm, k_picture_mm,
                     "Crosses: measured. Rings: where the answer puts them. Dot: the peg. Not to scale.");
    }
    return flow.sheets();
}

} // namespace dialwright::cli
