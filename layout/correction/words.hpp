// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/correction.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// What a correction plate says in words. It has no signs: "+" says neither of what nor to what.

inline constexpr const char* k_add_words = "add to the dial";
inline constexpr const char* k_take_words = "take from the dial";

/// The whole minutes, without a sign: "7", "1 h 05".
[[nodiscard]] std::string minutes_figure(double minutes);
/// "add 7", "take 16", "0": whole minutes.
[[nodiscard]] std::string add_or_take(double minutes);
/// "add 7 min 20 s", "take 16 min 25 s".
[[nodiscard]] std::string add_or_take_exactly(double minutes);

/// "the last Sunday of March", "the end of the first Saturday of April", "the Friday from 23 to 29 March".
[[nodiscard]] std::string say_day(const YearlyDay& day);
/// "one hour", "two hours", "30 minutes".
[[nodiscard]] std::string say_ahead(std::chrono::seconds ahead);
/// "14 June"; "14 Jun" where it has to be short.
[[nodiscard]] std::string say_date(std::chrono::month_day date, bool short_month = false);
[[nodiscard]] const char* month_name(unsigned month); ///< 1 to 12: "January"

/// Whether on any day minutes are added, or taken: by more than `least_min`, under which a reading in whole minutes shows
/// nothing.
[[nodiscard]] inline bool is_ever_added(const Correction& correction, double least_min = 0.5) {
    return correction.most_min() >= least_min;
}
[[nodiscard]] inline bool is_ever_taken(const Correction& correction, double least_min = 0.5) {
    return correction.least_min() <= -least_min;
}

/// "Minutes from dial to clock", "Minutes to add to the dial".
[[nodiscard]] std::string heading_of(const Correction& correction, double least_min = 0.5);
/// The sentence that says what becomes of the minutes: "The dial’s time, with the minutes of the day added or taken away, is clock time."
[[nodiscard]] std::string say_rule(const Correction& correction, double least_min = 0.5);
/// What to do while clocks are on summer time, in one sentence; empty where the zone keeps none.
/// @param summer_numerals  the dial carries a row of numerals for it
[[nodiscard]] std::string say_summer(const SummerTime& summer, bool summer_numerals);
/// What the words of the plate leave out: rules that changed within the years, or the zone's own time that did.
/// @param last_year  of the design
[[nodiscard]] std::vector<std::string> say_limits(const Correction& correction);

} // namespace dialwright::layout
