// SPDX-License-Identifier: MIT
#include "cli/design/quantity.hpp"

#include <catch2/catch.hpp>
#include <fmt/format.h>

#include <clocale>
#include <cmath>
#include <locale>
#include <random>

using namespace dialwright;
using namespace dialwright::cli;
using Catch::Matchers::WithinAbs;

namespace {

double mm(std::string_view text) {
    const Read<double> read = length_mm(text);
    INFO(text << ": " << read.trouble().message);
    REQUIRE(read);
    return *read;
}

double degrees(Read<Angle> (*reader)(std::string_view), std::string_view text) {
    const Read<Angle> read = reader(text);
    INFO(text << ": " << read.trouble().message);
    REQUIRE(read);
    return read->in_degrees();
}

double latitude_deg(std::string_view text) {
    return degrees(latitude, text);
}
double longitude_deg(std::string_view text) {
    return degrees(longitude, text);
}
double bearing_deg(std::string_view text) {
    return degrees(bearing, text);
}
double lean_deg(std::string_view text) {
    return degrees(lean, text);
}
double hours_of(std::string_view text) {
    const Read<double> read = hour_of_day(text);
    INFO(text << ": " << read.trouble().message);
    REQUIRE(read);
    return *read;
}

struct Reading {
    const char* text;
    double value;
};
/// To 1e-10: what the arithmetic of tens, twelfths and sixtieths leaves. "010" is ten, not eight.
void check_all(double (*reader)(std::string_view), std::initializer_list<Reading> readings) {
    for (const Reading& reading : readings) {
        INFO(reading.text);
        CHECK_THAT(reader(reading.text), WithinAbs(reading.value, 1e-10));
    }
}

template <class T>
void check_refused(Read<T> (*reader)(std::string_view), std::initializer_list<const char*> texts) {
    for (const char* text : texts) {
        INFO(text);
        const Read<T> read = reader(text);
        CHECK_FALSE(read);
        CHECK_FALSE(read.trouble().message.empty());
        CHECK_FALSE(read.trouble().hint.empty());
    }
}

std::mt19937 seeded() {
    const auto seed = std::random_device{}();
    UNSCOPED_INFO("seed " << seed);
    return std::mt19937{seed};
}

} // namespace

TEST_CASE("lengths as people write them", "[cli]") {
    check_all(mm, {{"360 mm", 360.0},
                   {"360mm", 360.0},
                   {"36 cm", 360.0},
                   {"0.36 m", 360.0},
                   {".36 m", 360.0},
                   {"010 mm", 10.0},
                   {"14.2 in", 360.68},
                   {"14 1/2 in", 368.3},
                   {"1/16 in", 1.5875},
                   {"14½\"", 368.3},
                   {"14″", 355.6},
                   {"1 ft", 304.8},
                   {"1 ft 2 1/2 in", 368.3},
                   {"1' 2\"", 355.6},
                   {"12 IN.", 304.8},
                   {"-5 mm", -5.0},
                   {"−5 mm", -5.0},
                   {"+5 mm", 5.0},
                   {"360\u00A0mm", 360.0}});
    check_refused(length_mm,
                  {"",       "360",     "mm",           "360 kg",   "360°",      "14,2 in", "1e3 mm",  ".inf mm",
                   "nan mm", "0x10 mm", "360 mm mm",    "360 mm 2", "1 in 1 ft", "1/0 in",  "1 1/ in", "1.5 1/2 in",
                   "--5 mm", "5. mm",   "1 / 2 / 3 in", "1.2.3 mm", "360 µm",    "360 m²"});
}

TEST_CASE("a length without a unit says how to write it", "[cli]") {
    CHECK(length_mm("360").trouble().message == "\"360\" has no unit");
    CHECK(length_mm("360").trouble().hint == "write it as in 360 mm or 14.2 in");
}

