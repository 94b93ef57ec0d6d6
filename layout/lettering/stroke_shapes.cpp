// SPDX-License-Identifier: MIT
#include "layout/lettering/stroke_shapes.hpp"

#include "layout/lettering/lettering.hpp"

#include <algorithm>
#include <fstream>
#include <initializer_list>
#include <string_view>

namespace dialwright::layout {
namespace {

StrokeShape shape(double advance, std::initializer_list<std::vector<Point>> strokes) {
    StrokeShape made{{}, advance};
    for (const std::vector<Point>& stroke : strokes)
        made.strokes.push_back(polyline(stroke));
    return made;
}

StrokeShape ring(double advance, Point centre, double radius) {
    return {{circle(centre, radius)}, advance};
}

/// Strokes of an accent round x = 0, from y = 0 up where it stands above and from 0 down where it hangs below.
struct Accent {
    char32_t mark;
    bool below;
    std::vector<Path> strokes;
};

const std::vector<Accent>& accents() {
    const auto lines = [](std::initializer_list<std::vector<Point>> strokes) { return shape(0, strokes).strokes; };
    const auto dots = [](std::initializer_list<Point> places) {
        std::vector<Path> made;
        for (const Point p : places)
            made.push_back(circle(p, 0.8));
        return made;
    };
    static const std::vector<Accent> all = {
        {0x300, false, lines({{{-2.5, 4}, {1.5, 0}}})},
        {0x301, false, lines({{{2.5, 4}, {-1.5, 0}}})},
        {0x302, false, lines({{{-3.5, 0}, {0, 4}, {3.5, 0}}})},
        {0x303, false,
         lines({{{-4, 0}, {-3.3, 1.6}, {-2, 2.4}, {-0.6, 1.9}, {0.6, 0.9}, {2, 0.4}, {3.3, 1.2}, {4, 2.8}}})},
        {0x304, false, lines({{{-3.5, 1}, {3.5, 1}}})},
        {0x306, false, lines({{{-3.5, 3.5}, {-2.7, 1.4}, {-1, 0.2}, {1, 0.2}, {2.7, 1.4}, {3.5, 3.5}}})},
        {0x307, false, dots({{0, 1.5}})},
        {0x308, false, dots({{-2.8, 1.5}, {2.8, 1.5}})},
        {0x30A, false, ring(0, {0, 2}, 2).strokes},
        {0x30B, false, lines({{{0.5, 4}, {-3, 0}}, {{4.5, 4}, {1, 0}}})},
        {0x30C, false, lines({{{-3.5, 4}, {0, 0}, {3.5, 4}}})},
        {0x323, true, dots({{0, -2.5}})},
        {0x326, true, lines({{{0.5, -1.5}, {0.5, -3}, {-0.8, -5}}})},
        {0x327, true, lines({{{0.3, 0}, {-0.5, -2}, {1.2, -2.4}, {1.9, -3.6}, {1.2, -5}, {-0.5, -5.5}, {-2, -5}}})},
        {0x328, true, lines({{{2, 0}, {0.4, -1.8}, {0, -3.4}, {0.8, -4.8}, {2.4, -5}, {3.4, -4.4}}})},
    };
    return all;
}

Path moved(const Path& path, Point by) {
    return Placing{{}, by}(path);
}

/// A letter's own stroke beside it, which stands for a caron on a letter too tall for one.
bool takes_stroke_beside(char32_t letter) {
    return letter == U'd' || letter == U'l' || letter == U't' || letter == U'L';
}

/// How far the middle of a cedilla or an ogonek hangs from the middle of the letter: an ogonek grows from the last stem.
double middle_of(const StrokeShape& shape, char32_t mark) {
    Box ink;
    for (const Path& stroke : shape.strokes)
        ink.add(bounds_of(stroke));
    if (ink.empty())
        return shape.advance / 2;
    return mark == 0x328 ? ink.right_mm - 3 : ink.middle().x_mm;
}

StrokeShape parsed(std::string_view pairs) {
    const auto at = [&](std::size_t i) { return static_cast<double>(pairs[i] - 'R'); };
    constexpr double k_base_line = 9; // capitals stand from 9 below the middle of the grid to 12 above it
    const double left = at(0);
    StrokeShape made{{}, at(1) - left};
    std::vector<Point> points;
    const auto finish = [&] {
        if (points.size() > 1)
            made.strokes.push_back(polyline(points));
        points.clear();
    };
    for (std::size_t i = 2; i + 1 < pairs.size(); i += 2) {
        if (pairs[i] == ' ' && pairs[i + 1] == 'R')
            finish(); // the pen is lifted
        else
            points.push_back({at(i) - left, k_base_line - at(i + 1)});
    }
    finish();
    return made;
}

} // namespace

std::vector<StrokeShape> stroke_file(const std::string& name) {
    const std::string path = "/usr/share/hershey-fonts/" + name + ".jhf";
    std::ifstream file{path};
    if (!file)
        throw LetteringError("the single-stroke letters " + path +
                             " can't be read: install the package hershey-fonts-data, "
                             "or take lettering in outlines");
    std::vector<StrokeShape> shapes;
    // Five columns of a number, three of a count of pairs, the pairs: first the two sides, then points.
    for (std::string row; std::getline(file, row);) {
        while (!row.empty() && row.back() == '\r')
            row.pop_back();
        std::size_t count = 0;
        const std::string digits = row.size() >= 8 ? row.substr(5, 3) : std::string{};
        for (const char c : digits)
            count = c >= '0' && c <= '9' ? count * 10 + static_cast<std::size_t>(c - '0') : count;
        if (count == 0 || row.size() != 8 + 2 * count)
            throw LetteringError("the file " + path + " is not what it should be: install hershey-fonts-data again");
        shapes.push_back(parsed(std::string_view{row}.substr(8)));
    }
    if (shapes.size() < 96)
        throw LetteringError("the file " + path + " is cut short: install hershey-fonts-data again");
    return shapes;
}

std::optional<StrokeShape> own_shape(char32_t character) {
    switch (character) {
    case U'[':
        return shape(10, {{{8, 25}, {3, 25}, {3, -7}, {8, -7}}});
    case U']':
        return shape(10, {{{2, 25}, {7, 25}, {7, -7}, {2, -7}}});
    case U'°':
    case U'º':
        return ring(12, {6, 17.5}, 3.5);
    case U'′':
        return shape(8, {{{5.5, 21}, {2.5, 14}}});
    case U'″':
        return shape(12, {{{5.5, 21}, {2.5, 14}}, {{9.5, 21}, {6.5, 14}}});
    case U'‴':
        return shape(16, {{{5.5, 21}, {2.5, 14}}, {{9.5, 21}, {6.5, 14}}, {{13.5, 21}, {10.5, 14}}});
    case U'·':
    case U'•':
        return ring(10, {5, 9}, character == U'•' ? 2 : 0.8);
    case U'-':
    case U'‐':
    case U'‑':
        return shape(14, {{{3, 8}, {11, 8}}});
    case U'–':
        return shape(20, {{{2, 8}, {18, 8}}});
    case U'—':
        return shape(30, {{{2, 8}, {28, 8}}});
    case U'−':
        return shape(26, {{{4, 9}, {22, 9}}});
    case U'×':
        return shape(22, {{{5, 3}, {17, 15}}, {{5, 15}, {17, 3}}});
    case U'±':
        return shape(26, {{{13, 18}, {13, 4}}, {{6, 11}, {20, 11}}, {{6, 0}, {20, 0}}});
    case U'½':
        return shape(30, {{{3, 18}, {6, 21}, {6, 10}},
                          {{23, 21}, {7, 0}},
                          {{18, 8}, {19, 10}, {21, 11}, {24, 11}, {26, 9}, {26, 7}, {24, 5}, {18, 0}, {26, 0}}});
    case U'¼':
        return shape(30, {{{3, 18}, {6, 21}, {6, 10}}, {{23, 21}, {7, 0}}, {{24, 0}, {24, 11}, {17, 4}, {27, 4}}});
    case U'‘':
        return shape(8, {{{5.5, 21}, {3.5, 19}, {3, 17}, {4, 15.5}}});
    case U'’':
        return shape(8, {{{4, 21}, {5, 19.5}, {4.5, 17.5}, {2.5, 15.5}}});
    case U'“':
        return shape(12, {{{5.5, 21}, {3.5, 19}, {3, 17}, {4, 15.5}}, {{9.5, 21}, {7.5, 19}, {7, 17}, {8, 15.5}}});
    case U'”':
        return shape(12,
                     {{{4, 21}, {5, 19.5}, {4.5, 17.5}, {2.5, 15.5}}, {{8, 21}, {9, 19.5}, {8.5, 17.5}, {6.5, 15.5}}});
    case U'„':
        return shape(12, {{{4, 2}, {5, 0.5}, {4.5, -1.5}, {2.5, -3.5}}, {{8, 2}, {9, 0.5}, {8.5, -1.5}, {6.5, -3.5}}});
    case U'«':
        return shape(18, {{{8, 13}, {3, 8}, {8, 3}}, {{14, 13}, {9, 8}, {14, 3}}});
    case U'»':
        return shape(18, {{{4, 13}, {9, 8}, {4, 3}}, {{10, 13}, {15, 8}, {10, 3}}});
    case U'ß':
        return shape(20, {{{4, 0},
                           {4, 16},
                           {5, 19},
                           {7, 21},
                           {11, 21},
                           {14, 19},
                           {15, 17},
                           {14, 14.5},
                           {11, 12.5},
                           {9, 12},
                           {13, 11},
                           {16, 8.5},
                           {17, 6},
                           {16, 2.5},
                           {14, 0.7},
                           {11, 0},
                           {8, 0.3}}});
    case U'Þ':
        return shape(21, {{{4, 21}, {4, 0}},
                          {{4, 16}, {13, 16}, {16, 15}, {17.5, 12.5}, {17.5, 9}, {16, 6.5}, {13, 5.5}, {4, 5.5}}});
    case U'þ':
        return shape(19, {{{4, 21}, {4, -7}},
                          {{4, 11},
                           {6, 13},
                           {8, 14},
                           {11, 14},
                           {13, 13},
                           {15, 11},
                           {16, 8},
                           {16, 6},
                           {15, 3},
                           {13, 1},
                           {11, 0},
                           {8, 0},
                           {6, 1},
                           {4, 3}}});
    case U'ð':
        return shape(19, {{{15, 8},
                           {13, 11},
                           {11, 12},
                           {8, 12},
                           {5, 10},
                           {3, 7},
                           {3, 5},
                           {5, 2},
                           {8, 0},
                           {11, 0},
                           {14, 2},
                           {15.5, 5},
                           {15.5, 9},
                           {14, 14},
                           {11, 18},
                           {7, 21}},
                          {{6, 15}, {15, 20}}});
    case U'ς':
        return shape(17, {{{15, 13},
                           {13, 14},
                           {10, 14},
                           {7, 13},
                           {4.5, 10},
                           {4, 7},
                           {5, 4},
                           {8, 2},
                           {11, 0.5},
                           {12.5, -1.5},
                           {12.5, -4},
                           {11, -6},
                           {8.5, -7}}});
    default:
        return std::nullopt;
    }
}

bool is_accent(char32_t mark) {
    return std::any_of(accents().begin(), accents().end(), [&](const Accent& a) { return a.mark == mark; });
}

void add_accent(StrokeShape& shape, char32_t letter, char32_t mark) {
    constexpr double k_gap = 2.5;
    if (mark == 0x30C && takes_stroke_beside(letter)) {
        const double x = letter == U'L' ? shape.advance / 2 + 2 : shape.advance;
        shape.strokes.push_back(polyline({{x, 21}, {x + 0.5, 19.5}, {x - 1.5, 16}}));
        shape.advance = std::max(shape.advance, x + 2);
        return;
    }
    const auto found =
        std::find_if(accents().begin(), accents().end(), [&](const Accent& a) { return a.mark == mark; });
    Box ink;
    if ((letter == U'i' || letter == U'j') && !found->below) // the accent takes the place of the dot
        std::erase_if(shape.strokes, [](const Path& stroke) { return bounds_of(stroke).bottom_mm > k_stroke_small; });
    for (const Path& stroke : shape.strokes)
        ink.add(bounds_of(stroke));
    const double top = ink.empty() ? k_stroke_small : ink.top_mm;
    const Point place{middle_of(shape, mark), found->below ? 0 : top + k_gap};
    for (const Path& stroke : found->strokes)
        shape.strokes.push_back(moved(stroke, place));
}

} // namespace dialwright::layout
