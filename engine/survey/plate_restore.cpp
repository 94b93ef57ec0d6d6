// SPDX-License-Identifier: MIT
//
// Notation: x along the substyle from the origin's foot on it, y to its right (clockwise); t the substyle's direction, σ the
// sine of the style's height, below zero where the hours run anticlockwise; h = H − H0 from the substyle's hour; k the style's
// distance from the plate over the origin, times the cosine of its height (so that k and σ have one sign).
// The half-plane through the style that holds a Sun of the hour h meets the plate in
//     y cos h = (k + x σ) sin h,
// which stays finite where the style is parallel to the plate (σ = 0). From the centre (x = −k/σ) it runs along
// (cos h, σ sin h): tan(direction − t) = σ tan h, the hour lines of a level dial at the latitude asin σ.
// Unknowns: t, height, H0 (degrees), then y of the style's plane and k (mm) where points were measured.
#include "engine/survey/plate_restore.hpp"

#include <Eigen/Dense>

#include <algorithm>
#include <cmath>
#include <tuple>

namespace dialwright {
namespace {

using Eigen::VectorXd;
enum Index { k_substyle, k_height, k_hour, k_beside, k_over, k_unknowns };

double signed_half_turn(double degrees) {
    return std::remainder(degrees, 180.0);
}

/// A line with the hour that it counts for.
struct Counted {
    std::size_t line = 0;
    double hour_deg = 0.0; ///< from noon, by its numeral
};

class Plate {
  public:
    Plate(const PlateReadings& readings, std::vector<Counted> counted)
        : readings_{readings}, counted_{std::move(counted)} {
        for (const Counted& one : counted_)
            for (const PlatePoint& p : line(one).points) {
                with_points_ = true;
                size_mm_ = std::max(size_mm_, std::hypot(p.u_mm, p.v_mm));
            }
    }

    [[nodiscard]] bool with_points() const { return with_points_; }
    [[nodiscard]] bool free_origin() const { return with_points_ && !readings_.origin_is_centre; }
    [[nodiscard]] int rows() const {
        int rows = 0;
        for (const Counted& one : counted_)
            rows += width(one);
        return rows;
    }

    [[nodiscard]] bool residuals(const VectorXd& x, VectorXd& r) const {
        if (std::abs(x[k_height]) > 89.9)
            return false;
        int row = 0;
        for (const Counted& one : counted_)
            for (const double off : offs(x, one))
                r[row++] = off;
        const double height = std::abs(x[k_height]);
        if (const auto& known = readings_.style_height_deg)
            r[row++] = (known->value - height) / known->deviation();
        if (const auto& known = readings_.substyle_deg)
            r[row++] = signed_half_turn(known->value - x[k_substyle]) / known->deviation();
        return true;
    }

    [[nodiscard]] FitTask task() const {
        FitTask task;
        task.readings = int(counted_.size());
        for (const Counted& one : counted_)
            task.widths.push_back(width(one));
        task.known_rows = (readings_.style_height_deg ? 1 : 0) + (readings_.substyle_deg ? 1 : 0);
        task.residuals = [this](const VectorXd& x, VectorXd& r) { return residuals(x, r); };
        task.unknowns.resize(k_unknowns);
        const auto set = [&](Index i, double step, double known_to) {
            task.unknowns[i].step = step;
            task.unknowns[i].known_to = known_to;
        };
        constexpr double k_any_deg = 1000, k_exact = 1e-6;
        set(k_substyle, 1e-4, k_any_deg);
        set(k_height, 1e-4, k_any_deg);
        set(k_hour, 1e-4, k_any_deg);
        const double about_mm = !with_points_                ? k_exact
                                : readings_.origin_is_centre ? Known{0, readings_.point_give_mm}.deviation()
                                                             : 100 * size_mm_ + 1;
        set(k_beside, 1e-4, about_mm);
        set(k_over, 1e-4, about_mm);
        task.least_noise = 0.05;
        return task;
    }

