// SPDX-License-Identifier: MIT
#pragma once

#include <nlohmann/json.hpp>

#include <string>

namespace dialwright::cli {

using Json = nlohmann::ordered_json;

/// Null where there is no number.
[[nodiscard]] Json number(double value);
/// One line of text. Numbers to the millionth, without exponents, "-0" or noise in the last digits.
[[nodiscard]] std::string json_text(const Json& json);

} // namespace dialwright::cli
