// SPDX-License-Identifier: MIT
#pragma once

#include <chrono>

namespace dialwright {

/// A moment in UTC, to the microsecond. UT1 − UTC (under 0.9 s) is taken as 0 throughout.
using Instant = std::chrono::sys_time<std::chrono::microseconds>;

/// Days from J2000.0 (2000-01-01 12:00) on the scale that `instant` is written in.
[[nodiscard]] inline double days_from_j2000(Instant instant) {
    using namespace std::chrono;
    constexpr Instant k_j2000 = sys_days{year{2000} / January / 1} + hours{12};
    return duration<double, days::period>(instant - k_j2000).count();
}

/// The instant `days` after J2000.0.
[[nodiscard]] inline Instant instant_from_j2000(double days_after) {
    using namespace std::chrono;
    constexpr Instant k_j2000 = sys_days{year{2000} / January / 1} + hours{12};
    return k_j2000 + round<microseconds>(duration<double, days::period>(days_after));
}

} // namespace dialwright
