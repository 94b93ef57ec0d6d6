// SPDX-License-Identifier: MIT
#include "layout/gnomon/joint.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <stdexcept>

namespace dialwright::layout {
namespace {

constexpr double k_least_bridge_mm = 2.0; ///< of plate between two slots
constexpr double k_run_out_mm = 0.5;      ///< by which an open slot's cut runs past the plate's edge

[[noreturn]] void refuse(const std::string& why) {
    throw GnomonError(why);
}

/// Replaces what is left open.
void settle(double& value, double found) {
    if (value == 0)
        value = found;
}

void check(const JointOptions& o, double foot_mm, double thickness_mm, double plate_mm) {
    if (!(foot_mm > 0))
        refuse("the gnomon has no foot: give its length along the substyle");
    if (!(thickness_mm > 0) && o.kind != FootKind::plain)
        refuse("the gnomon has no thickness: measure the sheet that it is cut from");
    const bool through = o.kind == FootKind::tenons || o.kind == FootKind::hooked_tenons || o.kind == FootKind::halving;
    if (through && !(plate_mm > 0))
        refuse("the gnomon passes through the plate: give the plate's thickness");
    if (!(o.fit_mm > -0.5 && o.fit_mm < 2.0) || (through && !(thickness_mm + o.fit_mm > 0)))
        refuse(fmt::format(
            "a fit of {:.2f} mm is no fit: give 0.1 to 0.5 mm, or a little under 0 for a joint that is pressed in",
            o.fit_mm));
    if (o.count < 1 && o.kind != FootKind::plain)
        refuse("the joint has no tenons or screws: give at least one");
    for (const double length : {o.tenon_mm, o.proud_mm, o.hole_mm, o.flange_width_mm, o.flange_thickness_mm, o.hook_mm,
                                o.keel_mm, o.behind_mm})
        if (!(length >= 0))
            refuse("a length of the gnomon's joint is below zero");
}

void lay_tenons(Joint& joint) {
    JointOptions& o = joint.options;
    const double share = joint.foot_mm / o.count;
    const bool hooked = o.kind == FootKind::hooked_tenons;
    settle(o.hook_mm, hooked ? std::min(joint.plate_thickness_mm, share / 4) : 0.0);
    settle(o.keel_mm, hooked ? std::max(joint.plate_thickness_mm, 5.0) : 0.0);
    const double hook = hooked ? o.hook_mm : 0.0;
    settle(o.tenon_mm, share / 2 - hook / 2);
    if (o.tenon_mm * o.count > joint.foot_mm || !(o.tenon_mm > 0))
        refuse(fmt::format(
            "{} of {:.1f} mm {} not fit in a foot {:.1f} mm long: make them shorter or fewer, or the foot longer",
            o.count == 1 ? "a tenon" : fmt::format("{} tenons", o.count), o.tenon_mm, o.count == 1 ? "does" : "do",
            joint.foot_mm));
    const double room = o.tenon_mm + hook + std::max(o.fit_mm, 0.0);
    if (room > share - (o.count > 1 ? k_least_bridge_mm : 0.0))
        refuse(fmt::format("the slots of {:.1f} mm run into each other or past the foot, of which each has {:.1f} mm: "
                           "make tenons{} shorter or fewer",
                           room, share, hooked ? " and hooks" : ""));
    for (const double middle : stations(joint.foot_mm, o.count)) {
        // A hooked tenon slides forward by its hook, and its slot is that much longer behind it.
        const double from = middle - o.tenon_mm / 2 + hook / 2, to = from + o.tenon_mm;
        joint.tenons.push_back({from, to});
        joint.slots.push_back(hooked ? Span{from - hook - o.fit_mm, to} : Span{from - o.fit_mm / 2, to + o.fit_mm / 2});
    }
}

void lay_screws(Joint& joint) {
    JointOptions& o = joint.options;
    if (!(o.hole_mm > 0) || o.count == 0) {
        if (o.kind == FootKind::flange)
            refuse("a flange is screwed to the plate: give the diameter of its holes");
        return;
    }
    if (o.hole_mm * o.count > joint.foot_mm / 2)
        refuse(fmt::format("{} holes of {:.1f} mm are too many for a foot {:.1f} mm long", o.count, o.hole_mm,
                           joint.foot_mm));
    double aside = 0;
    if (o.kind == FootKind::flange) {
        settle(o.flange_width_mm, joint.thickness_mm + 8 * o.hole_mm);
        const double ledge = (o.flange_width_mm - joint.thickness_mm) / 2;
        if (ledge < 2 * o.hole_mm)
            refuse(fmt::format(
                "a flange {:.1f} mm wide leaves {:.1f} mm beside the gnomon, and holes of {:.1f} mm want {:.1f} mm",
                o.flange_width_mm, ledge, o.hole_mm, 2 * o.hole_mm));
        aside = joint.thickness_mm / 2 + ledge / 2;
    } else if (joint.thickness_mm > 0 && o.hole_mm > 0.6 * joint.thickness_mm) {
        refuse(fmt::format("screw holes of {:.1f} mm are too wide for an edge {:.1f} mm thick: at most {:.1f} mm",
                           o.hole_mm, joint.thickness_mm, 0.6 * joint.thickness_mm));
    }
    for (const double x : stations(joint.foot_mm, o.count)) {
        joint.holes.push_back({x, aside});
        if (aside > 0)
            joint.holes.push_back({x, -aside});
    }
}

void lay_halving(Joint& joint) {
    JointOptions& o = joint.options;
    if (!(o.behind_mm > 0))
        refuse("a gnomon that slides into its plate needs the way from its foot back to the plate's edge");
    settle(o.keel_mm, std::max(joint.plate_thickness_mm, 8.0));
    joint.tenons.push_back({0, joint.foot_mm / 2});
    joint.slots.push_back({-o.behind_mm, joint.foot_mm / 2});
}

} // namespace

std::vector<double> stations(double foot_mm, int count) {
    std::vector<double> middles;
    for (int i = 0; i < count; ++i)
        middles.push_back(foot_mm * (i + 0.5) / count);
    return middles;
}

Joint joint_of(const JointOptions& options, double foot_mm, double thickness_mm, double plate_thickness_mm) {
    check(options, foot_mm, thickness_mm, plate_thickness_mm);
    Joint joint{options, foot_mm, thickness_mm, plate_thickness_mm, {}, {}, {}};
    if (options.kind == FootKind::tenons || options.kind == FootKind::hooked_tenons)
        lay_tenons(joint);
    else if (options.kind == FootKind::halving)
        lay_halving(joint);
    else
        lay_screws(joint);
    return joint;
}

std::vector<Point> foot_corners(const Joint& joint, double start_mm) {
    const JointOptions& o = joint.options;
    const double base = joint.base_mm(), under = -(joint.plate_thickness_mm + std::max(o.fit_mm, 0.0));
    const Point end{joint.foot_mm, base};
    std::vector<Point> corners{{start_mm, base}};
    if (o.kind == FootKind::halving) {
        const double half = joint.slots.front().to_mm, low = under - o.keel_mm;
        corners.insert(corners.end(),
                       {{start_mm, low}, {joint.foot_mm, low}, {joint.foot_mm, under}, {half, under}, {half, 0}});
    }
    for (const Span& tenon : o.kind == FootKind::halving ? std::vector<Span>{} : joint.tenons) {
        if (tenon.from_mm > start_mm)
            corners.push_back({tenon.from_mm, 0});
        if (o.kind == FootKind::hooked_tenons) {
            const double low = under - o.keel_mm, tip = tenon.to_mm + o.hook_mm;
            corners.insert(corners.end(),
                           {{tenon.from_mm, low}, {tip, low}, {tip, under}, {tenon.to_mm, under}, {tenon.to_mm, 0}});
        } else {
            const double low = -(joint.plate_thickness_mm + o.proud_mm);
            corners.insert(corners.end(), {{tenon.from_mm, low}, {tenon.to_mm, low}, {tenon.to_mm, 0}});
        }
    }
    if (corners.back() != end)
        corners.push_back(end);
    return corners;
}

std::vector<Mark> plate_marks_of(const Joint& joint) {
    std::vector<Mark> marks;
    const double side = joint.thickness_mm / 2, half = joint.slot_width_mm() / 2;
    if (side > 0)
        marks.push_back(
            {Layer::score, {rectangle({0, -side, joint.foot_mm, side})}, k_thin_mm, false, "gnomon's foot"});
    for (std::size_t i = 0; i < joint.slots.size(); ++i) {
        const Span& slot = joint.slots[i];
        if (joint.options.kind == FootKind::halving) {
            const double open = slot.from_mm - k_run_out_mm;
            marks.push_back({Layer::cut,
                             {polyline({{open, -half}, {slot.to_mm, -half}, {slot.to_mm, half}, {open, half}})},
                             k_cut_mm,
                             false,
                             "slot from the plate's edge for the gnomon"});
        } else {
            marks.push_back({Layer::cut,
                             {rectangle({slot.from_mm, -half, slot.to_mm, half})},
                             k_cut_mm,
                             false,
                             fmt::format("slot for tenon {}", i + 1)});
        }
    }
    for (std::size_t i = 0; i < joint.holes.size(); ++i)
        add_hole(marks, joint.holes[i], joint.options.hole_mm, fmt::format("fixing hole {}", i + 1));
    return marks;
}

Drawing flange_of(const Joint& joint) {
    const double wide = joint.options.flange_width_mm / 2, side = joint.thickness_mm / 2, r = std::min(3.0, wide / 2);
    Drawing drawing{"gnomon flange", {}};
    drawing.marks.push_back(
        {Layer::score, {rectangle({0, -side, joint.foot_mm, side})}, k_thin_mm, false, "where the gnomon stands"});
    for (std::size_t i = 0; i < joint.holes.size(); ++i)
        add_hole(drawing.marks, joint.holes[i], joint.options.hole_mm, fmt::format("fixing hole {}", i + 1));
    const double end = joint.foot_mm;
    drawing.marks.push_back({Layer::cut,
                             {rounded_polygon({{{0, -wide}, r}, {{end, -wide}, r}, {{end, wide}, r}, {{0, wide}, r}})},
                             k_cut_mm,
                             false,
                             "flange"});
    return drawing;
}

} // namespace dialwright::layout
