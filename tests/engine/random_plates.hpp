// SPDX-License-Identifier: MIT
#pragma once

#include "engine/surface/plate_frame.hpp"

#include <array>
#include <cmath>
#include <cstdint>
#include <random>

namespace dialwright::test {

struct RandomPlate {
    Angle latitude;
    Attitude attitude;
};

/// Random cases from a seed; a test prints the seed with what fails.
class RandomPlates {
  public:
    explicit RandomPlates(std::uint64_t seed) : engine_{seed} {}

    double number(double low, double high) { return std::uniform_real_distribution<double>{low, high}(engine_); }
    Angle degrees(double low, double high) { return Angle::degrees(number(low, high)); }
    int pick(int count) { return std::uniform_int_distribution<int>{0, count - 1}(engine_); }

    /// Any latitude; one in three is a cardinal one, exact to the last bit.
    Angle latitude() {
        constexpr std::array k_cardinal{0.0, 90.0, -90.0, 23.44, -23.44, 66.56, -66.56, 40.0, 54.0, -33.0};
        return pick(3) == 0 ? Angle::degrees(k_cardinal[std::size_t(pick(int(k_cardinal.size())))]) : degrees(-90, 90);
    }

    /// Plates of every kind that the trade knows, and any other.
    RandomPlate plate() {
        const Angle phi = latitude();
        const Angle south = Angle::degrees(phi >= Angle{} ? 180 : 0); // away from the elevated pole
        switch (pick(9)) {
        case 0: // level, face up
            return {phi, {degrees(0, 360), Angle::degrees(90)}};
        case 1: // level, face down: a ceiling
            return {phi, {degrees(0, 360), Angle::degrees(-90)}};
        case 2: // upright, facing exactly north, east, south or west
            return {phi, {Angle::degrees(90.0 * pick(4)), Angle{}}};
        case 3: // upright, any way
            return {phi, {degrees(0, 360), Angle{}}};
        case 4: // polar
            return {phi, {south, Angle::degrees(90) - abs(phi)}};
        case 5: // equatorial, either face
            return {phi, equatorial_attitude(phi, pick(2) == 0)};
        case 6: // a great decliner: the style all but parallel to the wall
            return great_decliner();
        case 7: // leaning back or overhanging, facing exactly north, east, south or west
            return {phi, {Angle::degrees(90.0 * pick(4)), degrees(-89, 89)}};
        default:
            return {phi, {degrees(0, 360), degrees(-90, 90)}};
        }
    }

    /// An upright wall whose style height is 1e-6° to 0.1°: sin SH = cos d cos φ.
    RandomPlate great_decliner() {
        const Angle phi = degrees(-80, 80);
        const Angle height = Angle::degrees(std::pow(10.0, number(-6, -1)));
        const Angle declination = arc_cosine(sin(height) / cos(phi)) * (pick(2) == 0 ? 1.0 : -1.0);
        return {phi, {(Angle::degrees(180) + declination).positive_turn(), Angle{}}};
    }

  private:
    std::mt19937_64 engine_;
};

} // namespace dialwright::test
