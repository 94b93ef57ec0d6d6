// SPDX-License-Identifier: MIT
#include "cli/readings/clock_text.hpp"
#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;
using namespace dialwright::cli;
using namespace std::chrono_literals;

namespace {

std::string utc_of(std::string_view text, std::optional<std::chrono::year_month_day> day = {},
                   const char* zone = "Europe/London") {
    const Read<Instant> read = clock_instant(text, day, *Zone::find(zone));
    return read ? write_instant(*read) : "trouble: " + read.trouble().message + ": " + read.trouble().hint;
}

} // namespace

TEST_CASE("Times of the clock as people write them", "[readings]") {
    for (const char* text :
         {"2027-05-03 10:12:30", "2027-05-03T10:12:30", "3 May 2027 10:12:30", "3rd May 2027 10:12:30 am",
          "2027-05-03 10:12:30 BST", "2027-05-03 09:12:30Z", "2027-05-03 09:12:30 UTC", "2027-05-03 11:12:30+02:00",
          "2027-05-03 9:12:30 GMT", "2027-05-03 04:12:30-05"}) {
        INFO(text);
        CHECK(utc_of(text) == "2027-05-03T09:12:30Z");
    }
    CHECK(utc_of("3 pm", 2027y / 1 / 9) == "2027-01-09T15:00:00Z");
    CHECK(utc_of("12:05 am", 2027y / 1 / 9) == "2027-01-09T00:05:00Z");
    CHECK(utc_of("10:12:30.5", 2027y / 1 / 9) == "2027-01-09T10:12:30.5Z");
    CHECK(utc_of("2027-01-09 22:00", {}, "Pacific/Auckland") == "2027-01-09T09:00:00Z");
}

TEST_CASE("The hour that clocks show twice wants its letters, the one that they jump over is refused", "[readings]") {
    CHECK_THAT(utc_of("2027-10-31 01:30"),
               Catch::Contains("showed this time twice") && Catch::Contains("write BST or GMT"));
    CHECK(utc_of("2027-10-31 01:30 BST") == "2027-10-31T00:30:00Z");
    CHECK(utc_of("2027-10-31 01:30 GMT") == "2027-10-31T01:30:00Z");
    CHECK_THAT(utc_of("2027-03-28 01:30"), Catch::Contains("went forward over that time"));
    CHECK_THAT(utc_of("2027-06-01 12:00 CET"), Catch::Contains("showed BST then"));
}

TEST_CASE("What is no time says why", "[readings]") {
    const struct {
        const char *text, *said;
    } cases[] = {{"10:12", "does not say the day"},
                 {"2027-05-03", "has no time of the clock"},
                 {"2027-05-03 noonish", "has no time of the clock"},
                 {"2027-05-03 25:00", "no time that a clock shows"},
                 {"2027-05-03 10:60", "no time that a clock shows"},
                 {"2027-05-03 13:00 pm", "clocks of twelve hours"},
                 {"2027-02-29 10:00", "no such day"},
                 {"2027-13-01 10:00", "no month 13"},
                 {"3 May, 10:00", "does not say the year"},
                 {"1700-05-03 10:00", "outside 1800"},
                 {"2027-05-03 10:00 and a bit", "goes on after the time"},
                 {"", "does not say the day"},
                 {"2027-05-03 10:00 +", "goes on after the time"}};
    for (const auto& one : cases) {
        INFO(one.text);
        const std::string said = utc_of(one.text);
        CHECK_THAT(said, Catch::Contains("trouble: "));
        CHECK_THAT(said, Catch::Contains(one.said));
    }
}
