// SPDX-License-Identifier: MIT
//
// The plane dial of Meeus, Astronomical Algorithms (2nd ed., 1998), ch. 58, whole and from memory: its general formulas
// and its special cases as a second route to every shadow, against the engine's vectors.
//
// There D is the azimuth of the plate's normal from south, westward positive; z its zenith distance; a the height of the
// straight stylus; x runs to the right along the horizontal, y up the steepest slope, from the foot of the stylus.
#include "engine/style/style.hpp"
#include "engine/surface/plane.hpp"
#include "tests/engine/random_plates.hpp"

#include <catch2/catch.hpp>

#include <sstream>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

namespace {

#ifdef DIALWRIGHT_FEWER_CASES
constexpr int k_plates = 500;
#else
constexpr int k_plates = 5000;
#endif
constexpr double k_stylus_mm = 100;

struct PlaneDial {
    double phi, d, z; ///< radians
    double p;         ///< the sine of the polar stylus' angle with the plate, with a sign

    explicit PlaneDial(const test::RandomPlate& plate)
        : phi{plate.latitude.in_radians()}, d{(plate.attitude.normal_azimuth - Angle::degrees(180)).in_radians()},
          z{(Angle::degrees(90) - plate.attitude.normal_altitude).in_radians()} {
        // A level plate has no steepest slope: x to the east and y to the north, or seen from below to the west.
        if (std::abs(std::sin(z)) < 1e-7)
            d = z < 1 ? 0 : Angle::degrees(180).in_radians();
        p = std::sin(phi) * std::cos(z) - std::cos(phi) * std::sin(z) * std::cos(d);
    }

    /// Positive where the Sun lights the plate.
    [[nodiscard]] double q(double hour, double tan_declination) const {
        return std::sin(d) * std::sin(z) * std::sin(hour) +
               (std::cos(phi) * std::cos(z) + std::sin(phi) * std::sin(z) * std::cos(d)) * std::cos(hour) +
               p * tan_declination;
    }
    [[nodiscard]] double n_x(double hour, double tan_declination) const {
        return std::cos(d) * std::sin(hour) -
               std::sin(d) * (std::sin(phi) * std::cos(hour) - std::cos(phi) * tan_declination);
    }
    [[nodiscard]] double n_y(double hour, double tan_declination) const {
        return std::cos(z) * std::sin(d) * std::sin(hour) -
               (std::cos(phi) * std::sin(z) - std::sin(phi) * std::cos(z) * std::cos(d)) * std::cos(hour) -
               (std::sin(phi) * std::sin(z) + std::cos(phi) * std::cos(z) * std::cos(d)) * tan_declination;
    }
    [[nodiscard]] PlatePoint shadow(double hour, double tan_declination) const {
        const double by_q = k_stylus_mm / q(hour, tan_declination);
        return {by_q * n_x(hour, tan_declination), by_q * n_y(hour, tan_declination)};
    }
    [[nodiscard]] PlatePoint centre() const {
        return {k_stylus_mm / p * std::cos(phi) * std::sin(d),
                -k_stylus_mm / p * (std::sin(phi) * std::sin(z) + std::cos(phi) * std::cos(z) * std::cos(d))};
    }
};

/// The engine's shadow must be `expected`, as near as two sums of doubles can be so far from the foot.
void check_same(const std::optional<PlatePoint>& shadow, PlatePoint expected) {
    REQUIRE(shadow.has_value());
    const double far = 1 + std::hypot(expected.u_mm, expected.v_mm) / k_stylus_mm;
    REQUIRE_THAT(shadow->u_mm, WithinAbs(expected.u_mm, 1e-11 * k_stylus_mm * far * far));
    REQUIRE_THAT(shadow->v_mm, WithinAbs(expected.v_mm, 1e-11 * k_stylus_mm * far * far));
}

std::string told(std::uint64_t seed, int i, const test::RandomPlate& plate) {
    std::ostringstream text;
    text.precision(17);
    text << "seed " << seed << ", case " << i << ": latitude " << plate.latitude.in_degrees() << ", normal azimuth "
         << plate.attitude.normal_azimuth.in_degrees() << ", altitude " << plate.attitude.normal_altitude.in_degrees();
    return text.str();
}

/// Suns of the year and, for the formulas' own sake, of any declination; hour by hour of the whole turn.
template <class Check>
void for_suns(test::RandomPlates& random, Check check) {
    for (int k = 0; k < 12; ++k) {
        const Angle hour = k < 3 ? Angle::hours(random.pick(24) - 12) : random.degrees(-180, 180);
        const Angle declination = k % 4 == 3 ? random.degrees(-80, 80) : random.degrees(-23.44, 23.44);
        INFO("hour angle " << hour.in_degrees() << ", declination " << declination.in_degrees());
        check(hour, declination);
    }
}

} // namespace

