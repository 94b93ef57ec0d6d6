// SPDX-License-Identifier: MIT
#include "engine/dial/correction.hpp"

#include "engine/sun/almanac.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <cmath>

using namespace dialwright;
using namespace std::chrono;
using Catch::Matchers::WithinAbs;

namespace {

const MeanYear& mean_year() {
    static const MeanYear year{2027, 2046};
    return year;
}

Correction correction(HourTime time, double longitude_deg, const char* zone_name = "Europe/London") {
    const auto zone = Zone::find(zone_name);
    REQUIRE(zone);
    return {mean_year(), time, Angle::degrees(longitude_deg), zone->meridian(2027), summer_time_of(*zone, 2027, 2046)};
}

} // namespace

TEST_CASE("the Sun's own time differs from the zone's by the longitude alone", "[engine]") {
    const Correction zone = correction(HourTime::zone, -4.2), sun = correction(HourTime::sun, -4.2);
    CHECK_THAT(sun.longitude_min(), WithinAbs(16.8, 1e-9));
    for (const month_day date : dates_of_year())
        CHECK_THAT(sun.add_min(date) - zone.add_min(date), WithinAbs(16.8, 1e-9));
    CHECK_FALSE(correction(HourTime::clock, -4.2).is_needed());
    CHECK(correction(HourTime::clock, -4.2).add_min(May / 1) == 0.0);
}

TEST_CASE("the correction is the mean of single years at the place's noon", "[engine]") {
    // A place in England, and one whose calendar is a day ahead of its Sun's at Greenwich.
    for (const auto& [name, longitude] : {std::pair{"Europe/London", -1.7}, {"Pacific/Kiritimati", -157.4}}) {
        const auto zone = Zone::find(name);
        REQUIRE(zone);
        const Correction mean = correction(HourTime::sun, longitude, name);
        const double standard_h = zone->meridian(2027).in_hours();
        double worst_s = 0, stray_s = 0;
        for (const month_day date : dates_of_year()) {
            if (date == February / 29)
                continue;
            std::vector<Instant> noons;
            for (int y = 2027; y <= 2046; ++y) // 12h of the mean Sun of the place, on the date of its calendar
                noons.push_back(Instant{sys_days{year{y} / date}} +
                                round<microseconds>(
                                    duration<double, hours::period>(12.0 - standard_h + mean.longitude_min() / 60)));
            double sum = 0;
            std::vector<double> singles;
            for (const ApparentSun& sun : apparent_suns(noons)) {
                singles.push_back(mean.longitude_min() - sun.equation_of_time.in_minutes_of_time());
                sum += singles.back();
            }
            worst_s = std::max(worst_s, std::abs(sum / 20 - mean.add_min(date)) * 60);
            for (const double single : singles)
                stray_s = std::max(stray_s, std::abs(single - mean.add_min(date)) * 60);
        }
        INFO(name);
        CHECK(worst_s < 0.3);
        CHECK_THAT(mean.spread().seconds, WithinAbs(stray_s, 0.5));
    }
}

TEST_CASE("its extremes, turns and crossings are those of its days", "[engine]") {
    const Correction one = correction(HourTime::sun, -1.7);
    REQUIRE(one.turns().size() == 4);
    for (double day = 0; day < MeanYear::k_length_days; day += 0.25) {
        CHECK(one.add_min(day) >= one.least_min() - 1e-6);
        CHECK(one.add_min(day) <= one.most_min() + 1e-6);
        CHECK_THAT(one.rate_min(day), WithinAbs((one.add_min(day + 0.05) - one.add_min(day - 0.05)) / 0.1, 1e-4));
    }
    std::size_t passes = 0;
    for (int minutes = -30; minutes <= 40; ++minutes) {
        const std::vector<double> days = one.days_of(minutes);
        CHECK(days.size() % 2 == 0); // round the year it comes back
        CHECK(std::is_sorted(days.begin(), days.end()));
        for (const double day : days)
            CHECK_THAT(one.add_min(day), WithinAbs(minutes, 1e-6));
        passes += days.size();
    }
    CHECK(passes > 70);
    CHECK_THAT(one.start_of_month(1), WithinAbs(0, 1e-12));
    CHECK_THAT(one.start_of_month(3), WithinAbs(59.25, 1e-12));
    CHECK_THAT(one.start_of_month(13), WithinAbs(365.25, 1e-12));
    CHECK(dates_of_year().size() == 366);
}
