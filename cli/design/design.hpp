// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/dial_plan.hpp"
#include "layout/correction/correction_plate.hpp"
#include "layout/export/layer_table.hpp"
#include "layout/plate/plate_spec.hpp"
#include "layout/sheet/compensation.hpp"

#include <chrono>
#include <map>
#include <optional>
#include <string>
#include <vector>

namespace dialwright::cli {

using dialwright::HalfYear;
using dialwright::HourExtent;
using dialwright::HourTime;
using layout::Borders;
using layout::CorrectionForm;
using layout::Cutting;
using layout::FootKind;
using layout::Gnomon;
using layout::GnomonKind;
using layout::JointOptions;
using layout::LetteringChoice;
using layout::NodusKind;
using layout::Numerals;
using layout::NumeralStand;
using layout::Plate;
using layout::PlatePointMm;
using layout::PlateShape;
using layout::TableSteps;
using layout::Tool;

/// What a design file says, with what it leaves open filled in by the trade's habit (each such filling is in `assumed`).
/// Lengths are millimetres. One struct a section of the file; docs/design-file.md describes each key.

struct Place {
    std::string name;
    Site site;
    std::string zone;                   ///< tz database name
    std::vector<Skyline::Mark> skyline; ///< empty: the flat horizon
};

enum class DialKind { level, wall, leaning, equatorial };
/// Upper or front, lower or back.
enum class Faces { upper, lower, both };
struct Dial {
    DialKind kind = DialKind::level;
    Angle facing = Angle::degrees(180); ///< azimuth of the outward normal; wall and leaning
    Angle lean;                         ///< back from upright; negative overhangs; wall and leaning
    Faces faces = Faces::upper;         ///< of a slab: of an equatorial plate, a wall or a leaning slab
};

/// A width, or a share of the tool's own line; neither: by the order of weight.
struct LineWeight {
    double width_mm = 0.0, share = 0.0;
    [[nodiscard]] double of(double line_width_mm) const { return width_mm > 0 ? width_mm : share * line_width_mm; }
};
using DayRange = std::pair<std::chrono::month_day, std::chrono::month_day>;
/// How a family of lines is drawn, where the design says.
struct FamilyLook {
    LineWeight weight;
    std::optional<DayRange> between; ///< from day to day
};
struct Hours {
    HourTime time = HourTime::sun;
    std::optional<double> first_h, last_h; ///< on the dial's own time; not given: all that are ever lit
    int divide_min = 15;                   ///< the finest division asked for: 60, 30, 15, 10, 5, 2, 1
    Numerals numerals = Numerals::roman;
    int count = 12;                    ///< 12 or 24
    HalfYear curves = HalfYear::whole; ///< of clock time
    NumeralStand stand = NumeralStand::along_border;
    FamilyLook look;
    bool noon_mark = true;
    HourExtent reach = HourExtent::style;
    bool summer_numerals = false; ///< a second row, an hour on, for the zone's summer time
    bool seen_rise = false; ///< hours from sunrise or to sunset count from the rising that people see (refraction)
};

/// Lines drawn on the field beside the hours of the chapter ring.
struct MoreHours {
    HourTime time = HourTime::unequal;
    std::optional<double> first_h, last_h; ///< whole hours; not given: all that are ever lit
    HalfYear curves = HalfYear::whole;
    FamilyLook look;
};
struct Also {
    std::vector<MoreHours> hours; ///< each time at most once, in the order of the file
    std::vector<Angle> altitudes, azimuths;
    std::vector<PlaceNoon> noons;
    FamilyLook altitude_look, azimuth_look, noon_look;
};

struct NamedDay {
    std::chrono::month_day day{};
    std::string label;
};
struct Dates {
    bool solstices = true, equinoxes = true, signs = false, months = false;
    std::vector<NamedDay> days;
    bool labels = true;
    LineWeight weight;
    std::optional<std::pair<double, double>>
        hours; ///< from and to, on the dial's scale where that is of the Sun or the zone
};

/// The plate that says how to come from the dial to the clock.
struct CorrectionMade {
    bool wanted = false; ///< the section is there: a plate is made
    CorrectionForm form = CorrectionForm::graph;
    double width_mm = 0.0, height_mm = 0.0; ///< a ring: both its diameter
    double letter_height_mm = 0.0;
    std::optional<TableSteps> dates; ///< of a table; nothing: the closest for which its letters have room
};

struct Years {
    int first = 2027, last = 2046;
};

/// What files for machines are like.
struct Machine {
    double kerf_mm = 0.0; ///< whole width of the cut
    bool arcs = true;     ///< false: chords in their place
    double flatten_mm = 0.01;
    std::optional<double> hairline_mm; ///< of all strokes in an SVG
    bool mirrored = false;
    layout::LayerTable layers = layout::usual_layers();
};

/// How workshop layers come on paper.
enum class PrintedLayers {
    together,
    one_by_one, ///< sheets for each
    in_viewer   ///< the viewer can switch them
};

/// The dates for which the packet gets a fixing sheet.
struct FixingDates {
    std::optional<std::chrono::year_month_day> first, last; ///< both or none
};

/// How well the work can be done: what the accuracy page reckons with. Each is how far off the thing may be, either way.
struct Tolerances {
    double marking_mm = 0.5;                  ///< a line beside its place
    Angle style_height = Angle::degrees(0.5); ///< of a pin: how far it leans up or down the plate
    Angle substyle = Angle::degrees(0.5);     ///< of a pin: how far it leans to a side
    Angle facing = Angle::degrees(1);         ///< of a level plate: how it is turned
    Angle lean = Angle::degrees(0.5);         ///< from upright, from the slope, from level
    double print_mm = 0.2;                    ///< of a 100 mm bar, one way of the paper against the other
    Angle position = Angle::degrees(0.01);    ///< on the map, in latitude and in longitude
};

struct Print {
    std::string paper = "A4";
    double margin_mm = 8.0, overlap_mm = 10.0;
    bool own_size = true; ///< one page of the work's own size as well
    layout::PaperTurn turn = layout::PaperTurn::fewest_sheets;
    layout::Compensation printer;
    bool mirrored = false;
    PrintedLayers layers = PrintedLayers::together;
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
    Also also;
    Dates dates;
    CorrectionMade correction;
    FixingDates fixing;
    Tolerances tolerances;
    Years years;
    LetteringChoice lettering;
    Cutting cutting;
    Machine machine;
    Print print;
    Units units = Units::millimetres;
    std::vector<Assumption> assumed;
};

} // namespace dialwright::cli
