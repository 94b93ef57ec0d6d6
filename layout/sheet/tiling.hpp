// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/sheet.hpp"

#include <optional>
#include <string_view>

namespace dialwright::layout {

/// A paper that printers take. Sides in mm, the shorter first; `roll` papers have a width and any length up to 5 m.
struct Paper {
    std::string name;
    double short_mm = 210.0, long_mm = 297.0;
};
/// "A4", "a3", "Letter", "Tabloid", "B2", … without regard to case; nothing when unknown.
[[nodiscard]] std::optional<Paper> paper_named(std::string_view name);
[[nodiscard]] std::vector<std::string> paper_names();

struct PrintOptions {
    Paper paper;
    double margin_mm = 8.0;   ///< that the printer can't reach
    double overlap_mm = 10.0; ///< of the work on neighbouring sheets
    bool inches = false;      ///< the bars are labelled in inches too
    std::string title;        ///< on every sheet
};

/// The work on tiles of a paper: the turn and the upright or lying paper that need the fewest sheets, blank tiles left
/// out. Each sheet: the work in its opening, corner crosses that coincide when joined, its row and column, its
/// neighbours, a 100 mm bar in x and in y with what to measure, the paper's name, "100 %". One sheet if it fits.
/// @throws ExportError  overlap and margins leave no room on the paper (the message says how much is left)
struct Tiling {
    int rows = 1, columns = 1;
    std::vector<Sheet> sheets;      ///< row by row from the top, blank ones left out
    std::vector<std::string> blank; ///< labels of the sheets left out ("B3")
    std::vector<Mark> map;          ///< a picture of the tiles over the work, in a box of its own at (0, 0)
    std::vector<Note> map_notes;
    Box map_box;
};
[[nodiscard]] Tiling tile(std::shared_ptr<const Drawing> drawing, const PrintOptions& options);

/// The work on one sheet of its own size, with the same bars and notes.
/// @throws ExportError  a side is over 5080 mm
[[nodiscard]] Sheet own_size_sheet(std::shared_ptr<const Drawing> drawing, const PrintOptions& options);

} // namespace dialwright::layout
