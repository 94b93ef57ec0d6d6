// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <memory>
#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::layout {

/// A family that is not installed, or a character that no font at hand can draw. The text is for the maker.
struct LetteringError : std::runtime_error {
    using std::runtime_error::runtime_error;
};

/// One letter of a line with the marks on it, or letters that the font joins in one; as outlines, its pen origin at
/// (0, 0), base line along x. It is turned as one piece when it is set on a circle.
struct Glyph {
    /// Closed, lines and cubic curves; non-zero winding, outer contours anticlockwise. Of StrokeLettering: open strokes.
    std::vector<Path> outlines;
    double pen_x_mm = 0.0;   ///< where its origin stands on the base line
    double advance_mm = 0.0; ///< without the tracking
};

/// A shaped line of text, starting at (0, 0), base line along x. Its glyphs stand from left to right as they are seen.
struct LetteredLine {
    std::vector<Glyph> glyphs;
    double advance_mm = 0.0; ///< tracking between glyphs included, none after the last
    Box ink;                 ///< exact box of the outlines; empty if nothing is seen
};

/// A font of the system by family name, and those that stand in for characters that it lacks: a stand-in draws whole
/// letters with their marks, and its capitals are made as high as those of the family. The same text on the same
/// machine gives the same outlines, whatever the language of its user. One object is for one thread at a time: it
/// keeps the glyphs that it has read.
class Lettering {
  public:
    /// @param family  as the system's font list names it ("EB Garamond"); matched whole, case-insensitively; which of
    ///                its faces is taken is told at font_file() in layout/lettering/font_files.hpp
    /// @throws LetteringError  no such family; the message names the nearest ones that are installed
    explicit Lettering(std::string_view family, bool italic = false, bool bold = false);
    ~Lettering();
    Lettering(Lettering&&) noexcept;
    Lettering& operator=(Lettering&&) noexcept;

    /// Kerning and ligatures are the font's own; a line with tracking has no ligatures. Figures are those that stand as
    /// high as capitals, where the font has them.
    /// @param text     UTF-8, one line; any script, left to right or right to left, numbers in either
    /// @param size_mm  height of the capitals, measured on the outline of H, the size that an engraver asks for; > 0
    /// @param tracking_mm  added between glyphs, but not where a script joins its letters
    /// @throws LetteringError  a character has no outline in the family or in any font that stands in for it; the text
    ///                         is not UTF-8, or holds a control character
    /// @throws std::invalid_argument  size_mm is not above zero
    /// Accuracy: the font's own curves, which FreeType gives in whole units of the font (1/1000 em or finer).
    [[nodiscard]] LetteredLine line(std::string_view text, double size_mm, double tracking_mm = 0.0) const;

    /// The file that the family was found in, for the packet's notes.
    [[nodiscard]] const std::string& file() const;

  private:
    struct Faces;
    std::unique_ptr<Faces> faces_;
};

/// The line's outlines with its start at `at`, its base line turned by `turn`.
[[nodiscard]] std::vector<Path> set_straight(const LetteredLine& line, Point at, Angle turn);

/// The line's outlines along a circle. The middle of the line's advance stands at `middle` (anticlockwise from x); each
/// glyph is turned as a whole so that the middle of its advance stands upright on the circle, and advances are measured
/// along the circle. Heads outward, the line runs clockwise, upright at the top (90°); with `heads_inward` it runs
/// anticlockwise with its heads to the centre, upright at the bottom (−90°).
/// @param radius_mm  of the base line; > 0
/// @throws std::invalid_argument  radius_mm is not above zero
[[nodiscard]] std::vector<Path> set_on_circle(const LetteredLine& line, Point centre, double radius_mm, Angle middle,
                                              bool heads_inward);

} // namespace dialwright::layout
