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

/// One glyph of a line, as outlines, its pen origin at (0, 0), base line along x.
struct Glyph {
    std::vector<Path> outlines; ///< closed; non-zero winding
    double pen_x_mm = 0.0;      ///< where its origin stands on the base line
    double advance_mm = 0.0;
};

/// A shaped line of text, starting at (0, 0), base line along x.
struct LetteredLine {
    std::vector<Glyph> glyphs;
    double advance_mm = 0.0;
    Box ink; ///< of the outlines
};

/// A font of the system by family name, and those that stand in for characters that it lacks.
class Lettering {
  public:
    /// @param family  as the system's font list names it ("EB Garamond"); matched whole, case-insensitively
    /// @throws LetteringError  no such family; the message names the nearest ones that are installed
    explicit Lettering(std::string_view family, bool italic = false, bool bold = false);
    ~Lettering();
    Lettering(Lettering&&) noexcept;
    Lettering& operator=(Lettering&&) noexcept;

    /// @param text     UTF-8, one line; any script, left to right or right to left
    /// @param size_mm  height of the capitals (H), the size that an engraver asks for; > 0
    /// @param tracking_mm  added between glyphs
    /// @throws LetteringError  a character has no outline in the family or in any font that stands in for it
    [[nodiscard]] LetteredLine line(std::string_view text, double size_mm, double tracking_mm = 0.0) const;

    /// The file that the family was found in, for the packet's notes.
    [[nodiscard]] const std::string& file() const;

  private:
    struct Faces;
    std::unique_ptr<Faces> faces_;
};

/// The line's outlines with its start at `at`, its base line turned by `turn`.
[[nodiscard]] std::vector<Path> set_straight(const LetteredLine& line, Point at, Angle turn);

/// The line's outlines along a circle, each glyph turned by itself, the middle of the line at `middle` (anticlockwise
/// from x). Reads clockwise with its heads outward, or (`heads_inward`) anticlockwise with its heads to the centre.
/// @param radius_mm  of the base line
[[nodiscard]] std::vector<Path> set_on_circle(const LetteredLine& line, Point centre, double radius_mm, Angle middle,
                                              bool heads_inward);

} // namespace dialwright::layout
