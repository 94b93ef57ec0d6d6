// SPDX-License-Identifier: MIT
#pragma once

#include "engine/time/instant.hpp"

#include <optional>
#include <string>
#include <string_view>

namespace dialwright {

/// Reads an instant in the extended form of ISO 8601: 2026-06-21T11:00:00Z, or with an offset, 2026-06-21T12:00:00+01:00.
/// Seconds may be left out (11:00Z) or carry a decimal point or comma and up to nine digits, rounded to the microsecond.
/// The offset (Z, ±hh:mm, ±hh) must be there: an instant without one is not an instant.
/// @return nothing if any character is out of place, or a date or time does not exist; years 0000 to 9999.
///         24:00:00 is the end of its day. A leap second (23:59:60) is read as the second that follows it.
[[nodiscard]] std::optional<Instant> read_instant(std::string_view text);

/// Writes an instant as 2026-06-21T11:00:00Z; a fraction of a second only where there is one, without trailing zeros.
/// Years 0000 to 9999.
[[nodiscard]] std::string write_instant(Instant instant);

} // namespace dialwright
