// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/slipped_dial.hpp"

#include <array>
#include <optional>
#include <string>
#include <vector>

namespace dialwright {

/// What can put a reading off.
enum class SlipKind {
    half_shadow,  ///< the Sun is 32′ wide: the shadow's edge is a band, 1/107 of its distance
    marking,      ///< a line beside its place
    style_height, ///< the style too high or too low; of a pin or disc: leaning up or down the plate
    substyle, ///< the style beside its substyle; of a pin or disc, and of a style that stands square: leaning to a side
    facing,   ///< the whole dial turned about the plumb line
    lean,     ///< the whole dial tipped: top back or forward; of a level plate north edge down or up
    level,    ///< of a level plate alone: east edge down or up
    print,    ///< the template stretched along one of its sides
    position, ///< the place on the map, in latitude and longitude
    equation  ///< the years' own Suns against the mean that the dial and its correction are made for
};
inline constexpr std::array k_slips{
    SlipKind::half_shadow, SlipKind::marking, SlipKind::style_height, SlipKind::substyle, SlipKind::facing,
    SlipKind::lean,        SlipKind::level,   SlipKind::print,        SlipKind::position, SlipKind::equation};

/// How large the slips are, each either way.
struct SlipSizes {
    Angle half_shadow = Angle::degrees(16.0 / 60.0); ///< half of the Sun's width
    double marking_mm = 0.5;
    Angle style_height = Angle::degrees(0.5), substyle = Angle::degrees(0.5);
    Angle facing = Angle::degrees(1), lean = Angle::degrees(0.5);
    double print = 0.002; ///< of the length
    Angle position = Angle::degrees(0.01);
};

/// What stands to be judged: a face's plan and how it is read.
struct AccuracyPlan {
    DialPlan dial;
    bool by_nodus = false; ///< as SlippedDial
    bool at_outer_end =
        false; ///< the style is so long that its shadow reaches the outer end of each line, and is read there
    bool level = false;
    Eigen::Vector3d pivot_mm = Eigen::Vector3d::Zero(); ///< where style or pin are fixed: plate frame (u, v, above)
    PlatePoint stretch_from;                            ///< where the template is laid on: centre, or the nodus' foot
    SlipSizes sizes;
    struct Line {
        double time_h = 0.0;
        PlatePoint outer;      ///< the end of the line as drawn that is farther from the pivot
        double reach_mm = 0.0; ///< a style's shadow that falls farther from the pivot than this is read at `outer`
    };
    std::vector<Line> lines;
};

/// One hour line at one season.
struct AccuracyCell {
    std::array<std::optional<double>, k_slips.size()> minutes; ///< of each slip, ≥ 0; nothing where it does not apply
    double total_min = 0.0;                                    ///< root of the sum of squares
    SlipKind most = SlipKind::half_shadow;                     ///< which is the largest
    PlatePoint at;                                             ///< where on the plate it is read
};
struct AccuracyLine {
    double time_h = 0.0;
    std::array<std::optional<AccuracyCell>, 3>
        at;                                 ///< June solstice, equinox (March), December solstice; unlit: nothing
    [[nodiscard]] double worst_min() const; ///< of the seasons in which it is lit; 0 if in none
};

/// By how many minutes each slip puts each hour off. Each slip is taken at its full size both ways through the whole
/// reading of the dial, and the larger of the two stands. Independent, so that they add by squares.
/// @param plan  hours of the Sun, the zone, the clock or any other scale that reading_of() reads
/// Cost: under 0.1 ms an hour line, and 3 ms for the years' own Suns. Test: tests/engine/dial/accuracy_test.cpp,
/// tests/against/accuracy_by_force.py
[[nodiscard]] std::vector<AccuracyLine> accuracy_of(const AccuracyPlan& plan, const MeanYear& year);

/// What reading the dial supports: the hours in one run over which no season's total is over `minutes`.
struct Supported {
    double minutes = 0.0;
    double first_h = 0.0, last_h = 0.0;
    int lines = 0;
};
/// The finest of 1, 2, 3, 4, 5, 6, 8, 10, 15, 20, 30 minutes that two thirds of the lit lines in one run keep to; and,
/// where that is not all of them, the finest that all do.
[[nodiscard]] std::vector<Supported> supported_readings(const std::vector<AccuracyLine>& lines);
/// The same lines without one slip: what they would be if it were proved to be nothing.
[[nodiscard]] std::vector<AccuracyLine> without(std::vector<AccuracyLine> lines, SlipKind kind);

} // namespace dialwright
