// SPDX-License-Identifier: MIT
//
// All in the dial's own plate frame (u, v, above), in which its plan was drawn. Turning the dial by R turns the Sun by R⁻¹ in
// that frame. The style as it stands is the line through the nodus N' = A + Q (N − A) along p' = Q p, Q being its own
// turn about the pivot A. With the Sun b, its shadow is the line in which the plane of p' and b meets the plate:
//     m · (X − N') = 0,   m = p' × b,   X on the plate.
// The lines as cut tell, for each point X of the plate, the Sun that the plan meant to throw the nodus' shadow there: the
// one in the direction N − X. All Suns of one hour lie in one plane with the style, so that any point of a straight
// hour line tells its hour.
#include "engine/dial/slipped_dial.hpp"

#include <Eigen/Geometry>

#include <cmath>

namespace dialwright {
namespace {

Eigen::Vector3d rotated(const Eigen::Vector3d& vector, const Eigen::Vector3d& turn) {
    const double angle = turn.norm();
    if (!(angle > 0))
        return vector;
    return Eigen::AngleAxisd{angle, turn / angle} * vector;
}

} // namespace

SlippedDial::SlippedDial(const DialPlan& plan, const MeanYear& year, HourTime time, bool by_nodus)
    : plan_{plan}, year_{year}, time_{time}, by_nodus_{by_nodus || family_of(time) != Family::hour},
      caster_{caster_of(plan)}, style_{style_of(caster_.surface().frame(), plan.nodus_height_mm, plan.site.latitude)} {}

Eigen::Vector3d SlippedDial::to_plate(const Eigen::Vector3d& site) const {
    const PlateFrame& frame = caster_.surface().frame();
    return {site.dot(frame.u), site.dot(frame.v), site.dot(frame.n)};
}

Eigen::Vector3d SlippedDial::nodus_mm(const SiteDirection& sun) const {
    const PlatePoint shift = caster_.edges().shift(caster_.edges().casting(sun));
    return {shift.u_mm, shift.v_mm, plan_.nodus_height_mm};
}

std::optional<double> SlippedDial::reads(const SkyPlace& sun, double day, const Slip& slip, PlatePoint at) const {
    const SiteDirection towards = to_site(sun, plan_.site.latitude);
    const Eigen::Vector3d b = to_plate(rotated(towards.enu, -slip.turned));
    if (!(b.z() > 0))
        return std::nullopt;
    const Eigen::Vector3d nodus = nodus_mm(towards), style_turn = to_plate(slip.style_turned);
    const Eigen::Vector3d stands = slip.pivot_mm + rotated(nodus - slip.pivot_mm, style_turn);
    PlatePoint shadow{stands.x() - b.x() * stands.z() / b.z(), stands.y() - b.y() * stands.z() / b.z()};
    if (!by_nodus_) {
        const Eigen::Vector3d m = rotated(to_plate(style_.towards_nodus), style_turn).cross(b);
        const double square = m.x() * m.x() + m.y() * m.y();
        if (square > 0) {
            const double off = (m.x() * (at.u_mm - shadow.u_mm) + m.y() * (at.v_mm - shadow.v_mm)) / square;
            shadow = {at.u_mm - off * m.x(), at.v_mm - off * m.y()};
        }
    }
    const PlatePoint from = slip.stretch_from;
    const PlatePoint cut_for{from.u_mm + (shadow.u_mm - slip.moved_mm.u_mm - from.u_mm) / slip.stretch_u,
                             from.v_mm + (shadow.v_mm - slip.moved_mm.v_mm - from.v_mm) / slip.stretch_v};
    const auto shown = reading_at(cut_for, nodus, day);
    if (by_nodus_ || !shown)
        return shown;
    // The line runs through the centre: on its other half stands the hour that is twelve hours away.
    const auto meant = reading_of(plan_, time_, year_, sun, day);
    const bool other_half = meant && std::abs(minutes_between(*meant, *shown)) > 6 * 60;
    return other_half ? std::fmod(*shown + 12, 24.0) : *shown;
}

std::optional<double> SlippedDial::reading_at(PlatePoint point, const Eigen::Vector3d& nodus_mm, double day) const {
    const PlateFrame& frame = caster_.surface().frame();
    const Eigen::Vector3d meant =
        (nodus_mm.x() - point.u_mm) * frame.u + (nodus_mm.y() - point.v_mm) * frame.v + nodus_mm.z() * frame.n;
    return reading_of(plan_, time_, year_, to_sky({meant.normalized()}, plan_.site.latitude), day);
}

double SlippedDial::minutes_between(double from_h, double to_h) const {
    const double hours = to_h - from_h;
    return 60.0 * (time_ == HourTime::unequal ? hours : hours - 24.0 * std::round(hours / 24.0));
}

std::optional<double> SlippedDial::error_min(const SkyPlace& sun, double day, const Slip& slip, PlatePoint at) const {
    const auto meant = reads(sun, day, {}, at), shows = reads(sun, day, slip, at);
    return meant && shows ? std::optional{minutes_between(*meant, *shows)} : std::nullopt;
}

} // namespace dialwright
