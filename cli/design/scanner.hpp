// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/quantity.hpp"

#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// What the text of a quantity is made of: a number, a word (lower case), or a sign ("°", "'", "\"", "-", "/", ":", …).
struct Scrap {
    enum class Kind { number, word, sign };
    Kind kind = Kind::sign;
    std::string text;
    double number = 0.0;
    bool whole = false; ///< a number without a decimal point
};

/// Walks along the scraps of one quantity.
class Scanner {
  public:
    /// Trouble for a number that is too long or has a decimal comma.
    static Read<Scanner> over(std::string_view text);

    [[nodiscard]] bool at_end() const { return next_ >= scraps_.size(); }
    [[nodiscard]] std::string_view rest_word() const { return at_end() ? std::string_view{} : scraps_[next_].text; }
    [[nodiscard]] bool number_next(std::size_t ahead = 0) const {
        return next_ + ahead < scraps_.size() && scraps_[next_ + ahead].kind == Scrap::Kind::number;
    }
    [[nodiscard]] bool word_next() const { return !at_end() && scraps_[next_].kind == Scrap::Kind::word; }
    [[nodiscard]] bool sign_next(std::string_view sign, std::size_t ahead = 0) const {
        return next_ + ahead < scraps_.size() && scraps_[next_ + ahead].kind == Scrap::Kind::sign &&
               scraps_[next_ + ahead].text == sign;
    }
    /// The next scrap, which is there.
    const Scrap& take() { return scraps_[next_++]; }
    bool take_sign(std::string_view sign) {
        const bool there = sign_next(sign);
        next_ += there ? 1 : 0;
        return there;
    }
    bool take_word(std::string_view word) {
        const bool there = word_next() && scraps_[next_].text == word;
        next_ += there ? 1 : 0;
        return there;
    }

  private:
    std::vector<Scrap> scraps_;
    std::size_t next_ = 0;
};

/// Degrees, minutes and seconds of arc from the scanner's place on ("54° 14' 20.5\"", "54.2340"), without a sign.
[[nodiscard]] Read<double> scan_degrees(Scanner& scan, std::string_view whole_text);

} // namespace dialwright::cli
