// SPDX-License-Identifier: MIT
//
// Rise and set are searched between noon and the midnights of the Sun (lower transits) to either side, where the
// altitude runs one way: a bracket always holds the answer, so that days near the limit of the midnight Sun converge
// like any other. The Sun's own motion is followed: each trial takes the declination and E of its instant.
#include "engine/sun/solar_day.hpp"

#include <cmath>

namespace dialwright {
namespace {

using namespace std::chrono;
using Days = duration<double, days::period>;

constexpr double k_close_enough_days = 0.01 / 86400.0;
constexpr int k_most_trials = 60;

/// @tparam SunAt  gives the ApparentSun of an Instant
template <class SunAt>
class DayFinder {
  public:
    DayFinder(const Site& site, Angle standard_altitude, const SunAt& sun_at)
        : site_{site}, standard_altitude_{standard_altitude}, sun_at_{sun_at} {}

    [[nodiscard]] SolarDay find(Instant about) const {
        SolarDay day;
        day.noon = transit_near(about, Angle{});
        const ApparentSun sun = sun_at_(day.noon);
        const SiteDirection direction = direction_at_instant(day.noon);
        day.noon_altitude = direction.altitude();
        day.noon_azimuth = direction.azimuth();
        day.declination = sun.declination;
        day.equation_of_time = sun.equation_of_time;
        if (height_above(day.noon) <= 0.0) {
            day.light = SolarDay::Light::stays_down;
            return day;
        }
        day.rise = passage(transit_near(day.noon - hours{12}, Angle::degrees(180.0)), day.noon);
        day.set = passage(transit_near(day.noon + hours{12}, Angle::degrees(180.0)), day.noon);
        if (!day.rise && !day.set)
            day.light = SolarDay::Light::stays_up;
        return day;
    }

  private:
    /// The instant within twelve hours at which the Sun's local hour angle is `wanted`.
    [[nodiscard]] Instant transit_near(Instant about, Angle wanted) const {
        Instant when = about;
        for (int i = 0; i < 4; ++i) {
            const Angle missing = (wanted - sky_place(sun_at_(when), site_.longitude).hour_angle).signed_turn();
            when += round<microseconds>(Days{missing.in_hours() / 24.0});
            if (std::abs(missing.in_hours()) < 24.0 * k_close_enough_days)
                break;
        }
        return when;
    }
    [[nodiscard]] SiteDirection direction_at_instant(Instant when) const {
        return to_site(sky_place(sun_at_(when), site_.longitude), site_.latitude);
    }
    /// Radians above the standard altitude.
    [[nodiscard]] double height_above(Instant when) const {
        return (direction_at_instant(when).altitude() - standard_altitude_).in_radians();
    }
    /// Between the Sun's midnight and its noon: false position with the stale end's weight halved (Illinois rule).
    [[nodiscard]] std::optional<HorizonPassage> passage(Instant midnight, Instant noon) const {
        double low = 0.0, high = Days{noon - midnight}.count(); // days after midnight; negative on the way to sunset
        double height_low = height_above(midnight), height_high = height_above(noon);
        if (height_low > 0.0)
            return std::nullopt;
        Instant when = midnight;
        double last = low;
        int side = 0;
        for (int i = 0; i < k_most_trials; ++i) {
            const double next = (low * height_high - high * height_low) / (height_high - height_low);
            when = midnight + round<microseconds>(Days{next});
            const double height = height_above(when);
            if (i > 0 && std::abs(next - last) < k_close_enough_days)
                break;
            last = next;
            if (height > 0.0) {
                high = next;
                height_high = height;
                height_low *= side > 0 ? 0.5 : 1.0;
                side = 1;
            } else {
                low = next;
                height_low = height;
                height_high *= side < 0 ? 0.5 : 1.0;
                side = -1;
            }
        }
        return HorizonPassage{when, direction_at_instant(when).azimuth()};
    }

    const Site& site_;
    Angle standard_altitude_;
    const SunAt& sun_at_;
};

template <class SunAt>
SolarDay find_day(const Site& site, Instant about, Angle standard_altitude, const SunAt& sun_at) {
    return DayFinder<SunAt>{site, standard_altitude, sun_at}.find(about);
}

} // namespace

SolarDay solar_day(const Site& site, Instant about, Angle standard_altitude) {
    return find_day(site, about, standard_altitude, [](Instant utc) { return apparent_sun(utc); });
}

SolarDay solar_day(const Site& site, year_month_day date, const Zone& zone, Angle standard_altitude) {
    return solar_day(site, zone.to_utc(ClockReading{local_days{date} + hours{12}}).first, standard_altitude);
}

SolarDay solar_day(const Site& site, Instant about, const Almanac& almanac, Angle standard_altitude) {
    return find_day(site, about, standard_altitude, [&almanac](Instant utc) { return almanac.at(utc); });
}

} // namespace dialwright
