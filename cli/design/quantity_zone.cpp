// SPDX-License-Identifier: MIT
#include "cli/design/nearest.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/quantity.hpp"
#include "engine/time/zone.hpp"

#include <algorithm>
#include <array>
#include <vector>

namespace dialwright::cli {

Read<std::string> zone_name(std::string_view text) {
    if (Zone::find(text))
        return std::string{text};
    std::string hint = "write it as in Europe/London";
    std::vector<std::string> near = nearest_zone_names(text, 3);
    // Of the nearest names, those that are near: in whole, or by the city alone.
    std::erase_if(near, [&](const std::string& zone) {
        const std::string_view whole = zone;
        const std::array<std::string_view, 2> spellings = {whole, whole.substr(whole.rfind('/') + 1)};
        return nearest(text, spellings).empty();
    });
    if (!near.empty())
        hint = "did you mean " + one_of(std::vector<std::string_view>{near.begin(), near.end()}) + "?";
    return Trouble{in_quotes(text) + " is not a time zone", hint};
}

} // namespace dialwright::cli
