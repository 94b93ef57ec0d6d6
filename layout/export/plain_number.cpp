// SPDX-License-Identifier: MIT
#include "layout/export/plain_number.hpp"

#include "layout/sheet/export_error.hpp"

#include <array>
#include <cmath>

namespace dialwright::layout {

void add_number(std::string& text, double value, int decimals, int least) {
    if (!std::isfinite(value) || std::abs(value) > 1e7)
        throw ExportError("A line of the drawing runs off to infinity, so no file for a machine was made.");
    // From one whole number, because there are a hundred thousand of them in a packet.
    static constexpr std::array<double, 11> k_tens{1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10};
    const double scaled = value * k_tens.at(static_cast<std::size_t>(decimals));
    if (!(std::abs(scaled) < 9e15))
        throw ExportError("A line of the drawing is too long for its decimals, so no file for a machine was made.");
    const long long whole = std::llrint(scaled); // as printf rounds
    std::array<char, 24> digits{};
    char* const end = digits.data() + digits.size();
    char* at = end;
    int left = decimals;
    auto rest = static_cast<unsigned long long>(whole < 0 ? -whole : whole);
    for (; left > least && rest % 10 == 0; --left)
        rest /= 10;
    for (int i = left; i > 0; --i, rest /= 10)
        *--at = static_cast<char>('0' + rest % 10);
    if (left > 0)
        *--at = '.';
    do
        *--at = static_cast<char>('0' + rest % 10);
    while ((rest /= 10) > 0);
    if (whole < 0)
        *--at = '-';
    text.append(at, static_cast<std::size_t>(end - at));
}

std::string in_capitals(std::string_view text) {
    std::string capitals{text};
    for (char& c : capitals)
        c = c >= 'a' && c <= 'z' ? static_cast<char>(c - 'a' + 'A') : c;
    return capitals;
}

} // namespace dialwright::layout
