// SPDX-License-Identifier: MIT
//
// What each family of lines means, told without the engine's own formulas: hours that count from rising or setting by
// turning the sky back to that moment, where the Sun must stand at the horizon; no formula for the day arc enters.
#pragma once

#include "tests/engine/cast/brute_walk.hpp"
#include "tests/engine/dial/family_plans.hpp"

namespace dialwright::test {

#ifdef DIALWRIGHT_FEWER_CASES
inline constexpr int k_plans = 25;
#else
inline constexpr int k_plans = 150;
#endif

inline constexpr PlateBox k_window{-400, -400, 400, 400};

inline double altitude_of(Angle latitude, Angle hour_angle, Angle declination) {
    return to_site({hour_angle, declination}, latitude).altitude().in_radians();
}

/// How far a Sun is from its line's definition, as an angle on the sky (radians).
inline double astray(const DialPlan& plan, const DialLine& line, const SkyPlace& sun) {
    const Angle latitude = plan.site.latitude;
    const auto from_horizon = [&](Angle hour_angle) {
        return std::abs(altitude_of(latitude, hour_angle, sun.declination) - plan.horizon.in_radians());
    };
    const auto on_side = [](Angle hour_angle, double side) { return side * sin(hour_angle) > -1e-4 ? 0.0 : 1.0; };
    const Angle count = Angle::hours(line.time_h);
    switch (line.family) {
    case Family::hour:
    case Family::place_noon:
        return std::abs(cos(sun.declination) * sin(sun.hour_angle - line.hour_angle));
    case Family::since_sunrise:
        return from_horizon(sun.hour_angle - count) + on_side(sun.hour_angle - count, -1);
    case Family::since_sunset:
        return from_horizon(sun.hour_angle - count) + on_side(sun.hour_angle - count, 1);
    case Family::to_sunset:
        return from_horizon(sun.hour_angle + count) + on_side(sun.hour_angle + count, 1);
    case Family::unequal_hour: {
        const double part = line.time_h / 6 - 1; // of half a day
        return part == 0 ? std::abs(sun.hour_angle.in_radians())
                         : std::abs(part) * from_horizon(sun.hour_angle / part) + on_side(sun.hour_angle / part, 1);
    }
    case Family::altitude:
        return std::abs(altitude_of(latitude, sun.hour_angle, sun.declination) - line.level.in_radians());
    case Family::azimuth: {
        const Eigen::Vector3d s = to_site(sun, latitude).enu;
        return std::abs(s.x() * cos(line.level) - s.y() * sin(line.level)) +
               (s.x() * sin(line.level) + s.y() * cos(line.level) > -1e-9 ? 0 : 1);
    }
    default:
        return std::abs((sun.declination - *line.declination).in_radians());
    }
}

/// Half of the day arc by halving the Sun's way from noon to midnight; nothing where it does not cross the horizon.
inline std::optional<double> setting_of(const DialPlan& plan, double declination) {
    const auto height = [&](double hour_angle) {
        return altitude_of(plan.site.latitude, Angle::radians(hour_angle), Angle::radians(declination)) -
               plan.horizon.in_radians();
    };
    double up = 0, down = Angle::degrees(180).in_radians();
    if (!(height(up) > 0) || !(height(down) < 0))
        return std::nullopt;
    for (int i = 0; i < 60; ++i)
        (height((up + down) / 2) > 0 ? up : down) = (up + down) / 2;
    return (up + down) / 2;
}

/// Every Sun of a line that hours from rise or set ask for.
inline std::optional<SkyPlace> sun_of_hour(const DialPlan& plan, HourTime time, double time_h, double declination) {
    const auto set = setting_of(plan, declination);
    if (!set)
        return std::nullopt;
    const double count = Angle::hours(time_h).in_radians();
    const double hour_angle = time == HourTime::since_sunrise  ? count - *set
                              : time == HourTime::since_sunset ? *set + count
                              : time == HourTime::to_sunset    ? *set - count
                                                               : (time_h / 6 - 1) * *set;
    return SkyPlace{Angle::radians(hour_angle), Angle::radians(declination)};
}

} // namespace dialwright::test
