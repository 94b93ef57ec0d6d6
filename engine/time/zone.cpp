// SPDX-License-Identifier: MIT
//
// Two things that the system's tables leave to their reader:
// - They flag summer time but do not say by how much the clocks are forward. The amount is the difference to the
//   standard time before it (or after it, at the beginning of the tables).
// - They end with 2037 (with 2086 for two zones whose summer time heeds Ramadan; these then stand still). Later years
//   repeat the rule of that time: a day from March on is looked up on the same date of a year near 2037 in which it
//   falls on the same weekday; January and February, in which no rule changes the clocks, in 2037.
#include "engine/time/zone.hpp"

#include <date/tz.h>

#include <algorithm>
#include <array>
#include <cassert>
#include <cctype>
#include <numeric>
#include <stdexcept>

namespace dialwright {
namespace {

using namespace std::chrono;

constexpr year k_last_table_year{2037};
constexpr Instant k_tables_end = sys_days{(k_last_table_year + years{1}) / January / 1};
constexpr auto k_longest_summer_time = years{10}; // in wars it went on for years
constexpr auto k_endless = years{1000};           // longer is only what lies before or after the tables
constexpr seconds k_most_summer_time = hours{2};  // double summer time, the most that any zone has kept

/// A stretch of time with one offset.
struct Stretch {
    Instant begin;
    Instant end;
    seconds offset{0};
    bool flagged = false; // as summer time
    std::string abbreviation;
    days shift{0}; // later than the stretch of the tables that it repeats
};

date::sys_seconds to_seconds(Instant utc) {
    return date::sys_seconds{floor<seconds>(utc.time_since_epoch())};
}

/// The ends of the tables are given as years beyond what microseconds hold.
Instant to_instant(date::sys_seconds when) {
    constexpr auto k_far = sys_days{year{9999} / January / 1};
    constexpr auto k_long_ago = sys_days{year{-9999} / January / 1};
    return Instant{std::clamp<sys_seconds>(sys_seconds{when.time_since_epoch()}, k_long_ago, k_far)};
}

Stretch in_tables(const date::time_zone* zone, Instant utc) {
    const date::sys_info info = zone->get_info(to_seconds(utc));
    return {to_instant(info.begin), to_instant(info.end), info.offset, info.save != minutes{0}, info.abbrev, days{0}};
}

/// The latest year of the tables whose 1 March is this weekday.
year year_like(weekday first_of_march) {
    constexpr std::array<int, 7> k_years{2037, 2032, 2033, 2034, 2035, 2030, 2036}; // Sunday first
    return year{k_years[first_of_march.c_encoding()]};
}

/// Where a day after 2037 is looked up: from `begin` to `end`, all days are `shift` later than their like in the tables.
struct Repeat {
    Instant begin;
    Instant end;
    days shift{0};
};

Repeat repeat_of(Instant utc) {
    const year_month_day date{floor<days>(utc)};
    const sys_days new_year = date.year() / January / 1, spring = date.year() / March / 1;
    if (date.month() < March)
        return {new_year, spring, new_year - sys_days{k_last_table_year / January / 1}};
    const sys_days like = year_like(weekday{spring}) / March / 1;
    return {spring, sys_days{(date.year() + years{1}) / January / 1}, spring - like};
}

Stretch stretch_at(const date::time_zone* zone, Instant utc) {
    Stretch found = in_tables(zone, utc);
    const Instant last_rule = sys_days{k_last_table_year / January / 1};
    const bool goes_on = found.end - found.begin > k_endless && found.begin >= last_rule && found.begin < k_tables_end;
    if (!goes_on)
        return found;
    if (utc < k_tables_end) {
        found.end = k_tables_end;
        return found;
    }
    const Repeat repeat = repeat_of(utc);
    found = in_tables(zone, utc - repeat.shift);
    found.begin = std::max(found.begin + repeat.shift, repeat.begin);
    found.end = std::min(found.end + repeat.shift, repeat.end);
    found.shift = repeat.shift;
    return found;
}

/// Flagged as summer time, yet lower than what is around it: a winter time in truth, and so standard.
bool is_low_winter(const date::time_zone* zone, const Stretch& stretch) {
    if (!stretch.flagged)
        return false;
    const Stretch before = in_tables(zone, stretch.begin - seconds{1});
    if (before.flagged || before.offset <= stretch.offset)
        return false;
    const Stretch after = in_tables(zone, stretch.end);
    return after.begin <= stretch.begin || after.offset > stretch.offset;
}

/// The standard offset that belongs to a stretch of the tables.
seconds standard_of(const date::time_zone* zone, const Stretch& stretch) {
    if (is_low_winter(zone, stretch))
        return stretch.offset;
    const Stretch before = in_tables(zone, stretch.begin - seconds{1});
    if (!stretch.flagged) {
        const Stretch after = in_tables(zone, stretch.end);
        for (const Stretch& next : {before, after})
            if (next.offset < stretch.offset && is_low_winter(zone, next))
                return next.offset;
        return stretch.offset;
    }
    // The nearest standard time that this can be the summer time of; a zone that changed sides or left its local mean
    // time long ago is further away.
    const auto fits = [&stretch](const Stretch& other) {
        return !other.flagged && other.offset < stretch.offset && stretch.offset - other.offset <= k_most_summer_time;
    };
    // The first and last stretches of the tables reach so far that they end the search.
    for (Stretch earlier = before; stretch.begin - earlier.end < k_longest_summer_time;
         earlier = in_tables(zone, earlier.begin - seconds{1})) {
        if (fits(earlier))
            return earlier.offset;
        if (earlier.end - earlier.begin > k_endless)
            break;
    }
    for (Stretch later = in_tables(zone, stretch.end); later.begin - stretch.end < k_longest_summer_time;
         later = in_tables(zone, later.end)) {
        if (fits(later))
            return later.offset;
        if (later.end - later.begin > k_endless)
            break;
    }
    return stretch.offset - hours{1};
}

std::string in_lower_case(std::string_view text) {
    std::string lower{text};
    for (char& c : lower)
        c = c == ' ' ? '_' : static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
    return lower;
}

/// How many letters to change, add, leave out or swap with their neighbour.
std::size_t edit_distance(std::string_view a, std::string_view b) {
    std::vector<std::size_t> two_above(b.size() + 1), above(b.size() + 1), row(b.size() + 1);
    std::iota(above.begin(), above.end(), std::size_t{0});
    for (std::size_t i = 1; i <= a.size(); ++i) {
        row[0] = i;
        for (std::size_t j = 1; j <= b.size(); ++j) {
            row[j] = std::min({above[j] + 1, row[j - 1] + 1, above[j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1)});
            if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                row[j] = std::min(row[j], two_above[j - 2] + 1);
        }
        std::swap(two_above, above);
        std::swap(above, row);
    }
    return above[b.size()];
}

/// The tables hold, beside the places, the machine's own setting.
bool is_a_place(const std::string& name) {
    return name != "localtime" && name != "posixrules";
}

} // namespace

std::optional<Zone> Zone::find(std::string_view tz_name) {
    const date::tzdb& database = date::get_tzdb();
    const auto found =
        std::lower_bound(database.zones.begin(), database.zones.end(), tz_name,
                         [](const date::time_zone& zone, std::string_view name) { return zone.name() < name; });
    if (found == database.zones.end() || found->name() != tz_name || !is_a_place(found->name()))
        return std::nullopt;
    return Zone{&*found};
}

const std::string& Zone::name() const {
    return zone_->name();
}

ZoneOffset Zone::at(Instant utc) const {
    const Stretch stretch = stretch_at(zone_, utc);
    const Stretch tabled = stretch.shift == days{0} ? stretch : in_tables(zone_, utc - stretch.shift);
    return {stretch.offset, stretch.offset - standard_of(zone_, tabled), stretch.abbreviation};
}

ClockReading Zone::to_clock(Instant utc) const {
    return ClockReading{utc.time_since_epoch() + stretch_at(zone_, utc).offset};
}

LocalReading Zone::to_utc(ClockReading reading) const {
    // A day to either side is out of reach of any one change of the clocks.
    const Instant as_utc{reading.time_since_epoch()};
    const seconds before = stretch_at(zone_, as_utc - days{1}).offset,
                  after = stretch_at(zone_, as_utc + days{1}).offset;
    const Instant by_before = as_utc - before, by_after = as_utc - after;
    const bool before_holds = to_clock(by_before) == reading, after_holds = to_clock(by_after) == reading;
    if (before_holds && after_holds && before != after)
        return {LocalReading::Kind::twice, std::min(by_before, by_after), std::max(by_before, by_after)};
    if (before_holds)
        return {LocalReading::Kind::unique, by_before, by_before};
    if (after_holds)
        return {LocalReading::Kind::unique, by_after, by_after};
    for (const Instant change : changes(as_utc - days{2}, as_utc + days{2}))
        if (to_clock(change) > reading)
            return {LocalReading::Kind::never, change, change};
    assert(false); // a reading is missing only where the clocks were put forward
    return {LocalReading::Kind::never, by_before, by_before};
}

std::vector<Instant> Zone::changes(Instant first, Instant last) const {
    std::vector<Instant> found;
    // From just before `first`, so that a change at `first` itself is seen.
    Stretch now = stretch_at(zone_, first - seconds{1});
    while (now.end < last) {
        const Stretch next = stretch_at(zone_, now.end);
        if (next.offset != now.offset && now.end >= first)
            found.push_back(now.end);
        if (next.end <= now.end)
            break; // the end of the tables
        now = next;
    }
    return found;
}

Angle Zone::meridian(int wanted_year) const {
    // The middle of each month: what most of them say.
    std::array<seconds, 12> standards{};
    for (unsigned m = 1; m <= 12; ++m)
        standards[m - 1] = at(Instant{sys_days{year{wanted_year} / month{m} / 15}}).standard();
    const auto most = std::max_element(standards.begin(), standards.end(), [&standards](seconds a, seconds b) {
        return std::count(standards.begin(), standards.end(), a) < std::count(standards.begin(), standards.end(), b);
    });
    return Angle::hours(static_cast<double>(most->count()) / 3600.0);
}

std::vector<std::string> nearest_zone_names(std::string_view wrong, int n) {
    struct Candidate {
        std::size_t distance;
        std::string_view name;
    };
    const std::string wanted = in_lower_case(wrong);
    std::vector<Candidate> candidates;
    for (const date::time_zone& zone : date::get_tzdb().zones) {
        if (!is_a_place(zone.name()))
            continue;
        const std::string name = in_lower_case(zone.name());
        const std::string city = name.substr(name.rfind('/') == std::string::npos ? 0 : name.rfind('/') + 1);
        candidates.push_back({std::min(edit_distance(wanted, name), edit_distance(wanted, city)), zone.name()});
    }
    std::stable_sort(candidates.begin(), candidates.end(),
                     [](const Candidate& a, const Candidate& b) { return a.distance < b.distance; });
    std::vector<std::string> names;
    for (const Candidate& candidate : candidates) {
        if (static_cast<int>(names.size()) >= n)
            break;
        names.emplace_back(candidate.name);
    }
    return names;
}

} // namespace dialwright
