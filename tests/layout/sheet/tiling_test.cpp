// SPDX-License-Identifier: MIT
#include "layout/sheet/tiling.hpp"

#include "layout/export/pdf.hpp"
#include "tests/layout/export/read_back.hpp"

#include <catch2/catch.hpp>

#include <chrono>
#include <cmath>
#include <limits>
#include <map>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

/// A round plate with lines, arcs, filled letters, and nothing symmetrical.
std::shared_ptr<Drawing> plate(double radius_mm) {
    auto drawing = std::make_shared<Drawing>();
    const auto at = [](double r, double degrees) {
        return Point{r * cos(Angle::degrees(degrees)), r * sin(Angle::degrees(degrees))};
    };
    drawing->marks.push_back({Layer::cut, {circle({0, 0}, radius_mm)}, 0.2, false, "rim"});
    for (int i = 0; i < 24; ++i) {
        drawing->marks.push_back({Layer::engrave,
                                  {polyline({at(radius_mm * 0.3, i * 9.5), at(radius_mm * 0.8, i * 9.5)})},
                                  i % 2 == 0 ? 0.5 : 0.25,
                                  false,
                                  "hour line"});
        const Point c = at(radius_mm * 0.9, i * 9.5);
        drawing->marks.push_back({Layer::fill, {circle(c, radius_mm * 0.04)}, 0, true, "letter"});
    }
    const Point from = at(radius_mm * 0.6, 10);
    drawing->marks.push_back({Layer::engrave,
                              {Path{from, {CurveTo{at(radius_mm, 40), {0, 0}, at(radius_mm * 0.7, 200)}}, false}},
                              0.3,
                              false,
                              "date line"});
    return drawing;
}

PrintOptions on(const char* paper) {
    PrintOptions options;
    options.paper = *paper_named(paper);
    options.title = "A dial for Fellbeck";
    return options;
}

Point back_to_work(const Window& window, Point p) {
    const Point q{p.x_mm - window.placing.shift.x_mm, p.y_mm - window.placing.shift.y_mm};
    const double c = cos(window.placing.turn), s = sin(window.placing.turn);
    return {q.x_mm * c + q.y_mm * s, -q.x_mm * s + q.y_mm * c};
}

bool has_text(const ReadPage& page, const std::string& words) {
    for (const ReadText& text : page.texts) {
        if (text.words.find(words) != std::string::npos) {
            return true;
        }
    }
    return false;
}

/// Lengths between the ends of long straight lines along x and along y that stand in the strips beside the opening.
bool has_bar(const ReadPage& page, const Box& opening, double length_mm, bool along_x) {
    for (const ReadLine& line : page.lines) {
        const double x = std::abs(line.to.x_mm - line.from.x_mm), y = std::abs(line.to.y_mm - line.from.y_mm);
        const bool beside = along_x ? line.from.y_mm < opening.bottom_mm : line.from.x_mm < opening.left_mm;
        if (!beside || std::abs((along_x ? x : y) - length_mm) > 0.01 || (along_x ? y : x) > 0.001) {
            continue;
        }
        // The end ticks stand on both its ends.
        int ticks = 0;
        for (const ReadLine& tick : page.lines) {
            const double tx = std::abs(tick.to.x_mm - tick.from.x_mm), ty = std::abs(tick.to.y_mm - tick.from.y_mm);
            if ((along_x ? tx : ty) < 0.001 && (along_x ? ty : tx) > 4) {
                for (const Point end : {line.from, line.to}) {
                    ticks += std::hypot(tick.from.x_mm - end.x_mm, tick.from.y_mm - end.y_mm) < 0.01 ||
                             std::hypot(tick.to.x_mm - end.x_mm, tick.to.y_mm - end.y_mm) < 0.01;
                }
            }
        }
        if (ticks >= 2) {
            return true;
        }
    }
    return false;
}

} // namespace

