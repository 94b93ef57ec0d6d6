// SPDX-License-Identifier: MIT
//
// Notation: J slopes of the residuals that count, r these residuals (computed towards observed), s the readings' scatter
// in nominal deviations, W = diag(1/s²) on the readings' rows and 1 on the rest, P = diag(1/known_to²).
// Minimised: rᵀ W r + (x − known)ᵀ P (x − known). Covariance C = (Jᵀ W J + P)⁻¹.
#include "engine/fit/least_squares.hpp"
#include "engine/fit/chance.hpp"

#include <Eigen/Dense>

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numeric>

namespace dialwright {
namespace {

using Eigen::MatrixXd;
using Eigen::VectorXd;

class Fitter {
  public:
    explicit Fitter(const FitTask& task) : task_{task}, n_{int(task.unknowns.size())} {
        for (int i = 0; i < task.readings; ++i) {
            first_.push_back(scattered_);
            width_.push_back(task.widths.empty() ? task.width : task.widths[std::size_t(i)]);
            scattered_ += width_.back();
        }
        rows_ = scattered_ + task.known_rows;
        x_.resize(n_);
        known_.resize(n_);
        weight_.resize(n_);
        for (int i = 0; i < n_; ++i) {
            const Unknown& unknown = task.unknowns[std::size_t(i)];
            assert(unknown.known_to > 0);
            x_[i] = unknown.start;
            known_[i] = unknown.known;
            weight_[i] = 1.0 / (unknown.known_to * unknown.known_to);
        }
        counts_ = VectorXd::Ones(rows_);
        for (int i = 0; i < task.readings && !task.left_out.empty(); ++i)
            if (task.left_out[std::size_t(i)])
                counts_.segment(first_[std::size_t(i)], width_[std::size_t(i)]).setZero();
        counted_ = int(std::lround(counts_.head(scattered_).sum()));
    }

    Fit made() {
        // The scatter and the answer depend on each other; a few rounds settle both.
        constexpr int k_rounds = 30;
        bool rest = false;
        for (int round = 0; round < k_rounds; ++round) {
            rest = climb_down();
            const double before = noise_;
            estimate_noise();
            if (std::abs(noise_ - before) < 1e-4 * noise_)
                break;
        }
        return answer(rest);
    }

    /// How far out each reading lies (root mean square of its rows) from a fit in which far ones count for little.
    std::vector<double> sizes_by_a_robust_fit() {
        constexpr int k_rounds = 8;
        std::vector<double> sizes(std::size_t(task_.readings), 0.0);
        for (int round = 0; round < k_rounds; ++round) {
            (void)climb_down();
            for (int i = 0; i < task_.readings; ++i)
                sizes[std::size_t(i)] = rows_of(r_, i).norm() / std::sqrt(width_[std::size_t(i)]);
            const double usual = std::max(task_.least_noise, middle_of(sizes));
            noise_ = usual;
            for (int i = 0; i < task_.readings; ++i) {
                const double out = sizes[std::size_t(i)] / (2 * usual);
                counts_.segment(first_[std::size_t(i)], width_[std::size_t(i)])
                    .setConstant(1.0 / (1.0 + out * out * out * out));
            }
        }
        return sizes;
    }

    static double middle_of(std::vector<double> sizes) {
        const auto middle = sizes.begin() + std::ptrdiff_t(sizes.size() / 2);
        std::nth_element(sizes.begin(), middle, sizes.end());
        return *middle;
    }

  private:
    [[nodiscard]] VectorXd row_weights() const {
        VectorXd weights = counts_;
        weights.head(scattered_) /= noise_ * noise_;
        return weights;
    }

    [[nodiscard]] bool residuals_at(const VectorXd& x, VectorXd& r) const {
        r.resize(rows_);
        return task_.residuals(x, r) && r.allFinite();
    }

    [[nodiscard]] double cost(const VectorXd& x, const VectorXd& r) const {
        return r.cwiseProduct(r).dot(row_weights()) + (x - known_).cwiseAbs2().dot(weight_);
    }

    void find_slopes() {
        slopes_.resize(rows_, n_);
        VectorXd x = x_, ahead, behind;
        for (int i = 0; i < n_; ++i) {
            const double step = task_.unknowns[std::size_t(i)].step;
            x[i] = x_[i] + step;
            const bool can_ahead = residuals_at(x, ahead);
            x[i] = x_[i] - step;
            const bool can_behind = residuals_at(x, behind);
            x[i] = x_[i];
            if (can_ahead && can_behind)
                slopes_.col(i) = (ahead - behind) / (2 * step);
            else
                slopes_.col(i) = can_ahead    ? VectorXd((ahead - r_) / step)
                                 : can_behind ? VectorXd((r_ - behind) / step)
                                              : VectorXd(VectorXd::Zero(rows_));
        }
    }

