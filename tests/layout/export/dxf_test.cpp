// SPDX-License-Identifier: MIT
#include "layout/export/dxf.hpp"

#include "layout/export/pdf.hpp"
#include "layout/export/svg.hpp"
#include "layout/lettering/lettering.hpp"
#include "layout/sheet/export_error.hpp"
#include "tests/layout/export/read_back.hpp"

#include <catch2/catch.hpp>

#include <clocale>
#include <cmath>
#include <limits>
#include <map>
#include <set>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

struct Round {
    Point centre;
    double radius_mm = 0, from_deg = 0, to_deg = 0;
};
struct Entity {
    std::string kind, layer;
    bool closed = false;
};

/// What ezdxf makes of a file.
struct ReadDxf {
    int faults = -1, units = 0, metric = 0;
    std::string version;
    Box extent;
    std::map<std::string, int> layers;
    std::set<std::string> kinds;
    std::vector<Entity> entities;
    std::vector<ReadLine> lines;
    std::vector<Round> circles, arcs;
};

ReadDxf read_dxf(const std::string& name, const std::string& dxf) {
    const std::string script = std::string{DIALWRIGHT_SOURCE_DIR} + "/tests/layout/export/read_dxf.py";
    std::istringstream facts{output_of("/usr/bin/python3 " + script + " " + kept_as(name, dxf))};
    ReadDxf read;
    for (std::string row; std::getline(facts, row);) {
        std::istringstream in{row};
        std::string kind, word;
        in >> kind;
        if (kind == "faults") {
            in >> read.faults;
        } else if (kind == "units") {
            in >> read.units >> read.metric >> read.version;
        } else if (kind == "extent") {
            in >> read.extent.left_mm >> read.extent.bottom_mm >> read.extent.right_mm >> read.extent.top_mm;
        } else if (kind == "layer") {
            in >> word >> read.layers[word];
        } else if (kind == "kind") {
            read.kinds.insert((in >> word, word));
        } else if (kind == "entity") {
            Entity& entity = read.entities.emplace_back();
            in >> entity.kind >> entity.layer >> entity.closed;
        } else if (kind == "line") {
            ReadLine& line = read.lines.emplace_back();
            in >> word >> line.from.x_mm >> line.from.y_mm >> line.to.x_mm >> line.to.y_mm;
        } else if (kind == "circle" || kind == "arc") {
            Round& round = (kind == "arc" ? read.arcs : read.circles).emplace_back();
            in >> word >> round.centre.x_mm >> round.centre.y_mm >> round.radius_mm >> round.from_deg >> round.to_deg;
        } else {
            FAIL(row);
        }
    }
    return read;
}

Path arc_path(Point centre, double radius_mm, double from_deg, double sweep_deg) {
    const auto at = [&](double deg) {
        const Angle a = Angle::degrees(deg);
        return Point{centre.x_mm + radius_mm * cos(a), centre.y_mm + radius_mm * sin(a)};
    };
    return {at(from_deg), {ArcTo{at(from_deg + sweep_deg), centre, Angle::degrees(sweep_deg)}}, false};
}

/// An F of lines, an arc, a slot with round ends, a filled bow, a circle: no symmetry in it.
Drawing letter_f() {
    Path slot{{20, 10},
              {LineTo{{40, 10}}, ArcTo{{40, 16}, {40, 13}, Angle::degrees(180)}, LineTo{{20, 16}},
               ArcTo{{20, 10}, {20, 13}, Angle::degrees(180)}},
              true};
    Drawing drawing{"F", {}};
    drawing.marks = {
        {Layer::cut, {rectangle({-5, -5, 65, 105})}, 0.1, false, "outline"},
        {Layer::cut, {slot}, 0.1, false, "slot"},
        {Layer::engrave, {polyline({{0, 0}, {0, 100}, {60, 100}})}, 0.3, false, "stem"},
        {Layer::engrave, {polyline({{0, 55}, {1.0 / 3 + 40, 55}})}, 0.3, false, "arm"},
        {Layer::engrave, {arc_path({50, 40}, 12.345, 30, -200)}, 0.3, false, "arc"},
        {Layer::fill, {Path{{5, 65}, {CurveTo{{5, 90}, {40, 90}, {40, 65}}, LineTo{{5, 65}}}, true}}, 0, true, "bow"},
        {Layer::drill, {circle({55, 90}, 2.5)}, 0.1, false, "hole"},
        {Layer::guide, {polyline({{0, 0}, {60, 100}})}, 0.1, false, "aid"}};
    return drawing;
}

