// SPDX-License-Identifier: MIT
//
// An hour line is judged by the Suns that stand on it at the June solstice, at the equinox, and at the December solstice: at
// the hour angle of its time and that season's declination (of clock time: that season's equation of time too). Each slip
// is put on the dial, and read through SlippedDial.
//
// Half-shadow: the middle of a shadow's edge is judged to half of the half-shadow at worst. That is the edge that a Sun 16′ to
// the side would throw: across the meridian circle of its hour, 16′ / cos δ of hour angle.
#include "engine/dial/accuracy.hpp"

#include "engine/sun/apparent_sun.hpp"

#include <Eigen/Geometry>

#include <algorithm>
#include <cmath>

namespace dialwright {
namespace {

using namespace std::chrono;

void add_up(AccuracyCell& cell) {
    double squares = 0, most = -1;
    for (std::size_t i = 0; i < k_slips.size(); ++i) {
        const double minutes = cell.minutes[i].value_or(-1);
        if (minutes < 0)
            continue;
        squares += minutes * minutes;
        if (minutes > most) {
            most = minutes;
            cell.most = k_slips[i];
        }
    }
    cell.total_min = std::sqrt(squares);
}

struct SeasonSun {
    double day = 0.0; ///< of the mean year
    Angle declination, equation;
    double equation_spread_min = 0.0; ///< of the years' own equation of time about the mean
    Angle declination_spread;
};

/// The mean year's Sun on a day, and how far the years' own on that date stray.
SeasonSun season_sun(const MeanYear& year, double day, const Site& site) {
    // At the place's own noon of that date, as date lines have it.
    const month_day date = year.date_of(day);
    const double noon_h = 12.0 - site.longitude.in_hours();
    SeasonSun sun{year.day_of(date, noon_h), {}, {}, 0.0, {}};
    const MeanYear::Season mean = year.at(sun.day);
    sun.declination = mean.declination;
    sun.equation = mean.equation_of_time;
    for (int y = year.first_year(); y <= year.last_year(); ++y) {
        const Instant at = Instant{sys_days{std::chrono::year{y} / date.month() / date.day()}} +
                           round<microseconds>(duration<double, std::ratio<3600>>(noon_h));
        const ApparentSun own = apparent_sun(at);
        sun.equation_spread_min =
            std::max(sun.equation_spread_min, std::abs((own.equation_of_time - sun.equation).in_minutes_of_time()));
        sun.declination_spread = std::max(sun.declination_spread, abs(own.declination - sun.declination));
    }
    return sun;
}

class Judge {
  public:
    Judge(const AccuracyPlan& plan, const MeanYear& year)
        : plan_{plan}, year_{year}, dial_{plan.dial, year, plan.dial.hours.time, plan.by_nodus} {
        for (const double day : {year.june_solstice_day(), year.march_equinox_day(), year.december_solstice_day()})
            seasons_.push_back(season_sun(year, day, plan.dial.site));
    }

    [[nodiscard]] std::vector<AccuracyLine> judged() const {
        std::vector<AccuracyLine> lines;
        for (const AccuracyPlan::Line& line : plan_.lines) {
            AccuracyLine made{line.time_h, {}};
            for (std::size_t i = 0; i < seasons_.size(); ++i)
                made.at[i] = cell(line, seasons_[i]);
            lines.push_back(std::move(made));
        }
        return lines;
    }

  private:
    /// The Sun that stands on a line at a season; nothing where it has none there.
    [[nodiscard]] std::optional<SkyPlace> sun_on(double time_h, const SeasonSun& season) const {
        const DialPlan& dial = plan_.dial;
        const Angle count = Angle::hours(time_h);
        const auto by_arc = [&](auto hour_angle) -> std::optional<SkyPlace> {
            const auto arc = half_day_arc(dial.site.latitude, season.declination, dial.horizon);
            return arc ? std::optional<SkyPlace>{{hour_angle(*arc), season.declination}} : std::nullopt;
        };
        switch (dial.hours.time) {
        case HourTime::since_sunrise:
            return by_arc([&](Angle arc) { return count - arc; });
        case HourTime::to_sunset:
            return by_arc([&](Angle arc) { return arc - count; });
        case HourTime::since_sunset:
            return by_arc([&](Angle arc) { return arc + count; });
        case HourTime::unequal:
            return by_arc([&](Angle arc) { return (time_h / 6.0 - 1.0) * arc; });
        default:
            break;
        }
        Angle hour_angle = hour_angle_of(dial.hours.time, time_h, dial.site, dial.zone_meridian);
        if (dial.hours.time == HourTime::clock)
            hour_angle += season.equation;
        return SkyPlace{hour_angle.signed_turn(), season.declination};
    }

