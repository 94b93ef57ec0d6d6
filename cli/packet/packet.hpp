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
    std::vector<std::string> remarks;  ///< what was done for the machine
    std::vector<std::string> cautions; ///< of the work
    std::size_t sheets = 0;            ///< in the PDF
};

/// What of the packet is printed.
struct PrintChoice {
    std::vector<layout::Layer> layers; ///< none: all of them
    std::string sheet;                 ///< "B2": that sheet of every piece alone; empty: the whole book
};

/// @throws layout::ExportError  with a message for the maker
[[nodiscard]] Packet make_packet(const Commission& commission);
/// The sheets that are chosen, as one PDF.
/// @return its item, and how many sheets it has; none where no sheet is called so
/// @throws layout::ExportError
[[nodiscard]] Packet chosen_sheets(const Commission& commission, const PrintChoice& choice);

/// The same; tells on stderr, at the design's key, what keeps it from being printed.
/// @return nothing after an error has been told
[[nodiscard]] std::optional<Packet> take_packet(const Commission& commission, const PrintChoice& choice = {});

} // namespace dialwright::cli
