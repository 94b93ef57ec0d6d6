// SPDX-License-Identifier: MIT
#pragma once

namespace dialwright {

/// The laws of chance that a fit's ranges and doubts come from.

/// How many standard deviations hold 19 times in 20 where the scatter itself was estimated with `freedom` degrees of
/// freedom (> 0, not always whole): Student's t. 1.96 where freedom is large (from 1e6 on).
/// Accuracy: 1e-6 of the value. Source: the common formulas through the incomplete beta function, from memory.
/// Test: tests/engine/fit/chance_test.cpp, against the printed tables.
[[nodiscard]] double student_95(double freedom);

/// The chance that the ratio of two estimates of one variance exceeds `ratio`: Fisher's F, upper tail.
/// @param above, below  degrees of freedom, > 0
[[nodiscard]] double fisher_above(double ratio, double above, double below);

/// The share of the beta law with shapes a, b (> 0) below x in [0, 1].
[[nodiscard]] double beta_share(double x, double a, double b);

} // namespace dialwright
