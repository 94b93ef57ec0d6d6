// SPDX-License-Identifier: MIT
#include "layout/export/svg.hpp"

#include "layout/sheet/export_error.hpp"
#include "tests/layout/export/read_back.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <limits>
#include <set>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

namespace {

struct ReadSvg {
    double width_mm = 0, height_mm = 0;
    std::vector<std::string> layers;
    std::set<std::string> tags;
    std::vector<ReadLine> lines;
};

ReadSvg read_svg(const std::string& name, const std::string& svg) {
    const std::string script = std::string{DIALWRIGHT_SOURCE_DIR} + "/tests/layout/export/read_svg.py";
    std::istringstream facts{output_of("/usr/bin/python3 " + script + " " + kept_as(name, svg))};
    ReadSvg read;
    for (std::string row; std::getline(facts, row);) {
        std::istringstream in{row};
        std::string kind, word;
        in >> kind;
        if (kind == "size") {
            in >> read.width_mm >> read.height_mm;
        } else if (kind == "layer") {
            read.layers.push_back((in >> word, word));
        } else if (kind == "tag") {
            read.tags.insert((in >> word, word));
        } else {
            ReadLine line;
            in >> word >> line.from.x_mm >> line.from.y_mm >> line.to.x_mm >> line.to.y_mm;
            read.lines.push_back(line);
        }
    }
    return read;
}

Drawing one_of_each() {
    Drawing drawing;
    ArcTo arc{{}, {40, 30}, Angle::degrees(250)};
    arc.to = point_at({60, 30}, {{60, 30}, arc.centre, arc.sweep * 2.0}, 0.5);
    drawing.marks = {
        {Layer::cut, {circle({50, 40}, 39.5)}, 0.1, false, "rim"},
        {Layer::engrave, {Path{{60, 30}, {arc}, false}}, 0.3, false, "arc"},
        {Layer::engrave, {polyline({{10, 20}, {-0.00001, 55.5}, {33.33333, 1e-7}})}, 0.3, false, "line"},
        {Layer::fill, {Path{{5, 5}, {CurveTo{{5, 30}, {40, 30}, {40, 5}}, LineTo{{5, 5}}}, true}}, 0, true, "bow"},
        {Layer::guide, {rectangle({0, 0, 100, 80})}, 0.1, false, "sheet"}};
    return drawing;
}

} // namespace

TEST_CASE("An SVG read back shows the drawing where it is, the same hand up", "[layout]") {
    const Drawing drawing = one_of_each();
    const Box frame{-10, -20, 110, 90};
    const ReadSvg read = read_svg("each.svg", svg_of(drawing, frame));
    CHECK(read.width_mm == 120);
    CHECK(read.height_mm == 110);
    CHECK(read.layers == std::vector<std::string>{"engrave", "fill", "cut"});
    for (const Mark& mark : drawing.marks) {
        if (mark.layer == Layer::guide) {
            continue; // for the eye, not for the machine
        }
        for (const Path& path : mark.paths) {
            for (const Point p : flattened(path, 0.01)) {
                CHECK(distance_to(read.lines, {p.x_mm - frame.left_mm, p.y_mm - frame.bottom_mm}) < 0.005);
            }
        }
    }
    // And nothing else: each line that was read lies on the drawing.
    std::vector<ReadLine> drawn;
    for (const Mark& mark : drawing.marks) {
        for (const Path& path : mark.paths) {
            const auto points = flattened(path, 0.001);
            for (std::size_t i = 1; i < points.size(); ++i) {
                drawn.push_back({points[i - 1], points[i]});
            }
        }
    }
    for (const ReadLine& line : read.lines) {
        CHECK(distance_to(drawn, {line.from.x_mm + frame.left_mm, line.from.y_mm + frame.bottom_mm}) < 0.005);
    }
}

TEST_CASE("An SVG holds nothing that a cutter's program stumbles over", "[layout]") {
    const ReadSvg read = read_svg("tags.svg", svg_of(one_of_each(), {0, 0, 100, 80}));
    CHECK(read.tags == std::set<std::string>{"g", "g@id", "path", "path@d", "path@fill", "path@stroke",
                                             "path@stroke-linecap", "path@stroke-linejoin", "path@stroke-width", "svg",
                                             "svg@height", "svg@viewBox", "svg@width"});
}

TEST_CASE("An SVG takes the machine's hairline, names and colours, and guides if asked", "[layout]") {
    SvgOptions options;
    options.hairline_mm = 0.01;
    options.with_guides = true;
    options.layers[Layer::cut] = {"through", {1, 0, 0}, 1};
    const std::string svg = svg_of(one_of_each(), {0, 0, 100, 80}, options);
    CHECK(read_svg("options.svg", svg).layers == std::vector<std::string>{"guide", "engrave", "fill", "through"});
    CHECK(svg.find("stroke=\"#ff0000\" stroke-width=\"0.01\"") != std::string::npos);
    CHECK(svg.find("stroke-width=\"0.3\"") == std::string::npos);
    options.hairline_mm = 0;
    CHECK_THROWS_AS(svg_of(one_of_each(), {0, 0, 100, 80}, options), ExportError);
}

TEST_CASE("The same drawing gives the same SVG", "[layout]") {
    CHECK(svg_of(one_of_each(), {0, 0, 100, 80}) == svg_of(one_of_each(), {0, 0, 100, 80}));
}

TEST_CASE("What is no number makes no SVG", "[layout]") {
    Drawing drawing = one_of_each();
    CHECK_THROWS_AS(svg_of(drawing, Box{}), ExportError);
    drawing.marks[0].paths[0].start.x_mm = std::numeric_limits<double>::quiet_NaN();
    CHECK_THROWS_AS(svg_of(drawing, {0, 0, 100, 80}), ExportError);
}
