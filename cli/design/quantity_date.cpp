// SPDX-License-Identifier: MIT
#include "cli/design/nearest.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/quantity.hpp"
#include "cli/design/scanner.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

namespace dialwright::cli {

namespace {

constexpr std::array<std::string_view, 12> k_months = {"January",   "February", "March",    "April",
                                                       "May",       "June",     "July",     "August",
                                                       "September", "October",  "November", "December"};
constexpr const char* k_day_hint = "write it as in 14 June";
constexpr const char* k_hour_hint = "write it as in 5:30 or 5 pm";
constexpr int k_first_year = 1901, k_last_year = 2099;

bool same_letters(std::string_view lower, std::string_view name) {
    return lower.size() <= name.size() && std::equal(lower.begin(), lower.end(), name.begin(), [](char a, char b) {
               return a == (b >= 'A' && b <= 'Z' ? b - 'A' + 'a' : b);
           });
}

/// 1 to 12 for a month's name or its first letters (three at least); 0 for none.
unsigned month_named(std::string_view word) {
    for (unsigned i = 0; i < k_months.size(); ++i)
        if (word.size() >= 3 && same_letters(word, k_months[i]))
            return i + 1;
    return 0;
}

Read<std::chrono::month_day> checked_day(double month, double day, std::string_view text) {
    using namespace std::chrono;
    if (month < 1.0 || month > 12.0)
        return Trouble{fmt::format("{}: there is no month {}", in_quotes(text), month), k_day_hint};
    const std::string_view name = k_months[static_cast<std::size_t>(month) - 1];
    const std::chrono::month in{static_cast<unsigned>(month)};
    // 2024 has a 29 February.
    const auto last = static_cast<unsigned>(year_month_day_last{year{2024}, month_day_last{in}}.day());
    if (day < 1.0 || day > last)
        return Trouble{fmt::format("{}: {} has {} days", in_quotes(text), name, last), k_day_hint};
    return month_day{in, std::chrono::day{static_cast<unsigned>(day)}};
}

/// Takes the "st", "nd", "rd", "th" or full stop after the number of a day.
void take_ordinal(Scanner& scan) {
    for (const std::string_view ending : {"st", "nd", "rd", "th"})
        if (scan.take_word(ending))
            return;
    scan.take_sign(".");
}

Read<std::chrono::month_day> day_with_name(Scanner& scan, std::string_view text) {
    double day = 0.0;
    bool whole = false;
    const auto take_day = [&] {
        const Scrap number = scan.take();
        day = number.number;
        whole = number.whole;
        take_ordinal(scan);
    };
    if (scan.number_next())
        take_day();
    const std::string word{scan.rest_word()};
    const bool named = scan.word_next();
    if (named)
        scan.take();
    scan.take_sign(".");
    if (day == 0.0 && !whole && scan.number_next())
        take_day();
    if (named && month_named(word) == 0) {
        const std::string_view meant = nearest(word, k_months);
        return Trouble{in_quotes(text) + ": " + in_quotes(word) + " is not a month",
                       meant.empty() ? k_day_hint : fmt::format("did you mean {}?", meant)};
    }
    if (!named || !whole)
        return Trouble{in_quotes(text) + " is not a day of the year", k_day_hint};
    if (scan.number_next())
        return Trouble{in_quotes(text) + " goes on after the day", "give the day without its year, as in 14 June"};
    if (!scan.at_end())
        return Trouble{in_quotes(text) + " is not a day of the year", k_day_hint};
    return checked_day(month_named(word), day, text);
}

/// Whole leap cycles, as many and as near as may be to the years asked for.
Years good_years_near(int first, int last) {
    const int most = (k_last_year - k_first_year + 1) / 4;
    const int cycles = std::clamp(static_cast<int>(std::lround((last - first + 1) / 4.0)), 1, most);
    const int start = std::clamp(first, k_first_year, k_last_year - 4 * cycles + 1);
    return {start, start + 4 * cycles - 1};
}

} // namespace

Read<std::chrono::month_day> day_of_year(std::string_view text) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (!(scan.number_next() && scan.sign_next("-", 1) && scan.number_next(2)))
        return day_with_name(scan, text);
    const Scrap month = scan.take();
    scan.take();
    const Scrap day = scan.take();
    if (!scan.at_end() && scan.sign_next("-"))
        return Trouble{in_quotes(text) + " is a day of one year",
                       "give the day without its year, as in 14 June or 06-14"};
    if (!scan.at_end() || !month.whole || !day.whole)
        return Trouble{in_quotes(text) + " is not a day of the year", k_day_hint};
    return checked_day(month.number, day.number, text);
}

