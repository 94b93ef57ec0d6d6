// SPDX-License-Identifier: MIT
#include "engine/style/style.hpp"
#include "tests/engine/random_plates.hpp"

#include <Eigen/Geometry>
#include <catch2/catch.hpp>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

namespace {

constexpr double k_nodus_mm = 100;

struct Dial {
    Angle latitude;
    PlateFrame frame;
    Style style;
    Dial(Angle phi, const Attitude& attitude)
        : latitude{phi}, frame{frame_of(attitude)}, style{style_of(frame, k_nodus_mm, phi)} {}
    /// From the centre, clockwise from +v.
    [[nodiscard]] Angle line(Angle hour_angle) const {
        const auto direction = hour_line_direction(frame, style, latitude, hour_angle);
        REQUIRE(direction);
        return *direction;
    }
};

/// Degrees between two directions.
double apart(Angle a, Angle b) {
    return std::abs((a - b).signed_turn().in_degrees());
}

const Attitude k_level{};
Attitude wall(Angle declination_west_of_south) {
    return {Angle::degrees(180) + declination_west_of_south, Angle{}};
}

} // namespace

TEST_CASE("Level and direct south dials by the classical formulas", "[engine][style][classical]") {
    constexpr int k_seed = 201;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 2000; ++i) {
        const Angle phi = random.degrees(0.5, 89.5), hour_angle = random.degrees(-179, 179);
        CAPTURE(k_seed, i, phi.in_degrees(), hour_angle.in_degrees());
        const Dial level{phi, k_level}; // tan X = sin φ tan H
        const Angle x = arc_tangent(sin(phi) * sin(hour_angle), cos(hour_angle));
        REQUIRE_THAT(apart(level.line(hour_angle), x), WithinAbs(0, 1e-10));
        REQUIRE_THAT(level.style.height.in_degrees(), WithinAbs(phi.in_degrees(), 1e-12));
        REQUIRE_THAT(apart(level.style.substyle, Angle{}), WithinAbs(0, 1e-10));
        const Dial south{phi, wall(Angle{})}; // tan X = cos φ tan H, from the plumb line, west hours to the left
        const Angle y = arc_tangent(cos(phi) * sin(hour_angle), cos(hour_angle));
        REQUIRE_THAT(apart(south.line(hour_angle), Angle::degrees(180) - y), WithinAbs(0, 1e-10));
        REQUIRE_THAT(south.style.height.in_degrees(), WithinAbs(90 - phi.in_degrees(), 1e-12));
        // A level dial is the south wall of the co-latitude.
        const Dial other{Angle::degrees(90) - phi, wall(Angle{})};
        REQUIRE_THAT(apart(level.line(hour_angle), Angle::degrees(180) - other.line(hour_angle)), WithinAbs(0, 1e-10));
    }
}

TEST_CASE("Declining walls by the classical formulas", "[engine][style][classical]") {
    constexpr int k_seed = 202;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 5000; ++i) {
        const Angle phi = random.degrees(0.5, 89.5), d = random.degrees(-89.9, 89.9);
        const Angle hour_angle = random.degrees(-179, 179);
        CAPTURE(k_seed, i, phi.in_degrees(), d.in_degrees(), hour_angle.in_degrees());
        const Dial dial{phi, wall(d)};
        // cot X = (cos d cot H + sin d sin φ)/cos φ; afternoon lines to the right of the plumb line
        const Angle x =
            arc_tangent(cos(phi) * sin(hour_angle), cos(d) * cos(hour_angle) + sin(d) * sin(phi) * sin(hour_angle));
        REQUIRE_THAT(apart(dial.line(hour_angle), Angle::degrees(180) - x), WithinAbs(0, 1e-9));
        // sin SH = cos d cos φ; tan SD = sin d cot φ; tan DL = tan d / sin φ
        REQUIRE_THAT(sin(dial.style.height), WithinAbs(cos(d) * cos(phi), 1e-14));
        const Angle substyle = arc_tangent(sin(d) * cos(phi), sin(phi)); // to the right for a wall west of south
        REQUIRE_THAT(apart(dial.style.substyle, Angle::degrees(180) - substyle), WithinAbs(0, 1e-8));
        const Angle difference = arc_tangent(sin(d), cos(d) * sin(phi));
        REQUIRE_THAT(apart(dial.style.substyle_hour_angle, difference), WithinAbs(0, 1e-8));
    }
}

TEST_CASE("Equatorial plates: 15 degrees an hour", "[engine][style][classical]") {
    for (const double degrees : {90.0, 54.0, 10.0, -10.0, -33.0, -90.0})
        for (const bool summer : {true, false}) {
            const Dial dial{Angle::degrees(degrees), equatorial_attitude(Angle::degrees(degrees), summer)};
            CAPTURE(degrees, summer);
            CHECK_THAT(dial.style.height.in_degrees(), WithinAbs(90, 1e-6));
            REQUIRE(dial.style.centre);
            CHECK_THAT(std::hypot(dial.style.centre->u_mm, dial.style.centre->v_mm), WithinAbs(0, 1e-9));
            for (int minute = -1440; minute < 1440; minute += 5) {
                const Angle step =
                    dial.line(Angle::minutes_of_time(minute + 5)) - dial.line(Angle::minutes_of_time(minute));
                const bool clockwise = (degrees > 0) == summer; // as its reader sees it
                CHECK_THAT(step.signed_turn().in_degrees(), WithinAbs(clockwise ? 1.25 : -1.25, 1e-10));
            }
        }
}

