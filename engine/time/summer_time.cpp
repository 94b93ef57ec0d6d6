// SPDX-License-Identifier: MIT
//
// The rules are read off the changes of the clocks themselves, year by year from the last: as long as a year's changes
// can be said in the same words with those after it, the rule reaches back to it. What the database says in other ways
// ("Sunday on or after the 8th", "at 24:00") comes out as the day that a calendar shows.
#include "engine/time/summer_time.hpp"

#include <algorithm>
#include <optional>
#include <vector>

namespace dialwright {
namespace {

using namespace std::chrono;

constexpr std::size_t k_fewest_years = 3; // two dates may agree by chance

struct Change {
    year_month_day date;      ///< the first on whose noon the clocks have changed
    bool at_midnight = false; ///< or in the evening before
};

struct YearOfClocks {
    std::vector<Change> starts, ends;
    seconds ahead{0}; ///< the most in the year
    seconds standard{0};
    bool standard_moves = false;
};

YearOfClocks clocks_of(const Zone& zone, int wanted) {
    const Instant first{sys_days{year{wanted} / January / 1}}, last{sys_days{year{wanted + 1} / January / 1}};
    YearOfClocks found;
    ZoneOffset before = zone.at(first);
    found.standard = before.standard();
    found.ahead = before.summer_time;
    for (const Instant change : zone.changes(first, last)) {
        const ZoneOffset after = zone.at(change);
        const local_time<microseconds> reading{change.time_since_epoch() + before.from_utc}; // the old clock's
        const auto day = floor<days>(reading);
        const bool evening = reading - day > hours{12};
        const Change one{year_month_day{sys_days{(day + days{evening}).time_since_epoch()}},
                         evening || reading - day < seconds{1}};
        if (after.standard() != before.standard())
            found.standard_moves = true;
        else
            (after.summer_time > before.summer_time ? found.starts : found.ends).push_back(one);
        found.ahead = std::max(found.ahead, after.summer_time);
        before = after;
    }
    return found;
}

weekday weekday_of(const year_month_day& date) {
    return weekday{sys_days{date}};
}

bool is_last(const year_month_day& date) {
    return year_month_day{sys_days{date} + days{7}}.month() != date.month();
}

/// Dates of different years in words that fit them all.
std::optional<YearlyDay> described(const std::vector<year_month_day>& dates) {
    const auto all = [&](const auto& holds) { return std::all_of(dates.begin(), dates.end(), holds); };
    const year_month_day& any = dates.front();
    YearlyDay day;
    day.month = any.month();
    day.weekday = weekday_of(any);
    day.earliest = day.latest = any.month() / any.day();
    for (const year_month_day& date : dates) {
        day.earliest = std::min(day.earliest, date.month() / date.day());
        day.latest = std::max(day.latest, date.month() / date.day());
    }
    if (dates.size() > 1 && day.earliest == day.latest)
        return day;
    if (!all([&](const year_month_day& date) { return date.month() == day.month && weekday_of(date) == day.weekday; }))
        return std::nullopt;
    const auto week = [](const year_month_day& date) { return (unsigned(date.day()) + 6) / 7; };
    day.nth = week(any);
    if (all(is_last))
        day.kind = YearlyDay::Kind::last;
    else if (all([&](const year_month_day& date) { return week(date) == day.nth; }))
        day.kind = YearlyDay::Kind::nth;
    else if (unsigned(day.latest.day()) - unsigned(day.earliest.day()) < 7)
        day.kind = YearlyDay::Kind::between;
    else
        return std::nullopt;
    return day;
}

/// A change at midnight may be told by the day before or the day after: whichever has the simpler words.
std::optional<YearlyDay> described(const std::vector<Change>& changes) {
    std::vector<year_month_day> dates, eves;
    bool midnight = true;
    for (const Change& change : changes) {
        dates.push_back(change.date);
        eves.emplace_back(sys_days{change.date} - days{1});
        midnight = midnight && change.at_midnight;
    }
    const std::optional<YearlyDay> by_day = described(dates);
    if (!midnight || (by_day && by_day->kind != YearlyDay::Kind::between))
        return by_day;
    std::optional<YearlyDay> by_eve = described(eves);
    if (!by_eve || (by_day && by_eve->kind == YearlyDay::Kind::between))
        return by_day;
    by_eve->at_its_end = true;
    return by_eve;
}

} // namespace

SummerTime summer_time_of(const Zone& zone, int first_year, int last_year) {
    const YearOfClocks now = clocks_of(zone, last_year);
    SummerTime summer;
    summer.since = last_year;
    summer.ahead = now.ahead;
    summer.kind = now.ahead == seconds{0} ? SummerTime::Kind::none : SummerTime::Kind::irregular;
    std::vector<Change> starts, ends;
    bool holds = true;
    int regular_since = last_year;
    for (int year = last_year; year >= first_year; --year) {
        const YearOfClocks then = clocks_of(zone, year);
        summer.standard_changes = summer.standard_changes || then.standard_moves || then.standard != now.standard;
        if (!holds)
            continue;
        holds = then.ahead == now.ahead && then.standard == now.standard && !then.standard_moves;
        if (summer.kind == SummerTime::Kind::none) {
            summer.since = holds ? year : summer.since;
            continue;
        }
        holds = holds && then.starts.size() == 1 && then.ends.size() == 1;
        if (!holds)
            continue;
        starts.push_back(then.starts.front());
        ends.push_back(then.ends.front());
        const auto begins = described(starts), finishes = described(ends);
        holds = begins && finishes;
        if (holds) {
            summer.begins = *begins;
            summer.ends = *finishes;
            regular_since = year;
        }
    }
    if (summer.kind == SummerTime::Kind::irregular) {
        const bool regular = std::size_t(last_year - regular_since) + 1 >= k_fewest_years && !starts.empty();
        summer.kind = regular ? SummerTime::Kind::yearly : SummerTime::Kind::irregular;
        summer.since = regular ? regular_since : first_year;
    }
    return summer;
}

year_month_day date_in(const YearlyDay& day, std::chrono::year year) {
    switch (day.kind) {
    case YearlyDay::Kind::last:
        return sys_days{year / day.month / day.weekday[last]};
    case YearlyDay::Kind::nth:
        return sys_days{year / day.month / day.weekday[day.nth]};
    case YearlyDay::Kind::between: {
        const sys_days first{year / day.earliest};
        return first + (day.weekday - std::chrono::weekday{first});
    }
    case YearlyDay::Kind::fixed:
        break;
    }
    return year / day.earliest;
}

} // namespace dialwright
