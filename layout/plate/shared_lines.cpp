// SPDX-License-Identifier: MIT
#include "layout/plate/shared_lines.hpp"

#include "layout/plate/dress.hpp"
#include "layout/plate/family_words.hpp"
#include "layout/plate/points.hpp"

#include <algorithm>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_hair_mm = 0.02;

Box reach_of(const Polyline& line) {
    Box box;
    for (const Point& p : line)
        box.add(p);
    return box;
}

std::string plural_of(const DialLine& line) {
    return in_ring(line) ? "hours of the chapter ring" : words_of(line).lines;
}

} // namespace

void SharedLines::add(const DialLine& line, std::string label, const Polyline& part) {
    if (!part.empty())
        parts_.push_back({&line, std::move(label), part, reach_of(part).grown(1.0)});
}

bool SharedLines::covers(const Part& whole, const Polyline& part) {
    const bool straight = part.size() == 2;
    if (straight != (whole.points.size() == 2) || !whole.reach.contains(reach_of(part)))
        return false;
    if (straight) {
        const Point from = whole.points.front(), run = whole.points.back() - from;
        return length(run) > k_hair_mm && std::all_of(part.begin(), part.end(), [&](Point p) {
                   return std::abs(cross(unit(run), p - from)) < k_hair_mm;
               });
    }
    return std::all_of(part.begin(), part.end(), [&](Point p) { return distance_to(p, whole.points) < k_hair_mm; });
}

bool SharedLines::has(const DialLine& line, const std::string& label, const Polyline& part) {
    const auto there = std::find_if(parts_.begin(), parts_.end(), [&](const Part& p) {
        return (p.line->family != line.family || p.line->set != line.set) && covers(p, part);
    });
    if (there == parts_.end())
        return false;
    const bool noted = std::any_of(pairs_.begin(), pairs_.end(),
                                   [&](const Pair& pair) { return pair.there == there->line && pair.other == &line; });
    if (!noted)
        pairs_.push_back({there->line, &line, there->label, label});
    return true;
}

std::vector<std::string> SharedLines::told() const {
    constexpr std::ptrdiff_t k_many = 3;
    std::vector<std::string> notes;
    for (const Pair& pair : pairs_) {
        const std::string a = plural_of(*pair.there), b = plural_of(*pair.other);
        const auto count = std::count_if(pairs_.begin(), pairs_.end(), [&](const Pair& other) {
            return plural_of(*other.there) == a && plural_of(*other.other) == b;
        });
        if (count < k_many) {
            const auto name = [](const DialLine& line, const std::string& label) {
                return line_name(line.family, line.time, line.set, label);
            };
            notes.push_back(fmt::format("one line serves for {} and {}: it is cut once",
                                        name(*pair.there, pair.there_label), name(*pair.other, pair.other_label)));
            continue;
        }
        std::string note =
            fmt::format("the {} and the {} lie on the same lines, {} of them: each is cut once and bears "
                        "both labels; one of the two families would do",
                        a, b, count);
        if (std::find(notes.begin(), notes.end(), note) == notes.end())
            notes.push_back(std::move(note));
    }
    return notes;
}

} // namespace dialwright::layout
