// SPDX-License-Identifier: MIT
#pragma once

#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::layout {

/// @param text  UTF-8, one line
/// @throws LetteringError  not UTF-8, or it holds a control character or a break of line
[[nodiscard]] std::u32string decoded(std::string_view text);

/// `"é" (U+00E9)`, for messages.
[[nodiscard]] std::string named(char32_t character);

/// Spaces of all widths.
[[nodiscard]] bool is_space(char32_t character);

/// Marks that stand on the letter before them, and characters that are never seen.
[[nodiscard]] bool joins_letter_before(char32_t character);

/// Direction of each character as an embedding level: even runs left to right, odd right to left. The line runs as
/// its first letter does. Source: Unicode Standard Annex 9. Left out: explicit embeddings and isolates, pairs of
/// brackets (N0), and the annex's other treatment of signs beside numbers after Arabic (W2).
[[nodiscard]] std::vector<std::uint8_t> direction_levels(std::u32string_view text);

/// A script by its four letters in ISO 15924, first letter in the highest byte ('Latn', 'Grek').
using Script = std::uint32_t;

/// Script of each character; those that all scripts share take that of the letter before them, else after them.
[[nodiscard]] std::vector<Script> scripts_of(std::u32string_view text);

/// Order from left to right in which runs with these levels stand on the line (the annex's rule L2).
[[nodiscard]] std::vector<std::size_t> visual_order(const std::vector<std::uint8_t>& levels);

} // namespace dialwright::layout
