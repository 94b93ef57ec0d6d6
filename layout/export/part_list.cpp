// SPDX-License-Identifier: MIT
#include "layout/export/part_list.hpp"

#include "layout/drawing/machine_order.hpp"
#include "layout/drawing/measures.hpp"
#include "layout/export/plain_number.hpp"

#include <fmt/format.h>

#include <cmath>
#include <set>

namespace dialwright::layout {
namespace {

struct Measured {
    std::set<Layer> layers;
    Box cut, all;
    double cut_mm = 0, engraved_mm = 0, scored_mm = 0, area_mm2 = 0;
    int drilled = 0;
    bool has_area = false;
};

Measured measured(const Drawing& drawing) {
    const Drawing work = ready_for_machine(drawing).drawing; // each line once
    Measured sum;
    std::vector<const Path*> outlines;
    for (const Mark& mark : work.marks) {
        sum.layers.insert(mark.layer);
        for (const Path& path : mark.paths) {
            const double length_mm = length_of(path);
            sum.all.add(bounds_of(path));
            if (mark.layer == Layer::cut) {
                sum.cut_mm += length_mm;
                sum.cut.add(bounds_of(path));
                if (path.closed)
                    outlines.push_back(&path);
            } else if (mark.layer == Layer::score) {
                sum.scored_mm += length_mm;
            } else if (mark.layer == Layer::drill) {
                sum.drilled += path.closed ? 1 : 0; // open lines of it are the crosses in the circles
            } else {
                sum.engraved_mm += length_mm;
            }
        }
    }
    const std::vector<Nest> nests = nests_of(outlines);
    for (std::size_t i = 0; i < outlines.size(); ++i)
        sum.area_mm2 += (nests[i].depth % 2 == 0 ? 1 : -1) * std::abs(area_of(*outlines[i]));
    sum.has_area = !outlines.empty();
    return sum;
}

std::string field(const std::string& text) {
    if (text.find_first_of(",\"\r\n") == std::string::npos)
        return text;
    std::string quoted = "\"";
    for (const char c : text) {
        quoted += c;
        if (c == '"')
            quoted += '"';
    }
    return quoted + '"';
}

} // namespace

std::string part_list_of(const std::vector<ListedPart>& parts) {
    std::string csv = "part,count,processes,width_mm,height_mm,cut_mm,engraved_mm,scored_mm,drilled,area_mm2\n";
    for (const ListedPart& part : parts) {
        const Measured sum = measured(*part.drawing);
        const Box& box = sum.cut.empty() ? sum.all : sum.cut;
        csv += field(part.name.empty() ? part.drawing->name : part.name) + ',' + std::to_string(part.count) + ',';
        bool first = true;
        for (const Layer layer : k_machine_order) {
            if (!sum.layers.contains(layer))
                continue;
            csv += first ? "" : " ";
            csv += name_of(layer);
            first = false;
        }
        for (const double mm : {box.width_mm(), box.height_mm(), sum.cut_mm, sum.engraved_mm, sum.scored_mm}) {
            csv += ',';
            add_number(csv, mm, 1, 1);
        }
        csv += ',' + std::to_string(sum.drilled) + ',';
        if (sum.has_area)
            csv += fmt::format("{:.0f}", sum.area_mm2);
        csv += '\n';
    }
    return csv;
}

} // namespace dialwright::layout
