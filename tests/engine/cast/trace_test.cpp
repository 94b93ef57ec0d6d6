// SPDX-License-Identifier: MIT
#include "engine/cast/trace.hpp"
#include "engine/style/style.hpp"
#include "tests/engine/cast/brute_walk.hpp"
#include "tests/engine/random_plates.hpp"

#include <Eigen/Geometry>
#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::test;
using Catch::Matchers::WithinAbs;

namespace {

constexpr double k_nodus_mm = 100;

struct Dial {
    Angle latitude;
    Plane plane;
    Style style;
    GnomonEdges edges;
    Caster<Plane> caster;
    Dial(Angle phi, const Attitude& attitude, double thickness_mm = 0.0, const Skyline& skyline = {})
        : latitude{phi}, plane{frame_of(attitude), k_nodus_mm}, style{style_of(plane.frame(), k_nodus_mm, phi)},
          edges{plane.frame(), style, phi, thickness_mm}, caster{phi, plane, edges, skyline} {}
};

PlateBox window_of(RandomPlates& random) {
    const double left = random.number(-500, 300), bottom = random.number(-500, 300);
    return {left, bottom, left + random.number(50, 500), bottom + random.number(50, 500)};
}

bool inside(const PlateBox& box, PlatePoint p, double slack) {
    return p.u_mm >= box.left_mm - slack && p.u_mm <= box.right_mm + slack && p.v_mm >= box.bottom_mm - slack &&
           p.v_mm <= box.top_mm + slack;
}

/// The direction of the Sun whose shadow of the nodus falls on a point.
Eigen::Vector3d sun_of(const Dial& dial, PlatePoint p, PlatePoint foot = {}) {
    const PlateFrame& f = dial.plane.frame();
    return (k_nodus_mm * f.n - (p.u_mm - foot.u_mm) * f.u - (p.v_mm - foot.v_mm) * f.v).normalized();
}

std::string told(int seed, int i, const RandomPlate& plate) {
    std::ostringstream text;
    text.precision(17);
    text << "seed " << seed << ", case " << i << ": latitude " << plate.latitude.in_degrees() << ", normal azimuth "
         << plate.attitude.normal_azimuth.in_degrees() << ", altitude " << plate.attitude.normal_altitude.in_degrees();
    return text.str();
}

Skyline hills(RandomPlates& random) {
    std::vector<Skyline::Mark> marks;
    for (double azimuth = random.number(0, 20); azimuth < 360; azimuth += random.number(3, 40))
        marks.push_back({Angle::degrees(azimuth), random.degrees(0, 25)});
    return Skyline{marks};
}

/// Every drawn point is a true shadow, and every seen shadow inside the window is drawn.
void require_whole(const Dial& dial, const SunPath& path, const PlateBox& window) {
    const auto pieces = trace(dial.caster, path, window);
    for (const PlatePolyline& piece : pieces) {
        REQUIRE(piece.size() >= 2);
        for (const PlatePoint p : piece) {
            REQUIRE((std::isfinite(p.u_mm) && std::isfinite(p.v_mm)));
            REQUIRE(inside(window, p, 1e-6));
        }
    }
    const BruteWalk fine{dial.caster, path, window, path.steps * 20};
    // Behind hills the tracer looks four times a step (trace.hpp); elsewhere a stretch of any length is found.
    const bool flat = dial.caster.skyline().flat();
    const double missed =
        (flat ? fine : BruteWalk{dial.caster, path, window, path.steps * 4}).farthest_sample_from(pieces);
    REQUIRE(missed < 0.01);
    const double astray = fine.farthest_chord_of(pieces);
    REQUIRE(astray < 0.01);
}

} // namespace

