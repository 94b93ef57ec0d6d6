// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <optional>
#include <string>
#include <vector>

namespace dialwright::layout {

/// A letter in strokes. A `Point` holds units of the grid that the data is drawn on: capitals are 21 high, small letters
/// 14; x from the pen's start, y up from the base line.
struct StrokeShape {
    std::vector<Path> strokes;
    double advance = 0;
};
inline constexpr double k_stroke_capitals = 21, k_stroke_small = 14;

/// The 96 shapes of a file of the package, from the space on.
/// @throws LetteringError  no such file, or it is not what it should be
[[nodiscard]] std::vector<StrokeShape> stroke_file(const std::string& name);

/// Signs that the data lacks and that are not made of other letters: ° ′ ″ · – — × ß and more; brackets, which it has
/// doubled.
[[nodiscard]] std::optional<StrokeShape> own_shape(char32_t character);

/// Whether a combining mark has strokes.
[[nodiscard]] bool is_accent(char32_t mark);

/// Sets a combining mark on a letter: above all that it has there, or below it.
/// @param letter  the letter's first character, by which some carons become a stroke beside it
void add_accent(StrokeShape& shape, char32_t letter, char32_t mark);

} // namespace dialwright::layout