    /// The places from which the way down may lead to the answer, the best first.
    [[nodiscard]] std::vector<VectorXd> starts(const FitTask& task) const {
        struct Start {
            double cost;
            VectorXd x;
        };
        std::vector<Start> found;
        VectorXd r(rows() + task.known_rows);
        constexpr double k_heights[] = {1, 6, 14, 22, 30, 38, 46, 54, 62, 70, 80};
        for (int t = 0; t < 180; t += 8)
            for (const double height : k_heights)
                for (const double sense : {1.0, -1.0})
                    for (int hour = -88; hour < 92; hour += 8) {
                        VectorXd x = VectorXd::Zero(k_unknowns);
                        x[k_substyle] = t;
                        x[k_height] = sense * height;
                        x[k_hour] = hour;
                        if (free_origin())
                            place_origin(x);
                        if (!residuals(x, r))
                            continue;
                        double cost = 0;
                        for (int i = 0; i < r.size(); ++i)
                            cost += std::log1p(r[i] * r[i] / 100);
                        found.push_back({cost, x});
                    }
        std::sort(found.begin(), found.end(), [](const Start& a, const Start& b) { return a.cost < b.cost; });
        std::vector<VectorXd> starts;
        constexpr std::size_t k_starts = 6;
        for (const Start& one : found) {
            const bool near = std::any_of(starts.begin(), starts.end(), [&](const VectorXd& x) {
                return std::abs(signed_half_turn(x[k_substyle] - one.x[k_substyle])) < 12 &&
                       std::abs(x[k_height] - one.x[k_height]) < 20 &&
                       std::abs(signed_half_turn(x[k_hour] - one.x[k_hour])) < 12;
            });
            if (!near)
                starts.push_back(one.x);
            if (starts.size() == k_starts)
                break;
        }
        return starts;
    }

    /// As it is less as it should be, degrees clockwise; and at its outermost point, mm to the right of the way out.
    [[nodiscard]] std::pair<double, double> off(const VectorXd& x, const Counted& one) const {
        const auto [cosine, sine] = way(x, one.hour_deg);
        const double should = x[k_substyle] + Angle::radians(std::atan2(sine, cosine)).in_degrees();
        const PlateLine& line = this->line(one);
        if (line.direction_deg)
            return {signed_half_turn(*line.direction_deg - should), 0.0};
        const PlatePoint outer = line.points.back();
        const double out_mm = distance_mm(x, one.hour_deg, outer);
        if (line.points.size() == 1) {
            const double reach = std::max(1.0, std::hypot(outer.u_mm, outer.v_mm));
            return {Angle::radians(out_mm / reach).in_degrees(), out_mm};
        }
        return {signed_half_turn(*direction_deg(line) - should), out_mm};
    }

    /// Towards the outer end as measured: clockwise from up. Nothing for a line without length.
    [[nodiscard]] std::optional<double> direction_deg(const PlateLine& line) const {
        if (line.direction_deg)
            return line.direction_deg;
        const PlatePoint to = line.points.back();
        const PlatePoint from = line.points.size() > 1 ? line.points.front() : PlatePoint{};
        if (std::hypot(to.u_mm - from.u_mm, to.v_mm - from.v_mm) < 1e-9)
            return std::nullopt;
        return arc_tangent(to.u_mm - from.u_mm, to.v_mm - from.v_mm).in_degrees();
    }

    /// The hour (degrees) whose line lies nearest to a line, in steps.
    [[nodiscard]] double nearest_hour(const VectorXd& x, std::size_t index, double step_deg) const {
        double best = 0, least = 1e300;
        for (double hour = 0; hour < 180; hour += step_deg) {
            double sum = 0;
            for (const double off : offs(x, {index, hour}))
                sum += off * off;
            if (sum < least) {
                least = sum;
                best = hour;
            }
        }
        return best;
    }

  private:
    [[nodiscard]] const PlateLine& line(const Counted& one) const { return readings_.lines[one.line]; }
    [[nodiscard]] int width(const Counted& one) const {
        return line(one).direction_deg ? 1 : int(line(one).points.size());
    }

    /// (cos h, σ sin h)
    [[nodiscard]] static std::pair<double, double> way(const VectorXd& x, double hour_deg) {
        const Angle h = Angle::degrees(hour_deg - x[k_hour]);
        return {cos(h), sin(Angle::degrees(x[k_height])) * sin(h)};
    }