namespace {

constexpr const char* k_date_hint = "write it as in 2027-06-14 or 14 June 2027";

/// "2027-06-14": the year's own day, where the scanner stands before the year.
Read<std::chrono::year_month_day> date_of_figures(Scanner& scan, std::string_view text) {
    using namespace std::chrono;
    const Scrap year_read = scan.take();
    scan.take_sign("-");
    if (!scan.number_next())
        return Trouble{in_quotes(text) + " is not a date", k_date_hint};
    const Scrap month_read = scan.take();
    if (!scan.take_sign("-") || !scan.number_next())
        return Trouble{in_quotes(text) + " is not a date", k_date_hint};
    const Scrap day_read = scan.take();
    if (!scan.at_end() || !year_read.whole || !month_read.whole || !day_read.whole || year_read.number > 9999)
        return Trouble{in_quotes(text) + " is not a date", k_date_hint};
    const Read<month_day> in_year = checked_day(month_read.number, day_read.number, text);
    if (!in_year)
        return Trouble{in_year.trouble().message, k_date_hint};
    return year_month_day{year{static_cast<int>(year_read.number)}, in_year->month(), in_year->day()};
}

/// "14 June 2027": the year stands last.
Read<std::chrono::year_month_day> date_of_words(std::string_view text) {
    using namespace std::chrono;
    const std::size_t end = text.find_last_not_of(" \t");
    const std::size_t gap = end == std::string_view::npos ? end : text.find_last_of(" \t", end);
    const std::string_view last = gap == std::string_view::npos ? text : text.substr(gap + 1, end - gap);
    const Read<int> in = whole_number(last);
    if (gap == std::string_view::npos || !in || *in < 100) {
        const bool day_alone = static_cast<bool>(day_of_year(text));
        return Trouble{in_quotes(text) + (day_alone ? " has no year" : " is not a date"), k_date_hint};
    }
    const Read<month_day> in_year = day_of_year(text.substr(0, gap));
    if (!in_year)
        return Trouble{in_year.trouble().message, k_date_hint};
    return year_month_day{year{*in}, in_year->month(), in_year->day()};
}

} // namespace

Read<std::chrono::year_month_day> calendar_date(std::string_view text) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    const bool figures = scan.number_next() && scan.sign_next("-", 1);
    const Read<std::chrono::year_month_day> date = figures ? date_of_figures(scan, text) : date_of_words(text);
    if (!date)
        return date;
    const int in = static_cast<int>(date->year());
    if (in < k_first_year || in > k_last_year)
        return Trouble{fmt::format("{} is outside {} to {}", in_quotes(text), k_first_year, k_last_year), k_date_hint};
    if (!date->ok())
        return Trouble{fmt::format("{}: {} has no 29 February", in_quotes(text), in), "give 28 February or 1 March"};
    return date;
}

