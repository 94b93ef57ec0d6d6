// SPDX-License-Identifier: MIT
#pragma once

#include "engine/survey/found.hpp"

#include <nlohmann/json.hpp>

#include <string>

namespace dialwright::cli {

using Json = nlohmann::ordered_json;

/// A number for a file; null where there is none.
[[nodiscard]] Json json_number(double value);

/// {"value", "range", "told"}.
[[nodiscard]] Json json_found(const Found& found);

/// One line of JSON, always valid. Numbers to the millionth, without exponents, "-0" or noise in the last digits.
[[nodiscard]] std::string json_text(const Json& json);

} // namespace dialwright::cli
