// SPDX-License-Identifier: MIT
#include "layout/sheet/cover.hpp"

#include "layout/sheet/measuring.hpp"
#include "layout/sheet/note_width.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_text_mm = 2.9, k_line_mm = 4.1;

/// Lays blocks down a page, and begins another page where one is full.
class Flow {
  public:
    Flow(const PrintOptions& options, std::string title) : options_{options}, title_{std::move(title)} { begin(); }

    /// @param first  stands before the first line; the others are set in under it
    void paragraph(const std::string& text, const std::string& first = "", bool bold = false,
                   double size_mm = k_text_mm) {
        const double inset = first.empty() ? 0.0 : note_width_mm(first, size_mm) + 1.2;
        bool opening = true;
        for (const std::string& line : wrapped(text, width() - inset, size_mm, bold)) {
            need(k_line_mm * size_mm / k_text_mm);
            y_ -= k_line_mm * size_mm / k_text_mm;
            if (opening && !first.empty())
                note({field_.left_mm, y_}, first, size_mm, bold);
            note({field_.left_mm + inset, y_}, line, size_mm, bold);
            opening = false;
        }
    }
    void heading(const std::string& text) {
        need(14);
        space(2.6);
        paragraph(text, "", true, 3.4);
        space(0.6);
    }
    void space(double mm) { y_ -= mm; }
    void need(double mm) {
        if (y_ - mm < field_.bottom_mm)
            begin();
    }
    [[nodiscard]] double width() const { return field_.width_mm(); }
    [[nodiscard]] double left() const { return field_.left_mm; }
    [[nodiscard]] double y() const { return y_; }
    [[nodiscard]] double room() const { return y_ - field_.bottom_mm; }
    [[nodiscard]] Sheet& sheet() { return sheets_.back(); }
    void note(Point at, std::string text, double size_mm, bool bold = false) {
        sheet().notes.push_back({at, std::move(text), size_mm, Align::left, bold, {}});
    }
    [[nodiscard]] std::vector<Sheet> sheets() { return std::move(sheets_); }

  private:
    void begin() {
        Sheet sheet;
        sheet.width_mm = options_.paper.short_mm;
        sheet.height_mm = options_.paper.roll ? std::min(options_.paper.long_mm, 1.4142 * options_.paper.short_mm)
                                              : options_.paper.long_mm;
        sheet.paper = options_.paper.name;
        sheet.title = sheets_.empty() ? "What this packet makes"
                                      : fmt::format("What this packet makes, page {}", sheets_.size() + 1);
        const double m = options_.margin_mm;
        sheet.printable = {m, m, sheet.width_mm - m, sheet.height_mm - m};
        const SheetWords words{paper_words(options_, sheet.width_mm, sheet.height_mm), title_, "", 1, 1};
        const Surround surround = surround_of(sheet.width_mm, sheet.height_mm, m, options_.inches, words);
        field_ = opening_of(sheet.width_mm, sheet.height_mm, m, surround);
        furnish(sheet, field_, surround, words);
        field_.left_mm += 2;
        field_.right_mm -= 1;
        y_ = field_.top_mm;
        sheets_.push_back(std::move(sheet));
    }

    const PrintOptions& options_;
    std::string title_;
    std::vector<Sheet> sheets_;
    Box field_;
    double y_ = 0;
};

void put_picture(Flow& flow, const std::shared_ptr<const Drawing>& drawing, Point lower_left, double side_mm) {
    const Box box = bounds_of(*drawing);
    const double scale = side_mm / std::max(box.width_mm(), box.height_mm());
    const Point middle = box.middle();
    Placing placing{{}, {}, scale, scale, false};
    placing.shift = {lower_left.x_mm + side_mm / 2 - scale * middle.x_mm,
                     lower_left.y_mm + side_mm / 2 - scale * middle.y_mm};
    flow.sheet().windows.push_back(
        {drawing, placing,
         Box{lower_left.x_mm, lower_left.y_mm, lower_left.x_mm + side_mm, lower_left.y_mm + side_mm}});
}

/// The picture on the left, the numbers beside it.
void put_face(Flow& flow, const CoverFace& face) {
    const double row = k_line_mm;
    flow.need(std::max(std::min(0.44 * flow.width(), 78.0), 1.3 * row * double(face.numbers.size())) + 18);
    if (!face.name.empty())
        flow.heading(face.name);
    const double side = std::min({0.44 * flow.width(), 78.0, std::max(20.0, flow.room() - 8)});
    const double top = flow.y();
    put_picture(flow, face.drawing, {flow.left(), top - side - 1}, side);
    flow.note({flow.left(), top - side - 4.5}, "Picture of the plate, not full size.", 2.5);
    const double column = flow.left() + side + 5;
    const double room = flow.left() + flow.width() - column;
    double label_width = 0;
    for (const auto& [label, value] : face.numbers)
        label_width = std::max(label_width, note_width_mm(label, k_text_mm));
    label_width = std::min(label_width + 2.5, 0.45 * room);
    double y = top;
    for (const auto& [label, value] : face.numbers) {
        const auto lines = wrapped(value, room - label_width, k_text_mm, true);
        flow.note({column, y - row}, label, k_text_mm);
        for (const std::string& line : lines) {
            y -= row;
            flow.note({column + label_width, y}, line, k_text_mm, true);
        }
    }
    flow.space(std::max(top - y, side + 5.5));
}

void put_map(Flow& flow, const CoverFace& face) {
    const Tiling& tiling = *face.tiling;
    if (tiling.sheets.size() < 2)
        return;
    const double scale =
        std::min(1.0, std::min(62.0 / tiling.map_box.height_mm(), 0.5 * flow.width() / tiling.map_box.width_mm()));
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
        note.size_mm = std::max(2.5, note.size_mm * scale);
        flow.sheet().notes.push_back(note);
    }
    const double column = flow.left() + scale * tiling.map_box.width_mm() + 5;
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
    for (const std::string& line : wrapped(text, flow.left() + flow.width() - column, k_text_mm, false)) {
        y -= k_line_mm;
        flow.note({column, y}, line, k_text_mm);
    }
    flow.space(std::max(height, flow.y() - y) + 1);
}

void put_list(Flow& flow, const std::string& heading, const std::vector<std::string>& items, bool numbered) {
    if (items.empty())
        return;
    flow.heading(heading);
    int number = 0;
    for (const std::string& item : items)
        flow.paragraph(item, numbered ? fmt::format("{}.", ++number) : "•");
}

} // namespace

std::vector<Sheet> cover_sheets(const CoverWords& words, const std::vector<CoverFace>& faces,
                                const PrintOptions& options) {
    Flow flow{options, options.title};
    flow.paragraph(words.title, "", true, 6.0);
    flow.space(0.8);
    flow.paragraph(words.subtitle, "", false, 3.2);
    flow.space(2);
    for (const CoverFace& face : faces)
        put_face(flow, face);
    put_list(flow, "Of this design", words.warnings, false);
    put_list(flow, "Before you cut", words.steps, true);
    put_list(flow, "Take care", words.cautions, false);
    for (const CoverFace& face : faces)
        if (face.tiling)
            put_map(flow, face);
    return flow.sheets();
}

} // namespace dialwright::layout
