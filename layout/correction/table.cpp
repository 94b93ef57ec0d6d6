// SPDX-License-Identifier: MIT
//
// Months stand side by side or one below the other, in one block or several: whichever way leaves the letters most room.
// Where the design leaves the dates open, the closest are taken for which letters of the height asked for have room.
#include "layout/correction/plate_work.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_column_air = 1.3; // beside the text of a column
constexpr double k_block_gap = 1.1;
constexpr double k_widest = 1.9; // cells spread to fill the plate, but not so far that rows fall apart
constexpr double k_tallest = 1.6;

/// A date and its minutes, as they are written.
struct Entry {
    std::string day, minutes;
};
using Month = std::vector<Entry>;

std::vector<unsigned> days_of(TableSteps steps) {
    switch (steps) {
    case TableSteps::five_days:
        return {1, 6, 11, 16, 21, 26};
    case TableSteps::ten_days:
        return {1, 11, 21};
    case TableSteps::fifteen_days:
        return {1, 16};
    case TableSteps::whole_minutes:
        break;
    }
    return {};
}

/// How months are laid out.
struct Arrangement {
    bool across = true; ///< months side by side, their days downward; else the other way round
    int blocks = 1;
};

class Table {
  public:
    Table(PlateWork& work, TableSteps steps)
        : work_{work}, steps_{steps}, letter_{work.spec.letter_height_mm}, one_way_{!(is_ever_added(work.correction) &&
                                                                                      is_ever_taken(work.correction))} {
        for (unsigned month = 1; month <= 12; ++month)
            months_.push_back(entries_of(month));
        for (const Month& month : months_)
            for (const Entry& entry : month) {
                day_width_ = std::max(day_width_, work.width_mm(entry.day, 1.0));
                minutes_width_ = std::max(minutes_width_, work.width_mm(entry.minutes, 1.0));
            }
    }

    /// @return false where its letters have no room
    [[nodiscard]] bool draw(const Box& box) {
        std::optional<Arrangement> best;
        double best_height = 0.0;
        for (const Arrangement& one : arrangements()) {
            const double height = std::min(box.width_mm() / width_at_1(one), box.height_mm() / height_at_1(one));
            if (height > best_height) {
                best = one;
                best_height = height;
            }
        }
        if (best_height < letter_)
            return false;
        set(box, *best);
        return true;
    }

  private:
    [[nodiscard]] bool lists() const { return steps_ == TableSteps::whole_minutes; }

    [[nodiscard]] std::string written(double minutes) const {
        return one_way_ ? minutes_figure(minutes) : add_or_take(minutes);
    }

    [[nodiscard]] Month entries_of(unsigned month) const {
        Month entries;
        const auto minutes_on = [&](unsigned day) {
            return work_.correction.add_min(std::chrono::month{month} / std::chrono::day{day});
        };
        if (!lists()) {
            for (const unsigned day : days_of(steps_))
                entries.push_back({fmt::format("{}", day), written(minutes_on(day))});
            return entries;
        }
        long before = 0;
        for (const std::chrono::month_day date : dates_of_year()) {
            if (unsigned(date.month()) != month)
                continue;
            const unsigned day = unsigned(date.day());
            if (const long minutes = std::lround(minutes_on(day)); day == 1 || minutes != before) {
                entries.push_back({fmt::format("{}", day), written(double(minutes))});
                before = minutes;
            }
        }
        return entries;
    }

    [[nodiscard]] std::vector<Arrangement> arrangements() const {
        std::vector<Arrangement> all;
        for (const int blocks : {1, 2, 3, 4})
            all.push_back({true, blocks});
        if (!lists())
            for (const int blocks : {1, 2})
                all.push_back({false, blocks});
        return all;
    }

    // Sizes of everything for letters of 1 mm.
    [[nodiscard]] double row_height() const { return 2.05 + work_.line_mm() / letter_; }
    [[nodiscard]] double month_width() const {
        double widest = 0;
        for (unsigned month = 1; month <= 12; ++month)
            widest = std::max(widest, work_.width_mm(short_name(month), 1.0));
        return widest + k_column_air;
    }
    [[nodiscard]] double cell_width() const {
        return (lists() ? day_width_ + 0.8 : 0.0) + minutes_width_ + k_column_air;
    }
    [[nodiscard]] double head_width(const Arrangement& one) const {
        return lists() ? 0.0 : one.across ? day_width_ + k_column_air : month_width();
    }
    [[nodiscard]] double column_width(const Arrangement& one) const {
        return std::max(cell_width(), one.across ? month_width() : day_width_ + k_column_air);
    }
    [[nodiscard]] int columns(const Arrangement& one) const {
        return one.across ? 12 / one.blocks : int(months_.front().size());
    }
    [[nodiscard]] int rows(const Arrangement& one) const {
        if (!one.across)
            return 12 / one.blocks;
        std::size_t most = 0;
        for (const Month& month : months_)
            most = std::max(most, month.size());
        return int(most);
    }
    [[nodiscard]] double width_at_1(const Arrangement& one) const {
        const double block = head_width(one) + columns(one) * column_width(one);
        return one.across ? block : one.blocks * block + (one.blocks - 1) * k_block_gap;
    }
    [[nodiscard]] double height_at_1(const Arrangement& one) const {
        const double block = (rows(one) + 1) * row_height();
        return one.across ? one.blocks * block + (one.blocks - 1) * k_block_gap : block;
    }

