// SPDX-License-Identifier: MIT
//
// A path is walked in steps. Between two steps whose states differ (unlit or outside; cast by the left edge; cast by
// the right edge) the change is found by halving; between two visible steps chords are halved until they lie within
// the tolerance; between two lit steps outside the window the window is looked for. Great circles on a flat plate need only
// the lit stretches: their shadows are straight lines, cut to the window in closed form.
#include "engine/cast/trace.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace dialwright {
namespace {

/// The square of a point's distance from the chord a–b.
double square_from_chord(PlatePoint p, PlatePoint a, PlatePoint b) {
    const double du = b.u_mm - a.u_mm, dv = b.v_mm - a.v_mm;
    const double pu = p.u_mm - a.u_mm, pv = p.v_mm - a.v_mm;
    const double square = du * du + dv * dv;
    const double along = square > 0 ? std::clamp((pu * du + pv * dv) / square, 0.0, 1.0) : 0.0;
    const double off_u = pu - along * du, off_v = pv - along * dv;
    return off_u * off_u + off_v * off_v;
}

/// The part of a + t d, t in [first, last], inside the box; false if none.
bool cut_to_box(PlatePoint a, double du, double dv, const PlateBox& box, double& first, double& last) {
    const auto cut = [&](double start, double slope, double low, double high) {
        if (std::abs(slope) < 1e-300)
            return start >= low && start <= high;
        double enter = (low - start) / slope, leave = (high - start) / slope;
        if (enter > leave)
            std::swap(enter, leave);
        first = std::max(first, enter);
        last = std::min(last, leave);
        return first < last;
    };
    return cut(a.u_mm, du, box.left_mm, box.right_mm) && cut(a.v_mm, dv, box.bottom_mm, box.top_mm);
}

template <Surface S>
class Walk {
  public:
    Walk(const Caster<S>& caster, const SunPath& path, const PlateBox& window, double tolerance_mm)
        : caster_{caster}, path_{path}, window_{window}, tolerance_mm_{tolerance_mm}, hills_{!caster.skyline().flat() &&
                                                                                             path.light ==
                                                                                                 Light::seen} {}

    std::vector<PlatePolyline> curve() {
        Step before = step(path_.first);
        if (before.visible())
            begin(before);
        for (int i = 1; i <= path_.steps; ++i) {
            const Step after = step(parameter(i, path_.steps));
            join(before, after, 0);
            before = after;
        }
        drop_dots();
        return std::move(lines_);
    }

    std::vector<PlatePolyline> straight() {
        const int steps = hills_ ? 4 * path_.steps : path_.steps;
        double first = path_.first, low = first;
        int light = light_at(first);
        for (int i = 1; i <= steps; ++i) {
            const double high = parameter(i, steps);
            const int next = light_at(high);
            for (int changes = 0; light != next && changes < 4; ++changes) {
                const auto [before, after] = change_between(low, high, light);
                if (light != k_unseen)
                    add_straight(first, before);
                first = low = after;
                light = light_at(after);
            }
            low = high;
        }
        if (light != k_unseen)
            add_straight(first, path_.last);
        return std::move(lines_);
    }

  private:
    static constexpr double k_dot_mm = 1e-6;
    static constexpr int k_halvings = 40;
    static constexpr int k_unseen = 0;
    /// Casts for one path, some ten times what the hardest lines need. A path that runs in the horizon or in the plate's
    /// own plane flickers between light and dark with every rounding; it is left at this.
    static constexpr int k_most_casts = 40'000;

    struct Step {
        double at;
        std::optional<Cast> cast;
        int state; ///< k_unseen, or the casting edge
        [[nodiscard]] bool visible() const { return state != k_unseen; }
    };

    [[nodiscard]] double parameter(int i, int steps) const {
        return i == steps ? path_.last : path_.first + (path_.last - path_.first) * (double(i) / steps);
    }
    [[nodiscard]] std::optional<Cast> cast(double t) const {
        const auto sky = path_.at(t);
        return sky ? caster_.cast(*sky, path_.light, path_.edge) : std::nullopt;
    }
    [[nodiscard]] static int state_of(const std::optional<Cast>& shadow) {
        return !shadow ? k_unseen : shadow->edge == Edge::left ? 1 : 2;
    }
    [[nodiscard]] Step step(double t) {
        --casts_left_;
        auto shadow = cast(t);
        const bool inside = shadow && window_.contains(shadow->point);
        return {t, shadow, inside ? state_of(shadow) : k_unseen};
    }

    void begin(const Step& s) { lines_.push_back({s.cast->point}); }

    /// Draws from `a` to `b`; what is visible at `a` has been begun.
    void join(const Step& a, const Step& b, int depth) {
        if (casts_left_ < 0)
            return;
        if (a.state != b.state) {
            Step low = a, high = b;
            for (int i = 0; i < k_halvings; ++i) {
                const Step middle = step((low.at + high.at) / 2);
                (middle.state == a.state ? low : high) = middle;
                if (one_point(low, high))
                    break;
            }
            if (a.visible())
                refine(a, low, 0);
            if (high.visible())
                begin(high);
            if (high.at < b.at && depth < 8)
                join(high, b, depth + 1);
        } else if (a.visible()) {
            refine(a, b, 0);
        } else if (depth < 14 && may_enter(a, b, depth)) {
            const Step middle = step((a.at + b.at) / 2);
            join(a, middle, depth + 1);
            join(middle, b, depth + 1);
        }
    }

