// SPDX-License-Identifier: MIT
//
// Notation: R the turn of the dial against its design, s the Sun, s' = Rᵀ s the Sun in the dial's own frame, n the plate's
// normal, p the style as it stands on the plate and p' as designed (outwards both), a = p·n, b = s'·n.
// The style's shadow runs from the centre along D = b p − a s' (engine/style/style.cpp); what the dial shows is the hour
// of the half-plane through p' that holds −D. Where p = p', that is the hour angle of s'.
#include "engine/survey/dial_adjust.hpp"
#include "engine/fit/chance.hpp"
#include "engine/survey/real_sun.hpp"

#include <Eigen/Dense>

#include <algorithm>
#include <cmath>

namespace dialwright {
namespace {

using Eigen::Matrix3d;
using Eigen::Vector3d;
using Eigen::VectorXd;
using Fault = AdjustAnswer::Fault;
enum Index { k_turn, k_top, k_right, k_style_height, k_style_right, k_clock, k_unknowns };

/// A reading by eye between hour lines: common practice, no source. The fit finds the scatter that there really was.
constexpr double k_reading_min = 2.0;
/// How far from its design a dial may be: what is not measured is not thought to be beyond this (one deviation).
constexpr double k_any_turn_deg = 15, k_any_tilt_deg = 5, k_any_style_deg = 3;
/// What level, plumb line and gauge leave.
constexpr double k_level_deg = 0.1, k_gauge_deg = 0.1;
/// With a style nearer to its plate than this, the centre is too far off for the style's own errors to be told.
constexpr Angle k_low_style = Angle::degrees(5);

Vector3d turned(const Vector3d& vector, const Vector3d& axis, double degrees) {
    return Eigen::AngleAxisd{Angle::degrees(degrees).in_radians(), axis} * vector;
}

Matrix3d turn_of(const PlateFrame& frame, const Misfixing& misfixing) {
    const Vector3d axis = Angle::degrees(1).in_radians() *
                          (misfixing.turn_deg * frame.n + misfixing.top_deg * frame.u - misfixing.right_deg * frame.v);
    const double size = axis.norm();
    if (size < 1e-15)
        return Matrix3d::Identity();
    return Eigen::AngleAxisd{size, axis / size}.toRotationMatrix();
}

bool counts_from_noon(HourTime time) {
    return time == HourTime::sun || time == HourTime::zone || time == HourTime::clock;
}

/// The plate and its style, for many Suns.
struct Plate {
    PlateFrame frame;
    Style style;

    explicit Plate(const DialPlan& plan)
        : frame{frame_of(plan.attitude)}, style{style_of(frame, plan.nodus_height_mm, plan.site.latitude)} {}

    [[nodiscard]] bool style_told(const DialPlan& plan) const {
        const bool straight = plan.hours.time == HourTime::sun || plan.hours.time == HourTime::zone;
        return straight && plan.hours.extent == HourExtent::style && style.height > k_low_style;
    }
};

std::optional<double> reading(const DialPlan& plan, const MeanYear& year, const Plate& plate,
                              const Misfixing& misfixing, const SiteDirection& sun, double day) {
    const PlateFrame& frame = plate.frame;
    Vector3d seen = turn_of(frame, misfixing).transpose() * sun.enu;
    if ((misfixing.style_height_deg != 0.0 || misfixing.style_right_deg != 0.0) && plate.style_told(plan)) {
        const Vector3d straight = plate.style.towards_nodus;
        const Vector3d right =
            frame.n.dot(straight) > 0.999999 ? frame.u : Vector3d(straight.cross(frame.n).normalized());
        Vector3d style = turned(straight, right, misfixing.style_height_deg);
        style = turned(style, style.cross(right), misfixing.style_right_deg);
        const Vector3d along = frame.n.dot(seen) * style - frame.n.dot(style) * seen;
        seen = -along.normalized();
    }
    return reading_of(plan, plan.hours.time, year, to_sky({seen}, plan.site.latitude), day);
}

class Adjuster {
  public:
    Adjuster(const DialReadings& readings, const MeanYear& year)
        : readings_{readings}, year_{year}, plate_{readings.plan}, latitude_{readings.plan.site.latitude} {
        std::vector<Instant> instants;
        for (const DialReading& one : readings.readings)
            instants.push_back(one.at);
        suns_ = real_suns(readings.plan.site, instants);
    }

    [[nodiscard]] bool style_told() const { return plate_.style_told(readings_.plan); }

    /// Read less computed, minutes. 1000 where the dial would show nothing.
    [[nodiscard]] double off_min(std::size_t i, const Misfixing& misfixing, double clock_s) const {
        const RealSun& sun = suns_[i];
        const auto shows =
            reading(readings_.plan, year_, plate_, misfixing, sun.seen(latitude_, clock_s), year_.day_of(sun.at));
        if (!shows)
            return 1000;
        const double round_h = counts_from_noon(readings_.plan.hours.time) ? 12.0 : 24.0;
        return 60 * std::remainder(readings_.readings[i].reads_h - *shows, round_h);
    }

