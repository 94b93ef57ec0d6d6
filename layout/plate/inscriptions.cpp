// SPDX-License-Identifier: MIT
//
// The motto and the place line. On a round plate they follow the border where the field is free there (heads inward at
// the reader's side, outward at the far side); elsewhere they stand straight on the plate's middle line. A text that
// finds no room is set smaller; one that finds none at 0.6 of its height may stand beside the middle line, and one that
// finds none at half its height is left out, and the maker is told.
#include "layout/plate/bench.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

class Inscriber {
  public:
    explicit Inscriber(Bench& bench) : bench_{bench}, right_{right_of(bench.up)} {}

    /// @param asked  the maker named the height, and is told where it has to be less
    void inscribe(const std::string& text, double height_mm, bool asked, const std::string& name) {
        if (text.empty() || height_mm <= 0)
            return;
        bench_.clear.measure();
        const auto heights = [&](double least, bool anywhere) {
            for (double height = height_mm; height >= least * height_mm; height *= 0.93) {
                const LetteredLine line = bench_.lettering.line(text, height, 0.08 * height);
                if (on_border(line, height, name) || straight(line, height, name, anywhere)) {
                    if (height < 0.999 * height_mm && asked)
                        bench_.warnings.push_back(fmt::format(
                            "the {} is {:.1f} mm high instead of {:.1f} mm, to find room", name, height, height_mm));
                    return true;
                }
            }
            return false;
        };
        if (heights(0.6, false) || heights(0.499, true))
            return;
        bench_.warnings.push_back(fmt::format(
            "no room on the plate for the {} \"{}\": left out; a shorter or smaller one may fit", name, text));
    }

  private:
    /// Along the border of a round field.
    bool on_border(const LetteredLine& line, double height, const std::string& name) {
        const Outline& field = bench_.rings.divisions;
        if (!field.is_round())
            return false;
        for (double depth = 1.0 * height; depth < 0.45 * field.radius_mm(); depth += 0.35 * height)
            for (const bool near_side : {true, false}) {
                // The base line is the outer rim of the lettering where heads point inward, the inner rim where outward.
                const double outer = field.radius_mm() - depth, inner = outer - height;
                const double base = near_side ? outer : inner;
                const double half_turn = (line.ink.width_mm() / 2) / base;
                if (inner <= 0 || half_turn > 1.2)
                    return false;
                const Point towards = near_side ? -1.0 * bench_.up : bench_.up;
                if (!arc_is_clear(field.centre(), outer, inner, turn_of(towards), half_turn, 0.45 * height))
                    continue;
                bench_.add_letters(set_on_circle(line, field.centre(), base, turn_of(towards), near_side), name, "",
                                   height);
                block_arc(field.centre(), outer + 0.35 * height, inner - 0.35 * height, turn_of(towards), half_turn);
                return true;
            }
        return false;
    }

    [[nodiscard]] static TurnedBox arc_chunk(Point centre, double outer, double inner, Angle middle, double half_turn,
                                             double part) {
        const Angle turn = middle + Angle::radians(half_turn * part);
        const double radius = (outer + inner) / 2;
        return {centre + radius * Point{cos(turn), sin(turn)}, (outer - inner) * 0.5, (outer - inner) / 2,
                turn + Angle::degrees(90)};
    }
    [[nodiscard]] static int arc_chunks(double outer, double inner, double half_turn) {
        return std::max(2, int(std::ceil(2 * half_turn * outer / (outer - inner))));
    }

    [[nodiscard]] bool arc_is_clear(Point centre, double outer, double inner, Angle middle, double half_turn,
                                    double wanted) const {
        const int chunks = arc_chunks(outer, inner, half_turn);
        for (int i = 0; i <= chunks; ++i)
            if (bench_.clear.clearance_mm(arc_chunk(centre, outer, inner, middle, half_turn, 2.0 * i / chunks - 1)) <
                wanted)
                return false;
        return true;
    }

    void block_arc(Point centre, double outer, double inner, Angle middle, double half_turn) {
        const int chunks = arc_chunks(outer, inner, half_turn);
        for (int i = 0; i <= chunks; ++i)
            bench_.clear.block(arc_chunk(centre, outer, inner, middle, half_turn, 2.0 * i / chunks - 1));
    }

    /// Straight, upright for the reader, on the plate's middle line or anywhere.
    bool straight(const LetteredLine& line, double height, const std::string& name, bool anywhere) {
        TurnedBox box{{}, line.ink.width_mm() / 2, height / 2, turn_of(right_)};
        const auto middle = find_room(bench_, box.half_width_mm, box.half_height_mm, 0.5 * height, {anywhere, 0.6});
        if (!middle)
            return false;
        box.middle = *middle;
        const Point start = *middle - (line.ink.left_mm + line.ink.width_mm() / 2) * right_ - height / 2 * bench_.up;
        bench_.add_letters(set_straight(line, start, turn_of(right_)), name, "", height);
        bench_.clear.block(box);
        return true;
    }

    Bench& bench_;
    Point right_;
};

} // namespace

std::optional<Point> find_room(const Bench& bench, double half_width_mm, double half_height_mm, double wanted_mm,
                               RoomWish wish) {
    const Box field = bench.rings.divisions.box();
    const Point right = right_of(bench.up), middle = field.middle();
    const double reach = (field.width_mm() + field.height_mm()) / 2;
    std::optional<Point> best;
    double best_score = -1e300;
    for (int row = -40; row <= 40; ++row)
        for (int column = wish.anywhere ? -24 : 0; column <= (wish.anywhere ? 24 : 0); ++column) {
            const Point at = middle + (reach / 2 * column / 24.0) * right + (reach / 2 * row / 40.0) * bench.up;
            if (bench.clear.clearance_mm(at) < wanted_mm + std::min(half_width_mm, half_height_mm))
                continue;
            const double clearance =
                bench.clear.clearance_mm(TurnedBox{at, half_width_mm, half_height_mm, turn_of(right)}, wanted_mm);
            if (clearance < wanted_mm)
                continue;
            // Room counts up to four times what is wanted; then the middle line; then low rather than high.
            const double score =
                std::min(clearance, 4 * wanted_mm) - wish.middle * std::abs(column) / 24.0 * reach / 2 - 0.002 * row;
            if (score > best_score) {
                best_score = score;
                best = at;
            }
        }
    return best;
}

void draw_motto(Bench& bench) {
    Inscriber{bench}.inscribe(bench.spec.lettering.motto, bench.spec.lettering.motto_height_mm,
                              bench.spec.motto_height_asked, "motto");
}

void draw_place_line(Bench& bench) {
    Inscriber{bench}.inscribe(bench.spec.lettering.place_line, bench.spec.lettering.label_height_mm, false,
                              "place line");
}

} // namespace dialwright::layout
