// SPDX-License-Identifier: MIT
#pragma once

#include <Eigen/Core>

#include <functional>
#include <vector>

namespace dialwright {

/// One unknown of a fit. What is known of it beforehand counts as one more reading: a good measurement (a board that
/// was levelled, a clock that was set), or only how far from the start it could be at all.
struct Unknown {
    double start = 0.0;
    double step = 1e-6;    ///< for numerical slopes; small against what matters
    double known = 0.0;    ///< beforehand
    double known_to = 1.0; ///< standard deviation of that; > 0
};

/// What is to be fitted. The residuals of one reading are `width` rows, each divided by its nominal standard deviation;
/// their common scatter is found by the fit. After them may come rows whose standard deviation is known.
struct FitTask {
    std::vector<Unknown> unknowns;
    int readings = 0;
    int width = 1;
    std::vector<int> widths; ///< of each reading, where they differ; else empty
    int known_rows = 0;
    /// Fills readings · width + known_rows residuals (observed less computed). False where the unknowns can't be.
    std::function<bool(const Eigen::VectorXd& unknowns, Eigen::VectorXd& residuals)> residuals;
    double least_noise = 0.1;   ///< the scatter is never taken for less than this part of its nominal size
    std::vector<bool> left_out; ///< a flag a reading, or empty: readings that do not count
};

/// A value's spread: standard deviation, and the range that holds 19 times in 20.
struct Spread {
    double deviation = 0.0;
    double range_95 = 0.0;
    double freedom = 0.0; ///< degrees of freedom of the estimated scatter behind it
};

/// What a fit found. Ranges are right where readings scatter by the normal law and are told apart well enough for the
/// model to be straight across the range.
struct Fit {
    Eigen::VectorXd values;
    Eigen::VectorXd residuals;                 ///< of all rows, left out or not, in nominal deviations
    Eigen::MatrixXd from_readings, from_known; ///< parts of the covariance: by scatter that was estimated, and the rest
    double noise = 1.0;                        ///< scatter of the readings, in nominal deviations
    double freedom = 0.0; ///< degrees of freedom of `noise`; under 0.5 nothing checks the readings, and noise is 1
    double misfit = 0.0;  ///< −2 log likelihood but for a constant, for choosing between tasks with the same readings
    bool settled = false; ///< the iteration came to rest
    std::vector<double> doubt;  ///< a figure a reading: the chance that honest scatter throws a reading as far
                                ///< out as this, by the fit without it
    std::vector<bool> left_out; ///< readings that did not count

    [[nodiscard]] bool checked() const { return freedom >= 0.5; }
    /// Of one unknown, or of a quantity by its slope over each.
    [[nodiscard]] Spread spread(int unknown) const;
    /// @param besides  variance of what else the quantity hangs on
    [[nodiscard]] Spread spread(const Eigen::VectorXd& slopes, double besides = 0.0) const;
    /// The chance that an unknown comes out so far from 0 where it is 0 but for `thought_to` (one standard deviation).
    [[nodiscard]] double chance_of(int unknown, double thought_to) const;
    /// How much of what was known beforehand is left of an unknown's variance: near 1, the readings tell nothing of it.
    [[nodiscard]] double untold(int unknown, const FitTask& task) const;
};

/// Least squares by Levenberg and Marquardt's method with numerical slopes. The readings' common scatter is estimated
/// with the unknowns (as a component of variance beside what is known beforehand). Ranges by Student's t, with Satterthwaite's
/// degrees of freedom where both kinds of knowledge mix.
/// @param task  where the start must be possible, and near enough for the way down to lead to the answer
/// Source: Marquardt 1963; Satterthwaite 1946 (both from memory). Tests: tests/engine/fit/least_squares_test.cpp
[[nodiscard]] Fit fit(const FitTask& task);

/// The same, leaving out one after another those readings that honest scatter would throw so far out less than once in
/// `once_in` sets of readings; at most a third of them, and always leaving `least` readings.
[[nodiscard]] Fit fit_without_strays(FitTask task, double once_in, int least);

} // namespace dialwright
