// SPDX-License-Identifier: MIT
//
// Days run to the right from the start of the year, minutes up: what is added stands above the line of nothing, what is
// taken below it, and the words for both stand in the field, where the curve leaves room, with the grid broken for them.
#include "layout/correction/plate_work.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_length_days = MeanYear::k_length_days;

class Graph {
  public:
    explicit Graph(PlateWork& work) : work_{work}, letter_{work.spec.letter_height_mm} {}

    void draw() {
        const Box inside = draw_rectangle(work_);
        Box room = work_.spec.sentences ? draw_heading_and_words(work_, inside) : inside.grown(-letter_);
        find_range(room);
        const double figures = widest_figure() + 1.5 * letter_;
        room.left_mm += figures;
        room.right_mm -= figures;
        months_ = work_.month_names(room.width_mm() / 12 * 28 / 30.5, letter_);
        room.bottom_mm += 1.9 * months_.height_mm;
        field_ = room;
        if (field_.height_mm() < 8 * letter_ || field_.width_mm() < 16 * letter_)
            work_.too_small("a graph");
        find_range(room);
        step_ = number_step();
        walk_curve();
        place_words();
        draw_days();
        draw_minutes();
        draw_curve();
    }

  private:
    [[nodiscard]] double x(double day) const { return field_.left_mm + field_.width_mm() * day / k_length_days; }
    [[nodiscard]] double y(double minutes) const {
        return field_.bottom_mm + field_.height_mm() * (minutes - low_) / (high_ - low_);
    }
    [[nodiscard]] double minute_mm() const { return field_.height_mm() / (high_ - low_); }
    [[nodiscard]] bool has_both() const { return low_ < 0 && high_ > 0; }

    /// Whole minutes round the year's, and room for the words on either side of nothing.
    void find_range(const Box& room) {
        const double least = work_.correction.least_min(), most = work_.correction.most_min();
        low_ = std::floor(least - 0.4);
        high_ = std::ceil(most + 0.4);
        if (least >= 0) // what is only added has no side for what is taken
            low_ = std::max(low_, 0.0);
        if (most <= 0)
            high_ = std::min(high_, 0.0);
        if (low_ > 0 && low_ < 5)
            low_ = 0;
        if (high_ < 0 && high_ > -5)
            high_ = 0;
        for (int i = 0; i < 40 && has_both(); ++i) {
            const double words = 2.6 * letter_ * (high_ - low_) / room.height_mm();
            if (-low_ < words)
                low_ -= 1;
            else if (high_ < words)
                high_ += 1;
            else
                break;
        }
    }

    [[nodiscard]] double widest_figure() const {
        double widest = 0;
        for (double minutes = low_; minutes <= high_; minutes += 1)
            widest = std::max(widest, work_.width_mm(minutes_figure(minutes), letter_));
        return widest;
    }

    /// Minutes from one figure to the next.
    [[nodiscard]] int number_step() const {
        for (const int step : {1, 2, 5, 10, 15, 20, 30})
            if (step * minute_mm() >= 1.9 * letter_)
                return step;
        work_.too_small("the figures of its minutes");
    }

    /// Minutes from one line to the next: as close as the tool leaves them apart, and meeting the figures.
    [[nodiscard]] int line_step() const {
        for (const int step : {1, 2, 5, 10, 15, 20, 30})
            if (step_ % step == 0 && step * minute_mm() >= work_.least_pitch_mm())
                return step;
        return step_;
    }

    void walk_curve() {
        curve_.clear();
        for (double day = 0; day <= k_length_days; day += 1)
            curve_.push_back({x(day), y(work_.correction.add_min(day))});
    }

    [[nodiscard]] double clear_of_curve(const Box& box) const {
        double least = 1e300; // squared
        for (const Point& p : curve_) {
            const double right = std::max({box.left_mm - p.x_mm, p.x_mm - box.right_mm, 0.0});
            const double up = std::max({box.bottom_mm - p.y_mm, p.y_mm - box.top_mm, 0.0});
            least = std::min(least, right * right + up * up);
        }
        return std::sqrt(least);
    }

    /// Where words stand clearest of the curve between two heights of the field; near the middle before the sides.
    [[nodiscard]] std::optional<Box> words_place(const std::string& words, double height, double bottom,
                                                 double top) const {
        const double half_w = work_.width_mm(words, height) / 2 + 0.6 * height, half_h = 0.95 * height;
        std::optional<Box> best;
        double best_score = 0.0;
        for (int row = 0; row <= 16; ++row)
            for (int column = 0; column <= 40; ++column) {
                const Point at{between({field_.left_mm + half_w, 0}, {field_.right_mm - half_w, 0}, column / 40.0).x_mm,
                               bottom + half_h + (top - bottom - 2 * half_h) * row / 16.0};
                const Box box{at.x_mm - half_w, at.y_mm - half_h, at.x_mm + half_w, at.y_mm + half_h};
                if (box.bottom_mm < bottom || box.top_mm > top || 2 * half_w > 0.9 * field_.width_mm())
                    continue;
                const double clear = clear_of_curve(box);
                const double score = std::min(clear, 2.5 * height) - 0.02 * std::abs(at.x_mm - field_.middle().x_mm);
                if (clear > 0.5 * height && (!best || score > best_score)) {
                    best = box;
                    best_score = score;
                }
            }
        return best;
    }

