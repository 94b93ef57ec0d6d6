// SPDX-License-Identifier: MIT
#pragma once

#include "layout/lettering/lettering.hpp"
#include "layout/lettering/stroke_lettering.hpp"

#include <optional>
#include <string_view>

namespace dialwright::layout {

/// The lettering of a piece of work: outlines of a font, to be filled, or single strokes for an engraving point. Its italic is
/// the font's own; a family that has none, and the strokes, are slanted.
class PlateLettering {
  public:
    /// @throws LetteringError  no such family, or the strokes are not installed
    PlateLettering(std::string_view family, bool single_strokes, bool italic = false);
    /// As Lettering::line and StrokeLettering::line.
    [[nodiscard]] LetteredLine line(std::string_view text, double size_mm, double tracking_mm = 0.0) const;
    [[nodiscard]] bool single_strokes() const { return strokes_.has_value(); }

  private:
    std::optional<Lettering> outlines_;
    std::optional<StrokeLettering> strokes_;
    bool slanted_ = false;
};

} // namespace dialwright::layout
