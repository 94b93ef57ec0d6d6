// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/document.hpp"
#include "cli/design/keys.hpp"
#include "cli/design/quantity.hpp"

#include <algorithm>
#include <cassert>
#include <functional>
#include <map>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace dialwright::cli {

/// What is known while a file is read: its errors, and which keys the file gives ("place: latitude").
struct ReadingState {
    std::string file;
    std::span<const KnownKey> keys = known_keys(); ///< all that such a file may hold
    std::string_view whose = "a design";           ///< what it is, for messages
    Units units = Units::millimetres;
    std::vector<DesignError> errors;
    std::map<std::string, Position, std::less<>> given; ///< and where

    void error(Position at, std::string key, std::string message, std::string hint) {
        errors.push_back({file, at.line, at.column, std::move(key), std::move(message), std::move(hint)});
    }
    [[nodiscard]] bool gives(std::string_view key) const { return given.contains(key); }
    /// An error of this key was reported, so what its value stands for is not known.
    [[nodiscard]] bool faulty(std::string_view key) const {
        return std::any_of(errors.begin(), errors.end(), [&](const DesignError& e) { return e.key == key; });
    }
};

/// A word of a design file and what it stands for.
template <class T>
using Choice = std::pair<std::string_view, T>;

/// One section of the file (or its top, with the name ""). Reports unknown keys and empty values when it is opened;
/// each read reports what is wrong with its value and then gives nothing.
class Section {
  public:
    /// @param holder  the section's entry; null when the file does not have it
    Section(const Entry* holder, std::string_view name, ReadingState& state);
    /// A mapping that is no entry: the file's top, or an item of a list.
    Section(const Node& mapping, std::string_view name, ReadingState& state);

    /// The section is there and is a mapping, maybe an empty one.
    [[nodiscard]] bool given() const { return mapping_ != nullptr; }
    /// The key is there, whatever its value.
    [[nodiscard]] bool has(std::string_view key) const { return entry(key) != nullptr; }
    [[nodiscard]] const Entry* entry(std::string_view key) const;
    [[nodiscard]] ReadingState& state() const { return *state_; }

    /// An error at the key's value, or where the section starts when the key is not there.
    void error(std::string_view key, std::string message, std::string hint) const;
    /// An error of the section as a whole.
    void error_here(std::string message, std::string hint) const;
    /// An error, unless a misspelt key was reported that was surely meant to be this one.
    void missing(std::string_view key, std::string hint) const;
    /// An unknown key of the section was nearest to this one.
    [[nodiscard]] bool misspelt(std::string_view key) const;
    /// Each of `keys` that is there is an error of the same kind.
    void refuse(std::initializer_list<std::string_view> keys, const std::string& message,
                const std::string& hint) const;

    /// The text of a value; nothing (reported) for a list, a mapping, or an empty value.
    [[nodiscard]] const std::string* text(std::string_view key) const;
    /// One line of text, of at most `most` bytes, without spaces at its ends.
    [[nodiscard]] std::optional<std::string> line(std::string_view key, std::size_t most) const;

    template <class T>
    [[nodiscard]] std::optional<T> read(std::string_view key, Read<T> (*reader)(std::string_view)) const {
        return read<T>(key, std::function<Read<T>(std::string_view)>{reader});
    }
    template <class T>
    [[nodiscard]] std::optional<T> read(std::string_view key,
                                        const std::function<Read<T>(std::string_view)>& reader) const {
        const std::string* written = text(key);
        if (written == nullptr)
            return std::nullopt;
        Read<T> value = reader(*written);
        if (value)
            return *value;
        error(key, value.trouble().message, value.trouble().hint);
        return std::nullopt;
    }

    /// Leaves `target` as it is when the key is not there or its value is wrong.
    template <class T>
    void read_into(T& target, std::string_view key, Read<T> (*reader)(std::string_view)) const {
        if (const std::optional<T> value = read(key, reader))
            target = *value;
    }

    /// Millimetres from `least_mm` to `most_mm`.
    [[nodiscard]] std::optional<double> length(std::string_view key, double least_mm, double most_mm) const;
    /// Leaves `target` alone when there is no good value.
    void length_into(double& target, std::string_view key, double least_mm, double most_mm) const {
        if (const auto mm = length(key, least_mm, most_mm))
            target = *mm;
    }
    [[nodiscard]] std::optional<int> count(std::string_view key, int least, int most) const;

    template <class T>
    [[nodiscard]] std::optional<T> choice(std::string_view key, std::span<const Choice<T>> choices) const {
        std::vector<std::string_view> words;
        for (const auto& [word, value] : choices)
            words.push_back(word);
        const std::optional<std::size_t> at = choice_of(key, words);
        return at ? std::optional<T>{choices[*at].second} : std::nullopt;
    }

  private:
    void open(const Node& mapping);
    [[nodiscard]] std::optional<std::size_t> choice_of(std::string_view key,
                                                       std::span<const std::string_view> words) const;

    const Node* mapping_ = nullptr;
    Position at_; ///< where the section starts, or should
    std::string name_;
    std::vector<std::string_view> misspelt_; ///< keys that unknown ones were nearest to
    ReadingState* state_;
};

/// "[right, up]", two lengths of at most `most_mm` either way; reports to `state` under `key`.
[[nodiscard]] std::optional<PlatePointMm> read_point(const Node& node, const std::string& key, double most_mm,
                                                     ReadingState& state);

/// The items of the list that stands at `key`; nothing for a key that is not there, and (reported) for what is no list
/// or one of less than `least` or more than `most` items.
/// @param item  what one is called, as in "pair"
/// @param hint  how to write the list
[[nodiscard]] std::span<const Node> list_at(const Section& section, std::string_view key, std::string_view item,
                                            std::size_t least, std::size_t most, const std::string& hint);

/// "a list" and so on, for messages.
[[nodiscard]] std::string_view kind_name(const Node& node);

} // namespace dialwright::cli
