// SPDX-License-Identifier: MIT
//
// Declination and equation of time, one node every two days, six-point Lagrange interpolation between the middle two.
// What is left is the fastest that the Sun does: nutation of 13.7 and 9.1 days (0.2″ and 0.03″). Six points over steps
// of h follow a wave of period P to 0.005 (2πh/P)⁶ of its size: 0.001″. A leap second steps the declination by
// 0.016″ and the hour angle by 0.045″ at most, and the table smooths that step over a few days.
#include "engine/sun/almanac.hpp"

#include <algorithm>
#include <array>
#include <cassert>
#include <cmath>
#include <cstddef>
#include <optional>
#include <stdexcept>

namespace dialwright {
namespace {

using namespace std::chrono;

constexpr double k_step_days = 2.0;
constexpr int k_points = 6;

/// The weights of six equally spaced nodes at −2, −1, 0, 1, 2, 3 for a place p between 0 and 1.
std::array<double, k_points> lagrange_weights(double p) {
    const double a = p + 2, b = p + 1, c = p, d = p - 1, e = p - 2, f = p - 3;
    return {b * c * d * e * f / -120.0, a * c * d * e * f / 24.0,  a * b * d * e * f / -12.0,
            a * b * c * e * f / 12.0,   a * b * c * d * f / -24.0, a * b * c * d * e / 120.0};
}

constexpr Instant k_earliest = sys_days{year{k_first_sun_year} / January / 1};
constexpr Instant k_latest = Instant{sys_days{year{k_last_sun_year + 1} / January / 1}} - microseconds{1};

/// What is asked of one calendar year.
struct YearShare {
    std::size_t count = 0;
    Instant first = Instant::max();
    Instant last = Instant::min();
    std::optional<Almanac> table;
};

std::size_t places_in_table(Instant first, Instant last) {
    return static_cast<std::size_t>(duration<double, days::period>(last - first).count() / k_step_days) + k_points;
}

int year_of(Instant utc) {
    return static_cast<int>(year_month_day{floor<days>(utc)}.year());
}

} // namespace

Almanac::Almanac(Instant first, Instant last) : first_{first}, last_{last} {
    if (last < first)
        throw std::invalid_argument("an almanac ends before it begins");
    if (first < k_earliest || last > k_latest)
        throw std::invalid_argument("an almanac covers the years 1800 to 2199 only");
    const double span = duration<double, days::period>(last - first).count();
    const int inner = static_cast<int>(std::floor(span / k_step_days)) + 2;
    nodes_.reserve(static_cast<std::size_t>(inner) + 4);
    const auto step = duration_cast<microseconds>(days{1}) * static_cast<int>(k_step_days);
    for (int i = -2; i < inner + 2; ++i) {
        const ApparentSun sun = apparent_sun(first + i * step);
        nodes_.push_back({sun.declination.in_radians(), sun.equation_of_time.in_radians()});
    }
}

Almanac Almanac::of_year(int y) {
    return {Instant{sys_days{year{y} / January / 1}}, Instant{sys_days{year{y + 1} / January / 1}} - microseconds{1}};
}

ApparentSun Almanac::at(Instant utc) const {
    assert(utc >= first_ && utc <= last_);
    const double place = duration<double, days::period>(utc - first_).count() / k_step_days + 2.0;
    const auto before = static_cast<std::size_t>(place);
    const auto weights = lagrange_weights(place - static_cast<double>(before));
    double declination = 0.0, equation = 0.0;
    for (std::size_t i = 0; i < k_points; ++i) {
        const Node& node = nodes_[before - 2 + i];
        declination += weights[i] * node.declination;
        equation += weights[i] * node.equation_of_time;
    }
    const Angle equation_of_time = Angle::radians(equation);
    return {Angle::radians(declination), (mean_greenwich_hour_angle(utc) + equation_of_time).positive_turn(),
            equation_of_time};
}

std::vector<ApparentSun> apparent_suns(std::span<const Instant> instants) {
    std::array<YearShare, k_last_sun_year - k_first_sun_year + 1> years;
    const auto share_of = [&years](Instant utc) -> YearShare& {
        if (utc < k_earliest || utc > k_latest)
            throw std::invalid_argument("the Sun's place is computed for the years 1800 to 2199 only");
        return years[static_cast<std::size_t>(year_of(utc) - k_first_sun_year)];
    };
    for (const Instant utc : instants) {
        YearShare& share = share_of(utc);
        ++share.count;
        share.first = std::min(share.first, utc);
        share.last = std::max(share.last, utc);
    }
    for (YearShare& share : years)
        if (share.count > 0 && share.count > places_in_table(share.first, share.last))
            share.table.emplace(share.first, share.last);

    std::vector<ApparentSun> suns;
    suns.reserve(instants.size());
    for (const Instant utc : instants) {
        const YearShare& share = share_of(utc);
        suns.push_back(share.table ? share.table->at(utc) : apparent_sun(utc));
    }
    return suns;
}

} // namespace dialwright
