// SPDX-License-Identifier: MIT
//
// All lines but those of the chapter ring's own hours: dates, hours of other kinds, altitudes and azimuths, noons
// elsewhere. A label runs along its line, beside it, in the letters of its family. It is put where it stands clear of
// every other line, a date or a name a little smaller rather than not; where no such place is long enough, on one that
// only the ring's hour lines cross, or else on any; the lines then stop for it, as an engraver would have them.
#include "layout/plate/bench.hpp"
#include "layout/plate/family_words.hpp"
#include "layout/plate/shared_lines.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>

namespace dialwright::layout {
namespace {

/// A line by its length.
class Rule {
  public:
    explicit Rule(const Polyline& line) : line_{line}, at_{0.0} {
        for (std::size_t i = 0; i + 1 < line.size(); ++i)
            at_.push_back(at_.back() + distance(line[i], line[i + 1]));
    }
    [[nodiscard]] double length_mm() const { return at_.back(); }
    [[nodiscard]] Point point(double s) const {
        const auto [i, part] = place(s);
        return between(line_[i], line_[i + 1], part);
    }

  private:
    [[nodiscard]] std::pair<std::size_t, double> place(double s) const {
        const auto after = std::upper_bound(at_.begin() + 1, at_.end() - 1, s);
        const auto i = std::size_t(after - at_.begin()) - 1;
        const double run = at_[i + 1] - at_[i];
        return {i, run > 0 ? (s - at_[i]) / run : 0.0};
    }
    const Polyline& line_;
    std::vector<double> at_;
};

struct LabelPlace {
    double score = -1e300;
    std::vector<TurnedBox> chunks;
    Point start, middle, end; ///< on the label's own base line, in reading order
    bool found = false;
};

class FieldDrawer {
  public:
    explicit FieldDrawer(Bench& bench)
        : bench_{bench}, cap_mm_{bench.spec.lettering.label_height_mm}, free_room_{room_of(bench)}, room_{free_room_},
          room_without_hours_{free_room_} {}

    void draw() {
        std::vector<const DialLine*> lines;
        for (const DialLine& line : bench_.delineation.lines)
            if (!in_ring(line))
                lines.push_back(&line);
        if (lines.empty())
            return;
        find_parts();
        if (cap_mm_ > 0) {
            block_lines();
            for (const DialLine* line : lines)
                if (bench_.spec.date_labels || line->family != Family::date)
                    place_label(*line);
            tell_unlabelled();
        }
        for (const DialLine& line : bench_.delineation.lines)
            if (in_ring(line) && line.step_min >= 60)
                for (const Polyline& part : on_field(line))
                    shared_.add(line, line_label(line), part);
        for (const DialLine* line : lines)
            draw(*line);
        for (std::string& note : shared_.told())
            bench_.warnings.push_back(std::move(note));
    }

  private:
    static ClearMap room_of(const Bench& bench) {
        ClearMap room{bench.rings.divisions, bench.clear.cell_mm()};
        for (const Outline& outline : bench.keep_out)
            room.block(TurnedBox{outline.box().middle(), outline.box().width_mm() / 2, outline.box().height_mm() / 2,
                                 Angle{}});
        return room;
    }

    /// Where the marks of half and quarter hours reach into the field.
    void block_marks(const DialLine& line) {
        const std::optional<Outline>* inside = line.step_min == 30   ? &inside_half_hours_
                                               : line.step_min == 15 ? &inside_quarters_
                                                                     : nullptr;
        for (const Polyline& part : on_field(line)) {
            std::vector<Polyline> marks;
            if (inside && *inside)
                marks = clipped(part, {{}, {**inside}});
            else if (bench_.divides_in_field())
                marks = {end_part(part, k_field_mark), end_part({part.back(), part.front()}, k_field_mark)};
            for (const Polyline& mark : marks) {
                room_.block(mark);
                room_without_hours_.block(mark);
            }
        }
    }

    void block_lines() {
        if (bench_.half_hour_reach_mm() > 0)
            inside_half_hours_ = bench_.rings.divisions.inset(bench_.half_hour_reach_mm());
        if (bench_.quarter_hour_reach_mm() > 0)
            inside_quarters_ = bench_.rings.divisions.inset(bench_.quarter_hour_reach_mm());
        for (const DialLine& line : bench_.delineation.lines) {
            const bool drawn_whole = line.step_min >= 60 || (line.step_min == 30 && bench_.divides_in_field());
            if (in_ring(line) && !drawn_whole) {
                block_marks(line);
                continue;
            }
            for (const Polyline& part : on_field(line)) {
                room_.block(part);
                if (!in_ring(line))
                    room_without_hours_.block(part);
            }
        }
        room_.measure();
        room_without_hours_.measure();
    }

