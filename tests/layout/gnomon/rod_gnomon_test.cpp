// SPDX-License-Identifier: MIT
#include "layout/gnomon/rod_gnomon.hpp"

#include "tests/layout/gnomon/shapes.hpp"

using namespace shapes;

namespace {

RodPlan plan_of(double degrees) {
    RodPlan plan;
    plan.style_height = Angle::degrees(degrees);
    plan.nodus_height_mm = 90;
    plan.nodus_along_mm = degrees > 89.9 ? 0.0 : 90 / tan(plan.style_height);
    plan.diameter_mm = 8;
    plan.plate_thickness_mm = 25;
    return plan;
}

} // namespace

TEST_CASE("a rod's axis is the style, its tip the nodus", "[gnomon]") {
    for (const double degrees : {6.0, 20.0, 38.25, 52.0, 75.0, 88.0}) {
        const RodGnomon rod = rod_gnomon(plan_of(degrees));
        const Path& path = outline(rod.part.drawings.front(), "rod");
        check_outline(path);
        const Stretch side = longest_at(path, degrees);
        CHECK_THAT(side.degrees, WithinAbs(degrees, 0.001));
        const double s = std::sin(degrees * std::numbers::pi / 180), c = std::cos(degrees * std::numbers::pi / 180);
        // Farthest along the style stands the nodus; both sides are half a diameter from the axis through the centre.
        double reach = 0;
        for (const Point& p : flattened(path, 1e-4)) {
            reach = std::max(reach, p.x_mm * c + p.y_mm * s);
            CHECK(std::abs(p.x_mm * s - p.y_mm * c) <= 4 + 1e-9);
        }
        CHECK_THAT(reach, WithinAbs(90 / s, 1e-3));
        CHECK_THAT(std::abs(side.from.x_mm * s - side.from.y_mm * c), WithinAbs(4, 1e-9));
        CHECK_THAT(rod.length_mm, WithinAbs(rod.exposed_mm + rod.socket_mm, 1e-12));
        CHECK(rod.socket_mm <= 25 / s + 1e-9);
        REQUIRE(holes(rod.part.plate_marks).size() == 1);
        CHECK(distance(holes(rod.part.plate_marks)[0].first, {}) < 1e-9);
    }
}

TEST_CASE("the drilling jig leads the drill to the centre at the style height", "[gnomon]") {
    for (const double degrees : {5.0, 12.0, 38.25, 52.0, 80.0, 89.0}) {
        const Drawing jig = drilling_jig(Angle::degrees(degrees), 8, 0, 0);
        check_outline(outline(jig, "jig, from the side"));
        check_outline(outline(jig, "jig, footprint"));
        const Mark& bore = mark(jig, "bore");
        REQUIRE(bore.paths.size() == 2);
        const double s = std::sin(degrees * std::numbers::pi / 180), c = std::cos(degrees * std::numbers::pi / 180);
        for (const Path& side : bore.paths) {
            CHECK_THAT(longest_at(side, degrees).degrees, WithinAbs(degrees, 0.001));
            CHECK_THAT(std::abs(side.start.x_mm * s - side.start.y_mm * c), WithinAbs(4, 1e-9));
            CHECK_THAT(side.start.y_mm, WithinAbs(0, 1e-9));
            // All of the bore's mouth stands on the footprint, with 6 mm of wall round the bore.
            const Box foot = bounds_of(outline(jig, "jig, footprint"));
            CHECK((side.start.x_mm - foot.left_mm) * s >= 6 - 1e-9);
            CHECK((foot.right_mm - side.start.x_mm) * s >= 6 - 1e-9);
        }
        // The face that the drill enters is square to it.
        CHECK(longest_at(outline(jig, "jig, from the side"), degrees + 90).length_mm > 16);
        CHECK_THAT(longest_at(outline(jig, "jig, from the side"), degrees + 90).degrees,
                   WithinAbs(std::fmod(degrees + 90, 180), 0.001));
        const Box mouth = bounds_of(mark(jig, "bore's mouth").paths.front());
        CHECK_THAT(mouth.width_mm(), WithinAbs(8 / s, 1e-4));
        CHECK_THAT(mouth.height_mm(), WithinAbs(8, 1e-4));
    }
}

TEST_CASE("a strut meets the underside of the rod", "[gnomon]") {
    RodPlan plan = plan_of(40);
    plan.strut_at_mm = 70;
    const RodGnomon rod = rod_gnomon(plan);
    REQUIRE(rod.struts.size() == 1);
    const double s = std::sin(40 * std::numbers::pi / 180), c = std::cos(40 * std::numbers::pi / 180);
    const Stretch head = longest_at(outline(rod.part.drawings.front(), "strut 1"), 40);
    for (const Point p : {head.from, head.to})
        CHECK_THAT(p.x_mm * s - p.y_mm * c, WithinAbs(4, 1e-9));
    CHECK_THAT(rod.struts[0].above_mm, WithinAbs((70 * s - 4) / c, 1e-9));
    const auto drilled = holes(rod.part.plate_marks);
    REQUIRE(drilled.size() == 2);
    CHECK(distance(drilled[1].first, {70, 0}) < 1e-9);
}

TEST_CASE("a rod whose centre is off the plate stands on two struts", "[gnomon]") {
    for (const double degrees : {0.0, 4.0, 15.0}) {
        RodPlan plan = plan_of(40);
        plan.style_height = Angle::degrees(degrees);
        plan.nodus_along_mm = 0;
        const RodGnomon rod = rod_gnomon(plan);
        CHECK(rod.struts.size() == 2);
        CHECK(rod.part.drawings.size() == 1);
        check_outline(outline(rod.part.drawings.front(), "rod"));
        CHECK(touching_arcs(outline(rod.part.drawings.front(), "rod"), 1e-9) == 2);
        CHECK_THAT(longest_at(outline(rod.part.drawings.front(), "rod"), degrees).degrees, WithinAbs(degrees, 0.001));
    }
}

TEST_CASE("a rod that can't be made is refused in plain words", "[gnomon]") {
    using Catch::Matchers::Contains;
    RodPlan plan = plan_of(40);
    plan.exposed_mm = 100;
    CHECK_THROWS_WITH(rod_gnomon(plan), Contains("the rod stands out 100.0 mm"));
    plan = plan_of(40);
    plan.socket_mm = 60;
    CHECK_THROWS_WITH(rod_gnomon(plan), Contains("leaves the plate"));
    plan.socket_mm = 37; // of 38.9 through
    CHECK_THROWS_WITH(rod_gnomon(plan), Contains("breaks out behind the plate"));
    plan = plan_of(4);
    CHECK_THROWS_WITH(rod_gnomon(plan), Contains("use an edge gnomon"));
    plan = plan_of(40);
    plan.bead_mm = 6;
    CHECK_THROWS_WITH(rod_gnomon(plan), Contains("does not show"));
    plan = plan_of(40);
    plan.strut_at_mm = 300;
    CHECK_THROWS_WITH(rod_gnomon(plan), Contains("stands clear of the rod"));
}
