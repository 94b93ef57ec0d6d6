// SPDX-License-Identifier: MIT
//
// What lets the light come is a function of time that is > 0 while it does: the sine of the Sun's height above the
// horizon, above the plate's plane, above the skyline. It is sampled so closely that between three samples it turns once
// at most. A change of sign brackets a begin or an end. Where the middle one of three samples of one sign is the nearest
// to nought, the turning point between its neighbours may cross nought and come back: it is sought.
//
// The horizon and the plane run as slow waves of one day, so that half-hours do; a skyline is a run of straight
// pieces, of which the Sun passes a quarter of a degree in a minute.
#include "engine/light/plate_light.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <optional>

namespace dialwright {
namespace {

using namespace std::chrono;

constexpr microseconds k_close_enough{5'000};

struct Sample {
    Instant at;
    double height = 0.0;
};

template <class Height>
class SpanFinder {
  public:
    SpanFinder(const Height& height, std::vector<TimeSpan>& found) : height_{height}, found_{found} {}

    void find(TimeSpan within, microseconds step) {
        const auto parts = std::max<std::int64_t>(2, (within.to - within.from) / step + 1);
        Sample before = sample(within.from), middle = before;
        open_ = before.height > 0 ? std::optional{within.from} : std::nullopt;
        for (std::int64_t i = 1; i <= parts; ++i) {
            const Sample next = sample(i == parts ? within.to : within.from + (within.to - within.from) * i / parts);
            // At the ends a turning point may lie beyond the outermost sample but one.
            if (i == 1 || i == parts)
                seek_turn(middle, next);
            else if (turns_to_nought(before, middle, next))
                seek_turn(before, next, middle);
            if ((middle.height > 0) != (next.height > 0))
                cross(middle, next);
            before = middle;
            middle = next;
        }
        if (open_)
            keep(within.to);
    }

  private:
    [[nodiscard]] Sample sample(Instant at) const { return {at, height_(at)}; }

    [[nodiscard]] static bool turns_to_nought(const Sample& a, const Sample& b, const Sample& c) {
        const bool up = b.height > 0;
        return (a.height > 0) == up && (c.height > 0) == up && std::abs(b.height) <= std::abs(a.height) &&
               std::abs(b.height) <= std::abs(c.height);
    }

    /// Both crossings between `a` and `c`, which have one sign, if the height turns on the other side of nought.
    void seek_turn(Sample a, Sample c, std::optional<Sample> inner = {}) {
        if ((a.height > 0) != (c.height > 0))
            return;
        const double sign = a.height > 0 ? -1.0 : 1.0; // sought: where sign * height is greatest
        const Sample first = a, last = c;
        constexpr double k_golden = 0.381966;
        Sample best = inner ? *inner : sample(a.at + part(c.at - a.at, k_golden));
        for (int i = 0; i < 40 && sign * best.height <= 0 && c.at - a.at > k_close_enough; ++i) {
            const bool right_longer = c.at - best.at > best.at - a.at;
            const Sample trial = sample(right_longer ? best.at + part(c.at - best.at, k_golden)
                                                     : best.at - part(best.at - a.at, k_golden));
            if (sign * trial.height > sign * best.height) {
                (right_longer ? a : c) = best;
                best = trial;
            } else {
                (right_longer ? c : a) = trial;
            }
        }
        if (sign * best.height > 0) {
            cross(first, best);
            cross(best, last);
        }
    }

    /// False position with the stale end's weight halved (Illinois rule), then the light changes hands.
    void cross(Sample a, Sample b) {
        int side = 0;
        for (int i = 0; i < 60 && b.at - a.at > k_close_enough; ++i) {
            const double share = a.height / (a.height - b.height);
            const Sample trial = sample(a.at + part(b.at - a.at, std::clamp(share, 1e-6, 1 - 1e-6)));
            const bool to_left = (trial.height > 0) == (a.height > 0);
            const bool close = std::min(trial.at - a.at, b.at - trial.at) < k_close_enough / 5 && i > 2;
            if (to_left) {
                a = trial;
                b.height *= side < 0 ? 0.5 : 1.0;
                side = -1;
            } else {
                b = {trial.at, trial.height};
                a.height *= side > 0 ? 0.5 : 1.0;
                side = 1;
            }
            if (close)
                break;
        }
        const Instant at = side < 0 ? a.at : b.at;
        if (open_)
            keep(at);
        else
            open_ = at;
    }

    void keep(Instant to) {
        if (to > *open_)
            found_.push_back({*open_, to});
        open_.reset();
    }

    [[nodiscard]] static microseconds part(microseconds whole, double share) {
        return microseconds{std::llround(share * static_cast<double>(whole.count()))};
    }

    const Height& height_;
    std::vector<TimeSpan>& found_;
    std::optional<Instant> open_;
};

template <class Height>
std::vector<TimeSpan> narrowed(std::span<const TimeSpan> spans, microseconds step, const Height& height) {
    std::vector<TimeSpan> found;
    SpanFinder<Height> finder{height, found};
    for (const TimeSpan& span : spans)
        finder.find(span, step);
    return found;
}

/// What of the rising spans is left without others that lie within them.
std::vector<TimeSpan> without(std::span<const TimeSpan> spans, std::span<const TimeSpan> others) {
    std::vector<TimeSpan> left;
    for (const TimeSpan& span : spans) {
        Instant from = span.from;
        for (const TimeSpan& other : spans_within(others, span.from, span.to)) {
            if (other.from > from)
                left.push_back({from, other.from});
            from = other.to;
        }
        if (span.to > from)
            left.push_back({from, span.to});
    }
    return left;
}

std::vector<TimeSpan> joined(std::vector<TimeSpan> spans, const std::vector<TimeSpan>& more) {
    spans.insert(spans.end(), more.begin(), more.end());
    std::sort(spans.begin(), spans.end(), [](const TimeSpan& a, const TimeSpan& b) { return a.from < b.from; });
    std::vector<TimeSpan> list;
    for (const TimeSpan& span : spans)
        if (!list.empty() && list.back().to == span.from)
            list.back().to = span.to;
        else
            list.push_back(span);
    return list;
}

} // namespace

PlateLight plate_light(const Site& site, const PlateFrame& plate, const Skyline& skyline, const Almanac& almanac,
                       Instant from, Instant to) {
    assert(from <= to && from >= almanac.first() && to <= almanac.last());
    const LatitudeSines sines{site.latitude};
    const auto sun_at = [&](Instant at) { return to_site(sky_place(almanac.at(at), site.longitude), sines); };
    PlateLight light;
    const TimeSpan whole{from, to};
    light.up = narrowed(std::span{&whole, 1}, minutes{30}, [&](Instant at) { return sun_at(at).enu.z(); });
    light.facing = narrowed(light.up, minutes{30}, [&](Instant at) { return sun_at(at).enu.dot(plate.n); });
    if (skyline.flat()) {
        light.lit = light.facing;
        return light;
    }
    // Above the skyline's highest point the Sun is seen; below, each minute is looked at.
    const std::vector<TimeSpan> high =
        narrowed(light.facing, minutes{30}, [&](Instant at) { return sun_at(at).enu.z() - skyline.highest_sine(); });
    light.lit = joined(high, narrowed(without(light.facing, high), minutes{1},
                                      [&](Instant at) { return skyline.clearance(sun_at(at)); }));
    return light;
}

std::vector<TimeSpan> spans_within(std::span<const TimeSpan> spans, Instant from, Instant to) {
    std::vector<TimeSpan> inside;
    auto span = std::partition_point(spans.begin(), spans.end(), [&](const TimeSpan& s) { return s.to <= from; });
    for (; span != spans.end() && span->from < to; ++span)
        inside.push_back({std::max(span->from, from), std::min(span->to, to)});
    return inside;
}

microseconds time_within(std::span<const TimeSpan> spans, Instant from, Instant to) {
    microseconds sum{0};
    for (const TimeSpan& span : spans_within(spans, from, to))
        sum += span.to - span.from;
    return sum;
}

} // namespace dialwright
