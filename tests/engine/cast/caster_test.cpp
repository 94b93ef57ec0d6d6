// SPDX-License-Identifier: MIT
#include "engine/cast/caster.hpp"
#include "engine/style/style.hpp"
#include "engine/surface/plane.hpp"
#include "tests/engine/random_plates.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;

namespace {

constexpr double k_nodus_mm = 100;

Caster<Plane> caster_at(Angle latitude, const Attitude& attitude, double thickness_mm = 0.0,
                        const Skyline& skyline = {}) {
    const Plane plane{frame_of(attitude), k_nodus_mm};
    const Style style = style_of(plane.frame(), k_nodus_mm, latitude);
    return {latitude, plane, GnomonEdges{plane.frame(), style, latitude, thickness_mm}, skyline};
}

} // namespace

TEST_CASE("An hour is ever lit if a Sun of the season lights plate and site", "[engine][cast]") {
    constexpr int k_seed = 411;
    test::RandomPlates random{k_seed};
    const Season season{Angle::degrees(-23.44), Angle::degrees(23.44)};
    int lit = 0, unlit = 0;
    for (int i = 0; i < 4000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const Caster<Plane> caster = caster_at(latitude, attitude);
        const Angle hour = random.degrees(-180, 180);
        double most = -1;
        for (int k = 0; k <= 4688; ++k) {
            const SiteDirection sun = to_site({hour, season.least + Angle::degrees(0.01 * k)}, latitude);
            most = std::max(most, std::min(caster.surface().light(sun), sun.enu.z()));
        }
        CAPTURE(k_seed, i, latitude.in_degrees(), attitude.normal_azimuth.in_degrees(),
                attitude.normal_altitude.in_degrees(), hour.in_degrees(), most);
        if (std::abs(most) < 1e-4) // lit or not by less than the brute search's own step
            continue;
        REQUIRE(caster.ever_lit(hour, season) == (most > 0));
        ++(most > 0 ? lit : unlit);
    }
    CHECK(lit > 1000);
    CHECK(unlit > 1000);
}

TEST_CASE("A Sun behind the plate or beneath the skyline throws no shadow", "[engine][cast]") {
    const Skyline hills{{{Angle{}, Angle::degrees(20)}, {Angle::degrees(180), Angle::degrees(20)}}};
    const Angle latitude = Angle::degrees(50);
    const Caster<Plane> level = caster_at(latitude, {}, 0.0, hills);
    const SkyPlace low{Angle{}, Angle::degrees(-23)}, high{Angle{}, Angle{}}; // 17° and 40° high at noon
    CHECK_FALSE(level.cast(low, Light::seen));
    CHECK(level.cast(low, Light::plate_only));
    CHECK(level.cast(high, Light::seen));
    CHECK_FALSE(caster_at(latitude, {Angle{}, Angle{}}).cast(high, Light::plate_only)); // a north wall
}

TEST_CASE("The edge follows from the Sun as from its hour, unless told", "[engine][cast]") {
    constexpr int k_seed = 412;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 3000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const Caster<Plane> caster = caster_at(latitude, attitude, 8.0);
        const SkyPlace sun{random.degrees(-180, 180), random.degrees(-23.44, 23.44)};
        const auto shadow = caster.cast(sun, Light::seen);
        CAPTURE(k_seed, i);
        if (!shadow)
            continue;
        REQUIRE(shadow->edge == caster.edges().casting(sun.hour_angle));
        for (const Edge told : {Edge::left, Edge::right})
            REQUIRE(caster.cast(sun, Light::seen, told)->edge == told);
    }
}
