// SPDX-License-Identifier: MIT
#pragma once

#include "layout/lettering/plate_lettering.hpp"
#include "layout/plate/clear_map.hpp"
#include "layout/plate/dress.hpp"
#include "layout/plate/face.hpp"
#include "layout/plate/points.hpp"

namespace dialwright::layout {

/// A face while it is being drawn. The steps of draw_face add to it in turn; everything is in the work frame (mm from
/// the middle of the plate's box), and is turned for the reader at the end.
struct Bench {
    Bench(const FaceSpec& face_spec, const Delineation& delineated, const Placement& placed);

    const FaceSpec& spec;
    const Delineation& delineation;
    Point foot;                  ///< of the nodus
    std::optional<Point> centre; ///< where it is on the field
    Rings rings;
    std::vector<Outline> keep_out; ///< the border round the centre, and labels that lines stop for
    Point up;                      ///< unit, the reader's
    PlateLettering lettering;
    std::vector<FiguredFamily> families; ///< on the field, and how their labels are set
    ClearMap clear;

    std::vector<Mark> marks;
    std::vector<DrawnLine> lines;
    std::vector<Lettered> lettered;
    std::vector<std::string> warnings;
    std::vector<const DialLine*> cut_once; ///< lines of which a part lies along another's, which is drawn

    /// Widths in their order of weight.
    [[nodiscard]] double width_of_step(int step_min) const;
    /// @param set  as DialLine::set
    [[nodiscard]] double field_line_width(Family family, int set) const;
    /// How far into the field the marks of half and quarter hours reach from its border.
    [[nodiscard]] double half_hour_reach_mm() const;
    [[nodiscard]] double quarter_hour_reach_mm() const;
    [[nodiscard]] double division_band_mm() const;
    /// The nodus' shadow alone is read, which never comes to the ring: divisions stand where it does come.
    [[nodiscard]] bool divides_in_field() const { return spec.divide_min == 0; }
    [[nodiscard]] Region field() const { return {{rings.divisions}, keep_out}; }

    /// The plate's lettering, or its italic, which is opened when it is first wanted.
    [[nodiscard]] const PlateLettering& letters(bool italic);
    void engrave(const Polyline& line, double width_mm, std::string name);
    void add_line(const DialLine& line, const Polyline& piece, std::string label, double width_mm);
    /// Filled outlines, or strokes of the tool's own line.
    /// @param kind  "label"; the mark is named by it and by the text, if that is not empty
    void add_letters(std::vector<Path> paths, const std::string& kind, const std::string& text, double capital_mm);
    void add_filled(std::vector<Path> paths, std::string name, Layer layer = Layer::engrave);
    [[nodiscard]] Polyline to_work(const PlatePolyline& piece) const;

  private:
    std::optional<PlateLettering> italic_;
};

/// Drops what a label has left of a line on both its sides: crumbs that a tool would only spoil.
void drop_scraps(std::vector<Polyline>& pieces, double width_mm);

/// The last part (0 to 1) of a straight line.
[[nodiscard]] inline Polyline end_part(const Polyline& line, double part) {
    return {between(line.back(), line.front(), part), line.back()};
}
/// How much of its line the mark of a quarter hour takes at either end where it stands in the field.
inline constexpr double k_field_mark = 0.10;

/// Where a whole hour's line points to in the chapter ring.
struct RingHour {
    int hour;
    Point from, direction;
};

void draw_borders(Bench& bench);
void draw_hours(Bench& bench);
void draw_numerals(Bench& bench, const std::vector<RingHour>& hours, bool heads_out);
void draw_field_lines(Bench& bench);
void draw_gnomon_seat(Bench& bench, double foot_mm, double nodus_height_mm);
void draw_compass(Bench& bench);
void draw_motto(Bench& bench);
void draw_place_line(Bench& bench);
void draw_legend(Bench& bench);

/// Where on the plate's middle line, or also beside it, an upright box has room.
struct RoomWish {
    bool anywhere = false;
    double middle = 0.6; ///< what a step aside from the middle line costs, against clearance
};
/// @param wanted_mm  clear all round
/// @return the box's middle; call after measuring bench.clear
[[nodiscard]] std::optional<Point> find_room(const Bench& bench, double half_width_mm, double half_height_mm,
                                             double wanted_mm, RoomWish wish);

/// The gnomon's foot along the substyle: what the design says, else from the centre to beneath the nodus.
[[nodiscard]] double gnomon_foot_mm(const Bench& bench);

} // namespace dialwright::layout
