// SPDX-License-Identifier: MIT
#include "engine/time/summer_time.hpp"

#include <catch2/catch.hpp>

#include <string>

using namespace dialwright;
using namespace std::chrono;

namespace {

SummerTime of(const char* name, int first, int last) {
    const auto zone = Zone::find(name);
    REQUIRE(zone);
    return summer_time_of(*zone, first, last);
}

/// At noon of a date, by the rule's own words.
bool summer_by_rule(const SummerTime& summer, year_month_day date) {
    const sys_days day{date};
    const auto edge = [&](const YearlyDay& rule) {
        return sys_days{date_in(rule, date.year())} + days{rule.at_its_end};
    };
    const sys_days begins = edge(summer.begins), ends = edge(summer.ends);
    return begins < ends ? day >= begins && day < ends : day >= begins || day < ends;
}

} // namespace

TEST_CASE("rules of summer time as the laws have them", "[engine]") {
    // European Union, Directive 2000/84/EC, articles 2 and 3: the last Sundays of March and October (from memory).
    for (const char* name : {"Europe/London", "Europe/Dublin", "Europe/Rome"}) {
        const SummerTime summer = of(name, 2027, 2046);
        INFO(name);
        CHECK(summer.kind == SummerTime::Kind::yearly);
        CHECK(summer.ahead == hours{1});
        CHECK(summer.since == 2027);
        CHECK_FALSE(summer.standard_changes);
        CHECK(summer.begins.kind == YearlyDay::Kind::last);
        CHECK(summer.begins.month == March);
        CHECK(summer.begins.weekday == Sunday);
        CHECK(summer.ends.kind == YearlyDay::Kind::last);
        CHECK(summer.ends.month == October);
    }
    // United States, Energy Policy Act of 2005, section 110: second Sunday of March, first of November, since 2007 (from
    // memory).
    const SummerTime american = of("America/New_York", 2001, 2020);
    CHECK(american.kind == SummerTime::Kind::yearly);
    CHECK(american.since == 2007);
    CHECK(american.begins.kind == YearlyDay::Kind::nth);
    CHECK(american.begins.nth == 2);
    CHECK(american.ends.nth == 1);
    // South of the equator it begins later in the year than it ends; half an hour on Lord Howe Island.
    const SummerTime southern = of("Australia/Lord_Howe", 2027, 2046);
    CHECK(southern.ahead == minutes{30});
    CHECK(southern.begins.month == October);
    CHECK(southern.ends.month == April);
}

TEST_CASE("zones without summer time, or without a rule", "[engine]") {
    CHECK(of("Asia/Tokyo", 2027, 2046).kind == SummerTime::Kind::none);
    CHECK(of("Africa/Johannesburg", 2027, 2046).since == 2027);
    const SummerTime given_up = of("Europe/Moscow", 2001, 2020); // no clock has been put on since 2011
    CHECK(given_up.kind == SummerTime::Kind::none);
    CHECK(given_up.standard_changes);
    CHECK(given_up.since > 2010);
    const SummerTime by_the_moon = of("Africa/Casablanca", 2013, 2016); // it stopped for Ramadan
    CHECK(by_the_moon.kind == SummerTime::Kind::irregular);
    CHECK(by_the_moon.ahead == hours{1});
}

TEST_CASE("on every day of the years, the rule says what the zone does", "[engine]") {
    for (const char* name : {"Europe/London", "Europe/Dublin", "America/New_York", "America/Santiago",
                             "Australia/Sydney", "Australia/Lord_Howe", "Africa/Cairo", "Asia/Jerusalem",
                             "America/Havana", "America/Nuuk", "Asia/Beirut", "Antarctica/Troll", "Pacific/Auckland"}) {
        const auto zone = Zone::find(name);
        REQUIRE(zone);
        const SummerTime summer = summer_time_of(*zone, 2027, 2046);
        INFO(name);
        REQUIRE(summer.kind == SummerTime::Kind::yearly);
        for (sys_days day = year{summer.since} / 1 / 1; day < year{2047} / 1 / 1; day += days{1}) {
            const auto noon = zone->to_utc(ClockReading{day.time_since_epoch() + hours{12}}).first;
            const bool kept = zone->at(noon).summer_time > seconds{0};
            if (kept != summer_by_rule(summer, day))
                FAIL(name << " on " << int(year_month_day{day}.year()) << "-" << unsigned(year_month_day{day}.month())
                          << "-" << unsigned(year_month_day{day}.day()));
        }
    }
}
