// SPDX-License-Identifier: MIT
#include "layout/gnomon/seat.hpp"

#include "layout/gnomon/edge_gnomon.hpp"
#include "tests/layout/gnomon/made_faces.hpp"
#include "tests/layout/gnomon/shapes.hpp"

using namespace shapes;
using made_faces::Made;

TEST_CASE("the plate's own holes and foot are those of the gnomon", "[gnomon]") {
    for (const Made& made : {made_faces::level_round(), made_faces::wall_oblong(), made_faces::southern_octagon()}) {
        const auto seat = seat_of(made.face, made.spec);
        REQUIRE(seat);
        CHECK(seat->centre_on_plate);
        const auto plan = edge_gnomon_plan(made.plan, made.face, made.spec);
        REQUIRE(plan);
        const EdgeGnomon gnomon = edge_gnomon(*plan);
        Drawing placed{"", on_plate(gnomon.part.plate_marks, *seat)};
        for (Mark& one : placed.marks) // the face's drawing is turned for its reader
            one = Placing{made.spec.reader_up, {}, 1.0, 1.0, false}(one);
        const auto of_gnomon = holes(placed.marks), of_plate = holes(made.face.drawing.marks);
        REQUIRE(of_gnomon.size() == 3);
        REQUIRE(of_plate.size() == 3);
        for (std::size_t i = 0; i < 3; ++i) {
            CHECK(distance(of_gnomon[i].first, of_plate[i].first) < 1e-9);
            CHECK_THAT(of_gnomon[i].second, WithinAbs(of_plate[i].second, 1e-9));
        }
        // The gnomon's own tapped holes, in its side view, stand at the same way along the foot.
        for (std::size_t i = 0; i < 3; ++i) {
            bool found = false;
            for (const Mark& m : gnomon.part.drawings.front().marks)
                if (m.name == "tapped hole " + std::to_string(i + 1) + " axis") {
                    found = true;
                    CHECK_THAT(m.paths.front().start.x_mm, WithinAbs(seat->foot_mm * (double(i) + 0.5) / 3, 1e-9));
                }
            CHECK(found);
        }
        const Box foot_of_plate = bounds_of(mark(made.face.drawing, "gnomon's foot")),
                  foot_of_gnomon = bounds_of(mark(placed, "gnomon's foot"));
        CHECK_THAT(foot_of_plate.left_mm, WithinAbs(foot_of_gnomon.left_mm, 1e-9));
        CHECK_THAT(foot_of_plate.top_mm, WithinAbs(foot_of_gnomon.top_mm, 1e-9));
        CHECK_THAT(foot_of_plate.right_mm, WithinAbs(foot_of_gnomon.right_mm, 1e-9));
        CHECK_THAT(foot_of_plate.bottom_mm, WithinAbs(foot_of_gnomon.bottom_mm, 1e-9));
    }
}

TEST_CASE("the nodus stands over the nodus' foot of the plate", "[gnomon]") {
    for (const Made& made : {made_faces::level_round(), made_faces::wall_oblong(), made_faces::great_decliner()}) {
        const auto plan = edge_gnomon_plan(made.plan, made.face, made.spec);
        REQUIRE(plan);
        const auto seat = seat_of(made.face, made.spec);
        const Point on_work = seat->start + plan->nodus_along_mm * seat->along;
        CHECK(distance(on_work, made.face.placement.foot) < 1e-9);
        const EdgeGnomon gnomon = edge_gnomon(*plan);
        CHECK_THAT(gnomon.nodus.y_mm, WithinAbs(made.face.placement.nodus_height_mm, 1e-6));
        check_outline(outline(gnomon.part.drawings.front(), "gnomon"));
    }
    CHECK_FALSE(seat_of(made_faces::great_decliner().face, made_faces::great_decliner().spec)->centre_on_plate);
}

TEST_CASE("a style is long enough for its shadow to reach the border", "[gnomon]") {
    // By another route: the shadow of the style's tip at noon on the solstices, from the Sun's altitude (the level dial's noon
    // line lies along the substyle).
    const Made made = made_faces::level_round();
    const double style_mm = least_style_mm(made.plan, made.face, made.spec);
    const Rings rings = Rings::of(made.spec);
    const auto seat = seat_of(made.face, made.spec);
    const double to_border = distance(seat->start, rings.divisions.exit(seat->start, seat->along)->at);
    const double phi = 52.25 * std::numbers::pi / 180;
    double longest_need = 0;
    for (const double sign : {-1.0, 0.0, 1.0}) {
        const double altitude = std::numbers::pi / 2 - phi + sign * made_faces::year().obliquity().in_radians();
        const double reach = std::cos(phi) + std::sin(phi) / std::tan(altitude); // of a style 1 mm long
        longest_need = std::max(longest_need, to_border / reach);
        CHECK(style_mm * reach >= to_border - 1e-6);
    }
    CHECK_THAT(style_mm, WithinAbs(longest_need, 0.15 * longest_need)); // other hours may need a little more
    CHECK(least_style_mm(made_faces::great_decliner().plan, made_faces::great_decliner().face,
                         made_faces::great_decliner().spec) == 0.0);
}
