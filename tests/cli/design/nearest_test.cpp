// SPDX-License-Identifier: MIT
#include "cli/design/nearest.hpp"

#include <catch2/catch.hpp>

#include <array>

using namespace dialwright::cli;

TEST_CASE("slips between two words", "[cli]") {
    CHECK(slips_between("", "") == 0);
    CHECK(slips_between("nodus", "") == 5);
    CHECK(slips_between("", "nodus") == 5);
    CHECK(slips_between("plate", "plate") == 0);
    CHECK(slips_between("plate", "PLATE") == 0);
    CHECK(slips_between("nodus_height", "nodus height") == 0);
    CHECK(slips_between("plaet", "plate") == 1);  // two swapped
    CHECK(slips_between("plat", "plate") == 1);   // one missing
    CHECK(slips_between("pplate", "plate") == 1); // one more
    CHECK(slips_between("place", "plate") == 1);  // one other
    CHECK(slips_between("gnomon", "motto") == slips_between("motto", "gnomon"));
}

TEST_CASE("the nearest word, where one is near", "[cli]") {
    constexpr std::array<std::string_view, 4> k_words = {"latitude", "longitude", "zone", "name"};
    CHECK(nearest("latitud", k_words) == "latitude");
    CHECK(nearest("longtitude", k_words) == "longitude");
    CHECK(nearest("Zone", k_words) == "zone");
    CHECK(nearest("weathervane", k_words).empty());
    CHECK(nearest("", k_words).empty());
    CHECK(nearest(std::string(100000, 'x'), k_words).empty());
    CHECK(nearest("x", k_words).empty());
}

TEST_CASE("words in a sentence", "[cli]") {
    constexpr std::array<std::string_view, 3> k_words = {"a", "b", "c"};
    CHECK(one_of(k_words) == "a, b or c");
    CHECK(one_of(std::span{k_words}.first(1)) == "a");
    CHECK(one_of({}).empty());
}
