// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"

#include <chrono>
#include <optional>
#include <string>
#include <string_view>
#include <utility>

namespace dialwright::cli {

/// Why a text is not the quantity that is wanted, and what would be.
struct Trouble {
    std::string message;
    std::string hint;
};

/// A value that was read, or the trouble with its text.
template <class T>
class Read {
  public:
    Read(T value) : value_{std::move(value)} {}
    Read(Trouble trouble) : trouble_{std::move(trouble)} {}
    explicit operator bool() const { return value_.has_value(); }
    [[nodiscard]] const T& operator*() const { return *value_; }
    [[nodiscard]] const T* operator->() const { return &*value_; }
    [[nodiscard]] const Trouble& trouble() const { return trouble_; }

  private:
    std::optional<T> value_;
    Trouble trouble_;
};

// Readers of quantities as people write them. Numbers have a decimal point, whatever the machine's locale; "010" is
// ten; exponents, infinities and not-a-number are refused. Typographic signs (° ′ ″ − – ½, narrow spaces) are accepted.

/// Millimetres from "360 mm", "36 cm", "0.36 m", "14.2 in", "14 1/2 in", `14½"`, "1 ft 2 in". May be negative.
[[nodiscard]] Read<double> length_mm(std::string_view text);
/// "54° 14' N", "54°14'20.5\"N", "54.2340", "-33.9", "33° 52' S": −90° to 90°, north positive.
[[nodiscard]] Read<Angle> latitude(std::string_view text);
/// "1° 52' W", "-1.8667", "151.2 E": −180° to 180°, east positive.
[[nodiscard]] Read<Angle> longitude(std::string_view text);
/// "S 23° E", "N 60° W", "south", "SE", "south-south-east", "157°", "157": azimuth from north through east, [0°, 360°).
[[nodiscard]] Read<Angle> bearing(std::string_view text);
/// "5° back", "3° 30' forward", "0°", "upright": from upright, back positive; magnitude at most 90°.
[[nodiscard]] Read<Angle> lean(std::string_view text);
/// "5°", "5° 30'", "-5.5": any plain angle.
[[nodiscard]] Read<Angle> plain_angle(std::string_view text);
/// "14 June", "June 14", "14th Jun", "06-14". 29 February is a day; 31 June is not.
[[nodiscard]] Read<std::chrono::month_day> day_of_year(std::string_view text);
/// A day of one year: "2027-06-14", "14 June 2027", "14th Jun 2027", from 1901 to 2099.
[[nodiscard]] Read<std::chrono::year_month_day> calendar_date(std::string_view text);
/// The name of a zone of the time zone database: "Europe/London".
[[nodiscard]] Read<std::string> zone_name(std::string_view text);
/// Hours after midnight, 0 to 24, from "5", "5:30", "17:00", "5 am", "5:30 pm", "noon". 12 am is 0:00, 12 pm is noon.
[[nodiscard]] Read<double> hour_of_day(std::string_view text);
/// The same on a dial's own time: hours that count from the Sun's rising or setting have no am, pm or noon, and unequal
/// ones end with 12.
[[nodiscard]] Read<double> hour_on(HourTime time, std::string_view text);
/// Whole minutes from "15 min", "1 h".
[[nodiscard]] Read<int> minutes(std::string_view text);
/// "2027 to 2046", "2027-2046": whole leap cycles within 1900 to 2100.
[[nodiscard]] Read<Years> years(std::string_view text);
/// "yes", "no", "true", "false".
[[nodiscard]] Read<bool> yes_or_no(std::string_view text);
/// A count: "0", "4", "010" (ten).
[[nodiscard]] Read<int> whole_number(std::string_view text);

// Writers, as a design file would say it; each is read back by its reader above.

/// "360 mm", "0.4 mm"; "14 1/2 in" where it is a whole number of 64ths, else "14.1732 in".
[[nodiscard]] std::string length_text(double mm, Units units);
/// "54° 14' 20.5\" N"; to a tenth of a second, parts that are zero left out.
[[nodiscard]] std::string latitude_text(Angle angle);
[[nodiscard]] std::string longitude_text(Angle angle);
/// "S 23° E", "south".
[[nodiscard]] std::string bearing_text(Angle azimuth);
/// "5° 30' back", "upright".
[[nodiscard]] std::string lean_text(Angle angle);
/// "14 June".
[[nodiscard]] std::string day_text(std::chrono::month_day day);
/// "5:30".
[[nodiscard]] std::string hour_text(double hours);

} // namespace dialwright::cli
