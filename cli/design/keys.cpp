// SPDX-License-Identifier: MIT
#include "cli/design/keys.hpp"

#include "cli/design/nearest.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

namespace dialwright::cli {

namespace {

constexpr auto k_keys = std::to_array<KnownKey>({
    {"", "title"},
    {"", "units"},
    {"", "years"},

    {"", "place"},
    {"place", "name"},
    {"place", "latitude"},
    {"place", "longitude"},
    {"place", "zone"},
    {"place", "skyline"},

    {"", "dial"},
    {"dial", "kind"},
    {"dial", "facing"},
    {"dial", "lean"},
    {"dial", "faces"},

    {"", "plate"},
    {"plate", "shape"},
    {"plate", "diameter"},
    {"plate", "width"},
    {"plate", "height"},
    {"plate", "across"},
    {"plate", "corners"},
    {"plate", "centre"},
    {"plate", "material"},
    {"plate", "thickness"},

    {"", "borders"},
    {"borders", "margin"},
    {"borders", "chapter ring"},
    {"borders", "inner border"},

    {"", "gnomon"},
    {"gnomon", "kind"},
    {"gnomon", "nodus"},
    {"gnomon", "nodus height"},
    {"gnomon", "thickness"},
    {"gnomon", "foot"},
    {"gnomon", "holes"},
    {"gnomon", "hole diameter"},
    {"gnomon", "joint"},
    {"gnomon", "tenons"},
    {"gnomon", "tenon length"},
    {"gnomon", "proud"},
    {"gnomon", "fit"},
    {"gnomon", "hook"},
    {"gnomon", "keel"},
    {"gnomon", "flange width"},
    {"gnomon", "flange thickness"},
    {"gnomon", "rounding"},
    {"gnomon", "ball"},
    {"gnomon", "socket"},
    {"gnomon", "strut"},

    {"", "hours"},
    {"hours", "time"},
    {"hours", "from"},
    {"hours", "to"},
    {"hours", "divide"},
    {"hours", "numerals"},
    {"hours", "count"},
    {"hours", "curves"},
    {"hours", "stand"},
    {"hours", "noon mark"},
    {"hours", "reach"},
    {"hours", "summer numerals"},
    {"hours", "rise and set"},

    {"", "also"},
    {"also", "sun"},
    {"also", "zone"},
    {"also", "clock"},
    {"also", "since sunrise"},
    {"also", "since sunset"},
    {"also", "hours left"},
    {"also", "unequal"},
    {"also", "altitudes"},
    {"also", "azimuths"},
    {"also", "noon at"},
    {"also: noon at", "name"},
    {"also: noon at", "longitude"},

    {"", "dates"},
    {"dates", "solstices"},
    {"dates", "equinoxes"},
    {"dates", "signs"},
    {"dates", "months"},
    {"dates", "days"},
    {"dates: days", "on"},
    {"dates: days", "label"},
    {"dates", "labels"},

    {"", "weights"},
    {"weights", "hours"},
    {"weights", "dates"},
    {"weights", "sun"},
    {"weights", "zone"},
    {"weights", "clock"},
    {"weights", "since sunrise"},
    {"weights", "since sunset"},
    {"weights", "hours left"},
    {"weights", "unequal"},
    {"weights", "altitudes"},
    {"weights", "azimuths"},
    {"weights", "noon at"},

    {"", "extents"},
    {"extents", "hours"},
    {"extents", "dates"},
    {"extents", "sun"},
    {"extents", "zone"},
    {"extents", "clock"},
    {"extents", "since sunrise"},
    {"extents", "since sunset"},
    {"extents", "hours left"},
    {"extents", "unequal"},
    {"extents", "altitudes"},
    {"extents", "azimuths"},
    {"extents", "noon at"},

    {"", "correction"},
    {"correction", "form"},
    {"correction", "width"},
    {"correction", "height"},
    {"correction", "diameter"},
    {"correction", "letter height"},
    {"correction", "dates"},
    {"", "fixing"},
    {"fixing", "on"},
    {"fixing", "to"},
    {"", "accuracy"},
    {"accuracy", "marking"},
    {"accuracy", "style height"},
    {"accuracy", "substyle"},
    {"accuracy", "facing"},
    {"accuracy", "lean"},
    {"accuracy", "print"},
    {"accuracy", "position"},

    {"", "lettering"},
    {"lettering", "font"},
    {"lettering", "numeral height"},
    {"lettering", "label height"},
    {"lettering", "motto"},
    {"lettering", "motto height"},
    {"lettering", "place line"},
    {"lettering", "legend"},

    {"", "cutting"},
    {"cutting", "line width"},
    {"cutting", "least gap"},
    {"cutting", "tool"},
    {"cutting", "point angle"},
    {"cutting", "depth"},
    {"cutting", "flat"},
    {"cutting", "diameter"},
    {"cutting", "letters"},
    {"cutting", "kerf"},
    {"cutting", "arcs"},
    {"cutting", "flatten"},
    {"cutting", "hairline"},
    {"cutting", "mirrored"},
    {"cutting", "layers"},
    {"cutting: layers", "layer"},
    {"cutting: layers", "name"},
    {"cutting: layers", "colour"},
    {"cutting: layers", "number"},

    {"", "print"},
    {"print", "paper"},
    {"print", "margin"},
    {"print", "overlap"},
    {"print", "own size"},
    {"print", "orientation"},
    {"print", "across feed"},
    {"print", "along feed"},
    {"print", "mirrored"},
    {"print", "layers"},
});

} // namespace

std::span<const KnownKey> known_keys() {
    return k_keys;
}

bool is_known(std::string_view section, std::string_view name, std::span<const KnownKey> table) {
    return std::any_of(table.begin(), table.end(),
                       [&](const KnownKey& key) { return key.section == section && key.name == name; });
}

std::vector<std::string_view> keys_of(std::string_view section, std::span<const KnownKey> table) {
    std::vector<std::string_view> names;
    for (const KnownKey& key : table)
        if (key.section == section)
            names.push_back(key.name);
    return names;
}

std::string full_name(std::string_view section, std::string_view name) {
    return section.empty() ? std::string{name} : fmt::format("{}: {}", section, name);
}

std::string hint_for_unknown(std::string_view section, std::string_view name, std::span<const KnownKey> table) {
    const std::vector<std::string_view> here = keys_of(section, table);
    if (const std::string_view meant = nearest(name, here); !meant.empty())
        return fmt::format("did you mean \"{}\"?", meant);
    constexpr std::size_t k_longest = 60;
    for (const KnownKey& key : table) {
        if (key.section == section || slips_between(key.name, name.substr(0, k_longest)) > 1)
            continue;
        return key.section.empty() ? fmt::format("\"{}\" stands at the top of the file, not indented", key.name)
                                   : fmt::format("\"{}\" belongs under \"{}\"", key.name, key.section);
    }
    return fmt::format("{} may hold {}", section.empty() ? "the file" : "this section", one_of(here));
}

} // namespace dialwright::cli
