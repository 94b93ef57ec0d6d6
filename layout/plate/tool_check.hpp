// SPDX-License-Identifier: MIT
#pragma once

#include "layout/plate/face.hpp"

#include <string>
#include <vector>

namespace dialwright::layout {

/// The finest line that the named tool leaves: an end mill's or a laser's own width; of a V half its full line, or its
/// flat where that is wider (common practice, no source: a V run shallower than half its depth chatters and fades). 0
/// where no tool is named.
[[nodiscard]] double thinnest_line_mm(const Cutting& cutting);

/// Two lines of a face that run too close to each other, side by side (within 30°), and do not meet. The ring's own hours
/// may meet (at the centre) and are told all the same.
struct CloseLines {
    std::string a, b;        ///< names, as the marks have them: "hour line XI", "date line 21 Jun"
    std::string kinds;       ///< of both: "date lines", "altitude circles and date lines"
    double gap_mm = 0.0;     ///< clear material between them, widths taken off; 0 or less where they overlap
    Point at;                ///< where, from the plate's middle, x right and y up for the reader
    bool of_ring = false;    ///< both are hours of the chapter ring
    double a_h = 0, b_h = 0; ///< of_ring: their times
    double radius_mm = 0; ///< of_ring: the border round the centre from which both stand clear; 0: there is no centre
    double reach_mm = 0;  ///< of_ring: how far from the centre the shorter of both runs
};

/// Each pair once, the closest first. Marks between the hours in the ring's band are not looked at: they are chosen to
/// stand clear. Where no tool is named, date lines only. Accuracy: that of the lines' own points.
[[nodiscard]] std::vector<CloseLines> close_lines(const Face& face, const FaceSpec& spec);

/// Whether the named tool is so wide that no hour line of the ring stands clear of its neighbours anywhere on the plate.
[[nodiscard]] bool parts_no_hours(const Face& face, const FaceSpec& spec);

/// What of a drawn face the tool cannot cut, for the maker, about eight sentences at most: lettering with strokes or
/// eyes finer than the tool, lines closer than the least gap, widths that had to grow.
/// @param face  with its drawing turned for the reader
[[nodiscard]] std::vector<std::string> tool_warnings(const Face& face, const FaceSpec& spec);

} // namespace dialwright::layout
