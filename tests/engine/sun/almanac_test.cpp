// SPDX-License-Identifier: MIT
#include "engine/sun/almanac.hpp"

#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

std::vector<Instant> random_instants(Instant first, Instant last, int count, std::mt19937_64& random) {
    std::uniform_int_distribution<std::int64_t> any{first.time_since_epoch().count(), last.time_since_epoch().count()};
    std::vector<Instant> instants;
    for (int i = 0; i < count; ++i)
        instants.emplace_back(microseconds{any(random)});
    return instants;
}

void check_same(const ApparentSun& table, const ApparentSun& direct, double arcseconds) {
    CHECK_THAT((table.declination - direct.declination).in_arcseconds(), WithinAbs(0.0, arcseconds));
    CHECK_THAT((table.greenwich_hour_angle - direct.greenwich_hour_angle).signed_turn().in_arcseconds(),
               WithinAbs(0.0, arcseconds));
    CHECK_THAT((table.equation_of_time - direct.equation_of_time).in_arcseconds(), WithinAbs(0.0, arcseconds));
}

} // namespace

TEST_CASE("a year's almanac keeps to the theory", "[engine][almanac]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    for (const int y : {1905, 1960, 1972, 1999, 2016, 2026, 2060, 2099}) {
        const Almanac almanac = Almanac::of_year(y);
        // The two years that end with a leap second step by 0.045" there.
        const double allowed = y == 1972 || y == 2016 ? 0.05 : 0.006;
        for (const Instant utc : random_instants(almanac.first(), almanac.last(), 500, random)) {
            CAPTURE(write_instant(utc));
            check_same(almanac.at(utc), apparent_sun(utc), allowed);
        }
    }
}

TEST_CASE("the worst stretch, around a leap second, keeps to 0.05 arcseconds", "[engine][almanac]") {
    const Almanac almanac{sys_days{2016y / 12 / 1}, sys_days{2017y / 2 / 1}};
    for (Instant utc = sys_days{2016y / 12 / 24}; utc < sys_days{2017y / 1 / 8}; utc += 37min) {
        CAPTURE(write_instant(utc));
        check_same(almanac.at(utc), apparent_sun(utc), 0.05);
    }
}

TEST_CASE("an almanac serves its very ends", "[engine][almanac]") {
    const Instant first = Instant{sys_days{2026y / 2 / 3}} + 5h, last = first + 49h;
    const Almanac almanac{first, last};
    for (const Instant utc : {first, first + 1us, last - 1us, last})
        check_same(almanac.at(utc), apparent_sun(utc), 0.006);
    const Almanac moment{first, first};
    check_same(moment.at(first), apparent_sun(first), 1e-6);
    for (const int y : {k_first_sun_year, k_last_sun_year}) {
        const Almanac outermost = Almanac::of_year(y);
        check_same(outermost.at(outermost.first()), apparent_sun(outermost.first()), 0.006);
        check_same(outermost.at(outermost.last()), apparent_sun(outermost.last()), 0.006);
    }
}

TEST_CASE("an almanac of the wrong years is refused", "[engine][almanac]") {
    const Instant now = sys_days{2026y / 2 / 3};
    CHECK_THROWS_AS(Almanac(now, now - 1s), std::invalid_argument);
    CHECK_THROWS_AS(Almanac::of_year(1799), std::invalid_argument);
    CHECK_THROWS_AS(Almanac::of_year(2200), std::invalid_argument);
}

TEST_CASE("many instants at once are the same as each alone", "[engine][almanac]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::vector<Instant> instants = random_instants(sys_days{2026y / 1 / 1}, sys_days{2027y / 1 / 1}, 1000, random);
    for (const Instant lone : random_instants(sys_days{1800y / 1 / 1}, sys_days{2199y / 12 / 31}, 100, random))
        instants.push_back(lone);
    for (const Instant dense : random_instants(sys_days{1800y / 1 / 1}, sys_days{1800y / 1 / 3}, 50, random))
        instants.push_back(dense);
    std::shuffle(instants.begin(), instants.end(), random);
    const std::vector<ApparentSun> suns = apparent_suns(instants);
    REQUIRE(suns.size() == instants.size());
    for (std::size_t i = 0; i < suns.size(); ++i) {
        CAPTURE(write_instant(instants[i]));
        check_same(suns[i], apparent_sun(instants[i]), 0.006);
    }
    CHECK(apparent_suns({}).empty());
    const std::vector<Instant> wrong{sys_days{2026y / 1 / 1}, sys_days{1700y / 1 / 1}};
    CHECK_THROWS_AS(apparent_suns(wrong), std::invalid_argument);
}
