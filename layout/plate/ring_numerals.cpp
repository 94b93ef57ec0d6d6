// SPDX-License-Identifier: MIT
//
// Numerals stand in the middle of their band, where the hour's line points. They shrink together, and on a straight side
// slide a little apart, until they stand clear of each other; where that does not do, the crowded ones are left out and
// the maker is told. The numerals of
// summer time stand on the same side of the plate as those of the hour, and a word says whose they are.
#include "layout/plate/bench.hpp"
#include "layout/plate/numerals.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

/// One row of numerals: the middle line of its band, and the band's borders.
struct Row {
    Outline middle, outer, inner;
    double height_mm = 0.0;
    double shift_h = 0.0;             ///< added to the hour
    std::string name;                 ///< "numeral", "summer numeral"
    const Outline* side_of = nullptr; ///< the row's whose sides the numerals keep to; null for its own
    double depth_mm = 0.0;            ///< inside that row
    std::string word;                 ///< beside the row; empty: none
};

class NumeralDrawer {
  public:
    NumeralDrawer(Bench& bench, const Row& row, bool heads_out) : bench_{bench}, row_{row}, heads_out_{heads_out} {}

    void draw(const std::vector<RingHour>& hours) {
        std::vector<Numeral> all;
        for (const RingHour& hour : hours)
            if (const auto exit = place_of(hour))
                all.push_back(numeral_at(*exit, hour.hour, text_of(hour.hour)));
        double height = row_.height_mm;
        while (height > k_least * row_.height_mm && !all_in_band(all, height))
            height *= 0.95;
        const double in_band = height;
        while (height > k_least * row_.height_mm && !all_apart(all, height) && !slid_apart(all, height))
            height *= 0.95;
        if (!all_apart(all, height) &&
            !slid_apart(all, height)) { // all small, and some left out, would be worse than these left out alone
            height = std::min(in_band, k_least_when_dropped * row_.height_mm);
            drop_crowded(all, height);
        }
        if (height < row_.height_mm && bench_.spec.numeral_height_asked)
            bench_.warnings.push_back(
                fmt::format("{}s are {:.1f} mm high instead of {:.1f} mm, so that they stand clear", row_.name, height,
                            row_.height_mm));
        for (const Numeral& n : all)
            set(n, height);
        if (!row_.word.empty() && !all.empty())
            set_word(all, height);
    }

  private:
    static constexpr double k_least = 0.55, k_least_when_dropped = 0.72; ///< of the height that is wanted

    struct Numeral {
        int hour;
        std::string text;
        Point at;             ///< middle of the capitals
        Point normal;         ///< of the border, outward
        double slid_mm = 0.0; ///< from its place to the left of the normal
        double width = 0.0;   ///< of its ink, of a height of 1
    };

    [[nodiscard]] LetteredLine lettered(const std::string& text, double height) const {
        return bench_.lettering.line(text, height, 0.06 * height);
    }
    [[nodiscard]] Numeral numeral_at(const Outline::Exit& place, int hour, std::string text) const {
        const double width = lettered(text, row_.height_mm).ink.width_mm() / row_.height_mm;
        return {hour, std::move(text), place.at, place.normal, 0.0, width};
    }

    /// Where an hour's line meets the row; round a corner, on the side on which the other row has the hour.
    [[nodiscard]] std::optional<Outline::Exit> place_of(const RingHour& hour) const {
        const auto own = row_.middle.exit(hour.from, hour.direction);
        if (!row_.side_of || row_.middle.is_round())
            return own;
        const auto there = row_.side_of->exit(hour.from, hour.direction);
        if (!own || !there || dot(own->normal, there->normal) > 0.999)
            return own;
        return Outline::Exit{kept_between_corners(there->at - row_.depth_mm * there->normal, there->normal),
                             there->normal};
    }

    /// The nearest place on the row's own side that looks the same way.
    [[nodiscard]] Point kept_between_corners(Point at, Point normal) const {
        const std::vector<Point>& corners = row_.middle.corners();
        for (std::size_t i = 0; i < corners.size(); ++i) {
            const Point a = corners[i], b = corners[(i + 1) % corners.size()];
            const Point along = unit(b - a);
            if (dot(right_of(along), normal) > 0.999 && std::abs(dot(at - a, normal)) < 1e-3)
                return a + std::clamp(dot(at - a, along), 0.0, distance(a, b)) * along;
        }
        return at;
    }

    [[nodiscard]] bool upright() const { return bench_.spec.stand == NumeralStand::upright; }

    [[nodiscard]] std::string text_of(int hour) const {
        const int shown = int(std::lround(hour + row_.shift_h)) % 24;
        return numeral(shown == 0 && hour != 0 ? 24 : shown, bench_.spec.numerals, bench_.spec.numeral_count);
    }

    [[nodiscard]] Angle turn_of_numeral(const Numeral& n) const {
        if (upright())
            return turn_of(right_of(bench_.up));
        const Point heads = heads_out_ ? n.normal : -1.0 * n.normal;
        return turn_of(right_of(heads));
    }