TEST_CASE("latitudes and longitudes as people write them", "[cli]") {
    check_all(latitude_deg, {{"54° 14' N", 54.0 + 14.0 / 60.0},
                             {"54°14'20.5\"N", 54.0 + 14.0 / 60.0 + 20.5 / 3600.0},
                             {"54°14′20.5″ N", 54.0 + 14.0 / 60.0 + 20.5 / 3600.0},
                             {"54° 14' 20.5'' north", 54.0 + 14.0 / 60.0 + 20.5 / 3600.0},
                             {"54º 14’ N", 54.0 + 14.0 / 60.0},
                             {"N 54° 14.5'", 54.0 + 14.5 / 60.0},
                             {"54° 30\" N", 54.0 + 30.0 / 3600.0},
                             {"54.2340", 54.234},
                             {"-33.9", -33.9},
                             {"−33.9°", -33.9},
                             {"33° 52' S", -(33.0 + 52.0 / 60.0)},
                             {"0° 30' S", -0.5},
                             {"-0° 30'", -0.5},
                             {"90 N", 90.0}});
    check_all(longitude_deg, {{"1° 52' W", -(1.0 + 52.0 / 60.0)}, {"180° E", 180.0}, {"180 west", -180.0}});
    check_refused(latitude, {"",
                             "95°",
                             "90° 0' 1\" N",
                             "-91",
                             "54° 60' N",
                             "54° 14' 60\" N",
                             "54° 14 N",
                             "54 14 N",
                             "54.5° 14' N",
                             "54° 14.5' 20\" N",
                             "-33.9 S",
                             "+33.9 N",
                             "33 E",
                             "54° 14' N N",
                             "N 54 N",
                             "54,5",
                             "north",
                             "54 mm",
                             "5.4e1",
                             ".nan",
                             "-",
                             "54°°"});
    check_refused(longitude, {"181", "180° 1' W", "1 N", "-1 W"});
}

TEST_CASE("directions as people write them", "[cli]") {
    check_all(bearing_deg, {{"S 23° E", 157.0},
                            {"s23e", 157.0},
                            {"south 23° 30' east", 156.5},
                            {"S 23° W", 203.0},
                            {"N 60° W", 300.0},
                            {"N 60° E", 60.0},
                            {"N 0° W", 0.0},
                            {"S 90° W", 270.0},
                            {"south", 180.0},
                            {"North", 0.0},
                            {"E", 90.0},
                            {"south-east", 135.0},
                            {"southwest", 225.0},
                            {"SE", 135.0},
                            {"south-south-east", 157.5},
                            {"wnw", 292.5},
                            {"157°", 157.0},
                            {"157", 157.0},
                            {"360", 0.0}});
    check_refused(bearing, {"", "370", "-23", "S 91° E", "E 23° S", "S 23°", "S 23° N", "23° E", "up", "SES", "S E N",
                            "south-by-east", "S 23° E E", "157° S"});
}

TEST_CASE("leans and plain angles", "[cli]") {
    check_all(lean_deg, {{"5° back", 5.0}, {"3° 30' forward", -3.5}, {"0", 0.0}, {"upright", 0.0}});
    check_refused(lean, {"", "5°", "-5° back", "5° left", "91° back", "back", "upright 5°", "5° back 3"});
    CHECK_THAT(degrees(plain_angle, "5° 30'"), WithinAbs(5.5, 1e-12));
    CHECK_THAT(degrees(plain_angle, "-5.5"), WithinAbs(-5.5, 1e-12));
    check_refused(plain_angle, {"", "5 mm", "°", "5° 5° "});
}

TEST_CASE("dates of one year", "[cli][quantity]") {
    using namespace std::chrono;
    for (const char* text : {"2027-06-14", "14 June 2027", "14th Jun 2027", "June 14 2027", " 2027-06-14 "}) {
        CAPTURE(text);
        const auto date = calendar_date(text);
        REQUIRE(date);
        CHECK(*date == 2027y / 6 / 14);
    }
    CHECK(*calendar_date("2028-02-29") == 2028y / 2 / 29);
    check_refused(calendar_date, {"", "2027", "2027-06", "2027-13-01", "2027-06-31", "2027-02-29", "14 June",
                                  "14-06-2027", "1900-12-31", "2100-01-01", "2027-06-14 x", "2027-6.5-14",
                                  "14 Jnue 2027", "2027/06/14", "next Monday", "14 June 27", "99999-06-14"});
    CHECK_THAT(calendar_date("14 June").trouble().message, Catch::Contains("no year"));
    CHECK(*zone_name("Europe/London") == "Europe/London");
    check_refused(zone_name, {"", "London time", "Europe/Lundon", "BST and GMT"});
}

TEST_CASE("days as people write them", "[cli]") {
    using namespace std::chrono;
    for (const char* text : {"14 June", "June 14", "14 jun", "14th June", "June 14th", "06-14", "6-14", "14. June"}) {
        INFO(text);
        const auto day = day_of_year(text);
        REQUIRE(day);
        CHECK(*day == June / 14);
    }
    REQUIRE(day_of_year("29 Feb"));
    CHECK(*day_of_year("1 Sept") == September / 1);
    check_refused(day_of_year, {"", "31 June", "30 Feb", "0 June", "32 May", "14", "June", "14 Jnue", "14 Ju", "6/14",
                                "2026-06-14", "14 June 2026", "13-01", "00-10", "14.5 June", "06-14.5", "14 June June",
                                "June 14 15", "14 15 June"});
}

