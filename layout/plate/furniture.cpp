// SPDX-License-Identifier: MIT
#include "layout/plate/bench.hpp"

#include "layout/gnomon/gnomon_parts.hpp"
#include "layout/gnomon/seat.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

/// The substyle's direction on the work; nothing where the style stands square on the plate.
std::optional<Point> substyle_direction(const Bench& bench) {
    constexpr Angle k_square = Angle::degrees(89.99);
    if (bench.delineation.style.height > k_square)
        return std::nullopt;
    return clockwise_from_up(bench.delineation.style.substyle);
}

} // namespace

void draw_borders(Bench& bench) {
    const double w = bench.spec.cutting.line_width_mm;
    const auto border = [&](const Outline& outline, double width, const char* name, Layer layer = Layer::engrave) {
        bench.marks.push_back({layer, {outline.path()}, width, false, name});
    };
    border(bench.rings.edge, 0.2, "plate's edge", Layer::cut);
    if (bench.spec.borders.margin_mm > 0)
        border(bench.rings.outer, 1.5 * w, "outer border");
    if (bench.spec.borders.chapter_ring_mm > 0) {
        border(bench.rings.numerals, w, "border of the numerals");
        if (bench.division_band_mm() > 0)
            border(bench.rings.divisions, 0.65 * w, "border of the divisions");
    }
    if (bench.centre && bench.spec.borders.inner_mm > 0) {
        const Outline inner = Outline::round(*bench.centre, bench.spec.borders.inner_mm);
        bench.keep_out.push_back(inner);
        bench.clear.block(TurnedBox{*bench.centre, bench.spec.borders.inner_mm, bench.spec.borders.inner_mm, Angle{}});
        if (bench.rings.divisions.distance_mm(*bench.centre) > bench.spec.borders.inner_mm)
            border(inner, 0.65 * w, "inner border");
    }
}

double gnomon_foot_mm(const Bench& bench) {
    if (bench.spec.gnomon.kind != GnomonKind::edge)
        return 0.0;
    if (bench.spec.gnomon.foot_mm)
        return *bench.spec.gnomon.foot_mm;
    if (!bench.centre || !substyle_direction(bench))
        return 0.0;
    // Long enough that its shadow is easily read from the ring, and never short of the nodus.
    const auto border = bench.rings.divisions.exit(*bench.centre, *substyle_direction(bench));
    const double half_way = border ? 0.5 * distance(*bench.centre, border->at) : 0.0;
    return std::max(distance(*bench.centre, bench.foot), std::round(half_way * 2) / 2);
}

namespace {

/// Where a plumb pin that carries the nodus enters the plate.
Point foot_of_plumb_pin(const Bench& bench, double nodus_height_mm) {
    const PlateFrame& frame = bench.delineation.frame;
    const double down = nodus_height_mm / frame.n.z();
    return bench.foot - down * Point{frame.u.z(), frame.v.z()};
}

/// Puts the marks of a part's own frame on the plate, and keeps labels off them.
void add_part_marks(Bench& bench, const std::vector<Mark>& marks, const Placing& place) {
    for (const Mark& mark : marks) {
        bench.marks.push_back(place(mark));
        for (const Path& path : bench.marks.back().paths)
            bench.clear.block(flattened(path, 0.2));
    }
}

void draw_substyle(Bench& bench, const Polyline& line) {
    bench.marks.push_back({Layer::guide, {polyline(line)}, 0.15, false, "substyle"});
    bench.clear.block(line);
}

void draw_edge_seat(Bench& bench, const GnomonSeat& seat, double foot_mm) {
    const Gnomon& gnomon = bench.spec.gnomon;
    const Point end = seat.start + std::max(seat.foot_mm, 1.0) * seat.along;
    draw_substyle(bench, {seat.start, end});
    if (foot_mm <= 0 && gnomon.joint.kind == FootKind::plain && gnomon.joint.count == 0)
        return;
    const Joint joint = joint_on(seat, gnomon, bench.spec.plate.thickness_mm);
    add_part_marks(bench, plate_marks_of(joint), {turn_of(seat.along), seat.start, 1.0, 1.0, false});
    const double width =
        std::max(gnomon.thickness_mm, joint.options.kind == FootKind::flange ? joint.options.flange_width_mm : 0.0);
    if (width > 0)
        bench.clear.block(TurnedBox{between(seat.start, end, 0.5), seat.foot_mm / 2, width / 2, turn_of(seat.along)});
}

void draw_rod_seat(Bench& bench, const GnomonSeat& seat) {
    const Point nodus_foot = seat.start + seat.nodus_along_mm * seat.along;
    draw_substyle(bench, {seat.start, nodus_foot + 5.0 * seat.along});
    if (bench.spec.gnomon.thickness_mm > 0)
        add_part_marks(bench, rod_gnomon(rod_plan(seat, bench.spec)).part.plate_marks,
                       {turn_of(seat.along), seat.start, 1.0, 1.0, false});
}

/// A pin in the plate at the nodus' foot, or where a plumb one enters it.
void draw_pin_seat(Bench& bench, double nodus_height_mm) {
    const auto plan = pin_plan(bench.delineation.frame, nodus_height_mm, bench.spec);
    if (!plan)
        return;
    const Point at =
        bench.spec.gnomon.kind == GnomonKind::upright_pin ? foot_of_plumb_pin(bench, nodus_height_mm) : bench.foot;
    add_part_marks(bench, pin_of(*plan).part.plate_marks, {{}, at, 1.0, 1.0, false});
}

} // namespace

