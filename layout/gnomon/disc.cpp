// SPDX-License-Identifier: MIT
#include "layout/gnomon/disc.hpp"

#include "layout/text/figures.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::layout {

Part disc_of(double nodus_height_mm, bool inches) {
    if (!(nodus_height_mm > 0))
        throw GnomonError("the disc's hole must stand above the plate's face");
    const double hole = std::round(2 * std::clamp(nodus_height_mm / 60, 2.0, 12.0)) / 2, wide = 9 * hole;
    Part part;
    Drawing drawing{"disc", {}};
    drawing.marks.push_back(cross_mark(Layer::guide, {}, 0.8 * hole, "nodus"));
    drawing.marks.push_back({Layer::cut, {circle({}, hole / 2)}, k_cut_mm, false, "hole of the disc"});
    drawing.marks.push_back({Layer::cut, {circle({}, wide / 2)}, k_cut_mm, false, "disc"});
    part.drawings.push_back(std::move(drawing));
    part.particulars = {{"Hole, above the face", say_length(nodus_height_mm, inches)},
                        {"Hole, diameter", say_length(hole, inches)},
                        {"Disc, diameter", say_length(wide, inches)}};
    part.notes = {
        "Take sheet no thicker than a quarter of the hole, or countersink the hole from behind to a thin edge: a "
        "thick rim shuts out a low Sun.",
        "Hold the disc parallel to the plate on a bracket that stands clear of the shadow's field, with the "
        "hole's middle square above the cross on the plate."};
    part.cautions = {
        "The disc's edge stands where a face can meet it: round it, and put a guard where people pass close by."};
    return part;
}

} // namespace dialwright::layout
