// SPDX-License-Identifier: MIT
#pragma once

#include "engine/sun/solar_day.hpp"

#include <vector>

namespace dialwright {

/// The Sun comes over the horizon, stands in the meridian, or goes under.
struct SunEvent {
    enum class Kind { rise, noon, set };
    Kind kind = Kind::noon;
    Instant at;
    Angle azimuth;  ///< from north through east
    Angle altitude; ///< of the middle, no refraction
};

/// What the Sun does while a zone's clocks show one date. As a rule one rise, one noon, one set, in this order; but a
/// date near the midnight Sun may lack any of them, and where the clocks are far from the Sun a noon or a set may come
/// after midnight, so that one date has none and its neighbour two.
struct CivilDay {
    std::chrono::year_month_day date;
    Instant begin, end;           ///< the date's first instant and the next one's; equal where the zone's calendar has
                                  ///< left the date out, and then all else is empty
    std::vector<SunEvent> events; ///< in their order
    bool up_at_begin = false;     ///< the Sun stands above the standard altitude as the date begins
    std::chrono::microseconds up_for{0}; ///< how long it does so within the date
    Angle declination;                   ///< at the date's first noon; without one at its middle
    Angle equation_of_time;              ///< at the same moment

    /// The first event of a kind; null where the date has none.
    [[nodiscard]] const SunEvent* first(SunEvent::Kind kind) const;
};

/// The dates from `first` to `last`, both included.
/// @param standard_altitude  of the Sun's middle at rise and set
/// @throws std::invalid_argument  last is before first, or within three days of the ends of the years of Almanac
/// Accuracy: as solar_day(). Cost: 0.1 ms a date. Tests: tests/against/ephem_civil_days.py, tests/published/sun/nrel_spa.txt
[[nodiscard]] std::vector<CivilDay> civil_days(const Site& site, const Zone& zone, std::chrono::year_month_day first,
                                               std::chrono::year_month_day last,
                                               Angle standard_altitude = k_upper_edge_altitude);

} // namespace dialwright
