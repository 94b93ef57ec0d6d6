// SPDX-License-Identifier: MIT
#include "layout/survey/board.hpp"
#include "layout/sheet/flow.hpp"

#include <fmt/format.h>

#include <cmath>

namespace dialwright::layout {
namespace {

constexpr double k_hole_mm = 3.0; ///< where the peg stands: a mark to drill by
constexpr double k_above_mm = 30.0;

void add_line(Mark& mark, Point from, Point to) {
    mark.paths.push_back(polyline({from, to}));
}

Mark stroke(Layer layer, double width_mm, std::string name) {
    Mark mark;
    mark.layer = layer;
    mark.width_mm = width_mm;
    mark.name = std::move(name);
    return mark;
}

void label_grid(Flow& flow, Point hole, double beside_mm, double above_mm, double below_mm) {
    constexpr double k_size_mm = 2.3;
    for (int mm = -int(beside_mm); mm <= int(beside_mm); mm += 20)
        if (mm != 0)
            flow.note({hole.x_mm + mm, hole.y_mm + above_mm + 1.0}, fmt::format("{}", mm), k_size_mm, false,
                      Align::middle);
    for (int mm = -int(above_mm) + 10; mm <= int(below_mm); mm += 20)
        if (mm != 0)
            flow.note({hole.x_mm - beside_mm - 1.0, hole.y_mm - mm - 0.8}, fmt::format("{}", mm), k_size_mm, false,
                      Align::right);
}

void say_how(Flow& flow) {
    flow.list(
        "Never look at the Sun",
        {"Work from the shadow alone, with your back to the Sun: not a moment through dark glass, a lens or a gap. "
         "On a ladder or a scaffold have someone hold it."});
    flow.list(
        "To survey a wall",
        {"Measure both bars on the sheet with the grid. If either is off, the print is to the wrong scale.",
         "Glue the sheet on a flat stiff board, and drill through the hole for a straight peg: 40 to 80 mm from the "
         "board's face to its tip, the tip pointed or cut square. Try it from two sides with a set square.",
         "Measure the peg from the board's face to its tip, to half a millimetre.",
         "Hang a plumb line from the nail mark above the hole, over the heavy line. Hold or screw the board flat "
         "against the wall where the dial will be, so that thread and line are one. If the wall is rough, "
         "lay a straight batten on it and the board on that.",
         "Set a watch by a time signal, to a second or two.",
         "Mark the middle of the tip's shadow with a sharp pencil, note the time beside it to the second, and read it "
         "off: to the right of the hole (to the left is below zero) and down.",
         "Take six readings or more over some hours, some with the Sun well to one side of the wall and some on the "
         "other; on another day too, if the weather gives one. See that the thread still hangs on its line.",
         "Write them into a file and run dialwright survey on it."},
        true);
}

void room_for_readings(Flow& flow) {
    constexpr std::size_t k_rows = 12;
    flow.heading("Readings");
    const std::string blank = "..............................";
    std::vector<std::vector<std::string>> rows(k_rows, {blank, blank, blank, blank});
    flow.table({{"day"}, {"clock"}, {"right mm"}, {"down mm"}}, rows);
}

} // namespace

Drawing board_drawing(double beside_mm, double above_mm, double below_mm) {
    Mark fine = stroke(Layer::guide, 0.06, "millimetres"), fives = stroke(Layer::guide, 0.16, "five millimetres");
    Mark tens = stroke(Layer::engrave, 0.18, "centimetres");
    const auto kind_of = [&](int mm) -> Mark& { return mm % 10 == 0 ? tens : mm % 5 == 0 ? fives : fine; };
    for (int mm = -int(beside_mm); mm <= int(beside_mm); ++mm)
        add_line(kind_of(mm), {double(mm), above_mm}, {double(mm), -below_mm});
    for (int mm = -int(below_mm); mm <= int(above_mm); ++mm)
        add_line(kind_of(mm), {-beside_mm, double(mm)}, {beside_mm, double(mm)});
    Mark plumb = stroke(Layer::engrave, 0.6, "plumb line");
    add_line(plumb, {0, above_mm}, {0, k_hole_mm});
    add_line(plumb, {0, -k_hole_mm}, {0, -below_mm});
    Mark level = stroke(Layer::engrave, 0.4, "level line");
    add_line(level, {-beside_mm, 0}, {-k_hole_mm, 0});
    add_line(level, {k_hole_mm, 0}, {beside_mm, 0});
    Mark hole = stroke(Layer::drill, 0.3, "peg");
    hole.paths.push_back(circle({0, 0}, k_hole_mm));
    add_line(hole, {-k_hole_mm / 2, 0}, {k_hole_mm / 2, 0});
    add_line(hole, {0, -k_hole_mm / 2}, {0, k_hole_mm / 2});
    Mark nail = stroke(Layer::drill, 0.4, "nail");
    nail.paths.push_back(circle({0, above_mm - 5}, 1.0));
    return {"survey board", {fine, fives, tens, plumb, level, hole, nail}};
}

std::vector<Sheet> survey_board(const PrintOptions& options) {
    Flow flow{options, "Survey board"};
    flow.heading("Survey board: hole for the peg, millimetres to the right and down of it, plumb line");
    const double beside_mm = std::floor((flow.width() - 14) / 20) * 10;
    const double room_mm = std::floor((flow.room() - 14) / 10) * 10;
    const double below_mm = room_mm - k_above_mm;
    if (beside_mm < 40 || below_mm < 60)
        throw ExportError{"the paper is too small for a survey board: give A4, Letter or larger"};
    flow.space(4);
    const auto drawing = std::make_shared<Drawing>(board_drawing(beside_mm, k_above_mm, below_mm));
    if (!flow.full_size(drawing))
        throw ExportError{"the paper is too small for a survey board: give A4, Letter or larger"};
    const Box box = bounds_of(*drawing).grown(0.5);
    const Point hole{flow.left() + flow.width() / 2, flow.y() - box.bottom_mm};
    label_grid(flow, hole, beside_mm, k_above_mm, below_mm);
    flow.need(flow.whole_room());
    say_how(flow);
    room_for_readings(flow);
    return flow.sheets();
}

} // namespace dialwright::layout