Drawing mirrored(const Drawing& drawing) {
    Placing placing;
    placing.mirrored = true;
    Drawing turned{drawing.name + ", mirrored", {}};
    for (const Mark& mark : drawing.marks)
        turned.marks.push_back(placing(mark));
    return turned;
}

/// Both ways: all that is drawn was read, and all that was read is drawn.
void check_same_place(const Drawing& drawing, const std::vector<ReadLine>& read, double within_mm) {
    std::vector<ReadLine> drawn;
    double farthest = 0, strayed = 0;
    for (const Mark& mark : drawing.marks) {
        for (const Path& path : mark.paths) {
            if (mark.layer == Layer::guide)
                continue;
            const auto points = flattened(path, 0.0002);
            for (std::size_t i = 1; i < points.size(); ++i)
                drawn.push_back({points[i - 1], points[i]});
            for (const Point p : points)
                farthest = std::max(farthest, distance_to(read, p));
        }
    }
    for (const ReadLine& line : read)
        strayed = std::max(strayed, std::max(distance_to(drawn, line.from), distance_to(drawn, line.to)));
    CHECK(farthest < within_mm);
    CHECK(strayed < within_mm);
}

} // namespace

TEST_CASE("ezdxf finds no fault in a DXF, and reads its units and layers", "[layout]") {
    const ReadDxf read = read_dxf("f.dxf", dxf_of(letter_f()));
    CHECK(read.faults == 0);
    CHECK(read.units == 4);
    CHECK(read.metric == 1);
    CHECK(read.version == "AC1009");
    CHECK_THAT(read.extent.left_mm, WithinAbs(-5, 1e-9));
    CHECK_THAT(read.extent.top_mm, WithinAbs(105, 1e-9));
    for (const char* name : {"CUT", "ENGRAVE", "FILL", "DRILL", "SCORE", "GUIDE"})
        CHECK(read.layers.contains(name));
    CHECK(read.layers.at("CUT") == 1);
    for (const std::string& kind : read.kinds)
        CHECK(std::set<std::string>{"LINE", "ARC", "CIRCLE", "POLYLINE", "VERTEX", "SEQEND"}.contains(kind));
}

TEST_CASE("A letter F keeps its place and its hand in DXF, SVG and PDF, plain and mirrored", "[layout]") {
    const bool in_mirror = GENERATE(false, true);
    const Drawing drawing = in_mirror ? mirrored(letter_f()) : letter_f();
    DxfOptions fine;
    fine.flatten_mm = 0.0005; // the chords of the bow; all else is what it is
    check_same_place(drawing, read_dxf("hand.dxf", dxf_of(drawing, fine)).lines, 0.001);
    fine.chords_only = true;
    check_same_place(drawing, read_dxf("chords.dxf", dxf_of(drawing, fine)).lines, 0.001);

    Drawing work = drawing; // the same in the others' millimetres
    std::erase_if(work.marks, [](const Mark& mark) { return mark.layer == Layer::guide; });
    const Box frame{-70, -10, 70, 110};
    std::vector<ReadLine> svg_lines;
    std::istringstream facts{output_of("/usr/bin/python3 " + std::string{DIALWRIGHT_SOURCE_DIR} +
                                       "/tests/layout/export/read_svg.py " +
                                       kept_as("hand.svg", svg_of(drawing, frame)))};
    for (std::string row; std::getline(facts, row);) {
        std::istringstream in{row};
        std::string kind, layer;
        ReadLine line;
        if (in >> kind >> layer && kind == "line") {
            in >> line.from.x_mm >> line.from.y_mm >> line.to.x_mm >> line.to.y_mm;
            for (Point* p : {&line.from, &line.to})
                *p = {p->x_mm + frame.left_mm, p->y_mm + frame.bottom_mm};
            svg_lines.push_back(line);
        }
    }
    check_same_place(work, svg_lines, 0.003); // its reader takes 100 chords for an arc or a curve

    Sheet sheet;
    sheet.width_mm = 140;
    sheet.height_mm = 120;
    for (const Mark& mark : work.marks)
        sheet.furniture.push_back(Placing{{}, {70, 10}}(mark));
    std::vector<ReadLine> pdf_lines;
    const std::vector<ReadPage> pages = pages_of("hand.pdf", pdf_of({"F", "", {sheet}}));
    for (ReadLine line : pages.at(0).lines) {
        for (Point* p : {&line.from, &line.to})
            *p = {p->x_mm - 70, p->y_mm - 10};
        pdf_lines.push_back(line);
    }
    check_same_place(work, pdf_lines, 0.003);
}

