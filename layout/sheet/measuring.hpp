// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// What stands beside the work on a sheet that goes to the bench: strips along the sides of the printable box for the
/// bars, the square, the neighbours' names and the notes, so that none of these ever lies on the work.
struct Surround {
    double left_mm = 0, right_mm = 0, bottom_mm = 0, top_mm = 0; ///< the strips
    double bar_x_mm = 100, bar_y_mm = 100;                       ///< lengths of the bars
    bool inches = false;
    bool tiled = false;
    bool notes_beside_bar = false;
    double notes_width_mm = 0;
    std::vector<std::string> title_lines, note_lines; ///< for the words it was made with
};

/// What is known of one sheet when its notes are written.
struct SheetWords {
    std::string paper; ///< with its size: "A4, 210 × 297 mm"
    std::string title;
    std::string label; ///< "B3"; empty when the work is on one sheet
    int number = 1, count = 1;
};

/// @param width_mm, height_mm  of the page
[[nodiscard]] Surround surround_of(double width_mm, double height_mm, double margin_mm, bool inches,
                                   const SheetWords& words);
/// What is left for the work, in page millimetres.
[[nodiscard]] Box opening_of(double width_mm, double height_mm, double margin_mm, const Surround& surround);
/// Adds the bars, the square and the notes to a sheet. Its words may be those that the strips were made for, or shorter.
void furnish(Sheet& sheet, const Box& opening, Surround surround, const SheetWords& words);

/// A bar of `length_mm` with a tick each 10 mm, from (0, 0) along x; ticks upwards, those of inches downwards. Measured
/// between the middles of its first and last tick, which stays right whatever the spread of the ink.
struct Bar {
    std::vector<Mark> marks;
    std::vector<Note> notes;
};
[[nodiscard]] Bar measuring_bar(double length_mm, bool inches);
/// How far a bar reaches above and below its base line.
inline constexpr double k_bar_up_mm = 5.2, k_bar_down_mm = 0.4, k_bar_down_inches_mm = 5.2;

/// The text in lines of at most `width_mm`, broken at spaces (a word that is longer stands alone).
[[nodiscard]] std::vector<std::string> wrapped(std::string_view text, double width_mm, double size_mm, bool bold);

} // namespace dialwright::layout
