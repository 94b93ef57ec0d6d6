// SPDX-License-Identifier: MIT
#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <random>
#include <string>

using namespace dialwright;
using namespace std::chrono;

TEST_CASE("instants are read in every form that is allowed", "[engine][time]") {
    const Instant noon = Instant{sys_days{2026y / 6 / 21}} + 11h;
    CHECK(read_instant("2026-06-21T11:00:00Z") == noon);
    CHECK(read_instant("2026-06-21T11:00Z") == noon);
    CHECK(read_instant("2026-06-21T12:00:00+01:00") == noon);
    CHECK(read_instant("2026-06-21T05:30-05:30") == noon);
    CHECK(read_instant("2026-06-21T13+02") == std::nullopt);
    CHECK(read_instant("2026-06-21T13:00+02") == noon);
    CHECK(read_instant("2026-06-22T01:00:00+14:00") == noon);
    CHECK(read_instant("2026-06-21T11:00:00.25Z") == noon + 250ms);
    CHECK(read_instant("2026-06-21T11:00:00,000001Z") == noon + 1us);
    CHECK(read_instant("2026-06-21T11:00:00.9999996Z") == noon + 1s);
    CHECK(read_instant("2026-06-21T24:00:00Z") == Instant{sys_days{2026y / 6 / 22}});
    CHECK(read_instant("2016-12-31T23:59:60Z") == Instant{sys_days{2017y / 1 / 1}});
    CHECK(read_instant("2024-02-29T00:00:00Z") == Instant{sys_days{2024y / 2 / 29}});
    CHECK(read_instant("0000-01-01T00:00:00Z") == Instant{sys_days{0y / 1 / 1}});
}

TEST_CASE("what is no instant is refused", "[engine][time]") {
    for (const char* text : {"",
                             "2026",
                             "2026-06-21",
                             "2026-06-21T11:00:00",
                             "2026-06-21 11:00:00Z",
                             "2026-6-21T11:00:00Z",
                             "2026-06-21T11:00:00z",
                             "2026-06-21t11:00:00Z",
                             "2026-06-21T11:00:00ZZ",
                             " 2026-06-21T11:00:00Z",
                             "2026-06-21T11:00:00Z ",
                             "2026-13-01T00:00:00Z",
                             "2026-00-01T00:00:00Z",
                             "2026-02-29T00:00:00Z",
                             "2026-06-31T00:00:00Z",
                             "2026-06-21T25:00:00Z",
                             "2026-06-21T24:00:01Z",
                             "2026-06-21T11:60:00Z",
                             "2026-06-21T11:00:61Z",
                             "2026-06-21T11:30:60Z",
                             "2026-06-21T11:00:00.Z",
                             "2026-06-21T11:00:00.1234567890Z",
                             "2026-06-21T11:00.5Z",
                             "2026-06-21T11:00:00+24:00",
                             "2026-06-21T11:00:00+1:00",
                             "2026-06-21T11:00:00+01:60",
                             "2026-06-21T11:00:00+01:",
                             "2026-06-21T11:00:00+0100",
                             "+2026-06-21T11:00:00Z",
                             "-026-06-21T11:00:00Z",
                             "20260621T110000Z",
                             "2026-06-21T+1:00:00Z",
                             "2026-06-21T11:00:00\u22120100"}) {
        CAPTURE(text);
        CHECK(read_instant(text) == std::nullopt);
    }
    CHECK(read_instant(std::string_view{"2026-06-21T11:00:00Z\0", 21}) == std::nullopt);
}

TEST_CASE("instants are written without idle digits", "[engine][time]") {
    const Instant noon = Instant{sys_days{2026y / 6 / 21}} + 11h;
    CHECK(write_instant(noon) == "2026-06-21T11:00:00Z");
    CHECK(write_instant(noon + 250ms) == "2026-06-21T11:00:00.25Z");
    CHECK(write_instant(noon - 1us) == "2026-06-21T10:59:59.999999Z");
    CHECK(write_instant(Instant{sys_days{1969y / 12 / 31}} + 1us) == "1969-12-31T00:00:00.000001Z");
}

TEST_CASE("what is written reads back the same", "[engine][time]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    const Instant first{sys_days{0y / 1 / 1}}, last{sys_days{9999y / 12 / 31}};
    std::uniform_int_distribution<std::int64_t> any{first.time_since_epoch().count(), last.time_since_epoch().count()};
    for (int i = 0; i < 5000; ++i) {
        const Instant instant{microseconds{any(random)}};
        CHECK(read_instant(write_instant(instant)) == instant);
    }
}

TEST_CASE("a damaged instant is never read as something else than its letters say", "[engine][time]") {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937 random{seed};
    const std::string whole = "2026-06-21T11:00:00.5+01:00", letters = "0129-+:TZ., x";
    for (int i = 0; i < 20000; ++i) {
        std::string text = whole;
        text[random() % text.size()] = letters[random() % letters.size()];
        if (i % 3 == 0)
            text.erase(random() % text.size(), 1 + random() % 3);
        if (const auto instant = read_instant(text))
            CHECK(read_instant(write_instant(*instant)) == instant);
    }
}
