// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/section.hpp"
#include "engine/survey/known.hpp"
#include "engine/time/instant.hpp"
#include "engine/time/zone.hpp"

#include <chrono>
#include <optional>

namespace dialwright::cli {

// What files of readings have in common.

/// The day that holds for times without one; nothing where the key "day" is not there.
[[nodiscard]] std::optional<std::chrono::year_month_day> read_day(const Section& top);

/// The key "at" (or another) of one reading: when it was taken.
[[nodiscard]] std::optional<Instant> read_time(const Section& reading, std::string_view key,
                                               std::optional<std::chrono::year_month_day> day, const Zone& zone);

/// Reports a reading of the Sun at a time when it was down; says so if half a day on or back it was up.
/// @return true where it was up (its middle, through the air)
bool check_sun_up(const Section& reading, std::string_view key, const Site& site, Instant at, const Zone& zone);

/// A quantity with its ±; `give` where the file leaves that out.
[[nodiscard]] std::optional<Known> read_given(const Section& section, std::string_view key,
                                              Read<Known> (*reader)(std::string_view, double), double give);

/// What a list of mappings holds at `key`; reports what is no mapping.
[[nodiscard]] std::vector<const Node*> mappings_at(const Section& top, std::string_view key, std::string_view item,
                                                   std::size_t most, const std::string& hint);

} // namespace dialwright::cli
