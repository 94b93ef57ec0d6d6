// SPDX-License-Identifier: MIT
#include "cli/design/quantity.hpp"
#include "cli/design/plain_text.hpp"

#include "cli/design/scanner.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace dialwright::cli {

namespace {

constexpr const char* k_length_hint = "write it as in 360 mm or 14.2 in";

struct LengthUnit {
    std::string_view spelling;
    double mm;
};
// The inch is 25.4 mm exactly. Source: International yard and pound agreement, 1959 (from memory).
constexpr std::array k_length_units = {
    LengthUnit{"mm", 1.0},     LengthUnit{"millimetre", 1.0}, LengthUnit{"millimetres", 1.0}, LengthUnit{"cm", 10.0},
    LengthUnit{"m", 1000.0},   LengthUnit{"metre", 1000.0},   LengthUnit{"metres", 1000.0},   LengthUnit{"in", 25.4},
    LengthUnit{"inch", 25.4},  LengthUnit{"inches", 25.4},    LengthUnit{"\"", 25.4},         LengthUnit{"ft", 304.8},
    LengthUnit{"foot", 304.8}, LengthUnit{"feet", 304.8},     LengthUnit{"'", 304.8}};

/// "14", "14.5", "1/2", "14 1/2".
Read<double> scan_mixed_number(Scanner& scan, std::string_view whole_text) {
    if (!scan.number_next())
        return Trouble{in_quotes(whole_text) + " is not a length", k_length_hint};
    Scrap first = scan.take();
    double sum = 0.0;
    if (scan.number_next() && scan.sign_next("/", 1)) {
        if (!first.whole)
            return Trouble{in_quotes(whole_text) + " has a fraction after a decimal point", k_length_hint};
        sum = first.number;
        first = scan.take();
    }
    if (!scan.take_sign("/"))
        return sum + first.number;
    if (!scan.number_next() || !first.whole)
        return Trouble{in_quotes(whole_text) + " has half a fraction", "write it as in 14 1/2 in"};
    const Scrap below = scan.take();
    if (below.number <= 0.0 || !below.whole)
        return Trouble{in_quotes(whole_text) + " has a fraction that divides by " + below.text,
                       "write it as in 14 1/2 in"};
    return sum + first.number / below.number;
}

Read<double> scan_unit(Scanner& scan, std::string_view whole_text) {
    if (scan.at_end() || scan.number_next())
        return Trouble{in_quotes(whole_text) + " has no unit", k_length_hint};
    const std::string spelling = scan.take().text;
    const auto* unit = std::find_if(k_length_units.begin(), k_length_units.end(),
                                    [&](const LengthUnit& u) { return u.spelling == spelling; });
    if (unit == k_length_units.end())
        return Trouble{in_quotes(whole_text) + ": " + in_quotes(spelling) + " is not a unit of length",
                       "use mm, cm, m, in or ft"};
    return unit->mm;
}

} // namespace

Read<double> length_mm(std::string_view text) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    const bool negative = scan.take_sign("-");
    if (!negative)
        scan.take_sign("+");
    double sum = 0.0;
    double last_unit = 0.0;
    do {
        const Read<double> number = scan_mixed_number(scan, text);
        if (!number)
            return number;
        const Read<double> unit = scan_unit(scan, text);
        if (!unit)
            return unit;
        // Only "1 ft 2 in" has two parts.
        if (last_unit != 0.0 && !(last_unit == 304.8 && *unit == 25.4))
            return Trouble{in_quotes(text) + " has two lengths where one is wanted", k_length_hint};
        sum += *number * *unit;
        last_unit = *unit;
        // A full stop after an abbreviated inch is a habit of writing, not a fault.
        if (*unit == 25.4)
            scan.take_sign(".");
    } while (scan.number_next());
    if (!scan.at_end())
        return Trouble{in_quotes(text) + " goes on after the length with " + in_quotes(scan.rest_word()),
                       k_length_hint};
    return negative ? -sum : sum;
}

Read<int> minutes(std::string_view text) {
    const std::string hint = "write it as in 15 min";
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (!scan.number_next())
        return Trouble{in_quotes(text) + " is not a number of minutes", hint};
    const Scrap number = scan.take();
    if (scan.at_end())
        return Trouble{in_quotes(text) + " has no unit", hint};
    const bool in_hours = scan.take_word("h") || scan.take_word("hour") || scan.take_word("hours");
    if (!in_hours && !scan.take_word("min") && !scan.take_word("minute") && !scan.take_word("minutes"))
        return Trouble{in_quotes(text) + ": " + in_quotes(scan.rest_word()) + " is not a unit of time", hint};
    if (!scan.at_end())
        return Trouble{in_quotes(text) + " goes on after the minutes with " + in_quotes(scan.rest_word()), hint};
    const double value = number.number * (in_hours ? 60.0 : 1.0);
    if (value != std::floor(value) || value > 1440.0)
        return Trouble{in_quotes(text) + " is not a whole number of minutes within a day", hint};
    return static_cast<int>(value);
}

Read<bool> yes_or_no(std::string_view text) {
    std::string word{text};
    for (char& c : word)
        c = static_cast<char>(c >= 'A' && c <= 'Z' ? c - 'A' + 'a' : c);
    if (word == "yes" || word == "true")
        return true;
    if (word == "no" || word == "false")
        return false;
    return Trouble{in_quotes(text) + " is neither yes nor no", "write yes or no"};
}

Read<int> whole_number(std::string_view text) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (!scan.number_next())
        return Trouble{in_quotes(text) + " is not a whole number", "write it as in 4"};
    const Scrap number = scan.take();
    if (!scan.at_end() || !number.whole || number.number > std::numeric_limits<int>::max())
        return Trouble{in_quotes(text) + " is not a whole number", "write it as in 4"};
    return static_cast<int>(number.number);
}

std::string length_text(double mm, Units units) {
    const auto decimal = [](double value, int places) {
        std::string text = fmt::format("{:.{}f}", value, places);
        text.erase(text.find_last_not_of('0') + 1);
        if (text.ends_with('.'))
            text.pop_back();
        return text == "-0" ? std::string{"0"} : text;
    };
    if (units == Units::millimetres)
        return decimal(mm, 4) + " mm";
    const double inches = mm / 25.4;
    const double sixty_fourths = inches * 64.0;
    const double nearest_64th = std::round(sixty_fourths);
    if (std::abs(sixty_fourths - nearest_64th) > 1e-6 || std::abs(nearest_64th) > 1e9)
        return decimal(inches, 6) + " in";
    const auto count = static_cast<long>(std::abs(nearest_64th));
    const long whole = count / 64;
    long above = count % 64, below = 64;
    while (above > 0 && above % 2 == 0) {
        above /= 2;
        below /= 2;
    }
    const std::string sign = nearest_64th < 0 ? "-" : "";
    if (above == 0)
        return fmt::format("{}{} in", sign, whole);
    return whole == 0 ? fmt::format("{}{}/{} in", sign, above, below)
                      : fmt::format("{}{} {}/{} in", sign, whole, above, below);
}

} // namespace dialwright::cli
