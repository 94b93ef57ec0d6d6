// SPDX-License-Identifier: MIT
#include "layout/gnomon/joint.hpp"

#include "tests/layout/gnomon/shapes.hpp"

#include <random>

using namespace shapes;

namespace {

JointOptions options(FootKind kind) {
    JointOptions o;
    o.kind = kind;
    return o;
}

/// Stretches of a foot's corners at a level, from end to end.
std::vector<Span> spans_at(const std::vector<Point>& corners, double y) {
    std::vector<double> xs;
    for (std::size_t i = 0; i + 1 < corners.size(); ++i) {
        const Point a = corners[i], b = corners[i + 1];
        if ((a.y_mm > y) != (b.y_mm > y))
            xs.push_back(a.x_mm);
    }
    std::sort(xs.begin(), xs.end());
    std::vector<Span> spans;
    for (std::size_t i = 0; i + 1 < xs.size(); i += 2)
        spans.push_back({xs[i], xs[i + 1]});
    return spans;
}

std::vector<Box> slots_of(const std::vector<Mark>& marks) {
    std::vector<Box> slots;
    for (const Mark& m : marks)
        if (m.layer == Layer::cut)
            slots.push_back(bounds_of(m.paths.front()));
    return slots;
}

} // namespace

TEST_CASE("tenons stand in the middle of their slots, with the fit around them", "[gnomon]") {
    std::mt19937 random{4};
    INFO("seed 4");
    for (int i = 0; i < 300; ++i) {
        const auto any = [&](double low, double high) { return std::uniform_real_distribution{low, high}(random); };
        const double foot = any(40, 400), thick = any(1, 12), plate = any(2, 30);
        JointOptions o = options(FootKind::tenons);
        o.count = 1 + int(random() % 3);
        o.fit_mm = any(0, 0.6);
        o.proud_mm = any(0, 5);
        const Joint joint = joint_of(o, foot, thick, plate);
        const auto tenons = spans_at(foot_corners(joint, 0), -plate / 2);
        const auto slots = slots_of(plate_marks_of(joint));
        REQUIRE(tenons.size() == std::size_t(o.count));
        REQUIRE(slots.size() == tenons.size());
        for (std::size_t k = 0; k < slots.size(); ++k) {
            CHECK_THAT((tenons[k].from_mm + tenons[k].to_mm) / 2, WithinAbs(slots[k].middle().x_mm, 1e-9));
            CHECK_THAT(slots[k].middle().y_mm, WithinAbs(0, 1e-9));
            CHECK_THAT(slots[k].width_mm() - tenons[k].length_mm(), WithinAbs(o.fit_mm, 1e-9));
            CHECK_THAT(slots[k].height_mm() - thick, WithinAbs(o.fit_mm, 1e-9));
            CHECK_THAT(slots[k].middle().x_mm, WithinAbs(foot * (double(k) + 0.5) / o.count, 1e-9));
        }
        double low = 0;
        for (const Point& p : foot_corners(joint, 0))
            low = std::min(low, p.y_mm);
        CHECK_THAT(low, WithinAbs(-plate - o.proud_mm, 1e-9));
    }
}

TEST_CASE("hooks go in through their slots and then hold under the plate", "[gnomon]") {
    for (const double foot : {50.0, 120.0, 300.0}) {
        const double plate = 6, thick = 4;
        const Joint joint = joint_of(options(FootKind::hooked_tenons), foot, thick, plate);
        const auto corners = foot_corners(joint, 0);
        const double under = -(plate + joint.options.fit_mm);
        const auto stems = spans_at(corners, -plate / 2), hooks = spans_at(corners, under - joint.options.keel_mm / 2);
        const auto slots = slots_of(plate_marks_of(joint));
        REQUIRE(stems.size() == 2);
        REQUIRE(hooks.size() == 2);
        for (std::size_t k = 0; k < 2; ++k) {
            const double slide = joint.options.hook_mm;
            // Set in: the hook, and the stem above it, pass the slot.
            CHECK(hooks[k].from_mm - slide >= slots[k].left_mm);
            CHECK(hooks[k].to_mm - slide <= slots[k].right_mm + 1e-9);
            // Slid home: the stem bears on the slot's end, and the hook lies under the plate.
            CHECK_THAT(stems[k].to_mm, WithinAbs(slots[k].right_mm, 1e-9));
            CHECK_THAT(hooks[k].to_mm - slots[k].right_mm, WithinAbs(slide, 1e-9));
        }
        CHECK(slots[0].right_mm + 2 <= slots[1].left_mm);
        CHECK(slots[1].right_mm <= foot);
    }
}

TEST_CASE("a halving's slots are of half the foot each and bear on each other", "[gnomon]") {
    JointOptions o = options(FootKind::halving);
    o.behind_mm = 70;
    const double foot = 90, plate = 9;
    const Joint joint = joint_of(o, foot, 6, plate);
    const auto blade = spans_at(foot_corners(joint, 0), -plate / 2),
               keel = spans_at(foot_corners(joint, 0), -plate - o.fit_mm - 1);
    REQUIRE(blade.size() == 1);
    REQUIRE(keel.size() == 1);
    CHECK_THAT(blade[0].to_mm, WithinAbs(45, 1e-9));
    CHECK_THAT(keel[0].to_mm, WithinAbs(90, 1e-9));
    const auto slots = slots_of(plate_marks_of(joint));
    REQUIRE(slots.size() == 1);
    CHECK_THAT(slots[0].right_mm, WithinAbs(blade[0].to_mm, 1e-9));
    CHECK(slots[0].left_mm < -70);
}

TEST_CASE("a flange's holes are the plate's holes", "[gnomon]") {
    JointOptions o = options(FootKind::flange);
    o.hole_mm = 4;
    o.count = 3;
    const Joint joint = joint_of(o, 120, 5, 10);
    const auto on_flange = holes(flange_of(joint).marks), in_plate = holes(plate_marks_of(joint));
    REQUIRE(on_flange.size() == 6);
    REQUIRE(in_plate.size() == 6);
    for (std::size_t i = 0; i < 6; ++i) {
        CHECK(distance(on_flange[i].first, in_plate[i].first) < 1e-12);
        CHECK_THAT(on_flange[i].second, WithinAbs(4, 1e-9));
    }
    check_outline(outline(flange_of(joint), "flange"));
}

TEST_CASE("a joint that can't be made is refused in plain words", "[gnomon]") {
    using Catch::Matchers::Contains;
    JointOptions o = options(FootKind::tenons);
    o.tenon_mm = 60;
    o.count = 1;
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 10), Contains("a tenon of 60.0 mm does not fit in a foot 50.0 mm long"));
    o.count = 2;
    o.tenon_mm = 24.9;
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 10), Contains("run into each other"));
    o = options(FootKind::tenons);
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 0), Contains("give the plate's thickness"));
    CHECK_THROWS_WITH(joint_of(o, 0, 5, 10), Contains("no foot"));
    CHECK_THROWS_WITH(joint_of(o, 50, 0, 10), Contains("no thickness"));
    o.fit_mm = 4;
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 10), Contains("is no fit"));
    o = options(FootKind::plain);
    o.hole_mm = 4;
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 10), Contains("too wide for an edge"));
    o = options(FootKind::flange);
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 10), Contains("diameter of its holes"));
    o.hole_mm = 4;
    o.flange_width_mm = 12;
    CHECK_THROWS_WITH(joint_of(o, 50, 5, 10), Contains("leaves 3.5 mm beside the gnomon"));
    CHECK_THROWS_WITH(joint_of(options(FootKind::halving), 50, 5, 10), Contains("back to the plate's edge"));
}
