// SPDX-License-Identifier: MIT
#include "engine/fit/chance.hpp"
#include "engine/fit/least_squares.hpp"

#include <catch2/catch.hpp>

#include <cmath>
#include <random>
#include <vector>

using Catch::Matchers::WithinAbs;
using namespace dialwright;
using Eigen::VectorXd;

namespace {

/// y = a + b x through points, nominal deviation 1; what is known beforehand of a and b is `known_to`.
FitTask straight_line(const std::vector<double>& x, const std::vector<double>& y, double known_to = 1e6) {
    FitTask task;
    task.readings = int(x.size());
    task.unknowns.resize(2);
    for (Unknown& unknown : task.unknowns) {
        unknown.step = 1e-4;
        unknown.known_to = known_to;
    }
    task.least_noise = 1e-6;
    task.residuals = [x, y](const VectorXd& p, VectorXd& r) {
        for (std::size_t i = 0; i < x.size(); ++i)
            r[int(i)] = y[i] - p[0] - p[1] * x[i];
        return true;
    };
    return task;
}

} // namespace

TEST_CASE("A straight line has the slope, scatter and range of the textbook", "[fit]") {
    // By hand: x = 0 … 4, y = 1, 3, 2, 5, 4: b = Σ(x−2)(y−3)/Σ(x−2)² = 8/10, a = 3 − 2b; Σr² = 3.6, freedom 3.
    const Fit made = fit(straight_line({0, 1, 2, 3, 4}, {1, 3, 2, 5, 4}));
    REQUIRE(made.settled);
    CHECK_THAT(made.values[1], WithinAbs(0.8, 1e-6));
    CHECK_THAT(made.values[0], WithinAbs(1.4, 1e-6));
    CHECK_THAT(made.freedom, WithinAbs(3, 1e-6));
    CHECK_THAT(made.noise, WithinAbs(std::sqrt(3.6 / 3), 1e-4));
    const Spread slope = made.spread(1);
    CHECK_THAT(slope.deviation, WithinAbs(std::sqrt(1.2 / 10), 1e-4));
    CHECK_THAT(slope.range_95, WithinAbs(3.1824 * std::sqrt(1.2 / 10), 1e-3));
    VectorXd at_three(2);
    at_three << 1, 3;
    CHECK_THAT(made.spread(at_three).deviation, WithinAbs(std::sqrt(1.2 * (0.2 + 0.1)), 1e-4));
}

TEST_CASE("What is known beforehand counts as a reading, and fills in for readings that tell nothing", "[fit]") {
    // All readings at x = 0: the slope is only what was known.
    FitTask task = straight_line({0, 0, 0, 0}, {1, 2, 1, 2}, 3.0);
    task.unknowns[1].known = 0.5;
    const Fit made = fit(task);
    REQUIRE(made.settled);
    CHECK_THAT(made.values[1], WithinAbs(0.5, 1e-6));
    CHECK_THAT(made.spread(1).deviation, WithinAbs(3.0, 1e-6));
    CHECK_THAT(made.spread(1).range_95, WithinAbs(1.96 * 3.0, 0.01));
    CHECK_THAT(made.untold(1, task), WithinAbs(1.0, 1e-6));
    CHECK(made.untold(0, task) < 0.05);
}

TEST_CASE("Readings that nothing checks keep their nominal scatter", "[fit]") {
    const Fit made = fit(straight_line({0, 1}, {1, 3}));
    REQUIRE(made.settled);
    CHECK_FALSE(made.checked());
    CHECK(made.noise == 1.0);
    CHECK_THAT(made.values[1], WithinAbs(2, 1e-4));
}

TEST_CASE("Two strays on one side are left out, honest readings are not", "[fit]") {
    std::mt19937 random{7};
    std::normal_distribution<double> scatter;
    int honest_out = 0;
    for (int round = 0; round < 60; ++round) {
        std::vector<double> x, y;
        for (int i = 0; i < 14; ++i) {
            x.push_back(i);
            y.push_back(2 + 0.5 * i + 0.1 * scatter(random));
        }
        honest_out += int(std::count(begin(x), end(x), -1.0));
        const Fit honest = fit_without_strays(straight_line(x, y), 100, 4);
        honest_out += int(std::count(honest.left_out.begin(), honest.left_out.end(), true));
        y[3] += 5;
        y[4] += 6;
        const Fit spoilt = fit_without_strays(straight_line(x, y), 100, 4);
        CHECK(spoilt.left_out[3]);
        CHECK(spoilt.left_out[4]);
        CHECK_THAT(spoilt.values[1], WithinAbs(0.5, 0.1));
    }
    CHECK(honest_out <= 6);
}

TEST_CASE("A doubt is the F test of a reading against the fit without it", "[fit]") {
    const std::vector<double> x{0, 1, 2, 3, 4, 5}, y{0.1, 0.9, 2.2, 2.9, 4.1, 6.5};
    const Fit all = fit(straight_line(x, y));
    std::vector<double> rest_x{0, 1, 2, 3, 4}, rest_y{0.1, 0.9, 2.2, 2.9, 4.1};
    const Fit rest = fit(straight_line(rest_x, rest_y));
    VectorXd at(2);
    at << 1, 5;
    const double off = 6.5 - at.dot(rest.values),
                 variance = rest.noise * rest.noise + std::pow(rest.spread(at).deviation, 2);
    CHECK_THAT(all.doubt[5], WithinAbs(fisher_above(off * off / variance, 1, 3), 1e-4));
}

TEST_CASE("The 95 % range of a curve holds the truth 19 times in 20", "[fit]") {
    std::mt19937 random{20270101};
    std::normal_distribution<double> scatter;
    int held = 0, count = 0;
    for (int round = 0; round < 2000; ++round) {
        const double rate = 0.5 + 0.2 * scatter(random), clock = 0.3 * scatter(random);
        std::vector<double> y;
        for (int i = 0; i < 5; ++i)
            y.push_back(std::exp(-rate * (i + clock)) + 0.01 * scatter(random));
        FitTask task;
        task.readings = 5;
        task.unknowns = {{0.4, 1e-5, 0.4, 100.0}, {0.0, 1e-5, 0.0, 0.3}};
        task.least_noise = 1e-6;
        task.residuals = [&y](const VectorXd& p, VectorXd& r) {
            for (int i = 0; i < 5; ++i)
                r[i] = y[std::size_t(i)] - std::exp(-p[0] * (i + p[1]));
            return true;
        };
        const Fit made = fit(task);
        if (!made.settled)
            continue;
        ++count;
        held += std::abs(made.values[0] - rate) <= made.spread(0).range_95 ? 1 : 0;
    }
    CHECK(count > 1950);
    CHECK(double(held) / count > 0.93);
    CHECK(double(held) / count < 0.975);
}

TEST_CASE("A start that can't be does not settle", "[fit]") {
    FitTask task = straight_line({0, 1, 2}, {0, 1, 2});
    task.residuals = [](const VectorXd&, VectorXd&) { return false; };
    CHECK_FALSE(fit(task).settled);
}
