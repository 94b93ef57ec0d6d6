// SPDX-License-Identifier: MIT
// Proportions are common practice, no source, unless a line says otherwise. S is the plate's smaller side.
#include "cli/design/defaults.hpp"

#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace dialwright::cli {

namespace {

class Filler {
  public:
    Filler(Design& design, const ReadingState& state) : design_{design}, state_{state} {}

    [[nodiscard]] bool wants(std::string_view key) const { return !state_.gives(key); }

    void note(std::string_view key, std::string value, std::string_view why) {
        design_.assumed.push_back({std::string{key}, std::move(value), std::string{why}});
    }

    /// A note for a default that the design's struct holds already.
    void note_unless_given(std::string_view key, std::string value, std::string_view why) {
        if (wants(key))
            note(key, std::move(value), why);
    }

    /// Sets a length that is not given, as it is.
    void fill(double& target, std::string_view key, double mm, std::string_view why) {
        if (!wants(key))
            return;
        target = mm;
        note(key, length_text(mm, design_.units), why);
    }

    /// To 0.5 mm or 1/16 in, and never to nothing.
    void fill_tidy(double& target, std::string_view key, double mm, std::string_view why) {
        const double step = inches() ? 25.4 / 16.0 : 0.5;
        fill(target, key, mm <= 0.0 ? 0.0 : std::max(1.0, std::round(mm / step)) * step, why);
    }

    [[nodiscard]] bool inches() const { return design_.units == Units::inches; }

