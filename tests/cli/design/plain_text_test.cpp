// SPDX-License-Identifier: MIT
#include "cli/design/plain_text.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::cli;

TEST_CASE("line ends and the byte order mark", "[cli]") {
    CHECK(plain_lines("a\r\nb\rc\nd\r") == "a\nb\nc\nd\n");
    CHECK(plain_lines("\xEF\xBB\xBFx") == "x");
    CHECK(plain_lines("x\xEF\xBB\xBF") == "x\xEF\xBB\xBF");
}

TEST_CASE("what is UTF-8 and what is not", "[cli]") {
    // Boundaries of the table in RFC 3629, section 4.
    for (const char* good :
         {"", "a", "\x7E", "\xC2\xA0", "\xDF\xBF", "\xE0\xA0\x80", "\xEC\xBF\xBF", "\xED\x9F\xBF", "\xEE\x80\x80",
          "\xEF\xBF\xBF", "\xF0\x90\x80\x80", "\xF4\x8F\xBF\xBF", "\t\n", "\xC2\x85"}) {
        INFO(good);
        CHECK_FALSE(first_bad_character(good));
    }
    for (const char* bad : {"\x80",
                            "\xBF",
                            "\xC0\xAF",
                            "\xC1\xBF",
                            "\xC2",
                            "\xC2\x20",
                            "\xE0\x9F\xBF",
                            "\xE2\x80",
                            "\xED\xA0\x80",
                            "\xF0\x8F\xBF\xBF",
                            "\xF4\x90\x80\x80",
                            "\xF5\x80\x80\x80",
                            "\xFF",
                            "\xFE",
                            "\x01",
                            "\x04",
                            "\x1B",
                            "\x7F",
                            "\xC2\x80",
                            "\xC2\x9F",
                            "\r"}) {
        INFO(bad);
        CHECK(first_bad_character(bad));
    }
    const auto found = first_bad_character("Ὥρα\nälter \xFF");
    REQUIRE(found);
    CHECK(found->at == Position{2, 7});
}

TEST_CASE("texts are quoted on one line, whole characters, and not for ever", "[cli]") {
    CHECK(in_quotes("360 mm") == "\"360 mm\"");
    CHECK(in_quotes("a\nb\tc") == "\"a b c\"");
    CHECK(in_quotes(std::string(59, 'a') + "ä") == "\"" + std::string(59, 'a') + "…\"");
    CHECK(in_quotes(std::string(58, 'a') + "ä") == "\"" + std::string(58, 'a') + "ä\"");
}
