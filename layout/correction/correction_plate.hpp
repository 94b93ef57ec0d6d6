// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/correction.hpp"
#include "layout/drawing/drawing.hpp"
#include "layout/plate/plate_spec.hpp"

#include <optional>
#include <string>
#include <vector>

namespace dialwright::layout {

/// The plate beside a dial that says how to come from its reading to clock time.
enum class CorrectionForm {
    graph, ///< minutes over the months
    ring,  ///< round: the year as a circle, the whole minutes marked on it
    table  ///< dates and their minutes
};

/// How the dates of a table follow each other.
enum class TableSteps {
    five_days,     ///< 1, 6, 11, 16, 21, 26 of each month
    ten_days,      ///< 1, 11, 21
    fifteen_days,  ///< 1, 16
    whole_minutes, ///< the dates from which on another whole minute is the nearest
};

struct CorrectionSpec {
    CorrectionForm form = CorrectionForm::graph;
    double width_mm = 0.0, height_mm = 0.0; ///< a ring: both its diameter
    double letter_height_mm = 0.0;          ///< capitals and figures
    std::optional<TableSteps> steps;        ///< of a table; nothing: the closest for which the letters have room
    std::string family = "EB Garamond";
    Cutting cutting;
    bool sentences = true;        ///< false where a graph stands beside them: heading and sentences are left out
    bool summer_numerals = false; ///< the dial has a row of numerals for summer time
};

struct CorrectionPlate {
    Drawing drawing;                 ///< middle of the plate at the origin
    double letter_height_mm = 0.0;   ///< as drawn
    std::optional<TableSteps> steps; ///< of a table
    std::vector<std::string> warnings;
};

/// The least height of capitals whose strokes and counters the tool leaves apart: 5 widths of its line, and no less
/// than 1.5 mm. Common practice, no source.
[[nodiscard]] double least_letter_mm(const Cutting& cutting);

/// Draws the plate on its workshop layers: outline to cut, all else engraved, lettering as outlines. Lines, figures and
/// words that stand closer than the tool allows are thinned: minutes and days by their step, a table by its dates,
/// letters down to least_letter_mm().
/// @param correction  one that is needed (asserted)
/// @throws std::invalid_argument  the plate is too small for it; the message says so to the maker
/// @throws LetteringError
/// Accuracy: the graph's curve and the ring's marks stand within 0.01 mm of the correction's own.
/// Test: tests/layout/correction/correction_plate_test.cpp
[[nodiscard]] CorrectionPlate draw_correction(const Correction& correction, const CorrectionSpec& spec);

} // namespace dialwright::layout