    [[nodiscard]] std::optional<AccuracyCell> cell(const AccuracyPlan::Line& line, const SeasonSun& season) const {
        const auto sun = sun_on(line.time_h, season);
        const auto cast = sun ? dial_.caster().cast(*sun, Light::seen) : std::nullopt;
        if (!cast)
            return std::nullopt;
        AccuracyCell made;
        made.at = cast->point;
        const double reach = std::hypot(made.at.u_mm - plan_.pivot_mm.x(), made.at.v_mm - plan_.pivot_mm.y());
        if (dial_.by_nodus() && reach > line.reach_mm)
            return std::nullopt; // beyond the line as drawn
        if (!dial_.by_nodus() && (plan_.at_outer_end || reach > line.reach_mm))
            made.at = line.outer;
        for (std::size_t i = 0; i < k_slips.size(); ++i)
            made.minutes[i] = minutes_of(k_slips[i], *sun, season, made.at);
        add_up(made);
        return made;
    }

    /// The larger of a slip's two ways.
    template <class MakeSlip>
    [[nodiscard]] std::optional<double> either_way(const SkyPlace& sun, double day, PlatePoint at,
                                                   MakeSlip make) const {
        std::optional<double> most;
        for (const double sign : {1.0, -1.0})
            if (const auto error = dial_.error_min(sun, day, make(sign), at))
                most = std::max(most.value_or(0.0), std::abs(*error));
        return most;
    }

    [[nodiscard]] std::optional<double> minutes_of(SlipKind kind, const SkyPlace& sun, const SeasonSun& season,
                                                   PlatePoint at) const {
        const SlipSizes& sizes = plan_.sizes;
        const PlateFrame& frame = dial_.caster().surface().frame();
        const auto turned = [&](const Eigen::Vector3d& axis, Angle size) {
            return either_way(sun, season.day, at, [&](double sign) {
                Slip slip;
                slip.turned = turn_about(axis, sign * size);
                return slip;
            });
        };
        switch (kind) {
        case SlipKind::half_shadow:
            return other_sun(sun, {sun.hour_angle + sizes.half_shadow / cos(sun.declination), sun.declination},
                             season.day);
        case SlipKind::marking:
            return marking(sun, season.day, at);
        case SlipKind::style_height:
        case SlipKind::substyle:
            return style(kind, sun, season.day, at);
        case SlipKind::facing:
            return turned(Eigen::Vector3d::UnitZ(), sizes.facing);
        case SlipKind::lean:
            return turned(frame.u, sizes.lean);
        case SlipKind::level:
            return plan_.level ? turned(frame.v, sizes.lean) : std::nullopt;
        case SlipKind::print:
            return print(sun, season.day, at);
        case SlipKind::position:
            return position(sun, season.day);
        case SlipKind::equation:
            break;
        }
        return equation(sun, season);
    }

    /// What the dial shows more for another Sun.
    [[nodiscard]] std::optional<double> other_sun(const SkyPlace& sun, const SkyPlace& other, double day) const {
        const HourTime time = plan_.dial.hours.time;
        const auto meant = reading_of(plan_.dial, time, year_, sun, day);
        const auto shows = reading_of(plan_.dial, time, year_, other, day);
        return meant && shows ? std::optional{std::abs(dial_.minutes_between(*meant, *shows))} : std::nullopt;
    }

    /// Across the line, the way in which the reading changes fastest.
    [[nodiscard]] std::optional<double> marking(const SkyPlace& sun, double day, PlatePoint at) const {
        double squares = 0;
        for (const PlatePoint way : {PlatePoint{1, 0}, PlatePoint{0, 1}}) {
            const auto error = either_way(sun, day, at, [&](double sign) {
                Slip slip;
                slip.moved_mm = {sign * plan_.sizes.marking_mm * way.u_mm, sign * plan_.sizes.marking_mm * way.v_mm};
                return slip;
            });
            if (!error)
                return std::nullopt;
            squares += *error * *error;
        }
        return std::sqrt(squares);
    }

