// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/dial_plan.hpp"
#include "engine/time/summer_time.hpp"

#include <chrono>
#include <vector>

namespace dialwright {

/// Whether a dial's reading becomes clock time by adding minutes that depend on the date alone.
[[nodiscard]] constexpr bool has_correction(HourTime time) {
    return time == HourTime::sun || time == HourTime::zone || time == HourTime::clock;
}

/// From the dial to the zone's clock: how many minutes to add to the dial's reading, for each date of the mean year.
///
///     sun     (λz − λ) / 15° − E       zone     −E       clock     0
///
/// Days run on the place's own calendar: 0 is the start of 1 January, 0.5 its noon by the mean Sun, 365.25 the year's
/// end, and 59 to 59.25 the share of 29 February (engine/sun/mean_year.hpp). Summer time is apart: what is added is
/// for standard time.
class Correction {
  public:
    /// @param time           one that has a correction (asserted)
    /// @param zone_meridian  of the zone's standard time; not brought within ±180°, since its calendar counts
    Correction(MeanYear year, HourTime time, Angle longitude, Angle zone_meridian, SummerTime summer);

    [[nodiscard]] HourTime time() const { return time_; }
    [[nodiscard]] const MeanYear& year() const { return year_; }
    [[nodiscard]] const SummerTime& summer() const { return summer_; }
    /// False for a dial of clock time: nothing is ever added.
    [[nodiscard]] bool is_needed() const { return time_ != HourTime::clock; }
    /// The longitude's part of the minutes: the same every day.
    [[nodiscard]] double longitude_min() const { return longitude_min_; }

    /// Minutes to add to the dial for the zone's standard time; negative where they are taken from it. Accuracy: as
    /// MeanYear::at. Tests: tests/engine/dial/correction_test.cpp, tests/against/ephem_correction.py
    [[nodiscard]] double add_min(double day) const;
    [[nodiscard]] double add_min(std::chrono::month_day date) const { return add_min(noon_of(date)); }
    [[nodiscard]] double rate_min(double day) const; ///< how fast it changes, minutes a day

    /// The middle of a date.
    [[nodiscard]] double noon_of(std::chrono::month_day date) const { return year_.day_of(date, 12.0); }
    /// The start of a month, 1 to 13 (the year's end).
    [[nodiscard]] double start_of_month(unsigned month) const;

    /// The least and the most of the year.
    [[nodiscard]] double least_min() const { return least_min_; }
    [[nodiscard]] double most_min() const { return most_min_; }
    /// The days of the year on which it turns from growing to shrinking or back, in order.
    [[nodiscard]] const std::vector<double>& turns() const { return turns_; }
    /// The days on which it passes through a value, in order.
    [[nodiscard]] std::vector<double> days_of(double minutes) const;

    /// By how much a single year of the span differs from the mean, at most; and when.
    struct Spread {
        double seconds = 0.0;
        std::chrono::month_day date{};
    };
    /// Takes the Sun of every year on the date on which the mean changes fastest, where single years stray farthest: 40 µs
    /// each.
    [[nodiscard]] Spread spread() const;

  private:
    [[nodiscard]] double mean_day(double day) const { return day + noon_shift_days_; }

    MeanYear year_;
    HourTime time_;
    SummerTime summer_;
    double longitude_min_ = 0.0;
    double noon_shift_days_ = 0.0; ///< from the place's calendar to that of UT
    double least_min_ = 0.0, most_min_ = 0.0;
    std::vector<double> turns_;
};

/// Every date of the calendar, 29 February too.
[[nodiscard]] std::vector<std::chrono::month_day> dates_of_year();

} // namespace dialwright
