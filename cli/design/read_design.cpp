// SPDX-License-Identifier: MIT
#include "cli/design/read_design.hpp"

#include "cli/design/defaults.hpp"
#include "cli/design/document.hpp"
#include "cli/design/file_text.hpp"
#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace dialwright::cli {

namespace {

/// Lengths that must agree with each other and with the plate. An error is shown at the first of `keys` that the file
/// gives, or else at the plate.
class Agreement {
  public:
    Agreement(const Design& design, const Node& root, ReadingState& state)
        : design_{design}, root_{root}, state_{state} {}

    void check() {
        const double s = smaller_side_mm(design_.plate);
        const Borders& borders = design_.borders;
        // Where the maker places the centre, perhaps off the plate, the border round it may have any radius.
        const double inner_mm = design_.plate.centre ? 0.0 : borders.inner_mm;
        const double taken_mm = borders.margin_mm + borders.chapter_ring_mm + inner_mm;
        if (taken_mm >= s / 2)
            report({"chapter ring", "margin", "inner border"}, "borders",
                   fmt::format("margin, chapter ring and inner border take {} of the plate's {} from edge to middle",
                               shown(taken_mm), shown(s / 2)),
                   "make them smaller, so that there is room for lines");
        if (borders.chapter_ring_mm > 0.0 && design_.lettering.numeral_height_mm > borders.chapter_ring_mm)
            report({"numeral height"}, "lettering",
                   fmt::format("numerals of {} do not fit in a chapter ring of {}",
                               shown(design_.lettering.numeral_height_mm), shown(borders.chapter_ring_mm)),
                   "make them lower, or give \"borders: chapter ring\" a larger size");
        fits("lettering", "numeral height", design_.lettering.numeral_height_mm, s / 2);
        fits("lettering", "label height", design_.lettering.label_height_mm, s / 4);
        fits("lettering", "motto height", design_.lettering.motto_height_mm, s / 4);
        const CorrectionMade& correction = design_.correction;
        if (state_.gives("correction: letter height") && correction.width_mm > 0 && correction.height_mm > 0 &&
            correction.letter_height_mm > 0.1 * std::min(correction.width_mm, correction.height_mm))
            report({"letter height"}, "correction",
                   fmt::format("letters of {} are too large for a correction plate of {} by {}",
                               shown(correction.letter_height_mm), shown(correction.width_mm),
                               shown(correction.height_mm)),
                   fmt::format("give at most {}", shown(0.1 * std::min(correction.width_mm, correction.height_mm))));
        fits("gnomon", "thickness", design_.gnomon.thickness_mm, s / 4);
        fits("cutting", "line width", design_.cutting.line_width_mm, s / 10);
    }

  private:
    [[nodiscard]] std::string shown(double mm) const { return length_text(mm, design_.units); }

    void fits(std::string_view section, std::string_view key, double mm, double most_mm) {
        if (mm > most_mm)
            report({key}, section,
                   fmt::format("{} is too large for a plate of {}", shown(mm), shown(smaller_side_mm(design_.plate))),
                   fmt::format("give at most {}", shown(most_mm)));
    }

    void report(std::initializer_list<std::string_view> keys, std::string_view section, std::string message,
                std::string hint) {
        const Entry* holder = root_.find(section);
        for (const std::string_view key : keys)
            if (const Entry* entry = holder == nullptr ? nullptr : holder->value.find(key)) {
                state_.error(entry->value.at, full_name(section, key), std::move(message), std::move(hint));
                return;
            }
        const Entry* plate = root_.find("plate");
        state_.error(plate == nullptr ? Position{} : plate->at, full_name(section, *keys.begin()), std::move(message),
                     std::move(hint));
    }

    const Design& design_;
    const Node& root_;
    ReadingState& state_;
};

void read_sections(Design& design, const Node& root, ReadingState& state) {
    const Section top{root, "", state};
    read_units(design, top);
    read_top(design, top);
    read_place(design, top);
    read_dial(design, top);
    read_plate(design, top);
    read_borders(design, top);
    read_gnomon(design, top);
    read_hours(design, top);
    read_also(design, top);
    read_dates(design, top);
    read_looks(design, top);
    read_correction(design, top);
    read_fixing(design, top);
    read_accuracy(design, top);
    read_lettering(design, top);
    read_cutting(design, top);
    read_print(design, top);
}

} // namespace

DesignReading read_design(std::string_view text, std::string file_name) {
    DocumentReading document = read_document(text, file_name);
    ReadingState state;
    state.file = std::move(file_name);
    state.errors = std::move(document.errors);
    Design design;
    design.file = state.file;
    if (document.root) {
        read_sections(design, *document.root, state);
        if (smaller_side_mm(design.plate) > 0.0) {
            fill_defaults(design, state);
            Agreement{design, *document.root, state}.check();
        }
    }
    for (const auto& [key, at] : state.given)
        design.where[key] = {at.line, at.column};
    if (state.errors.empty())
        return {std::move(design), {}};
    return {std::nullopt, first_errors(std::move(state.errors))};
}

DesignReading read_design_file(const std::filesystem::path& path) {
    FileText file = read_text_file(path, "design file");
    if (!file.text)
        return {std::nullopt, std::move(file.errors)};
    return read_design(*file.text, path.string());
}

} // namespace dialwright::cli
