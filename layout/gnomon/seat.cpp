// SPDX-License-Identifier: MIT
#include "layout/gnomon/seat.hpp"

#include "layout/plate/points.hpp"

#include <algorithm>

namespace dialwright::layout {
namespace {

constexpr Angle k_square = Angle::degrees(89.99);

std::optional<Point> centre_on_field(const Face& face, const Rings& rings) {
    if (!face.delineation.style.centre)
        return std::nullopt;
    const Point centre = to_work(*face.delineation.style.centre, face.placement.foot);
    return rings.divisions.contains(centre) ? std::optional{centre} : std::nullopt;
}

} // namespace

GnomonSeat seat_on(const Rings& rings, std::optional<Point> centre, Point foot, const Style& style, double foot_mm,
                   double nodus_height_mm) {
    GnomonSeat seat;
    seat.along = clockwise_from_up(style.substyle);
    seat.nodus_height_mm = nodus_height_mm;
    seat.style_height = style.height;
    seat.centre_on_plate = centre.has_value();
    seat.foot_mm = foot_mm > 0 ? foot_mm : std::max(1.0, std::round(3 * nodus_height_mm) / 2);
    seat.start = centre ? *centre : foot - seat.foot_mm / 2 * seat.along;
    seat.nodus_along_mm = dot(foot - seat.start, seat.along);
    if (const auto edge = rings.edge.exit(seat.start, -1.0 * seat.along))
        seat.behind_mm = distance(seat.start, edge->at);
    return seat;
}

std::optional<GnomonSeat> seat_of(const Face& face, const FaceSpec& spec) {
    const Style& style = face.delineation.style;
    if (!has_style(spec.gnomon.kind) || style.height > k_square)
        return std::nullopt;
    const Rings rings = Rings::of(spec);
    return seat_on(rings, centre_on_field(face, rings), face.placement.foot, style, face.gnomon_foot_mm,
                   face.placement.nodus_height_mm);
}

std::vector<Mark> on_plate(const std::vector<Mark>& marks, const GnomonSeat& seat) {
    const Placing place{turn_of(seat.along), seat.start, 1.0, 1.0, false};
    std::vector<Mark> placed;
    for (const Mark& mark : marks)
        placed.push_back(place(mark));
    return placed;
}

Joint joint_on(const GnomonSeat& seat, const Gnomon& gnomon, double plate_thickness_mm) {
    JointOptions options = gnomon.joint;
    if (options.behind_mm == 0)
        options.behind_mm = seat.behind_mm;
    return joint_of(options, seat.foot_mm, gnomon.thickness_mm, plate_thickness_mm);
}

double least_style_mm(DialPlan plan, const Face& face, const FaceSpec& spec) {
    const Rings rings = Rings::of(spec);
    const auto centre = centre_on_field(face, rings);
    if (!centre || face.delineation.style.height > k_square)
        return 0.0;
    plan.nodus_height_mm = face.placement.nodus_height_mm;
    plan.gnomon_thickness_mm = 0.0;
    const auto caster = caster_of(plan);
    const double to_nodus = plan.nodus_height_mm / sin(face.delineation.style.height);
    const Season& season = face.delineation.season;
    double least = 0;
    for (const DialLine& line : face.delineation.lines) {
        if (line.family != Family::hour || line.set != 0 || line.step_min < 60 || !line.direction)
            continue;
        const auto border = rings.divisions.exit(*centre, clockwise_from_up(*line.direction));
        for (int i = 0; border && i <= 8; ++i) {
            const Angle declination = season.least + (season.greatest - season.least) * (i / 8.0);
            if (const auto cast = caster.cast({line.hour_angle, declination}, Light::seen)) {
                const double reach = distance(to_work(cast->point, face.placement.foot), *centre);
                least = std::max(least, distance(*centre, border->at) * to_nodus / reach);
            }
        }
    }
    return least;
}

} // namespace dialwright::layout
