// SPDX-License-Identifier: MIT
#include "cli/readings/given.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/scanner.hpp"

#include <array>

namespace dialwright::cli {
namespace {

constexpr std::array<std::string_view, 3> k_signs = {"±", "+/-", "+-"};

std::string_view without_blanks(std::string_view text) {
    constexpr std::string_view k_blanks = " \t\n";
    const std::size_t first = text.find_first_not_of(k_blanks);
    return first == std::string_view::npos ? std::string_view{}
                                           : text.substr(first, text.find_last_not_of(k_blanks) - first + 1);
}

/// @param give_reader  reads what stands after the sign
template <class Reader>
Read<Known> with_give(std::string_view text, Reader&& reader, Read<double> (*give_reader)(std::string_view),
                      double give) {
    std::string_view value = text;
    for (const std::string_view sign : k_signs)
        if (const std::size_t at = text.find(sign); at != std::string_view::npos) {
            const Read<double> read = give_reader(text.substr(at));
            if (!read)
                return read.trouble();
            give = *read;
            value = text.substr(0, at);
            break;
        }
    const auto read = reader(without_blanks(value));
    if (!read)
        return read.trouble();
    return Known{*read, give};
}

/// The same for a reader that gives an angle.
Read<Known> angle_with_give(std::string_view text, Read<Angle> (*reader)(std::string_view), double give) {
    return with_give(
        text,
        [reader](std::string_view value) -> Read<double> {
            const Read<Angle> angle = reader(value);
            if (!angle)
                return angle.trouble();
            return angle->in_degrees();
        },
        give_angle_deg, give);
}

std::string_view without_sign(std::string_view text) {
    text = without_blanks(text);
    for (const std::string_view sign : k_signs)
        if (text.starts_with(sign))
            return without_blanks(text.substr(sign.size()));
    return text;
}

Read<double> above_zero(std::string_view text, const Read<double>& value) {
    if (value && !(*value > 0.0))
        return Trouble{in_quotes(text) + " is no ±: nothing is measured without one", "give more than 0"};
    return value;
}

} // namespace

Read<double> give_length_mm(std::string_view text) {
    return above_zero(text, length_mm(without_sign(text)));
}

Read<double> give_angle_deg(std::string_view text) {
    // Minutes of arc alone, as ranges are often said.
    if (Read<Scanner> read = Scanner::over(without_sign(text))) {
        Scanner scan = *read;
        if (scan.number_next() && scan.sign_next("'", 1)) {
            const double minutes = scan.take().number;
            scan.take();
            if (scan.at_end())
                return above_zero(text, minutes / 60);
        }
    }
    const Read<Angle> angle = plain_angle(without_sign(text));
    if (!angle)
        return angle.trouble();
    return above_zero(text, angle->in_degrees());
}

Read<double> give_seconds(std::string_view text) {
    const Trouble trouble{in_quotes(text) + " is not a number of seconds or minutes", "write it as in 5 s or 1 min"};
    Read<Scanner> read = Scanner::over(without_sign(text));
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (!scan.number_next())
        return trouble;
    const double number = scan.take().number;
    double unit_s = 1.0;
    if (scan.take_word("min") || scan.take_word("minute") || scan.take_word("minutes"))
        unit_s = 60.0;
    else if (!scan.take_word("s") && !scan.take_word("sec") && !scan.take_word("second") && !scan.take_word("seconds"))
        return trouble;
    if (!scan.at_end())
        return trouble;
    return above_zero(text, number * unit_s);
}

Read<Known> given_length_mm(std::string_view text, double give_mm) {
    return with_give(text, length_mm, give_length_mm, give_mm);
}
Read<Known> given_angle_deg(std::string_view text, double give_deg) {
    return angle_with_give(text, plain_angle, give_deg);
}
Read<Known> given_bearing_deg(std::string_view text, double give_deg) {
    return angle_with_give(text, bearing, give_deg);
}
Read<Known> given_east_deg(std::string_view text, double give_deg) {
    return angle_with_give(text, longitude, give_deg);
}
Read<Known> given_latitude_deg(std::string_view text, double give_deg) {
    return angle_with_give(text, latitude, give_deg);
}
Read<Known> given_lean_deg(std::string_view text, double give_deg) {
    return angle_with_give(text, lean, give_deg);
}

} // namespace dialwright::cli
