// SPDX-License-Identifier: MIT
// Source of the changes below: the published rules of each country as the tz database records them (from memory);
// tests/against/zone_offsets.py compares a thousand random offsets with another reader of the database.
#include "engine/time/zone.hpp"

#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

Zone zone(std::string_view name) {
    const auto found = Zone::find(name);
    REQUIRE(found);
    return *found;
}

Instant instant(std::string_view text) {
    const auto read = read_instant(text);
    REQUIRE(read);
    return *read;
}

std::vector<std::string> changes_in(std::string_view name, int y) {
    std::vector<std::string> texts;
    for (const Instant change : zone(name).changes(sys_days{year{y} / 1 / 1}, sys_days{year{y + 1} / 1 / 1}))
        texts.push_back(write_instant(change));
    return texts;
}

using Texts = std::vector<std::string>;

} // namespace

TEST_CASE("the clocks change when the law says", "[engine][zone]") {
    CHECK(changes_in("Europe/London", 2026) == Texts{"2026-03-29T01:00:00Z", "2026-10-25T01:00:00Z"});
    CHECK(changes_in("Europe/Dublin", 2026) == Texts{"2026-03-29T01:00:00Z", "2026-10-25T01:00:00Z"});
    CHECK(changes_in("America/New_York", 2026) == Texts{"2026-03-08T07:00:00Z", "2026-11-01T06:00:00Z"});
    CHECK(changes_in("Australia/Sydney", 2026) == Texts{"2026-04-04T16:00:00Z", "2026-10-03T16:00:00Z"});
    CHECK(changes_in("Asia/Tokyo", 2026).empty());
    CHECK(changes_in("America/Phoenix", 2026).empty());
    CHECK(changes_in("UTC", 2026).empty());
}

TEST_CASE("rules go on beyond the tables", "[engine][zone]") {
    // Last Sundays of March and October; second Sunday of March and first of November; first Sundays of April, October.
    CHECK(changes_in("Europe/London", 2038) == Texts{"2038-03-28T01:00:00Z", "2038-10-31T01:00:00Z"});
    CHECK(changes_in("Europe/London", 2048) == Texts{"2048-03-29T01:00:00Z", "2048-10-25T01:00:00Z"});
    CHECK(changes_in("America/New_York", 2040) == Texts{"2040-03-11T07:00:00Z", "2040-11-04T06:00:00Z"});
    CHECK(changes_in("Australia/Sydney", 2100) == Texts{"2100-04-03T16:00:00Z", "2100-10-02T16:00:00Z"});
    CHECK(changes_in("Asia/Tokyo", 2060).empty());
}

TEST_CASE("an offset is split into standard and summer time", "[engine][zone]") {
    struct Case {
        const char *name, *at;
        seconds from_utc, summer;
        const char* abbreviation;
    };
    for (const Case& c : {
             Case{"Europe/London", "2026-06-21T11:00:00Z", 1h, 1h, "BST"},
             Case{"Europe/London", "2026-12-21T11:00:00Z", 0h, 0h, "GMT"},
             Case{"Europe/London", "2051-06-21T11:00:00Z", 1h, 1h, "BST"},
             Case{"Europe/London", "1943-07-01T11:00:00Z", 2h, 2h, "BDST"}, // double summer time
             Case{"Europe/London", "1943-01-01T11:00:00Z", 1h, 1h, "BST"},
             Case{"Europe/London", "1970-07-01T11:00:00Z", 1h, 0h, "BST"}, // three years of British Standard Time
             Case{"Europe/Dublin", "2026-06-21T11:00:00Z", 1h, 1h, "IST"}, // the law calls this one standard
             Case{"Europe/Dublin", "2026-12-21T11:00:00Z", 0h, 0h, "GMT"},
             Case{"Europe/Dublin", "2060-06-21T11:00:00Z", 1h, 1h, "IST"},
             Case{"America/New_York", "2026-07-04T12:00:00Z", -4h, 1h, "EDT"},
             Case{"Australia/Sydney", "2026-01-15T00:00:00Z", 11h, 1h, "AEDT"},
             Case{"Australia/Sydney", "2045-01-15T00:00:00Z", 11h, 1h, "AEDT"},
             Case{"Australia/Lord_Howe", "2026-01-15T00:00:00Z", 11h, 30min, "+11"}, // half an hour
             Case{"Asia/Kathmandu", "2026-01-15T00:00:00Z", 5h + 45min, 0h, "+0545"},
             Case{"Europe/Istanbul", "2016-07-01T00:00:00Z", 3h, 1h, "EEST"}, // then kept as standard
             Case{"Europe/Istanbul", "2026-07-01T00:00:00Z", 3h, 0h, "+03"},
             Case{"Pacific/Apia", "2012-02-01T00:00:00Z", 14h, 1h,
                  "+14"}, // the summer in which it crossed the date line
             Case{"Europe/Moscow", "2012-07-01T00:00:00Z", 4h, 0h, "MSK"},
         }) {
        CAPTURE(c.name, c.at);
        const ZoneOffset offset = zone(c.name).at(instant(c.at));
        CHECK(offset.from_utc.count() == c.from_utc.count());
        CHECK(offset.summer_time.count() == c.summer.count());
        CHECK(offset.abbreviation == c.abbreviation);
    }
}

