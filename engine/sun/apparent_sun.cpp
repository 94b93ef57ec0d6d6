// SPDX-License-Identifier: MIT
//
// The theory is that of the IAU, in ERFA's release of it: the Earth from VSOP2000's abridgement (eraEpv00; by its
// authors within 4.6 km heliocentric over 1900–2100, or 0.006″), bias, precession and nutation 2000B (0.001″).
//
// Notation: d = days from J2000.0; TT for what moves round the Sun, UT1 for the Earth's turning (taken equal to UTC).
// What the choice UT1 = UTC costs: 0.9 s at most in every reading since 1972.
// TT − UTC is the count of leap seconds; before 1960 and after the last one announced it is held. The true TT − UT1
// differs from it by at most 40 s over 1900–1960, which moves the Sun by 1.6″ in longitude, 0.1 s in E.
#include "engine/sun/apparent_sun.hpp"

#include <erfa.h>
#include <erfam.h>

#include <array>
#include <cmath>
#include <stdexcept>

namespace dialwright {
namespace {

constexpr double k_j2000 = 2451545.0;
constexpr double k_light_days_per_au = ERFA_AULT / ERFA_DAYSEC;

using Vector = std::array<double, 3>;

double tt_minus_utc_days(Instant utc) {
    using namespace std::chrono;
    const auto day = floor<days>(utc);
    const year_month_day date{day};
    double seconds = 0.0;
    const double fraction = duration<double, days::period>(utc - day).count();
    // A positive status only says that the year is before UTC or after the last leap second known to the library.
    eraDat(static_cast<int>(date.year()), static_cast<int>(static_cast<unsigned>(date.month())),
           static_cast<int>(static_cast<unsigned>(date.day())), fraction, &seconds);
    return (seconds + 32.184) / 86400.0;
}

/// Towards the Sun, unit vector, as the moving Earth sees it; axes of the ICRS.
Vector direction_of_sun(double tt) {
    double heliocentric[2][3], barycentric[2][3];
    eraEpv00(k_j2000, tt, heliocentric, barycentric); // a positive status: beyond 1900–2100
    double distance = 0.0;
    double natural[3];
    eraPn(heliocentric[0], &distance, natural);
    // Light left the Sun where the Sun was then: a step back along its own slow path about the barycentre.
    double sun_then[3];
    for (int i = 0; i < 3; ++i) {
        const double sun_speed = barycentric[1][i] - heliocentric[1][i];
        sun_then[i] = -heliocentric[0][i] - sun_speed * distance * k_light_days_per_au;
    }
    eraPn(sun_then, &distance, natural);
    double velocity[3]; // of the observer, in units of the speed of light
    double square = 0.0;
    for (int i = 0; i < 3; ++i) {
        velocity[i] = barycentric[1][i] * k_light_days_per_au;
        square += velocity[i] * velocity[i];
    }
    Vector apparent{};
    eraAb(natural, velocity, distance, std::sqrt(1.0 - square), apparent.data());
    return apparent;
}

} // namespace

Angle mean_greenwich_hour_angle(Instant utc) {
    using namespace std::chrono;
    const double fraction = duration<double, days::period>(utc - floor<days>(utc)).count();
    return Angle::hours(24.0 * fraction - 12.0).positive_turn();
}

ApparentSun apparent_sun(Instant utc) {
    using namespace std::chrono;
    constexpr Instant k_first = sys_days{year{k_first_sun_year} / January / 1} - k_sun_margin;
    constexpr Instant k_end = sys_days{year{k_last_sun_year + 1} / January / 1} + k_sun_margin;
    if (utc < k_first || utc >= k_end)
        throw std::invalid_argument("the Sun's place is computed for the years 1800 to 2199 only");

    const double ut = days_from_j2000(utc);
    const double tt = ut + tt_minus_utc_days(utc);
    const Vector icrs = direction_of_sun(tt);

    double nutation_in_longitude = 0.0, nutation_in_obliquity = 0.0, mean_obliquity = 0.0;
    double bias[3][3], precession[3][3], both[3][3], nutation[3][3], all[3][3];
    eraPn00b(k_j2000, tt, &nutation_in_longitude, &nutation_in_obliquity, &mean_obliquity, bias, precession, both,
             nutation, all);
    Vector of_date{};
    Vector copy = icrs;
    eraRxp(all, copy.data(), of_date.data());
    double right_ascension = 0.0, declination = 0.0;
    eraC2s(of_date.data(), &right_ascension, &declination);

    // Greenwich apparent sidereal time, as eraGst00b has it, but from the nutation that is at hand already.
    const double sidereal =
        eraGmst00(k_j2000, ut, k_j2000, tt) + eraEe00(k_j2000, tt, mean_obliquity, nutation_in_longitude);
    const Angle hour_angle = Angle::radians(sidereal - right_ascension).positive_turn();
    return {Angle::radians(declination), hour_angle, (hour_angle - mean_greenwich_hour_angle(utc)).signed_turn()};
}

} // namespace dialwright
