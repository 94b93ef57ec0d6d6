// SPDX-License-Identifier: MIT
#include "engine/dial/delineation.hpp"

#include <algorithm>
#include <cmath>
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
    const int last = plan.last_h ? int(std::lround(*plan.last_h * 60)) : 24 * 60 - 1;
    std::vector<int> minutes;
    for (int minute = 0; minute <= 24 * 60; minute += plan.divide_min)
        if (minute >= first && minute <= last)
            minutes.push_back(minute);
    return minutes;
}

struct DayStretch {
    double first, last;
};
DayStretch stretch_of(HalfYear half, const MeanYear& year) {
    const double june = year.june_solstice_day(), december = year.december_solstice_day();
    switch (half) {
    case HalfYear::december_to_june:
        return {december - year.length_days(), june};
    case HalfYear::june_to_december:
        return {june, december};
    case HalfYear::whole:
        break;
    }
    return {december - year.length_days(), december};
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
        for (const int minute : minutes_of(plan_.hours))
            add_hour(minute);
        for (const DatePlan::Line& date : plan_.dates.lines)
            add_date(date);
        return std::move(made_);
    }

  private:
    void add_hour(int minute) {
        DialLine line;
        line.family = plan_.hours.time == HourTime::clock ? Family::clock_hour : Family::hour;
        line.time_h = minute / 60.0;
        line.step_min = coarsest_step_of(minute);
        line.hour_angle = hour_angle_of(plan_.hours.time, line.time_h, plan_.site, plan_.zone_meridian);
        const bool lit = line.family == Family::clock_hour ? add_clock_pieces(line) : add_straight_pieces(line);
        const bool whole_hour = minute % 60 == 0;
        if (!line.pieces.empty())
            made_.lines.push_back(std::move(line));
        else if (whole_hour && lit)
            made_.outside_hours.push_back(line.time_h);
        else if (whole_hour && plan_.hours.first_h)
            made_.unlit_hours.push_back(line.time_h);
    }

    /// @return whether the hour is ever lit
    bool add_clock_pieces(DialLine& line) {
        const DayStretch days = stretch_of(plan_.hours.half_year, year_);
        const SunPath path = mean_time_path(line.hour_angle, year_, days.first, days.last);
        line.pieces = trace(caster_, path, window_);
        if (!line.pieces.empty())
            return true;
        for (int i = 0; i <= path.steps; ++i)
            if (caster_.cast(path.at(path.first + (path.last - path.first) * i / path.steps), path.light))
                return true;
        return false;
    }

    /// @return whether the hour is ever lit
    bool add_straight_pieces(DialLine& line) {
        if (!caster_.ever_lit(line.hour_angle, made_.season))
            return false;
        line.direction = hour_line_direction(made_.frame, made_.style, plan_.site.latitude, line.hour_angle);
        SunPath path = plan_.hours.extent == HourExtent::style ? hour_path_of_style(line.hour_angle)
                                                               : hour_path_of_nodus(line.hour_angle, made_.season);
        if (!caster_.edges().both_cast(line.hour_angle)) {
            line.pieces = trace(caster_, path, window_);
            return true;
        }
        for (const Edge edge : {Edge::left, Edge::right}) { // the two sides of the noon gap
            path.edge = edge;
            for (PlatePolyline& piece : trace(caster_, path, window_))
                line.pieces.push_back(std::move(piece));
        }
        return true;
    }

    void add_date(const DatePlan::Line& date) {
        DialLine line;
        line.family = Family::date;
        line.label = date.label;
        line.declination = date.declination;
        line.pieces = trace(caster_, declination_path(date.declination), window_);
        if (!line.pieces.empty())
            made_.lines.push_back(std::move(line));
        else
            made_.unlit_dates.push_back(date.label);
    }

    const DialPlan& plan_;
    const MeanYear& year_;
    PlateBox window_;
    Caster<Plane> caster_;
    Delineation made_;
};

} // namespace

Angle hour_angle_of(HourTime time, double time_h, const Site& site, Angle zone_meridian) {
    const Angle from_noon = Angle::hours(time_h - 12.0);
    return time == HourTime::sun ? from_noon : from_noon + (site.longitude - zone_meridian);
}

double time_of(HourTime time, Angle hour_angle, const Site& site, Angle zone_meridian) {
    const Angle on_dial = time == HourTime::sun ? hour_angle : hour_angle - (site.longitude - zone_meridian);
    return (on_dial + Angle::degrees(180)).positive_turn().in_hours();
}

Caster<Plane> caster_of(const DialPlan& plan) {
    const Plane plane{frame_of(plan.attitude), plan.nodus_height_mm};
    const Style style = style_of(plane.frame(), plan.nodus_height_mm, plan.site.latitude);
    const GnomonEdges edges{plane.frame(), style, plan.site.latitude, plan.gnomon_thickness_mm};
    return {plan.site.latitude, plane, edges, plan.skyline};
}

Delineation delineate(const DialPlan& plan, const MeanYear& year, const PlateBox& window) {
    if (plan.hours.divide_min < 1 || 60 % plan.hours.divide_min != 0)
        throw std::invalid_argument("an hour must divide into a whole number of parts of whole minutes");
    return Delineator{plan, year, window}.made();
}

double reading_of(const DialPlan& plan, const MeanYear& year, const SkyPlace& sun, double day_of_year) {
    if (plan.hours.time != HourTime::clock)
        return time_of(plan.hours.time, sun.hour_angle, plan.site, plan.zone_meridian);
    const double june = year.june_solstice_day(), december = year.december_solstice_day();
    const bool going_north = day_of_year < june || day_of_year >= december;
    // An instant's own Sun may pass the mean year's solstices by some seconds of arc.
    const Angle declination = std::clamp(sun.declination, year.at(december).declination, year.at(june).declination);
    const double day = year.day_of_declination(declination, going_north).value_or(day_of_year);
    const Angle mean_hour_angle = sun.hour_angle - year.at(day).equation_of_time;
    return time_of(HourTime::clock, mean_hour_angle, plan.site, plan.zone_meridian);
}

} // namespace dialwright
