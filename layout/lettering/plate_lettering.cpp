// SPDX-License-Identifier: MIT
#include "layout/lettering/plate_lettering.hpp"

namespace dialwright::layout {

PlateLettering::PlateLettering(std::string_view family, bool single_strokes) {
    if (single_strokes)
        strokes_.emplace();
    else
        outlines_.emplace(family);
}

LetteredLine PlateLettering::line(std::string_view text, double size_mm, double tracking_mm) const {
    return strokes_ ? strokes_->line(text, size_mm, tracking_mm) : outlines_->line(text, size_mm, tracking_mm);
}

} // namespace dialwright::layout
