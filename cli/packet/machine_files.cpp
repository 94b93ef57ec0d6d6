// SPDX-License-Identifier: MIT
#include "cli/packet/machine_files.hpp"

#include "layout/drawing/kerf.hpp"
#include "layout/export/dxf.hpp"
#include "layout/export/part_list.hpp"
#include "layout/export/svg.hpp"

#include <fmt/format.h>

namespace dialwright::cli {
namespace {

/// The piece as the machine works it.
std::shared_ptr<const layout::Drawing> for_machine(const WorkPiece& piece, const Machine& machine, Packet& packet) {
    std::shared_ptr<const layout::Drawing> drawing = piece.drawing;
    if (machine.kerf_mm > 0) {
        layout::Kerfed kerfed = layout::with_kerf(*drawing, machine.kerf_mm);
        packet.remarks.push_back(piece.title + ": " + kerfed.said);
        drawing = std::make_shared<layout::Drawing>(std::move(kerfed.drawing));
    }
    return machine.mirrored ? mirrored(*drawing) : drawing;
}

} // namespace

void add_machine_files(Packet& packet, const Commission& commission, const std::vector<WorkPiece>& pieces) {
    const Machine& machine = commission.design.machine;
    layout::SvgOptions svg{machine.layers, machine.hairline_mm, false};
    layout::DxfOptions dxf;
    dxf.layers = machine.layers;
    dxf.chords_only = !machine.arcs;
    dxf.flatten_mm = machine.flatten_mm;
    const std::string hand = machine.mirrored ? "-mirrored" : "";
    const std::string said = machine.mirrored ? ", MIRRORED" : "";
    std::vector<layout::ListedPart> parts;
    for (const WorkPiece& piece : pieces) {
        parts.push_back({piece.drawing.get(), 1, piece.stem});
        if (!piece.for_machine)
            continue;
        const auto drawing = for_machine(piece, machine, packet);
        const layout::Box frame = layout::bounds_of(*drawing);
        dxf.origin = {frame.left_mm, frame.bottom_mm}; // the same corner as the SVG's
        packet.items.push_back({{piece.stem + hand + ".svg", layout::svg_of(*drawing, frame, svg)},
                                piece.title + " for a machine, full scale" + said});
        packet.items.push_back({{piece.stem + hand + ".dxf", layout::dxf_of(*drawing, dxf)}, "the same as DXF"});
    }
    packet.items.push_back({{"parts.csv", layout::part_list_of(parts)}, "every part: its size, and how much is cut"});
}

} // namespace dialwright::cli
