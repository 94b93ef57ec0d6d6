// SPDX-License-Identifier: MIT
#include "layout/setting_out/setting_out.hpp"

#include "tests/layout/gnomon/made_faces.hpp"
#include "tests/layout/gnomon/shapes.hpp"

using namespace shapes;
using made_faces::Made;

namespace {

/// The point of the work as the reader sees it: half a turn for the southern dial, else as it is.
Point seen(const Made& made, PlatePoint p) {
    const Point at{made.face.placement.foot.x_mm + p.u_mm, made.face.placement.foot.y_mm + p.v_mm};
    return made.spec.reader_up == Angle{} ? at : Point{-at.x_mm, -at.y_mm};
}

/// Where a line leaves an upright rectangle of the plate's size, by its four sides' equations.
Point leaves_rectangle(Point a, Point b, double w, double h) {
    double best = 1e300;
    const Point d = b - a;
    for (const auto& [position, slope, limit] : {std::tuple{a.x_mm, d.x_mm, w / 2}, std::tuple{a.y_mm, d.y_mm, h / 2}})
        if (slope != 0) {
            const double t = ((slope > 0 ? limit : -limit) - position) / slope;
            if (t > 0)
                best = std::min(best, t);
        }
    return a + best * d;
}

const SettingOutPoint* find(const SettingOut& out, const std::string& line, const std::string& what) {
    for (const SettingOutPoint& p : out.points)
        if (p.line == line && p.what.starts_with(what))
            return &p;
    return nullptr;
}

} // namespace

TEST_CASE("hour lines meet an oblong plate's edge where another reckoning has them", "[setting out]") {
    const Made made = made_faces::wall_oblong(0);
    const SettingOut out = set_out(made.face, made.spec, {});
    CHECK(out.datum == "lower left corner");
    REQUIRE(out.poles.size() == 1);
    CHECK(out.poles[0].name == "dial's centre");
    CHECK(out.zero_line == "straight down");
    int checked = 0;
    const Point corner{-250, -310};
    for (const DrawnLine& line : made.face.lines) {
        if (line.family != Family::hour || line.step_min < 60)
            continue;
        const Point a = seen(made, line.points.front()), b = seen(made, line.points.back());
        const Point at = leaves_rectangle(a, b, 500, 620);
        const auto* p = find(out, "hour line " + line.label, "meets the ");
        REQUIRE(p);
        CHECK(distance(p->at, at - corner) < 1e-6);
        REQUIRE(p->border);
        const bool level_side = std::abs(std::abs(at.y_mm) - 310) < 1e-6;
        CHECK_THAT(p->border->along_mm, WithinAbs(level_side ? at.x_mm + 250 : at.y_mm + 310, 1e-6));
        CHECK(p->border->side ==
              (level_side ? (at.y_mm > 0 ? "top edge" : "bottom edge") : (at.x_mm > 0 ? "right edge" : "left edge")));
        CHECK(p->border->from == (level_side ? (at.y_mm > 0 ? "upper left corner" : "lower left corner")
                                             : (at.x_mm > 0 ? "lower right corner" : "lower left corner")));
        const std::string sentence = "the " + line.label + " line meets the " + p->border->side + " ";
        CHECK(std::any_of(out.checks.begin(), out.checks.end(),
                          [&](const std::string& s) { return s.starts_with(sentence); }));
        ++checked;
    }
    CHECK(checked >= 8);
    CHECK(out.checks.front() == "both diagonals of the edge measure 796.5 mm");
}

TEST_CASE("radius, angle and chord lead to the same point as x and y", "[setting out]") {
    for (const Made& made : {made_faces::level_round(), made_faces::wall_oblong(), made_faces::southern_octagon(),
                             made_faces::great_decliner()}) {
        const SettingOut out = set_out(made.face, made.spec, {});
        const bool down = out.zero_line.starts_with("straight down");
        REQUIRE(out.points.size() > 20);
        for (const SettingOutPoint& p : out.points) {
            const double a = p.angle.in_radians(), zero = down ? -1.0 : 1.0;
            // Clockwise from straight up or straight down.
            const auto pole = std::find_if(out.poles.begin(), out.poles.end(),
                                           [&](const Datum::NamedPoint& named) { return named.name == p.pole; });
            REQUIRE(pole != out.poles.end());
            const Point by_angle{pole->at.x_mm + zero * p.radius_mm * std::sin(a),
                                 pole->at.y_mm + zero * p.radius_mm * std::cos(a)};
            CHECK(distance(by_angle, p.at) < 1e-9);
            // The chord joins two points of its circle.
            const double r = out.chord_radius_mm;
            const Point on_zero{0, zero * r}, on_ray{zero * r * std::sin(a), zero * r * std::cos(a)};
            CHECK_THAT(p.chord_mm, WithinAbs(distance(on_zero, on_ray), 1e-9));
        }
    }
}

