// SPDX-License-Identifier: MIT
//
// The lines are cut into short segments, which are sorted into square cells wider than what is looked for: only those that
// share a cell are compared.
#include "layout/plate/family_words.hpp"
#include "layout/plate/points.hpp"
#include "layout/plate/tool_check.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <optional>
#include <tuple>

namespace dialwright::layout {
namespace {

constexpr double k_meet_mm = 0.02; ///< lines that come so near each other meet

double to_segment(Point p, Point a, Point b) {
    const Point run = b - a;
    const double square = dot(run, run);
    return distance(p, a + (square > 0 ? std::clamp(dot(p - a, run) / square, 0.0, 1.0) : 0.0) * run);
}

struct Segment {
    Point a, b;
    std::size_t line;
};

/// The least distance, and the place on the first where it is.
std::pair<double, Point> between_segments(const Segment& s, const Segment& t) {
    const double side_a = cross(t.b - t.a, s.a - t.a), side_b = cross(t.b - t.a, s.b - t.a);
    if (side_a * side_b < 0 && cross(s.b - s.a, t.a - s.a) * cross(s.b - s.a, t.b - s.a) < 0)
        return {0.0, between(s.a, s.b, side_a / (side_a - side_b))};
    std::pair<double, Point> least{1e300, {}};
    const auto consider = [&](Point p, const Segment& other) {
        if (const double d = to_segment(p, other.a, other.b); d < least.first)
            least = {d, p};
    };
    consider(s.a, t);
    consider(s.b, t);
    consider(t.a, s);
    consider(t.b, s);
    return least;
}

/// A line of the face with all its pieces.
struct WholeLine {
    const DrawnLine* first = nullptr;
    std::string name;
    bool of_ring = false;
    double reach_mm = 0; ///< from the dial's centre
};

class LineCheck {
  public:
    LineCheck(const Face& face, const FaceSpec& spec) : face_{face}, spec_{spec} {
        const bool any = spec.cutting.tool == Tool::any;
        double widest = 0;
        for (const DrawnLine& line : face.lines)
            if (!in_band(line) && (!any || line.family == Family::date))
                widest = std::max(widest, line.width_mm);
        near_mm_ = spec.cutting.least_gap_mm + widest;
        cell_mm_ = std::max(4 * near_mm_, std::max(spec.plate.width_mm, spec.plate.height_mm) / 100);
        for (const DrawnLine& line : face.lines)
            if (!in_band(line) && (!any || line.family == Family::date))
                add(line);
    }

    [[nodiscard]] std::vector<CloseLines> found() {
        for (const auto& [place, here] : cells_)
            for (std::size_t i = 0; i < here.size(); ++i)
                for (std::size_t k = i + 1; k < here.size(); ++k)
                    compare(segments_[here[i]], segments_[here[k]]);
        std::vector<CloseLines> made;
        for (const auto& [pair, nearest] : nearest_)
            if (auto close = told(lines_[pair.first], lines_[pair.second], nearest))
                made.push_back(std::move(*close));
        std::stable_sort(made.begin(), made.end(),
                         [](const CloseLines& a, const CloseLines& b) { return a.gap_mm < b.gap_mm; });
        return made;
    }

  private:
    using Nearest = std::pair<double, Point>;

    [[nodiscard]] static bool of_ring(const DrawnLine& line) {
        return line.set == 0 && (line.family == Family::hour || line.family == Family::clock_hour);
    }
    [[nodiscard]] static bool in_band(const DrawnLine& line) { return of_ring(line) && line.step_min < 60; }

    [[nodiscard]] std::size_t whole(const DrawnLine& line) {
        const auto key = std::make_tuple(line.family, line.set, line.label, std::lround(line.time_h * 3600));
        const auto [it, added] = index_.try_emplace(key, lines_.size());
        if (added)
            lines_.push_back({&line, line_name(line.family, line.time, line.set, line.label), of_ring(line), 0.0});
        return it->second;
    }

    void add(const DrawnLine& line) {
        const std::size_t index = whole(line);
        const auto& centre = face_.delineation.style.centre;
        for (std::size_t i = 0; i < line.points.size(); ++i) {
            const Point b = to_work(line.points[i], face_.placement.foot);
            if (centre)
                lines_[index].reach_mm =
                    std::max(lines_[index].reach_mm, distance(to_work(*centre, face_.placement.foot), b));
            if (i == 0)
                continue;
            const Point a = to_work(line.points[i - 1], face_.placement.foot);
            const int parts = std::max(1, int(std::ceil(distance(a, b) / cell_mm_)));
            for (int part = 0; part < parts; ++part)
                place({between(a, b, double(part) / parts), between(a, b, double(part + 1) / parts), index});
        }
    }

