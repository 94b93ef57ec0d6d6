// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

namespace dialwright::layout {

/// Red, green and blue, each 0 to 1.
struct Tone {
    double red = 0.0, green = 0.0, blue = 0.0;
    /// How light it prints in grey, 0 black to 1 white. Source: ITU-R BT.601, the weights of luma.
    [[nodiscard]] constexpr double lightness() const { return 0.299 * red + 0.587 * green + 0.114 * blue; }
};

/// The tone of each workshop layer, one table for every kind of file. Quiet, so that the work is looked at and not the
/// code; at least 0.09 of lightness apart, so that a grey print tells the layers too. Engraving, which is nearly
/// everything, is black.
[[nodiscard]] constexpr Tone tone_of(Layer layer) {
    switch (layer) {
    case Layer::cut:
        return {0.45, 0.08, 0.16}; // garnet
    case Layer::engrave:
        return {0.0, 0.0, 0.0}; // black
    case Layer::fill:
        return {0.36, 0.40, 0.50}; // slate
    case Layer::drill:
        return {0.04, 0.40, 0.46}; // verdigris
    case Layer::score:
        return {0.70, 0.47, 0.10}; // ochre
    case Layer::guide:
        return {0.50, 0.66, 0.74}; // pale sky
    }
    return {};
}

} // namespace dialwright::layout