    /// To the least cost at the present noise. @return true where it came to rest
    bool climb_down() {
        if (!residuals_at(x_, r_))
            return false;
        double here = cost(x_, r_), damping = 1e-3;
        constexpr int k_most_steps = 200;
        for (int step = 0; step < k_most_steps; ++step) {
            find_slopes();
            const VectorXd weights = row_weights();
            const MatrixXd weighted = weights.asDiagonal() * slopes_;
            MatrixXd normal = slopes_.transpose() * weighted;
            normal.diagonal() += weight_;
            const VectorXd down = -(weighted.transpose() * r_ + weight_.cwiseProduct(x_ - known_));
            bool lower = false;
            for (int attempt = 0; attempt < 40 && !lower; ++attempt, damping *= 5) {
                MatrixXd damped = normal;
                damped.diagonal() *= 1.0 + damping;
                const VectorXd move = damped.ldlt().solve(down);
                VectorXd r;
                const VectorXd x = x_ + move;
                if (!move.allFinite() || !residuals_at(x, r))
                    continue;
                const double there = cost(x, r);
                if (there <= here) {
                    const double gained = here - there;
                    lower = true;
                    x_ = x;
                    r_ = r;
                    here = there;
                    damping = std::max(damping / 50, 1e-12);
                    if (gained < 1e-9 * (1.0 + here)) {
                        find_slopes();
                        return true;
                    }
                }
            }
            if (!lower)
                return true; // no lower ground within rounding
        }
        return false;
    }

    [[nodiscard]] VectorXd rows_of(const VectorXd& rows, int reading) const {
        return rows.segment(first_[std::size_t(reading)], width_[std::size_t(reading)]);
    }

    [[nodiscard]] MatrixXd covariance() const {
        MatrixXd normal = slopes_.transpose() * row_weights().asDiagonal() * slopes_;
        normal.diagonal() += weight_;
        return normal.inverse();
    }

    void estimate_noise() {
        if (counted_ == 0 || slopes_.rows() == 0)
            return;
        const MatrixXd counting = counts_.head(scattered_).asDiagonal() * slopes_.topRows(scattered_);
        const double taken = (counting * covariance() * counting.transpose()).trace() / (noise_ * noise_);
        freedom_ = std::max(0.0, counted_ - taken);
        if (freedom_ < 0.5) {
            noise_ = 1.0;
            return;
        }
        sum_ = r_.head(scattered_).cwiseAbs2().dot(counts_.head(scattered_));
        noise_ = std::max(task_.least_noise, std::sqrt(sum_ / freedom_));
    }

    [[nodiscard]] Fit answer(bool rest) const {
        Fit fit;
        fit.values = x_;
        fit.residuals = r_;
        fit.settled = rest && slopes_.rows() == rows_;
        fit.noise = noise_;
        fit.freedom = freedom_;
        fit.left_out = task_.left_out.empty() ? std::vector<bool>(std::size_t(task_.readings)) : task_.left_out;
        if (!fit.settled)
            return fit;
        const MatrixXd c = covariance();
        const MatrixXd counting = counts_.head(scattered_).asDiagonal() * slopes_.topRows(scattered_);
        fit.from_readings = c * (counting.transpose() * counting) * c / (noise_ * noise_);
        fit.from_known = c - fit.from_readings;
        fit.misfit = counted_ * std::log(std::max(noise_ * noise_, 1e-12)) + (x_ - known_).cwiseAbs2().dot(weight_) +
                     (counted_ > 0 ? sum_ / (noise_ * noise_) : 0.0) + r_.tail(task_.known_rows).cwiseAbs2().sum();
        fit.doubt = doubts(c);
        return fit;
    }

    /// Each reading against the fit without it: its studentised residual, squared and meaned over its rows, is F with
    /// width and (freedom − width) degrees of freedom. For one left out, the prediction's own spread is added.
    [[nodiscard]] std::vector<double> doubts(const MatrixXd& c) const {
        std::vector<double> doubts(std::size_t(task_.readings), 1.0);
        for (int i = 0; i < task_.readings; ++i) {
            const int w = width_[std::size_t(i)], first = first_[std::size_t(i)];
            const MatrixXd own = slopes_.middleRows(first, w);
            const VectorXd r = rows_of(r_, i);
            const bool counts = counts_[first] > 0;
            const MatrixXd leverage = own * c * own.transpose() / (noise_ * noise_);
            const MatrixXd free =
                counts ? MatrixXd(MatrixXd::Identity(w, w) - leverage) : MatrixXd(MatrixXd::Identity(w, w) + leverage);
            const double freedom = counts ? freedom_ - w : freedom_;
            if (freedom < 0.5)
                continue;
            const double size = r.dot(free.ldlt().solve(r));
            double rest = noise_ * noise_;
            if (counts)
                rest = std::max((sum_ - size) / freedom, task_.least_noise * task_.least_noise);
            doubts[std::size_t(i)] = fisher_above(size / w / rest, w, freedom);
        }
        return doubts;
    }

