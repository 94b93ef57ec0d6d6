// SPDX-License-Identifier: MIT
#pragma once

#include "cli/packet/packet.hpp"

#include <string>

namespace dialwright::cli {

/// The packet's index, to read: what to measure first, the order of work, what each file is for, what to look out for.
[[nodiscard]] std::string contents_of(const Commission& commission, const Packet& packet);

} // namespace dialwright::cli
