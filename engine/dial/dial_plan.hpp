// SPDX-License-Identifier: MIT
#pragma once

#include "engine/cast/trace.hpp"
#include "engine/sun/mean_year.hpp"

#include <optional>
#include <string>
#include <vector>

namespace dialwright {

/// The kinds of time that a dial's hour lines can show.
enum class HourTime {
    sun,           ///< the site's own apparent time
    zone,          ///< apparent time of the zone's standard meridian: corrected for longitude
    clock,         ///< mean time of the zone's standard meridian: yearly curves
    since_sunrise, ///< equal hours since the Sun rose
    since_sunset,  ///< equal hours since it last set: 24 at sunset
    to_sunset,     ///< equal hours that are left until it sets
    unequal        ///< twelfths of the day from sunrise to sunset, 0 to 12
};
/// Hours that count from the Sun's rising or setting: they need a day that has both, and have no hour angle of their own.
[[nodiscard]] constexpr bool counts_from_horizon(HourTime time) {
    return time != HourTime::sun && time != HourTime::zone && time != HourTime::clock;
}
/// Hours whose lines are straight, each of one hour angle.
[[nodiscard]] constexpr bool has_straight_lines(HourTime time) {
    return time == HourTime::sun || time == HourTime::zone;
}

/// Which part of the year a clock-time curve is drawn for.
enum class HalfYear { whole, december_to_june, june_to_december };

/// How far an hour line runs.
enum class HourExtent {
    style, ///< as the shadow of the whole style: from the centre to the border
    nodus  ///< as the shadow of the nodus alone, between the solstices
};

struct HourPlan {
    HourTime time = HourTime::sun;
    std::optional<double> first_h, last_h; ///< on the dial's own time, 0 to 24; nothing: all that are ever lit
    int divide_min = 60;                   ///< a divisor of 60
    HalfYear half_year = HalfYear::whole;
    HourExtent extent = HourExtent::style;
    std::optional<Season> between; ///< only Suns of these declinations: a part of each line
};

/// Noon at another place, shown by an hour line of this dial.
struct PlaceNoon {
    std::string name;
    Angle longitude; ///< east positive
};

struct DatePlan {
    struct Line {
        std::string label;
        Angle declination;
    };
    std::vector<Line> lines;
    std::optional<Angle> first, last; ///< hour angles from and to which they run; nothing: as long as they are lit
};

/// All that the mathematics needs to delineate one face.
struct DialPlan {
    Site site;
    Angle zone_meridian; ///< east positive
    Attitude attitude;
    double nodus_height_mm = 0.0;
    double gnomon_thickness_mm = 0.0;
    Skyline skyline;
    HourPlan hours;                   ///< those of the chapter ring
    std::vector<HourPlan> more_hours; ///< drawn on the field beside them
    Angle horizon; ///< the Sun's altitude at rising and setting, for hours that count from them: 0° or −50′
    std::vector<Angle> altitudes, azimuths;
    std::vector<PlaceNoon> noons;
    std::optional<Season> altitudes_between, azimuths_between, noons_between; ///< as HourPlan::between
    DatePlan dates;
};

/// Hour angle of the dial's own time T (hours); of the mean Sun where the time is the clock's.
[[nodiscard]] Angle hour_angle_of(HourTime time, double time_h, const Site& site, Angle zone_meridian);
/// The dial's own time, in [0, 24), at which the (mean) Sun has an hour angle.
[[nodiscard]] double time_of(HourTime time, Angle hour_angle, const Site& site, Angle zone_meridian);

} // namespace dialwright
