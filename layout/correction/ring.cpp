// SPDX-License-Identifier: MIT
//
// From the rim inward: the months; their days; a circle; the whole minutes, each at the day on which the correction
// passes through it, with their figures; a band that says for which part of the year they are added and for which taken;
// and in the middle the sentences. The year runs clockwise, from its start at the top.
#include "layout/correction/plate_work.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace dialwright::layout {
namespace {

constexpr double k_length_days = MeanYear::k_length_days;

class Ring {
  public:
    explicit Ring(PlateWork& work) : work_{work}, letter_{work.spec.letter_height_mm} {}

    void draw() {
        const double rim = work_.spec.width_mm / 2;
        const double margin = std::max(0.025 * 2 * rim, 1.5 + work_.line_mm());
        months_ = rim - margin;
        days_ = months_ - 2.5 * letter_ - work_.line_mm();
        minutes_ = days_ - 0.85 * letter_ - day_height() - 2 * day_air();
        sides_ = minutes_ - 3.1 * letter_ - work_.line_mm();
        middle_ = sides_ - 2.3 * letter_ - work_.line_mm();
        if (middle_ < 4 * letter_)
            work_.too_small("a ring");
        work_.cut(circle({}, rim));
        work_.engrave(circle({}, months_), work_.line_mm(), "border");
        work_.engrave(circle({}, days_), work_.fine_mm(), "border");
        work_.engrave(circle({}, minutes_), work_.line_mm(), "border");
        work_.engrave(circle({}, sides_), work_.fine_mm(), "border");
        work_.engrave(circle({}, middle_), work_.line_mm(), "border");
        draw_months();
        draw_days();
        draw_minutes();
        draw_sides();
        draw_middle();
    }

  private:
    /// Of the days' figures, and the air between them and what is next to them.
    [[nodiscard]] double day_height() const { return std::max(work_.least_letter(), 0.7 * letter_); }
    [[nodiscard]] double day_air() const { return 0.35 * letter_ + work_.line_mm(); }

    [[nodiscard]] static Angle turn(double day) { return Angle::degrees(360.0 * day / k_length_days); }
    [[nodiscard]] static Point at(double day, double radius) { return radius * clockwise_from_up(turn(day)); }

    void spoke(double day, double from, double to, double width, std::string name) {
        work_.engrave({at(day, from), at(day, to)}, width, std::move(name));
    }

    void draw_months() {
        const double middle = (months_ + days_) / 2;
        const auto names = work_.month_names(2 * std::numbers::pi * (middle - letter_ / 2) / 13, letter_);
        for (unsigned month = 1; month <= 12; ++month) {
            const double start = work_.correction.start_of_month(month),
                         end = work_.correction.start_of_month(month + 1);
            spoke(start, months_, minutes_, work_.middle_mm(), fmt::format("start of {}", month_name(month)));
            work_.letter_round(names.names[month - 1], names.height_mm, middle, turn((start + end) / 2),
                               month_name(month));
        }
    }

    /// A stroke for the middle of each date, or each fifth; the 10th and 20th with their figures.
    void draw_days() {
        const double height = day_height();
        const double day_mm = 2 * std::numbers::pi * minutes_ / k_length_days;
        const int step = day_mm >= work_.least_pitch_mm() ? 1 : 5;
        if (step * day_mm < work_.least_pitch_mm())
            work_.too_small("the days of a ring");
        const bool fives = 5 * day_mm > work_.width_mm("15", height) + 0.6 * height;
        for (const std::chrono::month_day date : dates_of_year()) {
            const unsigned day = unsigned(date.day());
            // 29 February is but a quarter of a day wide here; the last of a month is close to the month's own line.
            if (day % unsigned(step) != 0 || date == std::chrono::February / 29 || day > 28 + unsigned(step == 1) * 3)
                continue;
            const double noon = work_.correction.noon_of(date);
            const bool tenth = day % 10 == 0 && day < 30, fifth = day % 5 == 0 && day < 30;
            const double length = (fifth ? 0.85 : 0.55) * letter_;
            spoke(noon, minutes_, minutes_ + length, fifth ? work_.middle_mm() : work_.fine_mm(), say_date(date));
            if (tenth || (fives && fifth))
                work_.letter_round(fmt::format("{}", day), height, days_ - day_air() - height / 2, turn(noon),
                                   "day " + say_date(date));
        }
    }

