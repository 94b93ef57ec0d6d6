// SPDX-License-Identifier: MIT
#include "cli/design/nearest.hpp"

#include <algorithm>

namespace dialwright::cli {

namespace {

/// A word that is longer than this is not a slip of the pen, and comparing it would only cost time.
constexpr std::size_t k_longest_word = 60;

char plain(char c) {
    if (c >= 'A' && c <= 'Z')
        return static_cast<char>(c - 'A' + 'a');
    return c == '_' || c == '-' ? ' ' : c;
}

} // namespace

int slips_between(std::string_view a, std::string_view b) {
    std::vector<int> two_above(b.size() + 1), above(b.size() + 1), row(b.size() + 1);
    for (std::size_t j = 0; j <= b.size(); ++j)
        row[j] = static_cast<int>(j);
    for (std::size_t i = 1; i <= a.size(); ++i) {
        two_above.swap(above);
        above.swap(row);
        row[0] = static_cast<int>(i);
        for (std::size_t j = 1; j <= b.size(); ++j) {
            const int other = plain(a[i - 1]) == plain(b[j - 1]) ? 0 : 1;
            row[j] = std::min({above[j] + 1, row[j - 1] + 1, above[j - 1] + other});
            if (i > 1 && j > 1 && plain(a[i - 1]) == plain(b[j - 2]) && plain(a[i - 2]) == plain(b[j - 1]))
                row[j] = std::min(row[j], two_above[j - 2] + 1);
        }
    }
    return row[b.size()];
}

std::string_view nearest(std::string_view word, std::span<const std::string_view> candidates) {
    if (word.empty() || word.size() > k_longest_word)
        return {};
    std::string_view best;
    int fewest = std::max(1, static_cast<int>(word.size()) / 3) + 1;
    for (const std::string_view candidate : candidates) {
        const int slips = slips_between(word, candidate);
        if (slips < fewest && slips < static_cast<int>(candidate.size())) {
            fewest = slips;
            best = candidate;
        }
    }
    return best;
}

std::string one_of(std::span<const std::string_view> words) {
    std::string text;
    for (std::size_t i = 0; i < words.size(); ++i) {
        if (i > 0)
            text += i + 1 == words.size() ? " or " : ", ";
        text += words[i];
    }
    return text;
}

} // namespace dialwright::cli