    void place_words() {
        const double edge = work_.line_mm();
        const double nothing = has_both() ? y(0) : high_ <= 0 ? field_.top_mm : field_.bottom_mm;
        const auto place = [&](const char* words, double bottom, double top) {
            for (double height = 1.15 * letter_; height >= std::min(letter_, work_.least_letter()); height *= 0.93)
                if (const auto box = words_place(words, height, bottom, top)) {
                    work_.letter(words, height, box->middle(), Angle{}, words);
                    const Box& b = *box;
                    kept_free_.push_back(Outline::polygon({{b.left_mm, b.bottom_mm},
                                                           {b.right_mm, b.bottom_mm},
                                                           {b.right_mm, b.top_mm},
                                                           {b.left_mm, b.top_mm}}));
                    return;
                }
            work_.too_small("its words");
        };
        if (high_ > 0)
            place(k_add_words, nothing + edge, field_.top_mm - edge);
        if (low_ < 0)
            place(k_take_words, field_.bottom_mm + edge, nothing - edge);
    }

    void engrave_in_field(Point a, Point b, double width, const std::string& name) {
        for (const Polyline& piece : clipped({a, b}, Region{{}, kept_free_}))
            if (length_mm(piece) > 1.4 * letter_)
                work_.engrave(piece, width, name);
    }

    void draw_days() {
        const double day_mm = field_.width_mm() / k_length_days;
        for (unsigned month = 1; month <= 12; ++month) {
            const double start = work_.correction.start_of_month(month),
                         end = work_.correction.start_of_month(month + 1);
            if (month > 1)
                engrave_in_field({x(start), field_.bottom_mm}, {x(start), field_.top_mm}, work_.middle_mm(),
                                 fmt::format("start of {}", month_name(month)));
            work_.letter(months_.names[month - 1], months_.height_mm,
                         {x((start + end) / 2), field_.bottom_mm - 1.1 * months_.height_mm}, Angle{},
                         month_name(month));
            // The 11th and the 21st, or where they would crowd, nothing.
            if (9 * day_mm < work_.least_pitch_mm())
                continue;
            for (const double day : {start + 10, start + 20})
                engrave_in_field({x(day), field_.bottom_mm}, {x(day), field_.top_mm}, work_.fine_mm(),
                                 fmt::format("{} {}", month_name(month), day > start + 15 ? 21 : 11));
        }
    }

    void draw_minutes() {
        const int lines = line_step();
        for (int minutes = int(low_); minutes <= int(high_); ++minutes) {
            const bool edge = minutes == int(low_) || minutes == int(high_);
            const bool numbered = minutes % step_ == 0;
            if (minutes % lines == 0 && !edge)
                engrave_in_field({field_.left_mm, y(minutes)}, {field_.right_mm, y(minutes)},
                                 minutes == 0 ? work_.line_mm()
                                 : numbered   ? work_.middle_mm()
                                              : work_.fine_mm(),
                                 fmt::format("minutes {}", minutes));
            if (!numbered)
                continue;
            const std::string figure = minutes_figure(minutes);
            const double out = 0.7 * letter_ + work_.width_mm(figure, letter_) / 2;
            for (const double at : {field_.left_mm - out, field_.right_mm + out})
                work_.letter(figure, letter_, {at, y(minutes)}, Angle{}, "figure " + figure);
        }
        work_.engrave(rectangle(field_), work_.line_mm(), "field");
    }

    /// Cubics whose ends and slopes are the curve's own.
    void draw_curve() {
        constexpr int k_pieces = 96;
        const auto point = [&](double day) { return Point{x(day), y(work_.correction.add_min(day))}; };
        const auto slope = [&](double day) {
            return Point{field_.width_mm() / k_length_days, work_.correction.rate_min(day) * minute_mm()};
        };
        Path curve{point(0), {}, false};
        const double step = k_length_days / k_pieces;
        for (int i = 0; i < k_pieces; ++i) {
            const double from = i * step, to = (i + 1) * step;
            curve.pieces.emplace_back(
                CurveTo{point(from) + step / 3 * slope(from), point(to) - step / 3 * slope(to), point(to)});
        }
        work_.engrave(std::move(curve), 1.4 * work_.line_mm(), "curve");
    }

    PlateWork& work_;
    double letter_;
    Box field_;
    double low_ = 0, high_ = 0; ///< minutes at the field's foot and head
    int step_ = 5;
    PlateWork::MonthNames months_;
    std::vector<Outline> kept_free_;
    std::vector<Point> curve_; ///< at each day
};

} // namespace

void draw_graph(PlateWork& work) {
    Graph{work}.draw();
}

} // namespace dialwright::layout
