// SPDX-License-Identifier: MIT
#include "layout/correction/words.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdlib>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr std::array<const char*, 12> k_months{"January", "February", "March",     "April",   "May",      "June",
                                               "July",    "August",   "September", "October", "November", "December"};
constexpr std::array<const char*, 7> k_weekdays{"Sunday",   "Monday", "Tuesday", "Wednesday",
                                                "Thursday", "Friday", "Saturday"};
constexpr std::array<const char*, 5> k_ordinals{"first", "second", "third", "fourth", "fifth"};

} // namespace

const char* month_name(unsigned month) {
    return k_months[month - 1];
}

std::string say_date(std::chrono::month_day date, bool short_month) {
    const std::string month = k_months[unsigned(date.month()) - 1];
    return fmt::format("{} {}", unsigned(date.day()), short_month ? month.substr(0, 3) : month);
}

std::string minutes_figure(double minutes) {
    const long whole = std::labs(std::lround(minutes));
    return whole < 60 ? fmt::format("{}", whole) : fmt::format("{} h {:02}", whole / 60, whole % 60);
}

std::string add_or_take(double minutes) {
    const long whole = std::lround(minutes);
    return whole == 0 ? "0" : (whole > 0 ? "add " : "take ") + minutes_figure(minutes);
}

std::string add_or_take_exactly(double minutes) {
    const long seconds = std::lround(minutes * 60), size = std::labs(seconds);
    if (seconds == 0)
        return "nothing";
    return fmt::format("{} {} min {:02} s", seconds > 0 ? "add" : "take", size / 60, size % 60);
}

std::string say_day(const YearlyDay& day) {
    const std::string end = day.at_its_end ? "the end of " : "", month = k_months[unsigned(day.month) - 1];
    const char* weekday = k_weekdays[day.weekday.c_encoding()];
    switch (day.kind) {
    case YearlyDay::Kind::last:
        return fmt::format("{}the last {} of {}", end, weekday, month);
    case YearlyDay::Kind::nth:
        return fmt::format("{}the {} {} of {}", end, k_ordinals[day.nth - 1], weekday, month);
    case YearlyDay::Kind::between:
        return fmt::format("{}the {} from {} to {} {}", end, weekday, unsigned(day.earliest.day()),
                           unsigned(day.latest.day()), month);
    case YearlyDay::Kind::fixed:
        break;
    }
    return end + say_date(day.earliest);
}

std::string say_ahead(std::chrono::seconds ahead) {
    if (ahead == std::chrono::hours{1})
        return "one hour";
    if (ahead == std::chrono::hours{2})
        return "two hours";
    return fmt::format("{} minutes", std::lround(double(ahead.count()) / 60));
}

std::string heading_of(const Correction& correction, double least_min) {
    const bool hours = std::max(std::abs(correction.least_min()), std::abs(correction.most_min())) >= 59.5;
    const char* what = hours ? "Time" : "Minutes";
    if (!is_ever_taken(correction, least_min))
        return fmt::format("{} to {}", what, k_add_words);
    if (!is_ever_added(correction, least_min))
        return fmt::format("{} to {}", what, k_take_words);
    return fmt::format("{} from dial to clock", what);
}

std::string say_rule(const Correction& correction, double least_min) {
    if (!correction.is_needed())
        return "The dial shows clock time: nothing is added to it, and nothing taken from it.";
    if (!is_ever_taken(correction, least_min))
        return "The dial’s time, with the minutes of the day added to it, is clock time.";
    if (!is_ever_added(correction, least_min))
        return "The dial’s time, with the minutes of the day taken from it, is clock time.";
    return "The dial’s time, with the minutes of the day added to it or taken from it, is clock time.";
}

std::string say_summer(const SummerTime& summer, bool summer_numerals) {
    if (summer.kind == SummerTime::Kind::none)
        return "";
    const std::string hour = say_ahead(summer.ahead);
    const std::string act =
        summer_numerals ? "read the summer numerals" : fmt::format("also add {} for summer time", hour);
    if (summer.kind == SummerTime::Kind::irregular)
        return fmt::format("While clocks are on summer time, {}.",
                           summer_numerals ? act : fmt::format("also add {}", hour));
    return fmt::format("From {} to {}, {}.", say_day(summer.begins), say_day(summer.ends), act);
}

std::vector<std::string> say_limits(const Correction& correction) {
    const SummerTime& summer = correction.summer();
    const int first = correction.year().first_year(), last = correction.year().last_year();
    std::vector<std::string> limits;
    if (summer.standard_changes)
        limits.push_back(fmt::format("The zone's standard time changes between {} and {}: the correction is right for "
                                     "that of {} alone.",
                                     first, last, first));
    if (summer.kind == SummerTime::Kind::irregular)
        limits.push_back(
            "Summer time begins and ends on days that follow no one rule in these years: heed the clocks.");
    if (summer.kind == SummerTime::Kind::yearly && summer.since > first)
        limits.push_back(
            fmt::format("The days of summer time are those since {}; before, they were others.", summer.since));
    if (summer.kind == SummerTime::Kind::none && summer.since > first)
        limits.push_back(fmt::format("The zone keeps no summer time since {}; before, it did.", summer.since));
    return limits;
}

} // namespace dialwright::layout
