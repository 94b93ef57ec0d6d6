// SPDX-License-Identifier: MIT
#include "layout/plate/dress.hpp"

#include "layout/plate/numerals.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

using Figures = Dress::Figures;

/// As many as there are kinds of hours.
constexpr std::array<Dress, 7> k_dresses{{{Figures::plain, false},
                                          {Figures::plain, true},
                                          {Figures::small_roman, false},
                                          {Figures::small_roman, true},
                                          {Figures::in_brackets, false},
                                          {Figures::in_brackets, true},
                                          {Figures::dotted, false}}};

std::string small_roman(int number) {
    std::string text = numeral(number, Numerals::roman, 24);
    std::transform(text.begin(), text.end(), text.begin(),
                   [](char c) { return c >= 'A' && c <= 'Z' ? char(c - 'A' + 'a') : c; });
    return text;
}

bool belongs_to(const DialLine& line, const FiguredFamily& family) {
    return line.family == family.family && line.set == family.set;
}

} // namespace

std::string say_dress(const Dress& dress) {
    static constexpr const char* k_figures[] = {"figures", "small roman figures", "figures in brackets",
                                                "figures with a dot"};
    const std::string figures = k_figures[static_cast<std::size_t>(dress.figures)];
    return dress.italic ? figures + ", italic" : dress.figures == Figures::plain ? "upright " + figures : figures;
}

std::vector<FiguredFamily> figured_families(const Delineation& delineation) {
    std::vector<FiguredFamily> families;
    std::size_t hours = 0;
    const auto& lines = delineation.lines;
    const bool altitudes =
        std::any_of(lines.begin(), lines.end(), [](const DialLine& line) { return line.family == Family::altitude; });
    for (const DialLine& line : lines) {
        const auto known =
            std::find_if(families.begin(), families.end(), [&](const FiguredFamily& f) { return belongs_to(line, f); });
        if (in_ring(line) || line.family == Family::date || line.family == Family::place_noon)
            continue;
        if (known != families.end())
            continue;
        const Dress dress = is_hour(line.family)             ? k_dresses[std::min(hours++, k_dresses.size() - 1)]
                            : line.family == Family::azimuth ? Dress{Figures::plain, altitudes}
                                                             : Dress{};
        families.push_back({line.family, line.time, line.set, dress, ""});
    }
    for (FiguredFamily& family : families) { // the middle one of its lines stands for all
        std::vector<const DialLine*> own;
        for (const DialLine& line : lines)
            if (belongs_to(line, family))
                own.push_back(&line);
        family.sample = field_label(*own[own.size() / 2], family.dress);
    }
    return families;
}

Dress dress_of(const DialLine& line, const std::vector<FiguredFamily>& families) {
    const auto own =
        std::find_if(families.begin(), families.end(), [&](const FiguredFamily& f) { return belongs_to(line, f); });
    return own == families.end() ? Dress{} : own->dress;
}

std::string field_label(const DialLine& line, const Dress& dress) {
    if (line.family == Family::altitude || line.family == Family::azimuth)
        return degrees_label(line.level);
    if (!is_hour(line.family))
        return line.label;
    if (line.step_min < 60)
        return time_label(line.time_h);
    const int hour = int(std::lround(line.time_h));
    switch (dress.figures) {
    case Figures::small_roman:
        return small_roman(hour);
    case Figures::in_brackets:
        return fmt::format("({})", hour);
    case Figures::dotted:
        return fmt::format("{}.", hour);
    case Figures::plain:
        break;
    }
    return fmt::format("{}", hour);
}

} // namespace dialwright::layout
