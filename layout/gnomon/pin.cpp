// SPDX-License-Identifier: MIT
#include "layout/gnomon/pin.hpp"

#include "layout/plate/points.hpp"
#include "layout/text/figures.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <stdexcept>

namespace dialwright::layout {
namespace {

constexpr Angle k_square = Angle::degrees(89.99);

void check(const PinPlan& plan) {
    if (!(plan.nodus_height_mm > 0))
        throw GnomonError("the pin's tip must stand above the plate's face");
    if (!(plan.diameter_mm > 0))
        throw GnomonError("the pin has no diameter");
    if (!(plan.to_face >= Angle::degrees(10)) || plan.to_face > Angle::degrees(90.001))
        throw GnomonError(fmt::format("a plumb pin would stand only {} to this face: take a pin square on the plate",
                                      degrees_minutes(plan.to_face)));
    if (!(plan.embedment_mm >= 0) || !(plan.plate_thickness_mm >= 0))
        throw GnomonError("a length of the pin is below zero");
}

void add_words(Part& part, const PinPlan& plan, bool square) {
    part.notes.push_back(
        "The tip is the nodus: file it to its height with the pin set in the plate, and measure from the face.");
    if (plan.beyond_mm > 0 && plan.plate_thickness_mm == 0)
        part.notes.push_back("One pin goes through both faces: add the plate's thickness to its whole length.");
    if (!square)
        part.notes.push_back("Prove the pin with a plumb line before the cement sets.");
    part.cautions.push_back(
        plan.rounded ? "A pin stands where an eye can meet it: its tip is drawn rounded; put a bead on it or a guard "
                       "where people pass close by."
                     : "A sharp pin stands where an eye can meet it: round its tip, or put a bead on it or a guard.");
}

} // namespace

Pin pin_of(const PinPlan& plan) {
    check(plan);
    const bool square = plan.to_face > k_square;
    const Point along = square ? Point{0, 1} : Point{cos(plan.to_face), sin(plan.to_face)};
    const double through = plan.plate_thickness_mm / along.y_mm;
    Pin pin;
    pin.above_mm = plan.nodus_height_mm / along.y_mm;
    pin.nodus = pin.above_mm * along;
    pin.embedment_mm = plan.beyond_mm > 0            ? through + plan.beyond_mm
                       : plan.embedment_mm > 0       ? plan.embedment_mm
                       : plan.plate_thickness_mm > 0 ? std::min(through, 4 * plan.diameter_mm)
                                                     : 4 * plan.diameter_mm;
    if (plan.plate_thickness_mm > 0 && plan.beyond_mm == 0 && pin.embedment_mm > through + 1e-9)
        throw GnomonError(
            fmt::format("a pin set {:.1f} mm deep comes out of the plate, which it has crossed after {:.1f} mm",
                        pin.embedment_mm, through));
    if (plan.rounded && pin.above_mm < plan.diameter_mm / 2 / along.y_mm)
        throw GnomonError(fmt::format("a pin of {:.1f} mm is too thick to have a round tip {:.1f} mm above the face",
                                      plan.diameter_mm, plan.nodus_height_mm));
    pin.length_mm = pin.above_mm + pin.embedment_mm;

    Drawing drawing{"pin", {}};
    const double reach = std::max(3 * plan.diameter_mm, 12.0);
    const double right = std::max(pin.nodus.x_mm, 0.0) + reach;
    drawing.marks.push_back({Layer::guide, {polyline({{-reach, 0}, {right, 0}})}, k_thin_mm, false, "plate's face"});
    if (plan.plate_thickness_mm > 0)
        drawing.marks.push_back({Layer::guide,
                                 {polyline({{-reach, -plan.plate_thickness_mm}, {right, -plan.plate_thickness_mm}})},
                                 k_thin_mm,
                                 false,
                                 "plate's back"});
    const double aside = pin.nodus.x_mm + 0.8 * reach;
    drawing.marks.push_back(dimension({aside, 0}, {aside, plan.nodus_height_mm},
                                      "dimension: nodus height " + say_length(plan.nodus_height_mm, plan.inches)));
    drawing.marks.push_back(cross_mark(Layer::guide, pin.nodus, 2.0, "nodus"));
    drawing.marks.push_back({Layer::cut,
                             {bar_outline(-pin.embedment_mm * along, pin.nodus, plan.diameter_mm,
                                          plan.beyond_mm > 0 && plan.rounded, plan.rounded)},
                             k_cut_mm,
                             false,
                             "pin"});
    pin.part.drawings.push_back(std::move(drawing));

    add_hole(pin.part.plate_marks, {}, plan.diameter_mm, square ? "hole for the pin" : "hole for the plumb pin");
    const auto add = [&](const char* name, double mm) {
        pin.part.particulars.emplace_back(name, say_length(mm, plan.inches));
    };
    add("Nodus above the face", plan.nodus_height_mm);
    add("Pin, diameter", plan.diameter_mm);
    add("Pin, above the face", pin.above_mm);
    if (plan.beyond_mm > 0)
        add("Pin, above the other face", plan.beyond_mm);
    else
        add("Pin, in the plate", pin.embedment_mm);
    add("Pin, whole length", pin.length_mm);
    if (!square)
        pin.part.particulars.emplace_back("Pin to the face", degrees_minutes(plan.to_face));
    add_words(pin.part, plan, square);
    return pin;
}

} // namespace dialwright::layout
