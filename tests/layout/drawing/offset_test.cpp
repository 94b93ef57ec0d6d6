// SPDX-License-Identifier: MIT
#include "layout/drawing/offset.hpp"

#include "layout/drawing/measures.hpp"

#include <catch2/catch.hpp>

#include <numbers>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::WithinAbs;

TEST_CASE("A disc clears what is wider than it is", "[layout]") {
    const Path bar = rectangle({0, 0, 20, 2});
    const DiscFit narrow = fit_of_disc({bar}, 0.9);
    CHECK_THAT(narrow.area_mm2, WithinAbs(40, 1e-3));
    CHECK_THAT(narrow.missed_mm2, WithinAbs(0, 0.01)); // corners of right angles count as cleared
    const DiscFit wide = fit_of_disc({bar}, 1.1);
    CHECK_THAT(wide.missed_mm2, WithinAbs(40, 1e-3));
    CHECK_THAT(wide.worst.x_mm, WithinAbs(10, 1e-3));
    CHECK_THAT(wide.worst.y_mm, WithinAbs(1, 1e-3));
}

TEST_CASE("What a disc misses is where the shape is thin", "[layout]") {
    const Path stem = rectangle({0, 0, 4, 30}), hairline = rectangle({4, 14, 24, 14.5});
    const DiscFit fit = fit_of_disc({stem, hairline}, 0.5);
    CHECK_THAT(fit.area_mm2, WithinAbs(130, 1e-2));
    // Of 20 mm of the hairline the disc in the stem comes as near as 0.45 of its radius to a little.
    CHECK_THAT(fit.missed_mm2, WithinAbs(10, 0.2));
    CHECK_THAT(fit.worst.x_mm, WithinAbs(14, 0.3));
    CHECK_THAT(fit.worst.y_mm, WithinAbs(14.25, 1e-3));
}

TEST_CASE("An eye that holds no disc is lost", "[layout]") {
    const auto ring = [](double eye) { return std::vector<Path>{circle({0, 0}, 10), reversed(circle({0, 0}, eye))}; };
    const DiscFit open = fit_of_disc(ring(1.2), 1.0), lost = fit_of_disc(ring(0.8), 1.0);
    CHECK(open.eyes == 1);
    CHECK(open.lost_eyes == 0);
    CHECK(lost.lost_eyes == 1);
    CHECK_THAT(open.area_mm2, WithinAbs(std::numbers::pi * (100 - 1.44), 3.1));
    CHECK_THAT(open.missed_mm2, WithinAbs(0, 1e-6));
}
