// SPDX-License-Identifier: MIT
#pragma once

#include <cmath>
#include <compare>
#include <numbers>

namespace dialwright {

/// An angle. Holds radians, and gives them only where they are asked for by name, so that degrees, hours and radians
/// never meet by accident. Hour angles and the equation of time are angles too: 1 h = 15°.
class Angle {
  public:
    constexpr Angle() = default;

    static constexpr Angle radians(double value) { return Angle{value}; }
    static constexpr Angle degrees(double value) { return Angle{value * (std::numbers::pi / 180.0)}; }
    static constexpr Angle arcseconds(double value) { return Angle::degrees(value / 3600.0); }
    static constexpr Angle hours(double value) { return Angle::degrees(value * 15.0); }
    static constexpr Angle minutes_of_time(double value) { return Angle::degrees(value * 0.25); }

    [[nodiscard]] constexpr double in_radians() const { return radians_; }
    [[nodiscard]] constexpr double in_degrees() const { return radians_ * (180.0 / std::numbers::pi); }
    [[nodiscard]] constexpr double in_arcseconds() const { return in_degrees() * 3600.0; }
    [[nodiscard]] constexpr double in_hours() const { return in_degrees() / 15.0; }
    [[nodiscard]] constexpr double in_minutes_of_time() const { return in_degrees() * 4.0; }

    /// The same direction in [−180°, 180°).
    [[nodiscard]] Angle signed_turn() const {
        const double turn = 2.0 * std::numbers::pi;
        double left = radians_ - turn * std::floor((radians_ + std::numbers::pi) / turn);
        return Angle{left >= std::numbers::pi ? left - turn : left};
    }
    /// The same direction in [0°, 360°).
    [[nodiscard]] Angle positive_turn() const {
        const double turn = 2.0 * std::numbers::pi;
        double left = radians_ - turn * std::floor(radians_ / turn);
        return Angle{left >= turn ? 0.0 : left};
    }

    constexpr Angle operator-() const { return Angle{-radians_}; }
    constexpr Angle& operator+=(Angle other) {
        radians_ += other.radians_;
        return *this;
    }
    constexpr Angle& operator-=(Angle other) {
        radians_ -= other.radians_;
        return *this;
    }
    friend constexpr Angle operator+(Angle a, Angle b) { return Angle{a.radians_ + b.radians_}; }
    friend constexpr Angle operator-(Angle a, Angle b) { return Angle{a.radians_ - b.radians_}; }
    friend constexpr Angle operator*(Angle a, double factor) { return Angle{a.radians_ * factor}; }
    friend constexpr Angle operator*(double factor, Angle a) { return a * factor; }
    friend constexpr Angle operator/(Angle a, double divisor) { return Angle{a.radians_ / divisor}; }
    friend constexpr double operator/(Angle a, Angle b) { return a.radians_ / b.radians_; }
    friend constexpr auto operator<=>(Angle, Angle) = default;

  private:
    constexpr explicit Angle(double radians) : radians_{radians} {}
    double radians_ = 0.0;
};

[[nodiscard]] inline double sin(Angle a) {
    return std::sin(a.in_radians());
}
[[nodiscard]] inline double cos(Angle a) {
    return std::cos(a.in_radians());
}
[[nodiscard]] inline double tan(Angle a) {
    return std::tan(a.in_radians());
}
[[nodiscard]] inline Angle abs(Angle a) {
    return Angle::radians(std::abs(a.in_radians()));
}
[[nodiscard]] inline Angle arc_sine(double value) {
    return Angle::radians(std::asin(std::fmin(1.0, std::fmax(-1.0, value))));
}
[[nodiscard]] inline Angle arc_cosine(double value) {
    return Angle::radians(std::acos(std::fmin(1.0, std::fmax(-1.0, value))));
}
[[nodiscard]] inline Angle arc_tangent(double y, double x) {
    return Angle::radians(std::atan2(y, x));
}

} // namespace dialwright
