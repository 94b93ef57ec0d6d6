// SPDX-License-Identifier: MIT
//
// Two cases. A style that leans well away from the plate has its centre on it: the centre is moved about the field
// until the hour lines that start there have the most room, and the nodus is set as high as lets the date lines cross
// the field. Where hour lines from a centre on the plate would crowd, because the style is nearly parallel to the plate,
// the centre may lie off it or nowhere: foot and height are searched together for the most hours and dates that fall on
// the field, well apart.
#include "layout/plate/face.hpp"
#include "layout/plate/points.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::layout {
namespace {

constexpr Angle k_least_style_for_centre = Angle::degrees(3);
constexpr Angle k_pin = Angle::degrees(89.99); ///< a style this steep is a pin, square on the plate
constexpr double k_crowded = 0.05;             ///< of the plate's size, between two hours at the border of the field

double to_half_mm(double mm) {
    return std::round(mm * 2) / 2;
}

class Placer {
  public:
    Placer(const DialPlan& plan, const MeanYear& year, const FaceSpec& spec)
        : plan_{plan}, spec_{spec}, rings_{Rings::of(spec)}, season_{-year.obliquity(), year.obliquity()},
          caster_{caster_of(unit_plan(plan))}, style_{style_of(caster_.surface().frame(), 1.0, plan.site.latitude)} {
        // Hours that count from the Sun's rising or setting spread over the same shadows as the Sun's own hours do.
        const bool own_hours = !counts_from_horizon(plan.hours.time);
        for (int hour = 0; hour < 24; ++hour) {
            const bool asked = !own_hours || ((!plan.hours.first_h || hour >= *plan.hours.first_h) &&
                                              (!plan.hours.last_h || hour <= *plan.hours.last_h));
            const Angle angle =
                hour_angle_of(own_hours ? plan.hours.time : HourTime::sun, hour, plan.site, plan.zone_meridian);
            if (asked && caster_.ever_lit(angle, season_))
                hours_.push_back(angle);
        }
    }

    Placement placed() {
        if (style_.height < k_least_style_for_centre || !style_.centre || !has_style(spec_.gnomon.kind))
            return placed_without_centre();
        const Point centre =
            spec_.plate.centre ? Point{spec_.plate.centre->right_mm, spec_.plate.centre->up_mm} : best_centre();
        if (!spec_.plate.centre && closest_hours_mm(centre) < k_crowded * size_mm())
            return placed_without_centre();
        Placement placement;
        placement.nodus_height_mm = plan_.nodus_height_mm > 0 ? plan_.nodus_height_mm : height_for(centre);
        placement.key = centre;
        placement.foot = centre - placement.nodus_height_mm * Point{style_.centre->u_mm, style_.centre->v_mm};
        if (!spec_.plate.centre)
            placement.why_place = "gives the lines of all lit hours the most room";
        if (!(plan_.nodus_height_mm > 0))
            placement.why_height = "the highest nodus whose shadow stays on the plate at every date line, at the hour "
                                   "nearest to the substyle";
        return placement;
    }

  private:
    static DialPlan unit_plan(DialPlan plan) {
        plan.nodus_height_mm = 1.0;
        plan.gnomon_thickness_mm = 0.0;
        return plan;
    }

    [[nodiscard]] double size_mm() const { return std::min(spec_.plate.width_mm, spec_.plate.height_mm); }

    [[nodiscard]] double room_score(Point centre, const Outline& allowed) const {
        if (!allowed.contains(centre))
            return -1e300;
        // Behind the centre, away from the hours, stand the compass mark and the inscriptions.
        const Point behind = -1.0 * clockwise_from_up(style_.substyle);
        const double behind_weight = (spec_.compass ? 1.8 : 0.0) + (spec_.lettering.motto.empty() ? 0.0 : 0.6);
        const auto room_behind = rings_.divisions.exit(centre, behind);
        double score = room_behind ? behind_weight * std::log(std::max(1e-3, distance(centre, room_behind->at))) : 0.0;
        for (const Angle& hour : hours_) {
            const auto direction = hour_line_direction(caster_.surface().frame(), style_, plan_.site.latitude, hour);
            const auto exit = direction ? rings_.divisions.exit(centre, clockwise_from_up(*direction)) : std::nullopt;
            if (exit)
                score += std::log(std::max(1e-3, distance(centre, exit->at)));
        }
        return score;
    }

