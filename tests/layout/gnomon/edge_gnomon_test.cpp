// SPDX-License-Identifier: MIT
#include "layout/gnomon/edge_gnomon.hpp"

#include "tests/layout/gnomon/shapes.hpp"

#include <random>

using namespace shapes;

namespace {

EdgeGnomonPlan plan_of(double style_height_deg, double nodus_height_mm, double foot_mm) {
    EdgeGnomonPlan plan;
    plan.style_height = Angle::degrees(style_height_deg);
    plan.nodus_height_mm = nodus_height_mm;
    plan.nodus_along_mm = nodus_height_mm / tan(plan.style_height);
    plan.foot_mm = foot_mm;
    plan.thickness_mm = 6;
    plan.plate_thickness_mm = 10;
    return plan;
}

/// All lines of the outline at the style's angle that lie on one line with the nodus.
void check_style(const EdgeGnomon& gnomon, const EdgeGnomonPlan& plan) {
    const Path& path = outline(gnomon.part.drawings.front(), "gnomon");
    const double degrees = plan.style_height.in_degrees();
    double length_on_style = 0;
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        const Point to = end_of(piece);
        const Point d = to - at;
        const double turn = std::atan2(-d.y_mm, -d.x_mm) * 180 / std::numbers::pi; // the outline runs down the style
        // Off the line through the nodus, square to it.
        const Point along{std::cos(degrees * std::numbers::pi / 180), std::sin(degrees * std::numbers::pi / 180)};
        const double off_a = cross(along, at - gnomon.nodus), off_b = cross(along, to - gnomon.nodus);
        if (std::holds_alternative<LineTo>(piece) && std::abs(off_a) < 1e-6 && std::abs(off_b) < 1e-6) {
            if (length(d) > 0.5)
                CHECK_THAT(turn, WithinAbs(degrees, 0.001));
            length_on_style += length(d);
        }
        at = to;
    }
    CHECK_THAT(length_on_style + (plan.nodus == NodusMark::none ? 0.0 : [&] {
                   for (const auto& [name, value] : gnomon.part.particulars)
                       if (name == "Notch" || name == "Round seat")
                           return std::stod(value);
                   return 0.0;
               }()),
               WithinAbs(distance(gnomon.style_start, gnomon.style_end), 0.06)); // the notch's width is told to a tenth
}

} // namespace

TEST_CASE("the style's edge stands at its angle and passes through the nodus", "[gnomon]") {
    EdgeGnomonPlan plan = plan_of(52.2583, 60, 90);
    for (const NodusMark nodus : {NodusMark::none, NodusMark::v_notch, NodusMark::round_seat}) {
        plan.nodus = nodus;
        const EdgeGnomon gnomon = edge_gnomon(plan);
        check_style(gnomon, plan);
        check_outline(outline(gnomon.part.drawings.front(), "gnomon"));
    }
}

TEST_CASE("the middle of the notch is the nodus, above its foot", "[gnomon]") {
    EdgeGnomonPlan plan = plan_of(38, 55, 120);
    plan.notch_width_mm = 5;
    plan.notch_depth_mm = 3;
    const Path v = outline(edge_gnomon(plan).part.drawings.front(), "gnomon");
    // Of a V: the corner that stands 3 mm inside the style's line, and its two neighbours on it.
    const double s = std::sin(38 * std::numbers::pi / 180), c = std::cos(38 * std::numbers::pi / 180);
    bool found = false;
    for (std::size_t i = 1; i + 1 < v.pieces.size(); ++i) {
        const Point before = end_of(v.pieces[i - 1]), apex = end_of(v.pieces[i]), after = end_of(v.pieces[i + 1]);
        const double inside = (apex.x_mm * s - apex.y_mm * c);
        if (std::abs(inside - 3) < 1e-9 && std::abs(distance(before, after) - 5) < 1e-9) {
            found = true;
            CHECK_THAT((before.y_mm + after.y_mm) / 2, WithinAbs(55, 1e-6));
            CHECK_THAT((before.x_mm + after.x_mm) / 2, WithinAbs(55 * c / s, 1e-6));
            CHECK_THAT(distance(before, apex), WithinAbs(distance(apex, after), 1e-9));
        }
    }
    CHECK(found);
    plan.nodus = NodusMark::round_seat;
    const Path round = outline(edge_gnomon(plan).part.drawings.front(), "gnomon");
    int seats = 0;
    for (const Piece& piece : round.pieces)
        if (const auto* arc = std::get_if<ArcTo>(&piece); arc && arc->sweep < Angle{}) {
            ++seats;
            CHECK_THAT(arc->centre.y_mm, WithinAbs(55, 1e-6));
            CHECK_THAT(distance(arc->centre, arc->to), WithinAbs(2.5, 1e-9));
            CHECK_THAT(arc->sweep.in_degrees(), WithinAbs(-180, 1e-9));
        }
    CHECK(seats == 1);
}

