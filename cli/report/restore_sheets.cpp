// SPDX-License-Identifier: MIT
#include "cli/report/ranges.hpp"
#include "cli/report/restore.hpp"
#include "cli/report/say.hpp"
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

constexpr double k_picture_mm = 85;

Point along(Point from, double direction_deg, double reach_mm) {
    const Angle direction = Angle::degrees(direction_deg);
    return {from.x_mm + reach_mm * sin(direction), from.y_mm + reach_mm * cos(direction)};
}

/// Each line as it was measured, and beside it, thin, as it should be.
std::shared_ptr<const Drawing> picture_of(const RestoreFile& file, const PlateFigure& figure) {
    double size_mm = 100;
    for (const PlateLine& line : file.readings.lines)
        for (const PlatePoint& p : line.points)
            size_mm = std::max({size_mm, std::abs(p.u_mm), std::abs(p.v_mm)});
    Mark measured, should;
    measured.width_mm = size_mm / 150;
    measured.name = "measured";
    should.width_mm = size_mm / 500;
    should.layer = Layer::cut;
    should.name = "as it should be";
    for (std::size_t i = 0; i < file.readings.lines.size(); ++i) {
        const PlateLine& line = file.readings.lines[i];
        Point from{}, to{};
        double direction_deg = 0;
        if (line.direction_deg) {
            direction_deg = *line.direction_deg;
            from = along({}, direction_deg, size_mm / 5);
            to = along({}, direction_deg, size_mm);
        } else {
            const PlatePoint last = line.points.back();
            const PlatePoint first = line.points.size() > 1 ? line.points.front() : PlatePoint{};
            from = {first.u_mm, first.v_mm};
            to = {last.u_mm, last.v_mm};
            direction_deg = arc_tangent(to.x_mm - from.x_mm, to.y_mm - from.y_mm).in_degrees();
        }
        measured.paths.push_back(layout::polyline({from, to}));
        // Turned back by what it is off, about where it starts.
        const double reach = std::hypot(to.x_mm - from.x_mm, to.y_mm - from.y_mm);
        const Point start = line.direction_deg ? Point{} : from;
        should.paths.push_back(layout::polyline({start, along(start, direction_deg - figure.off_deg[i],
                                                              line.direction_deg ? size_mm * 1.05 : reach * 1.05)}));
    }
    return std::make_shared<Drawing>(Drawing{"lines", {measured, should}});
}

} // namespace

std::vector<layout::Sheet> restore_sheets(const RestoreFile& file, const PlateFigure& figure,
                                          const RestoreReport& report, const layout::PrintOptions& options) {
    Flow flow{options, "Restoring a plate"};
    flow.heading("Restoring a plate: " + (file.title.empty() ? file.file : file.title));
    flow.paragraph("Style height " + say_arc(figure.style_height_deg.value) + " " +
                   say_give(figure.style_height_deg.range) + ". Every ± holds 19 times in 20.");
    for (const RestoreWay& way : report.ways) {
        std::vector<std::string> lines = words_of(file, way);
        lines.insert(lines.end(), way.speaks.begin(), way.speaks.end());
        flow.list(with_capital(heading_of(file, way)), lines);
    }
    flow.list("Mind", report.notes);
    flow.heading("Lines");
    std::vector<std::vector<std::string>> rows;
    for (std::size_t i = 0; i < file.names.size(); ++i)
        rows.push_back({file.names[i], fixed(figure.off_deg[i], 2) + "°",
                        figure.off_mm[i] != 0.0 ? fixed(figure.off_mm[i], 1) : "",
                        figure.stray[i] ? "cut or read wrong" : ""});
    using layout::Align;
    flow.table({{"line"}, {"off, clockwise", Align::right}, {"mm", Align::right}, {""}}, rows);
    flow.space(4);
    flow.picture(picture_of(file, figure), k_picture_mm, k_picture_mm,
                 "Black: as measured. Thin: as it should be. Not to scale.");
    return flow.sheets();
}

} // namespace dialwright::cli
