// SPDX-License-Identifier: MIT
#include "cli/design/plain_text.hpp"

#include <algorithm>

namespace dialwright::cli {

namespace {

/// Bytes of the UTF-8 character that starts at `text`[i]; 0 when there is none (a stray or missing byte, an overlong
/// form, a surrogate, or beyond U+10FFFF). Source: RFC 3629, section 4.
std::size_t utf8_length(std::string_view text, std::size_t i) {
    const auto byte = [&](std::size_t k) { return k < text.size() ? static_cast<unsigned char>(text[k]) : 0U; };
    const auto follows = [&](std::size_t k, unsigned low = 0x80, unsigned high = 0xBF) {
        return byte(k) >= low && byte(k) <= high;
    };
    const unsigned first = byte(i);
    if (first < 0x80)
        return 1;
    if (first >= 0xC2 && first <= 0xDF)
        return follows(i + 1) ? 2 : 0;
    if (first >= 0xE0 && first <= 0xEF) {
        const bool second = follows(i + 1, first == 0xE0 ? 0xA0 : 0x80, first == 0xED ? 0x9F : 0xBF);
        return second && follows(i + 2) ? 3 : 0;
    }
    if (first >= 0xF0 && first <= 0xF4) {
        const bool second = follows(i + 1, first == 0xF0 ? 0x90 : 0x80, first == 0xF4 ? 0x8F : 0xBF);
        return second && follows(i + 2) && follows(i + 3) ? 4 : 0;
    }
    return 0;
}

/// U+0000 to U+001F and U+007F to U+009F, but tab, line end and next line (U+0085).
bool is_control(std::string_view text, std::size_t i) {
    const auto byte = static_cast<unsigned char>(text[i]);
    if (byte == '\t' || byte == '\n')
        return false;
    if (byte == 0xC2 && i + 1 < text.size()) {
        const auto second = static_cast<unsigned char>(text[i + 1]);
        return second < 0xA0 && second != 0x85;
    }
    return byte < 0x20 || byte == 0x7F;
}

} // namespace

std::string plain_lines(std::string_view text) {
    if (text.starts_with("\xEF\xBB\xBF"))
        text.remove_prefix(3);
    std::string plain;
    plain.reserve(text.size());
    for (std::size_t i = 0; i < text.size(); ++i) {
        if (text[i] != '\r')
            plain += text[i];
        else if (i + 1 == text.size() || text[i + 1] != '\n')
            plain += '\n';
    }
    return plain;
}

std::optional<BadCharacter> first_bad_character(std::string_view text) {
    Position at;
    for (std::size_t i = 0; i < text.size();) {
        const std::size_t length = utf8_length(text, i);
        if (length == 0)
            return BadCharacter{at, "this byte is not UTF-8 text", "save the file with the encoding UTF-8"};
        if (is_control(text, i))
            return BadCharacter{at, "there is a control character here", "save the file as plain UTF-8 text"};
        if (text[i] == '\n')
            at = {at.line + 1, 1};
        else
            ++at.column;
        i += length;
    }
    return std::nullopt;
}

std::string in_quotes(std::string_view text) {
    constexpr std::size_t k_longest = 60;
    std::string shown = "\"";
    for (std::size_t i = 0; i < text.size();) {
        const std::size_t length = std::max<std::size_t>(utf8_length(text, i), 1);
        if (i + length > k_longest) {
            shown += "…";
            break;
        }
        shown += text[i] == '\n' || text[i] == '\t' ? std::string{" "} : std::string{text.substr(i, length)};
        i += length;
    }
    return shown + '"';
}

} // namespace dialwright::cli
