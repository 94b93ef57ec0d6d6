// SPDX-License-Identifier: MIT
#include "engine/sun/civil_day.hpp"

#include <catch2/catch.hpp>

#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

Site place(double latitude_deg, double longitude_deg) {
    return {Angle::degrees(latitude_deg), Angle::degrees(longitude_deg)};
}

Zone zone(const char* name) {
    return Zone::find(name).value();
}

std::size_t count(const CivilDay& day, SunEvent::Kind kind) {
    std::size_t n = 0;
    for (const SunEvent& event : day.events)
        n += event.kind == kind ? 1 : 0;
    return n;
}

/// By asking every minute whether the Sun is up.
double minutes_up(const CivilDay& day, const Site& site, Angle standard_altitude) {
    const Almanac almanac{day.begin - hours{1}, day.end + hours{1}};
    double n = 0;
    for (Instant at = day.begin + seconds{30}; at < day.end; at += minutes{1})
        n += to_site(sky_place(almanac.at(at), site.longitude), site.latitude).altitude() > standard_altitude ? 1 : 0;
    return n;
}

} // namespace

TEST_CASE("a date's events are those of the Sun, whatever the zone", "[engine][civil_day]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_real_distribution<double> latitude{-80.0, 80.0}, longitude{-180.0, 180.0};
    std::uniform_int_distribution<int> any_day{0, 20000}, any_zone{0, 4};
    const char* const k_zones[] = {"UTC", "Europe/London", "America/St_Johns", "Pacific/Auckland", "Asia/Kathmandu"};
    for (int i = 0; i < 60; ++i) {
        const Site site = place(latitude(random), longitude(random));
        const Zone clocks = zone(k_zones[any_zone(random)]);
        const sys_days first = sys_days{1980y / 1 / 1} + days{any_day(random)};
        const Angle altitude = i % 2 == 0 ? k_upper_edge_altitude : Angle{};
        const auto list = civil_days(site, clocks, first, first + days{3}, altitude);
        REQUIRE(list.size() == 4);
        for (std::size_t k = 0; k < list.size(); ++k) {
            const CivilDay& day = list[k];
            CAPTURE(site.latitude.in_degrees(), site.longitude.in_degrees(), clocks.name(), int(day.date.year()),
                    unsigned(day.date.month()), unsigned(day.date.day()));
            if (k > 0)
                CHECK(day.begin == list[k - 1].end);
            bool up = day.up_at_begin;
            for (const SunEvent& event : day.events) {
                CHECK(event.at >= day.begin);
                CHECK(event.at < day.end);
                if (event.kind == SunEvent::Kind::noon)
                    continue;
                CHECK(up == (event.kind == SunEvent::Kind::set)); // rises and sets take turns
                up = event.kind == SunEvent::Kind::rise;
                CHECK_THAT((event.altitude - altitude).in_arcseconds(), WithinAbs(0.0, 0.3));
            }
            if (k > 0)
                CHECK(list[k - 1].up_for <= hours{25});
            // A minute for each rise and set that the count by minutes may miss by half of one.
            CHECK_THAT(duration<double>(day.up_for).count() / 60.0, WithinAbs(minutes_up(day, site, altitude), 2.1));
        }
    }
}

TEST_CASE("dates that lack something say so", "[engine][civil_day]") {
    using Kind = SunEvent::Kind;
    const Site north = place(69.65, 18.95);
    const auto oslo = zone("Europe/Oslo");
    const auto summer = civil_days(north, oslo, 2027y / 6 / 21, 2027y / 6 / 21);
    CHECK(count(summer[0], Kind::rise) + count(summer[0], Kind::set) == 0);
    CHECK(summer[0].up_for == hours{24});
    CHECK(count(summer[0], Kind::noon) == 1);
    const auto winter = civil_days(north, oslo, 2027y / 12 / 21, 2027y / 12 / 21);
    CHECK(winter[0].events.size() == 1);
    CHECK(winter[0].up_for == hours{0});
    CHECK(winter[0].first(Kind::noon)->altitude < Angle{});

    // Clocks half a day from the Sun: noons near midnight, so that some date of the year has none and some has two.
    int none = 0, two = 0;
    for (const CivilDay& day : civil_days(place(10.0, 180.0), zone("UTC"), 2027y / 1 / 1, 2027y / 12 / 31)) {
        none += count(day, Kind::noon) == 0 ? 1 : 0;
        two += count(day, Kind::noon) == 2 ? 1 : 0;
    }
    CHECK(none == 2); // the equation of time runs through nought four times, twice each way
    CHECK(two == 2);

    const auto apia = civil_days(place(-13.8, -171.7), zone("Pacific/Apia"), 2011y / 12 / 29, 2011y / 12 / 31);
    CHECK(apia[1].begin == apia[1].end); // the islands went over the date line
    CHECK(apia[1].events.empty());
    CHECK(count(apia[0], Kind::noon) == 1);
    CHECK(count(apia[2], Kind::noon) == 1);
    CHECK_THROWS_AS(civil_days(north, oslo, 2027y / 6 / 2, 2027y / 6 / 1), std::invalid_argument);
}

TEST_CASE("rise, set and noon of the published example, by the clocks of its zone", "[engine][civil_day][published]") {
    // Source: Reda and Andreas, NREL/TP-560-34302, rev. 2008, table A5 (from memory): rise 06:12:43 and set 17:20:19 at UTC - 7,
    // transit 11:46:04. The set that it prints is that of the evening before, by Denver's clocks (summer time, UTC - 6).
    const Site site = place(39.742476, -105.1786);
    const auto days = civil_days(site, zone("America/Denver"), 2003y / 10 / 16, 2003y / 10 / 17);
    const auto seconds_off = [](const SunEvent* event, Instant published) {
        REQUIRE(event != nullptr);
        return std::abs(duration<double>(event->at - published).count());
    };
    const Instant rise = sys_days{2003y / 10 / 17} + 13h + 12min + 43s,
                  noon = sys_days{2003y / 10 / 17} + 18h + 46min + 4s,
                  set = sys_days{2003y / 10 / 17} + 0h + 20min + 19s;
    CHECK(seconds_off(days[1].first(SunEvent::Kind::rise), rise) < 1.5);
    CHECK(seconds_off(days[1].first(SunEvent::Kind::noon), noon) < 1.5);
    CHECK(seconds_off(days[0].first(SunEvent::Kind::set), set) < 1.5);
}
