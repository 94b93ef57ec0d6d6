// SPDX-License-Identifier: MIT
#include "layout/sheet/compensation.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {
PrintOptions on(const char* paper) {
    PrintOptions options;
    options.paper = paper_named(paper).value();
    return options;
}
} // namespace

TEST_CASE("a sheet is stretched against the printer's error, whichever way it lies", "[sheet]") {
    // Across the feed a bar of 100 mm came out as 99, along it as 101.
    const Compensation printer{0.99, 1.01};
    Sheet upright, lying, roll;
    lying.width_mm = 297;
    lying.height_mm = 210;
    roll.width_mm = 610; // across the printer, though the page is cut off shorter than it is wide
    roll.height_mm = 300;
    compensate(upright, printer, false);
    compensate(lying, printer, false);
    compensate(roll, printer, true);
    for (const Sheet* sheet : {&upright, &roll}) {
        CHECK_THAT(sheet->stretch_x * 0.99, WithinAbs(1, 1e-12));
        CHECK_THAT(sheet->stretch_y * 1.01, WithinAbs(1, 1e-12));
    }
    CHECK_THAT(lying.stretch_x * 1.01, WithinAbs(1, 1e-12));
    CHECK_THAT(lying.stretch_y * 0.99, WithinAbs(1, 1e-12));
}

TEST_CASE("what is stretched stays inside the printer's own margin", "[sheet]") {
    for (const double across : {0.95, 1.0, 1.05})
        for (const double along : {0.95, 1.0, 1.05}) {
            const Paper paper = paper_named("A4").value();
            const double margin = margin_for({across, along}, paper, 8);
            CHECK(paper.short_mm / 2 - (paper.short_mm / 2 - margin) / across >= 8 - 1e-9);
            CHECK(paper.long_mm / 2 - (paper.long_mm / 2 - margin) / along >= 8 - 1e-9);
        }
}

TEST_CASE("the calibration sheet has two bars as long as what is written beside them", "[sheet]") {
    for (const char* paper : {"A4", "Letter", "A0", "roll 610 mm"})
        for (const bool inches : {false, true}) {
            INFO(paper << (inches ? " in inches" : ""));
            PrintOptions options = on(paper);
            options.inches = inches;
            const Sheet sheet = calibration_sheet(options);
            REQUIRE(sheet.furniture.size() == 2);
            CHECK(sheet.stretch_x == 1.0);
            for (const Mark& bar : sheet.furniture) {
                CHECK(sheet.printable.contains(bounds_of(bar)));
                const Box box = bounds_of(bar.paths.front());
                const double step = inches ? 12.7 : 10.0, length = std::max(box.width_mm(), box.height_mm());
                CHECK_THAT(length / step, WithinAbs(std::round(length / step), 1e-9));
                CHECK(length > 0.7 * sheet.width_mm);
                CHECK(bar.paths.size() == 2 + std::size_t(std::lround(length / step)));
            }
        }
    PrintOptions narrow = on("A4");
    narrow.margin_mm = 90;
    CHECK_THROWS_AS(calibration_sheet(narrow), ExportError);
}