    void place(const Segment& segment) {
        Box box;
        box.add(segment.a);
        box.add(segment.b);
        box = box.grown(near_mm_ / 2);
        const auto cell = [&](double mm) { return int(std::floor(mm / cell_mm_)); };
        for (int x = cell(box.left_mm); x <= cell(box.right_mm); ++x)
            for (int y = cell(box.bottom_mm); y <= cell(box.top_mm); ++y)
                cells_[{x, y}].push_back(segments_.size());
        segments_.push_back(segment);
    }

    void compare(const Segment& s, const Segment& t) {
        if (s.line == t.line)
            return;
        const Nearest here = between_segments(s, t);
        if (here.first >= near_mm_ || (here.first >= k_meet_mm && ends_across(s, t)))
            return;
        const auto pair = std::minmax(s.line, t.line);
        const auto [it, added] = nearest_.try_emplace({pair.first, pair.second}, here);
        if (!added && here.first < it->second.first)
            it->second = here;
    }

    /// Lines that are nearest to each other at more than 30° are so where one ends, and no long sliver is left there.
    [[nodiscard]] bool ends_across(const Segment& s, const Segment& t) const {
        const Point a = s.b - s.a, b = t.b - t.a;
        const bool ring = lines_[s.line].of_ring && lines_[t.line].of_ring;
        return !ring && std::abs(cross(a, b)) > 0.5 * length(a) * length(b);
    }

    [[nodiscard]] std::optional<CloseLines> told(const WholeLine& a, const WholeLine& b, const Nearest& nearest) const {
        constexpr double k_rounding_mm = 0.005;
        const bool ring = a.of_ring && b.of_ring && a.first->family == Family::hour && b.first->family == Family::hour;
        if (ring ? std::lround(a.first->time_h * 60) == std::lround(b.first->time_h * 60) : nearest.first < k_meet_mm)
            return std::nullopt;
        const double widths = (a.first->width_mm + b.first->width_mm) / 2, gap = nearest.first - widths;
        if (gap > spec_.cutting.least_gap_mm - k_rounding_mm)
            return std::nullopt;
        CloseLines close{a.name, b.name,          kinds(a, b),     gap, turned(nearest.second),
                         ring,   a.first->time_h, b.first->time_h, 0.0, 0.0};
        if (ring && face_.delineation.style.centre) {
            const double spread = std::abs(cross(way(*a.first), way(*b.first)));
            close.radius_mm = spread > 1e-9 ? (spec_.cutting.least_gap_mm + widths) / spread : 0.0;
            close.reach_mm = std::min(a.reach_mm, b.reach_mm);
        }
        return close;
    }

    [[nodiscard]] static Point way(const DrawnLine& line) {
        const PlatePoint from = line.points.front(), to = line.points.back();
        return unit({to.u_mm - from.u_mm, to.v_mm - from.v_mm});
    }
    [[nodiscard]] Point turned(Point at) const { return Placing{spec_.reader_up, {}, 1.0, 1.0, false}(at); }

    [[nodiscard]] static std::string kinds(const WholeLine& a, const WholeLine& b) {
        std::string one = words_of(a.first->family, a.first->time).lines,
                    other = words_of(b.first->family, b.first->time).lines;
        if (other < one)
            std::swap(one, other);
        return one == other ? one : one + " and " + other;
    }

    const Face& face_;
    const FaceSpec& spec_;
    double near_mm_ = 0, cell_mm_ = 1;
    std::vector<WholeLine> lines_;
    std::map<std::tuple<Family, int, std::string, long>, std::size_t> index_;
    std::vector<Segment> segments_;
    std::map<std::pair<int, int>, std::vector<std::size_t>> cells_;
    std::map<std::pair<std::size_t, std::size_t>, Nearest> nearest_;
};

} // namespace

std::vector<CloseLines> close_lines(const Face& face, const FaceSpec& spec) {
    return LineCheck{face, spec}.found();
}

} // namespace dialwright::layout
