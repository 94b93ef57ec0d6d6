// SPDX-License-Identifier: MIT
#include "cli/design/polygon.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::cli {

namespace {

constexpr double k_touching = 1e-9;

/// Twice the area of the triangle abc, positive anticlockwise; what is tiny beside its sides counts as none.
double turn(PlatePointMm a, PlatePointMm b, PlatePointMm c) {
    const double abx = b.right_mm - a.right_mm, aby = b.up_mm - a.up_mm;
    const double acx = c.right_mm - a.right_mm, acy = c.up_mm - a.up_mm;
    const double area = abx * acy - aby * acx;
    return std::abs(area) <= k_touching * std::hypot(abx, aby) * std::hypot(acx, acy) ? 0.0 : area;
}

/// c, known to be in line with a and b, lies between them.
bool between(PlatePointMm a, PlatePointMm b, PlatePointMm c) {
    return std::min(a.right_mm, b.right_mm) <= c.right_mm && c.right_mm <= std::max(a.right_mm, b.right_mm) &&
           std::min(a.up_mm, b.up_mm) <= c.up_mm && c.up_mm <= std::max(a.up_mm, b.up_mm);
}

bool meet(PlatePointMm a, PlatePointMm b, PlatePointMm c, PlatePointMm d) {
    const double abc = turn(a, b, c), abd = turn(a, b, d), cda = turn(c, d, a), cdb = turn(c, d, b);
    if (abc != 0.0 && abd != 0.0 && cda != 0.0 && cdb != 0.0)
        return (abc > 0.0) != (abd > 0.0) && (cda > 0.0) != (cdb > 0.0);
    return (abc == 0.0 && between(a, b, c)) || (abd == 0.0 && between(a, b, d)) || (cda == 0.0 && between(c, d, a)) ||
           (cdb == 0.0 && between(c, d, b));
}

/// The side from b to c runs back along the side from a to b.
bool folds_back(PlatePointMm a, PlatePointMm b, PlatePointMm c) {
    const double along =
        (b.right_mm - a.right_mm) * (c.right_mm - b.right_mm) + (b.up_mm - a.up_mm) * (c.up_mm - b.up_mm);
    return turn(a, b, c) == 0.0 && along < 0.0;
}

} // namespace

double twice_area_mm2(const std::vector<PlatePointMm>& corners) {
    double sum = 0.0;
    for (std::size_t i = 0; i < corners.size(); ++i) {
        const PlatePointMm& a = corners[i];
        const PlatePointMm& b = corners[(i + 1) % corners.size()];
        sum += a.right_mm * b.up_mm - a.up_mm * b.right_mm;
    }
    return sum;
}

std::optional<std::pair<std::size_t, std::size_t>> first_sides_in_trouble(const std::vector<PlatePointMm>& corners) {
    const std::size_t count = corners.size();
    const auto corner = [&](std::size_t i) { return corners[i % count]; };
    for (std::size_t i = 0; i < count; ++i)
        if (std::hypot(corner(i + 1).right_mm - corner(i).right_mm, corner(i + 1).up_mm - corner(i).up_mm) <= 1e-6)
            return std::pair{i, i};
    for (std::size_t i = 0; i < count; ++i)
        for (std::size_t j = i + 1; j < count; ++j) {
            if (j == i + 1) {
                if (folds_back(corner(i), corner(j), corner(j + 1)))
                    return std::pair{i, j};
            } else if (i == 0 && j + 1 == count) {
                if (folds_back(corner(j), corner(0), corner(1)))
                    return std::pair{i, j};
            } else if (meet(corner(i), corner(i + 1), corner(j), corner(j + 1))) {
                return std::pair{i, j};
            }
        }
    return std::nullopt;
}

} // namespace dialwright::cli
