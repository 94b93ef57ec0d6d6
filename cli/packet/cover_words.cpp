// SPDX-License-Identifier: MIT
#include "cli/packet/cover_words.hpp"

#include "cli/report/families.hpp"
#include "cli/report/say.hpp"
#include "layout/plate/family_words.hpp"
#include "layout/plate/numerals.hpp"

#include <fmt/format.h>

namespace dialwright::cli {
namespace {

std::string hours_text(const layout::Face& face) {
    double first = 24, last = 0;
    for (const layout::DrawnLine& line : face.lines)
        if (line.set == 0 && is_hour(line.family)) {
            first = std::min(first, line.time_h);
            last = std::max(last, line.time_h);
        }
    return first > last ? "none" : layout::time_label(first) + " to " + layout::time_label(last);
}

} // namespace

std::vector<std::pair<std::string, std::string>> key_numbers(const Commission& commission, std::size_t i) {
    const Design& design = commission.design;
    const bool inches = design.units == Units::inches;
    const layout::Face& face = commission.faces[i];
    const Style& style = face.delineation.style;
    std::vector<std::pair<std::string, std::string>> rows;
    rows.emplace_back("Place",
                      say_latitude(design.place.site.latitude) + ", " + say_longitude(design.place.site.longitude));
    rows.emplace_back("Zone", design.place.zone);
    rows.emplace_back("Plate", say_attitude(commission.plans[i].dial.attitude));
    rows.emplace_back("Size", fmt::format("{} × {}", say_length(design.plate.width_mm, inches),
                                          say_length(design.plate.height_mm, inches)));
    if (!design.plate.material.empty())
        rows.emplace_back("Material", design.plate.material);
    rows.emplace_back("Style height", degrees_minutes(style.height));
    if (style.height < Angle::degrees(89.99))
        rows.emplace_back("Substyle", degrees_minutes(style.substyle) + " clockwise from " +
                                          (design.dial.kind == DialKind::level ? "north" : "up"));
    static constexpr const char* k_nodi[] = {"notch", "ball", "tip", "hole"};
    rows.emplace_back("Nodus", std::string{k_nodi[static_cast<std::size_t>(design.gnomon.nodus)]} + ", " +
                                   say_length(face.placement.nodus_height_mm, inches) + " above the plate");
    if (design.gnomon.thickness_mm > 0)
        rows.emplace_back("Gnomon", say_length(design.gnomon.thickness_mm, inches) + " thick");
    if (face.gnomon_foot_mm > 0)
        rows.emplace_back("Its foot", say_length(face.gnomon_foot_mm, inches) + " along the substyle");
    rows.emplace_back("Shows", layout::words_of(design.hours.time).meaning);
    rows.emplace_back("Hours", hours_text(face));
    for (const DrawnFamily& family : drawn_families(commission.plans[i], face))
        if (!family.figures.empty())
            rows.emplace_back("Label " + family.sample, family.lines + " (" + family.figures + ")");
    rows.emplace_back("Date lines", fmt::format("mean of {} to {}", design.years.first, design.years.last));
    return rows;
}

/// Common practice, no source, where no other is named.
std::vector<std::string> cautions(const Design& design) {
    std::vector<std::string> list{"Never look at the Sun to align a dial, not even for a moment and not through dark "
                                  "glass: work from the shadow.",
                                  "The gnomon's tip and edges can wound, at face height and at child height above all: "
                                  "round them, or guard them.",
                                  "Dust of stone and metal harms the lungs, silica from slate and sandstone gravely: "
                                  "cut wet or with extraction, and wear a fitted mask."};
    if (design.dial.kind == DialKind::wall || design.dial.kind == DialKind::leaning)
        list.push_back("A slab on a wall needs lifting gear and a fixing into sound masonry that a mason or engineer "
                       "answers for. A listed building or a public place needs consent first: ask the authority.");
    else
        list.push_back("A slab of stone is heavier than it looks: lift with help or gear, and fix it so that nobody "
                       "can pull it over. A public place needs consent first.");
    list.push_back("Fumes of lasers, acids and soldering need extraction; metal in the Sun grows hot enough to burn. "
                   "Local codes and licensed trades come before this sheet.");
    return list;
}

std::vector<std::string> steps(const Design& design, bool has_tiles) {
    std::vector<std::string> list{
        "Measure the two bars on every sheet with a steel rule. If one is off, stop, and print again at 100 %.",
    };
    if (has_tiles)
        list.push_back("Join the sheets by their crosses, flat and straight, and measure across the joins.");
    list.push_back("Check the plate: the outline is cut, what is black is engraved, holes are drilled; ochre marks are "
                   "scored lightly, pale ones only help to set out.");
    if (design.dial.kind == DialKind::level)
        list.push_back("Fix the plate level, with its north to true north (not the compass needle's).");
    if (design.dial.kind == DialKind::equatorial)
        list.push_back("Fix the plate in the plane of the equator, with its pin towards the pole, and the noon line in "
                       "the meridian.");
    if (design.dial.kind == DialKind::wall || design.dial.kind == DialKind::leaning)
        list.push_back("Check which way the wall faces and how it leans before you cut: the lines are right for this "
                       "attitude alone.");
    if (design.dial.kind == DialKind::equatorial)
        list.push_back("Set the pin square through the plate, and prove it from two sides before the fixing sets.");
    else
        list.push_back(has_style(design.gnomon.kind)
                           ? "Set the style at its height over the substyle, and prove it before the fixing sets."
                           : "Set the nodus at its height over its foot, and prove it before the fixing sets.");
    return list;
}

} // namespace dialwright::cli
