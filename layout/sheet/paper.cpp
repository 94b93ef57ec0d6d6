// SPDX-License-Identifier: MIT
#include "layout/sheet/paper.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <charconv>

namespace dialwright::layout {
namespace {

constexpr double k_inch_mm = 25.4;
constexpr double k_longest_roll_mm = 5000.0;

struct Known {
    std::string_view name;
    double short_mm, long_mm;
};

constexpr Known inches(std::string_view name, double short_in, double long_in) {
    return {name, short_in * k_inch_mm, long_in * k_inch_mm};
}

constexpr std::array k_papers{
    Known{"A0", 841, 1189},   Known{"A1", 594, 841},     Known{"A2", 420, 594},    Known{"A3", 297, 420},
    Known{"A4", 210, 297},    Known{"A5", 148, 210},     Known{"A6", 105, 148},    Known{"B0", 1000, 1414},
    Known{"B1", 707, 1000},   Known{"B2", 500, 707},     Known{"B3", 353, 500},    Known{"B4", 250, 353},
    Known{"B5", 176, 250},    inches("Letter", 8.5, 11), inches("Legal", 8.5, 14), inches("Tabloid", 11, 17),
    inches("Ledger", 11, 17), inches("ANSI C", 17, 22),  inches("ANSI D", 22, 34), inches("ANSI E", 34, 44),
    inches("ARCH A", 9, 12),  inches("ARCH B", 12, 18),  inches("ARCH C", 18, 24), inches("ARCH D", 24, 36),
    inches("ARCH E", 36, 48),
};

/// Lower case, without spaces at the ends and with single ones inside.
std::string plain(std::string_view text) {
    std::string out;
    for (const char c : text) {
        const bool space = c == ' ' || c == '\t' || c == '-';
        if (space && (out.empty() || out.back() == ' ')) {
            continue;
        }
        out += space ? ' ' : c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
    }
    while (!out.empty() && out.back() == ' ') {
        out.pop_back();
    }
    return out;
}

/// "610 mm", "24in", "61 cm" → mm.
std::optional<double> length_mm(std::string_view text) {
    double value = 0;
    const auto [end, error] = std::from_chars(text.data(), text.data() + text.size(), value, std::chars_format::fixed);
    if (error != std::errc{}) {
        return std::nullopt;
    }
    std::string_view unit = text.substr(static_cast<std::size_t>(end - text.data()));
    if (!unit.empty() && unit.front() == ' ') {
        unit.remove_prefix(1);
    }
    const double factor = unit == "mm" ? 1.0 : unit == "cm" ? 10.0 : unit == "in" ? k_inch_mm : 0.0;
    return factor > 0 ? std::optional{value * factor} : std::nullopt;
}

} // namespace

std::optional<Paper> paper_named(std::string_view name) {
    const std::string wanted = plain(name);
    const auto known =
        std::find_if(k_papers.begin(), k_papers.end(), [&](const Known& one) { return plain(one.name) == wanted; });
    if (known != k_papers.end()) {
        return Paper{std::string{known->name}, known->short_mm, known->long_mm, false};
    }
    constexpr std::string_view k_roll = "roll ";
    if (wanted.substr(0, k_roll.size()) != k_roll) {
        return std::nullopt;
    }
    const auto width = length_mm(std::string_view{wanted}.substr(k_roll.size()));
    if (!width || !(*width >= 100.0 && *width <= k_longest_roll_mm)) {
        return std::nullopt;
    }
    return Paper{fmt::format("roll {:.6g} mm", *width), *width, k_longest_roll_mm, true};
}

std::vector<std::string> paper_names() {
    std::vector<std::string> names;
    for (const Known& one : k_papers) {
        names.emplace_back(one.name);
    }
    names.emplace_back("roll 610 mm");
    names.emplace_back("roll 24 in");
    return names;
}

} // namespace dialwright::layout
