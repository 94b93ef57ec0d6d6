// SPDX-License-Identifier: MIT
#include "layout/gnomon/gnomon_parts.hpp"

#include "layout/gnomon/disc.hpp"
#include "layout/gnomon/edge_gnomon.hpp"
#include "layout/gnomon/gauge.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::layout {
namespace {

constexpr Angle k_least_gauge = Angle::degrees(3), k_most_gauge = Angle::degrees(89);

/// Where the noon line runs on the plate, clockwise from +v; nothing where it is not drawn from the centre.
std::optional<Angle> noon_direction(const Face& face) {
    for (const DrawnLine& line : face.lines)
        if (line.family == Family::hour && line.set == 0 && line.direction &&
            abs(line.hour_angle) < Angle::degrees(1e-6))
            return line.direction;
    return std::nullopt;
}

void add_gauges(std::vector<Part>& parts, const Face& face, const FaceSpec& spec, bool inches) {
    const auto add = [&](Part part, const char* title) {
        part.title = title;
        part.from_sheet = true;
        parts.push_back(std::move(part));
    };
    const Style& style = face.delineation.style;
    GaugePlan plan;
    plan.angle = style.height;
    plan.family = spec.lettering.family;
    plan.inches = inches;
    plan.under_mm = spec.gnomon.kind == GnomonKind::rod ? spec.gnomon.thickness_mm / 2 : 0.0;
    if (style.height >= k_least_gauge && style.height <= k_most_gauge)
        add(gauge_of(plan).part, "The gauge for the style's height");
    const auto noon = noon_direction(face);
    if (!noon || !style.centre)
        return;
    const Angle between = style.substyle - *noon, turn = arc_tangent(sin(between), cos(between));
    if (abs(turn) >= k_least_gauge && abs(turn) <= k_most_gauge)
        add(substyle_gauge(turn, plan).part, "The gauge for the substyle");
}

} // namespace

RodPlan rod_plan(const GnomonSeat& seat, const FaceSpec& spec) {
    const Gnomon& gnomon = spec.gnomon;
    RodPlan plan;
    plan.style_height = seat.style_height;
    plan.nodus_height_mm = seat.nodus_height_mm;
    plan.nodus_along_mm = seat.nodus_along_mm;
    plan.diameter_mm = gnomon.thickness_mm;
    plan.plate_thickness_mm = spec.plate.thickness_mm;
    plan.socket_mm = gnomon.socket_mm;
    plan.strut_at_mm = gnomon.strut_mm;
    if (gnomon.nodus == NodusKind::ball) // three rods wide, as a ball that is seen from the border
        plan.bead_mm = gnomon.ball_mm > 0 ? gnomon.ball_mm : std::max(3 * gnomon.thickness_mm, 6.0);
    if (gnomon.nodus == NodusKind::notch) // cut round the rod: the rod runs on behind it
        plan.exposed_mm = 1.15 * seat.nodus_height_mm / std::max(sin(seat.style_height), 0.05);
    return plan;
}

std::optional<PinPlan> pin_plan(const PlateFrame& frame, double nodus_height_mm, const FaceSpec& spec) {
    const Gnomon& gnomon = spec.gnomon;
    PinPlan plan;
    // An edge on a face that it stands square on is a pin as thick as its screws, where nothing else is said.
    plan.diameter_mm = gnomon.thickness_mm > 0           ? gnomon.thickness_mm
                       : gnomon.kind == GnomonKind::edge ? gnomon.joint.hole_mm
                                                         : 0.0;
    if (gnomon.kind == GnomonKind::disc || !(plan.diameter_mm > 0))
        return std::nullopt;
    if (gnomon.kind == GnomonKind::upright_pin)
        plan.to_face = arc_sine(std::clamp(std::abs(frame.n.z()), 0.0, 1.0));
    plan.nodus_height_mm = nodus_height_mm;
    plan.plate_thickness_mm = spec.plate.thickness_mm;
    plan.embedment_mm = gnomon.socket_mm;
    plan.rounded = gnomon.rounding_mm > 0;
    return plan;
}

std::vector<Part> gnomon_parts(const DialPlan& plan, const Face& face, const FaceSpec& spec,
                               const GnomonPartsOptions& options) {
    std::vector<Part> parts;
    const Gnomon& gnomon = spec.gnomon;
    const auto add = [&](Part part, const char* title, bool from_sheet) {
        part.title = title;
        part.from_sheet = from_sheet;
        parts.push_back(std::move(part));
    };
    if (gnomon.kind == GnomonKind::disc) {
        add(disc_of(face.placement.nodus_height_mm, options.inches), "The disc", true);
        return parts;
    }
    const auto seat = seat_of(face, spec);
    if (!seat) {
        if (auto pin = pin_plan(face.delineation.frame, face.placement.nodus_height_mm, spec)) {
            pin->beyond_mm = options.beyond_mm;
            pin->inches = options.inches;
            add(pin_of(*pin).part, "The pin", false);
        }
        return parts;
    }
    if (gnomon.kind == GnomonKind::rod && gnomon.thickness_mm > 0) {
        RodPlan rod = rod_plan(*seat, spec);
        rod.inches = options.inches;
        add(rod_gnomon(rod).part, "The rod", false);
    } else if (auto edge = edge_gnomon_plan(plan, face, spec)) {
        edge->inches = options.inches;
        add(edge_gnomon(*edge).part, "The gnomon", true);
    }
    add_gauges(parts, face, spec, options.inches);
    return parts;
}

} // namespace dialwright::layout
