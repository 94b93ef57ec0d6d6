// SPDX-License-Identifier: MIT
#include "layout/text/figures.hpp"

#include <cmath>
#include <fmt/format.h>
#include <numeric>

namespace dialwright::layout {

std::string fixed(double value, int decimals) {
    std::string text = fmt::format("{:.{}f}", value, decimals);
    if (text.starts_with('-') && text.find_first_not_of("-0.") == std::string::npos)
        text.erase(0, 1);
    return text;
}

std::string degrees_minutes(Angle angle) {
    const double tenths = std::round(std::abs(angle.in_degrees()) * 600.0);
    const char* sign = angle < Angle{} && tenths > 0 ? "-" : "";
    return fmt::format("{}{:.0f}° {:04.1f}'", sign, std::floor(tenths / 600.0), std::fmod(tenths, 600.0) / 10.0);
}

std::string sixty_fourths(double mm) {
    const long count = std::lround(std::abs(mm) / 25.4 * 64);
    const long whole = count / 64, left = count % 64;
    std::string text = mm < 0 && count > 0 ? "-" : "";
    if (whole > 0 || left == 0)
        text += fmt::format("{}", whole);
    if (left > 0) {
        const long common = std::gcd(left, 64L);
        text += fmt::format("{}{}/{}", whole > 0 ? " " : "", left / common, 64 / common);
    }
    return text;
}

std::string bare_length(double mm, bool inches) {
    return inches ? sixty_fourths(mm) : fixed(mm, 1);
}

std::string say_length(double mm, bool inches) {
    const std::string metric = fixed(mm, 1) + " mm";
    return inches ? fmt::format("{} ({} in)", metric, sixty_fourths(mm)) : metric;
}

} // namespace dialwright::layout