    struct MinuteMark {
        double day = 0.0;
        int minutes = 0;
    };

    [[nodiscard]] std::vector<MinuteMark> minute_marks() const {
        std::vector<MinuteMark> marks;
        for (int minutes = int(std::ceil(work_.correction.least_min())); minutes <= work_.correction.most_min();
             ++minutes)
            for (const double day : work_.correction.days_of(minutes))
                marks.push_back({day, minutes});
        std::sort(marks.begin(), marks.end(), [](const MinuteMark& a, const MinuteMark& b) { return a.day < b.day; });
        return marks;
    }

    /// Nothing and the fives first; then those beside a turn of the year; then even ones.
    [[nodiscard]] int rank(const MinuteMark& mark) const {
        if (mark.minutes == 0)
            return 0;
        if (mark.minutes % 5 == 0)
            return 1;
        const auto& turns = work_.correction.turns();
        const bool beside_a_turn = std::any_of(turns.begin(), turns.end(), [&](double day) {
            return std::abs(work_.correction.add_min(day) - mark.minutes) < 1.0 && std::abs(day - mark.day) < 40;
        });
        return beside_a_turn ? 2 : mark.minutes % 2 == 0 ? 3 : 4;
    }

    /// Under the circle of minutes, where no other figure has the place.
    void set_figure(int minutes, double day) {
        const double radius = minutes_ - 1.8 * letter_;
        const std::string figure = minutes_figure(minutes);
        const double half =
            (work_.width_mm(figure, letter_) / 2 + 0.25 * letter_) / radius * k_length_days / (2 * std::numbers::pi);
        for (const auto& [other, other_half] : figures_)
            if (std::abs(std::remainder(other - day, k_length_days)) < other_half + half)
                return;
        figures_.emplace_back(day, half);
        work_.letter_round(figure, letter_, radius, turn(day), fmt::format("figure {}", minutes));
    }

    void draw_minutes() {
        const double length = 0.9 * letter_;
        std::vector<MinuteMark> marks = minute_marks();
        const double pitch_days = work_.least_pitch_mm() / (2 * std::numbers::pi * (minutes_ - length)) * k_length_days;
        std::stable_sort(marks.begin(), marks.end(),
                         [this](const MinuteMark& a, const MinuteMark& b) { return rank(a) < rank(b); });
        std::vector<double> drawn;
        bool thinned = false;
        for (const MinuteMark& mark : marks) {
            const auto too_near = [&](double other) {
                return std::abs(std::remainder(other - mark.day, k_length_days)) < pitch_days;
            };
            if (std::any_of(drawn.begin(), drawn.end(), too_near)) {
                thinned = true;
                continue;
            }
            drawn.push_back(mark.day);
            const bool five = mark.minutes % 5 == 0;
            spoke(mark.day, minutes_, minutes_ - (five ? 1.0 : 0.7) * length,
                  five ? work_.middle_mm() : work_.fine_mm(), fmt::format("minute {}", mark.minutes));
            set_figure(mark.minutes, mark.day);
        }
        // Where the year turns short of a whole minute that is nearest there, its figure stands without a mark.
        for (const double day : work_.correction.turns()) {
            const double value = work_.correction.add_min(day), nearest = std::round(value);
            const bool passed = std::any_of(marks.begin(), marks.end(), [&](const MinuteMark& mark) {
                return mark.minutes == int(nearest) && std::abs(std::remainder(mark.day - day, k_length_days)) < 60;
            });
            if (!passed)
                set_figure(int(nearest), day);
        }
        if (thinned)
            work_.warnings.push_back("some minute marks of the ring would stand closer than the tool cuts: left out");
    }