    /// The field without any line; seldom wanted.
    [[nodiscard]] const ClearMap& bare_room() {
        if (!bare_room_) {
            bare_room_ = free_room_;
            bare_room_->measure();
            for (const TurnedBox& label : placed_)
                bare_room_->block(label);
        }
        return *bare_room_;
    }

    void place_label(const DialLine& line) {
        if (on_field(line).empty())
            return;
        const std::string label = field_label(line, dress(line));
        const auto lettered = [&](double part) {
            return bench_.letters(dress(line).italic).line(label, part * cap_mm_, 0.04 * part * cap_mm_);
        };
        constexpr double k_smaller = 0.85;
        double height = cap_mm_;
        LetteredLine text = lettered(1.0);
        LabelPlace best = search(line, text, room_);
        const bool words = line.family == Family::date || line.family == Family::place_noon;
        if (words && !best.found) {
            height = k_smaller * cap_mm_;
            text = lettered(k_smaller);
            best = search(line, text, room_);
        }
        const bool in_the_clear = best.found;
        if (!best.found) {
            height = cap_mm_;
            text = lettered(1.0);
            best = search(line, text, room_without_hours_);
        }
        if (!best.found)
            best = search(line, text, bare_room());
        if (!best.found) {
            unlabelled_.emplace_back(words_of(line).lines, label);
            return;
        }
        set(label, text, height, best);
        for (const TurnedBox& chunk : best.chunks) {
            TurnedBox grown = chunk;
            grown.half_width_mm += 0.35 * cap_mm_;
            grown.half_height_mm += 0.35 * cap_mm_;
            placed_.push_back(grown);
            room_.block(grown);
            room_without_hours_.block(grown);
            if (bare_room_)
                bare_room_->block(grown);
            bench_.clear.block(chunk);
            if (in_the_clear)
                continue;
            const auto corners = grown.corners();
            bench_.keep_out.push_back(Outline::polygon({corners.begin(), corners.end()}));
        }
    }

    [[nodiscard]] Dress dress(const DialLine& line) const { return dress_of(line, bench_.families); }

    /// As it is engraved on the field, or of the ring's hours the time.
    [[nodiscard]] std::string line_label(const DialLine& line) const {
        return in_ring(line) ? fmt::format("{}", std::lround(line.time_h)) : field_label(line, dress(line));
    }

    /// A line that another family has drawn already is not cut twice.
    void draw(const DialLine& line) {
        const std::string label = line_label(line);
        for (const Polyline& part : on_field(line)) {
            if (shared_.has(line, label, part)) {
                bench_.cut_once.push_back(&line);
                continue;
            }
            shared_.add(line, label, part);
            const double width = bench_.field_line_width(line.family, line.set);
            std::vector<Polyline> pieces = clipped(part, {{}, bench_.keep_out});
            drop_scraps(pieces, width);
            for (const Polyline& piece : pieces)
                bench_.add_line(line, piece, label, width);
        }
    }

    /// A line's parts on the field, as they are before labels stand in their way.
    [[nodiscard]] const std::vector<Polyline>& on_field(const DialLine& line) const { return parts_.at(&line); }

    void find_parts() {
        const Region field = bench_.field();
        for (const DialLine& line : bench_.delineation.lines) {
            std::vector<Polyline>& parts = parts_[&line];
            for (const PlatePolyline& piece : line.pieces)
                for (Polyline& part : clipped(bench_.to_work(piece), field))
                    parts.push_back(std::move(part));
        }
    }

    void tell_unlabelled() {
        if (unlabelled_.empty())
            return;
        bench_.warnings.push_back(fmt::format("no room beside their lines for the labels of {}: give the labels a "
                                              "smaller height, or draw fewer lines",
                                              by_family(unlabelled_)));
    }