TEST_CASE("hours, minutes, years, counts, yes and no", "[cli]") {
    check_all(hours_of, {{"5", 5.0},
                         {"5:30", 5.5},
                         {"17:00", 17.0},
                         {"5 am", 5.0},
                         {"5:30pm", 17.5},
                         {"12 pm", 12.0},
                         {"12:30 AM", 0.5},
                         {"noon", 12.0},
                         {"24:00", 24.0}});
    const auto on = [](HourTime time) { return [time](std::string_view text) { return bool{hour_on(time, text)}; }; };
    CHECK(on(HourTime::clock)("8 pm"));
    CHECK(on(HourTime::zone)("noon"));
    for (const HourTime time :
         {HourTime::since_sunrise, HourTime::since_sunset, HourTime::to_sunset, HourTime::unequal}) {
        CHECK_FALSE(on(time)("8 am"));
        CHECK_FALSE(on(time)("noon"));
        CHECK(on(time)(" 0 "));
        CHECK(on(time)("9:30"));
        CHECK(on(time)("12"));
        CHECK(on(time)("12:01") == (time != HourTime::unequal));
    }
    check_refused(hour_of_day,
                  {"", "25", "24:01", "5.5", "5:60", "5:3", "-1", "13 pm", "0 am", "5:", "5 o'clock", "5 am pm"});
    CHECK(*minutes("15 min") == 15);
    CHECK(*minutes("1 h") == 60);
    CHECK(*minutes("0.5 h") == 30);
    check_refused(minutes, {"", "15", "15 s", "7.5 min", "min", "99999 min", "-5 min", "15 min 3"});
    CHECK(years("2027 to 2046")->first == 2027);
    CHECK(years("2027-2030")->last == 2030);
    CHECK(years("2027 – 2046")->last == 2046);
    CHECK(years("1904 to 2099")->last == 2099);
    check_refused(years, {"", "2027", "2027 to 2045", "2046 to 2027", "1899 to 1902", "2098 to 2101", "2027 to",
                          "to 2027", "2027.5 to 2031", "99999999999 to 2", "2027 to 2046 to 2050"});
    CHECK(*yes_or_no("yes"));
    CHECK(*yes_or_no("True"));
    CHECK_FALSE(*yes_or_no("no"));
    CHECK_FALSE(*yes_or_no("false"));
    check_refused(yes_or_no, {"", "on", "off", "y", "n", "1", "0", "maybe"});
    CHECK(*whole_number("010") == 10);
    CHECK(*whole_number("0") == 0);
    check_refused(whole_number, {"", "2.5", "-1", "2 mm", "99999999999", "1e3"});
}

TEST_CASE("every range of years that is suggested is good", "[cli]") {
    for (int first = 1800; first <= 2200; first += 7)
        for (int count = 1; count <= 300; count += 3) {
            const Read<Years> read = years(fmt::format("{} to {}", first, first + count - 1));
            if (read)
                continue;
            REQUIRE(read.trouble().hint.starts_with("write "));
            INFO(read.trouble().hint);
            CHECK(years(read.trouble().hint.substr(6)));
        }
}

TEST_CASE("what is written is read back: lengths", "[cli]") {
    std::mt19937 random = seeded();
    std::uniform_real_distribution<double> length{-5000.0, 5000.0};
    std::uniform_int_distribution<int> sixty_fourths{-12000, 12000};
    for (int i = 0; i < 2000; ++i) {
        const double any = length(random);
        CHECK_THAT(mm(length_text(any, Units::millimetres)), WithinAbs(any, 0.5e-4)); // four places
        CHECK_THAT(mm(length_text(any, Units::inches)), WithinAbs(any, 25.4 * 1e-6)); // six places, or a 64th that near
        const double ruled = sixty_fourths(random) * 25.4 / 64.0;
        const std::string text = length_text(ruled, Units::inches);
        INFO(text);
        CHECK(text.find('.') == std::string::npos);
        CHECK_THAT(mm(text), WithinAbs(ruled, 1e-9));
    }
    CHECK(length_text(360.0, Units::millimetres) == "360 mm");
    CHECK(length_text(-0.00001, Units::millimetres) == "0 mm");
    CHECK(length_text(0.4, Units::millimetres) == "0.4 mm");
    CHECK(length_text(368.3, Units::inches) == "14 1/2 in");
    CHECK(length_text(0.0, Units::inches) == "0 in");
}

