// SPDX-License-Identifier: MIT
#include "layout/drawing/machine_order.hpp"

#include "layout/drawing/measures.hpp"
#include "layout/drawing/once.hpp"
#include "layout/sheet/export_error.hpp"

#include <algorithm>
#include <iterator>
#include <numeric>
#include <tuple>

namespace dialwright::layout {
namespace {

/// One stroke a mark, so that contours of several marks can be put into one order. Filled shapes stay whole.
std::vector<Mark> apart(std::vector<Mark> marks) {
    std::vector<Mark> single;
    for (Mark& mark : marks) {
        if (mark.filled || mark.paths.size() == 1) {
            single.push_back(std::move(mark));
            continue;
        }
        for (Path& path : mark.paths)
            single.push_back({mark.layer, {std::move(path)}, mark.width_mm, false, mark.name});
    }
    return single;
}

std::vector<Mark> inner_first(std::vector<Mark> marks) {
    marks = apart(std::move(marks));
    std::vector<const Path*> paths;
    for (const Mark& mark : marks)
        paths.push_back(&mark.paths.front());
    const std::vector<Nest> nests = nests_of(paths);
    std::vector<std::size_t> order(marks.size());
    std::iota(order.begin(), order.end(), 0U);
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
        return std::tie(nests[a].outermost, nests[b].depth) < std::tie(nests[b].outermost, nests[a].depth);
    });
    std::vector<Mark> ordered;
    for (const std::size_t place : order)
        ordered.push_back(std::move(marks[place]));
    return ordered;
}

} // namespace

Box bounds_for_machine(const Drawing& drawing) {
    Box box;
    for (const Mark& mark : drawing.marks)
        if (mark.layer != Layer::guide)
            box.add(bounds_of(mark));
    return box;
}

MachineWork ready_for_machine(const Drawing& drawing, bool with_guides) {
    for (const Mark& mark : drawing.marks) {
        if (!is_finite(mark))
            throw ExportError("\"" + mark.name + "\" runs off to infinity, so no file for a machine was made.");
    }
    MachineWork work{{drawing.name, {}}, 0};
    for (const Layer layer : k_machine_order) {
        if (layer == Layer::guide && !with_guides)
            continue;
        std::vector<Mark> marks;
        std::copy_if(drawing.marks.begin(), drawing.marks.end(), std::back_inserter(marks),
                     [&](const Mark& mark) { return mark.layer == layer; });
        work.dropped += draw_once(marks);
        std::erase_if(marks, [](const Mark& mark) { return mark.paths.empty(); });
        if (layer == Layer::cut)
            marks = inner_first(std::move(marks));
        std::move(marks.begin(), marks.end(), std::back_inserter(work.drawing.marks));
    }
    return work;
}

} // namespace dialwright::layout
