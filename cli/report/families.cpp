// SPDX-License-Identifier: MIT
#include "cli/report/families.hpp"

#include "cli/report/say.hpp"
#include "layout/plate/family_words.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <utility>

namespace dialwright::cli {
namespace {

std::optional<Season> season_of(const DialPlan& dial, Family family, int set) {
    switch (family) {
    case Family::altitude:
        return dial.altitudes_between;
    case Family::azimuth:
        return dial.azimuths_between;
    case Family::place_noon:
        return dial.noons_between;
    case Family::date:
        return std::nullopt;
    default:
        return set == 0 ? dial.hours.between : dial.more_hours.at(std::size_t(set) - 1).between;
    }
}

} // namespace

std::vector<DrawnFamily> drawn_families(const FacePlan& plan, const layout::Face& face) {
    std::vector<std::pair<Family, int>> keys;
    std::vector<DrawnFamily> made;
    for (const layout::DrawnLine& line : face.lines) {
        const std::pair key{line.family, line.set};
        const auto known = std::find(keys.begin(), keys.end(), key);
        if (known != keys.end()) {
            DrawnFamily& family = made[std::size_t(known - keys.begin())];
            family.width_mm = std::max(family.width_mm, line.width_mm);
            continue;
        }
        keys.push_back(key);
        const layout::FamilyWords words = layout::words_of(line.family, line.time);
        DrawnFamily family{words.name, words.lines, false, line.width_mm, season_of(plan.dial, line.family, line.set),
                           "",         ""};
        const auto figured =
            std::find_if(face.families.begin(), face.families.end(),
                         [&](const layout::FiguredFamily& f) { return f.family == line.family && f.set == line.set; });
        if (figured != face.families.end()) {
            family.figures = layout::say_dress(figured->dress);
            family.sample = figured->sample;
        }
        family.in_ring = line.set == 0 && is_hour(line.family) && figured == face.families.end();
        made.push_back(std::move(family));
    }
    for (const layout::FiguredFamily& figured : face.families)
        if (std::find(keys.begin(), keys.end(), std::pair{figured.family, figured.set}) == keys.end()) {
            const layout::FamilyWords words = layout::words_of(figured.family, figured.time);
            made.push_back({words.name, words.lines, false, 0.0, season_of(plan.dial, figured.family, figured.set),
                            layout::say_dress(figured.dress), figured.sample});
        }
    return made;
}

std::string say_between(const Season& season) {
    return fmt::format("declinations {}° to {}°", fixed(season.least.in_degrees(), 1),
                       fixed(season.greatest.in_degrees(), 1));
}

} // namespace dialwright::cli
