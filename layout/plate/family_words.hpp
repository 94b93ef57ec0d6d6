// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"

#include <string>
#include <utility>
#include <vector>

namespace dialwright::layout {

/// The trade's words for a family of lines.
struct FamilyWords {
    const char* name;    ///< as designs and numbers name it: "since sunrise"
    const char* line;    ///< what the name of one of its lines begins with: "hour since sunrise "
    const char* lines;   ///< all of them: "hours since sunrise"
    const char* meaning; ///< what it shows
};

[[nodiscard]] constexpr FamilyWords words_of(HourTime time) {
    switch (time) {
    case HourTime::sun:
        return {"sun", "Sun's hour ", "hours by the Sun", "the Sun's own, at this place"};
    case HourTime::zone:
        return {"zone", "zone hour ", "hours by the zone's meridian",
                "by the Sun, corrected for longitude to the zone"};
    case HourTime::clock:
        return {"clock", "clock hour ", "hours by the clock",
                "the zone's clock, by yearly curves (summer time not added)"};
    case HourTime::since_sunrise:
        return {"since sunrise", "hour since sunrise ", "hours since sunrise", "equal hours since the Sun rose"};
    case HourTime::since_sunset:
        return {"since sunset", "hour since sunset ", "hours since sunset", "equal hours since the last sunset"};
    case HourTime::to_sunset:
        return {"hours left", "hour to sunset ", "hours left to sunset", "equal hours left until sunset"};
    case HourTime::unequal:
        break;
    }
    return {"unequal", "unequal hour ", "unequal hours", "unequal hours, twelve from sunrise to sunset"};
}

/// @param time  of an hour line
[[nodiscard]] constexpr FamilyWords words_of(Family family, HourTime time) {
    switch (family) {
    case Family::date:
        return {"date", "date line ", "date lines", "days of the year"};
    case Family::altitude:
        return {"altitude", "altitude circle ", "altitudes of the Sun", "how high the Sun stands"};
    case Family::azimuth:
        return {"azimuth", "azimuth line ", "azimuths of the Sun", "where the Sun stands, from north through east"};
    case Family::place_noon:
        return {"noon at", "noon at ", "noon at", "noon at other places"};
    default:
        return words_of(time);
    }
}
[[nodiscard]] inline FamilyWords words_of(const DialLine& line) {
    return words_of(line.family, line.time);
}

/// A line's name for people and for marks: "hour line XII" of the chapter ring's own, "hour since sunrise 3".
[[nodiscard]] std::string line_name(Family family, HourTime time, int set, const std::string& label);

/// A family and one of its labels.
using Named = std::pair<std::string, std::string>;
/// "altitudes of the Sun 70°, 80°; date lines 21 Dec": each family once, in the order of their first labels.
[[nodiscard]] std::string by_family(const std::vector<Named>& lines);

} // namespace dialwright::layout