TEST_CASE("Tiles joined give the whole, and nothing is drawn beyond the printable area", "[layout]") {
    const struct {
        double radius_mm;
        const char* paper;
        double bar_mm;
        bool inches;
    } cases[] = {{180, "A4", 100, false}, {210, "Letter", 100, true}, {75, "A4", 100, false},
                 {60, "A6", 50, false},   {400, "A3", 100, false},    {250, "roll 610 mm", 100, false}};
    for (const auto& one : cases) {
        INFO(one.radius_mm << " mm on " << one.paper);
        const auto drawing = plate(one.radius_mm);
        PrintOptions options = on(one.paper);
        options.inches = one.inches;
        const Tiling tiling = tile(drawing, options);
        const auto pages = pages_of("tiles.pdf", pdf_of({"Tiles", "", tiling.sheets}));
        REQUIRE(pages.size() == tiling.sheets.size());
        // 1. Each point of the drawing is on a sheet, where its window says.
        for (const Mark& mark : drawing->marks) {
            for (const Path& path : mark.paths) {
                for (const Point p : flattened(path, 0.5)) {
                    double nearest = 1e9;
                    for (std::size_t i = 0; i < pages.size() && nearest > 0.005; ++i) {
                        const Window& window = tiling.sheets[i].windows.front();
                        if (window.opening.contains(window.placing(p))) {
                            nearest = std::min(nearest, distance_to(pages[i].lines, window.placing(p)));
                        }
                    }
                    CHECK(nearest < 0.005);
                }
            }
        }
        for (std::size_t i = 0; i < pages.size(); ++i) {
            const Sheet& sheet = tiling.sheets[i];
            CHECK_THAT(pages[i].width_mm, WithinAbs(sheet.width_mm, 0.001));
            CHECK_THAT(pages[i].height_mm, WithinAbs(sheet.height_mm, 0.001));
            // 2. Nothing beyond the printable area, and no note on the work.
            for (const ReadLine& line : pages[i].lines) {
                CHECK(sheet.printable.grown(0.001 - line.width_mm / 2).contains(line.from));
                CHECK(sheet.printable.grown(0.001 - line.width_mm / 2).contains(line.to));
            }
            for (const ReadText& text : pages[i].texts) {
                INFO(text.words);
                CHECK(sheet.printable.grown(0.05).contains(text.box));
                CHECK_FALSE(sheet.windows.front().opening.grown(-0.05).meets(text.box));
                CHECK(text.size_mm >= 2.499);
            }
            // 3. The bars measure what they say.
            CHECK(has_bar(pages[i], sheet.windows.front().opening, one.bar_mm, true));
            CHECK(has_bar(pages[i], sheet.windows.front().opening, one.bar_mm, false));
            CHECK(has_bar(pages[i], sheet.windows.front().opening, 101.6, true) == one.inches);
            CHECK(has_text(pages[i], options.paper.name));
            CHECK(has_text(pages[i], "A dial for Fellbeck"));
        }
    }
}

TEST_CASE("Crosses fall on the same points of the work on every sheet that shows them", "[layout]") {
    const Tiling tiling = tile(plate(210), on("A4"));
    REQUIRE(tiling.rows > 1);
    REQUIRE(tiling.columns > 1);
    std::map<std::pair<long, long>, int> seen; // in 1e-6 mm
    for (const Sheet& sheet : tiling.sheets) {
        for (const Mark& mark : sheet.furniture) {
            for (const Path& path : mark.paths) {
                if (mark.name == "crosses" && path.closed) {
                    const Point p = back_to_work(sheet.windows.front(), bounds_of(path).middle());
                    ++seen[{std::lround(p.x_mm * 1e6), std::lround(p.y_mm * 1e6)}];
                }
            }
        }
    }
    const std::size_t expected = static_cast<std::size_t>((tiling.rows + 1) * (tiling.columns + 1) - 4);
    CHECK(seen.size() == expected);
    for (const auto& [place, count] : seen) {
        CHECK(count >= 2);
    }
}

TEST_CASE("The fewest sheets are used", "[layout]") {
    const auto sheets = [](double width, double height, const char* paper) {
        auto drawing = std::make_shared<Drawing>();
        drawing->marks = {{Layer::cut, {rectangle({0, 0, width, height})}, 0.2, false, "rim"}};
        return tile(drawing, on(paper));
    };
    CHECK(sheets(170, 245, "A4").sheets.size() == 1);
    CHECK(sheets(245, 170, "A4").sheets.size() == 1); // lying, or turned
    CHECK(sheets(170, 480, "A4").sheets.size() == 2);
    CHECK(sheets(480, 170, "A4").sheets.size() == 2);
    CHECK(sheets(500, 900, "roll 610 mm").sheets.size() == 1);
    const Tiling roll = sheets(900, 500, "roll 610 mm");
    REQUIRE(roll.sheets.size() == 1);
    CHECK(roll.sheets[0].width_mm == 610);
    CHECK(roll.sheets[0].height_mm < 1000);
    const Tiling single = sheets(100, 100, "A4");
    CHECK(single.blank.empty());
    for (const Mark& mark : single.sheets[0].furniture) {
        CHECK(mark.name != "crosses");
    }
}

