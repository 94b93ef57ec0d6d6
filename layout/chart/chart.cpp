// SPDX-License-Identifier: MIT
#include "layout/chart/chart.hpp"

namespace dialwright::layout {

void put_chart(Flow& flow, const Chart& chart) {
    flow.need(chart.box.height_mm() + 2);
    flow.space(chart.box.height_mm() + 1);
    const Placing placing{{}, {flow.left(), flow.y()}, 1.0, 1.0, false};
    for (const Mark& mark : chart.marks)
        flow.sheet().furniture.push_back(placing(mark));
    for (Note note : chart.notes) {
        note.at = placing(note.at);
        flow.sheet().notes.push_back(std::move(note));
    }
}

} // namespace dialwright::layout