TEST_CASE("The style runs through centre and nodus along the Earth's axis", "[engine][style]") {
    constexpr int k_seed = 203;
    test::RandomPlates random{k_seed};
    int at_infinity = 0;
    for (int i = 0; i < 5000; ++i) {
        const auto [phi, attitude] = random.plate();
        const Dial dial{phi, attitude};
        CAPTURE(k_seed, i, phi.in_degrees(), attitude.normal_azimuth.in_degrees(),
                attitude.normal_altitude.in_degrees());
        REQUIRE_THAT(std::abs(dial.style.towards_nodus.dot(north_pole(phi).enu)), WithinAbs(1, 1e-14));
        REQUIRE(dial.style.towards_nodus.dot(dial.frame.n) > -1e-12);
        REQUIRE((dial.style.height >= Angle{} && dial.style.height <= Angle::degrees(90)));
        REQUIRE((dial.style.substyle >= Angle{} && dial.style.substyle < Angle::degrees(360)));
        REQUIRE(std::isfinite(dial.style.substyle_hour_angle.in_degrees()));
        if (!dial.style.centre) {
            ++at_infinity;
            REQUIRE(tan(dial.style.height) <= k_nodus_mm / k_centre_at_infinity_mm * 1.000001);
            continue;
        }
        const Eigen::Vector3d rise =
            k_nodus_mm * dial.frame.n - dial.style.centre->u_mm * dial.frame.u - dial.style.centre->v_mm * dial.frame.v;
        REQUIRE((rise.normalized() - dial.style.towards_nodus).norm() < 1e-9);
    }
    CHECK(at_infinity > 100);
}

TEST_CASE("The substyle's hour is that of the Sun in the style's plane", "[engine][style]") {
    constexpr int k_seed = 204;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 2000; ++i) {
        const auto [phi, attitude] = random.plate();
        const Dial dial{phi, attitude};
        if (dial.style.height > Angle::degrees(89.99))
            continue;
        const Eigen::Vector3d sun = to_site({dial.style.substyle_hour_angle, Angle{}}, phi).enu;
        CAPTURE(k_seed, i);
        REQUIRE(sun.dot(dial.frame.n) > 0);
        REQUIRE_THAT(sun.dot(dial.frame.n.cross(dial.style.towards_nodus)), WithinAbs(0, 1e-9));
        REQUIRE_THAT(apart(dial.line(dial.style.substyle_hour_angle), dial.style.substyle), WithinAbs(0, 1e-6));
    }
}

TEST_CASE("The two faces of one slab carry the same half-lines, each lit when the other is not",
          "[engine][style][law]") {
    constexpr int k_seed = 205;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 5000; ++i) {
        const auto [phi, attitude] = random.plate();
        const Attitude back{(attitude.normal_azimuth + Angle::degrees(180)).positive_turn(), -attitude.normal_altitude};
        const Dial front_dial{phi, attitude}, back_dial{phi, back};
        const Angle hour_angle = random.degrees(-180, 180);
        const Eigen::Vector3d sun = to_site({hour_angle, random.degrees(-23.44, 23.44)}, phi).enu;
        CAPTURE(k_seed, i, phi.in_degrees(), attitude.normal_azimuth.in_degrees(),
                attitude.normal_altitude.in_degrees());
        if (std::abs(sun.dot(front_dial.frame.n)) > 1e-12)
            REQUIRE((sun.dot(front_dial.frame.n) > 0) != (sun.dot(back_dial.frame.n) > 0));
        // A plate whose style is all but parallel to it counts the elevated pole's end as the outer one on both faces.
        if (front_dial.style.height < Angle::degrees(1e-9) ||
            !hour_line_direction(front_dial.frame, front_dial.style, phi, hour_angle))
            continue;
        const auto in_space = [hour_angle](const Dial& dial) {
            const Angle line = dial.line(hour_angle);
            return Eigen::Vector3d(sin(line) * dial.frame.u + cos(line) * dial.frame.v);
        };
        REQUIRE((in_space(front_dial) - in_space(back_dial)).norm() < 1e-5);
    }
}

TEST_CASE("An hour whose Sun stays in the plate's own plane has no line", "[engine][style]") {
    const Dial east{Angle::degrees(54), {Angle::degrees(90), Angle{}}};
    CHECK_FALSE(hour_line_direction(east.frame, east.style, east.latitude, Angle{}));
    CHECK(hour_line_direction(east.frame, east.style, east.latitude, Angle::hours(-1)));
}
