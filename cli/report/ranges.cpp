// SPDX-License-Identifier: MIT
#include "cli/report/ranges.hpp"
#include "cli/design/quantity.hpp"
#include "cli/report/say.hpp"

#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {

Angle to_minutes(double degrees) {
    return Angle::degrees(std::round(degrees * 60) / 60);
}

std::string say_arc(double degrees) {
    const long minutes = std::lround(std::abs(degrees) * 60);
    if (minutes < 60)
        return fmt::format("{}'", minutes);
    return minutes % 60 == 0 ? fmt::format("{}°", minutes / 60) : fmt::format("{}° {}'", minutes / 60, minutes % 60);
}

std::string say_give(double range_deg) {
    return "± " + say_arc(std::max(1.0, std::ceil(range_deg * 60 - 1e-6)) / 60);
}

std::string say_facing(const Found& azimuth_deg) {
    return bearing_text(to_minutes(azimuth_deg.value)) + " " + say_give(azimuth_deg.range);
}

std::string say_lean(const Found& lean_deg) {
    return lean_text(to_minutes(lean_deg.value)) + " " + say_give(lean_deg.range);
}

std::string say_seconds(double seconds) {
    const long whole = std::lround(std::abs(seconds));
    if (whole < 60)
        return fmt::format("{} s", whole);
    if (whole >= 3600)
        return fmt::format("{} h {} min", whole / 3600, whole % 3600 / 60);
    return whole % 60 == 0 ? fmt::format("{} min", whole / 60) : fmt::format("{} min {} s", whole / 60, whole % 60);
}

std::string say_decimal(const Found& degrees) {
    return fmt::format("{}° ± {}°", fixed(degrees.value, 2), fixed(std::max(0.01, degrees.range), 2));
}

std::string say_signed(double value, int decimals) {
    return fmt::format("{}{}", value >= 0 ? "+" : "", fixed(value, decimals));
}

std::string with_capital(const std::string& text) {
    std::string made = text;
    if (!made.empty() && made[0] >= 'a' && made[0] <= 'z')
        made[0] = static_cast<char>(made[0] - 'a' + 'A');
    return made;
}

} // namespace dialwright::cli
