// SPDX-License-Identifier: MIT
#include "engine/dial/correction.hpp"

#include "engine/sun/apparent_sun.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <functional>

namespace dialwright {
namespace {

/// Where a smooth function of the day passes through zero, found between whole days.
std::vector<double> zeros(const std::function<double(double)>& value) {
    std::vector<double> found;
    double before = value(0.0);
    for (double day = 0.0; day < MeanYear::k_length_days; day += 1.0) {
        const double end = std::min(day + 1.0, MeanYear::k_length_days), after = value(end);
        if ((before < 0) != (after < 0)) {
            double low = day, high = end;
            for (int i = 0; i < 40; ++i) {
                const double middle = (low + high) / 2;
                ((value(middle) < 0) == (before < 0) ? low : high) = middle;
            }
            found.push_back((low + high) / 2);
        }
        before = after;
    }
    return found;
}

} // namespace

Correction::Correction(MeanYear year, HourTime time, Angle longitude, Angle zone_meridian, SummerTime summer)
    : year_{std::move(year)}, time_{time}, summer_{summer} {
    assert(has_correction(time));
    const Angle west_of_meridian = (zone_meridian - longitude).signed_turn();
    if (time == HourTime::sun)
        longitude_min_ = west_of_meridian.in_minutes_of_time();
    // Noon by the mean Sun comes this much after 12h UT of the date that the zone's calendar shows.
    noon_shift_days_ = (west_of_meridian.in_hours() - zone_meridian.in_hours()) / 24.0;
    if (!is_needed())
        return;
    turns_ = zeros([this](double day) { return rate_min(day); });
    least_min_ = 1e300;
    most_min_ = -1e300;
    for (const double day : turns_) {
        least_min_ = std::min(least_min_, add_min(day));
        most_min_ = std::max(most_min_, add_min(day));
    }
}

double Correction::add_min(double day) const {
    return is_needed() ? longitude_min_ - year_.at(mean_day(day)).equation_of_time.in_minutes_of_time() : 0.0;
}

double Correction::rate_min(double day) const {
    return is_needed() ? -year_.rate_at(mean_day(day)).equation_of_time.in_minutes_of_time() : 0.0;
}

double Correction::start_of_month(unsigned month) const {
    return month > 12 ? MeanYear::k_length_days : year_.day_of(std::chrono::month{month} / 1, 0.0);
}

std::vector<double> Correction::days_of(double minutes) const {
    return zeros([&](double day) { return add_min(day) - minutes; });
}

Correction::Spread Correction::spread() const {
    using namespace std::chrono;
    // Years stray by when the date falls in them: most where the mean changes fastest.
    month_day steepest = January / 1;
    double most = 0.0;
    for (const month_day date : dates_of_year()) {
        const double rate = std::abs(year_.rate_at(mean_day(noon_of(date))).equation_of_time.in_radians());
        if (date != February / 29 && rate > most) {
            most = rate;
            steepest = date;
        }
    }
    const Angle mean = year_.at(mean_day(noon_of(steepest))).equation_of_time;
    Spread spread{0.0, steepest};
    for (int y = year_.first_year(); y <= year_.last_year(); ++y) {
        const Instant noon = Instant{sys_days{std::chrono::year{y} / steepest}} +
                             round<microseconds>(duration<double, days::period>(0.5 + noon_shift_days_));
        const Angle off = (apparent_sun(noon).equation_of_time - mean).signed_turn();
        spread.seconds = std::max(spread.seconds, std::abs(off.in_minutes_of_time()) * 60);
    }
    return spread;
}

std::vector<std::chrono::month_day> dates_of_year() {
    std::vector<std::chrono::month_day> dates;
    for (std::chrono::sys_days day = std::chrono::year{2028} / 1 / 1; day < std::chrono::year{2029} / 1 / 1;
         day += std::chrono::days{1}) {
        const std::chrono::year_month_day date{day};
        dates.push_back(date.month() / date.day());
    }
    return dates;
}

} // namespace dialwright
