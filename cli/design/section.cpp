// SPDX-License-Identifier: MIT
#include "cli/design/section.hpp"

#include "cli/design/nearest.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

namespace dialwright::cli {

std::string_view kind_name(const Node& node) {
    switch (node.kind) {
    case Node::Kind::empty:
        return "nothing";
    case Node::Kind::text:
        return "a text";
    case Node::Kind::list:
        return "a list";
    case Node::Kind::refused:
        return "nothing readable";
    case Node::Kind::mapping:
        return "a set of keys";
    }
    return {};
}

Section::Section(const Entry* holder, std::string_view name, ReadingState& state) : name_{name}, state_{&state} {
    if (holder == nullptr)
        return;
    at_ = holder->at;
    const Node& value = holder->value;
    if (value.kind == Node::Kind::mapping) {
        open(value);
        return;
    }
    if (value.kind == Node::Kind::refused)
        return;
    const std::string example{keys_of(name, state.keys).front()};
    if (value.kind == Node::Kind::empty)
        state.error(holder->at, name_, "this section has nothing in it", "indent its keys below it, or leave it out");
    else
        state.error(value.at, name_, fmt::format("{} stands where the section's keys are wanted", kind_name(value)),
                    value.text.find(':') == std::string::npos
                        ? fmt::format("start with \"{}:\" on the next line, indented", example)
                        : std::string{"put a space after the colon"});
}

Section::Section(const Node& mapping, std::string_view name, ReadingState& state)
    : at_{mapping.at}, name_{name}, state_{&state} {
    open(mapping);
}

void Section::open(const Node& mapping) {
    mapping_ = &mapping;
    for (const Entry& entry : mapping.entries) {
        if (is_known(name_, entry.key, state_->keys)) {
            const bool is_section = entry.value.kind == Node::Kind::mapping;
            state_->given.emplace(full_name(name_, entry.key), is_section ? entry.at : entry.value.at);
            continue;
        }
        misspelt_.push_back(nearest(entry.key, keys_of(name_, state_->keys)));
        state_->error(entry.at, name_,
                      fmt::format("{} is not a key of {}{}", in_quotes(entry.key), state_->whose,
                                  name_.empty() ? "" : "'s " + name_),
                      hint_for_unknown(name_, entry.key, state_->keys));
    }
}

const Entry* Section::entry(std::string_view key) const {
    assert(is_known(name_, key, state_->keys));
    return mapping_ == nullptr ? nullptr : mapping_->find(key);
}

void Section::error(std::string_view key, std::string message, std::string hint) const {
    const Entry* found = entry(key);
    Position at = found == nullptr ? at_ : found->value.at;
    state_->error(at, full_name(name_, key), std::move(message), std::move(hint));
}

void Section::error_here(std::string message, std::string hint) const {
    state_->error(at_, name_, std::move(message), std::move(hint));
}

bool Section::misspelt(std::string_view key) const {
    return std::find(misspelt_.begin(), misspelt_.end(), key) != misspelt_.end();
}

void Section::missing(std::string_view key, std::string hint) const {
    if (!misspelt(key))
        error(key, "is missing", std::move(hint));
}

void Section::refuse(std::initializer_list<std::string_view> keys, const std::string& message,
                     const std::string& hint) const {
    for (const std::string_view key : keys)
        if (const Entry* found = entry(key))
            state_->error(found->at, full_name(name_, key), message, hint);
}

const std::string* Section::text(std::string_view key) const {
    const Entry* found = entry(key);
    if (found == nullptr || found->value.kind == Node::Kind::refused)
        return nullptr;
    if (found->value.kind == Node::Kind::text && found->value.text.find_first_not_of(" \t\n") != std::string::npos)
        return &found->value.text;
    if (found->value.kind == Node::Kind::text || found->value.kind == Node::Kind::empty)
        error(key, "has no value", "write one after the colon, or leave the key out");
    else
        error(key, fmt::format("{} stands where one value is wanted", kind_name(found->value)),
              "write one value after the colon");
    return nullptr;
}

std::optional<std::string> Section::line(std::string_view key, std::size_t most) const {
    const std::string* written = text(key);
    if (written == nullptr)
        return std::nullopt;
    const std::size_t first = written->find_first_not_of(" \t\n");
    const std::size_t last = written->find_last_not_of(" \t\n");
    std::string kept = written->substr(first, last - first + 1);
    if (kept.find_first_of("\n\t") != std::string::npos) {
        error(key, "has more than one line of text", "keep it on one line");
        return std::nullopt;
    }
    if (kept.size() > most) {
        error(key, fmt::format("{} is too long", in_quotes(kept)), fmt::format("keep it to {} letters", most));
        return std::nullopt;
    }
    return kept;
}

std::optional<double> Section::length(std::string_view key, double least_mm, double most_mm) const {
    const std::optional<double> mm = read(key, length_mm);
    if (!mm || (*mm >= least_mm && *mm <= most_mm))
        return mm;
    const std::string range =
        fmt::format("give {} to {}", length_text(least_mm, state_->units), length_text(most_mm, state_->units));
    const char* fault = *mm < 0.0 ? "is below zero" : (*mm < least_mm ? "is too small" : "is too large");
    error(key, fmt::format("{} {}", in_quotes(*text(key)), fault), range);
    return std::nullopt;
}

std::optional<int> Section::count(std::string_view key, int least, int most) const {
    const std::optional<int> number = read(key, whole_number);
    if (!number || (*number >= least && *number <= most))
        return number;
    error(key, fmt::format("{} is out of range", *number), fmt::format("give {} to {}", least, most));
    return std::nullopt;
}

std::optional<std::size_t> Section::choice_of(std::string_view key, std::span<const std::string_view> words) const {
    const std::string* written = text(key);
    if (written == nullptr)
        return std::nullopt;
    for (std::size_t i = 0; i < words.size(); ++i)
        if (written->size() == words[i].size() && slips_between(*written, words[i]) == 0)
            return i;
    const std::string_view meant = nearest(*written, words);
    error(key, fmt::format("{} is not one of its values", in_quotes(*written)),
          meant.empty() ? "give " + one_of(words) : fmt::format("did you mean {}? It may be {}", meant, one_of(words)));
    return std::nullopt;
}

std::span<const Node> list_at(const Section& section, std::string_view key, std::string_view item, std::size_t least,
                              std::size_t most, const std::string& hint) {
    const Entry* entry = section.entry(key);
    if (entry == nullptr || entry->value.kind == Node::Kind::refused)
        return {};
    const Node& list = entry->value;
    if (list.kind == Node::Kind::list && list.items.size() >= least && list.items.size() <= most)
        return list.items;
    if (list.kind == Node::Kind::list)
        section.error(key,
                      list.items.size() == 1 ? fmt::format("1 {} is given", item)
                                             : fmt::format("{} {}s are given", list.items.size(), item),
                      fmt::format("give {} to {}, as in {}", least, most, hint));
    else
        section.error(key, fmt::format("{} stands where a list is wanted", kind_name(list)), "write it as in " + hint);
    return {};
}

std::optional<PlatePointMm> read_point(const Node& node, const std::string& key, double most_mm, ReadingState& state) {
    const std::string hint = "write it as in [20 mm, -5 mm]: to the right, then up";
    if (node.kind == Node::Kind::refused)
        return std::nullopt;
    if (node.kind != Node::Kind::list || node.items.size() != 2) {
        const std::string found = node.kind == Node::Kind::list ? fmt::format("a list of {}", node.items.size())
                                                                : std::string{kind_name(node)};
        state.error(node.at, key, found + " stands where a point is wanted", hint);
        return std::nullopt;
    }
    PlatePointMm point;
    bool good = true;
    for (std::size_t i = 0; i < 2; ++i) {
        const Node& item = node.items[i];
        const Read<double> mm =
            item.kind == Node::Kind::text
                ? length_mm(item.text)
                : Read<double>{Trouble{fmt::format("{} stands where a length is wanted", kind_name(item)), hint}};
        if (!mm)
            state.error(item.at, key, mm.trouble().message, mm.trouble().hint);
        else if (std::abs(*mm) > most_mm)
            state.error(item.at, key, in_quotes(item.text) + " is too far",
                        fmt::format("give at most {} either way", length_text(most_mm, state.units)));
        else
            (i == 0 ? point.right_mm : point.up_mm) = *mm;
        good = good && mm && std::abs(*mm) <= most_mm;
    }
    return good ? std::optional{point} : std::nullopt;
}

} // namespace dialwright::cli
