// SPDX-License-Identifier: MIT
#include "layout/plate/numerals.hpp"

#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

std::string roman(int number, bool four_strokes) {
    static constexpr const char* k_ones[] = {"", "I", "II", "III", "IV", "V", "VI", "VII", "VIII", "IX"};
    static constexpr const char* k_tens[] = {"", "X", "XX"};
    const int ones = number % 10;
    return std::string{k_tens[number / 10]} + (ones == 4 && four_strokes ? "IIII" : k_ones[ones]);
}

} // namespace

std::string numeral(int hour, Numerals style, int count) {
    const int shown = count == 24 ? hour : (hour + 11) % 12 + 1;
    if (style == Numerals::arabic || shown == 0)
        return fmt::format("{}", shown);
    return roman(shown, style == Numerals::roman_iiii);
}

std::string degrees_label(Angle angle) {
    const double tenths = std::round(angle.in_degrees() * 10);
    return std::fmod(tenths, 10) == 0 ? fmt::format("{:.0f}°", tenths / 10) : fmt::format("{:.1f}°", tenths / 10);
}

std::string time_label(double time_h) {
    const int minutes = int(std::lround(time_h * 60));
    return fmt::format("{}:{:02}", minutes / 60, minutes % 60);
}

} // namespace dialwright::layout