TEST_CASE("each hour line has one angle all along, from the centre of its own half-dial", "[setting out]") {
    // Source: the classical forms (Waugh, Sundials: Their Theory and Construction, 1973; from memory). Level: tan X = sin φ tan H.
    // Upright: cot X = (cos d cot H + sin d sin φ)/cos φ, d west of south positive.
    const double rad = std::numbers::pi / 180, phi = 52.25 * rad, d = -23 * rad;
    const auto level = made_faces::level_round(), wall = made_faces::wall_oblong();
    for (const Made* made : {&level, &wall}) {
        const SettingOut out = set_out(made->face, made->spec, {});
        REQUIRE(out.poles.size() == 3);
        CHECK_THAT(distance(out.poles[1].at, out.poles[2].at), WithinAbs(6, 1e-9));
        CHECK(out.poles[1].at.x_mm < out.poles[2].at.x_mm);
        int checked = 0;
        for (const DrawnLine& line : made->face.lines) {
            if (line.family != Family::hour || line.step_min < 60 || line.time_h >= 12)
                continue;
            const double h = (line.time_h - 12) * 15 * rad;
            const double wanted =
                made == &level ? std::atan2(std::sin(phi) * std::sin(h), std::cos(h)) / rad
                               : -std::atan2(std::cos(phi) * std::sin(h),
                                             std::cos(d) * std::cos(h) + std::sin(d) * std::sin(phi) * std::sin(h)) /
                                     rad;
            for (const char* what : {"inner end", "outer end", "meets"}) {
                const auto* p = find(out, "hour line " + line.label, what);
                if (!p || (made == &level && line.time_h < 6))
                    continue; // IV and V stand twice on a level dial
                INFO(line.label << " " << what);
                CHECK_THAT(p->angle.in_degrees(), WithinAbs(wanted, 1e-6));
                ++checked;
            }
        }
        CHECK(checked > 14);
    }
}

TEST_CASE("on a round plate lines are measured by chords from the top mark", "[setting out]") {
    const Made made = made_faces::level_round();
    const SettingOut out = set_out(made.face, made.spec, {});
    CHECK(out.datum == "middle of the plate");
    int checked = 0;
    for (const SettingOutPoint& p : out.points)
        if (p.what.starts_with("meets")) {
            REQUIRE(p.border);
            CHECK_THAT(length(p.at), WithinAbs(210, 1e-6));
            CHECK_THAT(p.border->along_mm, WithinAbs(std::hypot(p.at.x_mm, p.at.y_mm - 210), 1e-6));
            CHECK(p.border->side == "edge");
            CHECK(p.border->way == (p.at.x_mm >= 0 ? "right" : "left"));
            ++checked;
        }
    CHECK(checked > 20);
    CHECK(out.checks.front() == "the edge is 420.0 mm across, every way");
}

TEST_CASE("an octagon's sides are lettered clockwise from the lower left", "[setting out]") {
    const Made made = made_faces::southern_octagon();
    const SettingOut out = set_out(made.face, made.spec, {});
    CHECK(out.datum == "corner A");
    int checked = 0;
    const double side = 400 * std::tan(std::numbers::pi / 8);
    for (const SettingOutPoint& p : out.points)
        if (p.border && p.what.starts_with("meets")) {
            CHECK(p.border->side.size() == 7); // "side BC"
            CHECK(p.border->along_mm <= side + 1e-6);
            ++checked;
        }
    CHECK(checked > 10);
}

