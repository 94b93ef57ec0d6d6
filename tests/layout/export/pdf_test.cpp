// SPDX-License-Identifier: MIT
#include "layout/export/pdf.hpp"

#include "layout/sheet/note_width.hpp"
#include "tests/layout/export/read_back.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <limits>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

/// An F, so that what is mirrored or turned shows.
Path letter_f() {
    return polyline({{0, 0}, {0, 50}, {30, 50}, {30, 42}, {8, 42}, {8, 30}, {24, 30}, {24, 22}, {8, 22}, {8, 0}}, true);
}

Sheet sheet_with(const Drawing& drawing, const Placing& placing, const Box& opening) {
    Sheet sheet;
    sheet.paper = "A4";
    sheet.title = "Page";
    sheet.printable = {8, 8, 202, 289};
    sheet.windows.push_back({std::make_shared<Drawing>(drawing), placing, opening});
    return sheet;
}

Drawing mixed() {
    Drawing drawing;
    ArcTo arc{{}, {40, 30}, Angle::degrees(-250)};
    arc.to = point_at({60, 30}, {{60, 30}, arc.centre, arc.sweep * 2.0}, 0.5);
    drawing.marks = {{Layer::cut, {circle({50, 40}, 39.5)}, 0.3, false, "rim"},
                     {Layer::engrave, {Path{{60, 30}, {arc, LineTo{{70.12345, 3}}}, false}}, 0.3, false, "arc"},
                     {Layer::fill, {letter_f()}, 0, true, "F"}};
    return drawing;
}

std::string pdf_with(const Sheet& sheet) {
    return pdf_of({"A dial", "Full size", {sheet}});
}

} // namespace

TEST_CASE("Positions read back are those of the drawing", "[layout]") {
    const Drawing drawing = mixed();
    const Box opening{20, 20, 190, 280};
    int number = 0;
    for (const Placing& placing :
         {Placing{{}, {60, 100}, 1, 1, false}, Placing{Angle::degrees(90), {120, 60}, 1, 1, false},
          Placing{Angle::degrees(33), {140, 120}, 1.01, 0.99, true}}) {
        const auto pages =
            pages_of("placed" + std::to_string(++number) + ".pdf", pdf_with(sheet_with(drawing, placing, opening)));
        REQUIRE(pages.size() == 1);
        for (const Mark& mark : drawing.marks) {
            for (const Path& path : mark.paths) {
                for (const Point p : flattened(path, 0.05)) {
                    CHECK(distance_to(pages[0].lines, placing(p)) < 0.005);
                }
            }
        }
    }
}

TEST_CASE("An F keeps its hand, and turns it over when mirrored", "[layout]") {
    Drawing drawing;
    drawing.marks = {{Layer::fill, {letter_f()}, 0, true, "F"}};
    for (const bool mirrored : {false, true}) {
        const auto pages = pages_of(
            "f.pdf",
            pdf_with(sheet_with(drawing, {Angle::degrees(90), {100, 100}, 1, 1, mirrored}, {20, 20, 190, 280})));
        double twice = 0;
        for (const ReadLine& line : pages[0].lines) {
            twice += line.from.x_mm * line.to.y_mm - line.to.x_mm * line.from.y_mm;
        }
        // The ring of the F above runs clockwise.
        const double area = 8 * 50 + 22 * 8 + 16 * 8;
        CHECK_THAT(twice / 2, WithinAbs(mirrored ? area : -area, 0.5));
    }
}

TEST_CASE("Nothing is drawn outside the opening, however far it runs", "[layout]") {
    Drawing drawing;
    drawing.marks = {{Layer::engrave, {polyline({{-1e6, -4e5}, {1e6, 4e5}})}, 0.5, false, "far line"},
                     {Layer::engrave, {circle({0, 0}, 90), circle({1e5, 0}, 1e5)}, 0.5, false, "circles"},
                     {Layer::fill, {circle({60, 0}, 70), rectangle({-1e6, -10, 1e6, 10})}, 0, true, "shapes"}};
    const Box opening{50, 100, 150, 200};
    const auto pages = pages_of("far.pdf", pdf_with(sheet_with(drawing, {{}, {100, 150}, 1, 1, false}, opening)));
    CHECK(pages[0].lines.size() > 50);
    for (const ReadLine& line : pages[0].lines) {
        CHECK(opening.grown(0.251).contains(line.from));
        CHECK(opening.grown(0.251).contains(line.to));
    }
    // What lies in the opening is still there.
    CHECK(distance_to(pages[0].lines, {120, 150 + 20 * 0.4}) < 0.005);
    CHECK(distance_to(pages[0].lines, {100 - 90 * std::cos(2.4), 1000}) > 1);
}

