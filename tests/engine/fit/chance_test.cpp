// SPDX-License-Identifier: MIT
#include "engine/fit/chance.hpp"

#include <catch2/catch.hpp>

#include <cmath>

using Catch::Matchers::WithinAbs;
using namespace dialwright;

TEST_CASE("Student's two-sided 95 % points are those of the printed tables", "[fit][published]") {
    // Any table of Student's t, column 0.975 (from memory); half the last printed digit.
    const struct {
        double freedom, t;
    } rows[] = {{1, 12.706}, {2, 4.303},  {3, 3.182},  {4, 2.776},  {5, 2.571},  {7, 2.365},
                {10, 2.228}, {15, 2.131}, {20, 2.086}, {30, 2.042}, {60, 2.000}, {120, 1.980}};
    for (const auto& row : rows)
        CHECK_THAT(student_95(row.freedom), WithinAbs(row.t, 0.0006));
    CHECK_THAT(student_95(1e9), WithinAbs(1.95996, 1e-4));
    CHECK(student_95(0.5) > student_95(1.0));
    CHECK_THAT(student_95(3.5), WithinAbs((3.182 + 2.776) / 2, 0.06));
}

TEST_CASE("Fisher's upper tail is that of the printed tables", "[fit][published]") {
    // Any table of F, upper 5 % and 1 % points (from memory), three printed decimals.
    const struct {
        double above, below, ratio, chance;
    } rows[] = {{1, 5, 6.608, 0.05},  {2, 10, 4.103, 0.05},  {2, 2, 19.00, 0.05},
                {5, 20, 2.711, 0.05}, {1, 10, 10.044, 0.01}, {3, 12, 5.953, 0.01}};
    for (const auto& row : rows)
        CHECK_THAT(fisher_above(row.ratio, row.above, row.below),
                   WithinAbs(row.chance, 2e-4 * row.chance / 0.05 + 2e-5));
    CHECK(fisher_above(0, 2, 3) == 1.0);
    CHECK(fisher_above(1e9, 2, 8) < 1e-9);
    // With one degree above, F is t squared.
    CHECK_THAT(fisher_above(std::pow(student_95(6), 2), 1, 6), WithinAbs(0.05, 1e-6));
}

TEST_CASE("The beta law's share keeps its ends and its symmetry", "[fit]") {
    CHECK(beta_share(0, 2, 3) == 0.0);
    CHECK(beta_share(1, 2, 3) == 1.0);
    CHECK_THAT(beta_share(0.3, 1, 1), WithinAbs(0.3, 1e-12));
    for (const double x : {0.05, 0.4, 0.77, 0.99})
        CHECK_THAT(beta_share(x, 2.5, 0.7) + beta_share(1 - x, 0.7, 2.5), WithinAbs(1.0, 1e-12));
}
