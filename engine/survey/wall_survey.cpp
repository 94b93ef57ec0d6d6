// SPDX-License-Identifier: MIT
//
// Unknowns, in this order: facing, lean, turn of the board in its plane (degrees), clock slow (s), peg longer than said, foot
// of the tip to the right and up (mm). Rows: two a shadow (right, up), then one a grazing, the bearing, the lean.
#include "engine/survey/wall_survey.hpp"
#include "engine/fit/chance.hpp"
#include "engine/surface/plane.hpp"

#include <Eigen/Dense>

#include <algorithm>
#include <cmath>

namespace dialwright {
namespace {

using Eigen::VectorXd;
enum Index { k_facing, k_lean, k_turn, k_clock, k_peg, k_foot_right, k_foot_up, k_unknowns };

/// A mark is set to 0.5 mm, and the tip's shadow, which the Sun's width blurs over 1/107 of its distance, judged to a
/// quarter of that. Common practice, no source; the fit finds the scatter that there really was.
constexpr double k_marking_mm = 0.5, k_blur = 0.25 / 107;
/// What is no doubt of a reading but of its wall: a Sun nearer to the wall's plane than this throws no shadow to measure.
constexpr double k_least_light = 0.01;
constexpr double k_unlit = 1e4;    // residual of a shadow that the wall could not have had
constexpr double k_doubted = 1e-4; // of a figure's weight, where it is held to be wrong
constexpr double k_any_facing_deg = 60, k_any_lean_deg = 40, k_any_clock_s = 7200, k_any_level_deg = 15;

/// What an explanation holds to be wrong.
struct Suspect {
    WallAnswer::Fault fault = WallAnswer::Fault::none;
    std::size_t grazing = 0; ///< which one
};

class Survey {
  public:
    explicit Survey(const WallReadings& readings) : readings_{readings}, latitude_{readings.site.latitude} {
        std::vector<Instant> instants;
        for (const PegShadow& shadow : readings.shadows)
            instants.push_back(shadow.at);
        for (const Grazing& grazing : readings.grazings)
            instants.push_back(grazing.at);
        suns_ = real_suns(readings.site, instants);
        for (const RealSun& sun : suns_)
            seen_.push_back(sun.seen(latitude_));
    }

    [[nodiscard]] bool residuals(const VectorXd& x, VectorXd& r) const {
        if (std::abs(x[k_lean]) > 89.5 || readings_.peg_mm + x[k_peg] < readings_.peg_mm / 2)
            return false;
        const Plane plane{board_of(x), readings_.peg_mm + x[k_peg]};
        int row = 0;
        for (std::size_t i = 0; i < readings_.shadows.size(); ++i, row += 2) {
            const SiteDirection sun = sun_of(i, x[k_clock]);
            const auto point = plane.light(sun) > k_least_light
                                   ? plane.shadow_of_nodus(sun, {x[k_foot_right], x[k_foot_up]})
                                   : std::nullopt;
            const PegShadow& shadow = readings_.shadows[i];
            const double deviation_mm = nominal_mm(shadow);
            r[row] = point ? (shadow.right_mm - point->u_mm) / deviation_mm : k_unlit;
            r[row + 1] = point ? (-shadow.down_mm - point->v_mm) / deviation_mm : k_unlit;
        }
        for (std::size_t i = 0; i < readings_.grazings.size(); ++i) {
            const SiteDirection sun = sun_of(readings_.shadows.size() + i, x[k_clock]);
            const double off_deg = arc_sine(plane.light(sun)).in_degrees();
            // A wall that faces the other way loses the Sun where this one gets it.
            constexpr double k_later_s = 60;
            const SiteDirection later = sun_of(readings_.shadows.size() + i, x[k_clock] + k_later_s);
            const bool begins = plane.light(later) > plane.light(sun);
            if (begins != readings_.grazings[i].begins)
                r[row++] = k_unlit;
            else
                r[row++] = off_deg / Known{0, readings_.grazings[i].give.in_degrees()}.deviation();
        }
        if (const auto& bearing = readings_.bearing_deg)
            r[row++] = Angle::degrees(bearing->value - x[k_facing]).signed_turn().in_degrees() / bearing->deviation();
        if (const auto& lean = readings_.lean_deg)
            r[row++] = (lean->value - x[k_lean]) / lean->deviation();
        return true;
    }

