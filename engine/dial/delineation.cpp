// SPDX-License-Identifier: MIT
#include "engine/dial/delineation.hpp"

#include <algorithm>
#include <cmath>
#include <iterator>
#include <stdexcept>

namespace dialwright {
namespace {

int coarsest_step_of(int minutes) {
    for (const int step : {60, 30, 15, 10, 5, 2})
        if (minutes % step == 0)
            return step;
    return 1;
}

/// The minutes of the day that a plan asks for, rising, from its first to its last; all of the day if it names none.
std::vector<int> minutes_of(const HourPlan& plan) {
    const int first = plan.first_h ? int(std::lround(*plan.first_h * 60)) : 0;
    const int end_of_scale = plan.time == HourTime::unequal ? 12 * 60 : 24 * 60;
    const int last = plan.last_h ? std::min(int(std::lround(*plan.last_h * 60)), end_of_scale) : end_of_scale - 1;
    std::vector<int> minutes;
    for (int minute = 0; minute <= 24 * 60; minute += plan.divide_min) {
        const bool horizon_itself = counts_from_horizon(plan.time) && (minute == 0 || minute == end_of_scale);
        const bool midnight_again = minute == 24 * 60 && first == 0; // the line of 0 h is that of 24 h
        if (minute >= first && minute <= last && !horizon_itself && !midnight_again)
            minutes.push_back(minute);
    }
    return minutes;
}

struct DayStretch {
    double first, last;
};
/// @param half  one of the two halves
DayStretch stretch_of(HalfYear half, const MeanYear& year) {
    const double june = year.june_solstice_day(), december = year.december_solstice_day();
    return half == HalfYear::june_to_december ? DayStretch{june, december}
                                              : DayStretch{december - year.length_days(), june};
}

/// Adds the pieces of a next stretch of the same curve; what goes on where the last piece ends becomes one with it.
void add_joined(std::vector<PlatePolyline>& all, std::vector<PlatePolyline>&& more) {
    constexpr double k_same_mm = 1e-6;
    auto next = more.begin();
    if (!all.empty() && next != more.end() &&
        std::hypot(next->front().u_mm - all.back().back().u_mm, next->front().v_mm - all.back().back().v_mm) <
            k_same_mm) {
        all.back().insert(all.back().end(), next->begin() + 1, next->end());
        ++next;
    }
    all.insert(all.end(), std::make_move_iterator(next), std::make_move_iterator(more.end()));
}

class Delineator {
  public:
    Delineator(const DialPlan& plan, const MeanYear& year, const PlateBox& window)
        : plan_{plan}, year_{year}, window_{window}, caster_{caster_of(plan)} {
        made_.frame = caster_.surface().frame();
        made_.style = style_of(made_.frame, plan.nodus_height_mm, plan.site.latitude);
        made_.season = {-year.obliquity(), year.obliquity()};
    }

    Delineation made() {
        add_hours(plan_.hours, 0);
        for (std::size_t i = 0; i < plan_.more_hours.size(); ++i)
            add_hours(plan_.more_hours[i], int(i) + 1);
        add_noons();
        for (const Angle& altitude : plan_.altitudes)
            add_level(Family::altitude, altitude,
                      altitude_path(altitude, plan_.site.latitude, within(plan_.altitudes_between)));
        for (const Angle& azimuth : plan_.azimuths)
            add_level(Family::azimuth, azimuth,
                      azimuth_path(azimuth, plan_.site.latitude, within(plan_.azimuths_between)));
        for (const DatePlan::Line& date : plan_.dates.lines)
            add_date(date);
        return std::move(made_);
    }

  private:
    void add_hours(const HourPlan& hours, int set) {
        for (const int minute : minutes_of(hours)) {
            DialLine line;
            line.family = family_of(hours.time);
            line.time = hours.time;
            line.set = set;
            line.time_h = minute / 60.0;
            line.step_min = coarsest_step_of(minute);
            const bool lit = add_pieces(line, hours);
            const bool whole_hour = minute % 60 == 0;
            if (!line.pieces.empty())
                made_.lines.push_back(std::move(line));
            else if (whole_hour && lit && set == 0)
                made_.outside_hours.push_back(line.time_h);
            else if (whole_hour && hours.first_h && set == 0)
                made_.unlit_hours.push_back(line.time_h);
            else if (whole_hour && hours.first_h)
                made_.missed.push_back({std::move(line), lit});
        }
    }

    /// @return whether the hour is ever lit
    bool add_pieces(DialLine& line, const HourPlan& hours) {
        if (counts_from_horizon(hours.time))
            return add_curve(line, day_path(hours.time, line.time_h, within(hours.between)));
        line.hour_angle = hour_angle_of(hours.time, line.time_h, plan_.site, plan_.zone_meridian);
        if (line.family == Family::hour)
            return add_straight_pieces(line, hours.extent, hours.between);
        bool lit = false;
        for (const DayStretch& days : stretches_of(hours))
            lit = add_curve(line, mean_time_path(line.hour_angle, year_, days.first, days.last)) || lit;
        return lit;
    }

