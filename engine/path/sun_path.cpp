// SPDX-License-Identifier: MIT
#include "engine/path/sun_path.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace dialwright {
namespace {

/// A path with the declination as its parameter, at an hour angle that follows from the day arc.
template <class HourAngle>
SunPath day_arc_path(Angle latitude, const Season& season, Angle horizon, HourAngle hour_angle) {
    SunPath path;
    path.at = [=](double radians) -> std::optional<SkyPlace> {
        const Angle declination = Angle::radians(radians);
        const auto arc = half_day_arc(latitude, declination, horizon);
        return arc ? std::optional<SkyPlace>{{hour_angle(*arc), declination}} : std::nullopt;
    };
    // Only where the Sun rises and sets: near a pole that is a narrow part of the season, between two steps of the whole.
    const Angle widest = Angle::degrees(90) - abs(latitude);
    const Angle middle = latitude >= Angle{} ? horizon : -horizon;
    path.first = std::clamp(middle - widest, season.least, season.greatest).in_radians();
    path.last = std::clamp(middle + widest, season.least, season.greatest).in_radians();
    return path;
}

/// A path given in the site frame, of which only the season's Suns count.
template <class Direction>
SunPath site_path(Angle latitude, const Season& season, Direction direction) {
    SunPath path;
    path.at = [=](double parameter) -> std::optional<SkyPlace> {
        const SkyPlace sky = to_sky(direction(Angle::radians(parameter)), latitude);
        const bool in_season = sky.declination >= season.least && sky.declination <= season.greatest;
        return in_season ? std::optional<SkyPlace>{sky} : std::nullopt;
    };
    return path;
}

} // namespace

std::optional<Angle> half_day_arc(Angle latitude, Angle declination, Angle horizon) {
    const double across = cos(latitude) * cos(declination);
    const double along = sin(horizon) - sin(latitude) * sin(declination);
    if (std::abs(along) > across)
        return std::nullopt;
    return across > 0 ? std::optional{arc_cosine(along / across)} : std::nullopt;
}

SunPath hour_path_of_nodus(Angle hour_angle, const Season& season) {
    SunPath path;
    path.at = [hour_angle](double declination) { return SkyPlace{hour_angle, Angle::radians(declination)}; };
    path.first = season.least.in_radians();
    path.last = season.greatest.in_radians();
    path.great_circle = true;
    return path;
}

SunPath hour_path_of_style(Angle hour_angle) {
    SunPath path = hour_path_of_nodus(hour_angle, {Angle::degrees(-90), Angle::degrees(90)});
    path.light = Light::plate_only;
    path.steps = 8; // lit from one pole to the plate's plane
    return path;
}

SunPath declination_path(Angle declination) {
    SunPath path;
    path.at = [declination](double hour_angle) { return SkyPlace{Angle::radians(hour_angle), declination}; };
    path.first = Angle::degrees(-180).in_radians();
    path.last = Angle::degrees(180).in_radians();
    path.great_circle = abs(declination) < Angle::arcseconds(0.001);
    path.steps = 240;
    return path;
}

SunPath mean_time_path(Angle mean_hour_angle, const MeanYear& year, double first_day, double last_day) {
    SunPath path;
    path.at = [mean_hour_angle, &year](double day) {
        const MeanYear::Season sun = year.at(day);
        return SkyPlace{mean_hour_angle + sun.equation_of_time, sun.declination};
    };
    path.first = first_day;
    path.last = last_day;
    path.steps = 48;
    return path;
}

SunPath rise_path(Angle from_rise, Angle latitude, const Season& season, Angle horizon) {
    SunPath path = day_arc_path(latitude, season, horizon, [from_rise](Angle arc) { return from_rise - arc; });
    path.great_circle = horizon == Angle{};
    return path;
}

SunPath set_path(Angle before_set, Angle latitude, const Season& season, Angle horizon) {
    SunPath path = day_arc_path(latitude, season, horizon, [before_set](Angle arc) { return arc - before_set; });
    path.great_circle = horizon == Angle{};
    return path;
}

SunPath unequal_hour_path(double part, Angle latitude, const Season& season, Angle horizon) {
    return day_arc_path(latitude, season, horizon, [part](Angle arc) { return (2 * part - 1) * arc; });
}

SunPath altitude_path(Angle altitude, Angle latitude, const Season& season) {
    SunPath path = site_path(latitude, season, [altitude](Angle azimuth) { return direction_at(azimuth, altitude); });
    path.first = 0;
    path.last = 2 * std::numbers::pi;
    path.steps = 240;
    return path;
}

SunPath azimuth_path(Angle azimuth, Angle latitude, const Season& season) {
    SunPath path = site_path(latitude, season, [azimuth](Angle altitude) { return direction_at(azimuth, altitude); });
    path.first =
        1e-9; // not the horizon itself, where the Sun is not seen: in the far north it may leave the season close by
    path.last = std::numbers::pi / 2;
    path.great_circle = true;
    return path;
}

} // namespace dialwright