TEST_CASE("what is written is read back: angles, days, hours", "[cli]") {
    constexpr double k_half_tenth_second = 0.05 / 3600.0 + 1e-10; // angles are written to a tenth of a second
    std::mt19937 random = seeded();
    std::uniform_real_distribution<double> turn{0.0, 1.0};
    for (int i = 0; i < 3000; ++i) {
        const double lat = 180.0 * turn(random) - 90.0, lon = 360.0 * turn(random) - 180.0;
        const double azimuth = 359.9999 * turn(random), back = 180.0 * turn(random) - 90.0;
        CHECK_THAT(degrees(latitude, latitude_text(Angle::degrees(lat))), WithinAbs(lat, k_half_tenth_second));
        CHECK_THAT(degrees(longitude, longitude_text(Angle::degrees(lon))), WithinAbs(lon, k_half_tenth_second));
        CHECK_THAT(degrees(bearing, bearing_text(Angle::degrees(azimuth))), WithinAbs(azimuth, k_half_tenth_second));
        CHECK_THAT(degrees(lean, lean_text(Angle::degrees(back))), WithinAbs(back, k_half_tenth_second));
        CHECK_THAT(degrees(latitude, fmt::format("{:.9f}", lat)), WithinAbs(lat, 1e-9));
        const int minute = static_cast<int>(random() % 1441);
        CHECK_THAT(*hour_of_day(hour_text(minute / 60.0)), WithinAbs(minute / 60.0, 1e-12));
    }
    using namespace std::chrono;
    for (sys_days day = sys_days{year{2024} / January / 1}; day < sys_days{year{2025} / January / 1}; day += days{1}) {
        const year_month_day date{day};
        const month_day in_year{date.month(), date.day()};
        CHECK(*day_of_year(day_text(in_year)) == in_year);
    }
    CHECK(bearing_text(Angle::degrees(157)) == "S 23° E");
    CHECK(bearing_text(Angle::degrees(180)) == "south");
    CHECK(bearing_text(Angle::degrees(359.99999999)) == "north");
    CHECK(latitude_text(Angle::degrees(54.0 + 14.0 / 60.0)) == "54° 14' N");
    CHECK(latitude_text(Angle::degrees(-33.0 - 59.99999 / 60.0)) == "34° S");
    CHECK(lean_text(Angle{}) == "upright");
}

TEST_CASE("random scraps of quantities never trip a reader", "[cli]") {
    constexpr const char* k_scraps[] = {"1",    "23",   "0",  ".5",   "999999999999",
                                        "°",    "'",    "\"", "″",    "½",
                                        "-",    "+",    "/",  ":",    ".",
                                        ",",    " ",    "N",  "S",    "E",
                                        "W",    "mm",   "in", "ft",   "am",
                                        "pm",   "June", "to", "back", "north",
                                        "\xFF", "\n",   "é",  "1e9",  "inf",
                                        "nan"};
    std::mt19937 random = seeded();
    for (int i = 0; i < 20000; ++i) {
        std::string text;
        for (std::size_t n = random() % 8; n > 0; --n)
            text += k_scraps[random() % std::size(k_scraps)];
        if (const auto read = length_mm(text))
            CHECK(std::isfinite(*read));
        for (auto* reader : {latitude, longitude, bearing, lean, plain_angle})
            if (const auto read = reader(text))
                CHECK(std::isfinite(read->in_degrees()));
        if (const auto read = hour_of_day(text))
            CHECK((*read >= 0.0 && *read <= 24.0));
        if (const auto read = day_of_year(text))
            CHECK(read->ok());
        if (const auto read = calendar_date(text))
            CHECK(read->ok());
        (void)years(text);
        (void)minutes(text);
        (void)whole_number(text);
    }
}

namespace {
struct CommaPoint : std::numpunct<char> {
    char do_decimal_point() const override { return ','; }
    char do_thousands_sep() const override { return '.'; }
    std::string do_grouping() const override { return "\3"; }
};
} // namespace

TEST_CASE("a locale with a decimal comma changes nothing", "[cli]") {
    const std::locale before = std::locale::global(std::locale{std::locale::classic(), new CommaPoint});
    const char* german = std::setlocale(LC_ALL, "de_DE.UTF-8"); // where the machine has it
    const double length = mm("1.234 m");
    const double angle = degrees(latitude, "54.2340");
    const std::string text = length_text(1234.5, Units::millimetres);
    const std::string big = bearing_text(Angle::degrees(157.5));
    std::locale::global(before);
    std::setlocale(LC_ALL, "C");
    INFO((german == nullptr ? "de_DE.UTF-8 is not installed" : german));
    CHECK_THAT(length, WithinAbs(1234.0, 1e-9));
    CHECK_THAT(angle, WithinAbs(54.234, 1e-12));
    CHECK(text == "1234.5 mm");
    CHECK(big == "S 22° 30' E");
}
