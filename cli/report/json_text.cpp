// SPDX-License-Identifier: MIT
#include "cli/report/json_text.hpp"

#include "layout/text/figures.hpp"

#include <cmath>

namespace dialwright::cli {
namespace {

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
            text += Json(item.key()).dump() + ':';
            write(item.value(), text);
        });
    } else if (json.is_array()) {
        write_list('[', ']', [&](const auto& item) { write(*item, text); });
    } else if (json.is_number_float()) {
        std::string number = layout::fixed(json.get<double>(), 6);
        number.erase(number.find_last_not_of('0') + 1);
        text += number.ends_with('.') ? number + '0' : number;
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
