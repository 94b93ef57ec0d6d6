// SPDX-License-Identifier: MIT
#include "layout/drawing/machine_order.hpp"

#include "layout/drawing/measures.hpp"
#include "layout/sheet/export_error.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <limits>
#include <numbers>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

Mark engraved(Path path, double width_mm = 0.3) {
    return {Layer::engrave, {std::move(path)}, width_mm, false, "line"};
}

double length_of(const Drawing& drawing) {
    double sum = 0;
    for (const Mark& mark : drawing.marks) {
        for (const Path& path : mark.paths)
            sum += layout::length_of(path);
    }
    return sum;
}

} // namespace

TEST_CASE("Marks come by process, contours from within", "[layout]") {
    const Path plate = rectangle({0, 0, 100, 100}), hole = circle({50, 50}, 30), island = rectangle({45, 45, 55, 55}),
               other = rectangle({200, 0, 300, 100});
    Drawing drawing{"order",
                    {{Layer::cut, {other, plate, hole}, 0.1, false, "two plates"},
                     {Layer::guide, {island}, 0.1, false, "aid"},
                     {Layer::cut, {island}, 0.1, false, "island"},
                     {Layer::drill, {circle({10, 10}, 2)}, 0.1, false, "bore"},
                     {Layer::score, {polyline({{0, 5}, {9, 5}})}, 0.1, false, "score"},
                     {Layer::fill, {circle({20, 20}, 5)}, 0, true, "spot"},
                     {Layer::engrave, {polyline({{0, 6}, {9, 6}})}, 0.1, false, "line"}}};
    const MachineWork work = ready_for_machine(drawing);
    std::vector<std::string> names;
    std::vector<double> areas;
    for (const Mark& mark : work.drawing.marks) {
        names.push_back(mark.name);
        if (mark.layer == Layer::cut)
            areas.push_back(std::abs(area_of(mark.paths.at(0))));
    }
    CHECK(names == std::vector<std::string>{"line", "spot", "score", "bore", "two plates", "island", "two plates",
                                            "two plates"});
    CHECK_THAT(areas[0], WithinAbs(10000, 1e-6)); // the plate by itself
    CHECK_THAT(areas[1], WithinAbs(100, 1e-6));   // then from the island outward
    CHECK_THAT(areas[2], WithinAbs(900 * std::numbers::pi, 1e-6));
    CHECK(work.dropped == 0);
    CHECK(ready_for_machine(drawing, true).drawing.marks.front().layer == Layer::guide);
}

TEST_CASE("A path drawn twice is drawn once, whichever way it runs and wherever it starts", "[layout]") {
    const Path ring = rectangle({0, 0, 10, 20});
    const Path from_elsewhere = polyline({{10, 20}, {0, 20}, {0, 0}, {10, 0}}, true);
    const Path bow{{0, 50}, {CurveTo{{5, 60}, {9, 60}, {9, 50}}}, false};
    Drawing drawing{"twice", {}};
    for (const Path& path : {ring, from_elsewhere, reversed(ring), bow, reversed(bow), circle({50, 50}, 7),
                             Path{{43, 50}, {ArcTo{{43, 50}, {50, 50}, Angle::degrees(-360)}}, true}})
        drawing.marks.push_back(engraved(path));
    const MachineWork work = ready_for_machine(drawing);
    CHECK(work.drawing.marks.size() == 3);
    CHECK(work.dropped == 10);
    CHECK(work.drawing.marks[0].paths[0].closed);
    // On another layer it is another matter.
    drawing.marks = {engraved(ring), {Layer::score, {ring}, 0.1, false, "scored"}};
    CHECK(ready_for_machine(drawing).dropped == 0);
}

TEST_CASE("Lines that run along others lose what is there", "[layout]") {
    Drawing drawing{"overlap",
                    {engraved(polyline({{0, 0}, {100, 50}})), engraved(polyline({{120, 60}, {60, 30}, {60, 90}}))}};
    const MachineWork work = ready_for_machine(drawing);
    CHECK(work.dropped == 1);
    REQUIRE(work.drawing.marks.size() == 2);
    REQUIRE(work.drawing.marks[1].paths.size() == 2);
    CHECK(end_of(work.drawing.marks[1].paths[0]) == Point{100, 50}); // the same number as the line that it gives way to
    CHECK(work.drawing.marks[1].paths[1].start == Point{60, 30});
    CHECK_THAT(length_of(work.drawing), WithinAbs(std::hypot(120, 60) + 60, 1e-9));

    // In the middle of another, across it, and parallel to it at a hair's breadth.
    drawing.marks = {engraved(polyline({{0, 0}, {90, 0}})), engraved(polyline({{30, 0}, {60, 0}})),
                     engraved(polyline({{45, -10}, {45, 10}})), engraved(polyline({{0, 0.01}, {90, 0.01}})),
                     engraved(polyline({{0, 0}, {90, 0.02}}))};
    CHECK(ready_for_machine(drawing).dropped == 1);
    // A long line over short ones is left with the gaps between them.
    drawing.marks = {engraved(polyline({{10, 0}, {20, 0}})), engraved(polyline({{50, 0}, {40, 0}})),
                     engraved(polyline({{0, 0}, {90, 0}}))};
    CHECK_THAT(length_of(ready_for_machine(drawing).drawing), WithinAbs(90, 1e-9));
    CHECK(ready_for_machine(drawing).drawing.marks[2].paths.size() == 3);
}

