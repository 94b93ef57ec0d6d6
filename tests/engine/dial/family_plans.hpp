// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"
#include "tests/engine/random_plates.hpp"

#include <algorithm>
#include <cmath>
#include <optional>
#include <sstream>
#include <string>
#include <vector>

namespace dialwright::test {

inline const MeanYear& mean_year() {
    static const MeanYear year{2025, 2044};
    return year;
}

inline std::string told(int seed, int i, const DialPlan& plan) {
    std::ostringstream text;
    text.precision(17);
    text << "seed " << seed << ", case " << i << ": latitude " << plan.site.latitude.in_degrees() << ", longitude "
         << plan.site.longitude.in_degrees() << ", normal azimuth " << plan.attitude.normal_azimuth.in_degrees()
         << ", altitude " << plan.attitude.normal_altitude.in_degrees() << ", thickness " << plan.gnomon_thickness_mm
         << ", horizon " << plan.horizon.in_degrees();
    return text.str();
}

/// Every family at once, each set of hours in its own place of more_hours.
inline void ask_for_every_family(DialPlan& plan) {
    plan.hours.time = HourTime::sun;
    for (const HourTime time :
         {HourTime::since_sunrise, HourTime::since_sunset, HourTime::to_sunset, HourTime::unequal}) {
        HourPlan hours;
        hours.time = time;
        plan.more_hours.push_back(hours);
    }
    for (int degrees = 5; degrees < 90; degrees += 10)
        plan.altitudes.push_back(Angle::degrees(degrees));
    for (int degrees = 0; degrees < 360; degrees += 15)
        plan.azimuths.push_back(Angle::degrees(degrees));
}

inline DialPlan random_plan(RandomPlates& random) {
    const RandomPlate plate = random.plate();
    DialPlan plan;
    plan.site = {plate.latitude, random.degrees(-180, 180)};
    if (random.pick(8) == 0)
        plan.site.latitude = Angle::degrees(std::array{70.0, -70.0, 90.0, -90.0}[std::size_t(random.pick(4))]);
    plan.attitude = plate.attitude;
    plan.nodus_height_mm = 100;
    plan.gnomon_thickness_mm = random.pick(3) == 0 ? 6.0 : 0.0;
    plan.horizon = random.pick(2) == 0 ? Angle{} : Angle::degrees(-50.0 / 60);
    return plan;
}

/// The Sun whose shadow of the nodus falls on a point, by the ray from the point through the nodus.
inline Eigen::Vector3d sun_above(const DialPlan& plan, const PlateFrame& frame, PlatePoint p, PlatePoint foot) {
    return (plan.nodus_height_mm * frame.n - (p.u_mm - foot.u_mm) * frame.u - (p.v_mm - foot.v_mm) * frame.v)
        .normalized();
}

/// How far a point lies from the infinite line through a piece's ends.
inline double off_line_mm(PlatePoint p, const PlatePolyline& line) {
    const PlatePoint a = line.front(), b = line.back();
    const double du = b.u_mm - a.u_mm, dv = b.v_mm - a.v_mm;
    return std::abs((p.u_mm - a.u_mm) * dv - (p.v_mm - a.v_mm) * du) / std::hypot(du, dv);
}

inline double length_mm(const PlatePolyline& line) {
    return std::hypot(line.back().u_mm - line.front().u_mm, line.back().v_mm - line.front().v_mm);
}

/// What names a line among all of a dial's.
inline bool same_name(const DialLine& a, const DialLine& b) {
    return a.family == b.family && a.set == b.set && a.label == b.label && std::abs(a.time_h - b.time_h) < 1e-9 &&
           std::abs((a.level - b.level).signed_turn().in_degrees()) < 1e-9;
}

inline const DialLine* line_named(const Delineation& dial, const DialLine& name) {
    const auto found =
        std::find_if(dial.lines.begin(), dial.lines.end(), [&](const DialLine& line) { return same_name(line, name); });
    return found == dial.lines.end() ? nullptr : &*found;
}

} // namespace dialwright::test