    [[nodiscard]] FitTask task(Fault fault) const {
        FitTask task;
        task.readings = int(readings_.readings.size());
        const std::optional<Known>* const known[] = {&readings_.turn, &readings_.top, &readings_.right,
                                                     &readings_.style_height, &readings_.style_right};
        task.known_rows =
            int(std::count_if(std::begin(known), std::end(known), [](const auto* k) { return k->has_value(); }));
        task.residuals = [this, known](const VectorXd& x, VectorXd& r) {
            int row = 0;
            for (std::size_t i = 0; i < suns_.size(); ++i)
                r[row++] = off_min(i, misfixing_of(x), x[k_clock]) / k_reading_min;
            for (int k = 0; k < k_clock; ++k)
                if (const auto& one = *known[k])
                    r[row++] = (one->value - x[k]) / one->deviation();
            return x.head(k_clock).cwiseAbs().maxCoeff() < 80;
        };
        task.unknowns.resize(k_unknowns);
        const auto set = [&](Index i, double step, double known_to) {
            task.unknowns[i].step = step;
            task.unknowns[i].known_to = known_to;
        };
        const bool tilts = fault == Fault::fixing || fault == Fault::both;
        const bool style = (fault == Fault::style || fault == Fault::both) && style_told();
        const bool level_plate = upright_axis_is_normal();
        // A level plate turns freely in its plane; one on a wall swings freely about the plumb line.
        set(k_turn, 1e-4, tilts || level_plate ? k_any_turn_deg : k_level_deg);
        set(k_top, 1e-4, tilts ? k_any_tilt_deg : k_level_deg);
        set(k_right, 1e-4, tilts || !level_plate ? k_any_tilt_deg : k_level_deg);
        set(k_style_height, 1e-4, style ? k_any_style_deg : k_gauge_deg);
        set(k_style_right, 1e-4, style ? k_any_style_deg : k_gauge_deg);
        set(k_clock, 0.05, Known{0, readings_.clock_give_s}.deviation());
        task.least_noise = 0.125; // a quarter of a minute
        return task;
    }

    [[nodiscard]] AdjustAnswer answer(const Fit& fit, const FitTask& task, Fault fault) const {
        constexpr double k_told = 0.15; // of the variance beforehand: else what was thought beforehand still shows
        AdjustAnswer answer;
        answer.fault = fault;
        Found* const found[] = {&answer.turn,         &answer.top,         &answer.right,
                                &answer.style_height, &answer.style_right, &answer.clock_s};
        for (int i = 0; i < k_unknowns; ++i)
            *found[i] = {fit.values[i], fit.spread(i).range_95, fit.untold(i, task) < k_told};
        if (!style_told())
            answer.style_height.told = answer.style_right.told = false;
        const Vector3d off = fit.values.head(k_style_height);
        const Matrix3d spread = (fit.from_readings + fit.from_known).topLeftCorner<3, 3>();
        answer.right_chance = fisher_above(off.dot(spread.inverse() * off) / 3, 3, std::max(0.5, fit.freedom));
        answer.scatter_min = fit.checked() ? fit.noise * k_reading_min : 0.0;
        for (int i = 0; i < task.readings; ++i)
            answer.off_min.push_back(fit.residuals[i] * k_reading_min);
        answer.stray = fit.left_out;
        return answer;
    }

    static Misfixing misfixing_of(const VectorXd& x) {
        return {x[k_turn], x[k_top], x[k_right], x[k_style_height], x[k_style_right]};
    }

  private:
    [[nodiscard]] bool upright_axis_is_normal() const {
        return abs(readings_.plan.attitude.normal_altitude) > Angle::degrees(45);
    }