Read<double> hour_of_day(std::string_view text) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (scan.take_word("noon") && scan.at_end())
        return 12.0;
    if (!scan.number_next())
        return Trouble{in_quotes(text) + " is not an hour", k_hour_hint};
    const Scrap hour = scan.take();
    double part_min = 0.0;
    bool whole = hour.whole;
    if (scan.take_sign(":")) {
        if (!scan.number_next())
            return Trouble{in_quotes(text) + " has no minutes after its colon", k_hour_hint};
        const Scrap minute = scan.take();
        whole = whole && minute.whole && minute.text.size() == 2;
        part_min = minute.number;
    }
    if (!whole)
        return Trouble{in_quotes(text) + " is not an hour with its minutes", k_hour_hint};
    if (part_min >= 60.0)
        return Trouble{in_quotes(text) + " has more than 59 minutes", k_hour_hint};
    double hours = hour.number;
    const bool morning = scan.take_word("am");
    if (morning || scan.take_word("pm")) {
        if (hours < 1.0 || hours > 12.0)
            return Trouble{in_quotes(text) + " has an hour that clocks of twelve hours don't show", k_hour_hint};
        hours = (hours == 12.0 ? 0.0 : hours) + (morning ? 0.0 : 12.0);
    }
    hours += part_min / 60.0;
    if (!scan.at_end())
        return Trouble{in_quotes(text) + " goes on after the hour with " + in_quotes(scan.rest_word()), k_hour_hint};
    if (hours > 24.0)
        return Trouble{in_quotes(text) + " is after the end of the day", "give 0:00 to 24:00"};
    return hours;
}

Read<double> hour_on(HourTime time, std::string_view text) {
    std::string_view counted;
    switch (time) {
    case HourTime::sun:
    case HourTime::zone:
    case HourTime::clock:
        return hour_of_day(text);
    case HourTime::since_sunrise:
        counted = "hours since sunrise";
        break;
    case HourTime::since_sunset:
        counted = "hours since sunset";
        break;
    case HourTime::to_sunset:
        counted = "the hours that are left";
        break;
    case HourTime::unequal:
        counted = "unequal hours";
        break;
    }
    const int last = time == HourTime::unequal ? 12 : 24;
    const std::string hint = fmt::format("count {} from 0 to {}", counted, last);
    const Read<double> hours = hour_of_day(text);
    if (!hours)
        return Trouble{hours.trouble().message, hint};
    // Only am, pm and noon end in a letter.
    if (const char end = text[text.find_last_not_of(" \t\n")]; end < '0' || end > '9')
        return Trouble{in_quotes(text) + " is an hour of the clock", hint};
    if (*hours > last)
        return Trouble{fmt::format("{} is over {}", in_quotes(text), last), hint};
    return hours;
}

Read<Years> years(std::string_view text) {
    const std::string hint = "write it as in 2027 to 2046";
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    const Trouble unreadable{in_quotes(text) + " is not a range of years", hint};
    if (!scan.number_next())
        return unreadable;
    const Scrap first = scan.take();
    const bool joined = scan.take_word("to") || scan.take_sign("-");
    if (!joined && scan.at_end() && first.whole && first.number < 9999.0) {
        const Years good = good_years_near(static_cast<int>(first.number), static_cast<int>(first.number) + 19);
        return Trouble{in_quotes(text) + " is one year; the Sun comes back to its place in four",
                       fmt::format("write {} to {}", good.first, good.last)};
    }
    if (!joined || !scan.number_next())
        return unreadable;
    const Scrap last = scan.take();
    if (!scan.at_end() || !first.whole || !last.whole || first.number > 9999.0 || last.number > 9999.0)
        return unreadable;
    const Years found{static_cast<int>(first.number), static_cast<int>(last.number)};
    if (found.last < found.first)
        return Trouble{in_quotes(text) + " ends before it starts", hint};
    const Years good = good_years_near(found.first, found.last);
    const std::string suggestion = fmt::format("write {} to {}", good.first, good.last);
    if (found.first < k_first_year || found.last > k_last_year)
        return Trouble{fmt::format("{} reaches outside {} to {}", in_quotes(text), k_first_year, k_last_year),
                       suggestion};
    const int count = found.last - found.first + 1;
    if (count % 4 != 0)
        return Trouble{fmt::format("{} is {} years, not whole leap cycles of four", in_quotes(text), count),
                       suggestion};
    return found;
}

std::string day_text(std::chrono::month_day day) {
    return fmt::format("{} {}", static_cast<unsigned>(day.day()), k_months[static_cast<unsigned>(day.month()) - 1]);
}

std::string hour_text(double hours) {
    const auto total_min = static_cast<int>(std::lround(hours * 60.0));
    return fmt::format("{}:{:02}", total_min / 60, total_min % 60);
}

} // namespace dialwright::cli