    /// Whether two steps on either side of the window's border are one point of it.
    [[nodiscard]] static bool one_point(const Step& a, const Step& b) {
        constexpr double k_one_mm = 1e-9;
        return a.cast && b.cast && a.cast->edge == b.cast->edge &&
               std::abs(a.cast->point.u_mm - b.cast->point.u_mm) + std::abs(a.cast->point.v_mm - b.cast->point.v_mm) <
                   k_one_mm;
    }

    /// Whether a stretch with both ends outside the window or unlit might come in between.
    [[nodiscard]] bool may_enter(const Step& a, const Step& b, int depth) const {
        if (a.cast && b.cast) {
            // The curve bulges from its chord, by no more than a part of the chord's length.
            const PlatePoint p = a.cast->point, q = b.cast->point;
            const double du = q.u_mm - p.u_mm, dv = q.v_mm - p.v_mm, bulge_mm = 0.25 * std::hypot(du, dv);
            const PlateBox wider{window_.left_mm - bulge_mm, window_.bottom_mm - bulge_mm, window_.right_mm + bulge_mm,
                                 window_.top_mm + bulge_mm};
            double first = 0.0, last = 1.0;
            return cut_to_box(p, du, dv, wider, first, last);
        }
        if (a.cast || b.cast)
            return depth < 5;
        return hills_ && depth < 2;
    }

    void refine(const Step& a, const Step& b, int depth) { refine(a, step((a.at + b.at) / 2), b, depth); }

    /// Draws to `b` in one chord, in two by `middle`, or halves further. A chord is tried at its middle and, by the
    /// chords beside it, where it would lie farthest from a curve that bends both ways.
    void refine(const Step& a, const Step& middle, const Step& b, int depth) {
        constexpr int k_deepest = 26;
        if (depth >= k_deepest || casts_left_ < 0) {
            lines_.back().push_back(b.cast->point);
            return;
        }
        if (middle.state != a.state) {
            join(a, middle, 0);
            join(middle, b, 0);
            return;
        }
        const auto near_chord = [this](const Step& s, const Step& from, const Step& to) {
            return s.cast &&
                   square_from_chord(s.cast->point, from.cast->point, to.cast->point) <= tolerance_mm_ * tolerance_mm_;
        };
        const Step early = step((a.at + middle.at) / 2), late = step((middle.at + b.at) / 2);
        if (near_chord(middle, a, b) && near_chord(early, a, b) && near_chord(late, a, b)) {
            lines_.back().push_back(b.cast->point);
        } else if (near_chord(early, a, middle) && near_chord(late, middle, b)) {
            lines_.back().push_back(middle.cast->point);
            lines_.back().push_back(b.cast->point);
        } else {
            refine(a, early, middle, depth + 1);
            refine(middle, late, b, depth + 1);
        }
    }

    /// The state of the light alone: the window is not asked.
    [[nodiscard]] int light_at(double t) const { return state_of(cast(t)); }

    /// The last parameter of a state and the first of another, from `low` (in the state) towards `high` (not in it).
    [[nodiscard]] std::pair<double, double> change_between(double low, double high, int state) const {
        for (int i = 0; i < k_halvings; ++i) {
            const double middle = (low + high) / 2;
            (light_at(middle) == state ? low : high) = middle;
        }
        return {low, high};
    }

    /// The straight shadow of a lit stretch. Two Suns well inside it give the line; its ends, which may be at infinity,
    /// only how far it runs.
    void add_straight(double first_lit, double last_lit) {
        const double span = last_lit - first_lit;
        const auto a = cast(first_lit + 0.4 * span), b = cast(first_lit + 0.6 * span);
        if (!a || !b)
            return;
        double du = b->point.u_mm - a->point.u_mm, dv = b->point.v_mm - a->point.v_mm;
        const double length = std::hypot(du, dv);
        if (length < k_dot_mm)
            return;
        du /= length;
        dv /= length;
        const auto along = [&](double parameter_of_end, double otherwise) {
            const auto end = cast(parameter_of_end);
            return end ? (end->point.u_mm - a->point.u_mm) * du + (end->point.v_mm - a->point.v_mm) * dv : otherwise;
        };
        constexpr double k_far_mm = 1e15;
        double first = along(first_lit, -k_far_mm), last = along(last_lit, k_far_mm);
        if (!cut_to_box(a->point, du, dv, window_, first, last) || last - first < k_dot_mm)
            return;
        const auto at = [&](double t) { return PlatePoint{a->point.u_mm + t * du, a->point.v_mm + t * dv}; };
        lines_.push_back({at(first), at(last)});
    }

    void drop_dots() {
        std::erase_if(lines_, [](const PlatePolyline& line) {
            return std::all_of(line.begin(), line.end(), [&line](PlatePoint p) {
                return std::hypot(p.u_mm - line[0].u_mm, p.v_mm - line[0].v_mm) < k_dot_mm;
            });
        });
    }

    const Caster<S>& caster_;
    const SunPath& path_;
    const PlateBox& window_;
    double tolerance_mm_;
    bool hills_;
    int casts_left_ = k_most_casts;
    std::vector<PlatePolyline> lines_;
};

} // namespace

template <Surface S>
std::vector<PlatePolyline> trace(const Caster<S>& caster, const SunPath& path, const PlateBox& window,
                                 double tolerance_mm) {
    Walk<S> walk{caster, path, window, tolerance_mm};
    return path.great_circle && S::straight_paths ? walk.straight() : walk.curve();
}

template std::vector<PlatePolyline> trace<Plane>(const Caster<Plane>&, const SunPath&, const PlateBox&, double);

} // namespace dialwright