    /// The figures that stand beside the shadows, one by one.
    [[nodiscard]] std::vector<Suspect> figures() const {
        using Fault = WallAnswer::Fault;
        std::vector<Suspect> figures;
        for (std::size_t i = 0; i < readings_.grazings.size(); ++i)
            figures.push_back({Fault::grazing, i});
        if (readings_.bearing_deg)
            figures.push_back({Fault::bearing});
        if (readings_.lean_deg)
            figures.push_back({Fault::lean});
        return figures;
    }

    [[nodiscard]] FitTask task(const Suspect& suspect) const {
        const WallAnswer::Fault fault = suspect.fault;
        FitTask task;
        task.readings = int(readings_.shadows.size());
        task.width = 2;
        task.known_rows =
            int(readings_.grazings.size()) + (readings_.bearing_deg ? 1 : 0) + (readings_.lean_deg ? 1 : 0);
        task.residuals = [this, row = row_of(suspect)](const VectorXd& x, VectorXd& r) {
            const bool can_be = residuals(x, r);
            if (can_be && row >= 0)
                r[row] *= k_doubted;
            return can_be;
        };
        task.unknowns.resize(k_unknowns);
        const auto set = [&](Index i, double step, double known_to) {
            task.unknowns[i].step = step;
            task.unknowns[i].known_to = std::max(known_to, 1e-6);
        };
        using Fault = WallAnswer::Fault;
        set(k_facing, 1e-4, k_any_facing_deg);
        set(k_lean, 1e-4, k_any_lean_deg);
        set(k_turn, 1e-4,
            fault == Fault::level ? k_any_level_deg : Known{0, readings_.level_give.in_degrees()}.deviation());
        set(k_clock, 0.05, fault == Fault::clock ? k_any_clock_s : Known{0, readings_.clock_give_s}.deviation());
        set(k_peg, 1e-3, Known{0, readings_.peg_give_mm}.deviation());
        set(k_foot_right, 1e-3, Known{0, readings_.foot_give_mm}.deviation());
        set(k_foot_up, 1e-3, Known{0, readings_.foot_give_mm}.deviation());
        return task;
    }

    /// The fit of one explanation, from the best place of a coarse search.
    [[nodiscard]] Fit best(FitTask task) const {
        const auto [facing, lean] = searched(task);
        task.unknowns[k_facing].start = task.unknowns[k_facing].known = facing;
        task.unknowns[k_lean].start = lean;
        constexpr double k_once_in = 100;
        return fit_without_strays(task, k_once_in, 3);
    }

    /// The chance that a suspected figure, if it is as good as its ± says, lies so far from what the rest say of it.
    [[nodiscard]] double chance_of(const Suspect& suspect, const Fit& fit, const FitTask& task) const {
        const int row = row_of(suspect);
        VectorXd x = fit.values, ahead(fit.residuals.size()), behind(fit.residuals.size()), slopes(k_unknowns);
        for (int k = 0; k < k_unknowns; ++k) {
            const double step = task.unknowns[std::size_t(k)].step;
            x[k] = fit.values[k] + step;
            const bool can_ahead = residuals(x, ahead);
            x[k] = fit.values[k] - step;
            const bool can_behind = residuals(x, behind);
            x[k] = fit.values[k];
            slopes[k] = can_ahead && can_behind ? (ahead[row] - behind[row]) / (2 * step) : 0.0;
        }
        const Spread spread = fit.spread(slopes, 1.0);
        const double out = fit.residuals[row] / k_doubted / spread.deviation;
        return fisher_above(out * out, 1.0, std::max(0.5, spread.freedom));
    }

    [[nodiscard]] WallAnswer answer(const Fit& fit, const FitTask& task, const Suspect& suspect) const {
        WallAnswer answer;
        answer.fault = suspect.fault;
        answer.grazing = suspect.grazing;
        if (const int row = row_of(suspect); row >= 0)
            answer.figure_off_deg = fit.residuals[row] / k_doubted * deviation_of(suspect);
        const auto found = [&](Index i) {
            return Found{fit.values[i], fit.spread(i).range_95, fit.untold(i, task) < 0.5};
        };
        answer.facing_deg = found(k_facing);
        answer.facing_deg.value = Angle::degrees(answer.facing_deg.value).positive_turn().in_degrees();
        answer.lean_deg = found(k_lean);
        answer.level_deg = found(k_turn);
        answer.clock_s = found(k_clock);
        answer.scatter_mm = fit.checked() ? fit.noise * k_marking_mm : 0.0;
        for (std::size_t i = 0; i < readings_.shadows.size(); ++i) {
            const double deviation_mm = nominal_mm(readings_.shadows[i]);
            answer.off_right_mm.push_back(fit.residuals[int(2 * i)] * deviation_mm);
            answer.off_down_mm.push_back(-fit.residuals[int(2 * i) + 1] * deviation_mm);
        }
        answer.stray = fit.left_out;
        return answer;
    }

