// SPDX-License-Identifier: MIT
#include "cli/packet/bench_pages.hpp"

#include "layout/sheet/flow.hpp"
#include "layout/text/figures.hpp"

#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using layout::Align;
using layout::Flow;
using layout::Sheet;

void put_table(Flow& flow, const layout::SettingOutTable& table) {
    std::vector<Flow::Column> columns;
    for (std::size_t i = 0; i < table.heading.size(); ++i)
        columns.push_back({table.heading[i], i < 2 ? Align::left : Align::right});
    flow.table(columns, table.rows, 2.5);
}

void put_words(Flow& flow, const layout::Part& part) {
    std::vector<std::vector<std::string>> rows;
    for (const auto& [name, value] : part.particulars)
        rows.push_back({name, value});
    flow.table({{"Measure", Align::left}, {"", Align::left}}, rows);
    for (const std::string& note : part.notes)
        flow.paragraph(note, "•");
    for (const std::string& caution : part.cautions)
        flow.paragraph(caution, "!", true);
}

} // namespace

std::vector<Sheet> gnomon_pages(const Commission& commission, const std::vector<WorkPiece>& pieces,
                                const layout::PrintOptions& options) {
    std::vector<Sheet> tiles;
    std::optional<Flow> flow;
    const layout::Part* before = nullptr;
    for (const WorkPiece& piece : pieces) {
        if (piece.part == nullptr)
            continue;
        if (!flow)
            flow.emplace(options, "The gnomon and its gauges");
        const bool first = piece.part != before;
        before = piece.part;
        if (first) {
            // Words and drawing on one page, where a page has room for both.
            const double both = layout::bounds_of(*piece.drawing).height_mm() + 24 +
                                Flow::k_line_mm * double(piece.part->particulars.size() + piece.part->notes.size() +
                                                         2 * piece.part->cautions.size());
            flow->need(both < flow->whole_room() ? both : 60);
            flow->heading(piece.title);
            put_words(*flow, *piece.part);
            flow->space(2);
        }
        if (flow->full_size(piece.drawing, piece.title + ", full size."))
            continue;
        flow->picture(piece.drawing, 80, 50,
                      piece.title + ", not full size: the full size is on the sheets that follow.");
        layout::PrintOptions on_tiles = options;
        on_tiles.part = piece.title;
        on_tiles.title = commission.design.title + ", " + piece.title;
        for (Sheet& sheet : layout::tile(piece.drawing, on_tiles).sheets)
            tiles.push_back(std::move(sheet));
    }
    std::vector<Sheet> sheets = flow ? flow->sheets() : std::vector<Sheet>{};
    for (Sheet& sheet : tiles)
        sheets.push_back(std::move(sheet));
    return sheets;
}

layout::SettingOut setting_out_of(const Commission& commission, std::size_t face, bool divisions) {
    layout::SettingOutOptions options;
    options.divisions = divisions;
    options.inches = commission.design.units == Units::inches;
    return layout::set_out(commission.faces[face], commission.plans[face].spec, options);
}

std::vector<Sheet> setting_out_pages(const Commission& commission, std::size_t face,
                                     const layout::PrintOptions& options) {
    const layout::SettingOut out = setting_out_of(commission, face, false);
    const std::string& name = commission.plans[face].spec.name;
    Flow flow{options, name.empty() ? "Setting out" : "Setting out, " + name};
    flow.paragraph(name.empty() ? "Setting out by hand" : "Setting out by hand: " + name, "", true, 4.6);
    flow.space(1);
    std::string words =
        fmt::format("x runs to the right and y upwards from the {}, as the reader sees the plate. Measure "
                    "each length from there and from no other mark. ",
                    out.datum);
    if (!out.poles.empty()) {
        words += fmt::format("Angles are turned clockwise from the line that runs {} through", out.zero_line);
        for (std::size_t i = 0; i < out.poles.size(); ++i)
            words += fmt::format("{} the {} (x {}, y {})",
                                 i == 0                     ? ""
                                 : i + 1 < out.poles.size() ? ","
                                                            : " and",
                                 out.poles[i].name, layout::say_length(out.poles[i].at.x_mm, out.inches),
                                 layout::say_length(out.poles[i].at.y_mm, out.inches));
        words += fmt::format("; chords are stepped off with dividers on a circle of {} round it.",
                             layout::say_length(out.chord_radius_mm, out.inches));
    }
    flow.paragraph(words);
    flow.paragraph(
        "Lines finer than an hour are in the packet's setting-out file. Scribe lightly first, prove the checks at "
        "the end of this list, and only then cut.");
    flow.heading("The lines");
    put_table(flow, layout::table_of_lines(out));
    if (!out.holes.empty()) {
        flow.heading("Holes");
        put_table(flow, layout::table_of_holes(out));
    }
    flow.list("Prove it before you cut", out.checks);
    return flow.sheets();
}

} // namespace dialwright::cli
