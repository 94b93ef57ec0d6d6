// SPDX-License-Identifier: MIT
#include "layout/sheet/note_width.hpp"

#include "layout/lettering/sheet_font.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

// That the widths are those that the PDF shows is checked in tests/layout/export/pdf_test.cpp.
TEST_CASE("A note's width grows with its size and its letters", "[layout]") {
    CHECK(note_width_mm("", 3) == 0);
    CHECK_THAT(note_width_mm("Mm", 6), WithinAbs(2 * note_width_mm("Mm", 3), 1e-12));
    CHECK_THAT(note_width_mm("ab", 3), WithinAbs(note_width_mm("a", 3) + note_width_mm("b", 3), 1e-12));
    CHECK(note_width_mm("measure", 3, true) > note_width_mm("measure", 3, false));
    CHECK(note_width_mm("日", 3) == note_width_mm("?", 3)); // not in the font
}

TEST_CASE("The sheets' font has the trade's signs", "[layout]") {
    for (const char32_t character : U"°′″δφ−×½→←↑↓“”…éüñøçåŁőΩάώ·–—") {
        if (character != 0) {
            INFO(static_cast<unsigned long>(character));
            CHECK(sheet_font(false).has(character));
            CHECK(sheet_font(true).has(character));
        }
    }
}

TEST_CASE("Characters are taken off UTF-8, and wrong bytes are noticed", "[layout]") {
    const auto first = [](std::string_view text) { return take_character(text); };
    CHECK(first("a") == U'a');
    CHECK(first("°") == U'°');
    CHECK(first("″") == U'″');
    CHECK(first("\xF0\x9F\x8C\x9E") == U'\U0001F31E');
    for (const char* wrong :
         {"\x80", "\xC0\xAF", "\xE2\x80", "\xED\xA0\x80", "\xFF", "\xF4\x90\x80\x80", "\xE0\x80\x80"}) {
        CHECK(first(wrong) == 0xFFFD);
    }
    std::string_view text{"\xE2x"};
    CHECK(take_character(text) == 0xFFFD);
    CHECK(text == "x"); // a wrong byte does not swallow its neighbour
}
