// SPDX-License-Identifier: MIT
#include "cli/design/polygon.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <numbers>
#include <random>

using namespace dialwright::cli;
using Catch::Matchers::WithinAbs;

namespace {
using Corners = std::vector<PlatePointMm>;
using Pair = std::pair<std::size_t, std::size_t>;
} // namespace

TEST_CASE("areas have the sign of their turn", "[cli]") {
    CHECK_THAT(twice_area_mm2({{0, 0}, {3, 0}, {3, 4}}), WithinAbs(12.0, 1e-12));
    CHECK_THAT(twice_area_mm2({{0, 0}, {3, 4}, {3, 0}}), WithinAbs(-12.0, 1e-12));
}

TEST_CASE("sides that cross, touch, fold back or have no length", "[cli]") {
    CHECK_FALSE(first_sides_in_trouble({{0, 0}, {4, 0}, {4, 3}, {0, 3}}));
    CHECK_FALSE(first_sides_in_trouble({{0, 0}, {2, 0}, {4, 0}, {4, 3}})); // a corner on a straight side
    CHECK(first_sides_in_trouble({{0, 0}, {4, 0}, {0, 3}, {4, 3}}) == Pair{1, 3});
    CHECK(first_sides_in_trouble({{0, 0}, {4, 0}, {4, 3}, {2, 0}, {0, 3}}) == Pair{0, 2});
    CHECK(first_sides_in_trouble({{0, 0}, {4, 0}, {4, 0}, {0, 3}}) == Pair{1, 1});
    CHECK(first_sides_in_trouble({{0, 0}, {4, 0}, {4, 3}, {4, 1}, {0, 3}}) == Pair{1, 2}); // runs back on itself
    CHECK(first_sides_in_trouble({{0, 0}, {2, 2}, {4, 4}}));
}

TEST_CASE("stars about a point never cross, however they are turned and wherever they start", "[cli]") {
    const auto seed = std::random_device{}();
    INFO("seed " << seed);
    std::mt19937 random{seed};
    std::uniform_real_distribution<double> radius{50.0, 2000.0}, shift{-2000.0, 2000.0};
    for (int round = 0; round < 300; ++round) {
        const std::size_t count = 3 + random() % 20;
        const double x = shift(random), y = shift(random);
        Corners corners;
        for (std::size_t i = 0; i < count; ++i) {
            const double turn = 2.0 * std::numbers::pi * static_cast<double>(i) / static_cast<double>(count);
            const double r = radius(random);
            corners.push_back({x + r * std::cos(turn), y + r * std::sin(turn)});
        }
        CHECK_FALSE(first_sides_in_trouble(corners));
        CHECK(twice_area_mm2(corners) > 0.0);
        if (count >= 4) {
            // A walk that takes two neighbours in the wrong order on a convex outline always crosses itself.
            for (std::size_t i = 0; i < count; ++i) {
                const double turn = 2.0 * std::numbers::pi * static_cast<double>(i) / static_cast<double>(count);
                corners[i] = {x + 100.0 * std::cos(turn), y + 100.0 * std::sin(turn)};
            }
            const std::size_t at = random() % count;
            std::swap(corners[at], corners[(at + 1) % count]);
            CHECK(first_sides_in_trouble(corners));
        }
    }
}
