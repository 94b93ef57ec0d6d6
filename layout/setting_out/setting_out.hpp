// SPDX-License-Identifier: MIT
#pragma once

#include "layout/plate/face.hpp"
#include "layout/setting_out/datum.hpp"

namespace dialwright::layout {

/// Which line round the plate a rule is laid along.
enum class MeasuredBorder { plate_edge, outer_border, field };

struct SettingOutOptions {
    MeasuredBorder border = MeasuredBorder::plate_edge;
    bool inches = false;
    double chord_radius_mm =
        0.0;               ///< of the circle round the centre that dividers step along; 0: a round number that fits
    bool divisions = true; ///< lines finer than an hour as well
    std::vector<Mark> more_holes; ///< drill marks beside those of the face's drawing, in its frame
};

/// One point to mark. Every length is from one datum, none from another point.
struct SettingOutPoint {
    std::string line; ///< "hour line XI"; "fixing hole 1"
    std::string what; ///< "inner end", "outer end", where a piece "breaks off" and "goes on", "meets the edge", …
    Point at;         ///< mm right and up of the datum
    std::optional<BorderPlace> border; ///< where it lies on the measured border
    std::string pole;                  ///< that radius and angle are measured from; the own centre of an hour line
    double radius_mm = 0.0;            ///< from the pole
    Angle angle;           ///< about the pole, from the zero line through it, clockwise positive, in [−180°, 180°)
    double chord_mm = 0.0; ///< on the chord circle, from where the zero line meets it to where the radius does
    double diameter_mm = 0.0; ///< of a hole
};

struct SettingOut {
    bool inches = false;
    std::string datum;     ///< "lower left corner": where x and y begin
    std::string zero_line; ///< "straight down": which way angles are measured from, at each pole
    /// "dial's centre", and where the gnomon's thickness parts two half-dials their "left centre" and "right centre";
    /// "nodus' foot" where the centre is off the plate. From the datum.
    std::vector<Datum::NamedPoint> poles;
    double chord_radius_mm = 0.0;
    std::vector<SettingOutPoint> points; ///< line by line, as the face has them
    std::vector<SettingOutPoint> holes;
    std::vector<std::string>
        checks; ///< sentences: diagonals, where each hour line meets the border, two distances to its end
};

/// The numbers by which a mason draws the face with rule, square and dividers. Straight lines are carried on to the
/// measured border; curves are given by their ends and where they cross the hour lines.
/// Accuracy: as the drawing's own points; crossings of curves are those of its chords.
[[nodiscard]] SettingOut set_out(const Face& face, const FaceSpec& spec, const SettingOutOptions& options);

/// A heading and rows of text: millimetres to a tenth, or inches in 1/64.
struct SettingOutTable {
    std::vector<std::string> heading;
    std::vector<std::vector<std::string>> rows;
};
[[nodiscard]] SettingOutTable table_of_lines(const SettingOut& out);
[[nodiscard]] SettingOutTable table_of_holes(const SettingOut& out);

/// All points as CSV (RFC 4180 quoting, LF), the datum and the poles first. The same numbers as the tables, the angle in
/// decimal degrees as well.
[[nodiscard]] std::string csv_of(const SettingOut& out);

} // namespace dialwright::layout
