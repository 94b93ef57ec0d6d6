// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design_error.hpp"
#include "cli/design/plain_text.hpp"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

struct Entry;

/// A piece of a design file: a text, a list, or a mapping of keys to pieces. Numbers stay text, exactly as written.
struct Node {
    /// `refused` stands for a value that has had its error already, such as an alias: readers pass over it.
    enum class Kind { empty, text, list, mapping, refused };
    Kind kind = Kind::empty;
    Position at; ///< where it starts; of an empty value, where its key stands
    std::string text;
    std::vector<Node> items;
    std::vector<Entry> entries; ///< in the order of the file, no key twice

    [[nodiscard]] const Entry* find(std::string_view key) const;
};

struct Entry {
    std::string key;
    Position at; ///< of the key
    Node value;
};

struct DocumentReading {
    std::optional<Node> root; ///< a mapping; absent when the text can't be followed to its end
    std::vector<DesignError> errors;
};

/// The largest design file that is read, the deepest nesting, the most pieces. Far above any honest design.
inline constexpr std::size_t k_largest_file_bytes = 1'000'000;
inline constexpr std::size_t k_deepest_nesting = 32;
inline constexpr std::size_t k_most_nodes = 20'000;

/// What to do about a file without keys.
inline constexpr std::string_view k_design_start_hint =
    "start with what is made and where: \"dial:\", \"place:\" and \"plate:\"";

/// The tree of a YAML text. Refused, each with its place: text that is not UTF-8, control characters, keys given twice,
/// anchors and aliases, tags, keys that are not text, deep nesting, too many pieces, a second document. A byte order
/// mark and any kind of line end are accepted. Never throws for what is in the text.
[[nodiscard]] DocumentReading read_document(std::string_view text, const std::string& file,
                                            std::string_view start_hint = k_design_start_hint);

} // namespace dialwright::cli