    /// The least distance between the ends of two hour lines, an hour apart, at the border of the field.
    [[nodiscard]] double closest_hours_mm(Point centre) const {
        double least = 1e300;
        std::optional<Point> before;
        for (std::size_t i = 0; i < hours_.size(); ++i) {
            const auto direction =
                hour_line_direction(caster_.surface().frame(), style_, plan_.site.latitude, hours_[i]);
            const auto exit = direction ? rings_.divisions.exit(centre, clockwise_from_up(*direction)) : std::nullopt;
            const bool next = i > 0 && (hours_[i] - hours_[i - 1]).in_hours() < 1.5;
            if (exit && before && next)
                least = std::min(least, distance(exit->at, *before));
            before = exit ? std::optional{exit->at} : std::nullopt;
        }
        return least;
    }

    [[nodiscard]] Point best_centre() const {
        if (style_.height > k_pin)
            return {}; // both faces of a plate share the pin: its middle
        const double wanted = spec_.borders.inner_mm + 2 * spec_.cutting.least_gap_mm;
        Outline allowed = rings_.divisions;
        for (const double part : {1.0, 0.5, 0.25})
            if (const auto inner = rings_.divisions.inset(part * wanted)) {
                allowed = *inner;
                break;
            }
        Point best = allowed.box().middle();
        if (spec_.plate.shape != PlateShape::polygon)
            best = {};
        double best_score = room_score(best, allowed);
        for (double step = size_mm() / 8; step > 0.2; step /= 2)
            for (bool moved = true; moved;) {
                moved = false;
                for (const Point& way :
                     {Point{step, 0}, Point{-step, 0}, Point{0, step}, Point{0, -step}, Point{step, step},
                      Point{-step, step}, Point{step, -step}, Point{-step, -step}}) {
                    const double score = room_score(best + way, allowed);
                    if (score > best_score + 1e-9) {
                        best_score = score;
                        best = best + way;
                        moved = true;
                    }
                }
            }
        return {to_half_mm(best.x_mm), to_half_mm(best.y_mm)};
    }

    /// The lit hour nearest to the substyle's.
    [[nodiscard]] std::optional<Angle> main_hour() const {
        std::optional<Angle> best;
        for (const Angle& hour : hours_)
            if (!best || abs((hour - style_.substyle_hour_angle).signed_turn()) <
                             abs((*best - style_.substyle_hour_angle).signed_turn()))
                best = hour;
        return best;
    }

    [[nodiscard]] double height_for(Point centre) const {
        constexpr double k_fill = 0.82;         // of the hour line's length: clear of the half hours' marks
        constexpr double k_least_spread = 0.13; // nearest date line's part of the farthest's distance from the centre
        const double fallback = to_half_mm(0.15 * size_mm());
        const auto hour = main_hour();
        if (!hour)
            return fallback;
        const auto direction = hour_line_direction(caster_.surface().frame(), style_, plan_.site.latitude, *hour);
        const auto exit = direction ? rings_.divisions.exit(centre, clockwise_from_up(*direction)) : std::nullopt;
        if (!exit)
            return fallback;
        std::vector<double> reach; // of each date line's point, for a nodus 1 mm high
        const auto add = [&](Angle declination) {
            if (const auto cast = caster_.cast({*hour, declination}, Light::seen))
                reach.push_back(
                    std::hypot(cast->point.u_mm - style_.centre->u_mm, cast->point.v_mm - style_.centre->v_mm));
        };
        for (const DatePlan::Line& date : plan_.dates.lines)
            add(date.declination);
        if (reach.empty())
            for (const double part : {-1.0, 0.0, 1.0})
                add(season_.greatest * part);
        if (reach.empty())
            return fallback;
        std::sort(reach.begin(), reach.end());
        while (reach.size() > 1 && reach.front() < k_least_spread * reach.back())
            reach.pop_back();
        const double height = k_fill * distance(centre, exit->at) / reach.back();
        return std::max(0.5, std::floor(std::min(height, 0.5 * size_mm()) * 2) / 2);
    }

