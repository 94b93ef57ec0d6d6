// SPDX-License-Identifier: MIT
#include "layout/plate/bench.hpp"
#include "layout/plate/numerals.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <optional>

namespace dialwright::layout {
namespace {

/// One drawn side of a straight hour line (the noon gap has two): what runs over the field, and its tick in the ring.
struct Ray {
    const DialLine* line;
    int minute;
    std::vector<Polyline> field; ///< from the centre outward
    Polyline tick; ///< across the band of divisions, from the field outward; empty where the line does not reach it
    [[nodiscard]] Point direction() const { return unit(field.back().back() - field.back().front()); }
    [[nodiscard]] Point end() const { return field.back().back(); }
};

class HourDrawer {
  public:
    explicit HourDrawer(Bench& bench) : bench_{bench} {}

    void draw() {
        for (const DialLine& line : bench_.delineation.lines) {
            if (!in_ring(line))
                continue;
            if (line.family == Family::hour)
                add_rays(line);
            else
                clock_lines_.push_back(&line);
        }
        choose_steps();
        part_near_centre();
        noon_mark_ = noon_mark();
        for (const Ray& ray : rays_)
            draw_ray(ray);
        draw_clock_lines();
        draw_numerals(bench_, ring_hours(), heads_out());
        draw_noon_mark();
    }

  private:
    void add_rays(const DialLine& line) {
        for (const PlatePolyline& piece : line.pieces) {
            Polyline whole = bench_.to_work(piece);
            if (line.direction && dot(whole.back() - whole.front(), clockwise_from_up(*line.direction)) < 0)
                std::reverse(whole.begin(), whole.end()); // from the centre outward
            Ray ray{&line, int(std::lround(line.time_h * 60)), clipped(whole, bench_.field()), {}};
            const auto ticks = clipped(whole, {{bench_.rings.numerals}, {bench_.rings.divisions}});
            // The outermost piece carries the tick, however short; scraps before it are dropped.
            const double least = 6 * bench_.width_of_step(line.step_min);
            for (std::size_t i = 0; i + 1 < ray.field.size();)
                length_mm(ray.field[i]) < least ? void(ray.field.erase(ray.field.begin() + std::ptrdiff_t(i)))
                                                : void(++i);
            if (ray.field.empty())
                continue;
            // Only the outer end is a tick; a line whose centre is off the plate enters through the ring as well.
            if (!ticks.empty() && distance(ticks.back().front(), ray.end()) < 1e-6)
                ray.tick = ticks.back();
            rays_.push_back(std::move(ray));
        }
    }

    /// Clear way between two rays where they meet the field's border; of rays that are divided in the field, at either
    /// end.
    [[nodiscard]] double gap_mm(const Ray& a, const Ray& b) const {
        const Point along = a.direction();
        const double outside = std::abs(cross(along, b.end() - a.end()));
        return bench_.divides_in_field()
                   ? std::min(outside, std::abs(cross(along, b.field.front().front() - a.field.front().front())))
                   : outside;
    }

    /// For each hour the finest whole step at which all its divisions stand clear of each other.
    void choose_steps() {
        static constexpr int k_steps[] = {1, 2, 5, 10, 15, 30, 60};
        for (int hour = 0; hour < 24; ++hour) {
            std::vector<const Ray*> within;
            for (const Ray& ray : rays_)
                if (ray.minute >= hour * 60 && ray.minute <= hour * 60 + 60)
                    within.push_back(&ray);
            for (const int step : k_steps) {
                step_of_hour_[hour] = step;
                if (stand_clear(within, step))
                    break;
            }
        }
    }

    [[nodiscard]] bool stand_clear(const std::vector<const Ray*>& rays, int step) const {
        const Ray* before = nullptr;
        for (const Ray* ray : rays) {
            if (ray->minute % step != 0)
                continue;
            const double lines =
                before ? (bench_.width_of_step(before->line->step_min) + bench_.width_of_step(ray->line->step_min)) / 2
                       : 0;
            if (before && before->minute != ray->minute &&
                gap_mm(*before, *ray) - lines < bench_.spec.cutting.least_gap_mm)
                return false;
            before = ray;
        }
        return true;
    }

