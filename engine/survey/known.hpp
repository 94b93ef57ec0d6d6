// SPDX-License-Identifier: MIT
#pragma once

namespace dialwright {

/// A figure with its ±. Every ±, given or found, is the range that holds 19 times in 20.
struct Known {
    double value = 0.0;
    double give = 0.0;
    /// One standard deviation of it, by the normal law.
    [[nodiscard]] double deviation() const { return give / 1.959964; }
};

} // namespace dialwright
