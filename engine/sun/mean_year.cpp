// SPDX-License-Identifier: MIT
//
// The mean over a span of N years of each date's own declination and equation of time.
//
// Taken date by date, that mean has a step at the end of February: before it a year is no different for being a leap
// year, after it a leap year is a day ahead. Count the days of each year on one scale t instead:
//     t = days since 1 January                         until the end of 28 February (t = 59)
//     t = days since 1 January as in a common year + q   from 1 March on,    q = 1/4, the share of leap years
// Now the mean of the days really gone since 1 January is t itself on both sides of the gap, so that the mean Sun runs
// evenly through it, and the gap of q days stands for 29 February. (A leap year's 1 January is 3/8 of a day late
// against the mean of the four years, so its 29 February, noon, is t = 59 + 4/8 − 3/8: the middle of the gap.)
//
// In t the mean has the period 365.25, but for the drift of the calendar against the seasons over the span
// (over 20 years 0.008 days at each new year: 2″ in declination, 0.2 s in E). That drift is measured at both ends and
// spread evenly over the year, half to either side, so that the year closes.
//
// What remains is a smooth periodic function, known from 13 moments a year: harmonics up to the sixth (the seventh is
// 0.3″ in declination, 0.03 s in E). The Moon sways the Earth by 6″ in longitude with the month; over the years its
// phases spread evenly over each moment and leave little of it: 0.3″ after twenty years, 2″ after four.
#include "engine/sun/mean_year.hpp"

#include "engine/sun/apparent_sun.hpp"

#include <cassert>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <stdexcept>

