// SPDX-License-Identifier: MIT
//
// Notation, in the plate frame (u, v, n): P the north pole of the sky, from the figure; z the zenith of a plate that leans
// back by L, (0, cos L, sin L); so sin φ = P·z, east = P × z, and the facing is n's azimuth. With H_n the hour angle of n and H0 the
// substyle's hour by the numerals, the plate is ahead of its place's Sun by H0 − H_n, to the half-turn: numerals that count to
// twelve know no more.
#include "engine/base/angle.hpp"
#include "engine/cast/caster.hpp"
#include "engine/style/style.hpp"
#include "engine/surface/plane.hpp"
#include "engine/survey/plate_restore.hpp"

#include <Eigen/Geometry>

#include <cmath>
#include <functional>

namespace dialwright {
namespace {

using Eigen::Vector3d;
using Fact = PlateSolution::Fact;
constexpr double k_degree = std::numbers::pi / 180;

/// What a figure is made of: substyle as the fit has it, signed height, substyle's hour (degrees).
using Shape = Vector3d;

/// The plate where it stands: latitude, facing, lean, ahead (degrees).
struct Stand {
    double latitude = 0, facing = 0, lean = 0, ahead = 0;
};

Vector3d pole_of(const Shape& shape, double side) {
    const double flat = side * std::cos(shape[1] * k_degree);
    return {flat * std::sin(shape[0] * k_degree), flat * std::cos(shape[0] * k_degree), std::sin(shape[1] * k_degree)};
}

Stand stand_of(const Shape& shape, double side, double lean_deg) {
    const Vector3d pole = pole_of(shape, side), n = Vector3d::UnitZ();
    const double lean = lean_deg * k_degree;
    const Vector3d zenith{0, std::cos(lean), std::sin(lean)};
    const Vector3d east = pole.cross(zenith).normalized(), north = zenith.cross(east);
    const Vector3d meridian = (zenith - zenith.dot(pole) * pole).normalized();
    Stand stand;
    stand.latitude = arc_sine(pole.dot(zenith)).in_degrees();
    stand.lean = lean_deg;
    stand.facing = arc_tangent(n.dot(east), n.dot(north)).positive_turn().in_degrees();
    stand.ahead = std::remainder(shape[2] - arc_tangent(-n.dot(east), n.dot(meridian)).in_degrees(), 180.0);
    return stand;
}

/// A level plate: n is the zenith, and its hour angle 0.
Stand level_stand(const Shape& shape) {
    return {shape[1], 0.0, 90.0, std::remainder(shape[2], 180.0)};
}

/// The lean at which the plate serves a latitude; nothing where no lean will do.
std::optional<double> lean_for_latitude(const Shape& shape, double side, double latitude_deg, bool second) {
    const Vector3d pole = pole_of(shape, side);
    const double reach = std::hypot(pole.y(), pole.z()), sine = std::sin(latitude_deg * k_degree);
    if (std::abs(sine) > reach)
        return std::nullopt;
    const double middle = std::atan2(pole.z(), pole.y()), apart = std::acos(sine / reach);
    return std::remainder((second ? middle - apart : middle + apart) / k_degree, 360.0);
}

/// The lean at which XII is the meridian's.
double lean_for_sun_time(const Shape& shape, double side) {
    const Vector3d pole = pole_of(shape, side), n = Vector3d::UnitZ();
    const Vector3d level = (n - n.dot(pole) * pole).normalized();
    // Hour angles run from the meridian to the west, clockwise about the pole.
    const Vector3d meridian = Eigen::AngleAxisd{shape[2] * k_degree, pole} * level;
    const Vector3d across = pole.cross(meridian);
    if (std::abs(across.z()) < 1e-12)
        return 90.0;
    return std::atan(-across.y() / across.z()) / k_degree;
}

/// A stand as a function of the shape and of the fact's own figure.
using Stands = std::function<std::optional<Stand>(const Shape& shape, double fact)>;

/// Whether the Sun ever reaches most of the lines on a plate that stands so. Numerals count to twelve: either half-day will do.
bool is_lit(const PlateFigure& figure, const Stand& stand) {
    constexpr double k_most = 0.6; // makers drew some lines that no Sun reaches
    constexpr Angle k_solstice = Angle::degrees(23.44);
    const Angle latitude = Angle::degrees(stand.latitude);
    const Plane plane{frame_of({Angle::degrees(stand.facing), Angle::degrees(stand.lean)}), 1.0};
    const Style style = style_of(plane.frame(), 1.0, latitude);
    const Caster<Plane> caster{latitude, plane, GnomonEdges{plane.frame(), style, latitude, 0.0}, Skyline{}};
    int lit = 0;
    for (const double hour_deg : figure.counted_deg)
        for (const double half_day : {0.0, 180.0})
            if (caster.ever_lit(Angle::degrees(hour_deg - stand.ahead + half_day).signed_turn(),
                                {-k_solstice, k_solstice})) {
                ++lit;
                break;
            }
    return lit >= k_most * double(figure.counted_deg.size());
}

std::optional<PlateSolution> solution(const PlateFigure& figure, Fact fact, const Known& known, const Stands& stands) {
    const Shape shape = figure.fit.values.head<3>();
    const auto here = stands(shape, known.value);
    constexpr double k_most_overhang_deg = 80;
    if (!here || here->lean < -k_most_overhang_deg || here->lean > 90.001 || !is_lit(figure, *here))
        return std::nullopt;
    constexpr double k_step = 1e-4;
    constexpr int k_unknowns = 3;
    Eigen::Matrix<double, 4, k_unknowns + 1> slopes;
    const auto difference = [](const Stand& a, const Stand& b) {
        return Eigen::Vector4d{a.latitude - b.latitude, std::remainder(a.facing - b.facing, 360.0), a.lean - b.lean,
                               std::remainder(a.ahead - b.ahead, 180.0)};
    };
    for (int i = 0; i <= k_unknowns; ++i) {
        Shape moved = shape;
        double own = known.value;
        (i < k_unknowns ? moved[i] : own) += k_step;
        const auto there = stands(moved, own);
        if (!there)
            return std::nullopt; // at the very limit of what is possible
        slopes.col(i) = difference(*there, *here) / k_step;
    }
    const auto range = [&](int row) {
        Eigen::VectorXd along = Eigen::VectorXd::Zero(figure.fit.values.size());
        along.head<k_unknowns>() = slopes.row(row).head<k_unknowns>().transpose();
        const double besides = slopes(row, k_unknowns) * known.deviation();
        return figure.fit.spread(along, besides * besides).range_95;
    };
    PlateSolution made;
    made.fact = fact;
    made.latitude_deg = {here->latitude, range(0), fact != Fact::latitude};
    if (here->lean < 89.99)
        made.facing_deg = Found{here->facing, range(1), true};
    made.lean_deg = {here->lean, range(2), fact == Fact::latitude || fact == Fact::sun_time};
    made.ahead_min = {4 * here->ahead, 4 * range(3), fact != Fact::sun_time};
    return made;
}

} // namespace

std::vector<PlateSolution> solutions_of(const PlateFigure& figure, bool up_known, const PlateFacts& facts) {
    std::vector<PlateSolution> made;
    const auto add = [&](Fact fact, const Known& known, const Stands& stands) {
        if (auto one = solution(figure, fact, known, stands))
            made.push_back(std::move(*one));
    };
    const Known upright{0.0, 0.5}; // a wall's plumb: common practice, no source
    add(Fact::level, {90, 0.5}, [](const Shape& shape, double) { return level_stand(shape); });
    for (const double side : {figure.side, -figure.side}) {
        if (side != figure.side && figure.side_told)
            break;
        if (!up_known) {
            // Upright with its own place's time: XII is plumb, up or down from the centre.
            for (const double turn : {180.0, 0.0})
                add(Fact::upright, upright, [side, turn](const Shape& shape, double lean) {
                    const double sine = std::sin(shape[1] * k_degree), hour = -shape[2] * k_degree;
                    const double noon = shape[0] + std::atan2(sine * std::sin(hour), std::cos(hour)) / k_degree;
                    return stand_of({shape[0] - noon - turn, shape[1], shape[2]}, side, lean);
                });
            continue;
        }
        const Stands by_lean = [side](const Shape& shape, double lean) { return stand_of(shape, side, lean); };
        add(Fact::upright, upright, by_lean);
        if (facts.lean_deg)
            add(Fact::lean, *facts.lean_deg, by_lean);
        if (facts.latitude_deg)
            for (const bool second : {false, true})
                add(Fact::latitude, *facts.latitude_deg, [side, second](const Shape& shape, double latitude) {
                    const auto lean = lean_for_latitude(shape, side, latitude, second);
                    return lean ? std::optional{stand_of(shape, side, *lean)} : std::nullopt;
                });
        add(Fact::sun_time, {0, 1e-9},
            [side](const Shape& shape, double) { return stand_of(shape, side, lean_for_sun_time(shape, side)); });
    }
    return made;
}

} // namespace dialwright
