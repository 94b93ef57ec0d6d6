// SPDX-License-Identifier: MIT
#include "layout/text/figures.hpp"

#include <array>
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

bool append_fixed(std::string& text, double value, int decimals, int least) {
    // From one whole number, because there are a hundred thousand of them in a packet.
    static constexpr std::array<double, 11> k_tens{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10};
    const double scaled = value * k_tens.at(static_cast<std::size_t>(decimals));
    if (!(std::abs(scaled) < 9e15))
        return false;
    const long long whole = std::llrint(scaled); // as printf rounds
    std::array<char, 24> digits{};
    char* const end = digits.data() + digits.size();
    char* at = end;
    int left = decimals;
    auto rest = static_cast<unsigned long long>(whole < 0 ? -whole : whole);
    for (; left > least && rest % 10 == 0; --left)
        rest /= 10;
    for (int i = left; i > 0; --i, rest /= 10)
        *--at = static_cast<char>('0' + rest % 10);
    if (left > 0)
        *--at = '.';
    do
        *--at = static_cast<char>('0' + rest % 10);
    while ((rest /= 10) > 0);
    if (whole < 0)
        *--at = '-';
    text.append(at, static_cast<std::size_t>(end - at));
    return true;
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
