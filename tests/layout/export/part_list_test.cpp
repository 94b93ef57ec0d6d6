// SPDX-License-Identifier: MIT
#include "layout/export/part_list.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;

TEST_CASE("A part list gives sizes, lengths and areas that a rule and a sheet of squares give too", "[layout]") {
    const Drawing plate{"plate, \"north\"",
                        {{Layer::cut, {rectangle({0, 0, 200, 100}), circle({50, 50}, 10)}, 0.1, false, "outline"},
                         {Layer::engrave, {polyline({{20, 20}, {120, 20}})}, 0.5, false, "line"},
                         {Layer::engrave, {polyline({{120, 20}, {70, 20}})}, 0.5, false, "half of it again"},
                         {Layer::drill, {circle({10, 10}, 2), polyline({{8, 10}, {12, 10}})}, 0.1, false, "hole"},
                         {Layer::guide, {polyline({{-50, 0}, {300, 0}})}, 0.1, false, "aid"}}};
    const Drawing gauge{"gauge", {{Layer::score, {polyline({{0, 0}, {30, 40}})}, 0.1, false, "edge"}}};
    // 200 · 100 − π · 10² = 19685.8; 2 · (200 + 100) + 2π · 10 = 662.8
    CHECK(part_list_of({{&plate, 2}, {&gauge, 1}}) ==
          "part,count,processes,width_mm,height_mm,cut_mm,engraved_mm,scored_mm,drilled,area_mm2\n"
          "\"plate, \"\"north\"\"\",2,engrave drill cut,200.0,100.0,662.8,100.0,0.0,1,19686\n"
          "gauge,1,score,30.0,40.0,0.0,0.0,50.0,0,\n");
}
