// SPDX-License-Identifier: MIT
#include "layout/export/pdf.hpp"
#include "layout/survey/board.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <set>

using Catch::Matchers::WithinAbs;
using namespace dialwright::layout;

TEST_CASE("The board has a line at every millimetre, and none twice", "[board]") {
    const Drawing board = board_drawing(80, 30, 200);
    std::set<int> across, down;
    int grid_lines = 0;
    for (const Mark& mark : board.marks) {
        if (mark.name != "millimetres" && mark.name != "five millimetres" && mark.name != "centimetres")
            continue;
        for (const Path& path : mark.paths) {
            ++grid_lines;
            const Point to = end_of(path);
            const bool upright = path.start.x_mm == to.x_mm;
            const double at = upright ? path.start.x_mm : path.start.y_mm;
            CHECK(at == std::round(at));
            CHECK((int(at) % 10 == 0) == (mark.name == "centimetres"));
            (upright ? across : down).insert(int(at));
        }
    }
    CHECK(across.size() == 161);
    CHECK(down.size() == 231);
    CHECK(grid_lines == 161 + 231);
    CHECK(*across.begin() == -80);
    CHECK(*down.begin() == -200);
    CHECK(*down.rbegin() == 30);
}

TEST_CASE("The sheets are at full scale, within what the printer reaches, and tell of the Sun", "[board]") {
    for (const char* name : {"A4", "A3", "Letter"}) {
        PrintOptions options;
        options.paper = *paper_named(name);
        const std::vector<Sheet> sheets = survey_board(options);
        REQUIRE(sheets.size() >= 2);
        bool warned = false, placed = false;
        for (const Sheet& sheet : sheets) {
            for (const Note& note : sheet.notes)
                warned = warned || note.text.find("Never look at the Sun") != std::string::npos;
            for (const Window& window : sheet.windows) {
                placed = true;
                CHECK(window.placing.scale_x == 1.0);
                CHECK(window.placing.scale_y == 1.0);
                for (const Mark& mark : window.drawing->marks)
                    CHECK(sheet.printable.contains(bounds_of(window.placing(mark))));
            }
        }
        CHECK(warned);
        CHECK(placed);
        CHECK_FALSE(pdf_of({"board", "", sheets}).empty());
    }
    PrintOptions small;
    small.paper = {"A7", 74, 105};
    CHECK_THROWS_AS(survey_board(small), ExportError);
}
