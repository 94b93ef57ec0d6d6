// SPDX-License-Identifier: MIT
#pragma once

#include "cli/packet/packet.hpp"
#include "cli/packet/work_pieces.hpp"

namespace dialwright::cli {

/// An SVG and a DXF of each piece that a machine cuts, with the design's kerf, layers and mirroring, and the list of parts.
/// What was done for the kerf is added to the packet's remarks.
/// @throws layout::ExportError  with a message for the maker: a kerf that is wider than a part, …
void add_machine_files(Packet& packet, const Commission& commission, const std::vector<WorkPiece>& pieces);

} // namespace dialwright::cli