    [[nodiscard]] static std::string short_name(unsigned month) { return std::string{month_name(month)}.substr(0, 3); }

    void set(const Box& box, const Arrangement& one) {
        const double wide = std::min(k_widest, box.width_mm() / (letter_ * width_at_1(one)));
        const double tall = std::min(k_tallest, box.height_mm() / (letter_ * height_at_1(one)));
        const double width = letter_ * wide * width_at_1(one), height = letter_ * tall * height_at_1(one);
        column_mm_ = letter_ * wide * column_width(one);
        head_mm_ = letter_ * wide * head_width(one);
        row_mm_ = letter_ * tall * row_height();
        const Point corner{box.middle().x_mm - width / 2, box.middle().y_mm + height / 2};
        const int months = 12 / one.blocks;
        for (int block = 0; block < one.blocks; ++block) {
            const double right =
                one.across ? 0 : block * (head_mm_ + columns(one) * column_mm_ + wide * letter_ * k_block_gap);
            const double down = one.across ? block * ((rows(one) + 1) * row_mm_ + tall * letter_ * k_block_gap) : 0;
            set_block(one, {corner.x_mm + right, corner.y_mm - down}, block * months, months);
        }
    }

    void set_block(const Arrangement& one, Point corner, int first, int months) {
        const int wide = columns(one), tall = rows(one);
        const Box frame{corner.x_mm, corner.y_mm - (tall + 1) * row_mm_, corner.x_mm + head_mm_ + wide * column_mm_,
                        corner.y_mm};
        work_.engrave(rectangle(frame), work_.middle_mm(), "frame");
        const auto column = [&](int i) { return corner.x_mm + head_mm_ + i * column_mm_; };
        const auto row = [&](int i) { return corner.y_mm - i * row_mm_; };
        work_.engrave({{frame.left_mm, row(1)}, {frame.right_mm, row(1)}}, work_.middle_mm(), "under the heads");
        for (int i = head_mm_ > 0 ? 0 : 1; i < wide; ++i)
            work_.engrave({{column(i), frame.bottom_mm}, {column(i), frame.top_mm}},
                          i == 0 ? work_.middle_mm() : work_.fine_mm(), "between columns");
        const auto text = [&](const std::string& words, double x, int line, std::string name) {
            work_.letter(words, letter_, {x, row(line) - row_mm_ / 2}, Angle{}, std::move(name));
        };
        for (int i = 0; i < months; ++i) {
            const unsigned month = unsigned(first + i + 1);
            if (one.across)
                text(short_name(month), column(i) + column_mm_ / 2, 0, short_name(month));
            else
                text(short_name(month), corner.x_mm + head_mm_ / 2, i + 1, short_name(month));
        }
        if (!lists())
            for (int i = 0; i < (one.across ? tall : wide); ++i)
                text(months_.front()[std::size_t(i)].day,
                     one.across ? corner.x_mm + head_mm_ / 2 : column(i) + column_mm_ / 2, one.across ? i + 1 : 0,
                     "day");
        for (int i = 0; i < months; ++i) {
            const Month& month = months_[std::size_t(first + i)];
            for (std::size_t k = 0; k < month.size(); ++k)
                set_entry(month[k], column(one.across ? i : int(k)), row((one.across ? int(k) : i) + 1),
                          short_name(unsigned(first + i + 1)));
        }
    }

    void set_entry(const Entry& entry, double left, double top, const std::string& month) {
        const std::string name = fmt::format("{} {}: {}", entry.day, month, entry.minutes);
        const double y = top - row_mm_ / 2;
        if (!lists()) {
            work_.letter(entry.minutes, letter_, {left + column_mm_ / 2, y}, Angle{}, name);
            return;
        }
        // Days end, and minutes begin, on lines of their own.
        const double all = letter_ * (day_width_ + 0.8 + minutes_width_), start = left + (column_mm_ - all) / 2;
        work_.letter(entry.day, letter_, {start + letter_ * day_width_ - work_.width_mm(entry.day, letter_) / 2, y},
                     Angle{}, "day of " + name);
        work_.letter(entry.minutes, letter_,
                     {start + letter_ * (day_width_ + 0.8) + work_.width_mm(entry.minutes, letter_) / 2, y}, Angle{},
                     name);
    }

    PlateWork& work_;
    TableSteps steps_;
    double letter_;
    bool one_way_; ///< all is added, or all is taken: the words stand in the sentence alone
    std::vector<Month> months_;
    double day_width_ = 0, minutes_width_ = 0; ///< for letters of 1 mm
    double column_mm_ = 0, head_mm_ = 0, row_mm_ = 0;
};

} // namespace

TableSteps draw_table(PlateWork& work) {
    const Box inside = draw_rectangle(work);
    const bool lists = work.spec.steps == TableSteps::whole_minutes;
    Box room = draw_heading_and_words(work, inside,
                                      lists ? "The minutes of a day hold until the next day that is named."
                                            : "Between two days of the table the minutes lie between theirs.");
    room = {room.left_mm + work.spec.letter_height_mm, room.bottom_mm, room.right_mm - work.spec.letter_height_mm,
            room.top_mm};
    std::vector<TableSteps> candidates{TableSteps::five_days, TableSteps::ten_days, TableSteps::fifteen_days};
    if (work.spec.steps)
        candidates = {*work.spec.steps};
    for (const TableSteps steps : candidates)
        if (Table{work, steps}.draw(room))
            return steps;
    work.too_small("a table");
}

} // namespace dialwright::layout