    /// Of a point from its line, to the right of the way out.
    [[nodiscard]] double distance_mm(const VectorXd& x, double hour_deg, const PlatePoint& p) const {
        const double ts = sin(Angle::degrees(x[k_substyle])), tc = cos(Angle::degrees(x[k_substyle]));
        const Angle h = Angle::degrees(hour_deg - x[k_hour]);
        const double along = p.u_mm * ts + p.v_mm * tc, side = sin(h) * cos(h) * x[k_height];
        const double gap = side < 0 ? -readings_.gap_mm : readings_.gap_mm;
        const double across = p.u_mm * tc - p.v_mm * ts - x[k_beside] - gap / 2;
        const auto [cosine, sine] = way(x, hour_deg);
        return (across * cosine - along * sine - x[k_over] * sin(h)) / std::max(1e-9, std::hypot(cosine, sine));
    }

    [[nodiscard]] std::vector<double> offs(const VectorXd& x, const Counted& one) const {
        const PlateLine& line = this->line(one);
        if (line.direction_deg) {
            const auto [cosine, sine] = way(x, one.hour_deg);
            const double should = x[k_substyle] + Angle::radians(std::atan2(sine, cosine)).in_degrees();
            return {signed_half_turn(*line.direction_deg - should) /
                    Known{0, readings_.direction_give_deg}.deviation()};
        }
        std::vector<double> offs;
        for (const PlatePoint& p : line.points)
            offs.push_back(distance_mm(x, one.hour_deg, p) / Known{0, readings_.point_give_mm}.deviation());
        return offs;
    }

    /// The style's plane and distance that suit the rest of x best: they come in straight.
    void place_origin(VectorXd& x) const {
        Eigen::Matrix2d normal = 1e-9 * Eigen::Matrix2d::Identity();
        Eigen::Vector2d right = Eigen::Vector2d::Zero();
        x[k_beside] = x[k_over] = 0;
        for (const Counted& one : counted_) {
            const auto [cosine, sine] = way(x, one.hour_deg);
            const double size = std::max(1e-9, std::hypot(cosine, sine));
            const Eigen::Vector2d slope{cosine / size, sin(Angle::degrees(one.hour_deg - x[k_hour])) / size};
            for (const PlatePoint& p : line(one).points) {
                normal += slope * slope.transpose();
                right += slope * distance_mm(x, one.hour_deg, p);
            }
        }
        const Eigen::Vector2d best = normal.inverse() * right;
        x[k_beside] = best[0];
        x[k_over] = best[1];
    }