TEST_CASE("gnomons of all heights, feet and sheets are sound outlines", "[gnomon]") {
    std::mt19937 random{20};
    const auto any = [&](double low, double high) { return std::uniform_real_distribution{low, high}(random); };
    int made = 0, off_plate = 0;
    for (int i = 0; i < 3000; ++i) {
        const double degrees = any(5, 85), foot = any(30, 400);
        const bool centre_off = i % 3 == 0;
        EdgeGnomonPlan plan = plan_of(degrees, 10, foot);
        plan.thickness_mm = any(1, 15);
        plan.plate_thickness_mm = any(2, 40);
        plan.rounding_mm = i % 5 == 0 ? 0.0 : any(0.5, 8);
        plan.nodus = static_cast<NodusMark>(i % 3);
        plan.nodus_along_mm = any(0.2, 1.0) * foot;
        plan.nodus_height_mm = plan.nodus_along_mm * tan(plan.style_height) + (centre_off ? any(1, 60) : 0.0);
        plan.joint.kind = static_cast<FootKind>(i % 5);
        plan.joint.hole_mm = plan.joint.kind == FootKind::flange ? 2.0 : 0.0;
        plan.joint.behind_mm = any(10, 200);
        plan.least_style_mm = any(0, 1.5) * foot;
        INFO("seed 20, case " << i << ": style " << degrees << ", foot " << foot << ", nodus " << plan.nodus_height_mm
                              << " at " << plan.nodus_along_mm);
        EdgeGnomon gnomon;
        try {
            gnomon = edge_gnomon(plan);
        } catch (const std::invalid_argument& refused) {
            continue;
        }
        ++made;
        off_plate += centre_off;
        const Drawing& drawing = gnomon.part.drawings.front();
        const Path& path = outline(drawing, "gnomon");
        check_outline(path);
        check_style(gnomon, plan);
        // Tip and upper front corner touch their sides; a round seat meets the style square and is not one of them.
        const int seats = plan.nodus == NodusMark::round_seat ? 1 : 0;
        CHECK(touching_arcs(path, 1e-6) == arcs(path) - seats);
        CHECK((plan.rounding_mm == 0 || touching_arcs(path, 1e-6) >= 1));
        CHECK(distance(gnomon.style_end, gnomon.nodus) >= 0);
        CHECK(gnomon.style_end.x_mm >= plan.nodus_along_mm);
        const double from = plan.nodus_height_mm - plan.nodus_along_mm * tan(plan.style_height);
        CHECK(distance(gnomon.style_end, {0, from}) >= plan.least_style_mm - 1e-6);
        for (const Mark& m : drawing.marks)
            CHECK(is_finite(m));
    }
    CHECK(made > 2500);
    CHECK(off_plate > 800);
}

TEST_CASE("a style parallel to its plate is level at the nodus' height", "[gnomon]") {
    EdgeGnomonPlan plan = plan_of(45, 40, 120);
    plan.style_height = Angle{};
    plan.nodus_along_mm = 60;
    const EdgeGnomon gnomon = edge_gnomon(plan);
    check_outline(outline(gnomon.part.drawings.front(), "gnomon"));
    CHECK_THAT(gnomon.style_start.y_mm, WithinAbs(40, 1e-9));
    CHECK_THAT(gnomon.style_end.y_mm, WithinAbs(40, 1e-9));
    CHECK_THAT(bounds_of(outline(gnomon.part.drawings.front(), "gnomon")).right_mm, WithinAbs(120, 1e-6));
}

TEST_CASE("a gnomon on a flange begins where the style comes out of it", "[gnomon]") {
    EdgeGnomonPlan plan = plan_of(40, 60, 150);
    plan.joint.kind = FootKind::flange;
    plan.joint.hole_mm = 4;
    plan.joint.flange_thickness_mm = 3;
    const EdgeGnomon gnomon = edge_gnomon(plan);
    REQUIRE(gnomon.part.drawings.size() == 2);
    CHECK_THAT(gnomon.style_start.y_mm, WithinAbs(3, 1e-9));
    CHECK_THAT(gnomon.style_start.x_mm, WithinAbs(3 / std::tan(40 * std::numbers::pi / 180), 1e-9));
    check_style(gnomon, plan);
}

TEST_CASE("a gnomon that can't be made is refused in plain words", "[gnomon]") {
    using Catch::Matchers::Contains;
    EdgeGnomonPlan plan = plan_of(52, 60, 90);
    plan.notch_width_mm = 4;
    plan.notch_depth_mm = 50;
    CHECK_THROWS_WITH(edge_gnomon(plan), Contains("a notch 50.0 mm deep is too deep for the gnomon"));
    plan = plan_of(52, 60, 90);
    plan.style_end_mm = 20;
    CHECK_THROWS_WITH(edge_gnomon(plan), Contains("the style ends 20.0 mm along the foot"));
    plan = plan_of(52, 60, 90);
    plan.nodus_along_mm += 10;
    CHECK_THROWS_WITH(edge_gnomon(plan), Contains("under the plate's face"));
    plan = plan_of(52, 60, 90);
    plan.style_height = Angle::degrees(90);
    CHECK_THROWS_WITH(edge_gnomon(plan), Contains("a steeper style is a pin"));
    plan = plan_of(5, 2, 60);
    plan.joint.kind = FootKind::plain;
    plan.joint.hole_mm = 3;
    CHECK_THROWS_WITH(edge_gnomon(plan), Contains("would come out of the gnomon"));
    plan = plan_of(5, 4, 60);
    plan.joint.kind = FootKind::flange;
    plan.joint.hole_mm = 2;
    plan.joint.flange_thickness_mm = 5;
    CHECK_THROWS_WITH(edge_gnomon(plan), Contains("a flange 5.0 mm thick hides the style"));
}
