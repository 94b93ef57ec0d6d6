// SPDX-License-Identifier: MIT
#include "engine/time/instant_text.hpp"

#include <array>
#include <cassert>
#include <charconv>
#include <cstdint>

namespace dialwright {
namespace {

using namespace std::chrono;

/// Walks along the text; every take_… either takes what it names and says true, or leaves the text alone.
class Reader {
  public:
    explicit Reader(std::string_view text) : rest_{text} {}

    bool take(char wanted) {
        if (rest_.empty() || rest_.front() != wanted)
            return false;
        rest_.remove_prefix(1);
        return true;
    }
    /// Exactly `width` digits.
    bool take_digits(std::size_t width, int& value) {
        if (rest_.size() < width)
            return false;
        for (std::size_t i = 0; i < width; ++i)
            if (!is_digit(rest_[i]))
                return false;
        std::from_chars(rest_.data(), rest_.data() + width, value);
        rest_.remove_prefix(width);
        return true;
    }
    /// One to nine digits after a decimal mark, as nanoseconds.
    bool take_fraction(std::int64_t& nanoseconds) {
        std::size_t width = 0;
        nanoseconds = 0;
        while (width < rest_.size() && is_digit(rest_[width]) && width < 10) {
            nanoseconds = nanoseconds * 10 + (rest_[width] - '0');
            ++width;
        }
        if (width == 0 || width > 9)
            return false;
        for (std::size_t i = width; i < 9; ++i)
            nanoseconds *= 10;
        rest_.remove_prefix(width);
        return true;
    }
    [[nodiscard]] bool done() const { return rest_.empty(); }

  private:
    static bool is_digit(char c) { return c >= '0' && c <= '9'; }
    std::string_view rest_;
};

std::optional<sys_days> read_date(Reader& reader) {
    int y = 0, m = 0, d = 0;
    if (!reader.take_digits(4, y) || !reader.take('-') || !reader.take_digits(2, m) || !reader.take('-') ||
        !reader.take_digits(2, d))
        return std::nullopt;
    const year_month_day date{year{y}, month{static_cast<unsigned>(m)}, day{static_cast<unsigned>(d)}};
    if (!date.ok())
        return std::nullopt;
    return sys_days{date};
}

std::optional<nanoseconds> read_time_of_day(Reader& reader) {
    int h = 0, m = 0, s = 0;
    std::int64_t fraction = 0;
    if (!reader.take_digits(2, h) || !reader.take(':') || !reader.take_digits(2, m))
        return std::nullopt;
    if (reader.take(':')) {
        if (!reader.take_digits(2, s))
            return std::nullopt;
        if ((reader.take('.') || reader.take(',')) && !reader.take_fraction(fraction))
            return std::nullopt;
    }
    const bool end_of_day = h == 24 && m == 0 && s == 0 && fraction == 0;
    const bool leap_second = m == 59 && s == 60;
    if ((h > 23 && !end_of_day) || m > 59 || (s > 59 && !leap_second))
        return std::nullopt;
    return hours{h} + minutes{m} + seconds{s} + nanoseconds{fraction};
}

std::optional<minutes> read_offset(Reader& reader) {
    if (reader.take('Z'))
        return minutes{0};
    int sign = 0, h = 0, m = 0;
    if (reader.take('+'))
        sign = 1;
    else if (reader.take('-'))
        sign = -1;
    else
        return std::nullopt;
    if (!reader.take_digits(2, h) || h > 23)
        return std::nullopt;
    if (reader.take(':') && (!reader.take_digits(2, m) || m > 59))
        return std::nullopt;
    return sign * (hours{h} + minutes{m});
}

/// `value` in `width` digits.
void write_digits(std::string& out, std::int64_t value, int width) {
    std::array<char, 20> digits{};
    for (int i = width - 1; i >= 0; --i) {
        digits[static_cast<std::size_t>(i)] = static_cast<char>('0' + value % 10);
        value /= 10;
    }
    out.append(digits.data(), static_cast<std::size_t>(width));
}

} // namespace

std::optional<Instant> read_instant(std::string_view text) {
    Reader reader{text};
    const auto date = read_date(reader);
    if (!date || !reader.take('T'))
        return std::nullopt;
    const auto time = read_time_of_day(reader);
    if (!time)
        return std::nullopt;
    const auto offset = read_offset(reader);
    if (!offset || !reader.done())
        return std::nullopt;
    return Instant{*date} + round<microseconds>(*time) - *offset;
}

std::string write_instant(Instant instant) {
    const auto day = floor<days>(instant);
    const year_month_day date{day};
    assert(date.year() >= year{0} && date.year() <= year{9999});
    const hh_mm_ss time{instant - day};
    std::string out;
    out.reserve(27);
    write_digits(out, static_cast<int>(date.year()), 4);
    out += '-';
    write_digits(out, static_cast<unsigned>(date.month()), 2);
    out += '-';
    write_digits(out, static_cast<unsigned>(date.day()), 2);
    out += 'T';
    write_digits(out, time.hours().count(), 2);
    out += ':';
    write_digits(out, time.minutes().count(), 2);
    out += ':';
    write_digits(out, time.seconds().count(), 2);
    if (time.subseconds().count() != 0) {
        out += '.';
        write_digits(out, time.subseconds().count(), 6);
        while (out.back() == '0')
            out.pop_back();
    }
    out += 'Z';
    return out;
}

} // namespace dialwright
