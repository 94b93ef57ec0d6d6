// SPDX-License-Identifier: MIT
#pragma once

#include "engine/fit/least_squares.hpp"
#include "engine/surface/plate_frame.hpp"
#include "engine/survey/found.hpp"
#include "engine/survey/known.hpp"
#include "engine/survey/real_sun.hpp"

#include <optional>
#include <vector>

namespace dialwright {

/// Where the shadow of a peg's tip fell on a wall, or on a board held flat against it: from the foot of the tip, to the
/// right as the reader faces the wall, and down along the board's plumb line.
struct PegShadow {
    Instant at;
    double right_mm = 0.0, down_mm = 0.0;
};

/// The Sun's middle stood in the wall's own plane: it began or ceased to graze the wall.
struct Grazing {
    Instant at;
    bool begins = true; ///< the Sun came round to the wall's face; else it left it
    Angle give;         ///< of the moment's judging, as an angle between Sun and wall (95 %)
};

/// All that was measured of a wall.
struct WallReadings {
    Site site;
    double peg_mm = 100.0;     ///< the tip above the board; > 0
    double peg_give_mm = 0.5;  ///< ± of that
    double foot_give_mm = 0.5; ///< ± of the place under the tip from which offsets are measured, either way
    Angle level_give = Angle::degrees(0.3); ///< ± of the board's plumb line
    double clock_give_s = 5.0;              ///< ± of the clock
    std::vector<PegShadow> shadows;
    std::vector<Grazing> grazings;
    std::optional<Known> bearing_deg; ///< from true north through east, by a compass and its variation
    std::optional<Known> lean_deg;    ///< by plumb line and rule, back positive
};

/// One way in which the readings hang together.
struct WallAnswer {
    /// What has to be wrong for it: nothing beyond its ±, the clock, the board's plumb line, or one figure beside the
    /// shadows, which then was left out.
    enum class Fault { none, clock, level, bearing, lean, grazing };
    Fault fault = Fault::none;
    std::size_t grazing = 0;     ///< which one, of Fault::grazing
    double figure_off_deg = 0.0; ///< that figure, less what the rest say of it
    Found facing_deg, lean_deg;
    Found clock_s;           ///< the clock was slow by this
    Found level_deg;         ///< the board's top was turned to the right by this, as its reader sees it
    double scatter_mm = 0.0; ///< of the tip's shadow either way, at the foot of the peg; 0 where nothing checks it
    std::vector<double> off_right_mm, off_down_mm; ///< measured less computed, a figure a shadow
    std::vector<bool> stray;                       ///< left out, a flag a shadow
};

/// What one more reading would do.
struct NextReading {
    Instant at;
    double facing_range_deg = 0.0; ///< what would be left of the facing's ±
};

struct WallSurvey {
    /// Offsets that would fit far better with a sign or two changed.
    enum class Swap { none, left_for_right, up_for_down };
    std::vector<WallAnswer> answers; ///< the likeliest first; more than one where the readings cannot tell them apart
    bool checked = false;            ///< readings enough for their scatter to be known
    bool too_scattered = false;      ///< the readings fit no wall
    Swap swap = Swap::none;
    Angle sun_span;            ///< between the two Suns that stood farthest apart
    double clock_told_s = 0.0; ///< a wrong clock shows (by shadows alone) from about this on
    double level_told_deg = 0.0;
    std::optional<NextReading> next; ///< the best time, on the day of the last reading, for one more shadow
};

/// Fits facing and lean, and beside them the clock, the board's plumb line, the peg's length and foot as far as their ± go.
/// A wrong clock and a board out of plumb turn the readings alike about the pole; only a measured lean or a second wall can
/// part them. A lean, a bearing or a grazing moment that the rest can't agree with is an answer of its own, without it.
/// @param readings  at least one of its kinds; every instant with the Sun up
/// Accuracy: the stated ranges hold the truth in 92 to 98 % of simulated walls. Test: tests/against/ephem_surveys.py
[[nodiscard]] WallSurvey survey_wall(const WallReadings& readings);

} // namespace dialwright
