// SPDX-License-Identifier: MIT
#include "engine/light/plate_light.hpp"

#include "engine/surface/plane.hpp"

#include <catch2/catch.hpp>

#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

const Instant k_first = sys_days{2027y / 1 / 1}, k_last = sys_days{2028y / 1 / 1};

bool inside(std::span<const TimeSpan> spans, Instant at) {
    return time_within(spans, at, at + microseconds{1}) > microseconds{0};
}

Skyline hills(std::mt19937_64& random) {
    std::uniform_real_distribution<double> height{0.0, 25.0};
    std::vector<Skyline::Mark> marks;
    for (int azimuth = 3; azimuth < 360; azimuth += 30)
        marks.push_back({Angle::degrees(azimuth), Angle::degrees(height(random))});
    marks.push_back({Angle::degrees(333.1), Angle::degrees(height(random))}); // the upright side of a house
    return Skyline{marks};
}

/// Seconds from `at` to the nearest begin or end.
double to_an_end_s(std::span<const TimeSpan> spans, Instant at) {
    double least = 1e9;
    for (const TimeSpan& span : spans)
        for (const Instant end : {span.from, span.to})
            least = std::min(least, std::abs(duration<double>(end - at).count()));
    return least;
}

} // namespace

TEST_CASE("light comes and goes when the caster says so", "[engine][light]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    std::uniform_real_distribution<double> latitude{-85.0, 85.0}, longitude{-180.0, 180.0}, azimuth{0.0, 360.0},
        altitude{-60.0, 90.0};
    std::uniform_int_distribution<std::int64_t> any{0, (k_last - k_first).count() - 1};
    const Almanac almanac{k_first, k_last};
    for (int i = 0; i < 40; ++i) {
        const Site site{Angle::degrees(latitude(random)), Angle::degrees(longitude(random))};
        const Plane plate{frame_of({Angle::degrees(azimuth(random)), Angle::degrees(altitude(random))}), 1.0};
        const Skyline skyline = i % 3 == 0 ? Skyline{} : hills(random);
        CAPTURE(site.latitude.in_degrees(), site.longitude.in_degrees(), i);
        const PlateLight light = plate_light(site, plate.frame(), skyline, almanac, k_first, k_last);
        for (const auto* spans : {&light.up, &light.facing, &light.lit})
            for (std::size_t k = 0; k < spans->size(); ++k) {
                CHECK((*spans)[k].from < (*spans)[k].to);
                if (k > 0)
                    CHECK((*spans)[k - 1].to < (*spans)[k].from);
            }
        int wrong = 0;
        for (int k = 0; k < 2000; ++k) {
            const Instant at = k_first + microseconds{any(random)};
            const SiteDirection sun = to_site(sky_place(almanac.at(at), site.longitude), site.latitude);
            const bool up = sun.enu.z() > 0, facing = up && plate.light(sun) > 0, lit = facing && skyline.sees(sun);
            wrong += inside(light.up, at) != up && to_an_end_s(light.up, at) > 0.02 ? 1 : 0;
            wrong += inside(light.facing, at) != facing && to_an_end_s(light.facing, at) > 0.02 ? 1 : 0;
            wrong += inside(light.lit, at) != lit && to_an_end_s(light.lit, at) > 0.02 ? 1 : 0;
        }
        CHECK(wrong == 0);
    }
}

TEST_CASE("a face and its back share the day; a gleam of seconds is found", "[engine][light]") {
    const Almanac almanac{k_first, k_last};
    const Site site{Angle::degrees(54.2), Angle::degrees(-1.9)};
    const PlateFrame front = frame_of({Angle::degrees(157), Angle::degrees(12)});
    const PlateFrame back = frame_of({Angle::degrees(337), Angle::degrees(-12)});
    const PlateLight one = plate_light(site, front, {}, almanac, k_first, k_last);
    const PlateLight other = plate_light(site, back, {}, almanac, k_first, k_last);
    const auto total = [](const std::vector<TimeSpan>& spans) {
        return duration<double>(time_within(spans, k_first, k_last)).count();
    };
    CHECK_THAT(total(one.lit) + total(other.lit) - total(one.up), WithinAbs(0.0, 30.0)); // 0.02 s each crossing

    // Overhanging so that the noon Sun of midsummer just misses the face: its light ends before noon and comes back
    // after it, with less than a minute of dark between on some day.
    double shortest = 1e9;
    const Angle highest = Angle::degrees(90 - 54.2 + 23.4);
    for (const TimeSpan& span :
         plate_light(site, frame_of({Angle::degrees(180), highest - Angle::degrees(90)}), {}, almanac, k_first, k_last)
             .lit)
        shortest = std::min(shortest, duration<double>(span.to - span.from).count());
    CHECK(shortest > 60.0);
    const Skyline wall{{{Angle::degrees(0), Angle::degrees(60)},
                        {Angle::degrees(179.98), Angle::degrees(60)},
                        {Angle::degrees(180.0), Angle::degrees(0)},
                        {Angle::degrees(180.02), Angle::degrees(60)}}};
    const PlateLight slit = plate_light(site, frame_of({}), wall, almanac, k_first, k_last);
    // The Sun crosses the slit's 0.04° in some seconds each noon. Shorter than a minute, with three corners in it:
    // beyond the promise, and found all the same where a sample's neighbours tell of it.
    for (const TimeSpan& span : slit.lit)
        CHECK(span.to - span.from < seconds{20});
}

TEST_CASE("spans are cut at a window's ends", "[engine][light]") {
    const auto at = [](int hour) { return k_first + hours{hour}; };
    const std::vector<TimeSpan> spans{{at(1), at(3)}, {at(5), at(8)}, {at(9), at(10)}};
    CHECK(time_within(spans, at(0), at(24)) == hours{6});
    CHECK(time_within(spans, at(2), at(6)) == hours{2});
    CHECK(time_within(spans, at(3), at(5)) == hours{0});
    REQUIRE(spans_within(spans, at(6), at(9)).size() == 1);
    CHECK(spans_within(spans, at(6), at(9))[0].from == at(6));
}
