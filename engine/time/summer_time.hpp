// SPDX-License-Identifier: MIT
#pragma once

#include "engine/time/zone.hpp"

#include <chrono>

namespace dialwright {

/// A day that comes once a year, as people say it.
struct YearlyDay {
    enum class Kind {
        last,    ///< the last Sunday of March
        nth,     ///< the second Sunday of March
        between, ///< a Sunday from the 2nd to the 8th of a month: `earliest` and `latest` are those seen
        fixed    ///< the same date always, `earliest`
    };
    Kind kind = Kind::fixed;
    std::chrono::month month{1};
    std::chrono::weekday weekday{0};
    unsigned nth = 0;
    std::chrono::month_day earliest{}, latest{};
    bool at_its_end = false; ///< the clocks change in its evening or the midnight after, else before its noon
};

/// How a zone keeps summer time over a span of years, by its own changes of the clocks.
struct SummerTime {
    enum class Kind {
        none,     ///< not kept, in the last of the years at least
        yearly,   ///< from one yearly day to another
        irregular ///< kept, on days that follow no such rule
    };
    Kind kind = Kind::none;
    std::chrono::seconds ahead{0}; ///< of standard time; > 0 unless there is none
    YearlyDay begins, ends;        ///< of `yearly`; in the south the beginning is the later in the year
    /// The first of the years from which on all that is said here holds: the first of the span, or a later one where
    /// the rules change within it.
    int since = 0;
    /// The zone's standard time is not the same in all years of the span.
    bool standard_changes = false;
};

/// @param first_year, last_year  both included; last not before first
/// Accuracy: the days are those of the system's tz database, and every year from `since` on is tried against them.
/// Standard time is the smaller offset of the year, as in Zone. Tests: tests/engine/time/summer_time_test.cpp
[[nodiscard]] SummerTime summer_time_of(const Zone& zone, int first_year, int last_year);

/// The date on which the day falls; of `between`, the one such weekday of that stretch.
[[nodiscard]] std::chrono::year_month_day date_in(const YearlyDay& day, std::chrono::year year);

} // namespace dialwright