    [[nodiscard]] std::optional<double> style(SlipKind kind, const SkyPlace& sun, double day, PlatePoint at) const {
        const PlateFrame& frame = dial_.caster().surface().frame();
        const Style& style = dial_.style();
        constexpr Angle k_square = Angle::degrees(80); // a style this steep has no substyle to speak of
        const Angle along = style.height < k_square ? style.substyle : Angle{};
        const Eigen::Vector3d substyle = sin(along) * frame.u + cos(along) * frame.v;
        const bool to_a_side = kind == SlipKind::substyle && (plan_.by_nodus || style.height >= k_square);
        const Eigen::Vector3d axis = kind == SlipKind::style_height ? Eigen::Vector3d(frame.n.cross(substyle))
                                     : to_a_side                    ? substyle
                                                                    : frame.n;
        const Angle size = kind == SlipKind::style_height ? plan_.sizes.style_height : plan_.sizes.substyle;
        return either_way(sun, day, at, [&](double sign) {
            Slip slip;
            slip.style_turned = turn_about(axis, sign * size);
            slip.pivot_mm = plan_.pivot_mm;
            return slip;
        });
    }

    [[nodiscard]] std::optional<double> print(const SkyPlace& sun, double day, PlatePoint at) const {
        return either_way(sun, day, at, [&](double sign) {
            Slip slip;
            slip.stretch_u = 1 + sign * plan_.sizes.print;
            slip.stretch_from = plan_.stretch_from;
            return slip;
        });
    }

    /// A dial made for a place a little to the north, and one a little to the east.
    [[nodiscard]] std::optional<double> position(const SkyPlace& sun, double day) const {
        const Angle size = plan_.sizes.position, latitude = plan_.dial.site.latitude;
        const HourTime time = plan_.dial.hours.time;
        DialPlan elsewhere = plan_.dial;
        elsewhere.site.latitude += latitude < Angle{} ? size : -size; // never over a pole
        const SkyPlace to_it = to_sky(to_site(sun, latitude), elsewhere.site.latitude);
        const auto meant = reading_of(plan_.dial, time, year_, sun, day);
        const auto shows = reading_of(elsewhere, time, year_, to_it, day);
        if (!meant || !shows)
            return std::nullopt;
        return std::hypot(dial_.minutes_between(*meant, *shows), size.in_minutes_of_time());
    }

    [[nodiscard]] std::optional<double> equation(const SkyPlace& sun, const SeasonSun& season) const {
        const HourTime time = plan_.dial.hours.time;
        if (time == HourTime::sun || time == HourTime::zone)
            return season.equation_spread_min;
        // Curves are read by the declination as well: the years' own, either way.
        std::optional<double> most;
        for (const double sign : {1.0, -1.0})
            if (const auto error =
                    other_sun(sun, {sun.hour_angle, sun.declination + sign * season.declination_spread}, season.day))
                most = std::max(most.value_or(0.0), *error);
        return most && time == HourTime::clock ? std::hypot(*most, season.equation_spread_min) : most;
    }

    const AccuracyPlan& plan_;
    const MeanYear& year_;
    SlippedDial dial_;
    std::vector<SeasonSun> seasons_;
};

constexpr double k_steps_min[] = {1, 2, 3, 4, 5, 6, 8, 10, 15, 20, 30};

/// The longest run of lines that keep to so many minutes.
Supported longest_run(const std::vector<AccuracyLine>& lines, double minutes) {
    Supported best{minutes, 0, 0, 0}, run{minutes, 0, 0, 0};
    for (const AccuracyLine& line : lines) {
        if (line.worst_min() > minutes) {
            run.lines = 0;
            continue;
        }
        if (run.lines++ == 0)
            run.first_h = line.time_h;
        run.last_h = line.time_h;
        if (run.lines > best.lines)
            best = run;
    }
    return best;
}

} // namespace

double AccuracyLine::worst_min() const {
    double worst = 0;
    for (const auto& cell : at)
        if (cell)
            worst = std::max(worst, cell->total_min);
    return worst;
}

std::vector<AccuracyLine> accuracy_of(const AccuracyPlan& plan, const MeanYear& year) {
    return Judge{plan, year}.judged();
}

std::vector<Supported> supported_readings(const std::vector<AccuracyLine>& lines) {
    std::vector<AccuracyLine> lit;
    for (const AccuracyLine& line : lines)
        if (line.worst_min() > 0)
            lit.push_back(line);
    std::vector<Supported> found;
    for (const double minutes : k_steps_min) {
        const Supported run = longest_run(lit, minutes);
        const bool all = run.lines == int(lit.size());
        if (run.lines > 0 && (found.empty() ? 3 * run.lines >= 2 * int(lit.size()) : all))
            found.push_back(run);
        if (all)
            break;
    }
    return found;
}

std::vector<AccuracyLine> without(std::vector<AccuracyLine> lines, SlipKind kind) {
    for (AccuracyLine& line : lines)
        for (auto& cell : line.at)
            if (cell) {
                cell->minutes[static_cast<std::size_t>(kind)].reset();
                add_up(*cell);
            }
    return lines;
}

} // namespace dialwright
