// SPDX-License-Identifier: MIT
#include "cli/readings/clock_text.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/scanner.hpp"
#include "engine/sun/apparent_sun.hpp"

#include <fmt/format.h>

#include <cctype>
#include <cmath>

namespace dialwright::cli {
namespace {

using namespace std::chrono;

constexpr const char* k_hint = "write it as in 2027-05-03 10:12:30 or 3 May 2027 10:12";

/// A day at the scanner's place; nothing where none starts there.
Read<std::optional<year_month_day>> scan_day(Scanner& scan, std::string_view text) {
    std::string day_and_month;
    double year_number = 0;
    const bool iso = scan.number_next() && scan.sign_next("-", 1) && scan.number_next(2);
    if (iso) {
        year_number = scan.take().number;
        scan.take();
        const Scrap month = scan.take();
        if (!scan.take_sign("-") || !scan.number_next())
            return Trouble{in_quotes(text) + " has no whole day in it", k_hint};
        day_and_month = month.text + "-" + scan.take().text;
    } else {
        Scanner ahead = scan;
        if (!ahead.number_next())
            return std::optional<year_month_day>{};
        const std::string number = ahead.take().text;
        for (const char* ending : {"st", "nd", "rd", "th"})
            ahead.take_word(ending);
        if (!ahead.word_next() || ahead.rest_word() == "am" || ahead.rest_word() == "pm")
            return std::optional<year_month_day>{};
        day_and_month = number + " " + ahead.take().text;
        if (!ahead.number_next())
            return Trouble{in_quotes(text) + " does not say the year", k_hint};
        year_number = ahead.take().number;
        scan = ahead;
    }
    const Read<month_day> found = day_of_year(day_and_month);
    if (!found)
        return found.trouble();
    if (!(year_number >= k_first_sun_year && year_number <= k_last_sun_year) || year_number != std::floor(year_number))
        return Trouble{
            fmt::format("{}: the year is outside {} to {}", in_quotes(text), k_first_sun_year, k_last_sun_year),
            k_hint};
    const year_month_day day{year{int(year_number)}, found->month(), found->day()};
    if (!day.ok())
        return Trouble{in_quotes(text) + ": that year has no such day", k_hint};
    return std::optional{day};
}

/// Seconds since midnight at the scanner's place.
Read<double> scan_time(Scanner& scan, std::string_view text) {
    const Trouble none{in_quotes(text) + " has no time of the clock in it", k_hint};
    if (!scan.number_next())
        return none;
    const Scrap hour = scan.take();
    double minute = 0, second = 0;
    const bool minutes_given = scan.take_sign(":");
    if (minutes_given) {
        if (!scan.number_next())
            return none;
        minute = scan.take().number;
        if (scan.take_sign(":")) {
            if (!scan.number_next())
                return none;
            second = scan.take().number;
        }
    }
    double hours = hour.number;
    const bool morning = scan.take_word("am"), evening = !morning && scan.take_word("pm");
    if (!minutes_given && !morning && !evening)
        return none;
    if ((morning || evening) && (hours < 1 || hours > 12))
        return Trouble{in_quotes(text) + " has an hour that clocks of twelve hours don't show", k_hint};
    if (morning || evening)
        hours = (hours == 12 ? 0 : hours) + (evening ? 12 : 0);
    if (!hour.whole || hours > 23 || minute >= 60 || minute != std::floor(minute) || second >= 60)
        return Trouble{in_quotes(text) + " is no time that a clock shows", "give 0:00:00 to 23:59:59"};
    return hours * 3600 + minute * 60 + second;
}

std::string lower(std::string text) {
    for (char& c : text)
        c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
    return text;
}

Instant utc_of(ClockReading reading, double ahead_s) {
    return Instant{reading.time_since_epoch()} - round<microseconds>(duration<double>(ahead_s));
}

/// By the zone's own rules; `letters`, such as "bst", may be empty.
Read<Instant> in_zone(std::string_view text, ClockReading reading, const std::string& letters, const Zone& zone) {
    const LocalReading found = zone.to_utc(reading);
    if (found.kind == LocalReading::Kind::never)
        return Trouble{in_quotes(text) + ": the clocks of " + zone.name() + " went forward over that time",
                       "check the time, or write it in UTC with Z after it"};
    const ZoneOffset first = zone.at(found.first), second = zone.at(found.second);
    if (letters.empty()) {
        if (found.kind == LocalReading::Kind::unique)
            return found.first;
        return Trouble{
            fmt::format("{}: the clocks went back that night and showed this time twice", in_quotes(text)),
            fmt::format("write {} or {} after it, or give it in UTC with Z", first.abbreviation, second.abbreviation)};
    }
    if (lower(first.abbreviation) == letters)
        return found.first;
    if (lower(second.abbreviation) == letters)
        return found.second;
    if (letters == "gmt")
        return utc_of(reading, 0);
    return Trouble{fmt::format("{}: the clocks of {} showed {} then", in_quotes(text), zone.name(), first.abbreviation),
                   "leave the letters out, or give the time in UTC with Z after it"};
}

} // namespace

Read<Instant> clock_instant(std::string_view text, std::optional<year_month_day> day, const Zone& zone) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    const auto own_day = scan_day(scan, text);
    if (!own_day)
        return own_day.trouble();
    if (*own_day)
        day = **own_day;
    if (!day)
        return Trouble{in_quotes(text) + " does not say the day",
                       std::string{k_hint} + ", or give \"day:\" at the top"};
    scan.take_word("t");
    const Read<double> seconds = scan_time(scan, text);
    if (!seconds)
        return seconds.trouble();
    const ClockReading reading{local_days{*day} + round<microseconds>(duration<double>(*seconds))};
    if (scan.at_end())
        return in_zone(text, reading, "", zone);
    if (scan.take_word("z") || scan.take_word("utc")) {
        if (scan.at_end())
            return utc_of(reading, 0);
    } else if (scan.word_next()) {
        const std::string letters = scan.take().text;
        if (scan.at_end())
            return in_zone(text, reading, letters, zone);
    } else if (const bool west = scan.take_sign("-"); west || scan.take_sign("+")) {
        if (scan.number_next()) {
            double ahead_s = scan.take().number * 3600;
            if (scan.take_sign(":") && scan.number_next())
                ahead_s += scan.take().number * 60;
            if (scan.at_end() && ahead_s <= 15 * 3600)
                return utc_of(reading, west ? -ahead_s : ahead_s);
        }
    }
    return Trouble{in_quotes(text) + " goes on after the time", k_hint};
}

} // namespace dialwright::cli
