// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/time/instant.hpp"

#include <array>
#include <chrono>
#include <optional>

namespace dialwright {

/// The year that a dial is cut for: for each calendar date and hour UT, the mean of that date's own declination and
/// equation of time over all years of a span of whole leap cycles. Derivation: mean_year.cpp.
///
/// Days are counted on the mean calendar: 0 is 1 January 0h UT, 59 is the end of 28 February; 1 March begins at 59.25,
/// after a gap for the share of leap years. All functions of a day are periodic and smooth, with a year of 365.25 days.
class MeanYear {
  public:
    static constexpr double k_leap_share = 0.25; ///< of a day, between 28 February and 1 March
    static constexpr double k_length_days = 365.0 + k_leap_share;

    /// @throws std::invalid_argument  not a whole number of four-year cycles, or not within 1901 to 2099
    ///         (1900 and 2100 have no leap day)
    /// Cost: 13 places of the Sun for each year of the span: 14 ms for twenty years.
    MeanYear(int first_year, int last_year);

    [[nodiscard]] int first_year() const { return first_year_; }
    [[nodiscard]] int last_year() const { return last_year_; }

    [[nodiscard]] double length_days() const { return k_length_days; }

    struct Season {
        Angle declination;
        Angle equation_of_time; ///< apparent − mean: positive when a dial is fast of the mean Sun
    };
    /// @param day  days on the mean calendar; any real number, taken round the year
    /// Accuracy against the mean of the dates taken one by one, twenty years: 2″ and 0.15 s (four years: 3″ and 0.4 s).
    /// Test: tests/engine/sun/mean_year_test.cpp
    [[nodiscard]] Season at(double day) const;
    /// How fast declination and equation of time change, per day.
    [[nodiscard]] Season rate_at(double day) const;

    /// The day of a date at an hour UT. 29 February, noon, stands midway between its neighbours; the mean over the leap
    /// years alone is up to 21″ in declination away, as they need not lie in the middle of the span.
    /// @param date  a valid month and day
    [[nodiscard]] double day_of(std::chrono::month_day date, double hour_ut = 12.0) const;
    /// The day of an instant, whatever its year.
    [[nodiscard]] double day_of(Instant at) const;
    /// The date on which a day falls; the quarter of a day between 28 February and 1 March is 29 February.
    [[nodiscard]] std::chrono::month_day date_of(double day) const;

    /// The greatest declination of the year: half the way from the December to the June solstice.
    [[nodiscard]] Angle obliquity() const { return obliquity_; }

    [[nodiscard]] double march_equinox_day() const { return march_equinox_day_; }
    [[nodiscard]] double june_solstice_day() const { return june_solstice_day_; }
    [[nodiscard]] double september_equinox_day() const { return september_equinox_day_; }
    [[nodiscard]] double december_solstice_day() const { return december_solstice_day_; }

    /// The day on which the Sun stands at a declination, on its way north (December to June) or south.
    /// Nothing if it never does. Up to 2″ beyond an extreme counts as the solstice.
    [[nodiscard]] std::optional<double> day_of_declination(Angle declination, bool sun_going_north) const;

  private:
    static constexpr int k_harmonics = 6;
    struct Harmonic { // radians
        double declination_cos = 0.0, declination_sin = 0.0;
        double equation_cos = 0.0, equation_sin = 0.0;
    };

    [[nodiscard]] double crossing(Angle declination, double before, double after) const;
    void find_quarters();

    int first_year_;
    int last_year_;
    std::array<Harmonic, k_harmonics + 1> harmonics_{};
    Angle obliquity_;
    double march_equinox_day_ = 0.0, june_solstice_day_ = 0.0, september_equinox_day_ = 0.0,
           december_solstice_day_ = 0.0;
};

} // namespace dialwright