    /// The days of a clock-time curve: of each half of the year those between two declinations. The halves meet in the
    /// solstices, so that a curve which is lit for a few days about one of them is not stepped over.
    [[nodiscard]] std::vector<DayStretch> stretches_of(const HourPlan& hours) const {
        const Season season = within(hours.between);
        std::vector<DayStretch> stretches;
        for (const HalfYear half : {HalfYear::december_to_june, HalfYear::june_to_december}) {
            if (hours.half_year != HalfYear::whole && hours.half_year != half)
                continue;
            const bool north = half == HalfYear::december_to_june;
            const DayStretch all = stretch_of(half, year_);
            if (!hours.between) {
                stretches.push_back(all);
                continue;
            }
            const auto day_in = [&](Angle declination, double otherwise) {
                double day = year_.day_of_declination(declination, north).value_or(otherwise);
                day += day > all.last + 1 ? -year_.length_days() : 0.0;
                return std::clamp(day, all.first, all.last);
            };
            const double first = day_in(north ? season.least : season.greatest, all.first),
                         last = day_in(north ? season.greatest : season.least, all.last);
            if (first < last)
                stretches.push_back({first, last});
        }
        return stretches;
    }

    /// The season, or what of it a family of lines is drawn for.
    [[nodiscard]] Season within(const std::optional<Season>& between) const {
        return between ? Season{std::max(made_.season.least, between->least),
                                std::min(made_.season.greatest, between->greatest)}
                       : made_.season;
    }

    /// An hour that counts from the Sun's rising or setting.
    [[nodiscard]] SunPath day_path(HourTime time, double time_h, const Season& season) const {
        const Angle latitude = plan_.site.latitude, count = Angle::hours(time_h);
        switch (time) {
        case HourTime::since_sunrise:
            return rise_path(count, latitude, season, plan_.horizon);
        case HourTime::to_sunset:
            return set_path(count, latitude, season, plan_.horizon);
        case HourTime::since_sunset:
            return set_path(Angle::hours(24) - count, latitude, season, plan_.horizon);
        default:
            return unequal_hour_path(time_h / 12.0, latitude, season, plan_.horizon);
        }
    }

    /// @return whether any Sun of the path lights the plate
    bool add_curve(DialLine& line, const SunPath& path) {
        add_joined(line.pieces, pieces_of(path));
        if (!line.pieces.empty())
            return true;
        for (int i = 0; i <= path.steps; ++i)
            if (const auto sky = path.at(path.first + (path.last - path.first) * i / path.steps); sky && shines(*sky))
                return true;
        return false;
    }

    /// The Sun is seen and lights the plate, and more than grazing.
    [[nodiscard]] bool shines(const SkyPlace& sky) const {
        constexpr double k_grazing = 1e-6; // sine
        const SiteDirection sun = to_site(sky, plan_.site.latitude);
        return caster_.surface().light(sun) > k_grazing && caster_.skyline().clearance(sun) > k_grazing;
    }

    /// @return whether the hour is ever lit
    bool add_straight_pieces(DialLine& line, HourExtent extent, const std::optional<Season>& between) {
        if (!caster_.ever_lit(line.hour_angle, made_.season))
            return false;
        line.direction = hour_line_direction(made_.frame, made_.style, plan_.site.latitude, line.hour_angle);
        SunPath path = extent == HourExtent::style && !between ? hour_path_of_style(line.hour_angle)
                                                               : hour_path_of_nodus(line.hour_angle, within(between));
        if (!caster_.edges().both_cast(
                line.hour_angle)) // one edge casts the hour, up to the pole, where its Sun tells no more
            path.edge = caster_.edges().casting(line.hour_angle);
        line.pieces = pieces_of(path);
        return true;
    }

    /// One set of pieces; where every Sun of the path stands in the gnomon's own plane one for each of its edges: the
    /// two sides of the noon gap.
    [[nodiscard]] std::vector<PlatePolyline> pieces_of(SunPath path) const {
        if (path.edge || !in_gnomon_plane(path))
            return trace(caster_, path, window_);
        std::vector<PlatePolyline> pieces;
        for (const Edge edge : {Edge::left, Edge::right}) {
            path.edge = edge;
            for (PlatePolyline& piece : trace(caster_, path, window_))
                pieces.push_back(std::move(piece));
        }
        return pieces;
    }

    [[nodiscard]] bool in_gnomon_plane(const SunPath& path) const {
        if (!(plan_.gnomon_thickness_mm > 0))
            return false;
        int there = 0;
        for (int i = 0; i <= path.steps; ++i) // most paths leave it at the first
            if (const auto sky = path.at(path.first + (path.last - path.first) * i / path.steps)) {
                ++there;
                if (!caster_.edges().both_cast(sky->hour_angle))
                    return false;
            }
        return there > 0;
    }

    void add_noons() {
        for (const PlaceNoon& noon : plan_.noons) {
            DialLine line;
            line.family = Family::place_noon;
            line.label = noon.name;
            line.hour_angle = (plan_.site.longitude - noon.longitude).signed_turn();
            line.time_h = time_of(HourTime::sun, line.hour_angle, plan_.site, plan_.zone_meridian);
            keep_or_list(line, add_straight_pieces(line, plan_.hours.extent, plan_.noons_between));
        }
    }