    /// The time of the last reading's day at which one more shadow would narrow the facing most.
    [[nodiscard]] std::optional<NextReading> next(const Fit& fit, const FitTask& task) const {
        const Instant last = suns_.back().at;
        std::vector<Instant> times;
        for (int quarter = -48; quarter < 48; ++quarter)
            times.push_back(std::chrono::round<std::chrono::minutes>(last) + quarter * std::chrono::minutes{15});
        const std::vector<RealSun> suns = real_suns(readings_.site, times);
        const Eigen::MatrixXd covariance = fit.from_readings + fit.from_known;
        const double range_now = fit.spread(k_facing).range_95;
        std::optional<NextReading> best;
        for (std::size_t i = 0; i < times.size(); ++i) {
            if (!measurable(suns[i], fit.values))
                continue;
            Eigen::MatrixXd slopes(2, k_unknowns);
            VectorXd x = fit.values;
            for (int k = 0; k < k_unknowns; ++k) {
                const double step = task.unknowns[std::size_t(k)].step;
                x[k] = fit.values[k] + step;
                const PlatePoint ahead = shadow_at(suns[i], x);
                x[k] = fit.values[k] - step;
                const PlatePoint behind = shadow_at(suns[i], x);
                x[k] = fit.values[k];
                slopes(0, k) = (ahead.u_mm - behind.u_mm) / (2 * step);
                slopes(1, k) = (ahead.v_mm - behind.v_mm) / (2 * step);
            }
            const PlatePoint at = shadow_at(suns[i], x);
            const double deviation_mm = fit.noise * nominal_mm({times[i], at.u_mm, -at.v_mm});
            const Eigen::Matrix2d spread =
                slopes * covariance * slopes.transpose() + deviation_mm * deviation_mm * Eigen::Matrix2d::Identity();
            const Eigen::Vector2d along = slopes * covariance.col(k_facing);
            const double left = covariance(k_facing, k_facing) - along.dot(spread.inverse() * along);
            const double range = range_now * std::sqrt(std::max(0.0, left / covariance(k_facing, k_facing)));
            if (!best || range < best->facing_range_deg)
                best = NextReading{times[i], range};
        }
        return best;
    }

    [[nodiscard]] Angle sun_span() const {
        double least_cosine = 1.0;
        for (std::size_t i = 0; i < readings_.shadows.size(); ++i)
            for (std::size_t k = 0; k < i; ++k)
                least_cosine = std::min(least_cosine, seen_[i].enu.dot(seen_[k].enu));
        return arc_cosine(least_cosine);
    }

  private:
    /// The row of a figure beside the shadows; −1 of other suspects.
    [[nodiscard]] int row_of(const Suspect& suspect) const {
        using Fault = WallAnswer::Fault;
        const int grazing = int(2 * readings_.shadows.size()), bearing = grazing + int(readings_.grazings.size());
        switch (suspect.fault) {
        case Fault::grazing:
            return grazing + int(suspect.grazing);
        case Fault::bearing:
            return bearing;
        case Fault::lean:
            return bearing + (readings_.bearing_deg ? 1 : 0);
        default:
            return -1;
        }
    }

    /// One standard deviation of a figure beside the shadows, in degrees.
    [[nodiscard]] double deviation_of(const Suspect& figure) const {
        if (figure.fault == WallAnswer::Fault::grazing)
            return Known{0, readings_.grazings[figure.grazing].give.in_degrees()}.deviation();
        return (figure.fault == WallAnswer::Fault::lean ? readings_.lean_deg : readings_.bearing_deg)->deviation();
    }

