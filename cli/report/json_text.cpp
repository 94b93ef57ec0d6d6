// SPDX-License-Identifier: MIT
#include "cli/report/json_text.hpp"

#include "layout/text/figures.hpp"

#include <algorithm>
#include <cmath>

namespace dialwright::cli {
namespace {

/// As JSON has it: what needs no escape is copied.
void write_text(const std::string& words, std::string& text) {
    const bool plain =
        std::all_of(words.begin(), words.end(), [](char c) { return c >= ' ' && c < '\x7f' && c != '"' && c != '\\'; });
    text += plain ? '"' + words + '"' : Json(words).dump(-1, ' ', false, Json::error_handler_t::replace);
}

/// Floating numbers fixed to the millionth; all else as the library writes it.
void write(const Json& json, std::string& text) {
    const auto write_list = [&](char open, char close, const auto& write_item) {
        text += open;
        for (auto item = json.begin(); item != json.end(); ++item) {
            if (item != json.begin())
                text += ',';
            write_item(item);
        }
        text += close;
    };
    if (json.is_object()) {
        write_list('{', '}', [&](const auto& item) {
            write_text(item.key(), text);
            text += ':';
            write(item.value(), text);
        });
    } else if (json.is_array()) {
        write_list('[', ']', [&](const auto& item) { write(*item, text); });
    } else if (json.is_number_float()) {
        if (const double number = json.get<double>(); !layout::append_fixed(text, number, 6, 1))
            text += layout::fixed(number, 1);
    } else if (json.is_string()) {
        write_text(json.get_ref<const std::string&>(), text);
    } else {
        text += json.dump(-1, ' ', false, Json::error_handler_t::replace);
    }
}

} // namespace

Json json_number(double value) {
    if (!std::isfinite(value))
        return nullptr;
    return value;
}

Json json_found(const Found& found) {
    return {{"value", json_number(found.value)}, {"range", json_number(found.range)}, {"told", found.told}};
}

std::string json_text(const Json& json) {
    std::string text;
    write(json, text);
    return text + "\n";
}

} // namespace dialwright::cli
