// SPDX-License-Identifier: MIT
#include "layout/plate/family_words.hpp"

#include <algorithm>

namespace dialwright::layout {

std::string line_name(Family family, HourTime time, int set, const std::string& label) {
    const bool of_the_ring = set == 0 && is_hour(family) && !counts_from_horizon(family);
    return (of_the_ring ? "hour line " : words_of(family, time).line) + label;
}

std::string by_family(const std::vector<Named>& lines) {
    std::vector<Named> groups;
    for (const auto& [family, label] : lines) {
        const auto same =
            std::find_if(groups.begin(), groups.end(), [&f = family](const Named& g) { return g.first == f; });
        if (same == groups.end())
            groups.emplace_back(family, label);
        else
            same->second += ", " + label;
    }
    std::string all;
    for (const auto& [family, labels] : groups)
        all += (all.empty() ? "" : "; ") + family + " " + labels;
    return all;
}

} // namespace dialwright::layout
