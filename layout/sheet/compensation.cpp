// SPDX-License-Identifier: MIT
#include "layout/sheet/compensation.hpp"

#include "layout/sheet/measuring.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_text_mm = 3.4, k_line_mm = 5.0;

/// A line with a tick across each step, the end ticks long and hair thin.
void add_long_bar(Sheet& sheet, Point from, bool upright, double length_mm, double step_mm) {
    Mark line{Layer::engrave, {}, 0.15, false, upright ? "long bar, along" : "long bar, across"};
    const auto at = [&](double along, double aside) {
        return upright ? Point{from.x_mm + aside, from.y_mm + along} : Point{from.x_mm + along, from.y_mm + aside};
    };
    line.paths.push_back(polyline({at(0, 0), at(length_mm, 0)}));
    const int ticks = int(std::lround(length_mm / step_mm));
    for (int i = 0; i <= ticks; ++i) {
        const double half = i == 0 || i == ticks ? 6.0 : i % 5 == 0 ? 3.0 : 1.5;
        line.paths.push_back(polyline({at(i * step_mm, -half), at(i * step_mm, half)}));
    }
    sheet.furniture.push_back(std::move(line));
}

} // namespace

void compensate(Sheet& sheet, const Compensation& compensation, bool roll) {
    const bool lying = !roll && sheet.width_mm > sheet.height_mm;
    sheet.stretch_x = 1.0 / (lying ? compensation.along : compensation.across);
    sheet.stretch_y = 1.0 / (lying ? compensation.across : compensation.along);
}

double margin_for(const Compensation& compensation, const Paper& paper, double margin_mm) {
    const double across = std::max(0.0, 1.0 / compensation.across - 1.0) * paper.short_mm / 2,
                 along = std::max(0.0, 1.0 / compensation.along - 1.0) * paper.long_mm / 2;
    return margin_mm + std::max(across, along);
}

Sheet calibration_sheet(const PrintOptions& options) {
    Sheet sheet;
    sheet.width_mm = options.paper.short_mm;
    sheet.height_mm =
        options.paper.roll ? std::min(options.paper.long_mm, 1.4142 * options.paper.short_mm) : options.paper.long_mm;
    sheet.paper = options.paper.name;
    sheet.title = "Calibration of the printer";
    sheet.printable = Box{0, 0, sheet.width_mm, sheet.height_mm}.grown(-options.margin_mm);
    const double left = 14, below = 14; // room for the ticks and the figures
    // What stands in the design must be the bar's very length: bars of half inches where inches are measured.
    const double step = options.inches ? 12.7 : 10.0;
    const auto whole = [step](double mm) { return std::floor(mm / step) * step; };
    const double across = whole(sheet.printable.width_mm() - left - 8),
                 along = whole(sheet.printable.height_mm() - below - 8);
    if (across < 50 || along < 50)
        throw ExportError(fmt::format(
            "{} leaves no room for bars to measure: choose a larger paper or a smaller margin.", options.paper.name));
    const Point corner{sheet.printable.left_mm + left, sheet.printable.bottom_mm + below};
    add_long_bar(sheet, corner, false, across, step);
    add_long_bar(sheet, corner, true, along, step);
    const auto length = [&](double mm) {
        return options.inches ? fmt::format("{:.1f} in", mm / 25.4) : fmt::format("{:.0f} mm", mm);
    };
    const auto name = [&](double mm) { return length(mm) + " printed"; };
    sheet.notes.push_back({{corner.x_mm + across / 2, corner.y_mm - 11},
                           name(across) + ", across the feed",
                           3.2,
                           Align::middle,
                           true,
                           {}});
    sheet.notes.push_back({{corner.x_mm - 8, corner.y_mm + along / 2},
                           name(along) + ", along the feed",
                           3.2,
                           Align::middle,
                           true,
                           Angle::degrees(90)});
    std::vector<std::pair<std::string, bool>> words{
        {"Calibration of the printer", true},
        {paper_words(options, sheet.width_mm, sheet.height_mm) +
             ". Print this page at 100 % (actual size), on the printer and the paper "
             "that the templates will be printed on.",
         false},
        {"1.  Let the sheet lie for an hour: paper grows and shrinks with the damp of the air and the heat of the "
         "printer.",
         false},
        {"2.  Measure both bars with a steel rule, from the middle of the first long tick to the middle of the last, "
         "to a "
         "tenth of a millimetre or a hundredth of an inch.",
         false},
        {"3.  Write what is printed and what you measured into the design:", false},
        {fmt::format("        print:\n          across feed: [{0}, ________]\n          along feed: [{1}, ________]",
                     length(across), length(along)),
         false},
        {"4.  Make the packet again. Its sheets are then stretched against the printer's error, and their own bars "
         "prove "
         "it: they must measure what they say.",
         false},
        {fmt::format(
             "If a bar is off by more than {:.0f} %, the page was fitted to the paper: switch that off in the print "
             "dialogue and print again. Files for machines are never changed by this.",
             100 * k_most_compensation),
         false}};
    double y = corner.y_mm + along - 14;
    for (const auto& [text, bold] : words) {
        const double size = bold ? 5.0 : k_text_mm;
        std::size_t from = 0;
        while (from <= text.size()) { // lines that are broken by hand first
            const std::size_t end = std::min(text.find('\n', from), text.size());
            const std::string part = text.substr(from, end - from);
            const std::size_t inset = std::min(part.find_first_not_of(' '), part.size());
            for (const std::string& line : wrapped(part.substr(inset), across - 24 - double(inset), size, bold)) {
                sheet.notes.push_back({{corner.x_mm + 12 + double(inset), y}, line, size, Align::left, bold, {}});
                y -= k_line_mm * size / k_text_mm;
            }
            from = end + 1;
        }
        y -= 2;
    }
    return sheet;
}

} // namespace dialwright::layout
