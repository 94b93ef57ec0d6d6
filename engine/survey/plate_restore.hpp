// SPDX-License-Identifier: MIT
#pragma once

#include "engine/fit/least_squares.hpp"
#include "engine/surface/plate_frame.hpp"
#include "engine/survey/found.hpp"
#include "engine/survey/known.hpp"

#include <optional>
#include <vector>

namespace dialwright {

/// An hour line of an old plate, as measured on it.
struct PlateLine {
    std::optional<double> hour_h;        ///< by its numeral, 0 to 24 or 1 to 12; nothing where that is unreadable
    std::optional<double> direction_deg; ///< from the centre to its outer end, clockwise from the plate's up
    std::vector<PlatePoint> points; ///< on it, the innermost first, right and up of the origin; instead of a direction
};

/// All that was measured of an old plate.
struct PlateReadings {
    std::vector<PlateLine> lines;
    bool origin_is_centre = false;   ///< points are measured from the dial's centre: one a line is enough
    bool up_known = true;            ///< false: directions are from any line on the plate
    double hours_apart = 1.0;        ///< from line to line, in their order, where no hour can be read
    double gap_mm = 0.0;             ///< between the two half-dials
    double direction_give_deg = 1.0; ///< ± of a direction as it was cut and measured, for a start
    double point_give_mm = 1.0;
    std::optional<Known> style_height_deg; ///< 0 to 90, where the style survives
    std::optional<Known> substyle_deg;     ///< clockwise from up
};

/// What hour lines alone tell of a plate: they are those of a level dial at another latitude. A Sun at the hour angle of the
/// substyle's hour stands in the style's plane.
struct PlateFigure {
    Fit fit;                ///< unknowns: substyle, style height with its sense, substyle's hour (degrees), …
    bool side_told = true;  ///< false: the style's foot may be at either end of the substyle
    double side = 1.0;      ///< of the north pole along the substyle as the fit has it
    bool clockwise = true;  ///< the hours run clockwise: the style points to the north pole
    Found style_height_deg; ///< 0 to 90
    Found substyle_deg;     ///< clockwise from up
    Found substyle_hour_h;  ///< by the plate's own numerals, to the whole half-day; 0 to 12
    std::optional<PlatePoint> centre; ///< where points were measured and the lines meet
    bool centre_told = true;          ///< false: the lines are parallel as far as they tell
    double scatter = 0.0;             ///< in nominal deviations; 0 where nothing checks the lines
    std::vector<double> off_deg;      ///< each line as cut less as it should be, clockwise
    std::vector<double> off_mm; ///< the same at its outermost point, to the right of the way out; 0 for mere directions
    std::vector<bool> stray;    ///< cut wrong, or read wrong: it did not count
    std::vector<double> counted_deg;           ///< hours of the lines that count, from noon by the numerals
    std::vector<std::optional<double>> hour_h; ///< of each line; of unreadable ones what it must be, to the quarter
};

/// @return nothing where no plate has lines like these
/// @param readings  three lines or more
[[nodiscard]] std::optional<PlateFigure> figure_of(const PlateReadings& readings);

/// Where and how a plate of these lines would tell the time, by one more fact about it.
struct PlateSolution {
    enum class Fact {
        upright,  ///< it stood upright
        level,    ///< it lay level
        lean,     ///< it leaned as measured
        latitude, ///< it was made for the latitude of the place where it was found
        sun_time  ///< it kept its place's own time by the Sun: XII at local noon
    };
    Fact fact = Fact::upright;
    Found latitude_deg;
    std::optional<Found> facing_deg; ///< not of a level plate
    Found lean_deg;                  ///< back from upright, 90 level
    Found ahead_min; ///< it shows so much more than its place's own time by the Sun, within half a half-day
};

/// What else is known of the plate.
struct PlateFacts {
    std::optional<Known> latitude_deg; ///< of where it was found
    std::optional<Known> lean_deg;     ///< measured where it still hangs
};

/// The plates that the lines allow, one or two a fact. Hour lines never tell lean and latitude apart: leaning a plate is as
/// good as moving it along its meridian. Plates whose lines the Sun would hardly reach are left out.
[[nodiscard]] std::vector<PlateSolution> solutions_of(const PlateFigure& figure, bool up_known,
                                                      const PlateFacts& facts);

} // namespace dialwright
