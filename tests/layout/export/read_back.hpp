// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <fstream>
#include <sstream>
#include <stdexcept>
#include <string>
#include <vector>

#include <cstdio>

namespace dialwright::layout {

/// Reading our files back with other people's programs. Everything in millimetres, y up.
struct ReadLine {
    Point from, to;
    double width_mm = 0;
};
struct ReadText {
    Box box;
    double size_mm = 0;
    std::string words;
};
struct ReadPage {
    double width_mm = 0, height_mm = 0;
    std::vector<ReadLine> lines;
    std::vector<ReadText> texts;
};

inline std::string output_of(const std::string& command) {
    FILE* pipe = popen((command + " 2>&1").c_str(), "r");
    if (pipe == nullptr) {
        throw std::runtime_error("cannot run " + command);
    }
    std::string all;
    char part[4096];
    for (std::size_t n = 0; (n = fread(part, 1, sizeof part, pipe)) > 0;) {
        all.append(part, n);
    }
    if (pclose(pipe) != 0) {
        throw std::runtime_error(command + " failed: " + all);
    }
    return all;
}

inline std::string kept_as(const std::string& name, const std::string& bytes) {
    const std::string path = std::string{DIALWRIGHT_BINARY_DIR} + "/read_back_" + name;
    std::ofstream{path, std::ios::binary} << bytes;
    return path;
}

inline std::vector<ReadPage> pages_of(const std::string& name, const std::string& pdf) {
    const std::string script = std::string{DIALWRIGHT_SOURCE_DIR} + "/tests/layout/export/read_pdf.py";
    std::istringstream facts{output_of("/usr/bin/python3 " + script + " " + kept_as(name, pdf))};
    std::vector<ReadPage> pages;
    for (std::string row; std::getline(facts, row);) {
        std::istringstream in{row};
        std::string kind;
        in >> kind;
        if (kind == "page") {
            in >> pages.emplace_back().width_mm >> pages.back().height_mm;
        } else if (kind == "line") {
            ReadLine line;
            in >> line.from.x_mm >> line.from.y_mm >> line.to.x_mm >> line.to.y_mm >> line.width_mm;
            pages.back().lines.push_back(line);
        } else if (kind == "text") {
            ReadText text;
            in >> text.box.left_mm >> text.box.bottom_mm >> text.box.right_mm >> text.box.top_mm >> text.size_mm;
            std::getline(in >> std::ws, text.words);
            pages.back().texts.push_back(text);
        }
    }
    return pages;
}

/// How far a point is from the nearest of the lines.
inline double distance_to(const std::vector<ReadLine>& lines, Point p) {
    double nearest = 1e300;
    for (const ReadLine& line : lines) {
        const double x = line.to.x_mm - line.from.x_mm, y = line.to.y_mm - line.from.y_mm;
        const double px = p.x_mm - line.from.x_mm, py = p.y_mm - line.from.y_mm;
        const double square = x * x + y * y;
        const double part = square > 0 ? std::min(1.0, std::max(0.0, (px * x + py * y) / square)) : 0.0;
        nearest = std::min(nearest, std::hypot(px - part * x, py - part * y));
    }
    return nearest;
}

} // namespace dialwright::layout
