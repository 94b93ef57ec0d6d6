// SPDX-License-Identifier: MIT
#include "layout/plate/face.hpp"

#include "layout/plate/bench.hpp"
#include "layout/plate/family_words.hpp"
#include "layout/plate/numerals.hpp"
#include "layout/plate/tool_check.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <stdexcept>

namespace dialwright::layout {
namespace {

constexpr double k_numeral_share = 0.64; // of the chapter ring; the rest is for the divisions

Outline inner_border(const Outline& from, double by_mm, const char* what) {
    const auto made = from.inset(by_mm);
    if (!made)
        throw BordersError(fmt::format(
            "the {} needs {:.1f} mm inside the border outside it, and the plate has no such room", what, by_mm));
    return *made;
}

/// Of the map of free room: fine enough for the labels, no finer than the plate's size is worth.
double cell_for(const FaceSpec& spec) {
    const double size = std::max(spec.plate.width_mm, spec.plate.height_mm);
    return std::max(0.5, std::min(size / 260, 0.4 * std::max(1.0, spec.lettering.label_height_mm)));
}

PlateBox window_of(const Outline& edge, Point foot) {
    const Box box = edge.box();
    return {box.left_mm - foot.x_mm, box.bottom_mm - foot.y_mm, box.right_mm - foot.x_mm, box.top_mm - foot.y_mm};
}

void draw_all(Bench& bench, double foot_mm, double nodus_height_mm) {
    draw_borders(bench);
    draw_gnomon_seat(bench, foot_mm, nodus_height_mm);
    draw_field_lines(bench); // labels first ask for room; hour lines then stop for them
    draw_hours(bench);
    draw_motto(bench);
    draw_place_line(bench);
    draw_compass(bench);
    draw_legend(bench);
}

std::string listed(const std::vector<double>& hours) {
    std::string text;
    for (const double hour : hours)
        text += (text.empty() ? "" : ", ") + time_label(hour);
    return text;
}

bool is_drawn(const Face& face, const DialLine& line) {
    return std::any_of(face.lines.begin(), face.lines.end(), [&](const DrawnLine& drawn) {
        return drawn.family == line.family && drawn.set == line.set && drawn.time_h == line.time_h &&
               drawn.level == line.level && drawn.declination == line.declination &&
               (is_hour(line.family) || line.family != Family::place_noon || drawn.label == line.label);
    });
}

/// Lines that the design asks for and that are not there, with their families.
void report_missed(const Face& face, const std::vector<const DialLine*>& cut_once, std::vector<std::string>& warnings) {
    const Delineation& delineation = face.delineation;
    std::vector<Named> unlit, outside;
    const auto named = [&](const DialLine& line) {
        return Named{words_of(line).lines, field_label(line, dress_of(line, face.families))};
    };
    if (!delineation.unlit_hours.empty())
        unlit.emplace_back("hours", listed(delineation.unlit_hours));
    if (!delineation.outside_hours.empty())
        outside.emplace_back("hours", listed(delineation.outside_hours));
    for (const MissedLine& missed : delineation.missed)
        (missed.lit ? outside : unlit).push_back(named(missed.line));
    // What lies under the borders alone is not drawn either.
    for (const DialLine& line : delineation.lines)
        if (!is_hour(line.family) && !is_drawn(face, line) &&
            std::find(cut_once.begin(), cut_once.end(), &line) == cut_once.end())
            outside.push_back(named(line));
    if (!unlit.empty())
        warnings.push_back("never lit on this face, so left out: " + by_family(unlit));
    if (!outside.empty())
        warnings.push_back("lit, but their lines miss the field of this plate: " + by_family(outside));
}

/// Hours that count from the Sun's rising or setting, at a place that has days without them.
void report_part_of_year(const Face& face, const DialPlan& plan, const MeanYear& year,
                         std::vector<std::string>& warnings) {
    int days = 0;
    for (int day = 0; day < 365; ++day)
        if (half_day_arc(plan.site.latitude, year.at(day + 0.5).declination, plan.horizon))
            ++days;
    std::string families;
    for (const FiguredFamily& family : face.families)
        if (counts_from_horizon(family.family))
            families += (families.empty() ? "" : ", ") + std::string{words_of(family.time).lines};
    if (days < 365 && !families.empty())
        warnings.push_back(fmt::format("for {} days of the year the Sun does not both rise and set here: on these "
                                       "the dial shows no {}",
                                       365 - days, families));
}

} // namespace

Rings Rings::of(const FaceSpec& spec) {
    const Outline edge = Outline::of(spec.plate);
    const Outline outer = inner_border(edge, spec.borders.margin_mm, "outer border");
    const double band = spec.divide_min > 0 ? spec.borders.chapter_ring_mm * (1 - k_numeral_share) : 0.0;
    const Outline numerals = inner_border(outer, spec.borders.chapter_ring_mm - band, "chapter ring");
    const Outline divisions = inner_border(numerals, band, "chapter ring");
    return {edge, outer, numerals, divisions};
}

Bench::Bench(const FaceSpec& face_spec, const Delineation& delineated, const Placement& placed)
    : spec{face_spec}, delineation{delineated}, foot{placed.foot}, rings{Rings::of(face_spec)},
      up{clockwise_from_up(face_spec.reader_up)},
      lettering{face_spec.lettering.family, face_spec.cutting.single_strokes}, clear{rings.divisions,
                                                                                     cell_for(face_spec)} {
    families = figured_families(delineated);
    if (delineated.style.centre && has_style(face_spec.gnomon.kind)) {
        const Point at = layout::to_work(*delineated.style.centre, foot);
        if (rings.divisions.contains(at))
            centre = at;
    }
}

const PlateLettering& Bench::letters(bool italic) {
    if (!italic)
        return lettering;
    if (!italic_)
        italic_.emplace(spec.lettering.family, spec.cutting.single_strokes, true);
    return *italic_;
}

double Bench::field_line_width(Family family, int set) const {
    const LineWidths& widths = spec.widths;
    const double asked = family == Family::date         ? widths.dates_mm
                         : family == Family::altitude   ? widths.altitudes_mm
                         : family == Family::azimuth    ? widths.azimuths_mm
                         : family == Family::place_noon ? widths.noons_mm
                         : set > 0 && std::size_t(set) <= widths.more_hours_mm.size()
                             ? widths.more_hours_mm[std::size_t(set) - 1]
                             : widths.hours_mm;
    return std::max(asked > 0 ? asked : (family == Family::date ? 0.6 : 0.5) * spec.cutting.line_width_mm,
                    thinnest_line_mm(spec.cutting));
}

double Bench::width_of_step(int step_min) const {
    const double tool = spec.widths.hours_mm > 0 ? spec.widths.hours_mm : spec.cutting.line_width_mm;
    const double weight = step_min >= 60 ? 1.0 : step_min >= 30 ? 0.8 : step_min >= 15 ? 0.65 : 0.5;
    return std::max(weight * tool, thinnest_line_mm(spec.cutting));
}

double Bench::division_band_mm() const {
    return spec.divide_min > 0 ? (1 - k_numeral_share) * spec.borders.chapter_ring_mm : 0.0;
}
double Bench::half_hour_reach_mm() const {
    return spec.divide_min <= 30 ? 1.4 * division_band_mm() : 0.0;
}
double Bench::quarter_hour_reach_mm() const {
    return spec.divide_min <= 15 ? 0.5 * division_band_mm() : 0.0;
}

void Bench::engrave(const Polyline& line, double width_mm, std::string name) {
    marks.push_back({Layer::engrave, {polyline(line)}, width_mm, false, std::move(name)});
    clear.block(line);
}

void Bench::add_line(const DialLine& line, const Polyline& piece, std::string label, double width_mm) {
    DrawnLine drawn_line;
    drawn_line.family = line.family;
    drawn_line.time = line.time;
    drawn_line.set = line.set;
    drawn_line.step_min = line.step_min;
    drawn_line.level = line.level;
    drawn_line.label = label;
    drawn_line.time_h = line.time_h;
    drawn_line.hour_angle = line.hour_angle;
    drawn_line.direction = line.direction;
    drawn_line.declination = line.declination;
    drawn_line.width_mm = width_mm;
    for (const Point& p : piece)
        drawn_line.points.push_back(to_plate(p, foot));
    lines.push_back(std::move(drawn_line));
    engrave(piece, width_mm, line_name(line.family, line.time, line.set, label));
}

void Bench::add_letters(std::vector<Path> paths, const std::string& kind, const std::string& text, double capital_mm) {
    std::string name = text.empty() ? kind : kind + " " + text;
    if (!paths.empty())
        lettered.push_back({marks.size(), kind, capital_mm});
    if (!lettering.single_strokes())
        add_filled(std::move(paths), std::move(name));
    else if (!paths.empty())
        marks.push_back({Layer::engrave, std::move(paths), 0.7 * spec.cutting.line_width_mm, false, std::move(name)});
}

void Bench::add_filled(std::vector<Path> paths, std::string name, Layer layer) {
    if (!paths.empty())
        marks.push_back({layer, std::move(paths), 0.0, true, std::move(name)});
}

Polyline Bench::to_work(const PlatePolyline& piece) const {
    Polyline line;
    line.reserve(piece.size());
    for (const PlatePoint& p : piece)
        line.push_back(layout::to_work(p, foot));
    return line;
}

void drop_scraps(std::vector<Polyline>& pieces, double width_mm) {
    constexpr double k_least_widths = 6;
    if (pieces.size() > 1)
        std::erase_if(pieces, [&](const Polyline& piece) { return length_mm(piece) < k_least_widths * width_mm; });
}

Face draw_face(DialPlan plan, const MeanYear& year, const FaceSpec& spec) {
    Face face;
    face.name = spec.name;
    face.placement = place_on_plate(plan, year, spec);
    plan.nodus_height_mm = face.placement.nodus_height_mm;
    face.delineation = delineate(plan, year, window_of(Outline::of(spec.plate), face.placement.foot));

    Bench bench{spec, face.delineation, face.placement};
    face.gnomon_foot_mm = gnomon_foot_mm(bench);
    draw_all(bench, face.gnomon_foot_mm, plan.nodus_height_mm);

    const auto by_family_and_time = [](const DrawnLine& a, const DrawnLine& b) {
        const auto order = [](const DrawnLine& line) {
            return line.family == Family::date ? 1000 : is_hour(line.family) ? line.set : 500;
        };
        return order(a) != order(b) ? order(a) < order(b) : is_hour(a.family) && a.time_h < b.time_h;
    };
    std::stable_sort(bench.lines.begin(), bench.lines.end(), by_family_and_time);
    face.lines = std::move(bench.lines);
    face.warnings = std::move(bench.warnings);
    face.families = std::move(bench.families);
    report_missed(face, bench.cut_once, face.warnings);
    report_part_of_year(face, plan, year, face.warnings);

    const Placing turn{spec.reader_up, {}, 1.0, 1.0, false}; // reader_up runs clockwise: turn it back
    face.drawing.name = spec.name.empty() ? "plate" : spec.name;
    for (const Mark& mark : bench.marks)
        face.drawing.marks.push_back(spec.reader_up == Angle{} ? mark : turn(mark));
    for (Mark& mark : face.drawing.marks) // ornaments and strokes, too, are no finer than what the tool leaves
        if (mark.layer == Layer::engrave && !mark.filled)
            mark.width_mm = std::max(mark.width_mm, thinnest_line_mm(spec.cutting));
    face.lettering = std::move(bench.lettered);
    for (std::string& sentence : tool_warnings(face, spec))
        face.warnings.push_back(std::move(sentence));
    return face;
}

} // namespace dialwright::layout