    /// Keeps a numeral that follows a straight side within that side's length.
    [[nodiscard]] Point kept_on_side(const Numeral& n, double half_width_mm) const {
        if (row_.middle.is_round())
            return n.at;
        const Point along = left_of(n.normal), at = n.at + n.slid_mm * along;
        const auto room = [&](double way) {
            double least = 1e300;
            for (const Point& corner : row_.middle.corners())
                if (const double ahead = dot(corner - at, along) * way;
                    ahead > -1e-6 && std::abs(dot(corner - at, n.normal)) < 1e-3)
                    least = std::min(least, ahead);
            return least;
        };
        const double ahead = room(1), behind = room(-1);
        if (ahead + behind < 2 * half_width_mm || ahead > 1e200 || behind > 1e200)
            return at;
        const double shift = ahead < half_width_mm    ? ahead - half_width_mm
                             : behind < half_width_mm ? half_width_mm - behind
                                                      : 0.0;
        return at + shift * along;
    }

    [[nodiscard]] TurnedBox box_of(const Numeral& n, double height) const {
        const double half_width = n.width * height / 2;
        const Point at = upright() ? n.at + n.slid_mm * left_of(n.normal) : kept_on_side(n, half_width + 0.2 * height);
        return {at, half_width + 0.22 * height, height / 2, turn_of_numeral(n)};
    }

    /// Whether the numerals stand within the band, which upright ones may be too wide for.
    [[nodiscard]] bool all_in_band(const std::vector<Numeral>& all, double height) const {
        return !upright() ||
               std::all_of(all.begin(), all.end(), [&](const Numeral& n) { return in_band(box_of(n, height)); });
    }
    [[nodiscard]] bool in_band(const TurnedBox& box) const {
        const auto corners = box.corners();
        return std::all_of(corners.begin(), corners.end(),
                           [&](Point p) { return row_.outer.contains(p) && !row_.inner.contains(p); });
    }

    /// Places all along the row's middle line, with the border's normal.
    [[nodiscard]] std::vector<Outline::Exit> places_along(double step_mm) const {
        std::vector<Outline::Exit> places;
        const Outline& line = row_.middle;
        if (line.is_round()) {
            const int parts = std::max(90, int(line.radius_mm() * 6.3 / step_mm));
            for (int i = 0; i < parts; ++i) {
                const Point way = clockwise_from_up(Angle::degrees(360.0 * i / parts));
                places.push_back({line.centre() + line.radius_mm() * way, way});
            }
            return places;
        }
        for (std::size_t i = 0; i < line.corners().size(); ++i) {
            const Point a = line.corners()[i], b = line.corners()[(i + 1) % line.corners().size()];
            const int parts = std::max(1, int(distance(a, b) / step_mm));
            for (int k = 0; k < parts; ++k)
                places.push_back({between(a, b, (k + 0.5) / parts), right_of(unit(b - a))});
        }
        return places;
    }

    /// The row's word stands beside its first numeral, on the side away from the second.
    void set_word(const std::vector<Numeral>& all, double height) {
        const auto first = std::min_element(all.begin(), all.end(),
                                            [](const Numeral& a, const Numeral& b) { return a.hour < b.hour; });
        const auto second = std::min_element(all.begin(), all.end(), [&](const Numeral& a, const Numeral& b) {
            return std::pair{a.hour == first->hour, a.hour} < std::pair{b.hour == first->hour, b.hour};
        });
        std::optional<Numeral> best;
        double best_score = 1e300;
        Numeral word = numeral_at({}, -1, row_.word);
        for (const Outline::Exit& place : places_along(0.25 * height)) {
            word.at = place.at;
            word.normal = place.normal;
            const TurnedBox box = box_of(word, height);
            const double score = distance(box.middle, first->at) - 0.3 * distance(box.middle, second->at);
            if (score >= best_score || !in_band(box) ||
                std::any_of(all.begin(), all.end(), [&](const Numeral& n) { return box.overlaps(box_of(n, height)); }))
                continue;
            best_score = score;
            best = word;
        }
        if (best)
            set(*best, height);
        else
            bench_.warnings.push_back(fmt::format("no room beside the {}s for the word \"{}\"", row_.name, row_.word));
    }

    [[nodiscard]] bool all_apart(const std::vector<Numeral>& all, double height) const {
        std::vector<TurnedBox> boxes;
        for (const Numeral& n : all)
            boxes.push_back(box_of(n, height));
        for (std::size_t i = 0; i < boxes.size(); ++i)
            for (std::size_t k = i + 1; k < boxes.size(); ++k)
                if (boxes[i].overlaps(boxes[k]))
                    return false;
        return true;
    }