    const PlateReadings& readings_;
    std::vector<Counted> counted_;
    bool with_points_ = false;
    double size_mm_ = 0.0;
};

/// The lines that count, with their hours: those that can be read; where none can, all of them in their order.
std::vector<Counted> counted_lines(const PlateReadings& readings) {
    std::vector<Counted> counted;
    for (std::size_t i = 0; i < readings.lines.size(); ++i)
        if (const auto& hour = readings.lines[i].hour_h)
            counted.push_back({i, 15 * (*hour - 12)});
    if (counted.empty())
        for (std::size_t i = 0; i < readings.lines.size(); ++i)
            counted.push_back({i, 15 * readings.hours_apart * double(i)});
    return counted;
}

/// The sign of (k + x σ) over most of the plate: on which side of the style's foot its lines lie, and with σ the sense;
/// and whether that is plain.
std::pair<double, bool> side_of(const Plate& plate, const PlateReadings& readings, const VectorXd& x) {
    const double sine = sin(Angle::degrees(x[k_height]));
    if (const auto& known = readings.substyle_deg)
        return {cos(Angle::degrees(known->value - x[k_substyle])) * sine < 0 ? -1.0 : 1.0, true};
    double side = 0, count = 0;
    for (const PlateLine& line : readings.lines) {
        if (!line.direction_deg && !readings.origin_is_centre) {
            for (const PlatePoint& p : line.points) {
                const double along =
                    p.u_mm * sin(Angle::degrees(x[k_substyle])) + p.v_mm * cos(Angle::degrees(x[k_substyle]));
                side += x[k_over] + along * sine > 0 ? 1 : -1;
                count += 1;
            }
        } else if (const auto direction = plate.direction_deg(line)) {
            side += cos(Angle::degrees(*direction - x[k_substyle])) * (sine > 0 ? 1 : -1);
            count += 1;
        }
    }
    constexpr double k_plain = 0.5; // most hours lie within six of the substyle's
    return {side < 0 ? -1.0 : 1.0, std::abs(side) > k_plain * count};
}

/// From every start, the answer that leaves the fewest lines out; of equals the one that fits best.
std::optional<Fit> best_fit(const Plate& plate) {
    constexpr double k_once_in = 25; // of few lines even a bad one hardly stands out more
    FitTask task = plate.task();
    const auto strays = [](const Fit& fit) { return std::count(fit.left_out.begin(), fit.left_out.end(), true); };
    std::optional<Fit> best;
    for (const VectorXd& start : plate.starts(task)) {
        for (int i = 0; i < k_unknowns; ++i)
            task.unknowns[std::size_t(i)].start = start[i];
        Fit made = fit_without_strays(task, k_once_in, 4);
        if (made.settled &&
            (!best || strays(made) < strays(*best) || (strays(made) == strays(*best) && made.misfit < best->misfit)))
            best = std::move(made);
    }
    return best;
}

/// What is said of each line.
void tell_lines(PlateFigure& figure, const Plate& plate, const std::vector<Counted>& counted,
                const PlateReadings& readings, const Fit& fit) {
    const std::size_t count = readings.lines.size();
    figure.stray.assign(count, false);
    figure.off_deg.assign(count, 0.0);
    figure.off_mm.assign(count, 0.0);
    figure.hour_h.assign(count, std::nullopt);
    for (std::size_t i = 0; i < counted.size(); ++i) {
        const Counted& one = counted[i];
        figure.counted_deg.push_back(one.hour_deg);
        figure.stray[one.line] = fit.left_out[i];
        std::tie(figure.off_deg[one.line], figure.off_mm[one.line]) = plate.off(fit.values, one);
        figure.hour_h[one.line] = readings.lines[one.line].hour_h;
    }
    if (counted.size() == count)
        return;
    for (std::size_t i = 0; i < count; ++i)
        if (!readings.lines[i].hour_h) {
            constexpr double k_quarter_deg = 3.75;
            const double hour_deg = plate.nearest_hour(fit.values, i, k_quarter_deg);
            figure.hour_h[i] = hour_deg == 0 ? 12.0 : hour_deg / 15;
            std::tie(figure.off_deg[i], figure.off_mm[i]) = plate.off(fit.values, {i, hour_deg});
        }
}

} // namespace

std::optional<PlateFigure> figure_of(const PlateReadings& readings) {
    const std::vector<Counted> counted = counted_lines(readings);
    const Plate plate{readings, counted};
    std::optional<Fit> best = best_fit(plate);
    if (!best)
        return std::nullopt;
    PlateFigure figure;
    tell_lines(figure, plate, counted, readings, *best);
    const VectorXd& x = best->values;
    const double height = x[k_height];
    std::tie(figure.side, figure.side_told) = side_of(plate, readings, x);
    figure.centre_told = std::abs(height) > best->spread(k_height).range_95;
    figure.clockwise = figure.centre_told ? height > 0 : figure.side > 0;
    figure.style_height_deg = {std::abs(height), best->spread(k_height).range_95, true};
    const double substyle = x[k_substyle] + (figure.side * height < 0 ? 180 : 0);
    figure.substyle_deg = {Angle::degrees(substyle).positive_turn().in_degrees(), best->spread(k_substyle).range_95,
                           readings.up_known};
    const double hour_h = x[k_hour] / 15;
    figure.substyle_hour_h = {hour_h - 12 * std::floor(hour_h / 12), best->spread(k_hour).range_95 / 15, true};
    if (plate.free_origin() && figure.centre_told) {
        const double along = -x[k_over] / sin(Angle::degrees(height));
        const double ts = sin(Angle::degrees(x[k_substyle])), tc = cos(Angle::degrees(x[k_substyle]));
        figure.centre = PlatePoint{along * ts + x[k_beside] * tc, along * tc - x[k_beside] * ts};
    }
    figure.scatter = best->checked() ? best->noise : 0.0;
    figure.fit = std::move(*best);
    return figure;
}

} // namespace dialwright