TEST_CASE("Pages are exactly their sheets' sizes", "[layout]") {
    SheetBook book{"Sizes", "", {}};
    const Point sizes[] = {{210, 297}, {297, 210}, {215.9, 279.4}, {420.25, 433.75}, {5, 5080}};
    for (const Point size : sizes) {
        Sheet sheet;
        sheet.width_mm = size.x_mm;
        sheet.height_mm = size.y_mm;
        sheet.title = "Ωρα ½";
        book.sheets.push_back(sheet);
    }
    const std::string pdf = pdf_of(book);
    const auto pages = pages_of("sizes.pdf", pdf);
    REQUIRE(pages.size() == 5);
    for (std::size_t i = 0; i < 5; ++i) {
        CHECK_THAT(pages[i].width_mm, WithinAbs(sizes[i].x_mm, 0.001));
        CHECK_THAT(pages[i].height_mm, WithinAbs(sizes[i].y_mm, 0.001));
    }
    const std::string path = kept_as("sizes.pdf", pdf);
    CHECK(output_of("qpdf --check " + path).find("No syntax or stream encoding errors found") != std::string::npos);
    CHECK(output_of("qpdf --qdf " + path + " -").find("/PrintScaling /None") != std::string::npos);
    const std::string info = output_of("pdfinfo " + path);
    CHECK(info.find("Title:           Sizes") != std::string::npos);
    CHECK(info.find("Date") == std::string::npos);
    CHECK(output_of("mutool show " + path + " outline").find("Ωρα ½") != std::string::npos);
}

TEST_CASE("Notes are live text, as long as the layout was told", "[layout]") {
    Sheet sheet = sheet_with(mixed(), {{}, {60, 100}, 1, 1, false}, {20, 20, 190, 280});
    const std::string words = "Höhe 54° 14′ 30″ N · δ −23.4 × ½ · Ὥρα? ώρα → “Łódź”";
    sheet.notes = {{{20, 30}, words, 4, Align::left, false, {}},
                   {{190, 40}, words, 3, Align::right, true, {}},
                   {{105, 50}, words, 3, Align::middle, false, {}},
                   {{30, 100}, "up", 3, Align::left, false, Angle::degrees(90)}};
    const std::string pdf = pdf_with(sheet);
    const auto pages = pages_of("notes.pdf", pdf);
    REQUIRE(pages[0].texts.size() >= 4);
    for (const ReadText& text : pages[0].texts) {
        if (text.words == "up") {
            CHECK(text.box.height_mm() > 3);
            continue;
        }
        CHECK(text.words.find("54° 14′ 30″ N · δ −23.4 × ½") != std::string::npos);
        const bool bold = text.box.bottom_mm > 38 && text.box.bottom_mm < 42;
        CHECK_THAT(text.box.width_mm(), WithinAbs(note_width_mm(words, text.size_mm, bold), 0.05));
        if (bold) {
            CHECK_THAT(text.box.right_mm, WithinAbs(190, 0.05));
        }
    }
    CHECK(output_of("pdftotext -enc UTF-8 " + kept_as("notes.pdf", pdf) + " -").find("ώρα → “Łódź”") !=
          std::string::npos);
    CHECK(output_of("qpdf --check " + kept_as("notes.pdf", pdf)).find("WARNING") == std::string::npos);
}

TEST_CASE("The same book gives the same bytes", "[layout]") {
    Sheet sheet = sheet_with(mixed(), {{}, {60, 100}, 1, 1, false}, {20, 20, 190, 280});
    sheet.notes = {{{20, 30}, "twice", 4, Align::left, true, {}}};
    CHECK(pdf_with(sheet) == pdf_with(sheet));
}

TEST_CASE("What PDF can't carry is refused in words", "[layout]") {
    const double none = std::numeric_limits<double>::quiet_NaN();
    const Placing placing{{}, {60, 100}, 1, 1, false};
    const Box opening{20, 20, 190, 280};
    Drawing drawing = mixed();
    drawing.marks[1].name = "hour line XI";
    drawing.marks[1].paths[0].start.x_mm = none;
    CHECK_THROWS_WITH(pdf_with(sheet_with(drawing, placing, opening)), Catch::Contains("hour line XI"));
    CHECK_THROWS_AS(pdf_with(sheet_with(mixed(), {{}, {none, 0}, 1, 1, false}, opening)), ExportError);
    CHECK_THROWS_AS(pdf_with(sheet_with(mixed(), {{}, {0, 0}, 0, 1, false}, opening)), ExportError);
    Sheet sheet = sheet_with(mixed(), placing, opening);
    sheet.notes = {{{none, 0}, "nowhere", 3, Align::left, false, {}}};
    CHECK_THROWS_AS(pdf_with(sheet), ExportError);
    sheet.notes = {{{10, 10}, "no size", none, Align::left, false, {}}};
    CHECK_THROWS_AS(pdf_with(sheet), ExportError);
    sheet.notes.clear();
    sheet.width_mm = 5080.5;
    CHECK_THROWS_WITH(pdf_with(sheet), Catch::Contains("5080"));
    sheet.width_mm = none;
    CHECK_THROWS_AS(pdf_with(sheet), ExportError);
    CHECK_THROWS_AS(pdf_of({}), ExportError);
}
