// SPDX-License-Identifier: MIT
#include "layout/sheet/measuring.hpp"

#include "layout/sheet/note_width.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

TEST_CASE("A bar is as long as it says, between the middles of its end ticks", "[layout]") {
    for (const double length : {20.0, 50.0, 100.0}) {
        const Bar bar = measuring_bar(length, true);
        REQUIRE(bar.marks.size() == 2);
        const Path& first = bar.marks[0].paths[1];
        const Path& last = bar.marks[0].paths.back();
        CHECK_THAT(last.start.x_mm - first.start.x_mm, WithinAbs(length, 1e-9));
        CHECK(end_of(last).y_mm == end_of(first).y_mm); // the end ticks stand out by their height
        for (std::size_t i = 2; i + 1 < bar.marks[0].paths.size(); ++i) {
            CHECK(end_of(bar.marks[0].paths[i]).y_mm < end_of(first).y_mm / 2);
        }
        // The wording stands between the end ticks.
        for (const Note& note : bar.notes) {
            CHECK(note_width_mm(note.text, note.size_mm, note.bold) < length * 1.016 - 2);
            CHECK(note.size_mm >= 2.5);
        }
    }
    const Bar bar = measuring_bar(100, true);
    CHECK_THAT(end_of(bar.marks[1].paths.back()).x_mm, WithinAbs(101.6, 1e-9));
    CHECK(bar.notes[1].text.substr(0, 8) == "4.000 in");
}

TEST_CASE("Small paper gets a shorter bar", "[layout]") {
    const SheetWords words{"A6, 105 × 148 mm", "A dial", "A1", 1, 4};
    CHECK(surround_of(105, 148, 8, false, words).bar_x_mm == 50);
    CHECK(surround_of(210, 297, 8, false, words).bar_x_mm == 100);
    CHECK(surround_of(210, 297, 8, false, words).bar_y_mm == 100);
}

TEST_CASE("Text is broken at spaces and fits", "[layout]") {
    const std::string text = "Print at 100 % (actual size), never “fit to page”, and measure both bars before you cut.";
    for (const double width : {30.0, 60.0, 200.0}) {
        std::string joined;
        for (const std::string& line : wrapped(text, width, 2.6, false)) {
            CHECK(note_width_mm(line, 2.6) <= width);
            joined += (joined.empty() ? "" : " ") + line;
        }
        CHECK(joined == text);
    }
    CHECK(wrapped("", 50, 3, false).empty());
}
