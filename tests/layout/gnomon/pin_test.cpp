// SPDX-License-Identifier: MIT
#include "layout/gnomon/pin.hpp"

#include "tests/layout/gnomon/shapes.hpp"

using namespace shapes;

TEST_CASE("a pin's tip stands at the nodus' height", "[gnomon]") {
    for (const double degrees : {20.0, 45.0, 70.0, 90.0})
        for (const bool rounded : {true, false}) {
            PinPlan plan;
            plan.to_face = Angle::degrees(degrees);
            plan.nodus_height_mm = 47;
            plan.diameter_mm = 5;
            plan.plate_thickness_mm = 12;
            plan.rounded = rounded;
            const Pin pin = pin_of(plan);
            const Path& path = outline(pin.part.drawings.front(), "pin");
            check_outline(path);
            CHECK_THAT(longest_at(path, degrees).degrees, WithinAbs(degrees, 0.001));
            const double s = std::sin(degrees * std::numbers::pi / 180), c = std::cos(degrees * std::numbers::pi / 180);
            CHECK_THAT(pin.above_mm, WithinAbs(47 / s, 1e-9));
            CHECK_THAT(pin.nodus.y_mm, WithinAbs(47, 1e-9));
            double top = -1e300, bottom = 1e300;
            for (const Point& p : flattened(path, 1e-4)) {
                top = std::max(top, p.x_mm * c + p.y_mm * s);
                bottom = std::min(bottom, p.x_mm * c + p.y_mm * s);
            }
            CHECK_THAT(top, WithinAbs(47 / s, 1e-3));
            CHECK_THAT(top - bottom, WithinAbs(pin.length_mm, 1e-3));
            CHECK(touching_arcs(path, 1e-9) == (rounded ? 1 : 0));
        }
}

TEST_CASE("a pin that can't be made is refused in plain words", "[gnomon]") {
    using Catch::Matchers::Contains;
    PinPlan plan;
    plan.diameter_mm = 5;
    CHECK_THROWS_WITH(pin_of(plan), Contains("above the plate's face"));
    plan.nodus_height_mm = 2;
    CHECK_THROWS_WITH(pin_of(plan), Contains("too thick to have a round tip"));
    plan.nodus_height_mm = 40;
    plan.plate_thickness_mm = 10;
    plan.embedment_mm = 20;
    CHECK_THROWS_WITH(pin_of(plan), Contains("comes out of the plate"));
    plan.embedment_mm = 0;
    plan.to_face = Angle::degrees(3);
    CHECK_THROWS_WITH(pin_of(plan), Contains("square on the plate"));
}
