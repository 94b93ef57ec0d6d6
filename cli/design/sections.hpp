// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/section.hpp"

namespace dialwright::cli {

// One reader a section of the file: fills its part of the design with what the file gives, reports what is wrong, and
// leaves alone what is not given. `top` is the file's top.

void read_units(Design& design, const Section& top); ///< first: later messages speak in these units
void read_top(Design& design, const Section& top);
void read_place(Design& design, const Section& top);
void read_dial(Design& design, const Section& top);
void read_plate(Design& design, const Section& top);
void read_borders(Design& design, const Section& top);
void read_gnomon(Design& design, const Section& top);
void read_hours(Design& design, const Section& top);
void read_dates(Design& design, const Section& top);
void read_lettering(Design& design, const Section& top);
void read_cutting(Design& design, const Section& top);
void read_print(Design& design, const Section& top);

/// The largest side of a plate, and the smallest.
inline constexpr double k_largest_plate_mm = 5000.0;
inline constexpr double k_smallest_plate_mm = 20.0;

/// The smaller side of the plate's box; 0 while the plate is not known.
[[nodiscard]] double smaller_side_mm(const Plate& plate);

} // namespace dialwright::cli
