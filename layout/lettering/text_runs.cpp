// SPDX-License-Identifier: MIT
#include "layout/lettering/text_runs.hpp"

#include "layout/lettering/lettering.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <hb.h>
#include <iterator>
#include <numeric>

namespace dialwright::layout {
namespace {

hb_unicode_general_category_t category(char32_t character) {
    return hb_unicode_general_category(hb_unicode_funcs_get_default(), static_cast<hb_codepoint_t>(character));
}

bool breaks_line(char32_t character) {
    const hb_unicode_general_category_t kind = category(character);
    return kind == HB_UNICODE_GENERAL_CATEGORY_CONTROL || kind == HB_UNICODE_GENERAL_CATEGORY_LINE_SEPARATOR ||
           kind == HB_UNICODE_GENERAL_CATEGORY_PARAGRAPH_SEPARATOR;
}

/// The character that starts at `at`, which moves behind it; nothing legal gives 0xFFFFFFFF.
char32_t next_character(std::string_view text, std::size_t& at) {
    constexpr char32_t k_none = 0xFFFFFFFF;
    const auto first = static_cast<unsigned char>(text[at++]);
    if (first < 0x80)
        return first;
    const int followers = first >= 0xF0 ? 3 : first >= 0xE0 ? 2 : 1;
    if (first < 0xC2 || first > 0xF4)
        return k_none;
    char32_t value = first & (0x3FU >> followers);
    for (int i = 0; i < followers; ++i) {
        if (at == text.size() || (static_cast<unsigned char>(text[at]) & 0xC0U) != 0x80U)
            return k_none;
        value = (value << 6) | (static_cast<unsigned char>(text[at++]) & 0x3FU);
    }
    constexpr char32_t k_least[] = {0, 0x80, 0x800, 0x10000};
    const bool surrogate = value >= 0xD800 && value <= 0xDFFF;
    return value < k_least[followers] || surrogate || value > 0x10FFFF ? k_none : value;
}

std::string as_utf8(char32_t c) {
    const auto byte = [](char32_t value) { return static_cast<char>(static_cast<unsigned char>(value)); };
    if (c < 0x80)
        return {byte(c)};
    if (c < 0x800)
        return {byte(0xC0 | (c >> 6)), byte(0x80 | (c & 0x3F))};
    if (c < 0x10000)
        return {byte(0xE0 | (c >> 12)), byte(0x80 | ((c >> 6) & 0x3F)), byte(0x80 | (c & 0x3F))};
    return {byte(0xF0 | (c >> 18)), byte(0x80 | ((c >> 12) & 0x3F)), byte(0x80 | ((c >> 6) & 0x3F)),
            byte(0x80 | (c & 0x3F))};
}

hb_script_t script_of(char32_t character) {
    return hb_unicode_script(hb_unicode_funcs_get_default(), static_cast<hb_codepoint_t>(character));
}

bool shared_by_scripts(Script script) {
    return script == HB_SCRIPT_COMMON || script == HB_SCRIPT_INHERITED || script == HB_SCRIPT_UNKNOWN;
}

/// Classes of the annex's table 4, as far as a line of lettering needs them.
enum class Direction { left_to_right, right_to_left, number, number_separator, number_sign, mark, neutral };

Direction direction_of(char32_t c) {
    using enum Direction;
    if (c == 0x200E)
        return left_to_right;
    if (c == 0x200F || c == 0x061C)
        return right_to_left;
    if (joins_letter_before(c))
        return mark;
    if (category(c) == HB_UNICODE_GENERAL_CATEGORY_DECIMAL_NUMBER)
        return number;
    if (std::u32string_view{U"+,-./:\u00A0"}.find(c) != std::u32string_view::npos)
        return number_separator;
    if (std::u32string_view{U"#$%\u00A3\u00B0\u00B1\u2032\u2033\u20AC\u2212"}.find(c) != std::u32string_view::npos)
        return number_sign;
    const hb_script_t script = script_of(c);
    if (shared_by_scripts(script))
        return neutral;
    return hb_script_get_horizontal_direction(script) == HB_DIRECTION_RTL ? right_to_left : left_to_right;
}

/// Marks go with their letters (W1), separators inside and signs beside numbers with these (W4, W5), numbers after
/// left-to-right text with it (W7); what is left of separators and signs is neutral (W6).
void settle_numbers(std::vector<Direction>& kinds, Direction base) {
    using enum Direction;
    for (std::size_t i = 0; i < kinds.size(); ++i)
        if (kinds[i] == mark)
            kinds[i] = i == 0 ? base : kinds[i - 1];
    for (std::size_t i = 0; i < kinds.size(); ++i)
        if (kinds[i] == number_separator && i > 0 && i + 1 < kinds.size() && kinds[i - 1] == number &&
            kinds[i + 1] == number)
            kinds[i] = number;
    for (std::size_t i = 1; i < kinds.size(); ++i)
        if (kinds[i] == number_sign && kinds[i - 1] == number)
            kinds[i] = number;
    for (std::size_t i = kinds.size(); i-- > 1;)
        if (kinds[i - 1] == number_sign && kinds[i] == number)
            kinds[i - 1] = number;
    Direction before = base;
    for (Direction& kind : kinds) {
        if (kind == number_separator || kind == number_sign)
            kind = neutral;
        if (kind == number && before == left_to_right)
            kind = left_to_right;
        if (kind == left_to_right || kind == right_to_left)
            before = kind;
    }
}

/// Neutrals between equal directions take it (N1; numbers count as right to left), others that of the line (N2).
void settle_neutrals(std::vector<Direction>& kinds, Direction base) {
    using enum Direction;
    const auto strong = [](Direction kind) { return kind == number ? right_to_left : kind; };
    for (std::size_t i = 0; i < kinds.size();) {
        std::size_t end = i;
        while (end < kinds.size() && kinds[end] == neutral)
            ++end;
        const Direction before = i == 0 ? base : strong(kinds[i - 1]);
        const Direction after = end == kinds.size() ? base : strong(kinds[end]);
        for (; i < end; ++i)
            kinds[i] = before == after ? before : base;
        ++i;
    }
}

} // namespace

std::u32string decoded(std::string_view text) {
    std::u32string characters;
    characters.reserve(text.size());
    for (std::size_t at = 0; at < text.size();) {
        const std::size_t start = at;
        const char32_t character = next_character(text, at);
        if (character == 0xFFFFFFFF)
            throw LetteringError(fmt::format(
                "the text is not valid UTF-8: byte {} of it (0x{:02X}) starts no character; save the file as UTF-8",
                start + 1, static_cast<unsigned>(static_cast<unsigned char>(text[start]))));
        if (breaks_line(character))
            throw LetteringError(fmt::format("the text holds the control character U+{:04X}, which cannot be drawn; "
                                             "lettering is one line without tabs or breaks",
                                             static_cast<std::uint32_t>(character)));
        characters.push_back(character);
    }
    return characters;
}

std::string named(char32_t character) {
    return fmt::format("\"{}\" (U+{:04X})", as_utf8(character), static_cast<std::uint32_t>(character));
}

bool is_space(char32_t character) {
    return category(character) == HB_UNICODE_GENERAL_CATEGORY_SPACE_SEPARATOR;
}

bool joins_letter_before(char32_t character) {
    const hb_unicode_general_category_t kind = category(character);
    return kind == HB_UNICODE_GENERAL_CATEGORY_NON_SPACING_MARK || kind == HB_UNICODE_GENERAL_CATEGORY_SPACING_MARK ||
           kind == HB_UNICODE_GENERAL_CATEGORY_ENCLOSING_MARK || kind == HB_UNICODE_GENERAL_CATEGORY_FORMAT;
}

std::vector<std::uint8_t> direction_levels(std::u32string_view text) {
    using enum Direction;
    std::vector<Direction> kinds;
    kinds.reserve(text.size());
    std::transform(text.begin(), text.end(), std::back_inserter(kinds), direction_of);
    const auto first = std::find_if(kinds.begin(), kinds.end(),
                                    [](Direction kind) { return kind == left_to_right || kind == right_to_left; });
    const Direction base = first == kinds.end() ? left_to_right : *first;
    settle_numbers(kinds, base);
    settle_neutrals(kinds, base);
    std::vector<std::uint8_t> levels;
    levels.reserve(kinds.size());
    for (const Direction kind : kinds) {
        if (kind == right_to_left)
            levels.push_back(1);
        else if (kind == number || base == right_to_left)
            levels.push_back(2);
        else
            levels.push_back(0);
    }
    return levels;
}

std::vector<Script> scripts_of(std::u32string_view text) {
    std::vector<Script> scripts;
    scripts.reserve(text.size());
    std::transform(text.begin(), text.end(), std::back_inserter(scripts), script_of);
    const auto first = std::find_if_not(scripts.begin(), scripts.end(), shared_by_scripts);
    Script before = first == scripts.end() ? Script{HB_SCRIPT_LATIN} : *first;
    for (Script& script : scripts) {
        if (shared_by_scripts(script))
            script = before;
        before = script;
    }
    return scripts;
}

std::vector<std::size_t> visual_order(const std::vector<std::uint8_t>& levels) {
    std::vector<std::size_t> order(levels.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    const std::uint8_t highest = levels.empty() ? std::uint8_t{0} : *std::max_element(levels.begin(), levels.end());
    for (std::uint8_t level = highest; level >= 1; --level) {
        const auto below = [&](std::size_t run) { return levels[run] < level; };
        for (auto start = order.begin(); start != order.end();) {
            start = std::find_if_not(start, order.end(), below);
            const auto end = std::find_if(start, order.end(), below);
            std::reverse(start, end);
            start = end;
        }
    }
    return order;
}

} // namespace dialwright::layout
