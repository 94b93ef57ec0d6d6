// SPDX-License-Identifier: MIT
// What is put on the plate and how it is cut: borders, gnomon, lettering.
#include "cli/design/nearest.hpp"
#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <array>
#include <cmath>
#include <vector>

namespace dialwright::cli {

namespace {

void line_into(std::string& target, const Section& section, std::string_view key, std::size_t most) {
    if (const auto text = section.line(key, most))
        target = *text;
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
    if (dial.kind == DialKind::equatorial)
        gnomon.refuse({"joint"}, "the gnomon of an equatorial dial stands square through its plate, in one hole",
                      "leave it out");
    if (kind != GnomonKind::edge)
        gnomon.refuse({"foot", "holes", "hole diameter", "joint", "tenons", "tenon length", "proud", "fit", "hook",
                       "keel", "flange width", "flange thickness"},
                      "only an edge has a foot along the substyle", "leave it out, or make the gnomon \"kind: edge\"");
    if (kind == GnomonKind::edge || kind == GnomonKind::disc)
        gnomon.refuse({"socket"}, "only a rod or a pin stands in a socket", "leave it out");
    if (kind != GnomonKind::rod)
        gnomon.refuse({"strut"}, "only a rod is held by a strut", "leave it out, or make the gnomon \"kind: rod\"");
    if (kind == GnomonKind::rod || kind == GnomonKind::disc)
        gnomon.refuse({"rounding"}, "a rod's tip is always round, and a disc has none", "leave it out");
    if (design.gnomon.nodus != NodusKind::ball)
        gnomon.refuse({"ball"}, "the nodus is no ball", "leave it out, or give \"nodus: ball\"");
    if (design.gnomon.ball_mm > 0 && design.gnomon.ball_mm <= design.gnomon.thickness_mm && kind != GnomonKind::edge)
        gnomon.error("ball",
                     fmt::format("a ball of {} does not show on a gnomon of {}",
                                 length_text(design.gnomon.ball_mm, design.units),
                                 length_text(design.gnomon.thickness_mm, design.units)),
                     "three times the gnomon's thickness shows well");
}

constexpr std::array<Choice<FootKind>, 5> k_joints = {{{"plain", FootKind::plain},
                                                       {"tenons", FootKind::tenons},
                                                       {"hooked tenons", FootKind::hooked_tenons},
                                                       {"flange", FootKind::flange},
                                                       {"halving", FootKind::halving}}};

bool goes_through(FootKind kind) {
    return kind == FootKind::tenons || kind == FootKind::hooked_tenons || kind == FootKind::halving;
}

/// Holes that fit in the foot.
void check_holes(const Design& design, const Section& gnomon) {
    const Gnomon& made = design.gnomon;
    const double hole_mm = made.joint.hole_mm;
    if (gnomon.has("hole diameter") && !gnomon.has("holes") && made.joint.kind != FootKind::flange)
        gnomon.error("hole diameter", "there are no holes to have it", "say how many, as in \"holes: 2\"");
    if (made.foot_mm && hole_mm >= *made.foot_mm)
        gnomon.error("hole diameter",
                     fmt::format("a hole of {} does not fit in a foot of {}", length_text(hole_mm, design.units),
                                 length_text(*made.foot_mm, design.units)),
                     "make the holes smaller or the foot longer");
    else if (made.foot_mm && made.joint.count * hole_mm >= *made.foot_mm)
        gnomon.error("holes",
                     fmt::format("{} holes of {} do not fit in a foot of {}", made.joint.count,
                                 length_text(hole_mm, design.units), length_text(*made.foot_mm, design.units)),
                     "make fewer or smaller holes");
}

/// Keys that belong to one joint are wrong beside another.
void refuse_other_joints(const Section& gnomon, FootKind kind) {
    const auto only = [&](bool belongs, std::initializer_list<std::string_view> keys, const char* of) {
        if (!belongs)
            gnomon.refuse(keys, fmt::format("this joint has no such thing: it goes with {}", of),
                          "leave it out, or name the joint that has it");
    };
    only(kind == FootKind::plain || kind == FootKind::flange, {"holes", "hole diameter"},
         "\"joint: plain\" or \"joint: flange\"");
    only(kind == FootKind::tenons || kind == FootKind::hooked_tenons, {"tenons", "tenon length"},
         "\"joint: tenons\" or \"joint: hooked tenons\"");
    only(kind == FootKind::tenons, {"proud"}, "\"joint: tenons\"");
    only(goes_through(kind), {"fit"}, "a joint that goes through the plate");
    only(kind == FootKind::hooked_tenons, {"hook"}, "\"joint: hooked tenons\"");
    only(kind == FootKind::hooked_tenons || kind == FootKind::halving, {"keel"},
         "\"joint: hooked tenons\" or \"joint: halving\"");
    only(kind == FootKind::flange, {"flange width", "flange thickness"}, "\"joint: flange\"");
}

/// What a joint through the plate, or one that holds the gnomon by its thickness, must know.
void check_joint_thickness(const Design& design, const Section& gnomon) {
    const FootKind kind = design.gnomon.joint.kind;
    if (kind == FootKind::plain)
        return;
    if (design.gnomon.thickness_mm <= 0 && !gnomon.state().faulty("gnomon: thickness"))
        gnomon.error("joint", "this joint is cut to the gnomon's thickness, which the design does not say",
                     "measure the sheet and give it, as in \"thickness: 5 mm\"");
    if (goes_through(kind) && design.plate.thickness_mm <= 0 && !gnomon.state().faulty("plate: thickness"))
        gnomon.error("joint", "this joint goes through the plate, whose thickness the design does not say",
                     "measure the plate and give it under \"plate\", as in \"thickness: 12 mm\"");
}

void read_joint(Design& design, const Section& gnomon) {
    Gnomon& made = design.gnomon;
    JointOptions& joint = made.joint;
    if (const auto mm = gnomon.length("foot", 1.0, k_largest_plate_mm))
        made.foot_mm = *mm;
    joint.kind = gnomon.choice<FootKind>("joint", k_joints).value_or(FootKind::plain);
    const bool tenons = joint.kind == FootKind::tenons || joint.kind == FootKind::hooked_tenons;
    joint.count = tenons ? gnomon.count("tenons", 1, 10).value_or(2)
                         : gnomon.count("holes", joint.kind == FootKind::flange ? 1 : 0, 20)
                               .value_or(joint.kind == FootKind::flange ? 2 : 0);
    if (joint.kind == FootKind::halving)
        joint.count = 1;
    gnomon.length_into(joint.hole_mm, "hole diameter", 0.2, 100.0);
    gnomon.length_into(joint.tenon_mm, "tenon length", 1.0, k_largest_plate_mm);
    gnomon.length_into(joint.proud_mm, "proud", 0.0, 100.0);
    gnomon.length_into(joint.fit_mm, "fit", -0.5, 2.0); // below zero where it is pressed in
    gnomon.length_into(joint.hook_mm, "hook", 0.5, 200.0);
    gnomon.length_into(joint.keel_mm, "keel", 1.0, 500.0);
    gnomon.length_into(joint.flange_width_mm, "flange width", 2.0, k_largest_plate_mm);
    gnomon.length_into(joint.flange_thickness_mm, "flange thickness", 0.3, 100.0);
    refuse_other_joints(gnomon, joint.kind);
    check_holes(design, gnomon);
    check_joint_thickness(design, gnomon);
}

constexpr double k_least_letter_mm = 0.5;
constexpr double k_largest_letter_mm = 1000.0;

} // namespace

void read_borders(Design& design, const Section& top) {
    const Section borders{top.entry("borders"), "borders", top.state()};
    Borders& made = design.borders;
    borders.length_into(made.margin_mm, "margin", 0.0, k_largest_plate_mm / 2);
    borders.length_into(made.chapter_ring_mm, "chapter ring", 0.0, k_largest_plate_mm / 2);
    borders.length_into(made.inner_mm, "inner border", 0.0, k_largest_plate_mm / 2);
}

void read_gnomon(Design& design, const Section& top) {
    const Section gnomon{top.entry("gnomon"), "gnomon", top.state()};
    Gnomon& made = design.gnomon;
    made.kind = gnomon.choice<GnomonKind>("kind", k_gnomons).value_or(made.kind);
    read_nodus(design, gnomon);
    if (const auto mm = gnomon.length("nodus height", 1.0, k_largest_plate_mm))
        made.nodus_height_mm = *mm;
    gnomon.length_into(made.thickness_mm, "thickness", 0.0, k_largest_plate_mm);
    gnomon.length_into(made.rounding_mm, "rounding", 0.0, 200.0);
    gnomon.length_into(made.ball_mm, "ball", 1.0, 500.0);
    gnomon.length_into(made.socket_mm, "socket", 1.0, k_largest_plate_mm);
    gnomon.length_into(made.strut_mm, "strut", 1.0, k_largest_plate_mm);
    if (made.kind == GnomonKind::edge)
        read_joint(design, gnomon);
    check_gnomon_kind(design, gnomon);
}

void read_lettering(Design& design, const Section& top) {
    const Section lettering{top.entry("lettering"), "lettering", top.state()};
    LetteringChoice& made = design.lettering;
    line_into(made.family, lettering, "font", 100);
    lettering.length_into(made.numeral_height_mm, "numeral height", k_least_letter_mm, k_largest_letter_mm);
    lettering.length_into(made.label_height_mm, "label height", k_least_letter_mm, k_largest_letter_mm);
    line_into(made.motto, lettering, "motto", 200);
    lettering.length_into(made.motto_height_mm, "motto height", k_least_letter_mm, k_largest_letter_mm);
    if (lettering.has("motto height") && !lettering.has("motto"))
        lettering.error("motto height", "there is no motto to have it", "give the motto, or leave this out");
    lettering.read_into(made.legend, "legend", yes_or_no);
    line_into(made.place_line, lettering, "place line", 200);
    // "yes" and "no" are read as such: nobody cuts them into a plate.
    const Read<bool> wanted = yes_or_no(made.place_line);
    if (!wanted)
        return;
    const std::string where =
        latitude_text(design.place.site.latitude) + "  " + longitude_text(design.place.site.longitude);
    made.place_line = !*wanted ? std::string{} : (design.place.name.empty() ? where : design.place.name + "  " + where);
}

} // namespace dialwright::cli