    [[nodiscard]] PlateFrame board_of(const VectorXd& x) const {
        const PlateFrame wall = frame_of({Angle::degrees(x[k_facing]), Angle::degrees(x[k_lean])});
        const double sine = sin(Angle::degrees(x[k_turn])), cosine = cos(Angle::degrees(x[k_turn]));
        return {cosine * wall.u - sine * wall.v, sine * wall.u + cosine * wall.v, wall.n};
    }

    /// A shadow that a maker can mark: not far out, the Sun not low.
    [[nodiscard]] bool measurable(const RealSun& sun, const VectorXd& x) const {
        const SiteDirection seen = sun.seen(latitude_, x[k_clock]);
        constexpr double k_low = 0.14, k_flat = 0.25; // sines
        return seen.enu.z() > k_low && seen.enu.dot(board_of(x).n) > k_flat;
    }

    /// Of a Sun that is measurable.
    [[nodiscard]] PlatePoint shadow_at(const RealSun& sun, const VectorXd& x) const {
        const Plane plane{board_of(x), readings_.peg_mm + x[k_peg]};
        return plane.shadow_of_nodus(sun.seen(latitude_, x[k_clock]), {x[k_foot_right], x[k_foot_up]})
            .value_or(PlatePoint{});
    }

    [[nodiscard]] SiteDirection sun_of(std::size_t i, double clock_s) const {
        return clock_s == 0.0 ? seen_[i] : suns_[i].seen(latitude_, clock_s);
    }

    [[nodiscard]] double nominal_mm(const PegShadow& shadow) const {
        return std::hypot(k_marking_mm,
                          k_blur * std::hypot(readings_.peg_mm, std::hypot(shadow.right_mm, shadow.down_mm)));
    }

    /// Facing and lean (degrees) at which the readings lie nearest, far ones counting for little.
    [[nodiscard]] std::pair<double, double> searched(const FitTask& task) const {
        VectorXd x = VectorXd::Zero(k_unknowns), r(task.readings * task.width + task.known_rows);
        const auto cost = [&](double facing, double lean) {
            x[k_facing] = facing;
            x[k_lean] = lean;
            if (!residuals(x, r))
                return 1e300;
            double sum = 0;
            constexpr double k_soft = 20; // nominal deviations: the search is that coarse
            for (int i = 0; i < r.size(); ++i)
                sum += std::log1p(r[i] * r[i] / (k_soft * k_soft));
            // Of equals the more upright.
            return sum + 1e-4 * std::abs(lean);
        };
        double facing = 0, lean = 0, least = 1e300;
        const auto look = [&](double f, double l) {
            if (const double here = cost(f, l); here < least) {
                least = here;
                facing = f;
                lean = l;
            }
        };
        for (int f = 0; f < 360; f += 4)
            for (int l = -80; l <= 84; l += 4)
                look(f, l);
        for (double step = 2; step > 0.1; step /= 2) {
            const double f = facing, l = lean;
            for (int i = -2; i <= 2; ++i)
                for (int k = -2; k <= 2; ++k)
                    look(f + i * step, l + k * step);
        }
        return {facing, lean};
    }

    const WallReadings& readings_;
    LatitudeSines latitude_;
    std::vector<RealSun> suns_;
    std::vector<SiteDirection> seen_; ///< by a right clock
};

WallReadings swapped(WallReadings readings, WallSurvey::Swap swap) {
    for (PegShadow& shadow : readings.shadows)
        if (swap == WallSurvey::Swap::left_for_right)
            shadow.right_mm = -shadow.right_mm;
        else
            shadow.down_mm = -shadow.down_mm;
    return readings;
}

/// One explanation and its fit.
struct Way {
    Suspect suspect;
    FitTask task;
    Fit fit;

