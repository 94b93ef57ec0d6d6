// SPDX-License-Identifier: MIT
#include "layout/correction/plate_work.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <fmt/format.h>
#include <sstream>

namespace dialwright::layout {
namespace {

constexpr double k_tracking = 0.04; ///< of the height: small letters that are cut want air
constexpr double k_lead = 1.75;     ///< from base line to base line, of the height

} // namespace

double least_letter_mm(const Cutting& cutting) {
    return std::max(1.5, 5 * cutting.line_width_mm);
}

void PlateWork::engrave(const Polyline& line, double width_mm, std::string name) {
    engrave(polyline(line), width_mm, std::move(name));
}

void PlateWork::engrave(Path path, double width_mm, std::string name) {
    marks.push_back({Layer::engrave, {std::move(path)}, width_mm, false, std::move(name)});
}

void PlateWork::cut(Path path) {
    marks.push_back({Layer::cut, {std::move(path)}, 0.2, false, "outline"});
}

void PlateWork::add_letters(std::vector<Path> paths, std::string name) {
    marks.push_back({Layer::engrave, std::move(paths), middle_mm(), !spec.cutting.single_strokes, std::move(name)});
}

double PlateWork::width_mm(const std::string& text, double height_mm) const {
    auto found = width_at_1_.find(text);
    if (found == width_at_1_.end())
        found = width_at_1_.emplace(text, letters_.line(text, 1.0, k_tracking).ink.width_mm()).first;
    return found->second * height_mm;
}

void PlateWork::letter(const std::string& text, double height_mm, Point middle, Angle turn, std::string name) {
    const LetteredLine line = letters_.line(text, height_mm, k_tracking * height_mm);
    const Point along{cos(turn), sin(turn)};
    const double ink_middle = (line.ink.left_mm + line.ink.right_mm) / 2;
    add_letters(set_straight(line, middle - ink_middle * along - height_mm / 2 * left_of(along), turn),
                std::move(name));
}

void PlateWork::letter_round(const std::string& text, double height_mm, double radius_mm, Angle clockwise,
                             std::string name) {
    const LetteredLine line = letters_.line(text, height_mm, k_tracking * height_mm);
    const bool below = cos(clockwise) < -1e-9;
    add_letters(
        set_on_circle(line, {}, radius_mm + (below ? 0.5 : -0.5) * height_mm, Angle::degrees(90) - clockwise, below),
        std::move(name));
}

std::optional<std::vector<std::string>> PlateWork::wrapped(const std::string& text, double height_mm,
                                                           const std::function<double(std::size_t)>& room,
                                                           std::size_t most) const {
    std::vector<std::string> lines;
    std::istringstream words{text};
    std::string word, line;
    while (words >> word) {
        const std::string longer = line.empty() ? word : line + " " + word;
        if (width_mm(longer, height_mm) <= room(lines.size())) {
            line = longer;
            continue;
        }
        if (line.empty() || lines.size() + 1 >= most || width_mm(word, height_mm) > room(lines.size() + 1))
            return std::nullopt;
        lines.push_back(std::move(line));
        line = word;
    }
    lines.push_back(std::move(line));
    return lines;
}

PlateWork::MonthNames PlateWork::month_names(double room_mm, double height_mm) const {
    for (const std::size_t letters : {std::size_t{9}, std::size_t{3}, std::size_t{1}}) {
        MonthNames found;
        for (unsigned month = 1; month <= 12; ++month)
            found.names.push_back(std::string{month_name(month)}.substr(0, letters));
        // Full names are worth no smaller letters; shorter ones are.
        const double least = letters > 3 ? 0.85 * height_mm : least_letter();
        for (double height = height_mm; height >= std::min(least, height_mm); height *= 0.95) {
            found.height_mm = height;
            if (std::all_of(found.names.begin(), found.names.end(),
                            [&](const std::string& name) { return width_mm(name, height) + 0.5 * height <= room_mm; }))
                return found;
        }
    }
    too_small("the names of the months");
}

void PlateWork::too_small(const std::string& for_what) const {
    throw std::invalid_argument(fmt::format(
        "a correction plate of {:.0f} × {:.0f} mm is too small for {}: its letters would be lower than {:.1f} mm, the "
        "least that a line of {:.1f} mm cuts",
        spec.width_mm, spec.height_mm, for_what, least_letter(), spec.cutting.line_width_mm));
}

Box draw_rectangle(PlateWork& work) {
    const double w = work.spec.width_mm / 2, h = work.spec.height_mm / 2;
    const Box edge{-w, -h, w, h};
    work.cut(rectangle(edge));
    const double margin = std::max(0.035 * std::min(2 * w, 2 * h), 1.5 + work.line_mm());
    const double gap = work.line_mm() + std::max(work.spec.cutting.least_gap_mm, 0.8 * work.line_mm());
    work.engrave(rectangle(edge.grown(-margin)), work.line_mm(), "border");
    work.engrave(rectangle(edge.grown(-margin - gap)), work.fine_mm(), "border");
    return edge.grown(-margin - gap);
}

Box draw_heading_and_words(PlateWork& work, const Box& box, const std::string& more) {
    const double letter_mm = work.spec.letter_height_mm;
    Box free = box;
    const double middle = box.middle().x_mm;
    const std::string title = heading_of(work.correction, work.least_told_min());
    const double air = 0.9 * letter_mm;
    const double heading = std::min(1.4 * letter_mm, 0.9 * box.width_mm() / work.width_mm(title, 1.0));
    if (heading < std::min(letter_mm, work.least_letter()))
        work.too_small("its heading");
    work.letter(title, heading, {middle, box.top_mm - 1.3 * air - heading / 2}, Angle{}, "heading");
    free.top_mm -= heading + 2.6 * air;
    const double height = std::max(work.least_letter(), 0.8 * letter_mm), width = box.width_mm() - 2.4 * letter_mm;
    std::vector<std::string> lines;
    for (const std::string& sentence : {say_rule(work.correction, work.least_told_min()), more,
                                        say_summer(work.correction.summer(), work.spec.summer_numerals)}) {
        if (sentence.empty())
            continue;
        auto some = work.wrapped(
            sentence, height, [&](std::size_t) { return width; }, 4);
        if (!some)
            work.too_small("its words");
        // As many lines, but of one length.
        for (double narrower = 0.97 * width; some->size() > 1; narrower *= 0.97) {
            auto again = work.wrapped(
                sentence, height, [&](std::size_t) { return narrower; }, some->size());
            if (!again)
                break;
            some = std::move(again);
        }
        lines.insert(lines.end(), some->begin(), some->end());
    }
    double up = box.bottom_mm + air + 0.1 * letter_mm + height / 2;
    for (auto line = lines.rbegin(); line != lines.rend(); ++line) {
        work.letter(*line, height, {middle, up}, Angle{}, "words");
        up += k_lead * height;
    }
    free.bottom_mm = up - k_lead * height + height / 2 + air;
    return free;
}

CorrectionPlate draw_correction(const Correction& correction, const CorrectionSpec& spec) {
    assert(correction.is_needed());
    CorrectionPlate plate;
    // Letters shrink until everything has room.
    CorrectionSpec tried = spec;
    const double least = std::min(least_letter_mm(spec.cutting), spec.letter_height_mm);
    const PlateLettering letters{spec.family, spec.cutting.single_strokes};
    while (true) {
        PlateWork work{correction, tried, letters};
        try {
            if (spec.form == CorrectionForm::graph)
                draw_graph(work);
            else if (spec.form == CorrectionForm::ring)
                draw_ring(work);
            else
                plate.steps = draw_table(work);
        } catch (const std::invalid_argument&) {
            if (tried.letter_height_mm <= least)
                throw;
            tried.letter_height_mm = std::max(least, 0.94 * tried.letter_height_mm);
            continue;
        }
        plate.drawing = {"correction", std::move(work.marks)};
        plate.letter_height_mm = tried.letter_height_mm;
        plate.warnings = std::move(work.warnings);
        for (std::string& limit : say_limits(correction)) // its words leave them out
            plate.warnings.push_back("correction plate: " + std::move(limit));
        break;
    }
    if (spec.letter_height_mm < 0.999 * least_letter_mm(spec.cutting))
        plate.warnings.push_back(fmt::format("letters of {:.1f} mm on the correction plate are lower than {:.1f} mm, "
                                             "the least that a line of {:.1f} mm cuts well",
                                             spec.letter_height_mm, least_letter_mm(spec.cutting),
                                             spec.cutting.line_width_mm));
    if (plate.letter_height_mm < 0.999 * spec.letter_height_mm)
        plate.warnings.push_back(fmt::format("letters of the correction plate are {:.1f} mm high instead of {:.1f} mm, "
                                             "to find room",
                                             plate.letter_height_mm, spec.letter_height_mm));
    return plate;
}

} // namespace dialwright::layout
