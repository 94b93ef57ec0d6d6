// SPDX-License-Identifier: MIT
// What is put on the plate and how it is cut: borders, gnomon, lettering, cutting, print.
#include "cli/design/nearest.hpp"
#include "cli/design/sections.hpp"
#include "layout/sheet/paper.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>
#include <vector>

namespace dialwright::cli {

namespace {

/// Leaves `target` alone when there is no good value.
void length_into(double& target, const Section& section, std::string_view key, double least_mm, double most_mm) {
    if (const auto mm = section.length(key, least_mm, most_mm))
        target = *mm;
}

void line_into(std::string& target, const Section& section, std::string_view key, std::size_t most) {
    if (const auto text = section.line(key, most))
        target = *text;
}

void read_paper(Design& design, const Section& print) {
    const std::optional<std::string> name = print.line("paper", 100);
    if (!name)
        return;
    design.print.paper = *name;
    if (layout::paper_named(*name))
        return;
    std::vector<std::string> names = layout::paper_names();
    std::erase_if(names, [](const std::string& one) { return one.starts_with("roll"); }); // examples, not names
    const std::vector<std::string_view> candidates{names.begin(), names.end()};
    const std::string_view near = nearest(*name, candidates);
    print.error("paper", in_quotes(*name) + " is not a paper that is known here",
                near.empty() ? "give A4, A3, Letter, Tabloid, or a roll by its width from 100 mm, as in \"roll 610 mm\""
                             : fmt::format("did you mean {}?", near));
}

constexpr std::array<Choice<GnomonKind>, 5> k_gnomons = {{{"edge", GnomonKind::edge},
                                                          {"rod", GnomonKind::rod},
                                                          {"pin", GnomonKind::pin},
                                                          {"upright pin", GnomonKind::upright_pin},
                                                          {"disc", GnomonKind::disc}}};

constexpr std::array<Choice<NodusKind>, 4> k_nodi = {
    {{"notch", NodusKind::notch}, {"ball", NodusKind::ball}, {"tip", NodusKind::tip}, {"hole", NodusKind::hole}}};

/// Which nodus a gnomon can bear; its first is the one that is taken where none is named.
std::vector<NodusKind> nodi_of(GnomonKind kind) {
    switch (kind) {
    case GnomonKind::edge:
        return {NodusKind::notch, NodusKind::ball, NodusKind::tip};
    case GnomonKind::rod:
        return {NodusKind::ball, NodusKind::notch, NodusKind::tip};
    case GnomonKind::pin:
    case GnomonKind::upright_pin:
        return {NodusKind::tip, NodusKind::ball};
    case GnomonKind::disc:
        break;
    }
    return {NodusKind::hole};
}

void read_nodus(Design& design, const Section& gnomon) {
    const std::vector<NodusKind> allowed = nodi_of(design.gnomon.kind);
    design.gnomon.nodus = gnomon.choice<NodusKind>("nodus", k_nodi).value_or(allowed.front());
    if (std::find(allowed.begin(), allowed.end(), design.gnomon.nodus) != allowed.end())
        return;
    std::string words;
    for (const NodusKind one : allowed)
        words += std::string{words.empty() ? "" : " or "} + std::string{k_nodi[static_cast<std::size_t>(one)].first};
    gnomon.error("nodus", "this gnomon has no such nodus", fmt::format("give {}", words));
}

/// Which gnomons go with which dials, and which keys with which gnomons.
void check_gnomon_kind(const Design& design, const Section& gnomon) {
    const GnomonKind kind = design.gnomon.kind;
    const Dial& dial = design.dial;
    const bool stands = dial.kind == DialKind::wall || dial.kind == DialKind::leaning;
    if (kind == GnomonKind::upright_pin && stands && std::abs(dial.lean.in_degrees()) < 1e-6 &&
        !gnomon.state().faulty("dial: lean"))
        gnomon.error("kind", "a plumb pin lies in the plane of an upright wall",
                     "give pin: it stands square out of the wall");
    if (dial.kind == DialKind::equatorial && (kind == GnomonKind::upright_pin || kind == GnomonKind::disc))
        gnomon.error("kind", "the gnomon of an equatorial dial stands square through its plate",
                     "give edge, rod or pin");
    if (kind != GnomonKind::edge)
        gnomon.refuse({"foot", "holes", "hole diameter"}, "only an edge has a foot along the substyle",
                      "leave it out, or make the gnomon \"kind: edge\"");
}

/// Holes that fit in the foot.
void read_fixing(Design& design, const Section& gnomon) {
    Gnomon& made = design.gnomon;
    if (const auto mm = gnomon.length("foot", 1.0, k_largest_plate_mm))
        made.foot_mm = *mm;
    made.holes = gnomon.count("holes", 0, 20).value_or(0);
    length_into(made.hole_diameter_mm, gnomon, "hole diameter", 0.2, 100.0);
    if (gnomon.has("hole diameter") && !gnomon.has("holes"))
        gnomon.error("hole diameter", "there are no holes to have it", "say how many, as in \"holes: 2\"");
    if (made.foot_mm && made.hole_diameter_mm >= *made.foot_mm)
        gnomon.error("hole diameter",
                     fmt::format("a hole of {} does not fit in a foot of {}",
                                 length_text(made.hole_diameter_mm, design.units),
                                 length_text(*made.foot_mm, design.units)),
                     "make the holes smaller or the foot longer");
    else if (made.foot_mm && made.holes * made.hole_diameter_mm >= *made.foot_mm)
        gnomon.error("holes",
                     fmt::format("{} holes of {} do not fit in a foot of {}", made.holes,
                                 length_text(made.hole_diameter_mm, design.units),
                                 length_text(*made.foot_mm, design.units)),
                     "make fewer or smaller holes");
}

constexpr double k_least_letter_mm = 0.5;
constexpr double k_largest_letter_mm = 1000.0;

} // namespace

void read_borders(Design& design, const Section& top) {
    const Section borders{top.entry("borders"), "borders", top.state()};
    Borders& made = design.borders;
    length_into(made.margin_mm, borders, "margin", 0.0, k_largest_plate_mm / 2);
    length_into(made.chapter_ring_mm, borders, "chapter ring", 0.0, k_largest_plate_mm / 2);
    length_into(made.inner_mm, borders, "inner border", 0.0, k_largest_plate_mm / 2);
}

void read_gnomon(Design& design, const Section& top) {
    const Section gnomon{top.entry("gnomon"), "gnomon", top.state()};
    Gnomon& made = design.gnomon;
    made.kind = gnomon.choice<GnomonKind>("kind", k_gnomons).value_or(made.kind);
    read_nodus(design, gnomon);
    if (const auto mm = gnomon.length("nodus height", 1.0, k_largest_plate_mm))
        made.nodus_height_mm = *mm;
    length_into(made.thickness_mm, gnomon, "thickness", 0.0, k_largest_plate_mm);
    if (made.kind == GnomonKind::edge)
        read_fixing(design, gnomon);
    check_gnomon_kind(design, gnomon);
}

void read_lettering(Design& design, const Section& top) {
    const Section lettering{top.entry("lettering"), "lettering", top.state()};
    LetteringChoice& made = design.lettering;
    line_into(made.family, lettering, "font", 100);
    length_into(made.numeral_height_mm, lettering, "numeral height", k_least_letter_mm, k_largest_letter_mm);
    length_into(made.label_height_mm, lettering, "label height", k_least_letter_mm, k_largest_letter_mm);
    line_into(made.motto, lettering, "motto", 200);
    length_into(made.motto_height_mm, lettering, "motto height", k_least_letter_mm, k_largest_letter_mm);
    if (lettering.has("motto height") && !lettering.has("motto"))
        lettering.error("motto height", "there is no motto to have it", "give the motto, or leave this out");
    line_into(made.place_line, lettering, "place line", 200);
    // "yes" and "no" are read as such: nobody cuts them into a plate.
    const Read<bool> wanted = yes_or_no(made.place_line);
    if (!wanted)
        return;
    const std::string where =
        latitude_text(design.place.site.latitude) + "  " + longitude_text(design.place.site.longitude);
    made.place_line = !*wanted ? std::string{} : (design.place.name.empty() ? where : design.place.name + "  " + where);
}

void read_cutting(Design& design, const Section& top) {
    const Section cutting{top.entry("cutting"), "cutting", top.state()};
    length_into(design.cutting.line_width_mm, cutting, "line width", 0.05, 10.0);
    length_into(design.cutting.least_gap_mm, cutting, "least gap", 0.05, 50.0);
}

void read_print(Design& design, const Section& top) {
    const Section print{top.entry("print"), "print", top.state()};
    read_paper(design, print);
    length_into(design.print.margin_mm, print, "margin", 0.0, 50.0);
    length_into(design.print.overlap_mm, print, "overlap", 0.0, 100.0);
    print.read_into(design.print.own_size, "own size", yes_or_no);
}

} // namespace dialwright::cli
