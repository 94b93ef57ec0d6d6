// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/quantity.hpp"
#include "engine/time/instant.hpp"
#include "engine/time/zone.hpp"

#include <chrono>
#include <optional>
#include <string_view>

namespace dialwright::cli {

/// When the clocks of `zone` showed "2027-05-03 10:12:30", "3 May 2027 10:12", "10:12 am" (on `day`). After the time may stand
/// "Z" or "UTC", an offset (+01:00), or the zone's own letters (BST), which settle an hour that the clocks show twice.
/// Trouble for a time that the clocks jumped over, and for one that they showed twice where nothing settles it.
[[nodiscard]] Read<Instant> clock_instant(std::string_view text, std::optional<std::chrono::year_month_day> day,
                                          const Zone& zone);

} // namespace dialwright::cli
