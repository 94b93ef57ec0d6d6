// SPDX-License-Identifier: MIT
#include "layout/plate/bench.hpp"

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

void add_hole(Bench& bench, Point at, double diameter_mm, const std::string& name) {
    const double arm = 0.9 * diameter_mm;
    bench.marks.push_back({Layer::drill, {circle(at, diameter_mm / 2)}, 0.15, false, name});
    bench.marks.push_back(
        {Layer::drill,
         {polyline({at - Point{arm, 0}, at + Point{arm, 0}}), polyline({at - Point{0, arm}, at + Point{0, arm}})},
         0.1,
         false,
         name + " centre"});
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

void draw_edge_seat(Bench& bench, Point along, double foot_mm) {
    const Gnomon& gnomon = bench.spec.gnomon;
    const Point start = bench.centre ? *bench.centre : bench.foot - foot_mm / 2 * along;
    const Polyline substyle{start, start + std::max(foot_mm, 1.0) * along};
    bench.marks.push_back({Layer::guide, {polyline(substyle)}, 0.15, false, "substyle"});
    bench.clear.block(substyle);
    if (foot_mm <= 0)
        return;
    if (gnomon.thickness_mm > 0) {
        const Point side = gnomon.thickness_mm / 2 * left_of(along);
        const Point end = start + foot_mm * along;
        bench.marks.push_back({Layer::score,
                               {polyline({start - side, end - side, end + side, start + side}, true)},
                               0.15,
                               false,
                               "gnomon's foot"});
        bench.clear.block(TurnedBox{between(start, end, 0.5), foot_mm / 2, gnomon.thickness_mm / 2, turn_of(along)});
    }
    for (int i = 0; i < gnomon.holes; ++i)
        add_hole(bench, start + foot_mm * (i + 0.5) / gnomon.holes * along, gnomon.hole_diameter_mm,
                 fmt::format("fixing hole {}", i + 1));
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
    const double bore = gnomon.thickness_mm > 0 ? gnomon.thickness_mm : gnomon.hole_diameter_mm;
    const bool square_style = has_style(gnomon.kind) && !along;
    if (gnomon.kind == GnomonKind::pin || square_style) {
        if (bore > 0)
            add_hole(bench, bench.foot, bore, "hole for the pin");
    } else if (gnomon.kind == GnomonKind::upright_pin) {
        if (bore > 0)
            add_hole(bench, foot_of_plumb_pin(bench, nodus_height_mm), bore, "hole for the plumb pin");
    } else if (gnomon.kind == GnomonKind::rod) {
        const Point start = bench.centre.value_or(bench.foot);
        bench.marks.push_back({Layer::guide,
                               {polyline({start, between(start, bench.foot, 1.0) + 5.0 * *along})},
                               0.15,
                               false,
                               "substyle"});
        if (bench.centre && bore > 0)
            add_hole(bench, start, bore, "hole for the rod, drilled at the style height along the substyle");
    } else if (gnomon.kind == GnomonKind::edge) {
        draw_edge_seat(bench, *along, foot_mm);
    }
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
        bench.add_filled(set_straight(text, at, turn_of(right)), std::string{"compass mark "} + name);
    };
    letter("N", 0, letter_mm, reach);
    constexpr double k_least_letter_mm = 2.0;
    if (0.6 * letter_mm >= k_least_letter_mm)
        for (const auto& [name, degrees] : {std::pair{"E", 90.0}, {"S", 180.0}, {"W", 270.0}})
            letter(name, degrees, 0.6 * letter_mm, 0.78 * reach);
    bench.clear.block(TurnedBox{best, 1.2 * radius, 1.2 * radius, Angle{}});
}

} // namespace dialwright::layout