namespace dialwright {
namespace {

using namespace std::chrono;

constexpr int k_days_before_march = 59;
constexpr Angle k_solstice_slack = Angle::arcseconds(2.0);

struct Sum { // radians
    double declination = 0.0;
    double equation = 0.0;
};

/// The moment of one year at t; t is not inside the gap.
Instant moment_of(int y, double t) {
    double elapsed = t;
    if (t > k_days_before_march)
        elapsed += (year{y}.is_leap() ? 1.0 : 0.0) - MeanYear::k_leap_share;
    return Instant{sys_days{year{y} / January / 1}} + round<microseconds>(duration<double, days::period>(elapsed));
}

Sum mean_at(int first_year, int last_year, double t) {
    Sum sum;
    for (int y = first_year; y <= last_year; ++y) {
        const ApparentSun sun = apparent_sun(moment_of(y, t));
        sum.declination += sun.declination.in_radians();
        sum.equation += sun.equation_of_time.in_radians();
    }
    const double count = last_year - first_year + 1;
    return {sum.declination / count, sum.equation / count};
}

} // namespace

MeanYear::MeanYear(int first_year, int last_year) : first_year_{first_year}, last_year_{last_year} {
    if (first_year < 1901 || last_year > 2099 || last_year < first_year || (last_year - first_year + 1) % 4 != 0)
        throw std::invalid_argument(
            "the years of a mean year are a whole number of four-year leap cycles within 1901 to 2099");

    // The years share their new years' moments, so that between the two ends of the mean only two moments are left.
    const ApparentSun opening = apparent_sun(Instant{sys_days{year{first_year} / January / 1}});
    const ApparentSun closing = apparent_sun(Instant{sys_days{year{last_year + 1} / January / 1}});
    const double count = last_year - first_year + 1;
    const double declination_drift = (closing.declination - opening.declination).in_radians() / count;
    const double equation_drift = (closing.equation_of_time - opening.equation_of_time).in_radians() / count;

    constexpr int k_moments = 2 * k_harmonics + 1;
    for (int i = 0; i < k_moments; ++i) {
        const double share = static_cast<double>(i) / k_moments;
        const Sum mean = mean_at(first_year, last_year, share * k_length_days);
        const double declination = mean.declination - declination_drift * (share - 0.5);
        const double equation = mean.equation - equation_drift * (share - 0.5);
        for (int k = 0; k <= k_harmonics; ++k) {
            const double weight = (k == 0 ? 1.0 : 2.0) / k_moments;
            const double turn = 2.0 * std::numbers::pi * ((i * k) % k_moments) / k_moments;
            Harmonic& harmonic = harmonics_[static_cast<std::size_t>(k)];
            harmonic.declination_cos += weight * declination * std::cos(turn);
            harmonic.declination_sin += weight * declination * std::sin(turn);
            harmonic.equation_cos += weight * equation * std::cos(turn);
            harmonic.equation_sin += weight * equation * std::sin(turn);
        }
    }
    find_quarters();
}

MeanYear::Season MeanYear::at(double day) const {
    const double turn = 2.0 * std::numbers::pi * (day / k_length_days);
    const double step_cos = std::cos(turn), step_sin = std::sin(turn);
    double c = 1.0, s = 0.0; // of k turns
    double declination = 0.0, equation = 0.0;
    for (const Harmonic& harmonic : harmonics_) {
        declination += harmonic.declination_cos * c + harmonic.declination_sin * s;
        equation += harmonic.equation_cos * c + harmonic.equation_sin * s;
        const double next = c * step_cos - s * step_sin;
        s = s * step_cos + c * step_sin;
        c = next;
    }
    return {Angle::radians(declination), Angle::radians(equation)};
}

MeanYear::Season MeanYear::rate_at(double day) const {
    const double turns_per_day = 2.0 * std::numbers::pi / k_length_days;
    double declination = 0.0, equation = 0.0;
    for (std::size_t k = 1; k < harmonics_.size(); ++k) {
        const Harmonic& harmonic = harmonics_[k];
        const double rate = turns_per_day * static_cast<double>(k);
        const double c = std::cos(rate * day), s = std::sin(rate * day);
        declination += rate * (harmonic.declination_sin * c - harmonic.declination_cos * s);
        equation += rate * (harmonic.equation_sin * c - harmonic.equation_cos * s);
    }
    return {Angle::radians(declination), Angle::radians(equation)};
}

double MeanYear::day_of(month_day date, double hour_ut) const {
    assert(date.ok());
    if (date == February / 29)
        return k_days_before_march + k_leap_share / 2.0 + (hour_ut - 12.0) / 24.0;
    constexpr year k_common{2001};
    const auto whole = sys_days{k_common / date.month() / date.day()} - sys_days{k_common / January / 1};
    const double gap = date.month() >= March ? k_leap_share : 0.0;
    return static_cast<double>(whole.count()) + gap + hour_ut / 24.0;
}

double MeanYear::day_of(Instant at) const {
    const auto midnight = floor<days>(at);
    const year_month_day date{midnight};
    return day_of(date.month() / date.day(), duration<double, std::ratio<3600>>(at - midnight).count());
}

month_day MeanYear::date_of(double day) const {
    double in_year = day - k_length_days * std::floor(day / k_length_days);
    if (in_year >= k_days_before_march) {
        if (in_year < k_days_before_march + k_leap_share)
            return February / 29;
        in_year -= k_leap_share;
    }
    const int whole = in_year < 365.0 ? static_cast<int>(in_year) : 364;
    const year_month_day date{sys_days{year{2001} / January / 1} + days{whole}};
    return date.month() / date.day();
}

/// The day between `before` and `after` on which the declination is reached; it lies between theirs.
double MeanYear::crossing(Angle declination, double before, double after) const {
    const bool north = at(after).declination > at(before).declination;
    for (int i = 0; i < 60 && after - before > 1e-9; ++i) {
        const double middle = 0.5 * (before + after);
        if ((at(middle).declination < declination) == north)
            before = middle;
        else
            after = middle;
    }
    return 0.5 * (before + after);
}

void MeanYear::find_quarters() {
    const auto solstice = [this](double before, double after) {
        const bool rising = rate_at(before).declination > Angle{};
        for (int i = 0; i < 60 && after - before > 1e-9; ++i) {
            const double middle = 0.5 * (before + after);
            if ((rate_at(middle).declination > Angle{}) == rising)
                before = middle;
            else
                after = middle;
        }
        return 0.5 * (before + after);
    };
    june_solstice_day_ = solstice(day_of(June / 1), day_of(July / 15));
    december_solstice_day_ = solstice(day_of(December / 1), k_length_days + day_of(January / 10));
    march_equinox_day_ = crossing(Angle{}, day_of(March / 1), day_of(April / 15));
    september_equinox_day_ = crossing(Angle{}, day_of(September / 1), day_of(October / 15));
    obliquity_ = (at(june_solstice_day_).declination - at(december_solstice_day_).declination) / 2.0;
}

std::optional<double> MeanYear::day_of_declination(Angle declination, bool sun_going_north) const {
    const Angle most = at(june_solstice_day_).declination, least = at(december_solstice_day_).declination;
    if (declination > most + k_solstice_slack || declination < least - k_solstice_slack)
        return std::nullopt;
    if (declination >= most)
        return june_solstice_day_;
    if (declination <= least)
        return december_solstice_day_;
    if (!sun_going_north)
        return crossing(declination, june_solstice_day_, december_solstice_day_);
    const double day = crossing(declination, december_solstice_day_ - k_length_days, june_solstice_day_);
    return day < 0.0 ? day + k_length_days : day;
}

} // namespace dialwright