TEST_CASE("date lines are given where they cross the hour lines", "[setting out]") {
    const Made made = made_faces::level_round(0);
    const SettingOut out = set_out(made.face, made.spec, {});
    // On the noon line of a level dial a date's shadow stands from the centre by h/tan φ + h/tan(altitude), the style's foot
    // and the nodus' own shadow.
    const double h = made.face.placement.nodus_height_mm, phi = 52.25 * std::numbers::pi / 180;
    int checked = 0;
    for (const auto& [label, part] : {std::pair{"21 Jun", 1.0}, {"equinox", 0.0}, {"21 Dec", -1.0}}) {
        const double altitude = std::numbers::pi / 2 - phi + part * made_faces::year().obliquity().in_radians();
        if (const auto* p = find(out, std::string{"date line "} + label, "on hour line XII");
            p && p->what == "on hour line XII") {
            CHECK_THAT(p->radius_mm,
                       WithinAbs(h / std::tan(phi) + h / std::tan(altitude), 0.02)); // the curve is drawn to 0.01 mm
            ++checked;
        }
    }
    CHECK(checked >= 2);
}

TEST_CASE("every point of the setting out lies where the face's drawing has it", "[setting out]") {
    for (const Made& made : {made_faces::wall_oblong(), made_faces::great_decliner(), made_faces::southern_octagon()}) {
        const SettingOut out = set_out(made.face, made.spec, {});
        // The drawing's own engraved lines, as they are turned for the reader, named as the setting out names them.
        std::vector<std::pair<std::string, std::vector<Point>>> drawn;
        Point low_left{1e300, 1e300};
        for (const Mark& m : made.face.drawing.marks) {
            for (const Path& path : m.paths)
                if (m.layer == Layer::engrave && !m.filled)
                    drawn.emplace_back(m.name, flattened(path, 0.001));
            if (m.name == "plate's edge")
                for (const Point& p : flattened(m.paths.front(), 0.01))
                    if (p.x_mm + p.y_mm < low_left.x_mm + low_left.y_mm - 1e-6 ||
                        (std::abs(p.x_mm + p.y_mm - low_left.x_mm - low_left.y_mm) < 1e-6 && p.y_mm < low_left.y_mm))
                        low_left = p;
        }
        for (const SettingOutPoint& p : out.points) {
            if (p.what.starts_with("meets"))
                continue;
            double off = 1e300;
            for (const auto& [name, points] : drawn)
                if (name == p.line)
                    for (std::size_t i = 0; i + 1 < points.size(); ++i) {
                        const Point a = points[i], d = points[i + 1] - a, at = low_left + p.at;
                        const double part = std::clamp(dot(at - a, d) / dot(d, d), 0.0, 1.0);
                        off = std::min(off, distance(at, a + part * d));
                    }
            INFO(p.line << ", " << p.what);
            CHECK(off < 1e-6);
        }
        const auto drilled = holes(made.face.drawing.marks);
        REQUIRE(out.holes.size() == drilled.size());
        for (std::size_t i = 0; i < drilled.size(); ++i) {
            CHECK(distance(out.holes[i].at + low_left, drilled[i].first) < 1e-9);
            CHECK_THAT(out.holes[i].diameter_mm, WithinAbs(drilled[i].second, 1e-9));
        }
    }
}

TEST_CASE("setting out is written in millimetres to a tenth or in sixty-fourths", "[setting out]") {
    const Made made = made_faces::wall_oblong();
    SettingOutOptions options;
    const std::string metric = csv_of(set_out(made.face, made.spec, options));
    CHECK(metric.starts_with("line,point,x_mm,y_mm,border,from,along_mm,pole,radius_mm,angle_deg,angle,chord_mm,"
                             "diameter_mm\ndatum,lower left corner,0.0,0.0,"));
    const auto lines = std::count(metric.begin(), metric.end(), '\n');
    options.inches = true;
    const SettingOut out = set_out(made.face, made.spec, options);
    const std::string inches = csv_of(out);
    CHECK(inches.starts_with("line,point,x_in,y_in,"));
    CHECK(std::count(inches.begin(), inches.end(), '\n') == lines);
    CHECK(std::remainder(out.chord_radius_mm, 25.4) == Approx(0).margin(1e-9));
    const SettingOutTable table = table_of_lines(out), drill = table_of_holes(out);
    CHECK(table.rows.size() == out.points.size());
    CHECK(drill.rows.size() == 3);
    for (const auto& row : table.rows)
        CHECK(row.size() == table.heading.size());
    for (const auto& row : drill.rows)
        CHECK(row.size() == drill.heading.size());
    options.divisions = false;
    CHECK(set_out(made.face, made.spec, options).points.size() < out.points.size());
}