TEST_CASE("the zone meridian is that of standard time", "[engine][zone]") {
    CHECK_THAT(zone("Europe/London").meridian(2026).in_degrees(), WithinAbs(0.0, 1e-12));
    CHECK_THAT(zone("Europe/Dublin").meridian(2026).in_degrees(), WithinAbs(0.0, 1e-12));
    CHECK_THAT(zone("Europe/London").meridian(1943).in_degrees(), WithinAbs(0.0, 1e-12));
    CHECK_THAT(zone("America/Denver").meridian(2045).in_degrees(), WithinAbs(-105.0, 1e-12));
    CHECK_THAT(zone("Australia/Sydney").meridian(2026).in_degrees(), WithinAbs(150.0, 1e-12));
    CHECK_THAT(zone("Asia/Kolkata").meridian(2026).in_degrees(), WithinAbs(82.5, 1e-12));
    CHECK_THAT(zone("Asia/Tokyo").meridian(2026).in_degrees(), WithinAbs(135.0, 1e-12));
}

TEST_CASE("a reading of the clocks is found once, twice or never", "[engine][zone]") {
    const Zone london = zone("Europe/London");
    const auto reading = [](year_month_day date, microseconds time) { return ClockReading{local_days{date} + time}; };

    const LocalReading once = london.to_utc(reading(2026y / 6 / 21, 12h));
    CHECK(once.kind == LocalReading::Kind::unique);
    CHECK(write_instant(once.first) == "2026-06-21T11:00:00Z");

    const LocalReading back = london.to_utc(reading(2026y / 10 / 25, 1h + 30min));
    CHECK(back.kind == LocalReading::Kind::twice);
    CHECK(write_instant(back.first) == "2026-10-25T00:30:00Z");
    CHECK(write_instant(back.second) == "2026-10-25T01:30:00Z");

    const LocalReading gone = london.to_utc(reading(2026y / 3 / 29, 1h + 30min));
    CHECK(gone.kind == LocalReading::Kind::never);
    CHECK(write_instant(gone.first) == "2026-03-29T01:00:00Z");

    // The ends of the gap and of the hour that comes twice.
    CHECK(london.to_utc(reading(2026y / 3 / 29, 1h)).kind == LocalReading::Kind::never);
    CHECK(london.to_utc(reading(2026y / 3 / 29, 2h)).kind == LocalReading::Kind::unique);
    CHECK(london.to_utc(reading(2026y / 10 / 25, 1h)).kind == LocalReading::Kind::twice);
    CHECK(london.to_utc(reading(2026y / 10 / 25, 2h)).kind == LocalReading::Kind::unique);

    // A whole day that Samoa left out.
    CHECK(zone("Pacific/Apia").to_utc(reading(2011y / 12 / 30, 12h)).kind == LocalReading::Kind::never);
    // Beyond the tables.
    CHECK(london.to_utc(reading(2048y / 3 / 29, 1h + 30min)).kind == LocalReading::Kind::never);
    CHECK(london.to_utc(reading(2048y / 10 / 25, 1h + 30min)).kind == LocalReading::Kind::twice);
}

TEST_CASE("every instant is found again from what its clocks show", "[engine][zone]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_int_distribution<std::int64_t> any{-1'500'000'000, 4'000'000'000};
    for (const char* name :
         {"Europe/London", "America/New_York", "Australia/Lord_Howe", "Africa/Casablanca", "Asia/Kathmandu"})
        for (int i = 0; i < 500; ++i) {
            const Instant utc{seconds{any(random)}};
            CAPTURE(name, write_instant(utc));
            const LocalReading found = zone(name).to_utc(zone(name).to_clock(utc));
            CHECK(found.kind != LocalReading::Kind::never);
            CHECK((found.first == utc || found.second == utc));
        }
}

TEST_CASE("summer time is never negative, and standard time is the same all year in steady zones", "[engine][zone]") {
    for (const char* name :
         {"Europe/Dublin", "Africa/Casablanca", "Africa/Windhoek", "Europe/Prague", "America/St_Johns"})
        for (int y = 1920; y <= 2060; ++y)
            for (unsigned m = 1; m <= 12; ++m) {
                CAPTURE(name, y, m);
                const seconds summer = zone(name).at(Instant{sys_days{year{y} / month{m} / 15}}).summer_time;
                CHECK(summer >= 0s);
                CHECK(summer <= 2h);
            }
}

TEST_CASE("a misspelt zone is answered with its neighbours", "[engine][zone]") {
    CHECK_FALSE(Zone::find("Europe/Londn"));
    CHECK_FALSE(Zone::find("europe/london"));
    CHECK_FALSE(Zone::find(""));
    CHECK_FALSE(Zone::find("localtime"));
    CHECK_FALSE(Zone::find("../zoneinfo/UTC"));
    CHECK(nearest_zone_names("Europe/Londn", 1) == Texts{"Europe/London"});
    CHECK(nearest_zone_names("europe/london", 1) == Texts{"Europe/London"});
    CHECK(nearest_zone_names("new york", 1) == Texts{"America/New_York"});
    CHECK(nearest_zone_names("Sidney", 3).front() == "Australia/Sydney");
    CHECK(nearest_zone_names("", 3).size() == 3);
    CHECK(nearest_zone_names("Paris", 0).empty());
}
