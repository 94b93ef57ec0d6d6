// SPDX-License-Identifier: MIT
#pragma once

#include "layout/correction/correction_plate.hpp"
#include "layout/correction/words.hpp"
#include "layout/lettering/plate_lettering.hpp"
#include "layout/plate/outline.hpp"
#include "layout/plate/points.hpp"

#include <functional>
#include <map>
#include <stdexcept>

namespace dialwright::layout {

/// A correction plate while it is being drawn: lettering, line widths in their order of weight, and the marks so far.
class PlateWork {
  public:
    PlateWork(const Correction& of, const CorrectionSpec& wanted, const PlateLettering& letters)
        : correction{of}, spec{wanted}, letters_{letters} {}

    const Correction& correction;
    const CorrectionSpec& spec;
    std::vector<Mark> marks;
    std::vector<std::string> warnings;

    [[nodiscard]] double line_mm() const { return spec.cutting.line_width_mm; }
    [[nodiscard]] double fine_mm() const { return 0.5 * line_mm(); }
    [[nodiscard]] double middle_mm() const { return 0.7 * line_mm(); }
    /// From one line's middle to the next's, at least.
    [[nodiscard]] double least_pitch_mm() const { return fine_mm() + spec.cutting.least_gap_mm; }
    [[nodiscard]] double least_letter() const { return least_letter_mm(spec.cutting); }

    /// What the plate tells apart from nothing: a graph everything, marks and tables half a minute.
    [[nodiscard]] double least_told_min() const { return spec.form == CorrectionForm::graph ? 1e-9 : 0.5; }

    void engrave(const Polyline& line, double width_mm, std::string name);
    void engrave(Path path, double width_mm, std::string name);
    void cut(Path path);

    /// Width of the ink and the sides of it, by the height of capitals.
    [[nodiscard]] double width_mm(const std::string& text, double height_mm) const;
    /// With the middle of its ink's width and of its capitals' height at a point, at a turn.
    void letter(const std::string& text, double height_mm, Point middle, Angle turn, std::string name);
    /// Along a circle round the origin; upright for a reader at the foot of the plate: heads outward above, inward below.
    /// @param radius_mm  of the middle of the capitals
    /// @param clockwise  of the text's middle, from up
    void letter_round(const std::string& text, double height_mm, double radius_mm, Angle clockwise, std::string name);

    /// A paragraph in lines no wider than `room(line)`, at most `most` lines.
    /// @return nothing if it does not fit
    [[nodiscard]] std::optional<std::vector<std::string>> wrapped(const std::string& text, double height_mm,
                                                                  const std::function<double(std::size_t)>& room,
                                                                  std::size_t most) const;

    /// Places of months' names: the longest way of writing them that has room in `room_mm`, and its height.
    struct MonthNames {
        std::vector<std::string> names;
        double height_mm = 0.0;
    };
    [[nodiscard]] MonthNames month_names(double room_mm, double height_mm) const;

    [[noreturn]] void too_small(const std::string& for_what) const;

  private:
    void add_letters(std::vector<Path> paths, std::string name);

    const PlateLettering& letters_;
    mutable std::map<std::string, double> width_at_1_;
};

void draw_graph(PlateWork& work);
void draw_ring(PlateWork& work);
/// @return the steps of its dates
[[nodiscard]] TableSteps draw_table(PlateWork& work);

/// A rectangle's border and its outline to cut; the free box inside.
[[nodiscard]] Box draw_rectangle(PlateWork& work);
/// "Dial to clock" at the top of a box, and the plate's sentences at its foot, wrapped; what is left between them.
/// @param more  one sentence that goes before the others; empty: none
[[nodiscard]] Box draw_heading_and_words(PlateWork& work, const Box& box, const std::string& more = {});

} // namespace dialwright::layout
