// SPDX-License-Identifier: MIT
#include "layout/sheet/paper.hpp"

#include <catch2/catch.hpp>

using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

TEST_CASE("Papers are known by name, whatever the case", "[layout]") {
    const auto size = [](const char* name, double short_mm, double long_mm) {
        const auto paper = paper_named(name);
        INFO(name);
        REQUIRE(paper);
        CHECK_THAT(paper->short_mm, WithinAbs(short_mm, 1e-9));
        CHECK_THAT(paper->long_mm, WithinAbs(long_mm, 1e-9));
    };
    // ISO 216, from memory: A0 and B0, each next one halved and rounded down to whole millimetres.
    size("a4", 210, 297);
    size("A0", 841, 1189);
    size(" b2 ", 500, 707);
    // Inches, from memory.
    size("LETTER", 215.9, 279.4);
    size("Tabloid", 279.4, 431.8);
    size("arch-d", 609.6, 914.4);
    CHECK_FALSE(paper_named("A11"));
    CHECK_FALSE(paper_named(""));
    CHECK_FALSE(paper_named("foolscap"));
}

TEST_CASE("Each ISO size is half of the one before", "[layout]") {
    for (const char series : {'A', 'B'}) {
        for (int i = 0; i < 5; ++i) {
            const auto larger = paper_named(std::string{series} + std::to_string(i));
            const auto smaller = paper_named(std::string{series} + std::to_string(i + 1));
            CHECK(smaller->long_mm == larger->short_mm);
            CHECK_THAT(smaller->short_mm, WithinAbs(larger->long_mm / 2, 0.51));
        }
    }
}

TEST_CASE("Rolls have a width and as much length as is needed", "[layout]") {
    const auto roll = paper_named("Roll 24 in");
    REQUIRE(roll);
    CHECK(roll->roll);
    CHECK_THAT(roll->short_mm, WithinAbs(609.6, 1e-9));
    CHECK(paper_named("roll 61cm")->short_mm == 610);
    CHECK_FALSE(paper_named("roll"));
    CHECK_FALSE(paper_named("roll 610"));
    CHECK_FALSE(paper_named("roll 5 mm"));
    CHECK_FALSE(paper_named("roll 1e9 mm"));
}

TEST_CASE("Every listed name is known", "[layout]") {
    for (const std::string& name : paper_names()) {
        INFO(name);
        CHECK(paper_named(name));
    }
}
