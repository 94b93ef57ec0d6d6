// SPDX-License-Identifier: MIT
#pragma once

#include "engine/cast/trace.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

namespace dialwright::test {

inline double distance_mm(PlatePoint p, PlatePoint a, PlatePoint b) {
    const double du = b.u_mm - a.u_mm, dv = b.v_mm - a.v_mm, square = du * du + dv * dv;
    const double along = ((p.u_mm - a.u_mm) * du + (p.v_mm - a.v_mm) * dv) / (square > 0 ? square : 1.0);
    const double t = std::clamp(along, 0.0, 1.0);
    return std::hypot(p.u_mm - a.u_mm - t * du, p.v_mm - a.v_mm - t * dv);
}

inline double distance_mm(PlatePoint p, const std::vector<PlatePolyline>& lines) {
    double least = 1e300;
    for (const PlatePolyline& line : lines)
        for (std::size_t k = 1; k < line.size(); ++k)
            least = std::min(least, distance_mm(p, line[k - 1], line[k]));
    return least;
}

/// The shadow of a path taken step by step, without any of the tracer's thought: what is drawn must be near this, and
/// this near what is drawn.
class BruteWalk {
  public:
    BruteWalk(const Caster<Plane>& caster, const SunPath& path, const PlateBox& window, int steps) {
        std::optional<Cast> before;
        bool alone = true; // the last seen shadow has no neighbour of its own edge: a point, as where light only grazes
        for (int i = 0; i <= steps; ++i) {
            const double at = path.first + (path.last - path.first) * (double(i) / steps);
            const auto sky = path.at(at);
            const auto now = sky ? caster.cast(*sky, path.light, path.edge) : std::nullopt;
            const bool joined = now && before && now->edge == before->edge;
            if (before && window.contains(before->point) && !(alone && !joined))
                seen_.push_back(before->point);
            // Of the walk itself keep what comes near the window, so that a drawn end finds its place in it.
            if (joined && near(window, before->point, now->point))
                walk_.push_back({before->point, now->point});
            alone = !joined;
            before = now;
        }
    }

    /// How far a seen shadow inside the window lies from the nearest drawn piece; 0 if there is none.
    [[nodiscard]] double farthest_sample_from(const std::vector<PlatePolyline>& pieces) const {
        double most = 0.0;
        for (const PlatePoint p : seen_)
            most = std::max(most, distance_mm(p, pieces));
        return most;
    }

    /// How far the middle of a drawn chord lies from the walk. Chords shorter than the walk's own steps at an end of
    /// light are left to the ends' own tests.
    [[nodiscard]] double farthest_chord_of(const std::vector<PlatePolyline>& pieces) const {
        double most = 0.0;
        for (const PlatePolyline& piece : pieces)
            for (std::size_t k = 2; k + 1 < piece.size(); ++k) {
                const PlatePoint middle{(piece[k - 1].u_mm + piece[k].u_mm) / 2,
                                        (piece[k - 1].v_mm + piece[k].v_mm) / 2};
                most = std::max(most, distance_mm(middle, walk_));
            }
        return most;
    }

  private:
    static bool near(const PlateBox& box, PlatePoint a, PlatePoint b) {
        return std::max(a.u_mm, b.u_mm) >= box.left_mm && std::min(a.u_mm, b.u_mm) <= box.right_mm &&
               std::max(a.v_mm, b.v_mm) >= box.bottom_mm && std::min(a.v_mm, b.v_mm) <= box.top_mm;
    }
    std::vector<PlatePoint> seen_;
    std::vector<PlatePolyline> walk_;
};

} // namespace dialwright::test
