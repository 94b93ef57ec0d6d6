// SPDX-License-Identifier: MIT
#include "engine/sun/civil_day.hpp"

#include <algorithm>
#include <stdexcept>

namespace dialwright {
namespace {

using namespace std::chrono;

Instant begin_of(sys_days date, const Zone& zone) {
    return zone.to_utc(ClockReading{local_days{date.time_since_epoch()}}).first;
}

class DayTeller {
  public:
    DayTeller(const Site& site, Angle standard_altitude, const Almanac& almanac)
        : site_{site}, standard_altitude_{standard_altitude}, almanac_{almanac} {}

    void fill(CivilDay& day) const {
        if (day.begin >= day.end)
            return;
        // From the noon of the solar day before to that of the day after: each next noon is a day after the last.
        for (Instant about = day.begin - hours{12}; about < day.end + hours{24};) {
            const SolarDay solar = solar_day(site_, about, almanac_, standard_altitude_);
            add(day, solar);
            about = solar.noon + hours{24};
        }
        std::sort(day.events.begin(), day.events.end(),
                  [](const SunEvent& a, const SunEvent& b) { return a.at < b.at; });
        day.up_at_begin = towards_sun(day.begin).altitude() > standard_altitude_;
        bool up = day.up_at_begin;
        Instant since = day.begin;
        for (const SunEvent& event : day.events)
            if (event.kind != SunEvent::Kind::noon) {
                if (up)
                    day.up_for += event.at - since;
                up = event.kind == SunEvent::Kind::rise;
                since = event.at;
            }
        if (up)
            day.up_for += day.end - since;
        const SunEvent* noon = day.first(SunEvent::Kind::noon);
        const ApparentSun sun = almanac_.at(noon != nullptr ? noon->at : day.begin + (day.end - day.begin) / 2);
        day.declination = sun.declination;
        day.equation_of_time = sun.equation_of_time;
    }

  private:
    void add(CivilDay& day, const SolarDay& solar) const {
        const auto keep = [&](SunEvent::Kind kind, Instant at) {
            if (at < day.begin || at >= day.end)
                return;
            const SiteDirection direction = towards_sun(at);
            day.events.push_back({kind, at, direction.azimuth(), direction.altitude()});
        };
        keep(SunEvent::Kind::noon, solar.noon);
        if (solar.rise)
            keep(SunEvent::Kind::rise, solar.rise->at);
        if (solar.set)
            keep(SunEvent::Kind::set, solar.set->at);
    }

    [[nodiscard]] SiteDirection towards_sun(Instant at) const {
        return to_site(sky_place(almanac_.at(at), site_.longitude), site_.latitude);
    }

    const Site& site_;
    Angle standard_altitude_;
    const Almanac& almanac_;
};

} // namespace

const SunEvent* CivilDay::first(SunEvent::Kind kind) const {
    const auto found =
        std::find_if(events.begin(), events.end(), [&](const SunEvent& event) { return event.kind == kind; });
    return found == events.end() ? nullptr : &*found;
}

std::vector<CivilDay> civil_days(const Site& site, const Zone& zone, year_month_day first, year_month_day last,
                                 Angle standard_altitude) {
    if (!first.ok() || !last.ok() || last < first)
        throw std::invalid_argument("a run of dates ends before it begins");
    const Almanac almanac{sys_days{first} - days{4}, sys_days{last} + days{5}};
    const DayTeller teller{site, standard_altitude, almanac};
    std::vector<CivilDay> list;
    Instant begin = begin_of(sys_days{first}, zone);
    for (sys_days date = sys_days{first}; date <= sys_days{last}; date += days{1}) {
        CivilDay day;
        day.date = date;
        day.begin = begin;
        day.end = begin = begin_of(date + days{1}, zone);
        teller.fill(day);
        list.push_back(std::move(day));
    }
    return list;
}

} // namespace dialwright
