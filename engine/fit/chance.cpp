// SPDX-License-Identifier: MIT
#include "engine/fit/chance.hpp"

#include <cmath>

namespace dialwright {
namespace {

/// The continued fraction of the incomplete beta function, by the modified method of Lentz.
double beta_fraction(double x, double a, double b) {
    constexpr double k_tiny = 1e-300, k_enough = 1e-14;
    constexpr int k_most_steps = 500;
    double c = 1.0, d = 1.0 - (a + b) * x / (a + 1.0);
    d = 1.0 / (std::abs(d) < k_tiny ? k_tiny : d);
    double fraction = d;
    const auto step = [&](double numerator) {
        d = 1.0 + numerator * d;
        d = 1.0 / (std::abs(d) < k_tiny ? k_tiny : d);
        c = 1.0 + numerator / c;
        c = std::abs(c) < k_tiny ? k_tiny : c;
        fraction *= c * d;
        return std::abs(c * d - 1.0);
    };
    for (int m = 1; m <= k_most_steps; ++m) {
        step(m * (b - m) * x / ((a + 2 * m - 1) * (a + 2 * m)));
        if (step(-(a + m) * (a + b + m) * x / ((a + 2 * m) * (a + 2 * m + 1))) < k_enough)
            break;
    }
    return fraction;
}

/// The chance that Student's t lies farther out than `t` on either side.
double student_beyond(double t, double freedom) {
    return beta_share(freedom / (freedom + t * t), freedom / 2, 0.5);
}

} // namespace

double beta_share(double x, double a, double b) {
    if (!(x > 0.0))
        return 0.0;
    if (!(x < 1.0))
        return 1.0;
    const double front =
        std::exp(std::lgamma(a + b) - std::lgamma(a) - std::lgamma(b) + a * std::log(x) + b * std::log1p(-x));
    // The fraction converges fast on the side of the smaller tail.
    if (x < (a + 1.0) / (a + b + 2.0))
        return front * beta_fraction(x, a, b) / a;
    return 1.0 - front * beta_fraction(1.0 - x, b, a) / b;
}

double student_95(double freedom) {
    constexpr double k_normal = 1.959964, k_many = 1e6;
    if (freedom >= k_many)
        return k_normal;
    double low = k_normal, high = 2 * k_normal;
    while (student_beyond(high, freedom) > 0.05 && high < 1e12)
        high *= 2;
    while (high - low > 1e-7 * high) {
        const double middle = (low + high) / 2;
        (student_beyond(middle, freedom) > 0.05 ? low : high) = middle;
    }
    return (low + high) / 2;
}

double fisher_above(double ratio, double above, double below) {
    if (!(ratio > 0.0))
        return 1.0;
    return beta_share(below / (below + above * ratio), below / 2, above / 2);
}

} // namespace dialwright
