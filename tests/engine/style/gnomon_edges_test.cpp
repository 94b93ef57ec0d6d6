// SPDX-License-Identifier: MIT
//
// The gnomon is cast here as what it is: a slab of metal between the plate and the style, in three dimensions. A point
// of the plate is in its shadow if the ray from there to the Sun meets the slab.
#include "engine/style/gnomon_edges.hpp"
#include "engine/surface/plane.hpp"
#include "tests/engine/random_plates.hpp"

#include <catch2/catch.hpp>

using namespace dialwright;

namespace {

constexpr double k_nodus_mm = 100, k_thickness_mm = 8, k_reach_mm = 1e7;

class Slab {
  public:
    Slab(Angle latitude, const Attitude& attitude)
        : latitude_{latitude}, plane_{frame_of(attitude), k_nodus_mm},
          style_{style_of(plane_.frame(), k_nodus_mm, latitude)}, edges_{plane_.frame(), style_, latitude,
                                                                         k_thickness_mm} {}

    [[nodiscard]] const Style& style() const { return style_; }
    [[nodiscard]] const GnomonEdges& edges() const { return edges_; }

    [[nodiscard]] bool shades(PlatePoint p, const SiteDirection& sun) const {
        const PlateFrame& f = plane_.frame();
        const double su = sun.enu.dot(f.u), sv = sun.enu.dot(f.v), sn = sun.enu.dot(f.n);
        const double c = cos(style_.substyle), s = sin(style_.substyle), slope = tan(style_.height);
        const double across = p.u_mm * c - p.v_mm * s, across_rate = su * c - sv * s;
        const double along = p.u_mm * s + p.v_mm * c, along_rate = su * s + sv * c;
        double first = 0, last = 1e300;
        const auto keep_below = [&](double start, double rate, double most) {
            if (rate > 0)
                last = std::min(last, (most - start) / rate);
            else if (rate < 0)
                first = std::max(first, (most - start) / rate);
            else if (start > most)
                last = -1;
        };
        keep_below(across, across_rate, k_thickness_mm / 2);
        keep_below(-across, -across_rate, k_thickness_mm / 2);
        keep_below(along, along_rate, k_reach_mm);
        keep_below(-along, -along_rate, k_reach_mm);
        keep_below(-slope * along, sn - slope * along_rate, k_nodus_mm); // beneath the top
        return first < last;
    }

    /// Whether the shadow of the style's edge at this Sun bounds the slab's shadow: light on one side, none on the other.
    [[nodiscard]] bool bounds(Edge edge, const SkyPlace& sky) const {
        const SiteDirection sun = to_site(sky, latitude_);
        const auto point = plane_.shadow_of_nodus(sun, edges_.shift(edge));
        const auto direction = hour_line_direction(plane_.frame(), style_, latitude_, sky.hour_angle);
        REQUIRE(point);
        REQUIRE(direction);
        const double step = 1e-4;
        const PlatePoint right{point->u_mm + step * cos(*direction), point->v_mm - step * sin(*direction)};
        const PlatePoint left{point->u_mm - step * cos(*direction), point->v_mm + step * sin(*direction)};
        return shades(right, sun) != shades(left, sun);
    }

    [[nodiscard]] bool lit(const SkyPlace& sky) const { return plane_.light(to_site(sky, latitude_)) > 0.02; }

  private:
    Angle latitude_;
    Plane plane_;
    Style style_;
    GnomonEdges edges_;
};

} // namespace

TEST_CASE("The casting edge bounds the shadow of the whole gnomon", "[engine][style]") {
    constexpr int k_seed = 211;
    test::RandomPlates random{k_seed};
    int above = 0, beneath = 0, southern = 0;
    for (int i = 0; i < 40000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const Slab slab{latitude, attitude};
        const SkyPlace sky{random.degrees(-180, 180), random.degrees(-23.44, 23.44)};
        if (slab.style().height > Angle::degrees(85) || !slab.lit(sky))
            continue;
        const Angle from_substyle = (sky.hour_angle - slab.style().substyle_hour_angle).signed_turn();
        if (std::abs(sin(from_substyle * 2.0)) < 0.002) // the two edges' shadows all but meet
            continue;
        CAPTURE(k_seed, i, latitude.in_degrees(), attitude.normal_azimuth.in_degrees(),
                attitude.normal_altitude.in_degrees(), sky.hour_angle.in_degrees(), sky.declination.in_degrees());
        const Edge edge = slab.edges().casting(sky.hour_angle);
        REQUIRE(slab.bounds(edge, sky));
        REQUIRE_FALSE(slab.bounds(edge == Edge::left ? Edge::right : Edge::left, sky));
        ++(abs(from_substyle) < Angle::hours(6) ? above : beneath);
        southern += latitude < Angle{} ? 1 : 0;
    }
    CHECK(above > 5000);
    CHECK(beneath > 500);
    CHECK(southern > 2000);
}

