// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/site.hpp"

#include <chrono>
#include <optional>
#include <string>
#include <vector>

namespace dialwright::cli {

/// What a design file says, with what it leaves open filled in by the trade's habit (each such filling is in `assumed`).
/// Lengths are millimetres. One struct a section of the file; docs/design-file.md describes each key.

struct Place {
    std::string name;
    Site site;
    std::string zone; ///< tz database name
};

enum class DialKind { level, wall, leaning, equatorial };
enum class Faces { upper, lower, both };
struct Dial {
    DialKind kind = DialKind::level;
    Angle facing = Angle::degrees(180); ///< azimuth of the outward normal; wall and leaning
    Angle lean;                         ///< back from upright; negative overhangs; wall and leaning
    Faces faces = Faces::upper;         ///< equatorial only
};

enum class PlateShape { round, rectangle, octagon, polygon };
struct PlatePointMm {
    double right_mm = 0.0, up_mm = 0.0;
};
struct Plate {
    PlateShape shape = PlateShape::round;
    double width_mm = 0.0, height_mm = 0.0; ///< round: both the diameter; octagon: both across flats
    std::vector<PlatePointMm> corners;      ///< polygon, any turn, from the maker's own origin
    std::optional<PlatePointMm> centre;     ///< where the dial's centre (or the nodus' foot where there is none) stands
                                            ///< from the middle of the plate's box
    std::string material;
};

struct Borders {
    double margin_mm = 0.0;       ///< plate's edge to the outer border
    double chapter_ring_mm = 0.0; ///< between outer and inner line of the ring that holds the numerals
    double inner_mm = 0.0;        ///< radius of the border round the centre at which lines stop
};

enum class GnomonKind { edge, pin };
struct Hole {
    PlatePointMm at; ///< along the substyle from the foot of the style (right_mm = along, up_mm = across)
};
struct Gnomon {
    std::optional<double> nodus_height_mm;
    double thickness_mm = 0.0;
    std::optional<double> foot_mm; ///< length of the foot along the substyle, from the centre
    int holes = 0;                 ///< fixing holes, evenly along the foot
    double hole_diameter_mm = 0.0;
};

enum class HourTime { sun, zone, clock };
enum class Numerals { roman, roman_iiii, arabic };
enum class NumeralStand { along_border, upright };
struct Hours {
    HourTime time = HourTime::sun;
    std::optional<double> first_h, last_h; ///< on the dial's own time; not given: all that are ever lit
    int divide_min = 15;                   ///< the finest division asked for: 60, 30, 15, 10, 5, 2, 1
    Numerals numerals = Numerals::roman;
    int count = 12; ///< 12 or 24
    NumeralStand stand = NumeralStand::along_border;
    bool noon_mark = true;
};

struct NamedDay {
    std::chrono::month_day day{};
    std::string label;
};
struct Dates {
    bool solstices = true, equinoxes = true, signs = false, months = false;
    std::vector<NamedDay> days;
    bool labels = true;
};

struct Years {
    int first = 2027, last = 2046;
};

struct LetteringChoice {
    std::string family = "EB Garamond";
    double numeral_height_mm = 0.0; ///< capitals
    double label_height_mm = 0.0;
    std::string motto;
    double motto_height_mm = 0.0;
    std::string place_line; ///< empty: none
};

struct Cutting {
    double line_width_mm = 0.4; ///< the tool's own line: hour lines; finer ones are never thinner than half of it
    double least_gap_mm = 0.8;  ///< clear material between two lines
};

struct Print {
    std::string paper = "A4";
    double margin_mm = 8.0, overlap_mm = 10.0;
    bool own_size = true; ///< one page of the work's own size as well
};

enum class Units { millimetres, inches };

struct Assumption {
    std::string key;   ///< "gnomon: nodus height"
    std::string value; ///< as the design file would say it
    std::string why;
};

struct Design {
    std::string file;
    std::string title;
    Place place;
    Dial dial;
    Plate plate;
    Borders borders;
    Gnomon gnomon;
    Hours hours;
    Dates dates;
    Years years;
    LetteringChoice lettering;
    Cutting cutting;
    Print print;
    Units units = Units::millimetres;
    std::vector<Assumption> assumed;
};

} // namespace dialwright::cli
