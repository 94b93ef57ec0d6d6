// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// One kind of piece that the workshop makes.
struct ListedPart {
    const Drawing* drawing = nullptr; ///< as it is drawn, without the kerf
    int count = 1;
    std::string name{}; ///< empty: the drawing's own
};

/// The parts as CSV (RFC 4180, from memory; lines end in "\n"), a row each under
/// `part,count,processes,width_mm,height_mm,cut_mm,engraved_mm,scored_mm,drilled,area_mm2`.
/// Sizes are those of the outlines that are cut, else of all that is drawn, guides left out. Lengths and areas are of one
/// piece: `engraved_mm` with contours of filled shapes, `drilled` the number of circles to drill, `area_mm2` what is inside
/// the outlines less their holes, empty where nothing is cut.
/// @throws ExportError  a number is not finite
/// Accuracy: 0.05 mm and 0.5 mm² as written.
[[nodiscard]] std::string part_list_of(const std::vector<ListedPart>& parts);

} // namespace dialwright::layout