    void add_level(Family family, Angle level, const SunPath& path) {
        DialLine line;
        line.family = family;
        line.level = level;
        keep_or_list(line, add_curve(line, path));
    }

    void keep_or_list(DialLine& line, bool lit) {
        if (!line.pieces.empty())
            made_.lines.push_back(std::move(line));
        else
            made_.missed.push_back({std::move(line), lit});
    }

    void add_date(const DatePlan::Line& date) {
        DialLine line;
        line.family = Family::date;
        line.label = date.label;
        line.declination = date.declination;
        SunPath path = declination_path(date.declination);
        path.first = plan_.dates.first.value_or(Angle::radians(path.first)).in_radians();
        path.last = plan_.dates.last.value_or(Angle::radians(path.last)).in_radians();
        keep_or_list(line, add_curve(line, path));
    }

    const DialPlan& plan_;
    const MeanYear& year_;
    PlateBox window_;
    Caster<Plane> caster_;
    Delineation made_;
};

} // namespace

Family family_of(HourTime time) {
    switch (time) {
    case HourTime::clock:
        return Family::clock_hour;
    case HourTime::since_sunrise:
        return Family::since_sunrise;
    case HourTime::since_sunset:
        return Family::since_sunset;
    case HourTime::to_sunset:
        return Family::to_sunset;
    case HourTime::unequal:
        return Family::unequal_hour;
    case HourTime::sun:
    case HourTime::zone:
        break;
    }
    return Family::hour;
}

bool is_hour(Family family) {
    return family != Family::date && family != Family::altitude && family != Family::azimuth &&
           family != Family::place_noon;
}

bool counts_from_horizon(Family family) {
    return is_hour(family) && family != Family::hour && family != Family::clock_hour;
}

Angle hour_angle_of(HourTime time, double time_h, const Site& site, Angle zone_meridian) {
    const Angle from_noon = Angle::hours(time_h - 12.0);
    return time == HourTime::sun ? from_noon : from_noon + (site.longitude - zone_meridian).signed_turn();
}

double time_of(HourTime time, Angle hour_angle, const Site& site, Angle zone_meridian) {
    const Angle on_dial =
        time == HourTime::sun ? hour_angle : hour_angle - (site.longitude - zone_meridian).signed_turn();
    return (on_dial + Angle::degrees(180)).positive_turn().in_hours();
}

Caster<Plane> caster_of(const DialPlan& plan) {
    const Plane plane{frame_of(plan.attitude), plan.nodus_height_mm};
    const Style style = style_of(plane.frame(), plan.nodus_height_mm, plan.site.latitude);
    const GnomonEdges edges{plane.frame(), style, plan.site.latitude, plan.gnomon_thickness_mm};
    return {plan.site.latitude, plane, edges, plan.skyline};
}

Delineation delineate(const DialPlan& plan, const MeanYear& year, const PlateBox& window) {
    std::vector<HourPlan> sets = plan.more_hours;
    sets.push_back(plan.hours);
    for (const HourPlan& hours : sets)
        if (hours.divide_min < 1 || 60 % hours.divide_min != 0)
            throw std::invalid_argument("an hour must divide into a whole number of parts of whole minutes");
    return Delineator{plan, year, window}.made();
}

namespace {

double clock_reading(const DialPlan& plan, const MeanYear& year, const SkyPlace& sun, double day_of_year) {
    const double june = year.june_solstice_day(), december = year.december_solstice_day();
    const bool going_north = day_of_year < june || day_of_year >= december;
    // An instant's own Sun may pass the mean year's solstices by some seconds of arc.
    const Angle declination = std::clamp(sun.declination, year.at(december).declination, year.at(june).declination);
    const double day = year.day_of_declination(declination, going_north).value_or(day_of_year);
    const Angle mean_hour_angle = sun.hour_angle - year.at(day).equation_of_time;
    return time_of(HourTime::clock, mean_hour_angle, plan.site, plan.zone_meridian);
}

} // namespace

std::optional<double> reading_of(const DialPlan& plan, HourTime time, const MeanYear& year, const SkyPlace& sun,
                                 double day_of_year) {
    if (time == HourTime::clock)
        return clock_reading(plan, year, sun, day_of_year);
    if (has_straight_lines(time))
        return time_of(time, sun.hour_angle, plan.site, plan.zone_meridian);
    const auto arc = half_day_arc(plan.site.latitude, sun.declination, plan.horizon);
    if (!arc)
        return std::nullopt;
    const Angle hour_angle = sun.hour_angle.signed_turn();
    switch (time) {
    case HourTime::since_sunrise:
        return (hour_angle + *arc).positive_turn().in_hours();
    case HourTime::to_sunset:
        return (*arc - hour_angle).positive_turn().in_hours();
    case HourTime::since_sunset:
        return (hour_angle - *arc).positive_turn().in_hours();
    default:
        return *arc > Angle{} && abs(hour_angle) <= *arc ? std::optional{6 + 6 * (hour_angle / *arc)} : std::nullopt;
    }
}

} // namespace dialwright