TEST_CASE("Meeus' plane dial: shadow, light, centre and polar stylus of any plate", "[engine][published]") {
    constexpr std::uint64_t k_seed = 5801;
    test::RandomPlates random{k_seed};
    int shadows = 0, centres = 0;
    for (int i = 0; i < k_plates; ++i) {
        const test::RandomPlate plate = random.plate();
        INFO(told(k_seed, i, plate));
        const PlaneDial dial{plate};
        const Plane plane{frame_of(plate.attitude), k_stylus_mm};
        for_suns(random, [&](Angle hour, Angle declination) {
            const SiteDirection sun = to_site({hour, declination}, plate.latitude);
            const double tan_declination = sin(declination) / cos(declination);
            const double q = dial.q(hour.in_radians(), tan_declination);
            // The light is Q cos δ.
            REQUIRE_THAT(plane.light(sun), WithinAbs(q * cos(declination), 1e-12));
            if (q < 1e-4) // grazing or unlit
                return;
            ++shadows;
            check_same(plane.shadow_of_nodus(sun), dial.shadow(hour.in_radians(), tan_declination));
        });
        const Style style = style_of(plane.frame(), k_stylus_mm, plate.latitude);
        REQUIRE_THAT(sin(style.height), WithinAbs(std::abs(dial.p), 1e-12));
        if (std::abs(dial.p) < 1e-4) {
            if (std::abs(dial.p) < 1e-9)
                REQUIRE_FALSE(style.centre.has_value());
            continue;
        }
        ++centres;
        check_same(style.centre, dial.centre());
        // The polar stylus is a / |P| long.
        const double length = std::hypot(style.centre->u_mm, style.centre->v_mm, k_stylus_mm);
        REQUIRE_THAT(length * std::abs(dial.p), WithinAbs(k_stylus_mm, 1e-8 * length));
    }
    CHECK(shadows > 3 * k_plates);
    CHECK(centres > k_plates / 2);
}

TEST_CASE("Meeus' equatorial dial: x = −a sin H / tan δ, y = ∓a cos H / tan δ", "[engine][published]") {
    constexpr std::uint64_t k_seed = 5802;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < k_plates / 10; ++i) {
        const Angle phi = random.degrees(0.01, 89.99);
        const bool northern = random.pick(2) == 0;
        const test::RandomPlate plate{phi, equatorial_attitude(phi, northern)};
        INFO(told(k_seed, i, plate));
        const Plane plane{frame_of(plate.attitude), k_stylus_mm};
        for_suns(random, [&](Angle hour, Angle declination) {
            const double tan_declination = sin(declination) / cos(declination);
            if ((northern ? tan_declination : -tan_declination) < 1e-3)
                return;
            check_same(plane.shadow_of_nodus(to_site({hour, declination}, phi)),
                       {-k_stylus_mm * sin(hour) / tan_declination,
                        (northern ? -1 : 1) * k_stylus_mm * cos(hour) / tan_declination});
        });
        const Style style = style_of(plane.frame(), k_stylus_mm, phi);
        REQUIRE_THAT(style.height.in_degrees(), WithinAbs(90, 1e-5));
        REQUIRE(std::hypot(style.centre.value().u_mm, style.centre->v_mm) < 1e-9);
    }
}

TEST_CASE("Meeus' horizontal dial", "[engine][published]") {
    constexpr std::uint64_t k_seed = 5803;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < k_plates / 10; ++i) {
        const test::RandomPlate plate{random.latitude(), {}};
        INFO(told(k_seed, i, plate));
        const double sin_phi = sin(plate.latitude), cos_phi = cos(plate.latitude);
        const Plane plane{frame_of(plate.attitude), k_stylus_mm};
        for_suns(random, [&](Angle hour, Angle declination) {
            const double tan_declination = sin(declination) / cos(declination);
            const double q = cos_phi * cos(hour) + sin_phi * tan_declination;
            if (q < 1e-4)
                return;
            check_same(
                plane.shadow_of_nodus(to_site({hour, declination}, plate.latitude)),
                {k_stylus_mm * sin(hour) / q, k_stylus_mm * (sin_phi * cos(hour) - cos_phi * tan_declination) / q});
        });
        if (abs(plate.latitude) < Angle::degrees(0.1))
            continue;
        const Style style = style_of(plane.frame(), k_stylus_mm, plate.latitude);
        REQUIRE_THAT(style.height.in_degrees(), WithinAbs(std::abs(plate.latitude.in_degrees()), 1e-5));
        check_same(style.centre, {0, -k_stylus_mm * cos_phi / sin_phi});
    }
}

TEST_CASE("Meeus' vertical dial", "[engine][published]") {
    constexpr std::uint64_t k_seed = 5804;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < k_plates / 10; ++i) {
        const Angle from_south = random.pick(4) == 0 ? Angle::degrees(90.0 * random.pick(4)) : random.degrees(0, 360);
        const test::RandomPlate plate{random.latitude(), {(from_south + Angle::degrees(180)).positive_turn(), Angle{}}};
        INFO(told(k_seed, i, plate));
        const double sin_phi = sin(plate.latitude), cos_phi = cos(plate.latitude);
        const double sin_d = sin(from_south), cos_d = cos(from_south);
        const Plane plane{frame_of(plate.attitude), k_stylus_mm};
        for_suns(random, [&](Angle hour, Angle declination) {
            const double tan_declination = sin(declination) / cos(declination);
            const double q = sin_d * sin(hour) + sin_phi * cos_d * cos(hour) - cos_phi * cos_d * tan_declination;
            if (q < 1e-4)
                return;
            check_same(
                plane.shadow_of_nodus(to_site({hour, declination}, plate.latitude)),
                {k_stylus_mm * (cos_d * sin(hour) - sin_d * (sin_phi * cos(hour) - cos_phi * tan_declination)) / q,
                 -k_stylus_mm * (cos_phi * cos(hour) + sin_phi * tan_declination) / q});
        });
        if (std::abs(cos_phi * cos_d) < 1e-3)
            continue;
        const Style style = style_of(plane.frame(), k_stylus_mm, plate.latitude);
        REQUIRE_THAT(sin(style.height), WithinAbs(std::abs(cos_phi * cos_d), 1e-12));
        check_same(style.centre, {-k_stylus_mm * sin_d / cos_d, k_stylus_mm * sin_phi / (cos_phi * cos_d)});
    }
}