    /// Slides numerals of one side apart, each by no more than a fifth of its width, so that it still tells its line.
    /// @return whether all stand apart then; if not they are back in their places
    [[nodiscard]] bool slid_apart(std::vector<Numeral>& all, double height) const {
        if (row_.middle.is_round())
            return false;
        constexpr double k_most = 0.2;
        const auto push = [&](Numeral& n, double by_mm) {
            const double most = k_most * 2 * box_of(n, height).half_width_mm;
            n.slid_mm = std::clamp(n.slid_mm + by_mm, -most, most);
        };
        for (int round = 0; round < 30 && !all_apart(all, height); ++round)
            for (std::size_t i = 0; i < all.size(); ++i)
                for (std::size_t k = i + 1; k < all.size(); ++k) {
                    const TurnedBox a = box_of(all[i], height), b = box_of(all[k], height);
                    if (dot(all[i].normal, all[k].normal) < 0.999 || !a.overlaps(b))
                        continue;
                    const double apart = dot(b.middle - a.middle, left_of(all[i].normal));
                    const double lacks = 0.51 * (a.half_width_mm + b.half_width_mm - std::abs(apart));
                    push(all[i], apart > 0 ? -lacks : lacks);
                    push(all[k], apart > 0 ? lacks : -lacks);
                }
        if (all_apart(all, height) && all_in_band(all, height))
            return true;
        for (Numeral& n : all)
            n.slid_mm = 0.0;
        return false;
    }

    /// Noon stays before all, then the quarters of the day and their halves, then the others.
    [[nodiscard]] static int rank(const Numeral& n) {
        return n.hour == 12 ? 0 : n.hour % 6 == 0 ? 1 : n.hour % 3 == 0 ? 2 : 3;
    }

    void drop_crowded(std::vector<Numeral>& all, double height) {
        std::stable_sort(all.begin(), all.end(), [](const Numeral& a, const Numeral& b) { return rank(a) < rank(b); });
        std::vector<Numeral> kept;
        std::string dropped;
        for (const Numeral& n : all) {
            const TurnedBox box = box_of(n, height);
            const bool clash = std::any_of(kept.begin(), kept.end(),
                                           [&](const Numeral& k) { return box.overlaps(box_of(k, height)); });
            if (!clash)
                kept.push_back(n);
            else
                dropped += (dropped.empty() ? "" : ", ") + n.text;
        }
        all = std::move(kept);
        bench_.warnings.push_back(fmt::format(
            "no room for the {}s {}: their hour lines stand too close together at the border", row_.name, dropped));
    }

    void set(const Numeral& n, double height) {
        const LetteredLine line = lettered(n.text, height);
        if (row_.middle.is_round() && !upright()) {
            const double radius = row_.middle.radius_mm() + (heads_out_ ? -height / 2 : height / 2);
            bench_.add_letters(
                set_on_circle(line, row_.middle.centre(), radius, turn_of(n.at - row_.middle.centre()), !heads_out_),
                row_.name, n.text, height);
            return;
        }
        const TurnedBox box = box_of(n, height);
        const Point along{cos(box.turn), sin(box.turn)};
        const double ink_middle = (line.ink.left_mm + line.ink.right_mm) / 2;
        bench_.add_letters(set_straight(line, box.middle - ink_middle * along - height / 2 * left_of(along), box.turn),
                           row_.name, n.text, height);
    }

    Bench& bench_;
    const Row& row_;
    bool heads_out_;
};

/// The numerals' band, in one row, or in two with the smaller one for summer time inside.
std::vector<Row> rows_of(const Bench& bench) {
    const double band = bench.spec.borders.chapter_ring_mm - bench.division_band_mm();
    const double height = std::min(bench.spec.lettering.numeral_height_mm, 0.9 * band);
    const auto at = [&](double part) { return bench.rings.outer.inset(part * band).value_or(bench.rings.outer); };
    if (!(bench.spec.summer_shift_h > 0))
        return {{at(0.5), bench.rings.outer, bench.rings.numerals, height, 0.0, "numeral", nullptr, 0.0, ""}};
    constexpr double k_border = 0.62;
    return {{at(k_border / 2), bench.rings.outer, at(k_border), std::min(height, 0.66 * k_border * band), 0.0,
             "numeral", nullptr, 0.0, ""},
            {at((1 + k_border) / 2), at(k_border), bench.rings.numerals,
             std::min(0.6 * height, 0.58 * (1 - k_border) * band), bench.spec.summer_shift_h, "summer numeral", nullptr,
             band / 2, bench.spec.summer_word}};
}

} // namespace

void draw_numerals(Bench& bench, const std::vector<RingHour>& hours, bool heads_out) {
    if (bench.spec.borders.chapter_ring_mm <= 0 || bench.spec.lettering.numeral_height_mm <= 0)
        return;
    std::vector<Row> rows = rows_of(bench);
    if (rows.size() > 1)
        rows.back().side_of = &rows.front().middle;
    for (const Row& row : rows)
        NumeralDrawer{bench, row, heads_out}.draw(hours);
    if (rows.size() > 1)
        bench.marks.push_back({Layer::engrave,
                               {rows.front().inner.path()},
                               bench.width_of_step(15),
                               false,
                               "border of the summer numerals"});
}

} // namespace dialwright::layout
