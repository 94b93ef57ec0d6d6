// SPDX-License-Identifier: MIT
//
// Where figures of several families stand on one plate, a few short lines tell which figures are whose: a sample in the
// family's own letters and its name, in one to three columns, where free room is.
#include "layout/plate/bench.hpp"
#include "layout/plate/family_words.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

class LegendDrawer {
  public:
    explicit LegendDrawer(Bench& bench) : bench_{bench}, right_{right_of(bench.up)} {}

    void draw() {
        bench_.clear.measure();
        const double full = bench_.spec.lettering.label_height_mm;
        const Room room = room_of(rows(full)); // of full height: lettering keeps its proportions
        for (double part = 1.0; part >= 0.6; part *= 0.9)
            for (const std::size_t columns : {std::size_t{1}, std::size_t{2}, std::size_t{3}})
                if (columns <= bench_.families.size() && draw(part * full, part, room, columns))
                    return;
        bench_.warnings.push_back("no room on the plate for the lines that tell its figures apart: the first sheet "
                                  "and the numbers tell it");
    }

  private:
    struct Row {
        LetteredLine sample, name;
        std::string text;
    };

    [[nodiscard]] std::vector<Row> rows(double height) const {
        std::vector<Row> made;
        for (const FiguredFamily& family : bench_.families) {
            const std::string name = words_of(family.family, family.time).lines;
            made.push_back({bench_.letters(family.dress.italic).line(family.sample, height, 0.04 * height),
                            bench_.letters(false).line(name, height, 0.04 * height), family.sample + " " + name});
        }
        return made;
    }

    /// The widest sample and the widest name.
    struct Room {
        double sample_mm = 0.0, name_mm = 0.0;
    };
    [[nodiscard]] static Room room_of(const std::vector<Row>& rows) {
        Room room;
        for (const Row& row : rows) {
            room.sample_mm = std::max(room.sample_mm, row.sample.ink.width_mm());
            room.name_mm = std::max(room.name_mm, row.name.ink.width_mm());
        }
        return room;
    }

    bool draw(double height, double part, const Room& room, std::size_t columns) {
        const std::size_t count = bench_.families.size(), per_column = (count + columns - 1) / columns;
        if ((columns - 1) * per_column >= count)
            return false; // a column would stay empty
        const double sample_width = part * room.sample_mm, name_width = part * room.name_mm;
        const double column = sample_width + 0.7 * height + name_width, between = 1.6 * height, pitch = 1.75 * height;
        const double width = double(columns) * column + double(columns - 1) * between;
        const double tall = double(per_column - 1) * pitch + height;
        const auto middle = find_room(bench_, width / 2, tall / 2, 0.8 * height, {true, 0.1});
        if (!middle)
            return false;
        const std::vector<Row> all = rows(height);
        const Point corner = *middle - width / 2 * right_ + (tall / 2 - height) * bench_.up; // of the first base line
        for (std::size_t i = 0; i < all.size(); ++i) {
            const Point at = corner + double(i / per_column) * (column + between) * right_ -
                             double(i % per_column) * pitch * bench_.up;
            const auto set = [&](const LetteredLine& line, Point start, const char* what) {
                bench_.add_letters(set_straight(line, start - line.ink.left_mm * right_, turn_of(right_)), what,
                                   all[i].text, height);
            };
            set(all[i].sample, at + (sample_width - all[i].sample.ink.width_mm()) * right_, "legend's sample");
            set(all[i].name, at + (sample_width + 0.7 * height) * right_, "legend");
        }
        bench_.clear.block(TurnedBox{*middle, width / 2, tall / 2, turn_of(right_)});
        return true;
    }

    Bench& bench_;
    Point right_;
};

} // namespace

void draw_legend(Bench& bench) {
    if (bench.spec.lettering.legend && bench.families.size() > 1 && bench.spec.lettering.label_height_mm > 0)
        LegendDrawer{bench}.draw();
}

} // namespace dialwright::layout
