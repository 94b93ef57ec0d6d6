// SPDX-License-Identifier: MIT
#include "cli/report/sunlight_months.hpp"

#include "cli/report/say.hpp"
#include "layout/correction/words.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using namespace std::chrono;
using layout::Align;

/// "Jun".
std::string short_month(std::size_t index) {
    return std::string{layout::month_name(unsigned(index) + 1)}.substr(0, 3);
}

std::size_t month_index(const LightDay& day) {
    return std::size_t(unsigned(day.date.month()) - 1);
}

/// "08:14", to the minute.
std::string minute_text(const Zone& zone, Instant at) {
    return say_clock(zone, round<minutes>(at)).substr(0, 5);
}

std::string hours_text(double hours) {
    return fixed(hours, 1);
}

/// Of all dates of a month: the earliest begin and the latest end by the clock, "07:58".
struct Extremes {
    std::string first, last;
};
Extremes extremes_of(const LightYear& year, std::size_t month) {
    Extremes found;
    for (const LightDay& day : year.days)
        if (month_index(day) == month && !day.lit.empty()) {
            const std::string first = say_clock(year.face.zone, day.lit.front().from).substr(0, 5);
            const bool to_midnight = day.lit.back().to == day.end;
            const std::string last = to_midnight ? "24:00" : say_clock(year.face.zone, day.lit.back().to).substr(0, 5);
            found.first = found.first.empty() ? first : std::min(found.first, first);
            found.last = std::max(found.last, last);
        }
    return found;
}

TableRow totals_row(const std::string& name, const LightTotals& sum, const Extremes& ends) {
    const double taken = sum.facing_h - sum.lit_h;
    return {name,
            hours_text(sum.up_h),
            hours_text(sum.facing_h),
            hours_text(taken),
            hours_text(sum.lit_h),
            sum.days > 0 ? hours_text(sum.lit_h / sum.days) : "",
            sum.up_h > 0 ? fmt::format("{:.0f} %", 100 * sum.lit_h / sum.up_h) : "",
            fmt::format("{}", sum.days_lit),
            ends.first,
            ends.last};
}

std::string spans_text(const Zone& zone, const LightDay& day) {
    std::string text;
    for (const TimeSpan& span : day.lit) {
        if (span.to - span.from < seconds{30})
            continue;
        text.append(text.empty() ? "" : ", ");
        text.append(minute_text(zone, span.from)).append(" to ");
        text.append(span.to == day.end ? "24:00" : minute_text(zone, span.to));
    }
    return text.empty() ? "not lit" : text;
}

} // namespace

double hours_of(microseconds length) {
    return duration<double, std::ratio<3600>>(length).count();
}

std::array<LightTotals, 12> months_of(const LightYear& year) {
    std::array<LightTotals, 12> sums;
    for (const LightDay& day : year.days) {
        LightTotals& sum = sums[month_index(day)];
        sum.up_h += hours_of(day.up);
        sum.facing_h += hours_of(day.facing);
        sum.lit_h += hours_of(day.lit_for);
        sum.days += 1;
        sum.days_lit += day.lit.empty() ? 0 : 1;
    }
    return sums;
}

LightTotals total_of(const LightYear& year) {
    LightTotals sum;
    for (const LightTotals& month : months_of(year)) {
        sum.up_h += month.up_h;
        sum.facing_h += month.facing_h;
        sum.lit_h += month.lit_h;
        sum.days += month.days;
        sum.days_lit += month.days_lit;
    }
    return sum;
}

std::string face_heading(const LightYear& year) {
    return fmt::format("{}: {}, at {}, {}, in {}", year.face.name, say_attitude(year.face.attitude),
                       say_latitude(year.face.site.latitude), say_longitude(year.face.site.longitude), year.year);
}

const std::vector<layout::Flow::Column>& month_columns() {
    static const std::vector<layout::Flow::Column> k_columns{{"", Align::left},
                                                             {"Sun up h", Align::right},
                                                             {"facing h", Align::right},
                                                             {"skyline takes h", Align::right},
                                                             {"lit h", Align::right},
                                                             {"a day", Align::right},
                                                             {"of Sun up", Align::right},
                                                             {"days lit", Align::right},
                                                             {"first light", Align::right},
                                                             {"last light", Align::right}};
    return k_columns;
}

std::vector<TableRow> month_rows(const LightYear& year) {
    std::vector<TableRow> rows;
    const auto months = months_of(year);
    for (std::size_t i = 0; i < months.size(); ++i)
        rows.push_back(totals_row(short_month(i), months[i], extremes_of(year, i)));
    rows.push_back(totals_row("year", total_of(year), {}));
    return rows;
}

const std::vector<layout::Flow::Column>& day_columns() {
    static const std::vector<layout::Flow::Column> k_columns{{"date", Align::right}, {"lit", Align::left}};
    return k_columns;
}

std::vector<TableRow> day_rows(const LightYear& year) {
    std::vector<TableRow> rows;
    for (const LightDay& day : year.days)
        if (const unsigned of_month = unsigned(day.date.day()); of_month == 1 || of_month == 11 || of_month == 21)
            rows.push_back(
                {layout::say_date(day.date.month() / day.date.day(), true), spans_text(year.face.zone, day)});
    return rows;
}

std::vector<layout::Flow::Column> compared_columns(const std::vector<LightYear>& years) {
    std::vector<layout::Flow::Column> columns{{"", Align::left}};
    for (const LightYear& year : years)
        columns.push_back({year.face.name, Align::right});
    return columns;
}

std::vector<TableRow> compared_rows(const std::vector<LightYear>& years) {
    std::vector<TableRow> rows(15);
    for (std::size_t i = 0; i < 12; ++i)
        rows[i].push_back(short_month(i));
    rows[12].push_back("year");
    rows[13].push_back("of Sun up");
    rows[14].push_back("days lit");
    for (const LightYear& year : years) {
        const auto months = months_of(year);
        for (std::size_t i = 0; i < 12; ++i)
            rows[i].push_back(hours_text(months[i].lit_h));
        const LightTotals sum = total_of(year);
        rows[12].push_back(hours_text(sum.lit_h));
        rows[13].push_back(fmt::format("{:.0f} %", 100 * sum.lit_h / sum.up_h));
        rows[14].push_back(fmt::format("{}", sum.days_lit));
    }
    return rows;
}

std::vector<std::string> light_remarks(const LightYear& year) {
    std::vector<std::string> list;
    const std::size_t count = year.days.size();
    const auto dark = [&](std::size_t i) { return year.days[i % count].lit.empty(); };
    const auto name = [&](std::size_t i) {
        const LightDay& day = year.days[i % count];
        return layout::say_date(day.date.month() / day.date.day(), true);
    };
    std::size_t first = 0; // a date with light, from which to go round the year
    while (first < count && dark(first))
        ++first;
    if (first == count) {
        list.emplace_back("The Sun never lights it.");
        return list;
    }
    for (std::size_t i = first; i < first + count; ++i)
        if (dark(i)) {
            const std::size_t from = i;
            while (dark(i + 1))
                ++i;
            list.push_back(from == i ? fmt::format("Not lit on {}.", name(i))
                                     : fmt::format("Not lit from {} to {}.", name(from), name(i)));
        }
    const LightTotals sum = total_of(year);
    if (sum.facing_h - sum.lit_h > 0.05)
        list.push_back(fmt::format("The skyline takes {} of {} hours.", hours_text(sum.facing_h - sum.lit_h),
                                   hours_text(sum.facing_h)));
    return list;
}

} // namespace dialwright::cli
