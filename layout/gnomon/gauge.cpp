// SPDX-License-Identifier: MIT
#include "layout/gnomon/gauge.hpp"

#include "layout/lettering/lettering.hpp"
#include "layout/plate/points.hpp"
#include "layout/text/figures.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <stdexcept>

namespace dialwright::layout {
namespace {

constexpr double k_least_letter_mm = 1.5;

/// The outline's corners, and where lettering has room.
struct Shape {
    std::vector<Corner> corners;
    Point corner; ///< where the edge's line meets the base
    double right_mm = 0.0, top_mm = 0.0, tangent = 0.0;
};

Shape shape_of(const GaugePlan& plan, double edge_mm) {
    const double s = sin(plan.angle), c = cos(plan.angle), r = plan.rounding_mm;
    Shape shape;
    shape.tangent = s / c;
    shape.corner = {plan.under_mm / s, 0};
    const Point tip = shape.corner + edge_mm * Point{c, s};
    const double toe_mm = std::min(2.0, 0.06 * tip.y_mm); // height of the blunt toe
    const double toe = shape.corner.x_mm + toe_mm / shape.tangent;
    // A steep edge gets a base to stand on and a level top.
    shape.right_mm = std::max(tip.x_mm, shape.corner.x_mm + 0.5 * edge_mm);
    shape.top_mm = tip.y_mm;
    shape.corners = {{{toe, 0}, 0}, {{shape.right_mm, 0}, r}};
    if (shape.right_mm > tip.x_mm + 1e-9)
        shape.corners.push_back({{shape.right_mm, tip.y_mm}, r});
    shape.corners.push_back({tip, r});
    shape.corners.push_back({{toe, toe_mm}, 0});
    return shape;
}

/// The angle and the words under it, in the corner of the base and the upright side, as large as they have room.
void add_lettering(Drawing& drawing, const GaugePlan& plan, const Shape& shape) {
    const Lettering lettering{plan.family};
    for (double size = plan.letter_mm; size >= k_least_letter_mm; size *= 0.93) {
        const LetteredLine angle = lettering.line(degrees_minutes(plan.angle), size);
        const LetteredLine words = lettering.line(plan.words, 0.5 * size);
        const double margin = std::max(0.6 * size, plan.rounding_mm + 1.0);
        const double words_up = margin - std::min(words.ink.bottom_mm, 0.0), angle_up = words_up + 1.1 * size;
        const double top = angle_up + angle.ink.top_mm + margin;
        const double right = shape.right_mm - margin;
        const double words_left = right - words.ink.width_mm(), angle_left = right - angle.ink.width_mm();
        const auto edge_over = [&](double x) {
            return std::min(shape.top_mm, (x - shape.corner.x_mm) * shape.tangent);
        };
        if (edge_over(angle_left - margin) < top - margin ||
            edge_over(words_left - margin) < words_up + words.ink.top_mm || top > shape.top_mm)
            continue;
        const auto set = [&](const LetteredLine& line, double left, double up, const char* name) {
            drawing.marks.push_back(
                {Layer::engrave, set_straight(line, {left - line.ink.left_mm, up}, Angle{}), 0.0, true, name});
        };
        set(angle, angle_left, angle_up, "angle");
        set(words, words_left, words_up, "words");
        return;
    }
    throw GnomonError(fmt::format("the gauge for {} is too small for its lettering: make its edge longer",
                                  degrees_minutes(plan.angle)));
}

/// How far from a point the lettering stays, by its boxes.
double clear_round(const Drawing& drawing, Point from) {
    double least = 1e300;
    for (const Mark& mark : drawing.marks)
        if (mark.layer == Layer::engrave) {
            const Box box = bounds_of(mark);
            least = std::min(least, distance(from, {std::clamp(from.x_mm, box.left_mm, box.right_mm),
                                                    std::clamp(from.y_mm, box.bottom_mm, box.top_mm)}));
        }
    return least;
}

} // namespace

Gauge gauge_of(const GaugePlan& plan) {
    if (!(plan.angle >= Angle::degrees(1)) || plan.angle > Angle::degrees(89))
        throw GnomonError(fmt::format("a gauge proves angles from 1° to 89°, not {}", degrees_minutes(plan.angle)));
    if (!(plan.edge_mm >= 0 && plan.under_mm >= 0 && plan.rounding_mm >= 0 && plan.letter_mm > 0))
        throw GnomonError("a length of the gauge is below zero");
    const double edge = plan.edge_mm > 0 ? plan.edge_mm : std::max(120.0, std::min(30.0 / sin(plan.angle), 500.0));
    const Shape shape = shape_of(plan, edge);
    Gauge gauge;
    gauge.edge_from = shape.corners.back().at;
    gauge.edge_to = shape.corners[shape.corners.size() - 2].at;
    Drawing drawing{"gauge", {}};
    drawing.marks.push_back(
        {Layer::guide, {polyline({{-5, 0}, {shape.right_mm + 5, 0}})}, k_thin_mm, false, "face, along the base"});
    drawing.marks.push_back(cross_mark(Layer::guide, {}, 2.0, "centre"));
    add_lettering(drawing, plan, shape);
    const double r = std::min({0.3 * edge, 40.0, clear_round(drawing, shape.corner) - 1.5});
    if (r > 4)
        drawing.marks.push_back(
            {Layer::guide,
             {Path{shape.corner + Point{r, 0},
                   {ArcTo{shape.corner + r * Point{cos(plan.angle), sin(plan.angle)}, shape.corner, plan.angle}},
                   false}},
             k_thin_mm,
             false,
             "angle " + degrees_minutes(plan.angle)});
    drawing.marks.push_back({Layer::cut, {rounded_polygon(shape.corners)}, k_cut_mm, false, "gauge"});
    gauge.part.drawings.push_back(std::move(drawing));
    gauge.part.particulars = {{"Gauge", plan.words},
                              {"Angle", degrees_minutes(plan.angle)},
                              {"Edge", say_length(distance(gauge.edge_from, gauge.edge_to), plan.inches)}};
    if (plan.under_mm > 0)
        gauge.part.particulars.emplace_back("Edge under the style's axis by", say_length(plan.under_mm, plan.inches));
    gauge.part.notes = {
        "Stand it on the face with its base along the substyle: no light shows between its edge and the style.",
        "Prove the gauge itself on a flat surface before it proves anything else."};
    gauge.part.cautions = {"Do not sight along the style or the gauge towards the Sun."};
    return gauge;
}

Gauge substyle_gauge(Angle from_noon, GaugePlan plan) {
    plan.angle = abs(from_noon);
    plan.under_mm = 0;
    plan.words = from_noon < Angle{} ? "from noon to substyle, anticlockwise" : "from noon to substyle, clockwise";
    Gauge gauge = gauge_of(plan);
    gauge.part.drawings.front().name = "substyle gauge";
    if (from_noon > Angle{}) {
        // Its edge lies clockwise of its base: the outline is turned over (y → −y), and each line of lettering is turned
        // half round, so that it keeps its place and is read with the base below.
        const Placing over{Angle::degrees(180), {}, 1.0, 1.0, true};
        for (Mark& mark : gauge.part.drawings.front().marks) {
            const Box box = bounds_of(mark);
            mark = mark.layer == Layer::engrave
                       ? Placing{Angle::degrees(180), {box.left_mm + box.right_mm, 0}, 1.0, 1.0, false}(mark)
                       : over(mark);
        }
        gauge.edge_from = over(gauge.edge_from);
        gauge.edge_to = over(gauge.edge_to);
    }
    gauge.part.notes = {
        "Lay it on the face with its corner at the centre and its base along the noon line: its edge is the substyle."};
    gauge.part.cautions.clear();
    return gauge;
}

} // namespace dialwright::layout