TEST_CASE("Arcs are arcs and circles circles, true to 0.001 mm at a radius of 1 m", "[layout]") {
    Drawing drawing{"metre",
                    {{Layer::cut, {circle({123.45678, -7.5}, 1000)}, 0.1, false, "rim"},
                     {Layer::engrave, {arc_path({0.3333333, 0}, 999.87654, 350, 47.123)}, 0.1, false, "arc"},
                     {Layer::score, {arc_path({0, 0}, 990, 10, -300)}, 0.1, false, "wide"}}};
    // A polyline's arcs: a sector whose arc is bulges.
    Path sector = arc_path({0, 0}, 1000, 10, 200);
    sector.pieces.push_back(LineTo{{0, 0}});
    sector.pieces.push_back(LineTo{sector.start});
    sector.closed = true;
    drawing.marks.push_back({Layer::fill, {sector}, 0.1, false, "sector"});
    const ReadDxf read = read_dxf("metre.dxf", dxf_of(drawing));
    CHECK(read.faults == 0);
    REQUIRE(read.circles.size() == 1);
    CHECK_THAT(read.circles[0].radius_mm, WithinAbs(1000, 1e-4));
    CHECK_THAT(read.circles[0].centre.x_mm, WithinAbs(123.45678, 1e-4));
    REQUIRE(read.arcs.size() == 4); // one, the wide one, and the sector's in two halves
    CHECK_THAT(read.arcs[0].radius_mm, WithinAbs(999.87654, 1e-4));
    CHECK_THAT(read.arcs[0].from_deg, WithinAbs(350, 1e-8));
    CHECK_THAT(read.arcs[0].to_deg, WithinAbs(37.123, 1e-8));
    for (const Round& arc : {read.arcs[1], read.arcs[2]}) {
        CHECK_THAT(arc.radius_mm, WithinAbs(1000, 1e-3));
        CHECK_THAT(std::hypot(arc.centre.x_mm, arc.centre.y_mm), WithinAbs(0, 1e-3));
    }
    CHECK_THAT(read.arcs[3].from_deg, WithinAbs(70, 1e-8)); // 10° − 300°, walked anticlockwise
    CHECK_THAT(read.arcs[3].to_deg, WithinAbs(10, 1e-8));
}

TEST_CASE("Chords lie within their tolerance", "[layout]") {
    const Drawing drawing{"rim", {{Layer::cut, {circle({0, 0}, 1000)}, 0.1, false, "rim"}}};
    for (const double tolerance_mm : {0.001, 0.01, 0.1}) {
        DxfOptions options;
        options.chords_only = true;
        options.flatten_mm = tolerance_mm;
        const ReadDxf read = read_dxf("rim.dxf", dxf_of(drawing, options));
        CHECK(read.circles.empty());
        CHECK(read.entities.at(0).closed);
        for (const ReadLine& line : read.lines) {
            const Point middle{(line.from.x_mm + line.to.x_mm) / 2, (line.from.y_mm + line.to.y_mm) / 2};
            CHECK(1000 - std::hypot(middle.x_mm, middle.y_mm) < tolerance_mm + 1e-4);
            CHECK_THAT(std::hypot(line.from.x_mm, line.from.y_mm), WithinAbs(1000, 1e-4));
        }
    }
}

