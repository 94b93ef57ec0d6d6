// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/skyline.hpp"
#include "engine/sun/almanac.hpp"
#include "engine/surface/plate_frame.hpp"

#include <chrono>
#include <span>
#include <vector>

namespace dialwright {

/// A stretch of time; `to` is its first instant no more.
struct TimeSpan {
    Instant from, to;
};

/// When the Sun lights a plate, and what it is that keeps the light away. Each list rises and is within the one before.
struct PlateLight {
    std::vector<TimeSpan> up;     ///< the Sun stands above the level horizon
    std::vector<TimeSpan> facing; ///< and on the side to which the plate's face looks
    std::vector<TimeSpan> lit;    ///< and above the skyline: the plate is lit
};

/// @param plate    of the face that is to be lit
/// @param almanac  reaches from `from` to `to` (asserted)
/// @return the spans within [from, to): of the Sun's middle, without refraction, as a dial's lines are laid out
/// Accuracy: begins and ends are solved to 0.01 s, not sampled. Any light on a plate under a level horizon is found, however
/// short; over a skyline, gleams and shadows of more than a minute, and shorter ones where the skyline has no two
/// corners within that minute. Cost: 40 ms a year behind a skyline, 10 ms without. Tests: tests/against/ephem_sunlight.py,
/// tests/bench/sunlight_bench.cpp
[[nodiscard]] PlateLight plate_light(const Site& site, const PlateFrame& plate, const Skyline& skyline,
                                     const Almanac& almanac, Instant from, Instant to);

/// How much of the spans lies within [from, to).
[[nodiscard]] std::chrono::microseconds time_within(std::span<const TimeSpan> spans, Instant from, Instant to);
/// The spans within [from, to), cut off at its ends.
[[nodiscard]] std::vector<TimeSpan> spans_within(std::span<const TimeSpan> spans, Instant from, Instant to);

} // namespace dialwright