    const DialReadings& readings_;
    const MeanYear& year_;
    Plate plate_;
    LatitudeSines latitude_;
    std::vector<RealSun> suns_;
};

/// One explanation and its fit.
struct Way {
    Fault fault;
    FitTask task;
    Fit fit;
};

/// A dial fixed wrongly first, a level one last. Empty where that does not settle.
std::vector<Way> ways_of(const Adjuster& adjuster) {
    constexpr double k_once_in = 100;
    std::vector<Way> ways;
    for (const Fault fault : {Fault::fixing, Fault::style, Fault::both, Fault::level}) {
        if ((fault == Fault::style || fault == Fault::both) && !adjuster.style_told())
            continue;
        FitTask task = adjuster.task(fault);
        if (!ways.empty())
            task.left_out = ways.front().fit.left_out; // the same readings count, so that the ways compare
        Fit found = ways.empty() ? fit_without_strays(task, k_once_in, 3) : fit(task);
        if (found.settled)
            ways.push_back({fault, std::move(task), std::move(found)});
        else if (fault == Fault::fixing)
            break;
    }
    return ways;
}

bool fits_better(const Way* a, const Way* b) {
    return a->fit.misfit < b->fit.misfit;
}

} // namespace

std::optional<double> reading_of_misfixed(const DialPlan& plan, const MeanYear& year, const Misfixing& misfixing,
                                          const SiteDirection& sun, double day_of_year) {
    return reading(plan, year, Plate{plan}, misfixing, sun, day_of_year);
}

DialAdjustment adjust_dial(const DialReadings& readings, const MeanYear& year) {
    constexpr double k_rare = 0.001, k_tells = 9.0, k_scattered = 10, k_as_good = 6.0, k_shows = 2.5;
    const Adjuster adjuster{readings, year};
    DialAdjustment made;
    made.style_asked = adjuster.style_told();
    for (std::size_t i = 0; i < readings.readings.size(); ++i)
        made.as_designed_min.push_back(adjuster.off_min(i, {}, 0));
    const std::vector<Way> ways = ways_of(adjuster);
    if (ways.empty())
        return made;
    made.checked = ways.front().fit.checked();
    made.too_scattered = made.checked && ways.front().fit.noise > k_scattered;
    std::vector<const Way*> good{&ways.front()};
    for (const Way& way : ways) {
        if (way.fault == Fault::both)
            made.style_told_deg = k_shows * way.fit.spread(k_style_height).range_95;
        if (way.fault != Fault::style && way.fault != Fault::both)
            continue;
        const bool off = std::min(way.fit.chance_of(k_style_height, k_gauge_deg),
                                  way.fit.chance_of(k_style_right, k_gauge_deg)) < k_rare;
        // Both at once only where neither alone will do.
        const double best = (*std::min_element(good.begin(), good.end(), fits_better))->fit.misfit;
        if (off && way.fit.misfit < best + (way.fault == Fault::style ? k_tells : -k_tells))
            good.push_back(&way);
    }
    std::stable_sort(good.begin(), good.end(), fits_better);
    for (const Way* way : good)
        if (way->fit.misfit < good.front()->fit.misfit + k_tells)
            made.answers.push_back(adjuster.answer(way->fit, way->task, way->fault));
    const AdjustAnswer& first = made.answers.front();
    const bool told = first.turn.told && first.top.told && first.right.told;
    const Way& level = ways.back();
    if (level.fault == Fault::level && (!told || level.fit.misfit < good.front()->fit.misfit + k_as_good))
        made.if_level = adjuster.answer(level.fit, level.task, Fault::level);
    return made;
}

Remounting remounted(const DialPlan& plan, const Site& there, Angle zone_meridian) {
    // From the site's axes to those of the dial's own time: hour angle 0 at the dial's noon, the pole up.
    const auto to_dial_time = [&](const Site& site, Angle meridian) {
        const double sine = sin(site.latitude), cosine = cos(site.latitude);
        Matrix3d axes; // rows: towards the equator's noon point, west, the pole
        axes << 0, -sine, cosine, -1, 0, 0, 0, cosine, sine;
        const bool own = plan.hours.time != HourTime::zone && plan.hours.time != HourTime::clock;
        const double ahead = own ? 0.0 : (site.longitude - meridian).signed_turn().in_radians();
        // A Sun at the site's hour angle H stands at H − ahead on the dial's own time.
        const Matrix3d turn = Eigen::AngleAxisd{-ahead, Vector3d::UnitZ()}.toRotationMatrix();
        return Matrix3d(turn * axes);
    };
    const Matrix3d across =
        to_dial_time(there, zone_meridian).transpose() * to_dial_time(plan.site, plan.zone_meridian);
    const PlateFrame frame = frame_of(plan.attitude);
    const Vector3d n = across * frame.n, v = across * frame.v;
    Remounting made;
    made.attitude = {SiteDirection{n}.azimuth(), SiteDirection{n}.altitude()};
    const double cosine = std::clamp(frame.n.dot(n), -1.0, 1.0);
    made.wedge = arc_cosine(cosine);
    Vector3d axis = frame.n.cross(n);
    Matrix3d tilt = Matrix3d::Identity();
    if (axis.norm() > 1e-12) {
        axis.normalize();
        tilt = Eigen::AngleAxisd{made.wedge.in_radians(), axis}.toRotationMatrix();
        // The normal leans away from the edge that comes out.
        const Vector3d lean = n - cosine * frame.n;
        made.wedge_towards = arc_tangent(-lean.dot(frame.u), -lean.dot(frame.v)).positive_turn();
    }
    const Vector3d up = tilt.transpose() * v;
    made.turn = arc_tangent(-up.dot(frame.u), up.dot(frame.v));
    return made;
}

} // namespace dialwright