  private:
    Design& design_;
    const ReadingState& state_;
};

/// The dial's centre is set outside the plate's box, so no lines crowd round it.
bool centre_is_off(const Plate& plate) {
    return plate.centre && (std::abs(plate.centre->right_mm) > plate.width_mm / 2 ||
                            std::abs(plate.centre->up_mm) > plate.height_mm / 2);
}

void fill_borders_and_letters(Design& design, Filler& filler, double s) {
    Borders& borders = design.borders;
    LetteringChoice& letters = design.lettering;
    filler.fill_tidy(borders.margin_mm, "borders: margin", std::clamp(0.02 * s, 3.0, 12.0), "1/50 of the plate");
    const bool on_field = counts_from_horizon(design.hours.time);
    filler.fill_tidy(borders.chapter_ring_mm, "borders: chapter ring", on_field ? 0.0 : 0.10 * s,
                     on_field ? "these hours bear their figures on the field" : "1/10 of the plate");
    const bool off = centre_is_off(design.plate);
    filler.fill_tidy(borders.inner_mm, "borders: inner border", off ? 0.0 : 0.05 * s,
                     off ? "the centre is off the plate" : "1/20 of the plate");
    const double ring = borders.chapter_ring_mm > 0.0 ? borders.chapter_ring_mm : 0.10 * s;
    filler.fill_tidy(letters.numeral_height_mm, "lettering: numeral height", 0.45 * ring,
                     "a little under half of the chapter ring");
    filler.fill_tidy(letters.label_height_mm, "lettering: label height", std::max(3.0, 0.014 * s),
                     "1/70 of the plate, and no less than 3 mm");
    if (!letters.motto.empty())
        filler.fill_tidy(letters.motto_height_mm, "lettering: motto height", std::max(4.0, 0.022 * s),
                         "1/45 of the plate, and no less than 4 mm");
    filler.note_unless_given("lettering: font", letters.family, "an old-style face that cuts well");
    filler.note_unless_given("lettering: place line", "no", "not asked for");
    if (design.also.hours.size() + (design.also.altitudes.empty() ? 0 : 1) + (design.also.azimuths.empty() ? 0 : 1) > 1)
        filler.note_unless_given("lettering: legend", "yes", "so that the figures of each family are told apart");
}

std::string_view thickness_why(GnomonKind kind) {
    switch (kind) {
    case GnomonKind::edge:
        return "a thin edge; name the metal's thickness and the lines part for both of its edges";
    case GnomonKind::rod:
        return "a thin rod; name its diameter and the lines part for both of its sides";
    case GnomonKind::pin:
    case GnomonKind::upright_pin:
        return "the pin's tip alone is read";
    case GnomonKind::disc:
        return "the disc's hole alone is read";
    }
    return {};
}

void fill_joint(Gnomon& gnomon, bool equatorial, Filler& filler, double s) {
    if (gnomon.kind != GnomonKind::edge)
        return;
    const FootKind kind = gnomon.joint.kind;
    if (!equatorial)
        filler.note_unless_given("gnomon: joint", "plain",
                                 "it stands on the face; how it is fixed is the maker's choice");
    if (kind == FootKind::plain)
        filler.note_unless_given("gnomon: holes", "0", "how it is fixed is the maker's choice");
    const bool screwed = (kind == FootKind::plain && gnomon.joint.count > 0) || kind == FootKind::flange;
    if (!screwed)
        return;
    const double by_plate = std::clamp(0.014 * s, 2.0, 6.0), half = gnomon.thickness_mm / 2;
    if (kind == FootKind::plain && half > 0 && half < by_plate)
        filler.fill(gnomon.joint.hole_mm, "gnomon: hole diameter", std::floor(10 * half) / 10,
                    "half of the gnomon's thickness, into whose edge it goes");
    else
        filler.fill_tidy(gnomon.joint.hole_mm, "gnomon: hole diameter", by_plate, "1/70 of the plate");
}

void fill_gnomon_and_cutting(Design& design, Filler& filler, double s) {
    Gnomon& gnomon = design.gnomon;
    filler.note_unless_given("gnomon: kind", "edge", "a plate of metal, whose top edge is the style");
    static constexpr const char* k_nodi[] = {"notch", "ball", "tip", "hole"};
    filler.note_unless_given("gnomon: nodus", k_nodi[static_cast<std::size_t>(gnomon.nodus)],
                             "as such a gnomon commonly has it");
    filler.fill(gnomon.thickness_mm, "gnomon: thickness", 0.0, thickness_why(gnomon.kind));
    fill_joint(gnomon, design.dial.kind == DialKind::equatorial, filler, s);
    Cutting& cutting = design.cutting;
    const double line = std::clamp(0.0016 * s, 0.3, 3.0), sixty_fourth = 25.4 / 64.0;
    const bool tool_says = cutting.diameter_mm > 0 || (cutting.tool != Tool::any && !filler.wants("cutting: depth"));
    if (tool_says && filler.wants("cutting: line width"))
        filler.note("cutting: line width", length_text(cutting.line_width_mm, design.units), "what the tool leaves");
    else
        filler.fill(cutting.line_width_mm, "cutting: line width",
                    filler.inches() ? std::max(1.0, std::round(line / sixty_fourth)) * sixty_fourth
                                    : std::round(line * 10.0) / 10.0,
                    "1/600 of the plate: reads from where the plate is read");
    if ((cutting.tool == Tool::v_cutter || cutting.tool == Tool::chisel) && filler.wants("cutting: depth"))
        cutting.depth_mm =
            std::max(0.0, cutting.line_width_mm - cutting.flat_mm) / (2 * tan(cutting.point_angle / 2)); // it follows
    filler.fill(cutting.least_gap_mm, "cutting: least gap", 2.0 * cutting.line_width_mm, "twice the line width");
}

void fill_reach(Design& design, Filler& filler) {
    const bool style = has_style(design.gnomon.kind);
    design.hours.reach = style ? HourExtent::style : HourExtent::nodus;
    if (draws_straight_hours(design))
        filler.note("hours: reach", style ? "style" : "season",
                    style ? "the style's shadow runs on to the border"
                          : "its shadow is one point, which stays between the solstices");
}

void note_hours_and_dates(Design& design, Filler& filler) {
    filler.note_unless_given("hours: time", "sun", "the time that the dial's own place has by the Sun");
    filler.note_unless_given("hours: divide", "15 min", "quarters, where they leave the least gap");
    filler.note_unless_given("hours: numerals", "roman", "with IV; \"roman iiii\" gives IIII");
    filler.note_unless_given("hours: count", "12", "as clocks show it");
    if (filler.wants("hours: stand")) {
        const bool sides = (design.plate.shape == PlateShape::rectangle || design.plate.shape == PlateShape::polygon) &&
                           design.hours.numerals == Numerals::arabic;
        design.hours.stand = sides ? NumeralStand::upright : NumeralStand::along_border;
        filler.note("hours: stand", sides ? "upright" : "along border",
                    sides ? "read without turning the head" : "they follow the ring");
    }
    if (draws_any(design, {HourTime::clock}))
        filler.note_unless_given("hours: curves", "whole", "the whole year on one plate");
    filler.note_unless_given("hours: noon mark", "yes", "where the day is halved");
    if (filler.wants("hours: reach"))
        fill_reach(design, filler);
    if (counts_from_the_horizon(design))
        filler.note_unless_given("hours: rise and set", "level horizon",
                                 "the Sun's middle on the horizon, no refraction");
    filler.note_unless_given("dates: solstices", "yes", "the ends of the shadow's walk");
    filler.note_unless_given("dates: equinoxes", "yes", "the straight line between them");
    filler.note_unless_given("dates: signs", "no", "not asked for");
    filler.note_unless_given("dates: months", "no", "not asked for");
    filler.note_unless_given("dates: labels", "yes", "so that each date line says what it is");
    filler.note_unless_given("years", fmt::format("{} to {}", design.years.first, design.years.last),
                             "the Sun's mean path over five leap cycles");
}

void fill_correction(Design& design, Filler& filler) {
    CorrectionMade& made = design.correction;
    if (!made.wanted)
        return;
    filler.note_unless_given("correction: form", "graph", "it shows every day, and what lies between");
    if (made.form == CorrectionForm::ring) {
        filler.fill_tidy(made.width_mm, "correction: diameter",
                         std::clamp(0.7 * design.plate.width_mm, 180.0, k_largest_plate_mm), "7/10 of the plate");
        made.height_mm = made.width_mm;
    } else {
        filler.fill_tidy(made.width_mm, "correction: width",
                         std::clamp(0.75 * design.plate.width_mm, 180.0, k_largest_plate_mm), "3/4 of the plate");
        filler.fill_tidy(made.height_mm, "correction: height", 0.55 * made.width_mm, "a little over half of its width");
    }
    filler.fill_tidy(made.letter_height_mm, "correction: letter height",
                     std::max(made.form == CorrectionForm::ring ? made.width_mm / 75 : made.height_mm / 45,
                              layout::least_letter_mm(design.cutting)),
                     made.form == CorrectionForm::ring ? "1/75 of the ring" : "1/45 of its height");
    if (made.form == CorrectionForm::table)
        filler.note_unless_given("correction: dates", "as close as its letters have room", "no dates are named");
}

void fill_print(Design& design, Filler& filler) {
    Print& print = design.print;
    const bool inches = filler.inches();
    if (filler.wants("print: paper")) {
        print.paper = inches ? "Letter" : "A4";
        filler.note("print: paper", print.paper, "the common office paper");
    }
    filler.fill(print.margin_mm, "print: margin", inches ? 25.4 * 5.0 / 16.0 : 8.0, "what printers can't reach");
    filler.fill(print.overlap_mm, "print: overlap", inches ? 25.4 * 3.0 / 8.0 : 10.0, "room for glue");
    filler.note_unless_given("print: own size", "yes", "one page of the work's own size as well");
}

/// "Wall dial at Thornholme".
std::string title_of(const Design& design) {
    static constexpr const char* k_names[] = {"Level dial", "Wall dial", "Leaning dial", "Equatorial dial"};
    const std::string kind = k_names[static_cast<std::size_t>(design.dial.kind)];
    return design.place.name.empty() ? kind : kind + " at " + design.place.name;
}

} // namespace

void fill_defaults(Design& design, const ReadingState& state) {
    const double s = smaller_side_mm(design.plate);
    Filler filler{design, state};
    if (filler.wants("title")) {
        design.title = title_of(design);
        filler.note("title", design.title, "what is made, and where");
    }
    filler.note_unless_given("units", "mm", "no other is named");
    if (design.dial.kind == DialKind::wall)
        filler.note_unless_given("dial: lean", "upright", "as walls are");
    if (design.dial.kind == DialKind::equatorial)
        filler.note_unless_given("dial: faces", "upper", "the summer face alone");
    fill_borders_and_letters(design, filler, s);
    fill_gnomon_and_cutting(design, filler, s);
    note_hours_and_dates(design, filler);
    fill_correction(design, filler);
    fill_print(design, filler);
}

} // namespace dialwright::cli
