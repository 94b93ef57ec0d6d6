// SPDX-License-Identifier: MIT
#include "layout/drawing/once.hpp"

#include "layout/drawing/measures.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <map>
#include <numbers>
#include <set>
#include <tuple>
#include <unordered_map>
#include <utility>

// Every line and arc is a stretch of a carrier: a straight line measured in mm from its start, or a circle measured in
// radians from its start. What other stretches of the same carrier, drawn before, have covered is taken away from it.
// Carriers are found by the slope of a line or the radius of a circle, in a table of buckets with their neighbours.

namespace dialwright::layout {
namespace {

constexpr double k_same_mm = 1e-4;
constexpr double k_turn = 2 * std::numbers::pi;

/// Where a piece stands in the drawing, and its two ends.
struct Stretch {
    std::size_t mark = 0, path = 0, piece = 0;
    Point from, to;
    const ArcTo* arc = nullptr; ///< nothing for a straight line
    Box box;
    double size = 0; ///< mm of a line, radius of an arc
};

/// A part from `low` to `high` along a stretch, with the points that stand there.
struct Part {
    double low = 0, high = 0;
    Point from, to;
};

long bucket_of(const Stretch& s) {
    if (s.arc != nullptr)
        return 1'000'000 + std::lround(s.size * 100);
    double slope = std::atan2(s.to.y_mm - s.from.y_mm, s.to.x_mm - s.from.x_mm);
    slope = slope < 0 ? slope + std::numbers::pi : slope;
    return std::lround(slope * 500); // 2 mrad: what 0.1 µm turns the shortest of lines by
}

/// The bucket and those beside it. Slopes go round, 0 and π are one, so near either end the other end is beside it too.
std::vector<long> near(long bucket) {
    constexpr long k_half_turn = 1571;
    std::vector<long> found{bucket - 1, bucket, bucket + 1};
    if (bucket <= 2)
        found.insert(found.end(), {k_half_turn - 2, k_half_turn - 1, k_half_turn, k_half_turn + 1});
    else if (bucket < 1'000'000 && bucket >= k_half_turn - 2)
        found.insert(found.end(), {-1, 0, 1, 2});
    std::sort(found.begin(), found.end());
    found.erase(std::unique(found.begin(), found.end()), found.end());
    return found;
}

/// What of a line another covers.
void add_covered(std::vector<Part>& parts, const Stretch& line, const Stretch& by) {
    const double ux = (line.to.x_mm - line.from.x_mm) / line.size, uy = (line.to.y_mm - line.from.y_mm) / line.size;
    const auto along = [&](Point p) { return (p.x_mm - line.from.x_mm) * ux + (p.y_mm - line.from.y_mm) * uy; };
    const auto aside = [&](Point p) { return (p.y_mm - line.from.y_mm) * ux - (p.x_mm - line.from.x_mm) * uy; };
    double a = along(by.from), b = along(by.to), off_a = aside(by.from), off_b = aside(by.to);
    Point from = by.from, to = by.to;
    if (a > b) {
        std::swap(a, b);
        std::swap(off_a, off_b);
        std::swap(from, to);
    }
    const double low = std::max(a, 0.0), high = std::min(b, line.size);
    if (high - low <= k_same_mm)
        return;
    const auto off_at = [&](double t) { return off_a + (off_b - off_a) * (t - a) / (b - a); };
    if (std::abs(off_at(low)) > k_same_mm || std::abs(off_at(high)) > k_same_mm)
        return;
    parts.push_back({low, high, a >= 0 ? from : line.from, b <= line.size ? to : line.to});
}

/// What of an arc another covers, in radians from its start the way it runs.
void add_covered_arc(std::vector<Part>& parts, const Stretch& arc, const Stretch& by) {
    const auto apart = [](Point p, Point q) { return std::hypot(p.x_mm - q.x_mm, p.y_mm - q.y_mm); };
    if (apart(arc.arc->centre, by.arc->centre) > k_same_mm || std::abs(arc.size - by.size) > k_same_mm)
        return;
    const auto angle = [](Point p, Point c) { return std::atan2(p.y_mm - c.y_mm, p.x_mm - c.x_mm); };
    const double way = arc.arc->sweep.in_radians() < 0 ? -1.0 : 1.0, sweep = std::abs(arc.arc->sweep.in_radians());
    const double others = by.arc->sweep.in_radians() * way;
    double begin = way * (angle(by.from, by.arc->centre) - angle(arc.from, arc.arc->centre));
    Point from = by.from, to = by.to;
    if (others < 0) {
        begin += others;
        std::swap(from, to);
    }
    begin -= k_turn * std::ceil(begin / k_turn);
    const double least = k_same_mm / arc.size;
    for (double a = begin; a < sweep; a += k_turn) {
        const double b = a + std::abs(others), low = std::max(a, 0.0), high = std::min(b, sweep);
        if (high - low > least)
            parts.push_back({low, high, a >= 0 ? from : arc.from, b <= sweep ? to : arc.to});
    }
}

/// What is left of a stretch.
std::vector<Part> left_of(const Stretch& s, std::vector<Part> covered) {
    std::sort(covered.begin(), covered.end(),
              [](const Part& a, const Part& b) { return std::tie(a.low, a.high) < std::tie(b.low, b.high); });
    const double whole = s.arc != nullptr ? std::abs(s.arc->sweep.in_radians()) : s.size;
    const double least = s.arc != nullptr ? k_same_mm / s.size : k_same_mm;
    std::vector<Part> left;
    Part next{0, 0, s.from, {}};
    for (const Part& part : covered) {
        if (part.low - next.low > least)
            left.push_back({next.low, part.low, next.from, part.from});
        if (part.high > next.low) {
            next.low = part.high;
            next.from = part.to;
        }
    }
    if (whole - next.low > least)
        left.push_back({next.low, whole, next.from, s.to});
    return left;
}

using Place = std::tuple<std::size_t, std::size_t, std::size_t>;

std::vector<Stretch> stretches_of(const std::vector<Mark>& marks) {
    std::vector<Stretch> all;
    for (std::size_t m = 0; m < marks.size(); ++m) {
        for (std::size_t p = 0; p < marks[m].paths.size() && !marks[m].filled; ++p) {
            const Path& path = marks[m].paths[p];
            Point at = path.start;
            for (std::size_t i = 0; i < path.pieces.size(); ++i) {
                const Point to = end_of(path.pieces[i]);
                Stretch s{m, p, i, at, to, std::get_if<ArcTo>(&path.pieces[i]), {}, 0};
                const Point other = s.arc != nullptr ? s.arc->centre : to;
                s.size = std::hypot(at.x_mm - other.x_mm, at.y_mm - other.y_mm);
                s.box = bounds_of(at, path.pieces[i]).grown(k_same_mm);
                if (!std::holds_alternative<CurveTo>(path.pieces[i]) && s.size > k_same_mm)
                    all.push_back(s);
                at = to;
            }
        }
    }
    // The wider stroke hides the narrower one, whichever was drawn first.
    std::stable_sort(all.begin(), all.end(), [&](const Stretch& a, const Stretch& b) {
        return marks[a.mark].width_mm > marks[b.mark].width_mm;
    });
    return all;
}

/// What is left of each piece that is covered, wholly or in part.
std::map<Place, std::vector<Part>> thinned(const std::vector<Mark>& marks) {
    std::map<Place, std::vector<Part>> changed;
    std::unordered_map<long, std::vector<const Stretch*>> seen;
    const std::vector<Stretch> all = stretches_of(marks);
    for (const Stretch& s : all) {
        std::vector<Part> covered;
        const long bucket = bucket_of(s);
        for (const long beside : near(bucket)) {
            const auto found = seen.find(beside);
            if (found == seen.end())
                continue;
            for (const Stretch* by : found->second) {
                if (by->box.meets(s.box) && s.arc != nullptr)
                    add_covered_arc(covered, s, *by);
                else if (by->box.meets(s.box))
                    add_covered(covered, s, *by);
            }
        }
        seen[bucket].push_back(&s);
        if (!covered.empty())
            changed.emplace(Place{s.mark, s.path, s.piece}, left_of(s, std::move(covered)));
    }
    return changed;
}

/// The path with the parts that are left; what now is apart becomes paths of its own.
void add_left(std::vector<Path>& to, const Path& path, const std::map<Place, std::vector<Part>>& changed, Place place) {
    std::vector<Path> runs;
    bool goes_on = false;
    Point at = path.start;
    const auto add = [&](Point from, Piece piece) {
        if (!goes_on)
            runs.push_back({from, {}, false});
        runs.back().pieces.push_back(std::move(piece));
        goes_on = true;
    };
    for (const Piece& piece : path.pieces) {
        const auto found = changed.find(place);
        ++std::get<2>(place);
        if (found == changed.end()) {
            add(at, piece);
        } else {
            for (const Part& part : found->second) {
                goes_on = goes_on && part.low == 0;
                if (const auto* arc = std::get_if<ArcTo>(&piece)) {
                    const double way = arc->sweep.in_radians() < 0 ? -1.0 : 1.0;
                    add(part.from, ArcTo{part.to, arc->centre, Angle::radians(way * (part.high - part.low))});
                } else {
                    add(part.from, LineTo{part.to});
                }
            }
            goes_on = !found->second.empty() && found->second.back().to == end_of(piece);
        }
        at = end_of(piece);
    }
    // A ring that was opened elsewhere still runs through its own start.
    if (runs.size() > 1 && path.closed && goes_on && runs.front().start == path.start) {
        Path& last = runs.back();
        last.pieces.insert(last.pieces.end(), runs.front().pieces.begin(), runs.front().pieces.end());
        runs.erase(runs.begin());
    }
    to.insert(to.end(), runs.begin(), runs.end());
}

/// Equal whichever end a path is walked from; a ring also from wherever it starts. Numbers in 0.1 µm.
std::vector<long long> key_of(const Path& path, bool keeps_way) {
    const auto numbers = [](const Path& p) {
        std::vector<std::vector<long long>> rows;
        Point at = p.start;
        const auto add = [](std::vector<long long>& row, Point q) {
            row.push_back(std::llround(q.x_mm / k_same_mm));
            row.push_back(std::llround(q.y_mm / k_same_mm));
        };
        for (const Piece& piece : p.pieces) {
            std::vector<long long>& row = rows.emplace_back();
            row.push_back(static_cast<long long>(piece.index()));
            add(row, at);
            add(row, end_of(piece));
            if (const auto* arc = std::get_if<ArcTo>(&piece)) {
                add(row, arc->centre);
                row.push_back(arc->sweep.in_radians() < 0 ? -1 : 1);
            } else if (const auto* curve = std::get_if<CurveTo>(&piece)) {
                add(row, curve->control_1);
                add(row, curve->control_2);
            }
            at = end_of(piece);
        }
        if (p.closed && !rows.empty())
            std::rotate(rows.begin(), std::min_element(rows.begin(), rows.end()), rows.end());
        std::vector<long long> key{p.closed ? 1 : 0};
        for (const auto& row : rows)
            key.insert(key.end(), row.begin(), row.end());
        return key;
    };
    std::vector<long long> key = numbers(path);
    return keeps_way ? key : std::min(key, numbers(reversed(path)));
}

bool has_curves(const Path& path) {
    return std::any_of(path.pieces.begin(), path.pieces.end(),
                       [](const Piece& piece) { return std::holds_alternative<CurveTo>(piece); });
}

/// Tells at little cost that a path has no equal among others: equal ones have as many pieces, and nearly the same sum
/// of what its points measure.
class FirstLook {
  public:
    void add(const Path& path) { ++seen_[bucket_of(path)]; }
    [[nodiscard]] bool alone(const Path& path) const {
        const auto [pieces, sum] = bucket_of(path);
        int alike = 0;
        for (const long long beside : {sum - 1, sum, sum + 1})
            if (const auto found = seen_.find({pieces, beside}); found != seen_.end())
                alike += found->second;
        return alike <= 1;
    }