TEST_CASE("Blank tiles are left out, listed, and do not renumber the others", "[layout]") {
    auto ring = std::make_shared<Drawing>();
    ring->marks = {{Layer::cut, {circle({0, 0}, 500)}, 0.2, false, "rim"}};
    const Tiling tiling = tile(ring, on("A4"));
    CHECK_FALSE(tiling.blank.empty());
    CHECK(tiling.sheets.size() + tiling.blank.size() == static_cast<std::size_t>(tiling.rows * tiling.columns));
    std::string last;
    for (const Sheet& sheet : tiling.sheets) {
        const std::string label = sheet.title.substr(6);
        CHECK(std::find(tiling.blank.begin(), tiling.blank.end(), label) == tiling.blank.end());
    }
    CHECK(tiling.map_notes.size() == static_cast<std::size_t>(tiling.rows * tiling.columns));
    for (const Mark& mark : tiling.map) {
        CHECK(tiling.map_box.grown(0.2).contains(bounds_of(mark)));
    }
    ring->marks[0].filled = true; // now the inside is work too
    CHECK(tile(ring, on("A4")).blank.size() < tiling.blank.size());
}

TEST_CASE("A large plate is tiled quickly", "[layout]") {
    const auto drawing = plate(1000);
    const auto start = std::chrono::steady_clock::now();
    const Tiling tiling = tile(drawing, on("A4"));
    const double seconds = std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
    CHECK(tiling.sheets.size() > 70);
    CHECK(seconds < 3.0); // 0.02 s without sanitizers on a quiet machine
}

TEST_CASE("One sheet of the work's own size", "[layout]") {
    for (const double radius : {20.0, 210.0, 2500.0}) {
        const auto drawing = plate(radius);
        const Sheet sheet = own_size_sheet(drawing, on("A4"));
        const Window& window = sheet.windows.front();
        CHECK(window.opening.grown(1e-6).contains(bounds_of(window.placing(drawing->marks.front()))));
        const auto pages = pages_of("own.pdf", pdf_of({"Own", "", {sheet}}));
        CHECK_THAT(pages[0].width_mm, WithinAbs(sheet.width_mm, 0.001));
        CHECK(has_bar(pages[0], window.opening, 100, true));
        CHECK(has_bar(pages[0], window.opening, 100, false));
        for (const ReadText& text : pages[0].texts) {
            CHECK(sheet.printable.grown(0.05).contains(text.box));
        }
    }
    CHECK_THROWS_WITH(own_size_sheet(plate(2540), on("A4")), Catch::Contains("5080"));
}

TEST_CASE("What can't be laid on paper is refused in words", "[layout]") {
    PrintOptions options = on("A6");
    options.margin_mm = 40;
    CHECK_THROWS_WITH(tile(plate(300), options), Catch::Contains("A6") && Catch::Contains("left"));
    options = on("A4");
    options.overlap_mm = 170;
    CHECK_THROWS_AS(tile(plate(300), options), ExportError);
    options.overlap_mm = std::numeric_limits<double>::quiet_NaN();
    CHECK_THROWS_AS(tile(plate(300), options), ExportError);
    CHECK_THROWS_WITH(tile(plate(20000), on("A4")), Catch::Contains("sheets"));
    CHECK_THROWS_AS(tile(std::make_shared<Drawing>(), on("A4")), ExportError);
    const auto wrong = plate(100);
    wrong->marks[3].paths[0].start.y_mm = std::numeric_limits<double>::quiet_NaN();
    CHECK_THROWS_AS(tile(wrong, on("A4")), ExportError);
    CHECK_THROWS_AS(own_size_sheet(wrong, on("A4")), ExportError);
}
