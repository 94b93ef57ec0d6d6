// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/flow.hpp"

#include <vector>

namespace dialwright::layout {

/// A chart for a sheet of paper, its lower left corner at (0, 0).
struct Chart {
    std::vector<Mark> marks;
    std::vector<Note> notes;
    Box box; ///< of it all
};

/// The chart as the next block of a page, at the left.
void put_chart(Flow& flow, const Chart& chart);

} // namespace dialwright::layout
