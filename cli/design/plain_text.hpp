// SPDX-License-Identifier: MIT
#pragma once

#include <compare>
#include <optional>
#include <string>
#include <string_view>

namespace dialwright::cli {

/// A place in a text, from 1; columns count characters, not bytes.
struct Position {
    int line = 1, column = 1;
    friend constexpr auto operator<=>(const Position&, const Position&) = default;
};

/// `text` without a byte order mark, and every line end (CR LF, CR) a line feed, so that lines are counted as an editor
/// counts them.
[[nodiscard]] std::string plain_lines(std::string_view text);

struct BadCharacter {
    Position at;
    std::string message, hint;
};
/// The first byte that is not UTF-8, or the first control character but tab, line feed and next line (U+0085).
/// Source: RFC 3629, section 4.
[[nodiscard]] std::optional<BadCharacter> first_bad_character(std::string_view text);

/// `text` for a message: in double quotes, on one line, cut short when long, never within a character.
[[nodiscard]] std::string in_quotes(std::string_view text);

} // namespace dialwright::cli