TEST_CASE("The wider stroke stays", "[layout]") {
    const Drawing drawing{"widths",
                          {engraved(polyline({{0, 0}, {90, 0}}), 0.2), engraved(polyline({{30, 0}, {60, 0}}), 0.8)}};
    const MachineWork work = ready_for_machine(drawing);
    REQUIRE(work.drawing.marks.size() == 2);
    CHECK(work.drawing.marks[0].paths.size() == 2);
    CHECK(work.drawing.marks[1].paths.size() == 1);
}

TEST_CASE("Arcs that run along others lose what is there", "[layout]") {
    const auto arc = [](double from_deg, double sweep_deg) {
        const auto at = [](double deg) {
            return Point{10 + 40 * cos(Angle::degrees(deg)), 40 * sin(Angle::degrees(deg))};
        };
        return engraved(
            Path{at(from_deg), {ArcTo{at(from_deg + sweep_deg), {10, 0}, Angle::degrees(sweep_deg)}}, false});
    };
    const double degree = 40 * std::numbers::pi / 180;
    Drawing drawing{"arcs", {arc(350, 60), arc(90, -80)}}; // 350° to 50°, 90° to 10°
    CHECK_THAT(length_of(ready_for_machine(drawing).drawing), WithinAbs(100 * degree, 1e-6));
    drawing.marks = {arc(100, 30), engraved(circle({10, 0}, 40))};
    CHECK_THAT(length_of(ready_for_machine(drawing).drawing), WithinAbs(360 * degree, 1e-6));
    drawing.marks = {arc(20, 320), arc(330, 60)}; // overlaps at both ends: 20° to 340° and 330° to 30°
    CHECK_THAT(length_of(ready_for_machine(drawing).drawing), WithinAbs(360 * degree, 1e-6));
    drawing.marks = {arc(0, 90), arc(90, 90), arc(180, -45)};
    CHECK(ready_for_machine(drawing).dropped == 1);
}

TEST_CASE("Two outlines with a side in common cut it once", "[layout]") {
    const Drawing drawing{"sides",
                          {{Layer::cut, {rectangle({0, 0, 50, 50})}, 0.1, false, "left"},
                           {Layer::cut, {rectangle({50, 10, 90, 40})}, 0.1, false, "right"}}};
    const MachineWork work = ready_for_machine(drawing);
    CHECK(work.dropped == 1);
    CHECK_THAT(length_of(work.drawing), WithinAbs(200 + 140 - 30, 1e-9));
    CHECK(work.drawing.marks.size() == 2);
    CHECK_FALSE(work.drawing.marks[1].paths[0].closed);
}

TEST_CASE("Contours of filled shapes go only where all of them is there", "[layout]") {
    const Mark letter{Layer::fill, {rectangle({0, 0, 10, 10}), reversed(rectangle({2, 2, 8, 8}))}, 0, true, "O"};
    const Mark blank{Layer::fill, {rectangle({0, 0, 10, 10}), reversed(rectangle({0, 0, 10, 10}))}, 0, true, "blank"};
    const MachineWork work = ready_for_machine({"fills", {letter, letter}});
    CHECK(work.dropped == 2);
    CHECK(work.drawing.marks.size() == 1);
    CHECK(ready_for_machine({"blank", {blank}}).dropped == 0);
}

TEST_CASE("What is no number goes to no machine", "[layout]") {
    CHECK_THROWS_AS(
        ready_for_machine({"bad", {engraved(polyline({{0, 0}, {std::numeric_limits<double>::infinity(), 0}}))}}),
        ExportError);
}

TEST_CASE("Guides do not widen the frame of a machine's file", "[layout]") {
    const Drawing drawing{"part",
                          {{Layer::guide, {polyline({{-50, 0}, {90, 0}})}, 0.1, false, "face"},
                           {Layer::engrave, {polyline({{1, 1}, {9, 4}})}, 0.4, false, "line"},
                           {Layer::cut, {rectangle({0, 0, 20, 10})}, 0.2, false, "edge"}}};
    const Box box = bounds_for_machine(drawing);
    CHECK_THAT(box.left_mm, WithinAbs(-0.1, 1e-9));
    CHECK_THAT(box.right_mm, WithinAbs(20.1, 1e-9));
    CHECK_THAT(box.height_mm(), WithinAbs(10.2, 1e-9));
    CHECK(bounds_for_machine(Drawing{"guides alone", {drawing.marks[0]}}).empty());
}
