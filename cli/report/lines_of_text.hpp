// SPDX-License-Identifier: MIT
#pragma once

#include <fmt/format.h>

#include <iterator>
#include <string>
#include <utility>

namespace dialwright::cli {

/// A text for people, line by line.
class LinesOfText {
  public:
    template <class... Parts>
    void line(fmt::format_string<Parts...> form, Parts&&... parts) {
        fmt::format_to(std::back_inserter(text_), form, std::forward<Parts>(parts)...);
        text_ += '\n';
    }
    void gap() { text_ += '\n'; }
    void add(const std::string& lines) { text_ += lines; } ///< whole lines
    [[nodiscard]] std::string taken() { return std::move(text_); }

  private:
    std::string text_;
};

} // namespace dialwright::cli