    /// A stretch of the year in which minutes are only added, or only taken.
    void draw_side(double from, double to, bool adds) {
        double most = 0;
        for (double day = from; day <= to; day += 0.5)
            most = std::max(most, std::abs(work_.correction.add_min(day)));
        if (most < 0.5)
            return; // nothing that is read on a dial
        const double radius = (sides_ + middle_) / 2;
        const double room = (to - from) / k_length_days * 2 * std::numbers::pi * (radius - letter_ / 2);
        for (const char* words : {adds ? k_add_words : k_take_words, adds ? "add" : "take"})
            for (double height = 1.1 * letter_; height >= std::min(letter_, work_.least_letter()); height *= 0.94)
                if (work_.width_mm(words, height) + height < room) {
                    work_.letter_round(words, height, radius, turn((from + to) / 2), words);
                    return;
                }
        work_.too_small("its words");
    }

    void draw_sides() {
        const std::vector<double> nothing = work_.correction.days_of(0);
        if (nothing.empty()) {
            const bool adds = work_.correction.least_min() > 0;
            for (int quarter = 0; quarter < 4; ++quarter)
                draw_side(k_length_days * quarter / 4, k_length_days * (quarter + 1) / 4, adds);
            return;
        }
        for (std::size_t i = 0; i < nothing.size(); ++i) {
            const double from = nothing[i];
            const double to = i + 1 < nothing.size() ? nothing[i + 1] : nothing.front() + k_length_days;
            spoke(from, sides_, middle_, work_.line_mm(), "nothing to add");
            draw_side(from, to, work_.correction.add_min((from + to) / 2) > 0);
        }
    }

    /// The sentences in the middle, each line as wide as the circle is there.
    void draw_middle() {
        std::vector<std::string> sentences{say_rule(work_.correction)};
        if (const std::string summer = say_summer(work_.correction.summer(), work_.spec.summer_numerals);
            !summer.empty())
            sentences.push_back(summer);
        for (double height = 1.5 * letter_; height >= std::min(letter_, work_.least_letter()); height *= 0.95)
            for (std::size_t count = 2; count <= 12; ++count)
                for (const double part : {0.7, 0.78, 0.85, 0.92, 1.0}) // as narrow as the lines can be: even ones
                    if (set_middle(sentences, height, count, part))
                        return;
        work_.too_small("its words");
    }

    /// In `count` lines under the heading, over a part of the circle's width; nothing is drawn where that does not do.
    bool set_middle(const std::vector<std::string>& sentences, double height, std::size_t count, double part) {
        const double radius = middle_ - 1.2 * letter_, lead = 1.65 * height, gap = 0.7 * lead;
        const double heading = 1.35 * height;
        const double all = heading + (double(count) * lead) + gap * double(sentences.size());
        const auto chord = [&](double up) {
            const double off = std::abs(up) + height / 2;
            return off < radius ? 2 * std::sqrt(radius * radius - off * off) : 0.0;
        };
        const std::string title = heading_of(work_.correction);
        if (work_.width_mm(title, heading) > chord(all / 2 - heading / 2))
            return false;
        std::vector<std::pair<std::string, double>> lines; // and their middles
        double up = all / 2 - heading / 2;
        for (const std::string& sentence : sentences) {
            up -= lead + gap;
            const auto some = work_.wrapped(
                sentence, height, [&](std::size_t i) { return part * chord(up - lead * double(i)); }, count);
            if (!some)
                return false;
            up += lead;
            for (const std::string& line : *some)
                lines.emplace_back(line, up -= lead);
        }
        if (lines.size() != count)
            return false;
        work_.letter(title, heading, {0, all / 2 - heading / 2}, Angle{}, "heading");
        for (const auto& [line, middle] : lines)
            work_.letter(line, height, {0, middle}, Angle{}, "words");
        return true;
    }

    PlateWork& work_;
    double letter_;
    std::vector<std::pair<double, double>> figures_; ///< days that they stand at, and cover to either side
    double months_ = 0, days_ = 0, minutes_ = 0, sides_ = 0, middle_ = 0; ///< outer radii of the bands, mm
};

} // namespace

void draw_ring(PlateWork& work) {
    Ring{work}.draw();
}

} // namespace dialwright::layout