    /// Hour lines that run together towards the centre start where they stand clear of their neighbours.
    void part_near_centre() {
        if (!bench_.centre)
            return;
        std::vector<Ray*> hours;
        for (Ray& ray : rays_)
            if (ray.minute % 60 == 0)
                hours.push_back(&ray);
        const double wanted = bench_.spec.cutting.least_gap_mm + bench_.width_of_step(60);
        std::vector<double> start(hours.size(), 0.0);
        for (std::size_t i = 0; i + 1 < hours.size(); ++i) {
            const Point a = hours[i]->direction(), b = hours[i + 1]->direction();
            if (hours[i]->minute == hours[i + 1]->minute || dot(a, b) <= 0)
                continue;
            const double spread = std::abs(cross(a, b));
            const double from = spread > 1e-9 ? wanted / spread : 0.0;
            start[i] = std::max(start[i], from);
            start[i + 1] = std::max(start[i + 1], from);
        }
        for (std::size_t i = 0; i < hours.size(); ++i) {
            Polyline& first = hours[i]->field.front();
            const double begins = distance(*bench_.centre, first.front()),
                         ends = distance(*bench_.centre, first.back());
            if (start[i] > begins && start[i] < 0.8 * ends)
                first.front() = between(first.front(), first.back(), (start[i] - begins) / (ends - begins));
        }
    }

    [[nodiscard]] bool drawn(const Ray& ray) const {
        if (ray.minute % 60 == 0)
            return true;
        return ray.minute % step_of_hour_.at(ray.minute / 60) == 0;
    }

    /// The last `wanted_mm` of a ray's field part.
    [[nodiscard]] static Polyline last_mm(const Polyline& field, double wanted_mm) {
        return end_part(field, std::min(1.0, wanted_mm / distance(field.front(), field.back())));
    }

    void draw_ray(const Ray& ray) {
        if (!drawn(ray))
            return;
        const int step = ray.line->step_min;
        const double width = bench_.width_of_step(step);
        if (step >= 60) {
            for (std::size_t i = 0; i + 1 < ray.field.size(); ++i)
                bench_.add_line(*ray.line, ray.field[i], label_of(*ray.line), width);
            const bool noon_mark_here = noon_mark_ && ray.minute == 720;
            Polyline last = {ray.field.back().front(),
                             ray.tick.empty() || noon_mark_here ? ray.field.back().back() : ray.tick.back()};
            bench_.add_line(*ray.line, last, label_of(*ray.line), width);
            return;
        }
        if (bench_.divides_in_field())
            draw_in_field(ray, width);
        if (ray.tick.empty())
            return; // divisions live in the ring
        const double into_field = step == 30   ? bench_.half_hour_reach_mm()
                                  : step == 15 ? bench_.quarter_hour_reach_mm()
                                               : 0.0;
        const double across = step >= 10 ? 1.0 : step == 5 ? 0.7 : 0.45;
        Polyline mark{between(ray.tick.back(), ray.tick.front(), across), ray.tick.back()};
        if (into_field > 0)
            mark.front() = last_mm(ray.field.back(), into_field).front();
        bench_.add_line(*ray.line, mark, label_of(*ray.line), width);
    }

    /// Between the solstices, where the nodus' shadow runs: half hours whole, finer divisions as short marks at both
    /// ends, as on a scale. Common practice, no source.
    void draw_in_field(const Ray& ray, double width) {
        const int step = ray.line->step_min;
        const std::string label = label_of(*ray.line);
        if (step == 30) {
            for (const Polyline& piece : ray.field)
                bench_.add_line(*ray.line, piece, label, width);
            return;
        }
        const double part = step == 15 ? k_field_mark : step >= 5 ? 0.6 * k_field_mark : 0.4 * k_field_mark;
        const Polyline &first = ray.field.front(), &last = ray.field.back();
        std::vector<Polyline> marks{end_part({first.back(), first.front()}, part), end_part(last, part)};
        drop_scraps(marks, width);
        for (const Polyline& mark : marks)
            bench_.add_line(*ray.line, mark, label, width);
    }

    [[nodiscard]] std::string label_of(const DialLine& line) const {
        const int minute = int(std::lround(line.time_h * 60));
        return minute % 60 == 0 ? numeral(minute / 60, bench_.spec.numerals, bench_.spec.numeral_count)
                                : time_label(line.time_h);
    }

    void draw_clock_lines() {
        for (const DialLine* line : clock_lines_) {
            if (line->step_min < 60)
                continue;
            for (const PlatePolyline& piece : line->pieces)
                for (const Polyline& part : clipped(bench_.to_work(piece), bench_.field()))
                    bench_.add_line(*line, part, label_of(*line), bench_.width_of_step(60));
        }
    }

