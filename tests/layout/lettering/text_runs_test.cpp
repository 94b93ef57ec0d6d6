// SPDX-License-Identifier: MIT
#include "layout/lettering/text_runs.hpp"

#include "layout/lettering/lettering.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;
using Catch::Matchers::Contains;

namespace {

/// Characters as they are seen from left to right.
std::u32string seen(std::u32string_view text) {
    std::u32string line;
    for (const std::size_t place : visual_order(direction_levels(text)))
        line.push_back(text[place]);
    return line;
}

} // namespace

TEST_CASE("UTF-8 is read character by character", "[layout][lettering]") {
    CHECK(decoded("").empty());
    CHECK(decoded("A\u00e9\u03a9\u20ac\U0001F31E") == U"A\u00e9\u03a9\u20ac\U0001F31E");
}

TEST_CASE("What is not UTF-8 is refused with the byte at fault", "[layout][lettering]") {
    // The Unicode Standard, table 3-7 (well-formed byte sequences).
    for (const char* wrong :
         {"\xFF", "\x80", "\xC0\x80", "\xC1\xBF", "\xE0\x80\xAF", "\xED\xA0\x80", "\xF0\x80\x80\x80",
          "\xF4\x90\x80\x80", "\xF5\x80\x80\x80", "\xC3", "\xE2\x82", "\xC3(", "\xF0\x9F\x8C"}) {
        CAPTURE(wrong);
        CHECK_THROWS_AS(decoded(std::string("ab") + wrong), LetteringError);
        CHECK_THROWS_WITH(decoded(std::string("ab") + wrong), Contains("UTF-8") && Contains("byte 3"));
    }
}

TEST_CASE("Lettering is one line without control characters", "[layout][lettering]") {
    CHECK_THROWS_WITH(decoded("one\ntwo"), Contains("U+000A"));
    CHECK_THROWS_WITH(decoded("one\ttwo"), Contains("U+0009"));
    CHECK_THROWS_WITH(decoded("one\u2028two"), Contains("U+2028"));
    CHECK_THROWS_WITH(decoded(std::string_view("a\0b", 3)), Contains("U+0000"));
}

TEST_CASE("A character is named by itself and by its number", "[layout][lettering]") {
    CHECK(named(U'A') == "\"A\" (U+0041)");
    CHECK(named(U'\u00e9') == "\"\u00e9\" (U+00E9)");
    CHECK(named(U'\u20ac') == "\"\u20ac\" (U+20AC)");
    CHECK(named(U'\U0001F31E') == "\"\U0001F31E\" (U+1F31E)");
}

TEST_CASE("Lines of both directions stand as they are read", "[layout][lettering]") {
    // By the rules of Unicode Standard Annex 9 applied by hand; Hebrew letters alef, bet, gimel are U+05D0 to U+05D2.
    CHECK(seen(U"abc 12") == U"abc 12");
    CHECK(seen(U"\u05d0\u05d1\u05d2") == U"\u05d2\u05d1\u05d0");
    CHECK(seen(U"ab \u05d0\u05d1 cd") == U"ab \u05d1\u05d0 cd");
    CHECK(seen(U"\u05d0\u05d1 12:30 \u05d2") == U"\u05d2 12:30 \u05d1\u05d0");
    CHECK(seen(U"\u05d0 ab \u05d1") == U"\u05d1 ab \u05d0");
    CHECK(seen(U"\u05d0 54\u00b0") == U"54\u00b0 \u05d0");
    CHECK(seen(U"ab, \u05d0, \u05d1.") == U"ab, \u05d1 ,\u05d0.");
    CHECK(seen(U"54\u00b0 14\u2032") == U"54\u00b0 14\u2032");
    CHECK(seen(U"").empty());
}

TEST_CASE("Shared characters take the script of their neighbours", "[layout][lettering]") {
    constexpr Script k_latin = 0x4C61746E, k_greek = 0x4772656B; // 'Latn', 'Grek', ISO 15924
    CHECK(scripts_of(U"a \u03a9") == std::vector<Script>{k_latin, k_latin, k_greek});
    CHECK(scripts_of(U"\u2014\u03a9") == std::vector<Script>{k_greek, k_greek});
    CHECK(scripts_of(U"12") == std::vector<Script>{k_latin, k_latin});
    CHECK(joins_letter_before(U'\u0301'));
    CHECK(joins_letter_before(U'\u200d'));
    CHECK_FALSE(joins_letter_before(U'e'));
    CHECK(is_space(U' '));
    CHECK(is_space(U'\u2009'));
    CHECK_FALSE(is_space(U'-'));
}
