// SPDX-License-Identifier: MIT
#include "cli/design/plain_text.hpp"
#include "cli/design/quantity.hpp"
#include "cli/design/scanner.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>

namespace dialwright::cli {

namespace {

/// The sixteen points of the compass, 22.5° apart from north through east.
constexpr std::array<std::string_view, 16> k_compass = {"n", "nne", "ne", "ene", "e", "ese", "se", "sse",
                                                        "s", "ssw", "sw", "wsw", "w", "wnw", "nw", "nnw"};
constexpr const char* k_bearing_hint = "write it as in S 23° E, south-east or 157°";

/// "n" for "north", "se" for "southeast", "sse" for itself; empty for what is no point of the compass.
std::string compass_letters(std::string_view word) {
    std::string letters;
    while (!word.empty()) {
        const std::size_t before = letters.size();
        for (const std::string_view name : {"north", "south", "east", "west"})
            if (word.starts_with(name)) {
                letters += name.front();
                word.remove_prefix(name.size());
                break;
            }
        if (letters.size() == before)
            break;
    }
    if (word.empty())
        return letters;
    const bool plain = letters.empty() && word.size() <= 3 && word.find_first_not_of("nsew") == std::string_view::npos;
    return plain ? std::string{word} : std::string{};
}

/// Degrees of the compass point that the scanner stands at the start of, words joined by spaces or hyphens.
/// Stops before a number.
std::string scan_compass(Scanner& scan) {
    std::string letters;
    while (scan.word_next()) {
        const std::string point = compass_letters(scan.rest_word());
        if (point.empty())
            return {};
        letters += point;
        scan.take();
        scan.take_sign("-");
    }
    return letters;
}

struct Circle {
    std::string_view name;
    std::string_view plus, minus, other; ///< "n", "s", and the letters of the other circle
    std::string_view example;
    double most_degrees;
};
constexpr Circle k_latitude{"latitude", "n", "s", "ew", "54° 14' N or 54.2333", 90.0};
constexpr Circle k_longitude{"longitude", "e", "w", "ns", "1° 52' W or -1.8667", 180.0};

/// +1 or −1 for a letter of the circle, 0 for none.
Read<int> scan_hemisphere(Scanner& scan, const Circle& circle, std::string_view text) {
    if (!scan.word_next())
        return 0;
    const std::string letters = compass_letters(scan.rest_word());
    const std::string hint = fmt::format("write it as in {}", circle.example);
    if (letters.size() == 1 && circle.other.find(letters) != std::string_view::npos)
        return Trouble{fmt::format("{} ends in a letter that no {} has", in_quotes(text), circle.name), hint};
    if (letters != circle.plus && letters != circle.minus)
        return Trouble{fmt::format("{} is not a {}", in_quotes(text), circle.name), hint};
    scan.take();
    return letters == circle.plus ? 1 : -1;
}

Read<Angle> on_circle(std::string_view text, const Circle& circle) {
    const std::string hint = fmt::format("write it as in {}", circle.example);
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    Read<int> side = scan_hemisphere(scan, circle, text);
    if (!side)
        return side.trouble();
    const bool minus = scan.take_sign("-");
    const bool has_sign = minus || scan.take_sign("+");
    const Read<double> degrees = scan_degrees(scan, text);
    if (!degrees)
        return degrees.trouble();
    if (*side == 0)
        side = scan_hemisphere(scan, circle, text);
    if (!side)
        return side.trouble();
    if (!scan.at_end())
        return Trouble{
            fmt::format("{} goes on after the {} with {}", in_quotes(text), circle.name, in_quotes(scan.rest_word())),
            hint};
    if (has_sign && *side != 0)
        return Trouble{in_quotes(text) + " has both a sign and a letter", "keep one of them: " + hint};
    if (*degrees > circle.most_degrees)
        return Trouble{fmt::format("{} is no {}: it is over {}°", in_quotes(text), circle.name, circle.most_degrees),
                       circle.most_degrees < 100 ? "give 90° S to 90° N" : "give 180° W to 180° E"};
    return Angle::degrees(minus || *side < 0 ? -*degrees : *degrees);
}

/// "54° 14' 20.5\"", of a magnitude; to a tenth of a second.
std::string dms_text(double degrees) {
    const auto tenths = static_cast<long long>(std::llround(std::abs(degrees) * 36000.0));
    const long long whole = tenths / 36000, left_min = tenths / 600 % 60, left_tenths = tenths % 600;
    std::string text = fmt::format("{}°", whole);
    if (left_min != 0)
        text += fmt::format(" {}'", left_min);
    if (left_tenths % 10 != 0)
        text += fmt::format(" {}.{}\"", left_tenths / 10, left_tenths % 10);
    else if (left_tenths != 0)
        text += fmt::format(" {}\"", left_tenths / 10);
    return text;
}

} // namespace

Read<Angle> latitude(std::string_view text) {
    return on_circle(text, k_latitude);
}
Read<Angle> longitude(std::string_view text) {
    return on_circle(text, k_longitude);
}

Read<Angle> bearing(std::string_view text) {
    const Trouble unreadable{in_quotes(text) + " is not a direction", k_bearing_hint};
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (!scan.word_next()) {
        if (scan.take_sign("-"))
            return Trouble{in_quotes(text) + " is a direction below 0°", "count 0° to 360° from north through east"};
        const Read<double> degrees = scan_degrees(scan, text);
        if (!degrees)
            return unreadable;
        if (!scan.at_end())
            return unreadable;
        if (*degrees > 360.0)
            return Trouble{in_quotes(text) + " is a direction over 360°", "count 0° to 360° from north through east"};
        return Angle::degrees(*degrees == 360.0 ? 0.0 : *degrees);
    }
    const std::string from = scan_compass(scan);
    if (from.empty())
        return unreadable;
    if (scan.at_end()) {
        for (std::size_t i = 0; i < k_compass.size(); ++i)
            if (k_compass[i] == from)
                return Angle::degrees(22.5 * static_cast<double>(i));
        return unreadable;
    }
    const Read<double> degrees = scan_degrees(scan, text);
    if (!degrees)
        return degrees.trouble();
    const std::string to = scan_compass(scan);
    if (!scan.at_end() || (from != "n" && from != "s") || (to != "e" && to != "w"))
        return unreadable;
    if (*degrees > 90.0)
        return Trouble{in_quotes(text) + " turns by more than 90°", "give 0° to 90° from north or south"};
    const double turn = to == "e" ? *degrees : -*degrees;
    return Angle::degrees(from == "n" ? (turn < 0.0 ? 360.0 + turn : turn) : 180.0 - turn);
}

Read<Angle> lean(std::string_view text) {
    const std::string hint = "write it as in 5° back or 3° forward";
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    if (scan.take_word("upright") && scan.at_end())
        return Angle{};
    const Read<double> degrees = scan_degrees(scan, text);
    if (!degrees)
        return Trouble{in_quotes(text) + " is not a lean from upright", hint};
    const bool back = scan.take_word("back") || scan.take_word("backward") || scan.take_word("backwards");
    const bool forward = !back && (scan.take_word("forward") || scan.take_word("forwards"));
    if (!scan.at_end())
        return Trouble{in_quotes(text) + " is not a lean from upright", hint};
    if (!back && !forward && *degrees != 0.0)
        return Trouble{in_quotes(text) + " does not say which way it leans", hint};
    if (*degrees > 90.0)
        return Trouble{in_quotes(text) + " leans by more than 90°", "give 0° to 90°, counted from upright"};
    return Angle::degrees(forward ? -*degrees : *degrees);
}

Read<Angle> plain_angle(std::string_view text) {
    Read<Scanner> read = Scanner::over(text);
    if (!read)
        return read.trouble();
    Scanner scan = *read;
    const bool minus = scan.take_sign("-");
    const Read<double> degrees = scan_degrees(scan, text);
    if (!degrees)
        return degrees.trouble();
    if (!scan.at_end())
        return Trouble{in_quotes(text) + " is not an angle", "write it as in 5° 30' or 5.5"};
    return Angle::degrees(minus ? -*degrees : *degrees);
}

std::string latitude_text(Angle angle) {
    return dms_text(angle.in_degrees()) + (angle.in_radians() < 0.0 ? " S" : " N");
}

std::string longitude_text(Angle angle) {
    return dms_text(angle.in_degrees()) + (angle.in_radians() < 0.0 ? " W" : " E");
}

std::string bearing_text(Angle azimuth) {
    constexpr std::array<std::string_view, 4> k_names = {"north", "east", "south", "west"};
    const double degrees = azimuth.positive_turn().in_degrees();
    const double quarter = std::round(degrees / 90.0);
    if (std::abs(degrees - 90.0 * quarter) * 36000.0 < 0.5)
        return std::string{k_names[static_cast<std::size_t>(quarter) % 4]};
    const bool east = degrees < 180.0;
    const bool north = degrees < 90.0 || degrees > 270.0;
    const double from_east_side = east ? degrees : 360.0 - degrees;
    return fmt::format("{} {} {}", north ? 'N' : 'S', dms_text(north ? from_east_side : 180.0 - from_east_side),
                       east ? 'E' : 'W');
}

std::string lean_text(Angle angle) {
    const std::string size = dms_text(angle.in_degrees());
    if (size == "0°")
        return "upright";
    return size + (angle.in_radians() < 0.0 ? " forward" : " back");
}

} // namespace dialwright::cli
