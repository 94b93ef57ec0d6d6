// SPDX-License-Identifier: MIT
#include "layout/lettering/font_files.hpp"

#include "layout/lettering/lettering.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;
using Catch::Matchers::Contains;
using Catch::Matchers::EndsWith;

TEST_CASE("The machine's fonts are listed once", "[layout][lettering]") {
    REQUIRE(font_list() != nullptr);
    CHECK(font_list() == font_list());
}

TEST_CASE("A family is found by its whole name in any case", "[layout][lettering]") {
    CHECK_THAT(font_file("DejaVu Sans").path, EndsWith("DejaVuSans.ttf"));
    CHECK(font_file("dejavu SANS") == font_file("DejaVu Sans"));
    CHECK_THROWS_AS(font_file("DejaVu"), LetteringError);
    CHECK_THROWS_AS(font_file(""), LetteringError);
    CHECK_THROWS_AS(font_file(std::string_view("DejaVu Sans\0", 12)), LetteringError);
}

TEST_CASE("Of a family's faces the asked one is taken", "[layout][lettering]") {
    CHECK_THAT(font_file("DejaVu Sans", false, true).path, EndsWith("DejaVuSans-Bold.ttf"));
    CHECK_THAT(font_file("DejaVu Sans", true, false).path, EndsWith("DejaVuSans-Oblique.ttf"));
    CHECK_THAT(font_file("DejaVu Sans", true, true).path, EndsWith("DejaVuSans-BoldOblique.ttf"));
    CHECK_THAT(font_file("GFS Didot", true, true).path, EndsWith("GFSDidotBoldItalic.otf"));
}

TEST_CASE("Of a family's design sizes the one for 12 point is taken", "[layout][lettering]") {
    CHECK_THAT(font_file("EB Garamond").path, EndsWith("EBGaramond12-Regular.otf"));
    CHECK_THAT(font_file("EB Garamond", true).path, EndsWith("EBGaramond12-Italic.otf"));
    CHECK_THAT(font_file("EB Garamond", false, true).path, EndsWith("EBGaramond12-Bold.otf"));
    CHECK_THAT(font_file("EB Garamond 08").path, EndsWith("EBGaramond08-Regular.otf"));
    // This family has no bold italic: the slant counts before the weight.
    CHECK_THAT(font_file("EB Garamond", true, true).path, EndsWith("EBGaramond12-Italic.otf"));
}

TEST_CASE("A font that is not installed is refused with what comes nearest", "[layout][lettering]") {
    CHECK_THROWS_WITH(font_file("EB Garramond"),
                      Contains("\"EB Garramond\" is not installed") && Contains("\"EB Garamond\"") &&
                          EndsWith("install the font or name another under lettering: font"));
    CHECK_THROWS_WITH(font_file("Garamond"), Contains("\"EB Garamond\""));
}

TEST_CASE("Stand-ins come in one order and list their characters", "[layout][lettering]") {
    const StandIns one("EB Garamond", false, false), other("EB Garamond", false, false);
    REQUIRE(one.size() > 0);
    REQUIRE(one.size() == other.size());
    bool hebrew = false;
    for (std::size_t i = 0; i < one.size(); ++i) {
        CHECK(one.file(i) == other.file(i));
        CHECK_FALSE(one.lists(i, U'\uE123'));
        hebrew = hebrew || one.lists(i, U'\u05d0');
    }
    CHECK(hebrew);
}
