// SPDX-License-Identifier: MIT
#include "layout/setting_out/setting_out.hpp"

#include "layout/plate/family_words.hpp"
#include "layout/plate/points.hpp"
#include "layout/text/figures.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

Outline turned(const Outline& outline, const Placing& turn) {
    if (outline.is_round())
        return Outline::round(turn(outline.centre()), outline.radius_mm());
    std::vector<Point> corners;
    for (const Point& corner : outline.corners())
        corners.push_back(turn(corner));
    return Outline::polygon(std::move(corners));
}

Datum datum_of(const FaceSpec& spec, MeasuredBorder which, const Placing& turn) {
    const Rings rings = Rings::of(spec);
    switch (which) {
    case MeasuredBorder::outer_border:
        return {turned(rings.outer, turn), "border"};
    case MeasuredBorder::field:
        return {turned(rings.divisions, turn), "inner border"};
    case MeasuredBorder::plate_edge:
        break;
    }
    return {turned(rings.edge, turn), "edge"};
}

/// Where two stretches cross; their ends count.
std::optional<Point> crossing(Point a, Point b, Point c, Point d) {
    const double turn = cross(b - a, d - c);
    if (turn == 0)
        return std::nullopt;
    const double on_first = cross(c - a, d - c) / turn, on_second = cross(c - a, b - a) / turn;
    constexpr double k_end = 1e-9;
    const auto within = [](double part) { return part >= -k_end && part <= 1 + k_end; };
    return within(on_first) && within(on_second) ? std::optional{between(a, b, on_first)} : std::nullopt;
}

struct SeenLine {
    const DrawnLine* line;
    std::string name;
    Polyline points; ///< as the reader sees the plate; a straight one from the centre outward
    [[nodiscard]] bool straight() const { return points.size() == 2 && line->family != Family::date; }
    [[nodiscard]] bool whole_hour() const {
        return line->family == Family::hour && line->set == 0 && line->step_min >= 60;
    }
};

class Setter {
  public:
    Setter(const Face& face, const FaceSpec& spec, const SettingOutOptions& options)
        : face_{face}, options_{options}, spec_up_{spec.reader_up}, turn_{spec.reader_up, {}, 1.0, 1.0, false},
          datum_{datum_of(spec, options.border, turn_)} {
        lay_poles(spec);
        gather_lines();
        lay_zero_line();
    }

    SettingOut made() {
        for (const SeenLine& line : lines_) {
            if (line.straight())
                add_straight(line);
            else
                add_curve(line);
        }
        add_holes(face_.drawing.marks);
        add_holes(options_.more_holes);
        add_checks();
        return std::move(out_);
    }

  private:
    [[nodiscard]] Point seen(PlatePoint p) const { return turn_(to_work(p, face_.placement.foot)); }

    /// The centre; and where the gnomon is thick, the centres of the two half-dials, half its thickness to either side.
    void lay_poles(const FaceSpec& spec) {
        const Style& style = face_.delineation.style;
        radial_ = style.centre && has_style(spec.gnomon.kind) && datum_.border().contains(seen(*style.centre));
        const Point pole = radial_ ? seen(*style.centre) : seen({});
        poles_ = {{radial_ ? "dial's centre" : "nodus' foot", pole}};
        if (radial_ && spec.gnomon.kind == GnomonKind::edge && spec.gnomon.thickness_mm > 0 &&
            style.height < Angle::degrees(89.99)) {
            const Point side = spec.gnomon.thickness_mm / 2 * left_of(clockwise_from_up(style.substyle - spec_up_));
            const bool level = std::abs(side.x_mm) > 0.2 * std::abs(side.y_mm);
            const bool first = level ? side.x_mm < 0 : side.y_mm > 0;
            poles_.push_back({level ? "left centre" : "upper centre", first ? pole + side : pole - side});
            poles_.push_back({level ? "right centre" : "lower centre", first ? pole - side : pole + side});
        }
        out_.inches = options_.inches;
        out_.datum = datum_.name_of_origin();
        for (const Datum::NamedPoint& at : poles_)
            out_.poles.push_back({at.name, at.at - datum_.origin()});
    }

