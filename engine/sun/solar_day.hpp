// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/site/site.hpp"
#include "engine/sun/almanac.hpp"
#include "engine/time/instant.hpp"
#include "engine/time/zone.hpp"

#include <chrono>
#include <optional>

namespace dialwright {

/// The altitude of the Sun's centre when people see its upper edge on a level horizon: 34′ of refraction and 16′ of
/// semidiameter. Source: the convention of the almanacs (Meeus, Astronomical Algorithms, ch. 15; from memory).
inline constexpr Angle k_upper_edge_altitude = Angle::degrees(-50.0 / 60.0);

/// The Sun's passage through the standard altitude.
struct HorizonPassage {
    Instant at;
    Angle azimuth; ///< from north through east
};

/// One day of the Sun at a site: the rise before a noon, the noon, and the set after it.
struct SolarDay {
    enum class Light {
        rises_and_sets, ///< as a rule; in the far north or south one of the two may be missing on a day between seasons
        stays_up,       ///< neither rises nor sets: above the standard altitude throughout
        stays_down,     ///< below it even at noon
    };
    Light light = Light::rises_and_sets;
    std::optional<HorizonPassage> rise;
    std::optional<HorizonPassage> set;
    Instant noon;           ///< upper transit: the hour angle is 0
    Angle noon_altitude;    ///< geocentric, no refraction
    Angle noon_azimuth;     ///< 180°, or 0° where the Sun passes north of overhead
    Angle declination;      ///< at noon
    Angle equation_of_time; ///< at noon
};

/// The solar day whose noon is within twelve hours of `about`.
/// @param standard_altitude  of the Sun's centre, for rise and set; 0 for the bare geometry
/// @throws std::invalid_argument  outside the years of apparent_sun()
/// Accuracy: rise and set solve the instant's own Sun to 0.01 s; the day's air and the skyline move what is seen by
/// tens of seconds and more. Cost: 1 ms. Tests: tests/published/sun/nrel_spa.txt, tests/against/ephem_sun.py
[[nodiscard]] SolarDay solar_day(const Site& site, Instant about, Angle standard_altitude = k_upper_edge_altitude);

/// The solar day of a civil date: the noon nearest to the clocks' twelve.
[[nodiscard]] SolarDay solar_day(const Site& site, std::chrono::year_month_day date, const Zone& zone,
                                 Angle standard_altitude = k_upper_edge_altitude);

/// The same from a table, for many days. The table must reach a day and a half to either side of `about` (asserted).
[[nodiscard]] SolarDay solar_day(const Site& site, Instant about, const Almanac& almanac,
                                 Angle standard_altitude = k_upper_edge_altitude);

} // namespace dialwright