TEST_CASE("Hour lines of a style lie on the homogeneous form, on the lit half, and are whole", "[engine][cast]") {
    constexpr int k_seed = 401;
    RandomPlates random{k_seed};
    int drawn = 0;
    for (int i = 0; i < 9000; ++i) {
        const RandomPlate plate = random.plate();
        const double thickness_mm = random.pick(2) == 0 ? 0.0 : 8.0;
        const Dial dial{plate.latitude, plate.attitude, thickness_mm};
        const Angle hour =
            random.pick(2) == 0 ? Angle::minutes_of_time(5 * random.pick(288) - 720) : random.degrees(-180, 180);
        const PlateBox window = window_of(random);
        INFO(told(k_seed, i, plate) << ", hour angle " << hour.in_degrees());
        if (!dial.caster.ever_lit(hour, {Angle::degrees(-23.44), Angle::degrees(23.44)}))
            continue;
        SunPath path = hour_path_of_style(hour);
        path.edge = dial.edges.casting(hour);
        const PlatePoint foot = dial.edges.shift(*path.edge);
        const auto pieces = trace(dial.caster, path, window);
        REQUIRE(pieces.size() <= 1);

        const PlateFrame& f = dial.plane.frame();
        const Eigen::Vector3d q = to_site({hour, Angle{}}, plate.latitude).enu;
        const Eigen::Vector3d m = north_pole(plate.latitude).enu.cross(q);
        const double mu = m.dot(f.u), mv = m.dot(f.v), mn = m.dot(f.n);
        const auto direction = hour_line_direction(f, dial.style, plate.latitude, hour);
        REQUIRE(direction);
        for (const PlatePolyline& piece : pieces) {
            ++drawn;
            REQUIRE(piece.size() == 2);
            for (const PlatePoint p : piece) {
                REQUIRE((std::isfinite(p.u_mm) && std::isfinite(p.v_mm)));
                REQUIRE(inside(window, p, 1e-9));
                const double off = (p.u_mm - foot.u_mm) * mu + (p.v_mm - foot.v_mm) * mv - k_nodus_mm * mn;
                REQUIRE_THAT(off / std::hypot(mu, mv), WithinAbs(0, 1e-6));
                REQUIRE(sun_of(dial, p, foot).dot(q) > -1e-9); // this hour's Sun, not that of 12 h on
            }
            const double du = piece[1].u_mm - piece[0].u_mm, dv = piece[1].v_mm - piece[0].v_mm;
            REQUIRE_THAT(du * cos(*direction) - dv * sin(*direction), WithinAbs(0, 1e-6));
            if (dial.style.centre) {
                const double cu = (piece[0].u_mm + piece[1].u_mm) / 2 - foot.u_mm - dial.style.centre->u_mm;
                const double cv = (piece[0].v_mm + piece[1].v_mm) / 2 - foot.v_mm - dial.style.centre->v_mm;
                REQUIRE(cu * sin(*direction) + cv * cos(*direction) > 0);
            }
        }
        const BruteWalk brute{dial.caster, path, window, 4000};
        REQUIRE(brute.farthest_sample_from(pieces) < 1e-5);
    }
    CHECK(drawn > 1000);
}

TEST_CASE("Date lines are whole and true to a hundredth of a millimetre", "[engine][cast]") {
    constexpr int k_seed = 402;
    RandomPlates random{k_seed};
    for (int i = 0; i < 600; ++i) {
        const RandomPlate plate = random.plate();
        const Dial dial{plate.latitude, plate.attitude, random.pick(2) == 0 ? 0.0 : 8.0,
                        random.pick(3) == 0 ? hills(random) : Skyline{}};
        const Angle declination = random.pick(4) == 0 ? Angle{} : random.degrees(-23.44, 23.44);
        const PlateBox window = window_of(random);
        INFO(told(k_seed, i, plate) << ", declination " << declination.in_degrees());
        require_whole(dial, declination_path(declination), window);
    }
}

TEST_CASE("A vertex of a date line is the shadow of a seen Sun of its date", "[engine][cast]") {
    constexpr int k_seed = 403;
    RandomPlates random{k_seed};
    for (int i = 0; i < 600; ++i) {
        const RandomPlate plate = random.plate();
        const Dial dial{plate.latitude, plate.attitude};
        const Angle declination = random.degrees(-23.44, 23.44);
        INFO(told(k_seed, i, plate) << ", declination " << declination.in_degrees());
        for (const PlatePolyline& piece : trace(dial.caster, declination_path(declination), window_of(random)))
            for (const PlatePoint p : piece) {
                const Eigen::Vector3d sun = sun_of(dial, p);
                REQUIRE(sun.dot(dial.plane.frame().n) > 0);
                REQUIRE(sun.z() > -1e-12);
                REQUIRE_THAT(sun.dot(north_pole(plate.latitude).enu), WithinAbs(sin(declination), 1e-12));
            }
    }
}

