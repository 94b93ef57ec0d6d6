// SPDX-License-Identifier: MIT
#include "cli/design/edit_design.hpp"
#include "cli/design/document.hpp"
#include "cli/design/read_design.hpp"

#include <algorithm>
#include <optional>

namespace dialwright::cli {
namespace {

/// A text with byte order mark and any kind of line end, addressed as plain_lines() counts it.
class Bytes {
  public:
    explicit Bytes(std::string_view text) : text_{text} {
        const std::size_t first = text.starts_with("\xEF\xBB\xBF") ? 3 : 0;
        starts_.push_back(first);
        for (std::size_t i = first; i < text.size(); ++i) {
            if (text[i] == '\r' && i + 1 < text.size() && text[i + 1] == '\n')
                ++i;
            if (text[i] == '\n' || text[i] == '\r')
                starts_.push_back(i + 1);
        }
    }

    [[nodiscard]] std::size_t at(Position place) const {
        std::size_t i = starts_[std::size_t(place.line) - 1];
        for (int column = 1; column < place.column && i < text_.size(); ++column)
            for (++i; i < text_.size() && (static_cast<unsigned char>(text_[i]) & 0xC0U) == 0x80U;)
                ++i;
        return i;
    }
    /// Past the last character of a line, before its end.
    [[nodiscard]] std::size_t end_of_line(int line) const {
        std::size_t end = std::size_t(line) < starts_.size() ? starts_[std::size_t(line)] : text_.size();
        while (end > starts_[std::size_t(line) - 1] && (text_[end - 1] == '\n' || text_[end - 1] == '\r'))
            --end;
        return end;
    }
    [[nodiscard]] std::string_view line_end() const {
        return text_.find("\r\n") != std::string_view::npos ? "\r\n" : "\n";
    }

  private:
    std::string_view text_;
    std::vector<std::size_t> starts_;
};

/// Past the last byte of the value that starts at `start`; nothing for one that runs over several lines.
std::optional<std::size_t> end_of_value(std::string_view text, std::size_t start, bool in_braces) {
    if (start >= text.size())
        return std::nullopt;
    const char quote = text[start];
    if (quote == '"' || quote == '\'') {
        for (std::size_t i = start + 1; i < text.size() && text[i] != '\n'; ++i) {
            if (quote == '"' && text[i] == '\\')
                ++i;
            else if (text[i] == quote && quote == '\'' && i + 1 < text.size() && text[i + 1] == quote)
                ++i;
            else if (text[i] == quote)
                return i + 1;
        }
        return std::nullopt;
    }
    std::size_t end = start;
    for (; end < text.size() && text[end] != '\n' && text[end] != '\r'; ++end)
        if ((text[end] == '#' && end > start && (text[end - 1] == ' ' || text[end - 1] == '\t')) ||
            (in_braces && (text[end] == ',' || text[end] == '}')))
            break;
    while (end > start && (text[end - 1] == ' ' || text[end - 1] == '\t'))
        --end;
    return end;
}

struct Change {
    std::size_t from, to;
    std::string put;
};

class Editor {
  public:
    Editor(std::string_view text, const std::string& file) : text_{text}, bytes_{text}, file_{file} {}

    DesignEdit edited(const Node& root, const std::vector<std::pair<std::string, std::string>>& values) {
        const Entry* dial = root.find("dial"); // the design is readable: the section is there, with its kind
        in_braces_ = text_[bytes_.at(dial->value.at)] == '{';
        const Entry* kind = dial->value.find("kind");
        const Entry* above = kind; // a new key stands below the one before it
        for (const auto& [key, value] : values) {
            const Entry* entry = dial->value.find(key);
            const bool good = entry != nullptr ? exchange(*entry, value) : add(*above, key, value);
            if (entry != nullptr)
                above = entry;
            if (!good) {
                const Position at = (entry != nullptr ? entry : kind)->value.at;
                return {{},
                        {{file_, at.line, at.column, "dial: " + key, "this value runs over more than one line",
                          "write it on one line"}}};
            }
        }
        std::stable_sort(changes_.begin(), changes_.end(),
                         [](const Change& a, const Change& b) { return a.from < b.from; });
        std::string made;
        std::size_t done = 0;
        for (const Change& change : changes_) {
            made += text_.substr(done, change.from - done);
            made += change.put;
            done = change.to;
        }
        made += text_.substr(done);
        return {std::move(made), {}};
    }

  private:
    bool exchange(const Entry& entry, const std::string& value) {
        const std::size_t start = bytes_.at(entry.value.at);
        const auto end = end_of_value(text_, start, in_braces_);
        if (end)
            changes_.push_back({start, *end, value});
        return end.has_value();
    }

    bool add(const Entry& above, const std::string& key, const std::string& value) {
        if (in_braces_) {
            const auto end = end_of_value(text_, bytes_.at(above.value.at), true);
            if (end)
                changes_.push_back({*end, *end, ", " + key + ": " + value});
            return end.has_value();
        }
        const std::size_t end = bytes_.end_of_line(above.value.at.line);
        const std::string indent(std::size_t(above.at.column) - 1, ' ');
        changes_.push_back({end, end, std::string{bytes_.line_end()} + indent + key + ": " + value});
        return true;
    }

    std::string_view text_;
    Bytes bytes_;
    const std::string& file_;
    bool in_braces_ = false;
    std::vector<Change> changes_;
};

} // namespace

DesignEdit with_dial_values(std::string_view text, const std::string& file,
                            const std::vector<std::pair<std::string, std::string>>& values) {
    DesignReading before = read_design(text, file);
    // A design that only lacks what is to be written is as good as a whole one.
    std::erase_if(before.errors, [&](const DesignError& error) {
        return std::any_of(values.begin(), values.end(),
                           [&](const auto& pair) { return error.key == "dial: " + pair.first; });
    });
    const DocumentReading document = read_document(text, file);
    if (!before.errors.empty())
        return {{}, std::move(before.errors)};
    DesignEdit edit = Editor{text, file}.edited(*document.root, values);
    if (!edit.errors.empty())
        return edit;
    DesignReading after = read_design(edit.text, file);
    if (!after.design)
        return {{}, std::move(after.errors)};
    return edit;
}

} // namespace dialwright::cli