    /// The same fit with other readings left out.
    void leave_out(const std::vector<bool>& strays) {
        if (fit.left_out == strays)
            return;
        FitTask again = task;
        again.left_out = strays;
        for (int i = 0; i < k_unknowns; ++i)
            again.unknowns[std::size_t(i)].start = fit.values[i];
        again.unknowns[k_facing].known = fit.values[k_facing];
        fit = dialwright::fit(again);
    }
};

/// As measured first; then without one of the figures beside the shadows; then, of shadows enough, with the clock or the
/// board free. The same readings count in all, so that the ways compare. Empty where nothing settles.
std::vector<Way> ways_of(const Survey& survey, std::size_t shadows) {
    using Fault = WallAnswer::Fault;
    std::vector<Way> ways;
    std::vector<Suspect> whole{{}};
    for (const Suspect& figure : survey.figures())
        whole.push_back(figure);
    for (const Suspect& suspect : whole) {
        FitTask task = survey.task(suspect);
        if (Fit made = survey.best(task); made.settled)
            ways.push_back({suspect, std::move(task), std::move(made)});
        else if (suspect.fault == Fault::none)
            return ways;
    }
    // A wrong figure may have cast suspicion on right shadows: as few as any way needs are left out.
    std::vector<bool> strays = ways.front().fit.left_out;
    const auto count = [](const std::vector<bool>& flags) { return std::count(flags.begin(), flags.end(), true); };
    for (const Way& way : ways)
        if (count(way.fit.left_out) < count(strays))
            strays = way.fit.left_out;
    for (Way& way : ways)
        way.leave_out(strays);
    for (const Fault fault : {Fault::clock, Fault::level}) {
        if (shadows < 3)
            break;
        const Fit& first = ways.front().fit;
        FitTask other = survey.task({fault});
        other.left_out = strays;
        for (int i = 0; i < k_unknowns; ++i)
            other.unknowns[std::size_t(i)].start = first.values[i];
        other.unknowns[k_facing].known = first.values[k_facing];
        if (Fit made = fit(other); made.settled)
            ways.push_back({{fault}, std::move(other), std::move(made)});
    }
    return ways;
}

/// Of readings that fit no wall: whether they would with a sign changed.
WallSurvey::Swap swap_that_fits(const WallReadings& readings, double noise) {
    constexpr double k_far_better = 5;
    for (const WallSurvey::Swap swap : {WallSurvey::Swap::left_for_right, WallSurvey::Swap::up_for_down}) {
        const WallReadings other = swapped(readings, swap);
        const Survey again{other};
        const Fit made = again.best(again.task({}));
        if (made.settled && made.noise < noise / k_far_better)
            return swap;
    }
    return WallSurvey::Swap::none;
}

} // namespace

WallSurvey survey_wall(const WallReadings& readings) {
    constexpr double k_rare = 0.001, k_tells = 9.0; // −2 log likelihood: e^(9/2), some ninety to one
    constexpr double k_shows = 2.5;                 // ranges: what is so far off passes the two tests nearly always
    constexpr double k_open_deg = 45;               // a facing that is no better known is none
    constexpr double k_scattered = 10;              // nominal deviations: such readings are of no wall
    const Survey survey{readings};
    WallSurvey made;
    made.sun_span = survey.sun_span();
    const std::vector<Way> ways = ways_of(survey, readings.shadows.size());
    if (ways.empty())
        return made;
    const Way& as_said = ways.front();
    made.checked = as_said.fit.checked();
    std::vector<const Way*> good{&as_said};
    for (std::size_t i = 1; i < ways.size(); ++i) {
        const Way& way = ways[i];
        const WallAnswer::Fault fault = way.suspect.fault;
        double chance = 1.0;
        if (fault == WallAnswer::Fault::clock || fault == WallAnswer::Fault::level) {
            const bool clock = fault == WallAnswer::Fault::clock;
            const int unknown = clock ? k_clock : k_turn;
            (clock ? made.clock_told_s : made.level_told_deg) = k_shows * way.fit.spread(unknown).range_95;
            chance = way.fit.chance_of(unknown, as_said.task.unknowns[std::size_t(unknown)].known_to);
        } else if (way.fit.settled && way.fit.spread(k_facing).range_95 < k_open_deg) {
            chance = survey.chance_of(way.suspect, way.fit, way.task);
        }
        if (chance < k_rare && way.fit.misfit < as_said.fit.misfit - k_tells)
            good.push_back(&way);
    }
    std::stable_sort(good.begin(), good.end(),
                     [](const Way* a, const Way* b) { return a->fit.misfit < b->fit.misfit; });
    const Way& best = *good.front();
    for (const Way* way : good)
        if (way->fit.misfit < best.fit.misfit + k_tells)
            made.answers.push_back(survey.answer(way->fit, way->task, way->suspect));
    if (made.checked)
        made.next = survey.next(best.fit, best.task);
    made.too_scattered = made.checked && best.fit.noise > k_scattered;
    if (made.too_scattered)
        made.swap = swap_that_fits(readings, best.fit.noise);
    return made;
}

} // namespace dialwright