    struct UnitShadows {
        std::vector<PlatePoint> points; ///< of one hour, the season's declinations in order, where seen
    };
    [[nodiscard]] std::vector<UnitShadows> unit_shadows() const {
        std::vector<UnitShadows> all;
        for (const Angle& hour : hours_) {
            UnitShadows shadows;
            for (const double part : {-1.0, -0.5, 0.0, 0.5, 1.0})
                if (const auto cast = caster_.cast({hour, season_.greatest * part}, Light::seen))
                    shadows.points.push_back(cast->point);
            all.push_back(std::move(shadows));
        }
        return all;
    }

    /// Hours and dates that fall on the field, each counted by how far it stands from the hour and the date before.
    [[nodiscard]] double field_score(const std::vector<UnitShadows>& shadows, Point foot, double height_mm) const {
        const double wanted_gap = 0.06 * size_mm();
        double score = 0;
        for (std::size_t i = 0; i < shadows.size(); ++i)
            for (std::size_t k = 0; k < shadows[i].points.size(); ++k) {
                const PlatePoint p = shadows[i].points[k];
                if (!rings_.divisions.contains(foot + height_mm * Point{p.u_mm, p.v_mm}))
                    continue;
                double gap = wanted_gap;
                if (i > 0 && k < shadows[i - 1].points.size())
                    gap = height_mm *
                          std::hypot(p.u_mm - shadows[i - 1].points[k].u_mm, p.v_mm - shadows[i - 1].points[k].v_mm);
                double spread = wanted_gap; // from the date before on the same hour
                if (k > 0)
                    spread = height_mm *
                             std::hypot(p.u_mm - shadows[i].points[k - 1].u_mm, p.v_mm - shadows[i].points[k - 1].v_mm);
                score += std::min(1.0, gap / wanted_gap) * std::min(1.0, spread / wanted_gap) +
                         0.1 * (gap + spread) / size_mm();
            }
        return score;
    }

    [[nodiscard]] Placement placed_without_centre() const {
        const auto shadows = unit_shadows();
        const Box box = rings_.divisions.box();
        Placement best;
        double best_score = -1;
        constexpr int k_places = 8, k_heights = 32;
        for (int i = 0; i <= k_heights; ++i) {
            const double height = plan_.nodus_height_mm > 0
                                      ? plan_.nodus_height_mm
                                      : to_half_mm(size_mm() * 0.02 * std::pow(25.0, double(i) / k_heights));
            if (height <= 0)
                continue;
            for (int column = 0; column <= k_places; ++column)
                for (int row = 0; row <= k_places; ++row) {
                    Point foot{to_half_mm(box.left_mm + box.width_mm() * column / k_places),
                               to_half_mm(box.bottom_mm + box.height_mm() * row / k_places)};
                    if (spec_.plate.centre)
                        foot = {spec_.plate.centre->right_mm, spec_.plate.centre->up_mm};
                    // Of equals, the foot nearest to the middle.
                    const double score =
                        field_score(shadows, foot, height) - 1e-4 * distance(foot, box.middle()) / size_mm();
                    if (score > best_score) {
                        best_score = score;
                        best.foot = foot;
                        best.nodus_height_mm = height;
                    }
                }
            if (plan_.nodus_height_mm > 0)
                break;
        }
        const bool centre_counts =
            has_style(spec_.gnomon.kind) && style_.height >= k_least_style_for_centre && style_.centre;
        best.key = centre_counts ? best.foot + best.nodus_height_mm * Point{style_.centre->u_mm, style_.centre->v_mm}
                                 : best.foot;
        if (!spec_.plate.centre)
            best.why_place = "brings the most hours and dates onto the plate (the centre lies off it)";
        if (!(plan_.nodus_height_mm > 0))
            best.why_height = "brings the most hours and dates onto the plate, well apart";
        return best;
    }

    const DialPlan& plan_;
    const FaceSpec& spec_;
    Rings rings_;
    Season season_;
    Caster<Plane> caster_;
    Style style_;
    std::vector<Angle> hours_;
};

} // namespace

Placement place_on_plate(const DialPlan& plan, const MeanYear& year, const FaceSpec& spec) {
    return Placer{plan, year, spec}.placed();
}

} // namespace dialwright::layout
