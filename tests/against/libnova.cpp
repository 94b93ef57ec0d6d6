// SPDX-License-Identifier: MIT
// The Sun's declination and hour angle against libnova (a general astronomical library: the Earth by VSOP87 in full,
// nutation of 1980, sidereal time of 1982).
//
// Taken from it: the geometric place ln_get_solar_geom_coords, precession of 1976, nutation, and Greenwich mean sidereal
// time. The geometric place stands in the ecliptic and equinox of J2000. The library's own apparent place,
// ln_get_solar_equ_coords, takes it for one of date and leaves out the precession since 2000 (and nearly all of the
// aberration): the second test says so, so that we hear of it if that changes. Here the geometric place gets the
// aberration, 20.4898" / R (Meeus, Astronomical Algorithms, formula 25.10; from memory), then precession and nutation.
// Times: the place at TT, by a list of leap seconds of this file's own; sidereal time at UT1 = UTC.
#include "engine/sun/apparent_sun.hpp"
#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

#include <libnova/libnova.h>

#include <array>
#include <cmath>
#include <random>

using namespace dialwright;
using namespace std::chrono;
using Catch::WithinAbs;

namespace {

/// TT − UTC. IERS Bulletin C (from memory): ten seconds at the beginning of 1972, then one more at each of these months.
double tt_minus_utc_s(Instant utc) {
    constexpr std::array<year_month, 27> k_leaps{
        1972y / 7, 1973y / 1, 1974y / 1, 1975y / 1, 1976y / 1, 1977y / 1, 1978y / 1, 1979y / 1, 1980y / 1,
        1981y / 7, 1982y / 7, 1983y / 7, 1985y / 7, 1988y / 1, 1990y / 1, 1991y / 1, 1992y / 7, 1993y / 7,
        1994y / 7, 1996y / 1, 1997y / 7, 1999y / 1, 2006y / 1, 2009y / 1, 2012y / 7, 2015y / 7, 2017y / 1};
    int leaps = 0;
    for (const year_month leap : k_leaps)
        leaps += utc >= Instant{sys_days{leap / 1}};
    return 10.0 + leaps + 32.184;
}

struct Place {
    Angle declination;
    Angle greenwich_hour_angle;
};

/// The equation of the equinoxes is Δψ cos ε. The library's own apparent sidereal time takes Δψ whole: 1.4" at most.
Angle sidereal_time(double jd_ut, const ln_nutation& nutation) {
    return Angle::hours(ln_get_mean_sidereal_time(jd_ut)) +
           Angle::degrees(nutation.longitude) * cos(Angle::degrees(nutation.ecliptic + nutation.obliquity));
}

struct Ecliptic {
    Angle longitude;
    Angle latitude;
};

ln_equ_posn to_equator(const Ecliptic& e, Angle obliquity) {
    const Angle right_ascension =
        arc_tangent(sin(e.longitude) * cos(obliquity) - tan(e.latitude) * sin(obliquity), cos(e.longitude));
    const Angle declination =
        arc_sine(sin(e.latitude) * cos(obliquity) + cos(e.latitude) * sin(obliquity) * sin(e.longitude));
    return {right_ascension.positive_turn().in_degrees(), declination.in_degrees()};
}

Ecliptic to_ecliptic(const ln_equ_posn& place, Angle obliquity) {
    const Angle ra = Angle::degrees(place.ra), dec = Angle::degrees(place.dec);
    return {arc_tangent(sin(ra) * cos(obliquity) + tan(dec) * sin(obliquity), cos(ra)),
            arc_sine(sin(dec) * cos(obliquity) - cos(dec) * sin(obliquity) * sin(ra))};
}

Place place_by_libnova(Instant utc) {
    const double jd_ut = 2451545.0 + days_from_j2000(utc);
    const double jd_tt = jd_ut + tt_minus_utc_s(utc) / 86400.0;
    ln_helio_posn geometric{};
    ln_get_solar_geom_coords(jd_tt, &geometric);
    const Angle aberration = Angle::arcseconds(20.4898 / geometric.R);
    const Ecliptic of_2000{Angle::degrees(geometric.L) - aberration, Angle::degrees(geometric.B)};
    ln_equ_posn mean_2000 = to_equator(of_2000, Angle::arcseconds(84381.448)); // IAU 1976 obliquity of J2000
    ln_equ_posn mean_of_date{};
    ln_get_equ_prec2(&mean_2000, JD2000, jd_tt, &mean_of_date);

    ln_nutation nutation{};
    ln_get_nutation(jd_tt, &nutation);
    const Angle mean_obliquity = Angle::degrees(nutation.ecliptic);
    Ecliptic of_date = to_ecliptic(mean_of_date, mean_obliquity);
    of_date.longitude += Angle::degrees(nutation.longitude);
    const ln_equ_posn apparent = to_equator(of_date, mean_obliquity + Angle::degrees(nutation.obliquity));
    return {Angle::degrees(apparent.dec), sidereal_time(jd_ut, nutation) - Angle::degrees(apparent.ra)};
}

void compare(year first, year last, int count, double arcseconds) {
    const auto seed = std::random_device{}();
    CAPTURE(seed);
    std::mt19937_64 random{seed};
    const Instant begin = sys_days{first / 1 / 1}, end = sys_days{last / 12 / 31};
    std::uniform_int_distribution<std::int64_t> any{begin.time_since_epoch().count(), end.time_since_epoch().count()};
    double most_declination = 0.0, most_hour_angle = 0.0;
    for (int i = 0; i < count; ++i) {
        const Instant utc{microseconds{any(random)}};
        const ApparentSun ours = apparent_sun(utc);
        const Place theirs = place_by_libnova(utc);
        const double declination = (ours.declination - theirs.declination).in_arcseconds();
        const double hour_angle =
            (ours.greenwich_hour_angle - theirs.greenwich_hour_angle).signed_turn().in_arcseconds();
        most_declination = std::fmax(most_declination, std::abs(declination));
        most_hour_angle = std::fmax(most_hour_angle, std::abs(hour_angle));
    }
    CHECK_THAT(most_declination, WithinAbs(0.0, arcseconds));
    CHECK_THAT(most_hour_angle, WithinAbs(0.0, arcseconds));
    WARN("libnova, " << static_cast<int>(first) << " to " << static_cast<int>(last) << ": greatest difference "
                     << most_declination << "\" in declination, " << most_hour_angle << "\" in hour angle");
}

} // namespace

TEST_CASE("the Sun agrees with libnova's theory", "[against][sun]") {
    compare(1972y, 2035y, 1000, 1.0);
    compare(1950y, 2100y, 1000, 10.0);
}

TEST_CASE("libnova's own apparent place still stands at the equinox of 2000, without aberration", "[against][sun]") {
    const Instant utc = Instant{sys_days{2026y / 3 / 20}} + 12h; // the Sun near 0 deg of longitude
    ln_equ_posn theirs{};
    ln_get_solar_equ_coords(2451545.0 + days_from_j2000(utc) + tt_minus_utc_s(utc) / 86400.0, &theirs);
    // Precession lifts the declination there by 20.04" a year; aberration lowers it by 20.5" sin ε.
    const double expected = -20.04 * days_from_j2000(utc) / 365.25 + 20.5 * std::sin(0.40909);
    CHECK_THAT((Angle::degrees(theirs.dec) - apparent_sun(utc).declination).in_arcseconds(), WithinAbs(expected, 0.5));
}
