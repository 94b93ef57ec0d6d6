// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"
#include "engine/fit/least_squares.hpp"
#include "engine/survey/found.hpp"
#include "engine/survey/known.hpp"

#include <optional>
#include <vector>

namespace dialwright {

/// What a fixed dial showed at an instant by the clock.
struct DialReading {
    Instant at;
    double reads_h = 0.0; ///< on the dial's own time; of the clock's hours, morning or evening as it comes nearer
};

/// How a dial stands, against how it was designed to stand. All angles are seen by a reader who faces the plate; its top is
/// the north edge of a level one, its right the east edge.
struct Misfixing {
    double turn_deg = 0.0;         ///< in its own plane, anticlockwise
    double top_deg = 0.0;          ///< its top stands out (is high) by
    double right_deg = 0.0;        ///< its right edge stands out (is high) by
    double style_height_deg = 0.0; ///< the style stands up from the plate too much by
    double style_right_deg =
        0.0; ///< the style leans to the right of the substyle by, for who looks along it from the centre
};

/// All that was read of a dial.
struct DialReadings {
    DialPlan plan;
    double clock_give_s = 5.0;
    /// What a level, a plumb line or a gauge has shown already, in degrees as above.
    std::optional<Known> turn, top, right, style_height, style_right;
    std::vector<DialReading> readings;
};

/// One way in which the readings hang together.
struct AdjustAnswer {
    enum class Fault {
        fixing, ///< the dial as it was cut, fixed wrongly
        level,  ///< the same, its level edges (of a wall dial: its lean and plumb) right
        style,  ///< the plate level, but the style bent or set wrongly
        both
    };
    Fault fault = Fault::fixing;
    Found turn, top, right, style_height, style_right; ///< degrees, as in Misfixing
    Found clock_s;
    double right_chance = 1.0;   ///< that readings of a dial which stands right come out so
    double scatter_min = 0.0;    ///< of a reading; 0 where nothing checks it
    std::vector<double> off_min; ///< what the dial read, less what it would read so, a figure a reading
    std::vector<bool> stray;
};

struct DialAdjustment {
    std::vector<AdjustAnswer> answers; ///< the likeliest first; several where the readings can't tell them apart
    /// Where tilts are not told, or the readings do as well without them: what the turn is if level or plumb line find none.
    std::optional<AdjustAnswer> if_level;
    bool checked = false;
    bool too_scattered = false;
    bool style_asked = false;            ///< the dial is one of which readings can tell something of the style
    double style_told_deg = 0.0;         ///< an error of the style's height shows from about this on
    std::vector<double> as_designed_min; ///< what the dial read, less what it should read
};

/// What a dial shows that stands so, at a Sun.
/// @param sun  as the air shows it, site frame
/// @return hours on the dial's own time, [0, 24); nothing where it shows none
[[nodiscard]] std::optional<double> reading_of_misfixed(const DialPlan& plan, const MeanYear& year,
                                                        const Misfixing& misfixing, const SiteDirection& sun,
                                                        double day_of_year);

/// Fits how the dial stands to its readings. Turning it about the pole moves all readings alike and all year; tilts
/// across that show only while the Sun is away from the equator, so that readings near an equinox leave them open.
/// @param readings  one at least; every instant with the Sun up
/// Accuracy: the stated ranges hold the truth in 92 to 98 % of simulated dials. Test: tests/against/ephem_adjust.py
[[nodiscard]] DialAdjustment adjust_dial(const DialReadings& readings, const MeanYear& year);

/// How a dial of one place must be mounted to serve at another.
struct Remounting {
    Attitude attitude;   ///< that its plate must have there
    Angle turn;          ///< first, in its own plane, anticlockwise as its reader sees it
    Angle wedge;         ///< then tilted by this
    Angle wedge_towards; ///< so that the edge in this direction comes out (is raised): clockwise from the plate's top
};
/// @param zone_meridian  of the clocks there; not used by a dial of the place's own time, nor by hours that count from
///                       sunrise or sunset
[[nodiscard]] Remounting remounted(const DialPlan& plan, const Site& there, Angle zone_meridian);

} // namespace dialwright