    const FitTask& task_;
    std::vector<int> first_, width_; ///< each reading's rows
    int n_ = 0, scattered_ = 0, rows_ = 0, counted_ = 0;
    VectorXd x_, known_, weight_, counts_, r_;
    MatrixXd slopes_;
    double noise_ = 1.0, freedom_ = 0.0, sum_ = 0.0;
};

/// Readings that lie far from where most agree: what to leave out first, at most `most` of them.
std::vector<bool> far_out(const FitTask& task, int most) {
    constexpr double k_far = 6.0;
    std::vector<bool> out(std::size_t(task.readings), false);
    const std::vector<double> sizes = Fitter{task}.sizes_by_a_robust_fit();
    const double usual = std::max(task.least_noise, Fitter::middle_of(sizes));
    std::vector<std::size_t> order(sizes.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return sizes[a] > sizes[b]; });
    for (int i = 0; i < most && sizes[order[std::size_t(i)]] > k_far * usual; ++i)
        out[order[std::size_t(i)]] = true;
    return out;
}

} // namespace

Spread Fit::spread(const Eigen::VectorXd& slopes, double besides) const {
    const double scatter = slopes.dot(from_readings * slopes), rest = slopes.dot(from_known * slopes) + besides;
    Spread spread;
    spread.deviation = std::sqrt(std::max(0.0, scatter + rest));
    // Satterthwaite: what is known beforehand has no scatter to estimate.
    spread.freedom = 1e9;
    if (checked() && scatter > 1e-12 * (scatter + rest))
        spread.freedom = std::min(1e9, freedom * std::pow((scatter + rest) / scatter, 2));
    spread.range_95 = student_95(spread.freedom) * spread.deviation;
    return spread;
}

Spread Fit::spread(int unknown) const {
    return spread(Eigen::VectorXd(Eigen::VectorXd::Unit(values.size(), unknown)));
}

double Fit::chance_of(int unknown, double thought_to) const {
    const Spread found = spread(unknown);
    const double out = values[unknown] / std::hypot(found.deviation, thought_to);
    return fisher_above(out * out, 1.0, std::max(0.5, found.freedom));
}

double Fit::untold(int unknown, const FitTask& task) const {
    const double beforehand = task.unknowns[std::size_t(unknown)].known_to;
    return (from_readings(unknown, unknown) + from_known(unknown, unknown)) / (beforehand * beforehand);
}

Fit fit(const FitTask& task) {
    return Fitter{task}.made();
}

Fit fit_without_strays(FitTask task, double once_in, int least) {
    const int n = task.readings, most_strays = std::max(0, std::min(n / 3, n - least));
    const auto likely = [&](double doubt) { return doubt * n * once_in > 1.0; };
    const auto strays = [&] { return int(std::count(task.left_out.begin(), task.left_out.end(), true)); };
    if (task.left_out.empty())
        task.left_out = most_strays > 0 ? far_out(task, most_strays) : std::vector<bool>(std::size_t(n), false);
    Fit best = fit(task);
    std::vector<bool> was_back(std::size_t(n), false); // none comes back twice
    for (int round = 0; round < 2 * n && best.settled; ++round) {
        // Of those outside the one that fits best, of those inside the one that fits worst.
        int back = -1, out = -1;
        for (int i = 0; i < n; ++i) {
            const double doubt = best.doubt[std::size_t(i)];
            if (task.left_out[std::size_t(i)]) {
                if (likely(doubt) && !was_back[std::size_t(i)] && (back < 0 || doubt > best.doubt[std::size_t(back)]))
                    back = i;
            } else if (!likely(doubt) && (out < 0 || doubt < best.doubt[std::size_t(out)])) {
                out = i;
            }
        }
        if (back >= 0)
            was_back[std::size_t(back)] = true;
        else if (out < 0 || strays() >= most_strays)
            break;
        const auto which = std::size_t(back >= 0 ? back : out);
        task.left_out[which] = !task.left_out[which];
        for (std::size_t k = 0; k < task.unknowns.size(); ++k)
            task.unknowns[k].start = best.values[int(k)];
        best = fit(task);
    }
    return best;
}

} // namespace dialwright