TEST_CASE("Clock-time curves are whole and true to a hundredth of a millimetre", "[engine][cast]") {
    constexpr int k_seed = 404;
    RandomPlates random{k_seed};
    const MeanYear year{2025, 2044};
    for (int i = 0; i < 300; ++i) {
        const RandomPlate plate = random.plate();
        const Dial dial{plate.latitude, plate.attitude, random.pick(2) == 0 ? 0.0 : 8.0,
                        random.pick(3) == 0 ? hills(random) : Skyline{}};
        const Angle hour = random.degrees(-120, 120);
        const PlateBox window = window_of(random);
        INFO(told(k_seed, i, plate) << ", mean hour angle " << hour.in_degrees());
        require_whole(dial, mean_time_path(hour, year, -10, -10 + year.length_days()), window);
    }
}

TEST_CASE("Nodus hour lines are whole, behind hills too", "[engine][cast]") {
    constexpr int k_seed = 405;
    RandomPlates random{k_seed};
    for (int i = 0; i < 2000; ++i) {
        const RandomPlate plate = random.plate();
        const Dial dial{plate.latitude, plate.attitude, 0.0, random.pick(2) == 0 ? hills(random) : Skyline{}};
        const Angle hour = random.degrees(-140, 140);
        const PlateBox window = window_of(random);
        INFO(told(k_seed, i, plate) << ", hour angle " << hour.in_degrees());
        require_whole(dial, hour_path_of_nodus(hour, {Angle::degrees(-23.44), Angle::degrees(23.44)}), window);
    }
}

TEST_CASE("A date line that only grazes the window is drawn", "[engine][cast]") {
    const Dial dial{Angle::degrees(50), {}};
    const Angle declination = Angle::degrees(-20);
    const double crown = 100 * tan(Angle::degrees(70)); // the noon shadow, north of the foot: the line's nearest point
    for (const double depth_mm : {0.02, 0.1, 0.5, 2.0})
        for (const double shift_mm : {0.0, 0.7, 1.9, 3.1}) {
            const PlateBox window{-300 + shift_mm, -100, 300 + shift_mm, crown + depth_mm};
            CAPTURE(depth_mm, shift_mm);
            const auto pieces = trace(dial.caster, declination_path(declination), window);
            REQUIRE(pieces.size() == 1);
            REQUIRE_THAT(pieces.front().front().v_mm, WithinAbs(crown + depth_mm, 1e-6));
            REQUIRE_THAT(pieces.front().back().v_mm, WithinAbs(crown + depth_mm, 1e-6));
        }
}

TEST_CASE("The noon gap parts every date line, the equinox's too", "[engine][cast]") {
    const Dial dial{Angle::degrees(50), {}, 8.0};
    for (const double degrees : {-15.0, 0.0, 15.0}) {
        const auto pieces = trace(dial.caster, declination_path(Angle::degrees(degrees)), {-200, -200, 200, 300});
        CAPTURE(degrees);
        REQUIRE(pieces.size() == 2);
        CHECK_THAT(pieces[0].back().u_mm, WithinAbs(-4, 1e-6));
        CHECK_THAT(pieces[1].front().u_mm, WithinAbs(4, 1e-6));
    }
    CHECK(trace(Dial{Angle::degrees(50), {}}.caster, declination_path(Angle{}), {-200, -200, 200, 300}).size() == 1);
}

TEST_CASE("A hill hides its part of a date line", "[engine][cast]") {
    // A hill 40° high from azimuth 170° to 190°; the equinox Sun at 50° N stands 40° high at noon.
    const Skyline hill{{{Angle::degrees(169), Angle{}},
                        {Angle::degrees(170), Angle::degrees(60)},
                        {Angle::degrees(190), Angle::degrees(60)},
                        {Angle::degrees(191), Angle{}}}};
    const Dial dial{Angle::degrees(50), {}, 0.0, hill};
    for (const double degrees : {0.0, 5.0}) {
        const auto pieces = trace(dial.caster, declination_path(Angle::degrees(degrees)), {-200, -200, 200, 300});
        CAPTURE(degrees);
        REQUIRE(pieces.size() == 2);
        const PlatePoint before = pieces[0].back(), after = pieces[1].front();
        const SiteDirection last_seen{sun_of(dial, before)};
        CHECK_THAT(last_seen.altitude().in_degrees(),
                   WithinAbs(hill.altitude_at(last_seen.azimuth()).in_degrees(), 1e-6));
        CHECK_THAT(before.u_mm, WithinAbs(-after.u_mm, 1e-6));
    }
}