void draw_gnomon_seat(Bench& bench, double foot_mm, double nodus_height_mm) {
    const Gnomon& gnomon = bench.spec.gnomon;
    const auto along = substyle_direction(bench);
    const double arm = 3.0;
    bench.marks.push_back({Layer::guide,
                           {polyline({bench.foot - Point{arm, 0}, bench.foot + Point{arm, 0}}),
                            polyline({bench.foot - Point{0, arm}, bench.foot + Point{0, arm}})},
                           0.15,
                           false,
                           "nodus' foot"});
    if (!has_style(gnomon.kind) || !along) {
        draw_pin_seat(bench, nodus_height_mm);
        return;
    }
    const GnomonSeat seat =
        seat_on(bench.rings, bench.centre, bench.foot, bench.delineation.style, foot_mm, nodus_height_mm);
    if (gnomon.kind == GnomonKind::rod)
        draw_rod_seat(bench, seat);
    else
        draw_edge_seat(bench, seat, foot_mm);
}

void draw_compass(Bench& bench) {
    if (!bench.spec.compass)
        return;
    // On the free side, opposite to noon; north is +y of the work on a level plate.
    const double size = std::min(bench.spec.plate.width_mm, bench.spec.plate.height_mm);
    bench.clear.measure();
    const Point down = -1.0 * bench.up;
    const Point start = bench.centre.value_or(bench.foot);
    Point best{};
    double best_room = 0;
    for (double along = 0; along < size; along += size / 200)
        if (const double room = bench.clear.clearance_mm(start + along * down); room > best_room + 1e-6) {
            best_room = room;
            best = start + along * down;
        }
    const double radius = std::min(0.8 * best_room, 0.08 * size);
    if (radius < 3.0) {
        bench.warnings.push_back("no room for a compass mark");
        return;
    }
    const double letter_mm = 0.3 * radius;
    const double reach = radius - 1.12 * letter_mm - 0.08 * radius;
    std::vector<Path> points;
    const auto ray = [&](double degrees, double reach_mm, double waist_mm) {
        const Point tip = best + reach_mm * clockwise_from_up(Angle::degrees(degrees));
        const Point left = best + waist_mm * clockwise_from_up(Angle::degrees(degrees - 45));
        const Point right = best + waist_mm * clockwise_from_up(Angle::degrees(degrees + 45));
        // Half of each point is filled, as on an old chart.
        points.push_back(polyline({best, tip, right}, true));
        bench.marks.push_back({Layer::engrave,
                               {polyline({best, tip, left}, true)},
                               0.5 * bench.spec.cutting.line_width_mm,
                               false,
                               "compass mark"});
    };
    for (const double degrees : {0.0, 90.0, 180.0, 270.0})
        ray(degrees, degrees == 0 ? reach : 0.78 * reach, 0.2 * reach);
    bench.add_filled(std::move(points), "compass mark");
    // The letters stand beyond the points, upright for the reader; the smaller ones only where they can be cut.
    const Point right{bench.up.y_mm, -bench.up.x_mm};
    const auto letter = [&](const char* name, double degrees, double height, double from) {
        const LetteredLine text = bench.lettering.line(name, height);
        const Point middle = best + (from + 0.12 * radius + height / 2) * clockwise_from_up(Angle::degrees(degrees));
        const Point at = middle - (text.ink.left_mm + text.ink.width_mm() / 2) * right - height / 2 * bench.up;
        bench.add_letters(set_straight(text, at, turn_of(right)), "compass mark", name, height);
    };
    letter("N", 0, letter_mm, reach);
    constexpr double k_least_letter_mm = 2.0;
    if (0.6 * letter_mm >= k_least_letter_mm)
        for (const auto& [name, degrees] : {std::pair{"E", 90.0}, {"S", 180.0}, {"W", 270.0}})
            letter(name, degrees, 0.6 * letter_mm, 0.78 * reach);
    bench.clear.block(TurnedBox{best, 1.2 * radius, 1.2 * radius, Angle{}});
}

} // namespace dialwright::layout