    /// The centre of its own half-dial that a straight line runs from: of those on the line, the nearest to it.
    [[nodiscard]] std::size_t pole_of(const SeenLine& line) const {
        std::size_t own = 0;
        double nearest = 1e300;
        const Point along = unit(line.points.back() - line.points.front());
        for (std::size_t i = 1; line.straight() && i < poles_.size(); ++i)
            if (std::abs(cross(along, poles_[i].at - line.points.front())) < 1e-6)
                if (const double off = distance(poles_[i].at, line.points.front()); off < nearest) {
                    nearest = off;
                    own = i;
                }
        return own;
    }

    /// All pieces of a line run one way: from the dial's centre, on the plate or off it; where it has none, along the substyle.
    [[nodiscard]] bool runs_inward(const SeenLine& line) const {
        const Style& style = face_.delineation.style;
        const Point a = line.points.front(), b = line.points.back();
        if (!style.centre)
            return dot(b - a, clockwise_from_up(style.substyle - spec_up_)) < 0;
        const Point centre = radial_ ? poles_[0].at : seen(*style.centre);
        return distance(a, centre) > distance(b, centre);
    }

    [[nodiscard]] Point far_end(const SeenLine& line) const {
        const Point a = line.points.front(), b = line.points.back();
        return line.straight() && distance(a, poles_[0].at) > distance(b, poles_[0].at) ? a : b;
    }

    void gather_lines() {
        for (const DrawnLine& line : face_.lines) {
            if (line.points.size() < 2 || (!options_.divisions && is_hour(line.family) && line.step_min < 60))
                continue;
            SeenLine made{&line, line_name(line.family, line.time, line.set, line.label), {}};
            for (const PlatePoint& p : line.points)
                made.points.push_back(seen(p));
            if (made.straight() && runs_inward(made))
                std::reverse(made.points.begin(), made.points.end());
            lines_.push_back(std::move(made));
        }
    }

    /// Up or down, whichever way the lines run; and the circle that dividers step along.
    void lay_zero_line() {
        double up = 0, nearest = 1e300;
        for (const SeenLine& line : lines_) {
            up += far_end(line).y_mm - poles_[0].at.y_mm;
            if (line.whole_hour())
                nearest = std::min(nearest, distance(far_end(line), poles_[0].at));
        }
        zero_ = {0, up >= 0 ? 1.0 : -1.0};
        out_.zero_line = up >= 0 ? "straight up" : "straight down";
        out_.chord_radius_mm = options_.chord_radius_mm > 0 ? options_.chord_radius_mm : round_radius(nearest);
    }

    [[nodiscard]] double round_radius(double most_mm) const {
        const double unit_mm = options_.inches ? 25.4 : 25.0;
        double found = unit_mm;
        for (const double count : {2.0, 3.0, 4.0, 6.0, 8.0, 10.0, 12.0, 16.0, 20.0, 24.0, 32.0, 40.0, 80.0})
            if (count * unit_mm <= most_mm && most_mm < 1e300)
                found = count * unit_mm;
        return found;
    }

    [[nodiscard]] SettingOutPoint point(std::string line, std::string what, Point at, std::size_t pole) const {
        const Point ray = at - poles_[pole].at;
        SettingOutPoint made{
            std::move(line), std::move(what), at - datum_.origin(), {}, poles_[pole].name, length(ray), {}, 0.0, 0.0};
        if (made.radius_mm > 1e-9)
            made.angle = (-arc_tangent(cross(zero_, ray), dot(zero_, ray))).signed_turn();
        made.chord_mm = 2 * out_.chord_radius_mm * std::abs(sin(made.angle / 2));
        if (datum_.border().distance_mm(at) < 1e-6)
            made.border = datum_.place_of(at);
        return made;
    }

    /// Whether another piece of the same line, broken for a label or the like, lies on its ray: farther out, or nearer.
    [[nodiscard]] bool has_piece(const SeenLine& line, bool outward) const {
        const Point a = line.points.front(), along = unit(line.points.back() - a);
        return std::any_of(lines_.begin(), lines_.end(), [&](const SeenLine& other) {
            if (&other == &line || other.name != line.name || !other.straight())
                return false;
            const Point from = other.points.front() - a, to = other.points.back() - a;
            if (std::abs(cross(along, from)) > 1e-6 || std::abs(cross(along, to)) > 1e-6 || dot(along, to - from) < 0)
                return false;
            return (dot(along, from) > 0) == outward;
        });
    }

