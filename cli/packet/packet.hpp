// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "cli/packet/write_files.hpp"

namespace dialwright::cli {

/// All files of a commission's packet, and what they are for.
struct Packet {
    struct Item {
        OutputFile file;
        std::string purpose; ///< "full-scale sheets: print this", for the maker
    };
    std::vector<Item> items;
    std::vector<std::string> warnings; ///< of this very design
    std::vector<std::string> cautions; ///< of the work
    std::size_t sheets = 0;            ///< in the PDF
};

/// @throws layout::ExportError  with a message for the maker
[[nodiscard]] Packet make_packet(const Commission& commission);

/// The same; tells on stderr, at the design's key, what keeps it from being printed.
/// @return nothing after an error has been told
[[nodiscard]] std::optional<Packet> take_packet(const Commission& commission);

} // namespace dialwright::cli