TEST_CASE("Engraving comes before cutting, inner contours before outer, guides not at all", "[layout]") {
    const ReadDxf read = read_dxf("order.dxf", dxf_of(letter_f()));
    std::vector<std::string> order;
    for (const Entity& entity : read.entities)
        order.push_back(entity.kind + " " + entity.layer + (entity.closed ? " closed" : ""));
    CHECK(order == std::vector<std::string>{"POLYLINE ENGRAVE", "LINE ENGRAVE", "ARC ENGRAVE", "POLYLINE FILL closed",
                                            "CIRCLE DRILL closed", "POLYLINE CUT closed", "POLYLINE CUT closed"});
}

TEST_CASE("Letters are closed contours in a DXF", "[layout]") {
    const LetteredLine line = Lettering{"EB Garamond"}.line("Horas é 12°", 20);
    const Drawing drawing{"motto", {{Layer::fill, set_straight(line, {10, 10}, Angle::degrees(15)), 0, true, "motto"}}};
    const ReadDxf read = read_dxf("motto.dxf", dxf_of(drawing));
    CHECK(read.faults == 0);
    CHECK(read.entities.size() >= 12);
    for (const Entity& entity : read.entities)
        CHECK((entity.kind == "POLYLINE" && entity.closed));
    check_same_place(drawing, read.lines, 0.011);
}

TEST_CASE("Lines that meet end in the same digits", "[layout]") {
    const Point meet{100.0 / 3, 200.0 / 7};
    const Drawing drawing{"meet",
                          {{Layer::engrave, {polyline({{0, 0}, meet})}, 0.1, false, "a"},
                           {Layer::engrave, {polyline({meet, {90, 1}})}, 0.1, false, "b"},
                           {Layer::engrave, {polyline({{-0.00001, 50}, meet})}, 0.1, false, "c"}}};
    const std::string dxf = dxf_of(drawing);
    CHECK(dxf.find("\n11\n33.3333\n21\n28.5714\n") != std::string::npos);
    CHECK(dxf.find("\n10\n33.3333\n20\n28.5714\n") != std::string::npos);
    CHECK(dxf.find("-0.0") == std::string::npos);
}

TEST_CASE("The same drawing gives the same DXF, in a German locale too", "[layout]") {
    const std::string first = dxf_of(letter_f());
    const char* german = std::setlocale(LC_ALL, "de_DE.UTF-8");
    CHECK(dxf_of(letter_f()) == first);
    std::setlocale(LC_ALL, "C");
    INFO((german != nullptr ? "with the locale" : "the locale is not installed here"));
}

TEST_CASE("The caller names and colours the layers, and puts the origin", "[layout]") {
    DxfOptions options;
    options.layers[Layer::cut] = {"through", {1, 0, 0}, 6};
    options.origin = {-5, -5};
    options.with_guides = true;
    const ReadDxf read = read_dxf("named.dxf", dxf_of(letter_f(), options));
    CHECK(read.layers.at("THROUGH") == 6);
    CHECK(read.entities.front().layer == "GUIDE");
    CHECK_THAT(read.extent.left_mm, WithinAbs(0, 1e-9));
    CHECK_THAT(read.extent.right_mm, WithinAbs(70, 1e-9));
    CHECK(read.faults == 0);
}

TEST_CASE("What can't be a DXF is said", "[layout]") {
    Drawing drawing = letter_f();
    DxfOptions options;
    options.flatten_mm = 0;
    CHECK_THROWS_AS(dxf_of(drawing, options), ExportError);
    CHECK_THROWS_AS(dxf_of(Drawing{"nothing", {}}), ExportError);
    CHECK_THROWS_AS(dxf_of(Drawing{"aids", {drawing.marks.back()}}), ExportError);
    drawing.marks[0].paths[0].start.x_mm = std::numeric_limits<double>::quiet_NaN();
    CHECK_THROWS_WITH(dxf_of(drawing), Catch::Contains("\"outline\""));
}
