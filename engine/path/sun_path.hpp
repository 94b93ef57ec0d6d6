// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/site.hpp"
#include "engine/style/gnomon_edges.hpp"
#include "engine/sun/mean_year.hpp"

#include <functional>
#include <optional>

namespace dialwright {

/// Which Suns of a path count.
enum class Light {
    seen,      ///< the Sun lights the plate and stands above the site's skyline
    plate_only ///< the Sun lights the plate: for the shadow of a style that runs on beyond the nodus
};

/// A curve in the sky frame whose shadow is a line on the dial. A new family of lines is a new maker of paths; nothing
/// else knows how the curve comes about.
struct SunPath {
    std::function<std::optional<SkyPlace>(double)> at; ///< nothing where no Sun of the path stands there
    double first = 0.0, last = 1.0;                    ///< of the parameter
    bool great_circle = false; ///< its shadow is straight wherever the surface keeps great circles straight
    Light light = Light::seen;
    std::optional<Edge> edge; ///< the casting edge where the path is told; else by the Sun's hour angle
    int steps = 96;           ///< parameter steps within which the path does not turn twice
};

/// The declinations that the Sun reaches in the mean year: ± this.
struct Season {
    Angle least, greatest;
};

/// Half of the Sun's day arc: its hour angle at setting.
/// @param horizon  altitude of the Sun's middle at rising and setting: 0°, or −50′ as people see it
/// @return nothing where the Sun of this declination does not rise or does not set
[[nodiscard]] std::optional<Angle> half_day_arc(Angle latitude, Angle declination, Angle horizon);

/// The hour line of one hour angle, as shadows of the nodus alone: the season's Suns.
[[nodiscard]] SunPath hour_path_of_nodus(Angle hour_angle, const Season& season);

/// The hour line of one hour angle, as the shadow of the whole style, in both directions beyond the nodus' own: every
/// Sun of the hour's half circle, pole to pole, whether or not it comes there. The shadow of a point of the style that
/// stands k times as far from the centre is k times as far from it too, so that this is the one half-line from the
/// centre.
[[nodiscard]] SunPath hour_path_of_style(Angle hour_angle);

/// The date line of one declination, through the whole turn of hour angles, from midnight to midnight.
[[nodiscard]] SunPath declination_path(Angle declination);

/// A clock-time curve: the Suns of one mean-time hour through the mean year. The hour angle is that of the apparent
/// Sun when the mean Sun stands at `mean_hour_angle`.
/// @param first_day, last_day  days of the mean year, last > first, at most a year apart; may pass the year's end
/// @param year  the path holds on to it
[[nodiscard]] SunPath mean_time_path(Angle mean_hour_angle, const MeanYear& year, double first_day, double last_day);
SunPath mean_time_path(Angle mean_hour_angle, MeanYear&& year, double first_day, double last_day) = delete;

/// An hour counted from the Sun's rising, or up to its setting: the Suns of the season that stand that far after their
/// own rising, or before their own setting (1 h = 15°). With the level horizon a great circle.
[[nodiscard]] SunPath rise_path(Angle from_rise, Angle latitude, const Season& season, Angle horizon);
[[nodiscard]] SunPath set_path(Angle before_set, Angle latitude, const Season& season, Angle horizon);

/// An unequal hour: the Suns that have run `part` (0 to 1) of their own day arc.
[[nodiscard]] SunPath unequal_hour_path(double part, Angle latitude, const Season& season, Angle horizon);

/// The Suns of the season at one altitude, and at one azimuth (from north through east).
[[nodiscard]] SunPath altitude_path(Angle altitude, Angle latitude, const Season& season);
[[nodiscard]] SunPath azimuth_path(Angle azimuth, Angle latitude, const Season& season);

} // namespace dialwright
