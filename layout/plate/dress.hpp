// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// How the figures of one family are set, so that the labels of a crowded plate tell its families apart.
struct Dress {
    enum class Figures { plain, small_roman, in_brackets, dotted };
    Figures figures = Figures::plain;
    bool italic = false;
    friend bool operator==(const Dress&, const Dress&) = default;
};
/// "upright figures", "small roman figures, italic".
[[nodiscard]] std::string say_dress(const Dress& dress);

/// A family of lines on the field whose labels are figures.
struct FiguredFamily {
    Family family;
    HourTime time; ///< of hours
    int set;       ///< as DialLine::set
    Dress dress;
    std::string sample; ///< the label of one of its lines
};

/// Those of a face. Hours take their dresses in the order of the design: upright figures first, then italic, small roman,
/// and so on; azimuths are italic where altitudes, which have degrees as well, are upright.
[[nodiscard]] std::vector<FiguredFamily> figured_families(const Delineation& delineation);

/// A label of a line on the field: in the dress of its family, a date's or a place's as it is.
[[nodiscard]] std::string field_label(const DialLine& line, const Dress& dress);
[[nodiscard]] Dress dress_of(const DialLine& line, const std::vector<FiguredFamily>& families);

/// Whether a line belongs to the chapter ring's hours, and not to the field's.
[[nodiscard]] inline bool in_ring(const DialLine& line) {
    return line.set == 0 && is_hour(line.family) && !counts_from_horizon(line.family);
}

} // namespace dialwright::layout