    [[nodiscard]] LabelPlace search(const DialLine& line, const LetteredLine& text, const ClearMap& room) const {
        LabelPlace best;
        for (const Polyline& part : on_field(line)) {
            const Rule rule{part};
            const double half = text.ink.width_mm() / 2 + 0.4 * cap_mm_;
            for (double s = half; s <= rule.length_mm() - half; s += std::max(1.0, 0.4 * cap_mm_))
                for (const double side : {1.0, -1.0})
                    consider(line.family, rule, s, side, text, room, best);
        }
        return best;
    }

    void consider(Family family, const Rule& rule, double s, double side, const LetteredLine& text,
                  const ClearMap& room, LabelPlace& best) const {
        const double half = text.ink.width_mm() / 2;
        const Point right = right_of(bench_.up);
        const Point whole_run = rule.point(s + half) - rule.point(s - half);
        if (length(whole_run) < 1.9 * half) // bends by more than letters can follow, or is doubled back
            return;
        const double sense = dot(whole_run, right) >= 0 ? 1.0 : -1.0; // reads to the reader's right
        LabelPlace place;
        const int chunks = std::max(2, int(std::ceil(2 * half / (1.5 * cap_mm_))));
        // The base line's distance from the line; the ink reaches from below it (a p, a Q) to above the capitals.
        const double gap = 0.45 * cap_mm_ + 0.7 * room.cell_mm();
        const double base_off = side > 0 ? gap - text.ink.bottom_mm : -gap - text.ink.top_mm;
        const double ink_middle = (text.ink.top_mm + text.ink.bottom_mm) / 2;
        double clearance = 1e300;
        std::vector<Point> bases;
        for (int i = 0; i < chunks; ++i) {
            const double from = s + sense * half * (2.0 * i / chunks - 1),
                         to = s + sense * half * (2.0 * (i + 1) / chunks - 1);
            const Point a = rule.point(from), b = rule.point(to), along = unit(b - a);
            const TurnedBox box{between(a, b, 0.5) + (base_off + ink_middle) * left_of(along), distance(a, b) / 2,
                                text.ink.height_mm() / 2, turn_of(along)};
            clearance = std::min(clearance, room.clearance_mm(box, 0.3 * cap_mm_));
            if (clearance < 0.3 * cap_mm_)
                return;
            place.chunks.push_back(box);
        }
        const auto base = [&](double t) {
            const Point along = unit(rule.point(t + 0.01 * sense * half) - rule.point(t - 0.01 * sense * half));
            return rule.point(t) + base_off * left_of(along);
        };
        place.start = base(s - sense * half);
        place.middle = base(s);
        place.end = base(s + sense * half);
        // Date lines are labelled towards the reader's left, the others towards the border.
        const double wish =
            family == Family::date ? dot(place.middle, right) : bench_.rings.divisions.distance_mm(place.middle);
        place.score = std::min(clearance, cap_mm_) - 0.02 * wish / std::max(1.0, cap_mm_);
        place.found = true;
        if (place.score > best.score)
            best = place;
    }

    void set(const std::string& label, const LetteredLine& text, double height, const LabelPlace& place) {
        const Point chord = place.end - place.start;
        const double sagitta = cross(unit(chord), place.middle - place.start); // + bulges to the left: heads outward
        if (std::abs(sagitta) < 0.02 * cap_mm_) {
            const Point along = unit(chord);
            const double lead = text.ink.left_mm;
            bench_.add_letters(set_straight(text, place.start - lead * along, turn_of(along)), "label", label, height);
            return;
        }
        const double half = length(chord) / 2;
        const double radius = (half * half + sagitta * sagitta) / (2 * std::abs(sagitta));
        const Point towards_centre = (sagitta > 0 ? -1.0 : 1.0) * left_of(unit(chord));
        const Point centre = place.middle + radius * towards_centre;
        bench_.add_letters(set_on_circle(text, centre, radius, turn_of(place.middle - centre), sagitta < 0), "label",
                           label, height);
    }

    Bench& bench_;
    double cap_mm_;
    ClearMap free_room_, room_, room_without_hours_;
    std::optional<ClearMap> bare_room_;                          ///< all three with the labels that are placed
    std::optional<Outline> inside_half_hours_, inside_quarters_; ///< the field without the strip of their marks
    std::vector<TurnedBox> placed_;
    std::vector<Named> unlabelled_;
    std::map<const DialLine*, std::vector<Polyline>> parts_;
    SharedLines shared_;
};

} // namespace

void draw_field_lines(Bench& bench) {
    FieldDrawer{bench}.draw();
}

} // namespace dialwright::layout
