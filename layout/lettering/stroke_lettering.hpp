// SPDX-License-Identifier: MIT
#pragma once

#include "layout/lettering/lettering.hpp"

#include <memory>
#include <string_view>

namespace dialwright::layout {

enum class StrokeFace {
    roman, ///< "rowmans": the plain roman
    plain  ///< "futural": lighter in its joints and signs
};

/// Lettering for an engraving point, which follows the middle of each stroke once. The letters are the single strokes that
/// A. V. Hershey drew at the U. S. National Bureau of Standards, in the format of James Hurt, Cognition, Inc., read from
/// the package hershey-fonts-data. They hold ASCII and Greek; accents, °, ′, ″ and other signs are strokes of our own.
/// Its lines are set by `set_straight()` and `set_on_circle()` as others are. Glyphs are open paths, but for small rings.
class StrokeLettering {
  public:
    /// @throws LetteringError  the package is not installed or a file of it can't be read
    explicit StrokeLettering(StrokeFace face = StrokeFace::roman);
    ~StrokeLettering();
    StrokeLettering(StrokeLettering&&) noexcept;
    StrokeLettering& operator=(StrokeLettering&&) noexcept;

    /// @param text     UTF-8, one line, left to right: Latin letters with accents (composed or not), Greek, figures
    /// @param size_mm  height of the capitals, measured on the stroke of H; > 0
    /// @param tracking_mm  added between glyphs
    /// @throws LetteringError  there are no strokes for a character, which it names; or the text is not UTF-8
    /// @throws std::invalid_argument  size_mm is not above zero
    /// Accuracy: the data is drawn on a grid of 1/21 of the capitals' height, its round strokes in chords.
    [[nodiscard]] LetteredLine line(std::string_view text, double size_mm, double tracking_mm = 0.0) const;

  private:
    struct Letters;
    std::unique_ptr<Letters> letters_;
};

} // namespace dialwright::layout
