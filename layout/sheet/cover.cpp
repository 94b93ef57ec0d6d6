// SPDX-License-Identifier: MIT
#include "layout/sheet/cover.hpp"

#include "layout/sheet/flow.hpp"
#include "layout/sheet/measuring.hpp"
#include "layout/sheet/note_width.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

/// The picture on the left, the numbers beside it.
void put_face(Flow& flow, const CoverFace& face) {
    const double row = Flow::k_line_mm;
    flow.need(std::max(std::min(0.44 * flow.width(), 78.0), 1.3 * row * double(face.numbers.size())) + 18);
    if (!face.name.empty())
        flow.heading(face.name);
    const double side = std::min({0.44 * flow.width(), 78.0, std::max(20.0, flow.room() - 8)});
    const double top = flow.y();
    flow.picture(face.drawing, side, side, "Picture of the plate, not full size.");
    const double under = flow.y();
    const double column = flow.left() + side + 5;
    const double room = flow.left() + flow.width() - column;
    double label_width = 0;
    for (const auto& [label, value] : face.numbers)
        label_width = std::max(label_width, note_width_mm(label, Flow::k_text_mm));
    label_width = std::min(label_width + 2.5, 0.45 * room);
    double y = top;
    for (const auto& [label, value] : face.numbers) {
        const auto lines = wrapped(value, room - label_width, Flow::k_text_mm, true);
        flow.note({column, y - row}, label, Flow::k_text_mm);
        for (const std::string& line : lines) {
            y -= row;
            flow.note({column + label_width, y}, line, Flow::k_text_mm, true);
        }
    }
    flow.space(std::max(0.0, under - y) + 0.5);
}

constexpr int k_most_beside = 14; ///< columns or rows

void put_map(Flow& flow, const CoverFace& face) {
    const Tiling& tiling = *face.tiling;
    if (tiling.sheets.size() < 2)
        return;
    // Beside the words, or above them where there would be no room for the sheets' names.
    const bool wide = std::max(tiling.columns, tiling.rows) > k_most_beside;
    const double scale = std::min({1.0, (wide ? 170.0 : 62.0) / tiling.map_box.height_mm(),
                                   (wide ? 1.0 : 0.5) * flow.width() / tiling.map_box.width_mm()});
    const double height = scale * tiling.map_box.height_mm();
    flow.need(height + 12);
    flow.heading(face.name.empty() ? "How the sheets join" : "How the sheets of the " + face.name + " join");
    flow.space(1.5);
    const Placing placing{
        {},
        {flow.left() - scale * tiling.map_box.left_mm, flow.y() - height - scale * tiling.map_box.bottom_mm},
        scale,
        scale,
        false};
    for (const Mark& mark : tiling.map)
        flow.sheet().furniture.push_back(placing(mark));
    for (Note note : tiling.map_notes) {
        note.at = placing(note.at);
        const double cell = scale * tiling.map_box.width_mm() / tiling.columns;
        const double fits = 0.9 * cell / note_width_mm(note.text, 1.0, note.bold);
        note.size_mm = std::min(std::max(2.5, note.size_mm * scale), fits);
        flow.sheet().notes.push_back(note);
    }
    if (wide)
        flow.space(height + 2);
    const double column = wide ? flow.left() : flow.left() + scale * tiling.map_box.width_mm() + 5;
    std::string text = fmt::format(
        "{} sheets in {} rows and {} columns. Rows are lettered from the top, columns numbered from the left.",
        tiling.sheets.size(), tiling.rows, tiling.columns);
    if (!tiling.blank.empty()) {
        text += " Nothing falls on ";
        for (std::size_t i = 0; i < tiling.blank.size(); ++i)
            text += (i > 0 ? ", " : "") + tiling.blank[i];
        text += ": left out, and the others keep their names.";
    }
    text += " Lay the sheets together so that the crosses of neighbours coincide, then measure across the joins before "
            "you trust them.";
    double y = flow.y();
    for (const std::string& line : wrapped(text, flow.left() + flow.width() - column, Flow::k_text_mm, false)) {
        y -= Flow::k_line_mm;
        flow.note({column, y}, line, Flow::k_text_mm);
    }
    flow.space(std::max(wide ? 0.0 : height, flow.y() - y) + 1);
}

} // namespace

std::vector<Sheet> cover_sheets(const CoverWords& words, const std::vector<CoverFace>& faces,
                                const PrintOptions& options) {
    Flow flow{options, "What this packet makes"};
    flow.paragraph(words.title, "", true, 6.0);
    flow.space(0.8);
    flow.paragraph(words.subtitle, "", false, 3.2);
    flow.space(2);
    for (const CoverFace& face : faces)
        put_face(flow, face);
    flow.list("Of this design", words.warnings);
    flow.list("Before you cut", words.steps, true);
    flow.list("Take care", words.cautions);
    for (const CoverFace& face : faces)
        if (face.tiling)
            put_map(flow, face);
    return flow.sheets();
}

} // namespace dialwright::layout
