// SPDX-License-Identifier: MIT
#include "cli/report/json_text.hpp"
#include "cli/report/say.hpp"

#include <cmath>

namespace dialwright::cli {
namespace {

/// Numbers to the millionth, without exponents, "-0" or noise in the last digits; all else as the library writes it.
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
        std::string number = fixed(json.get<double>(), 6);
        number.erase(number.find_last_not_of('0') + 1);
        text += number.ends_with('.') ? number + '0' : number;
    } else {
        text += json.dump(-1, ' ', false, Json::error_handler_t::replace);
    }
}

} // namespace

Json number(double value) {
    if (!std::isfinite(value))
        return nullptr;
    return value;
}

std::string json_text(const Json& json) {
    std::string text;
    write(json, text);
    return text + '\n';
}

} // namespace dialwright::cli
