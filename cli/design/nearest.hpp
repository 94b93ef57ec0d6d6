// SPDX-License-Identifier: MIT
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// How many slips of the pen lie between two words: a letter more, less, other, or two neighbours swapped. Case, and
/// whether words are joined by a space, '-' or '_', make no difference.
/// Source: the optimal string alignment distance (restricted Damerau-Levenshtein), the common recurrence, from memory.
[[nodiscard]] int slips_between(std::string_view a, std::string_view b);

/// The candidate that `word` was most likely meant to be; empty when none is near (more than a third of it is wrong).
[[nodiscard]] std::string_view nearest(std::string_view word, std::span<const std::string_view> candidates);

/// "a, b or c".
[[nodiscard]] std::string one_of(std::span<const std::string_view> words);

} // namespace dialwright::cli
