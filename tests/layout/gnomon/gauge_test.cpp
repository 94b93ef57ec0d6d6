// SPDX-License-Identifier: MIT
#include "layout/gnomon/gauge.hpp"

#include "tests/layout/gnomon/shapes.hpp"

#include <random>

using namespace shapes;

namespace {

/// Every point of the lettering lies inside the outline, `clear_mm` from it.
void check_lettering_inside(const Drawing& drawing, double clear_mm) {
    const auto ring = flattened(outline(drawing, "gauge"), 0.01);
    int letters = 0;
    for (const Mark& m : drawing.marks)
        if (m.layer == Layer::engrave)
            for (const Path& path : m.paths)
                for (const Point& p : flattened(path, 0.05)) {
                    ++letters;
                    bool inside = false;
                    for (std::size_t i = 0; i + 1 < ring.size(); ++i)
                        if ((ring[i].y_mm > p.y_mm) != (ring[i + 1].y_mm > p.y_mm) &&
                            p.x_mm < ring[i].x_mm + (p.y_mm - ring[i].y_mm) * (ring[i + 1].x_mm - ring[i].x_mm) /
                                                        (ring[i + 1].y_mm - ring[i].y_mm))
                            inside = !inside;
                    if (!inside)
                        FAIL("lettering outside the gauge at " << p.x_mm << ", " << p.y_mm);
                    for (std::size_t i = 0; i + 1 < ring.size(); ++i) {
                        const Point side = ring[i + 1] - ring[i];
                        const double part = std::clamp(dot(p - ring[i], side) / dot(side, side), 0.0, 1.0);
                        if (distance(p, ring[i] + part * side) < clear_mm)
                            FAIL("lettering runs into the gauge's edge at " << p.x_mm << ", " << p.y_mm);
                    }
                }
    CHECK(letters > 50);
}

} // namespace

TEST_CASE("a gauge's edge stands at its angle to its base", "[gnomon]") {
    std::mt19937 random{5};
    INFO("seed 5");
    for (int i = 0; i < 40; ++i) {
        GaugePlan plan;
        const double degrees = std::uniform_real_distribution{5.0, 85.0}(random);
        plan.angle = Angle::degrees(degrees);
        plan.under_mm = i % 2 == 0 ? 0.0 : 4.0;
        const Gauge gauge = gauge_of(plan);
        const Drawing& drawing = gauge.part.drawings.front();
        const Path& path = outline(drawing, "gauge");
        INFO("angle " << degrees);
        check_outline(path);
        CHECK(touching_arcs(path, 1e-9) == arcs(path));
        // The outline begins in the middle of a side: the edge may be in two pieces on one line.
        const Stretch edge = longest_at(path, degrees), base = longest_at(path, 0);
        CHECK_THAT(edge.degrees, WithinAbs(degrees, 0.001));
        CHECK(std::min(base.degrees, 180 - base.degrees) < 0.001);
        const double s = std::sin(degrees * std::numbers::pi / 180), c = std::cos(degrees * std::numbers::pi / 180);
        CHECK_THAT(edge.from.x_mm * s - edge.from.y_mm * c, WithinAbs(plan.under_mm, 1e-9));
        check_lettering_inside(drawing, 0.5);
    }
}

TEST_CASE("a substyle gauge turns the way its words say", "[gnomon]") {
    for (const double degrees : {-70.0, -25.3, 12.0, 48.0}) {
        const auto from = degrees > 0 ? SubstyleFrom::noon_line : SubstyleFrom::upright;
        const Gauge gauge = substyle_gauge(Angle::degrees(degrees), from, {});
        const Drawing& drawing = gauge.part.drawings.front();
        const auto ring = flattened(outline(drawing, "gauge"), 0.01);
        CHECK(stands_clear_of_itself(ring));
        const Stretch edge = longest_at(outline(drawing, "gauge"), std::fmod(180 - degrees, 180));
        CHECK_THAT(std::remainder(edge.degrees + degrees, 180.0), WithinAbs(0, 0.001)); // clockwise positive
        CHECK_THAT(std::atan2(gauge.edge_to.y_mm, gauge.edge_to.x_mm) * 180 / std::numbers::pi,
                   WithinAbs(-degrees, 0.001));
        check_lettering_inside(drawing, 0.5);
    }
}

TEST_CASE("a gauge that can't be made is refused in plain words", "[gnomon]") {
    using Catch::Matchers::Contains;
    GaugePlan plan;
    CHECK_THROWS_WITH(gauge_of(plan), Contains("from 1° to 89°"));
    plan.angle = Angle::degrees(30);
    plan.edge_mm = 8;
    CHECK_THROWS_WITH(gauge_of(plan), Contains("too small for its lettering"));
}