    void add_straight(const SeenLine& line) {
        const Point a = line.points.front(), b = line.points.back();
        const bool first = !has_piece(line, false), last = !has_piece(line, true);
        if (!radial_ && first)
            add_border_point(line, b, a);
        out_.points.push_back(point(line.name, first ? "inner end" : "goes on", a, pole_of(line)));
        out_.points.push_back(point(line.name, last ? "outer end" : "breaks off", b, pole_of(line)));
        if (last)
            add_border_point(line, a, b);
    }

    /// Where the line, carried on from b, leaves the measured border.
    void add_border_point(const SeenLine& line, Point a, Point b) {
        const auto exit = datum_.border().exit(a, b - a);
        if (!exit || dot(exit->at - b, b - a) < 0)
            return; // the drawn end lies beyond the measured border already
        SettingOutPoint made = point(line.name, "", exit->at, pole_of(line));
        made.border = datum_.place_of(exit->at);
        made.what = "meets the " + made.border->side;
        out_.points.push_back(std::move(made));
    }

    void add_curve(const SeenLine& line) {
        out_.points.push_back(point(line.name, "first end", line.points.front(), 0));
        for (const SeenLine& hour : lines_)
            if (hour.whole_hour() && hour.straight())
                for (std::size_t i = 0; i + 1 < line.points.size(); ++i)
                    if (const auto at =
                            crossing(line.points[i], line.points[i + 1], hour.points.front(), hour.points.back())) {
                        out_.points.push_back(point(line.name, "on " + hour.name, *at, pole_of(hour)));
                        break; // a curve crosses a ray from the centre once
                    }
        out_.points.push_back(point(line.name, "last end", line.points.back(), 0));
    }

    void add_holes(const std::vector<Mark>& marks) {
        for (const Mark& mark : marks) {
            if (mark.layer != Layer::drill || mark.paths.size() != 1 || mark.paths.front().pieces.size() != 1 ||
                !mark.paths.front().closed)
                continue;
            if (const auto* arc = std::get_if<ArcTo>(&mark.paths.front().pieces.front())) {
                SettingOutPoint made = point(mark.name, "drill", arc->centre, 0);
                made.diameter_mm = 2 * distance(arc->centre, mark.paths.front().start);
                out_.holes.push_back(std::move(made));
            }
        }
    }

    void add_checks() {
        out_.checks = datum_.checks(options_.inches);
        const auto say = [&](double mm) { return say_length(mm, options_.inches); };
        const auto marks = datum_.pair_of_marks();
        for (const SettingOutPoint& p : out_.points)
            if (p.border && p.what.starts_with("meets the "))
                if (const auto* seen_line = line_named(p.line); seen_line && seen_line->whole_hour())
                    out_.checks.push_back(fmt::format("the {} meets the {}", name_in_checks(*seen_line, p.pole),
                                                      say_place(*p.border, options_.inches)));
        for (const SeenLine& line : lines_)
            if (line.whole_hour() && line.straight() && !has_piece(line, true))
                out_.checks.push_back(fmt::format("the outer end of the {} is {} from the {} and {} from the {}",
                                                  name_in_checks(line, poles_[pole_of(line)].name),
                                                  say(distance(line.points.back(), marks[0].at)), marks[0].name,
                                                  say(distance(line.points.back(), marks[1].at)), marks[1].name));
    }

    /// An hour that runs from both centres, as noon does with a thick gnomon, is called by the centre too.
    [[nodiscard]] std::string name_in_checks(const SeenLine& line, const std::string& pole) const {
        const bool twice = std::any_of(lines_.begin(), lines_.end(), [&](const SeenLine& other) {
            return other.name == line.name && other.straight() && poles_[pole_of(other)].name != pole;
        });
        return line.line->label + " line" + (twice ? " from the " + pole : "");
    }

    [[nodiscard]] const SeenLine* line_named(const std::string& name) const {
        const auto found =
            std::find_if(lines_.begin(), lines_.end(), [&](const SeenLine& line) { return line.name == name; });
        return found == lines_.end() ? nullptr : &*found;
    }

    const Face& face_;
    const SettingOutOptions& options_;
    Angle spec_up_;
    Placing turn_;
    Datum datum_;
    bool radial_ = false;
    std::vector<Datum::NamedPoint> poles_;
    Point zero_;
    std::vector<SeenLine> lines_;
    SettingOut out_;
};

} // namespace

SettingOut set_out(const Face& face, const FaceSpec& spec, const SettingOutOptions& options) {
    return Setter{face, spec, options}.made();
}

} // namespace dialwright::layout
