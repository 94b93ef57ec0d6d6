// SPDX-License-Identifier: MIT
#include "layout/drawing/clipping.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

namespace dialwright::layout {
namespace {

constexpr double k_chord_mm = 0.0005;

/// Collects the runs of pieces that follow on one another.
class Runs {
  public:
    void add(Point from, const Piece& piece) {
        if (runs_.empty() || !(end_of(runs_.back()) == from)) {
            runs_.push_back({from, {}, false});
        }
        runs_.back().pieces.push_back(piece);
    }
    [[nodiscard]] std::vector<Path> take() { return std::move(runs_); }

  private:
    std::vector<Path> runs_;
};

void add_line(Runs& runs, Point from, Point to, const Box& box) {
    if (const auto inside = line_inside(from, to, box); inside && !(inside->first == inside->second)) {
        runs.add(inside->first, LineTo{inside->second});
    }
}

/// The parts (0 to 1) of an arc at which its circle crosses the four sides' lines, sorted, with 0 and 1.
std::vector<double> crossings(Point start, const ArcTo& arc, const Box& box) {
    const double radius = std::hypot(start.x_mm - arc.centre.x_mm, start.y_mm - arc.centre.y_mm);
    const double begin = std::atan2(start.y_mm - arc.centre.y_mm, start.x_mm - arc.centre.x_mm);
    std::vector<double> parts{0.0, 1.0};
    const auto add_direction = [&](double direction) {
        // The turn from the arc's start to that direction, the way the arc goes.
        const Angle turn = Angle::radians(arc.sweep.in_radians() > 0 ? direction - begin : begin - direction);
        const double part = turn.positive_turn() / abs(arc.sweep);
        if (part > 0 && part < 1) {
            parts.push_back(part);
        }
    };
    for (const double side : {box.left_mm, box.right_mm}) {
        const double cosine = (side - arc.centre.x_mm) / radius;
        if (std::abs(cosine) <= 1) {
            add_direction(std::acos(cosine));
            add_direction(-std::acos(cosine));
        }
    }
    for (const double side : {box.bottom_mm, box.top_mm}) {
        const double sine = (side - arc.centre.y_mm) / radius;
        if (std::abs(sine) <= 1) {
            add_direction(std::asin(sine));
            add_direction(std::numbers::pi - std::asin(sine));
        }
    }
    std::sort(parts.begin(), parts.end());
    return parts;
}

void add_arc(Runs& runs, Point start, const ArcTo& arc, const Box& box) {
    const std::vector<double> parts = crossings(start, arc, box);
    for (std::size_t i = 0; i + 1 < parts.size(); ++i) {
        const double low = parts[i], high = parts[i + 1];
        if (high - low < 1e-12 || !box.contains(point_at(start, arc, (low + high) / 2))) {
            continue;
        }
        runs.add(point_at(start, arc, low), ArcTo{point_at(start, arc, high), arc.centre, arc.sweep * (high - low)});
    }
}

} // namespace

std::optional<std::pair<Point, Point>> line_inside(Point from, Point to, const Box& box) {
    const double along_x = to.x_mm - from.x_mm, along_y = to.y_mm - from.y_mm;
    double enters = 0.0, leaves = 1.0;
    // Each side: how fast the line nears it, and how far it is inside of it at the start.
    const std::array<std::pair<double, double>, 4> sides{{{-along_x, from.x_mm - box.left_mm},
                                                          {along_x, box.right_mm - from.x_mm},
                                                          {-along_y, from.y_mm - box.bottom_mm},
                                                          {along_y, box.top_mm - from.y_mm}}};
    for (const auto& [nearing, inside_by] : sides) {
        if (nearing == 0.0) {
            if (inside_by < 0) {
                return std::nullopt;
            }
            continue;
        }
        const double at = inside_by / nearing;
        if (nearing < 0) {
            enters = std::max(enters, at);
        } else {
            leaves = std::min(leaves, at);
        }
    }
    if (enters > leaves) {
        return std::nullopt;
    }
    const auto on_line = [&](double at) { return Point{from.x_mm + at * along_x, from.y_mm + at * along_y}; };
    return std::pair{enters > 0 ? on_line(enters) : from, leaves < 1 ? on_line(leaves) : to};
}

std::vector<Path> line_inside(const Path& path, const Box& box) {
    const Box bounds = bounds_of(path);
    if (!box.meets(bounds)) {
        return {};
    }
    if (box.contains(bounds)) {
        return {path};
    }
    Runs runs;
    std::vector<Point> chords;
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        const Box piece_box = bounds_of(at, piece);
        if (box.contains(piece_box)) {
            runs.add(at, piece);
        } else if (box.meets(piece_box)) {
            if (const auto* arc = std::get_if<ArcTo>(&piece)) {
                add_arc(runs, at, *arc, box);
            } else {
                chords.assign(1, at);
                flatten(chords, at, piece, k_chord_mm);
                for (std::size_t i = 1; i < chords.size(); ++i) {
                    add_line(runs, chords[i - 1], chords[i], box);
                }
            }
        }
        at = end_of(piece);
    }
    return runs.take();
}

std::vector<Point> ring_inside(const std::vector<Point>& ring, const Box& box) {
    struct Side {
        bool upright; // cut at an x, else at a y
        double at;
        double sign; // +1: inside is above `at`
    };
    const std::array<Side, 4> sides{
        {{true, box.left_mm, 1}, {true, box.right_mm, -1}, {false, box.bottom_mm, 1}, {false, box.top_mm, -1}}};
    std::vector<Point> inside = ring, before;
    for (const Side& side : sides) {
        std::swap(inside, before);
        inside.clear();
        const auto depth = [&](Point p) { return side.sign * ((side.upright ? p.x_mm : p.y_mm) - side.at); };
        for (std::size_t i = 0; i < before.size(); ++i) {
            const Point from = before[i == 0 ? before.size() - 1 : i - 1], to = before[i];
            const double from_depth = depth(from), to_depth = depth(to);
            if ((from_depth < 0) != (to_depth < 0)) {
                const double part = from_depth / (from_depth - to_depth);
                Point cut{from.x_mm + part * (to.x_mm - from.x_mm), from.y_mm + part * (to.y_mm - from.y_mm)};
                (side.upright ? cut.x_mm : cut.y_mm) = side.at;
                inside.push_back(cut);
            }
            if (to_depth >= 0) {
                inside.push_back(to);
            }
        }
    }
    return inside;
}

int winding_round(const std::vector<Point>& ring, Point p) {
    int turns = 0;
    for (std::size_t i = 0; i < ring.size(); ++i) {
        const Point a = ring[i == 0 ? ring.size() - 1 : i - 1], b = ring[i];
        const double side = (b.x_mm - a.x_mm) * (p.y_mm - a.y_mm) - (p.x_mm - a.x_mm) * (b.y_mm - a.y_mm);
        if (a.y_mm <= p.y_mm && b.y_mm > p.y_mm && side > 0) {
            ++turns;
        } else if (a.y_mm > p.y_mm && b.y_mm <= p.y_mm && side < 0) {
            --turns;
        }
    }
    return turns;
}

} // namespace dialwright::layout
