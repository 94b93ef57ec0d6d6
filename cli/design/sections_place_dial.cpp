// SPDX-License-Identifier: MIT
#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <span>
#include <vector>

namespace dialwright::cli {

namespace {

constexpr std::array<Choice<Units>, 2> k_units = {{{"mm", Units::millimetres}, {"inch", Units::inches}}};
constexpr std::array<Choice<DialKind>, 4> k_kinds = {{{"level", DialKind::level},
                                                      {"wall", DialKind::wall},
                                                      {"leaning", DialKind::leaning},
                                                      {"equatorial", DialKind::equatorial}}};
constexpr std::array<Choice<Faces>, 3> k_faces_along_the_equator = {
    {{"upper", Faces::upper}, {"lower", Faces::lower}, {"both", Faces::both}}};
constexpr std::array<Choice<Faces>, 3> k_faces_of_a_slab = {
    {{"front", Faces::upper}, {"back", Faces::lower}, {"both", Faces::both}}};

/// A wall that leans more than this is no wall; a leaning plate that overhangs more than this is a ceiling.
constexpr double k_most_wall_lean_deg = 45.0;
constexpr double k_most_overhang_deg = 80.0;
constexpr std::size_t k_most_marks = 360;

/// A mark of the skyline, with its azimuth as the file says it.
struct ReadMark {
    Skyline::Mark mark;
    std::string azimuth_text;
};

std::optional<ReadMark> read_mark(const Node& pair, ReadingState& state) {
    const std::string key = "place: skyline", hint = "write it as in [S 20° E, 12°]: azimuth, then altitude";
    if (pair.kind == Node::Kind::refused)
        return std::nullopt;
    const bool two = pair.kind == Node::Kind::list && pair.items.size() == 2;
    if (!two || pair.items[0].kind != Node::Kind::text || pair.items[1].kind != Node::Kind::text) {
        const std::string found = pair.kind != Node::Kind::list ? std::string{kind_name(pair)}
                                  : two                         ? "a pair that is not two plain values"
                                                                : fmt::format("a list of {}", pair.items.size());
        state.error(pair.at, key, found + " stands where an azimuth and an altitude are wanted", hint);
        return std::nullopt;
    }
    const Read<Angle> azimuth = bearing(pair.items[0].text), altitude = plain_angle(pair.items[1].text);
    if (!azimuth)
        state.error(pair.items[0].at, key, azimuth.trouble().message, azimuth.trouble().hint);
    if (!altitude)
        state.error(pair.items[1].at, key, altitude.trouble().message, altitude.trouble().hint);
    const bool in_range = altitude && *altitude >= Angle{} && *altitude < Angle::degrees(90);
    if (altitude && !in_range)
        state.error(pair.items[1].at, key, in_quotes(pair.items[1].text) + " is no altitude of a skyline",
                    "give 0° to less than 90°, counted up from the level horizon");
    if (!azimuth || !in_range)
        return std::nullopt;
    return ReadMark{{*azimuth, *altitude}, pair.items[0].text};
}

/// What is wrong with the place of mark `at` (from 0) in the order round the horizon, where those before it are right;
/// nothing if it stands well. `turn_from_first` gives a mark's way round from the first.
std::optional<Trouble> out_of_order(const std::vector<ReadMark>& marks, const std::vector<double>& turn_from_first,
                                    std::size_t at) {
    const double turn = turn_from_first[at];
    if (at == 0 || turn > turn_from_first[at - 1])
        return std::nullopt;
    const auto name = [&](std::size_t i) {
        return fmt::format("pair {}, at {}", i + 1, in_quotes(marks[i].azimuth_text));
    };
    const auto after = std::lower_bound(turn_from_first.begin(), turn_from_first.begin() + std::ptrdiff_t(at), turn);
    const auto next = static_cast<std::size_t>(after - turn_from_first.begin());
    if (*after == turn)
        return Trouble{fmt::format("{}, stands over {}", name(at), name(next)),
                       "keep one of them; the upright side of a house is two pairs a tenth of a degree apart"};
    return Trouble{fmt::format("{}, is out of order: azimuths go round from north through east", name(at)),
                   fmt::format("put it after {}, and before {}", name(next - 1), name(next))};
}

void read_skyline(Design& design, const Section& place) {
    const std::span<const Node> pairs =
        list_at(place, "skyline", "pair", 2, k_most_marks, "[[90°, 5°], [S 20° E, 12° 30'], [270°, 0°]]");
    std::vector<ReadMark> marks;
    for (const Node& pair : pairs)
        if (auto mark = read_mark(pair, place.state()))
            marks.push_back(std::move(*mark));
    if (marks.size() != pairs.size())
        return;
    // Kept rising: a skyline may start anywhere and pass north.
    std::vector<double> turn_from_first;
    for (std::size_t i = 0; i < marks.size(); ++i) {
        const Angle first = marks.front().mark.azimuth;
        const double turn = std::fmod(marks[i].mark.azimuth.in_degrees() - first.in_degrees() + 360.0, 360.0);
        turn_from_first.push_back(turn);
        if (const auto trouble = out_of_order(marks, turn_from_first, i)) {
            place.state().error(pairs[i].at, "place: skyline", trouble->message, trouble->hint);
            design.place.skyline.clear();
            return;
        }
        design.place.skyline.push_back({first + Angle::degrees(turn), marks[i].mark.altitude});
    }
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
    if (kind == DialKind::level)
        dial.refuse({"faces"}, "a level dial has one face, which looks up", "leave it out");
}

/// The faces by the words of the dial's kind; by any of them while that is not known.
void read_faces(Design& design, const Section& dial, std::optional<DialKind> kind) {
    std::optional<Faces> faces;
    if (!kind) {
        std::vector<Choice<Faces>> all{k_faces_along_the_equator.begin(), k_faces_along_the_equator.end()};
        all.insert(all.end(), k_faces_of_a_slab.begin(), k_faces_of_a_slab.end() - 1);
        faces = dial.choice<Faces>("faces", all);
    } else if (*kind == DialKind::equatorial) {
        faces = dial.choice<Faces>("faces", k_faces_along_the_equator);
    } else if (*kind != DialKind::level) {
        faces = dial.choice<Faces>("faces", k_faces_of_a_slab);
    }
    if (!faces)
        return;
    design.dial.faces = *faces;
    const bool leans_far = design.dial.lean.in_degrees() > k_most_overhang_deg;
    if (kind == DialKind::leaning && *faces != Faces::upper && leans_far && !dial.state().faulty("dial: lean"))
        dial.error("faces", "the back of a plate that leans back by more than 80° looks down at the ground",
                   "give front, or lean the plate less");
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
    place.read_into(design.place.zone, "zone", zone_name);
    read_skyline(design, place);
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
    read_faces(design, dial, kind);
    if (kind)
        check_dial_keys(dial, *kind);
}

} // namespace dialwright::cli