TEST_CASE("A level dial's edges through a summer's day", "[engine][style]") {
    for (const double degrees : {54.0, -33.0}) {
        const Angle latitude = Angle::degrees(degrees);
        const PlateFrame frame = frame_of({});
        const GnomonEdges edges{frame, style_of(frame, k_nodus_mm, latitude), latitude, k_thickness_mm};
        CAPTURE(degrees);
        // The reader looks along the substyle from the centre: towards the elevated pole. In the north the morning's
        // shadow falls on the left, in the south on the right; before 6 and after 18 the other edge bounds it.
        const Edge morning = degrees > 0 ? Edge::left : Edge::right, evening = degrees > 0 ? Edge::right : Edge::left;
        CHECK(edges.casting(Angle::hours(-3)) == morning);
        CHECK(edges.casting(Angle::hours(-7)) == evening);
        CHECK(edges.casting(Angle::hours(3)) == evening);
        CHECK(edges.casting(Angle::hours(7)) == morning);
        // The 6 o'clock shadows of both edges fall on one line, square to the substyle; it starts on its own side.
        CHECK(edges.casting(Angle::hours(-6)) == morning);
        CHECK(edges.casting(Angle::hours(6)) == evening);
        CHECK(edges.both_cast(Angle{}));
        CHECK_FALSE(edges.both_cast(Angle::minutes_of_time(1)));
    }
}

TEST_CASE("At 6 h from the substyle the line starts on the side to which it runs", "[engine][style]") {
    constexpr int k_seed = 212;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 2000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const PlateFrame frame = frame_of(attitude);
        const Style style = style_of(frame, k_nodus_mm, latitude);
        if (style.height > Angle::degrees(89) || style.height < Angle::degrees(1e-3))
            continue;
        const GnomonEdges edges{frame, style, latitude, k_thickness_mm};
        CAPTURE(k_seed, i, latitude.in_degrees(), attitude.normal_azimuth.in_degrees(),
                attitude.normal_altitude.in_degrees());
        for (const double hours : {-6.0, 6.0}) {
            const Angle hour_angle = style.substyle_hour_angle + Angle::hours(hours);
            const auto direction = hour_line_direction(frame, style, latitude, hour_angle);
            REQUIRE(direction);
            const PlatePoint start = edges.shift(edges.casting(hour_angle));
            REQUIRE(start.u_mm * sin(*direction) + start.v_mm * cos(*direction) > 0);
        }
    }
}

TEST_CASE("Both edges cast in the style's own plane, as far apart as the gnomon is thick", "[engine][style]") {
    constexpr int k_seed = 213;
    test::RandomPlates random{k_seed};
    for (int i = 0; i < 2000; ++i) {
        const auto [latitude, attitude] = random.plate();
        const Slab slab{latitude, attitude};
        if (slab.style().height > Angle::degrees(85))
            continue;
        const GnomonEdges& edges = slab.edges();
        const PlatePoint left = edges.shift(Edge::left), right = edges.shift(Edge::right);
        CAPTURE(k_seed, i);
        REQUIRE(std::abs(std::hypot(right.u_mm - left.u_mm, right.v_mm - left.v_mm) - k_thickness_mm) < 1e-12);
        const SkyPlace noon{slab.style().substyle_hour_angle, random.degrees(-23.44, 23.44)};
        REQUIRE(edges.both_cast(noon.hour_angle));
        if (!slab.lit(noon))
            continue;
        REQUIRE(slab.bounds(Edge::left, noon));
        REQUIRE(slab.bounds(Edge::right, noon));
    }
}
