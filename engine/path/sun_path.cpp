// SPDX-License-Identifier: MIT
#include "engine/path/sun_path.hpp"

namespace dialwright {

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

} // namespace dialwright
