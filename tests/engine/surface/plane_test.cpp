// SPDX-License-Identifier: MIT
#include "engine/surface/plane.hpp"
#include "tests/engine/random_plates.hpp"

#include <catch2/catch.hpp>

#include <limits>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

namespace {

std::optional<PlatePoint> shadow(Angle latitude, const Attitude& attitude, const SkyPlace& sun) {
    return Plane{frame_of(attitude), 100}.shadow_of_nodus(to_site(sun, latitude));
}

void require_same(const std::optional<PlatePoint>& a, const std::optional<PlatePoint>& b, double u_sign,
                  double v_sign) {
    REQUIRE(a.has_value() == b.has_value());
    if (!a)
        return;
    const double tolerance = 1e-12 * (1e3 + a->u_mm * a->u_mm + a->v_mm * a->v_mm);
    REQUIRE_THAT(b->u_mm, WithinAbs(u_sign * a->u_mm, tolerance));
    REQUIRE_THAT(b->v_mm, WithinAbs(v_sign * a->v_mm, tolerance));
}

} // namespace

TEST_CASE("Shadow, nodus and Sun lie on one straight line", "[engine][surface]") {
    constexpr int k_seed = 111;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 5000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const Plane plane{frame_of(attitude), random.number(1, 500)};
        const SiteDirection sun = to_site({random.degrees(-180, 180), random.degrees(-24, 24)}, latitude);
        const PlatePoint foot{random.number(-10, 10), random.number(-10, 10)};
        const auto point = plane.shadow_of_nodus(sun, foot);
        CAPTURE(k_seed, i);
        REQUIRE(point.has_value() == (plane.light(sun) > 0));
        if (!point || plane.light(sun) < 1e-6)
            continue;
        const PlateFrame& f = plane.frame();
        const Eigen::Vector3d nodus = foot.u_mm * f.u + foot.v_mm * f.v + plane.nodus_height_mm() * f.n;
        const Eigen::Vector3d ray = nodus - (point->u_mm * f.u + point->v_mm * f.v);
        REQUIRE((ray.normalized() - sun.enu).norm() < 1e-9);
    }
}

TEST_CASE("North against south, with the seasons exchanged", "[engine][surface][law]") {
    constexpr int k_seed = 112;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 5000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const SkyPlace sun{random.degrees(-180, 180), random.degrees(-23.44, 23.44)};
        const Attitude mirrored{(Angle::degrees(180) - attitude.normal_azimuth).positive_turn(),
                                attitude.normal_altitude};
        const auto here = shadow(latitude, attitude, sun);
        const auto there = shadow(-latitude, mirrored, {sun.hour_angle, -sun.declination});
        CAPTURE(k_seed, i, latitude.in_degrees());
        if (std::abs(Plane{frame_of(attitude), 1}.light(to_site(sun, latitude))) < 1e-12)
            continue; // grazing: lit or not by the last bit
        // A level plate's v is true north on both sides of the equator; any other's climbs.
        const bool level = abs(attitude.normal_altitude) > Angle::degrees(90) - k_level_tolerance;
        require_same(here, there, level ? 1 : -1, level ? -1 : 1);
    }
}

TEST_CASE("East against west, with morning and afternoon exchanged", "[engine][surface][law]") {
    constexpr int k_seed = 113;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 5000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const SkyPlace sun{random.degrees(-180, 180), random.degrees(-23.44, 23.44)};
        const Attitude mirrored{(-attitude.normal_azimuth).positive_turn(), attitude.normal_altitude};
        CAPTURE(k_seed, i, latitude.in_degrees());
        if (std::abs(Plane{frame_of(attitude), 1}.light(to_site(sun, latitude))) < 1e-12)
            continue;
        require_same(shadow(latitude, attitude, sun), shadow(latitude, mirrored, {-sun.hour_angle, sun.declination}),
                     -1, 1);
    }
}

TEST_CASE("A nodus must stand above its plate", "[engine][surface]") {
    const PlateFrame frame = frame_of({});
    CHECK_THROWS_AS((Plane{frame, 0}), std::invalid_argument);
    CHECK_THROWS_AS((Plane{frame, -1}), std::invalid_argument);
    CHECK_THROWS_AS((Plane{frame, std::numeric_limits<double>::quiet_NaN()}), std::invalid_argument);
    CHECK_THROWS_AS((Plane{frame, std::numeric_limits<double>::infinity()}), std::invalid_argument);
}

TEST_CASE("Equatorial date circles and polar hour lines", "[engine][surface][classical]") {
    constexpr int k_seed = 114;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 1000; ++i) {
        const Angle latitude = random.degrees(-89, 89), hour_angle = random.degrees(-85, 85);
        const Angle declination = random.degrees(0.5, 23.44);
        const double elevated = latitude >= Angle{} ? 1 : -1;
        CAPTURE(k_seed, i, latitude.in_degrees());
        for (const bool summer : {true, false}) { // radius h / tan|δ|, upper face in summer, lower in winter
            const SkyPlace sun{hour_angle, declination * (summer ? elevated : -elevated)};
            const auto point = shadow(latitude, equatorial_attitude(latitude, summer), sun);
            REQUIRE(point);
            REQUIRE_THAT(std::hypot(point->u_mm, point->v_mm), WithinAbs(100 / tan(declination), 1e-8));
            REQUIRE_FALSE(shadow(latitude, equatorial_attitude(latitude, !summer), sun));
        }
        const Attitude polar{Angle::degrees(latitude >= Angle{} ? 180 : 0), Angle::degrees(90) - abs(latitude)};
        const auto point = shadow(latitude, polar, {hour_angle, declination});
        REQUIRE(point); // u = h tan H, to the right for the afternoon in the north
        REQUIRE_THAT(point->u_mm, WithinAbs(elevated * 100 * tan(hour_angle), 1e-8));
    }
}

TEST_CASE("Direct east and west walls: hour lines parallel to the axis, h cot H apart",
          "[engine][surface][classical]") {
    constexpr int k_seed = 115;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 1000; ++i) {
        const Angle latitude = random.degrees(-89, 89), hour_angle = random.degrees(5, 175);
        const Angle declination = random.degrees(-23.44, 23.44);
        CAPTURE(k_seed, i, latitude.in_degrees());
        for (const double side : {1.0, -1.0}) { // west wall in the afternoon, east wall in the morning
            const Attitude wall{Angle::degrees(side > 0 ? 270 : 90), Angle{}};
            const PlateFrame frame = frame_of(wall);
            const auto point = shadow(latitude, wall, {side * hour_angle, declination});
            REQUIRE(point);
            const Eigen::Vector3d pole = north_pole(latitude).enu;
            const double along_u = pole.dot(frame.u), along_v = pole.dot(frame.v);
            // To the right of the axis as it points north; a Sun near the south throws the shadow northwards and down.
            const double across = point->u_mm * along_v - point->v_mm * along_u;
            REQUIRE_THAT(across, WithinAbs(-side * 100 / tan(hour_angle), 1e-8));
        }
    }
}
