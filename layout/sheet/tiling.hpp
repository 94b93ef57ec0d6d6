// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/export_error.hpp"
#include "layout/sheet/paper.hpp"
#include "layout/sheet/sheet.hpp"

#include <memory>
#include <optional>
#include <string>
#include <vector>

namespace dialwright::layout {

/// How the paper lies. A roll always lies across the page.
enum class PaperTurn { fewest_sheets, upright, lying };

struct PrintOptions {
    Paper paper;
    double margin_mm = 8.0;   ///< that the printer can't reach
    double overlap_mm = 10.0; ///< of the work on neighbouring sheets
    bool inches = false;      ///< the bars carry inches too
    std::string title;        ///< on every sheet
    std::string part;         ///< what of the work the sheets show, for their bookmarks
    PaperTurn turn = PaperTurn::fewest_sheets;
    /// What the sheets cover, where the drawing is one layer of more: the box of them all, so that the sheets of each
    /// layer fall on each other. Nothing: the drawing's own box.
    std::optional<Box> frame;
    std::string remark; ///< after the paper's size on every sheet: "corrected for this printer"
};

/// The paper and its size, for people: "A4, 210 × 297 mm", "Letter, 8.5 × 11 in (215.9 × 279.4 mm)".
[[nodiscard]] std::string paper_words(const PrintOptions& options, double width_mm, double height_mm);

/// The work on tiles of a paper: the turn and the upright or lying paper that need the fewest sheets, blank tiles left
/// out. Each sheet: the work in its opening, crosses that coincide when joined, its row and column, its neighbours, a
/// 100 mm bar in x and in y (50 or 20 mm on small paper) with what to measure, the paper's name, "100 %". One sheet, with
/// neither crosses nor neighbours, if the work fits it.
///
/// Rows are lettered from the top, columns numbered from the left: "B3". Neighbouring openings share `overlap_mm` of the
/// work; crosses stand on the middle line of the overlap, at the same point of the work on each sheet that shows it.
struct Tiling {
    int rows = 1, columns = 1;
    std::vector<Sheet> sheets;      ///< row by row from the top, blank ones left out
    std::vector<std::string> blank; ///< labels of the sheets left out ("B3")
    std::vector<Mark> map;          ///< a picture of the tiles over the work, in a box of its own at (0, 0)
    std::vector<Note> map_notes;
    Box map_box; ///< at most 120 × 120 mm
};
/// @throws ExportError  overlap and margins leave no room on the paper (the message says how much is left), it would
///                      take over 1000 sheets, or the drawing is empty or not finite
[[nodiscard]] Tiling tile(std::shared_ptr<const Drawing> drawing, const PrintOptions& options);

/// The work on one sheet of its own size, with the same bars and notes. The paper named in the options is not used.
/// @throws ExportError  a side would be over 5080 mm, or the drawing is empty or not finite
[[nodiscard]] Sheet own_size_sheet(std::shared_ptr<const Drawing> drawing, const PrintOptions& options);

} // namespace dialwright::layout
