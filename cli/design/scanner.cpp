// SPDX-License-Identifier: MIT
#include "cli/design/scanner.hpp"
#include "cli/design/plain_text.hpp"

#include <array>
#include <charconv>

namespace dialwright::cli {

namespace {

struct Respelling {
    std::string_view found, plain;
};
/// Signs that keyboards and word processors write for the plain ones.
constexpr std::array k_respellings = {
    Respelling{"\u00BA", "°"},     Respelling{"\u02DA", "°"},     Respelling{"\u2032", "'"},
    Respelling{"\u2019", "'"},     Respelling{"\u2018", "'"},     Respelling{"\u02B9", "'"},
    Respelling{"\u2033", "\""},    Respelling{"\u201D", "\""},    Respelling{"\u201C", "\""},
    Respelling{"\u02BA", "\""},    Respelling{"\u2212", "-"},     Respelling{"\u2013", "-"},
    Respelling{"\u2010", "-"},     Respelling{"\u2011", "-"},     Respelling{"\u2044", "/"},
    Respelling{"\u00A0", " "},     Respelling{"\u2009", " "},     Respelling{"\u202F", " "},
    Respelling{"\u00BC", " 1/4 "}, Respelling{"\u00BD", " 1/2 "}, Respelling{"\u00BE", " 3/4 "},
    Respelling{"\u215B", " 1/8 "}, Respelling{"\u215C", " 3/8 "}, Respelling{"\u215D", " 5/8 "},
    Respelling{"\u215E", " 7/8 "}};

std::string plainly_spelt(std::string_view text) {
    std::string plain;
    for (std::size_t i = 0; i < text.size();) {
        std::size_t length = 1;
        std::string_view put = text.substr(i, 1);
        for (const Respelling& respelling : k_respellings)
            if (text.substr(i).starts_with(respelling.found)) {
                length = respelling.found.size();
                put = respelling.plain;
                break;
            }
        plain += put;
        i += length;
    }
    // Two single primes, typed or typographic, are a double prime.
    for (std::size_t at = plain.find("''"); at != std::string::npos; at = plain.find("''")) {
        plain.erase(at, 1);
        plain[at] = '"';
    }
    return plain;
}

bool is_digit(char c) {
    return c >= '0' && c <= '9';
}
bool is_letter(char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}
bool is_space(char c) {
    return c == ' ' || c == '\t' || c == '\n';
}
bool continues_character(char c) {
    return (static_cast<unsigned char>(c) & 0xC0U) == 0x80U;
}

template <class Test>
std::size_t run_of(std::string_view text, std::size_t from, Test&& belongs) {
    while (from < text.size() && belongs(text[from]))
        ++from;
    return from;
}

/// Past the last character of the number that starts at `from`: digits, and a point with digits after it.
std::size_t end_of_number(std::string_view text, std::size_t from) {
    std::size_t end = run_of(text, from, is_digit);
    if (end + 1 < text.size() && text[end] == '.' && is_digit(text[end + 1]))
        end = run_of(text, end + 1, is_digit);
    return end;
}

} // namespace

Read<Scanner> Scanner::over(std::string_view text) {
    constexpr std::size_t k_longest = 200;
    if (text.size() > k_longest)
        return Trouble{in_quotes(text) + " is too long", "write one quantity, as in 360 mm, 54° 14' N or 14 June"};
    const std::string plain = plainly_spelt(text);
    Scanner scan;
    for (std::size_t i = 0; i < plain.size();) {
        std::size_t end = i + 1;
        Scrap scrap;
        const bool point_first = plain[i] == '.' && i + 1 < plain.size() && is_digit(plain[i + 1]);
        if (is_space(plain[i])) {
            i = end;
            continue;
        }
        if (is_digit(plain[i]) || point_first) {
            end = end_of_number(plain, i);
            if (end + 1 < plain.size() && plain[end] == ',' && is_digit(plain[end + 1]))
                return Trouble{in_quotes(text) + " has a comma in a number", "write a decimal point, as in 14.2"};
            scrap.kind = Scrap::Kind::number;
            scrap.whole = plain.find('.', i) >= end;
            const auto result = std::from_chars(plain.data() + i, plain.data() + end, scrap.number);
            if (result.ec != std::errc{} || result.ptr != plain.data() + end)
                return Trouble{in_quotes(text) + " has a number that can't be meant", "write it with fewer digits"};
        } else if (is_letter(plain[i])) {
            end = run_of(plain, i, is_letter);
            scrap.kind = Scrap::Kind::word;
        } else {
            end = run_of(plain, end, continues_character);
        }
        scrap.text = plain.substr(i, end - i);
        if (scrap.kind == Scrap::Kind::word)
            for (char& c : scrap.text)
                c = static_cast<char>(c >= 'A' && c <= 'Z' ? c - 'A' + 'a' : c);
        scan.scraps_.push_back(std::move(scrap));
        i = end;
    }
    return scan;
}

Read<double> scan_degrees(Scanner& scan, std::string_view whole_text) {
    const std::string example = "write it as in 54° 14' 20\", or as in 54.2389";
    if (!scan.number_next())
        return Trouble{in_quotes(whole_text) + " has no angle where one is wanted", example};
    const Scrap degrees = scan.take();
    double sum = degrees.number;
    if (!scan.take_sign("°") && !scan.take_word("deg") && !scan.take_word("degrees"))
        return sum;
    bool last_is_whole = degrees.whole;
    double size = 1.0;
    for (const std::string_view sign : {"'", "\""}) {
        size /= 60.0;
        if (!scan.number_next() || (sign == "'" && scan.sign_next("\"", 1)))
            continue;
        const Scrap part = scan.take();
        const std::string name = sign == "'" ? "minutes" : "seconds";
        if (!scan.take_sign(sign))
            return Trouble{in_quotes(whole_text) + ": the " + part.text + " has no " + std::string{sign} + " after it",
                           example};
        if (part.number >= 60.0)
            return Trouble{in_quotes(whole_text) + ": " + part.text + " " + name + " of arc are too many",
                           "give less than 60"};
        if (!last_is_whole)
            return Trouble{in_quotes(whole_text) + " has a decimal point before the " + name, example};
        sum += part.number * size;
        last_is_whole = part.whole;
    }
    return sum;
}

} // namespace dialwright::cli
