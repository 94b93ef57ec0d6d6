// SPDX-License-Identifier: MIT
#include "layout/export/pdf.hpp"
#include "layout/export/svg.hpp"
#include "layout/sheet/tiling.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <ctime>
#include <string_view>

// What laying a plate on sheets and writing its PDF and SVG cost: a round plate of 420 mm with 500 marks, 300 of them
// outlines of letters of 20 curves each, on A4 with its map and on one sheet of its own size.

using namespace dialwright;
using namespace dialwright::layout;

namespace {

Point at(double r_mm, double degrees) {
    return {r_mm * cos(Angle::degrees(degrees)), r_mm * sin(Angle::degrees(degrees))};
}

/// An outline of curves like a letter's, about 5 mm wide.
Path letter(Point middle, int seed) {
    const auto on = [&](int i) {
        const double r = 2.0 + 0.7 * std::sin(1.7 * i + seed);
        const Point p = at(r, i * 6.0);
        return Point{middle.x_mm + p.x_mm, middle.y_mm + p.y_mm};
    };
    Path path{on(0), {}, true};
    for (int i = 0; i < 20; ++i) {
        path.pieces.emplace_back(CurveTo{on(3 * i + 1), on(3 * i + 2), i == 19 ? path.start : on(3 * i + 3)});
    }
    return path;
}

std::shared_ptr<Drawing> plate(double radius_mm) {
    auto drawing = std::make_shared<Drawing>();
    for (const double part : {1.0, 0.97, 0.82}) {
        drawing->marks.push_back({Layer::engrave, {circle({0, 0}, radius_mm * part)}, 0.4, false, "border"});
    }
    for (int i = 0; i < 200; ++i) {
        const double inner = i % 12 == 0 ? 0.2 : 0.76;
        drawing->marks.push_back({Layer::engrave,
                                  {polyline({at(radius_mm * inner, i * 1.3), at(radius_mm * 0.82, i * 1.3)})},
                                  i % 12 == 0 ? 0.5 : 0.2,
                                  false,
                                  "hour line"});
    }
    for (int i = 0; i < 300; ++i) {
        const double r = radius_mm * (0.5 + 0.13 * (i % 4));
        drawing->marks.push_back({Layer::engrave, {letter(at(r, i * 1.2), i)}, 0, true, "letter"});
    }
    return drawing;
}

/// In time of the processor, so that what else the machine does counts less.
template <class Work>
double shortest_ms(int runs, Work work) {
    double shortest = 1e9;
    for (int i = 0; i < runs; ++i) {
        const std::clock_t start = std::clock();
        work();
        shortest = std::min(shortest, 1000.0 * static_cast<double>(std::clock() - start) / CLOCKS_PER_SEC);
    }
    return shortest;
}

} // namespace

int main(int argc, char** argv) {
    const bool quick = argc > 1 && std::string_view{argv[1]} == "--quick";
    const int runs = quick ? 1 : 20;
    const auto drawing = plate(210);
    PrintOptions options;
    options.title = "A dial for Fellbeck";
    SheetBook book{"A dial", "Full size", {}};
    const double first = shortest_ms(1, [&] { book.sheets = tile(drawing, options).sheets; });
    const double tiling = shortest_ms(runs, [&] { book.sheets = tile(drawing, options).sheets; });
    book.sheets.push_back(own_size_sheet(drawing, options));
    std::string pdf, svg;
    const double first_pdf = shortest_ms(1, [&] { pdf = pdf_of(book); });
    const double writing = shortest_ms(runs, [&] { pdf = pdf_of(book); });
    const double picture = shortest_ms(runs, [&] { svg = svg_of(*drawing, bounds_of(*drawing).grown(2)); });
    fmt::print("tiles     {:6.2f} ms  (first {:.2f}, with the notes' font)  {} sheets\n", tiling, first,
               book.sheets.size() - 1);
    fmt::print("PDF       {:6.2f} ms  (first {:.2f})  {} kB\n", writing, first_pdf, pdf.size() / 1000);
    fmt::print("SVG       {:6.2f} ms  {} kB\n", picture, svg.size() / 1000);
    const auto large = plate(1000);
    const double spread = shortest_ms(quick ? 1 : 5, [&] { book.sheets = tile(large, options).sheets; });
    const double thick = shortest_ms(quick ? 1 : 5, [&] { pdf = pdf_of(book); });
    fmt::print("2 m plate {:6.2f} ms to tile on {} sheets, {:.2f} ms to write\n", spread, book.sheets.size(), thick);
    return 0;
}
