// SPDX-License-Identifier: MIT
#include "cli/design/nearest.hpp"
#include "cli/design/sections.hpp"
#include "engine/time/zone.hpp"

#include <array>
#include <cmath>

namespace dialwright::cli {

namespace {

constexpr std::array<Choice<Units>, 2> k_units = {{{"mm", Units::millimetres}, {"inch", Units::inches}}};
constexpr std::array<Choice<DialKind>, 4> k_kinds = {{{"level", DialKind::level},
                                                      {"wall", DialKind::wall},
                                                      {"leaning", DialKind::leaning},
                                                      {"equatorial", DialKind::equatorial}}};
constexpr std::array<Choice<Faces>, 3> k_faces = {
    {{"upper", Faces::upper}, {"lower", Faces::lower}, {"both", Faces::both}}};

/// A wall that leans more than this is no wall; a leaning plate that overhangs more than this is a ceiling.
constexpr double k_most_wall_lean_deg = 45.0;
constexpr double k_most_overhang_deg = 80.0;

void read_zone(Design& design, const Section& place) {
    const std::optional<std::string> name = place.line("zone", 100);
    if (!name)
        return;
    design.place.zone = *name;
    if (Zone::find(*name))
        return;
    std::string hint = "write it as in Europe/London";
    std::vector<std::string> near = nearest_zone_names(*name, 3);
    // Of the nearest names, those that are near: in whole, or by the city alone.
    std::erase_if(near, [&](const std::string& zone) {
        const std::string_view whole = zone;
        const std::array<std::string_view, 2> spellings = {whole, whole.substr(whole.rfind('/') + 1)};
        return nearest(*name, spellings).empty();
    });
    if (!near.empty())
        hint = "did you mean " + one_of(std::vector<std::string_view>{near.begin(), near.end()}) + "?";
    place.error("zone", in_quotes(*name) + " is not a time zone", hint);
}

void read_lean(Design& design, const Section& dial) {
    const std::optional<Angle> lean_read = dial.read("lean", lean);
    if (!lean_read)
        return;
    design.dial.lean = *lean_read;
    const double degrees = lean_read->in_degrees();
    const std::string shown = in_quotes(*dial.text("lean"));
    if (design.dial.kind == DialKind::wall && std::abs(degrees) > k_most_wall_lean_deg)
        dial.error("lean", shown + " is too much for a wall",
                   "give at most 45° either way, or make it \"kind: leaning\"");
    else if (degrees >= 90.0)
        dial.error("lean", shown + " lies flat", "make it \"kind: level\", or give less than 90°");
    else if (degrees < -k_most_overhang_deg)
        dial.error("lean", shown + " looks down at the ground", "give at most 80° forward");
}

/// Which of the dial's keys go with its kind.
void check_dial_keys(const Section& dial, DialKind kind) {
    const bool stands = kind == DialKind::wall || kind == DialKind::leaning;
    if (stands && !dial.has("facing"))
        dial.missing("facing", "say which way the dial looks, as in \"facing: S 23° E\"");
    if (kind == DialKind::leaning && !dial.has("lean"))
        dial.missing("lean", "say how far from upright, as in \"lean: 35° back\"");
    if (kind == DialKind::level)
        dial.refuse({"facing", "lean"}, "a level dial faces up and does not lean",
                    "leave it out, or make it \"kind: wall\" or \"kind: leaning\"");
    if (kind == DialKind::equatorial)
        dial.refuse({"facing", "lean"}, "an equatorial dial lies along the equator wherever it is",
                    "leave it out, or make it \"kind: leaning\"");
    if (kind != DialKind::equatorial)
        dial.refuse({"faces"}, "only an equatorial dial has two faces", "leave it out");
}

} // namespace

void read_units(Design& design, const Section& top) {
    if (const auto chosen = top.choice<Units>("units", k_units))
        design.units = top.state().units = *chosen;
}

void read_top(Design& design, const Section& top) {
    if (const auto title = top.line("title", 200))
        design.title = *title;
    top.read_into(design.years, "years", years);
}

void read_place(Design& design, const Section& top) {
    if (!top.has("place")) {
        top.missing("place", "say where the dial stands: latitude, longitude and zone, indented below \"place:\"");
        return;
    }
    const Section place{top.entry("place"), "place", top.state()};
    if (!place.given())
        return;
    if (const auto name = place.line("name", 200))
        design.place.name = *name;
    place.read_into(design.place.site.latitude, "latitude", latitude);
    place.read_into(design.place.site.longitude, "longitude", longitude);
    read_zone(design, place);
    if (!place.has("latitude"))
        place.missing("latitude", "write it as in \"latitude: 54° 14' N\"");
    if (!place.has("longitude"))
        place.missing("longitude", "write it as in \"longitude: 1° 52' W\"");
    if (!place.has("zone"))
        place.missing("zone", "name the zone of the place's clocks, as in \"zone: Europe/London\"");
}

void read_dial(Design& design, const Section& top) {
    if (!top.has("dial")) {
        top.missing("dial", "say what is made, as in \"kind: level\", indented below \"dial:\"");
        return;
    }
    const Section dial{top.entry("dial"), "dial", top.state()};
    if (!dial.given())
        return;
    const auto kind = dial.choice<DialKind>("kind", k_kinds);
    if (kind)
        design.dial.kind = *kind;
    else if (!dial.has("kind"))
        dial.missing("kind", "give level, wall, leaning or equatorial");
    dial.read_into(design.dial.facing, "facing", bearing);
    read_lean(design, dial);
    if (const auto faces = dial.choice<Faces>("faces", k_faces))
        design.dial.faces = *faces;
    if (kind)
        check_dial_keys(dial, *kind);
}

} // namespace dialwright::cli