    /// Where the whole hours point to in the chapter ring, one for each hour.
    [[nodiscard]] std::vector<RingHour> ring_hours() const {
        std::vector<RingHour> made;
        for (std::size_t i = 0; i < rays_.size(); ++i) {
            const Ray& ray = rays_[i];
            if (ray.minute % 60 != 0 || (i > 0 && rays_[i - 1].minute == ray.minute))
                continue;
            Point from = ray.end();
            if (i + 1 < rays_.size() && rays_[i + 1].minute == ray.minute)
                from = between(from, rays_[i + 1].end(), 0.5); // over the middle of the noon gap
            made.push_back({ray.minute / 60, from, ray.direction()});
        }
        for (const DialLine* line : clock_lines_) {
            const auto [from, direction] = clock_numeral_ray(*line);
            if (line->step_min >= 60 && length(direction) > 0)
                made.push_back({int(std::lround(line->time_h)), from, direction});
        }
        return made;
    }

    /// From the curve's middle outward, away from the centre or along the parallel hour lines.
    [[nodiscard]] std::pair<Point, Point> clock_numeral_ray(const DialLine& line) const {
        Point sum{};
        double count = 0;
        for (const PlatePolyline& piece : line.pieces)
            for (const Polyline& part : clipped(bench_.to_work(piece), bench_.field()))
                for (const Point& p : part) {
                    sum = sum + p;
                    count += 1;
                }
        if (count == 0)
            return {{}, {}};
        const Point middle = (1 / count) * sum;
        const Style& style = bench_.delineation.style;
        if (style.centre)
            return {middle, middle - layout::to_work(*style.centre, bench_.foot)};
        return {middle, -1.0 * clockwise_from_up(style.substyle)};
    }

    /// Whether heads point outward: the way in which noon, or else most hours, stand upright for the reader.
    [[nodiscard]] bool heads_out() const {
        double upward = 0;
        for (const Ray& ray : rays_) {
            const double up = dot(ray.direction(), bench_.up);
            if (ray.minute == 720)
                return up >= -1e-9;
            upward += up;
        }
        if (!rays_.empty())
            return upward >= 0;
        const DialLine* best = nullptr;
        for (const DialLine* line : clock_lines_)
            if (!best || std::abs(line->time_h - 12) < std::abs(best->time_h - 12))
                best = line;
        return !best || dot(clock_numeral_ray(*best).second, bench_.up) >= 0;
    }

    /// The noon mark stands in the band of divisions, in the place of the noon tick.
    struct NoonMark {
        Point inner, outer;
        double half_width_mm;
    };

    /// @return nothing where it is not asked for, or would stand too close to its neighbours
    [[nodiscard]] std::optional<NoonMark> noon_mark() const {
        std::vector<const Ray*> noon;
        for (const Ray& ray : rays_)
            if (ray.minute == 720 && !ray.tick.empty())
                noon.push_back(&ray);
        if (noon.empty() || !bench_.spec.noon_mark)
            return std::nullopt;
        const Point inner = between(noon.front()->tick.front(), noon.back()->tick.front(), 0.5);
        const Point outer = between(noon.front()->tick.back(), noon.back()->tick.back(), 0.5);
        double nearest = 1e300;
        for (const Ray& ray : rays_)
            if (ray.minute != 720 && !ray.tick.empty() && drawn(ray))
                nearest = std::min(nearest, std::abs(cross(noon.front()->direction(), ray.tick.front() - inner)));
        const double gap = distance(noon.front()->tick.front(), noon.back()->tick.front());
        const double half_width =
            std::min(0.36 * distance(inner, outer) + gap / 2, nearest - bench_.spec.cutting.least_gap_mm);
        if (half_width < bench_.spec.cutting.line_width_mm)
            return std::nullopt;
        return NoonMark{inner, outer, half_width};
    }

    void draw_noon_mark() {
        if (!noon_mark_)
            return;
        const auto& [inner, outer, half_width] = *noon_mark_;
        const Point side = half_width * left_of(unit(outer - inner)), middle = between(inner, outer, 0.5);
        bench_.add_filled({polyline({inner, middle - side, outer, middle + side}, true)}, "noon mark");
    }

    Bench& bench_;
    std::vector<Ray> rays_;
    std::vector<const DialLine*> clock_lines_;
    std::map<int, int> step_of_hour_;
    std::optional<NoonMark> noon_mark_;
};

} // namespace

void draw_hours(Bench& bench) {
    HourDrawer{bench}.draw();
}

} // namespace dialwright::layout