  private:
    using Bucket = std::pair<std::size_t, long long>;
    struct Hash {
        std::size_t operator()(const Bucket& b) const {
            return std::hash<long long>{}(b.second * 4099 + static_cast<long long>(b.first));
        }
    };
    [[nodiscard]] static Bucket bucket_of(const Path& path) {
        double sum = path.closed ? 0.0 : path.start.x_mm + 2 * path.start.y_mm;
        for (const Piece& piece : path.pieces) {
            const Point to = end_of(piece);
            sum += to.x_mm + 2 * to.y_mm;
        }
        const double wide = 6 * k_same_mm * static_cast<double>(path.pieces.size() + 1);
        return {path.pieces.size(), std::llround(sum / wide)};
    }

    std::unordered_map<Bucket, int, Hash> seen_;
};

/// Contours of filled shapes, and strokes with curves in them, go only as wholes. In one filled shape a contour that
/// runs the other way is a hole, and stays.
std::size_t drop_equal(std::vector<Mark>& marks) {
    std::size_t dropped = 0;
    FirstLook filled_look, stroke_look;
    for (const Mark& mark : marks)
        for (const Path& path : mark.paths)
            if (mark.filled || has_curves(path))
                (mark.filled ? filled_look : stroke_look).add(path);
    std::set<std::vector<long long>> filled, strokes;
    for (Mark& mark : marks) {
        std::set<std::vector<long long>> here;
        std::vector<std::vector<long long>> keys;
        const auto again = [&](const Path& path) {
            if (!mark.filled)
                return has_curves(path) && !stroke_look.alone(path) && !strokes.insert(key_of(path, false)).second;
            if (filled_look.alone(path))
                return false;
            keys.push_back(key_of(path, false));
            return filled.contains(keys.back()) || !here.insert(key_of(path, true)).second;
        };
        dropped += std::erase_if(mark.paths, again);
        filled.insert(keys.begin(), keys.end());
    }
    return dropped;
}

} // namespace

std::size_t draw_once(std::vector<Mark>& marks) {
    std::size_t dropped = drop_equal(marks);
    const auto changed = thinned(marks);
    dropped += changed.size();
    for (auto next = changed.begin(); next != changed.end();) {
        const std::size_t at = std::get<0>(next->first);
        std::vector<Path> left;
        for (std::size_t p = 0; p < marks[at].paths.size(); ++p) {
            const auto first = changed.lower_bound(Place{at, p, 0});
            const bool is_changed =
                first != changed.end() && std::get<0>(first->first) == at && std::get<1>(first->first) == p;
            if (is_changed)
                add_left(left, marks[at].paths[p], changed, Place{at, p, 0});
            else
                left.push_back(marks[at].paths[p]);
        }
        marks[at].paths = std::move(left);
        next = changed.lower_bound(Place{at + 1, 0, 0});
    }
    return dropped;
}

} // namespace dialwright::layout
