// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/dial_plan.hpp"
#include "layout/plate/plate_spec.hpp"

#include <chrono>
#include <map>
#include <optional>
#include <string>
#include <vector>

namespace dialwright::cli {

using dialwright::HalfYear;
using dialwright::HourTime;
using layout::Borders;
using layout::Cutting;
using layout::Gnomon;
using layout::LetteringChoice;
using layout::Numerals;
using layout::NumeralStand;
using layout::Plate;
using layout::PlatePointMm;
using layout::PlateShape;

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

struct Hours {
    HourTime time = HourTime::sun;
    std::optional<double> first_h, last_h; ///< on the dial's own time; not given: all that are ever lit
    int divide_min = 15;                   ///< the finest division asked for: 60, 30, 15, 10, 5, 2, 1
    Numerals numerals = Numerals::roman;
    int count = 12; ///< 12 or 24
    HalfYear curves = HalfYear::whole; ///< of clock time
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

struct FilePlace {
    int line = 1, column = 1;
};

struct Design {
    std::string file;
    std::map<std::string, FilePlace> where; ///< of each key and section that the file gives: "place: latitude"
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
