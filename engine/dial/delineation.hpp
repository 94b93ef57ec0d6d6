// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/dial_plan.hpp"

#include <string>
#include <vector>

namespace dialwright {

/// How a line came about; which of a plan's sets of hours it belongs to stands beside it.
enum class Family {
    hour,
    clock_hour,
    date,
    since_sunrise,
    since_sunset,
    to_sunset,
    unequal_hour,
    altitude,
    azimuth,
    place_noon
};
[[nodiscard]] Family family_of(HourTime time);
[[nodiscard]] bool is_hour(Family family); ///< one that has a time
[[nodiscard]] bool counts_from_horizon(Family family);

/// One line of the dial, not yet trimmed to the plate's borders.
struct DialLine {
    Family family = Family::hour;
    HourTime time = HourTime::sun; ///< of an hour line
    int set = 0;                   ///< 0: the plan's own hours; 1, 2, …: its more_hours
    std::string label;             ///< of a date line, of a place
    double time_h = 0.0;           ///< of an hour line, on its own scale; of noon elsewhere, by the Sun of this place
    Angle level;                   ///< of an altitude circle or an azimuth line
    int step_min = 60; ///< the coarsest of 60, 30, 15, 10, 5, 2, 1 minutes that the time is a whole number of
    Angle hour_angle;  ///< of an hour line; of the mean Sun for the clock's
    std::optional<Angle> direction;   ///< of a straight hour line, from the centre, clockwise from +v
    std::optional<Angle> declination; ///< of a date line
    std::vector<PlatePolyline> pieces;
};

/// A line that the plan asks for by itself and that is not there.
struct MissedLine {
    DialLine line; ///< without pieces
    bool lit;      ///< the Sun shows it somewhere, but outside the window
};

/// What the mathematics says of one face: the style and every line that the Sun can show inside the window.
struct Delineation {
    PlateFrame frame;
    Style style;
    Season season; ///< of the mean year
    /// The plan's hours by time, each of its more_hours by time, then in the plan's order noons elsewhere, altitudes,
    /// azimuths and dates.
    std::vector<DialLine> lines;
    std::vector<double> unlit_hours;   ///< the plan's whole hours, asked for by name, that are never lit
    std::vector<double> outside_hours; ///< its whole hours that are lit, but whose lines lie wholly outside the window
    std::vector<MissedLine> missed;    ///< of all other families; of more_hours the whole ones asked for by name
};

[[nodiscard]] Caster<Plane> caster_of(const DialPlan& plan);

/// @param window  plate frame, mm
/// @throws std::invalid_argument  the plan's nodus is not above the plate, or its divisions do not divide the hour
[[nodiscard]] Delineation delineate(const DialPlan& plan, const MeanYear& year, const PlateBox& window);

/// What one of a dial's sets of hours shows at the Sun's place: the time on its own scale by the line on which the shadow
/// falls, in [0, 24). On clock-time curves the curve of the half year that `day_of_year` lies in.
/// @param day_of_year  of the mean year
/// @return nothing for hours that count from a rising or setting on a day that has none
[[nodiscard]] std::optional<double> reading_of(const DialPlan& plan, HourTime time, const MeanYear& year,
                                               const SkyPlace& sun, double day_of_year);

} // namespace dialwright
