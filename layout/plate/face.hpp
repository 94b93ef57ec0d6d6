// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"
#include "layout/plate/dress.hpp"
#include "layout/plate/outline.hpp"
#include "layout/plate/plate_spec.hpp"

#include <stdexcept>
#include <string>
#include <vector>

namespace dialwright::layout {

/// All that layout needs to know to draw one face.
struct FaceSpec {
    std::string name; ///< "upper face"; empty for a dial with one face
    Plate plate;
    Borders borders;
    Gnomon gnomon;
    LetteringChoice lettering;
    Cutting cutting;
    LineWidths widths;
    Numerals numerals = Numerals::roman;
    NumeralStand stand = NumeralStand::along_border;
    int numeral_count = 12;
    int divide_min = 60;              ///< 0: the ring has no band of divisions
    double summer_shift_h = 0;        ///< > 0: a second row of numerals, this much on
    std::string summer_word;          ///< stands beside that row
    bool numeral_height_asked = true; ///< the maker named it, and is told where it has to be less; so with the motto's
    bool motto_height_asked = true;
    bool noon_mark = true;
    bool date_labels = true;
    bool compass = false; ///< level plates
    Angle reader_up;      ///< what is up for the reader of the plate, clockwise from +v
};

/// Where the dial stands on its plate.
struct Placement {
    Point foot; ///< of the nodus, work frame (mm from the middle of the plate's box)
    double nodus_height_mm = 0.0;
    Point key; ///< what the design's "plate: centre" would say: the dial's centre, or the foot of a nodus without one
    std::string why_place, why_height; ///< for the maker; empty where the design says it
};

/// Borders that leave no field.
struct BordersError : std::invalid_argument {
    using std::invalid_argument::invalid_argument;
};

/// The borders from the plate's edge inward.
struct Rings {
    Outline edge;      ///< of the plate
    Outline outer;     ///< outer border of the chapter ring
    Outline numerals;  ///< inner border of the band of numerals
    Outline divisions; ///< inner border of the band of divisions; the field of the dial
    /// @throws BordersError  the borders leave no field; the message says how much the plate has
    static Rings of(const FaceSpec& spec);
};

/// A line as it is drawn: one unbroken piece, trimmed to the borders. Lines in several pieces are several of these.
struct DrawnLine {
    Family family = Family::hour;
    HourTime time = HourTime::sun; ///< of an hour line
    int set = 0;                   ///< as DialLine::set
    int step_min = 60;
    Angle level;       ///< of an altitude circle or an azimuth line
    std::string label; ///< as it is engraved: the numeral of a whole hour, "9:15" between, a date line's label
    double time_h = 0.0;
    double width_mm = 0.0;
    Angle hour_angle;
    std::optional<Angle> direction;
    std::optional<Angle> declination;
    std::vector<PlatePoint> points; ///< plate frame, mm, before the page is turned
};

/// A mark of lettering.
struct Lettered {
    std::size_t mark = 0;    ///< in Face::drawing
    std::string kind;        ///< "numeral", "label", "motto": how the mark's name begins
    double capital_mm = 0.0; ///< height of the capitals, as cut
};

/// One face, ready for paper.
struct Face {
    std::string name;
    Delineation delineation;
    Placement placement;
    double gnomon_foot_mm = 0.0;  ///< length of the gnomon's foot along the substyle
    std::vector<DrawnLine> lines; ///< the ring's hours by time, other sets of hours by time, what is no hour, dates
    std::vector<FiguredFamily> families; ///< whose labels on the field are figures
    Drawing drawing;                     ///< turned so that the reader's up is the page's
    std::vector<Lettered> lettering;
    std::vector<std::string> warnings;
};

/// Finds where the dial stands on its plate: the centre so that the lines of all lit hours have as much room as they
/// can, the nodus as high as lets the date lines cross the line of the hour nearest to the substyle. What the design says is kept.
/// @param plan  its nodus_height_mm is 0 where it is to be found
[[nodiscard]] Placement place_on_plate(const DialPlan& plan, const MeanYear& year, const FaceSpec& spec);

/// Delineates and draws one face.
/// @throws LetteringError, GnomonError, BordersError, std::invalid_argument  with a message for the maker
[[nodiscard]] Face draw_face(DialPlan plan, const MeanYear& year, const FaceSpec& spec);

[[nodiscard]] inline Point to_work(PlatePoint p, Point foot) {
    return {foot.x_mm + p.u_mm, foot.y_mm + p.v_mm};
}
[[nodiscard]] inline PlatePoint to_plate(Point p, Point foot) {
    return {p.x_mm - foot.x_mm, p.y_mm - foot.y_mm};
}

} // namespace dialwright::layout
