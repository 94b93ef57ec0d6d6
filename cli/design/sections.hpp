// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/section.hpp"
#include "layout/plate/family_words.hpp"

#include <array>
#include <initializer_list>

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
void read_also(Design& design, const Section& top); ///< after the hours: no time is drawn twice
void read_dates(Design& design, const Section& top);
void read_looks(Design& design, const Section& top);      ///< weights and extents; after all lines
void read_correction(Design& design, const Section& top); ///< after the hours, which it corrects
void read_fixing(Design& design, const Section& top);
void read_accuracy(Design& design, const Section& top);
void read_lettering(Design& design, const Section& top);
void read_cutting(Design& design, const Section& top);
void read_print(Design& design, const Section& top);

/// The kinds of time, as `hours: time` and the keys of `also` name them.
inline constexpr auto k_hour_times = [] {
    std::array<Choice<HourTime>, 7> choices;
    std::size_t i = 0;
    for (const HourTime time : {HourTime::sun, HourTime::zone, HourTime::clock, HourTime::since_sunrise,
                                HourTime::since_sunset, HourTime::to_sunset, HourTime::unequal})
        choices[i++] = {layout::words_of(time).name, time};
    return choices;
}();

/// The largest side of a plate, and the smallest.
inline constexpr double k_largest_plate_mm = 5000.0;
inline constexpr double k_smallest_plate_mm = 20.0;

/// The smaller side of the plate's box; 0 while the plate is not known.
[[nodiscard]] double smaller_side_mm(const Plate& plate);

/// The dial draws hours of one of these times, on its chapter ring or beside it.
[[nodiscard]] bool draws_any(const Design& design, std::initializer_list<HourTime> times);
/// The dial draws hour lines that are straight: these can run on with the style's shadow.
[[nodiscard]] bool draws_straight_hours(const Design& design);
/// The kind of time by which a reading of the dial becomes clock time with minutes that depend on the date alone: that
/// of the chapter ring, else of hours drawn beside it. Nothing if the dial shows no such hours.
[[nodiscard]] std::optional<HourTime> corrected_time(const Design& design);
/// The dial draws hours that count from the Sun's rising or setting.
[[nodiscard]] bool counts_from_the_horizon(const Design& design);

} // namespace dialwright::cli
