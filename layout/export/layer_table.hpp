// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/layers.hpp"

#include <array>
#include <string>

namespace dialwright::layout {

/// How one workshop layer is called and coloured in files for machines, whose programs choose the process by either.
struct LayerStyle {
    std::string name; ///< the group in an SVG; in capitals the layer in a DXF
    Tone tone;        ///< in an SVG
    int colour = 7; ///< index in a DXF, 1 to 255: 1 red, 2 yellow, 3 green, 4 cyan, 5 blue, 6 magenta, 7 black or white
};

/// One style for each layer. Change what the machine's program wants otherwise.
struct LayerTable {
    std::array<LayerStyle, std::size(k_layers)> styles;

    [[nodiscard]] const LayerStyle& operator[](Layer layer) const { return styles[static_cast<std::size_t>(layer)]; }
    [[nodiscard]] LayerStyle& operator[](Layer layer) { return styles[static_cast<std::size_t>(layer)]; }

    /// @throws ExportError  two layers of one name; a name not of 1 to 31 letters, digits, "-", "_", "$" (what a DXF of
    ///                      release 12 takes); a colour outside 1 to 255; a tone outside 0 to 1
    void check() const;
};

/// The layers' own names, the tones of `tone_of()`, and in DXF: cut red, engrave black, fill blue, drill cyan, score
/// orange, guide grey (from memory: indices 1 to 9 of the common colour index; 30 orange, 8 dark grey).
[[nodiscard]] LayerTable usual_layers();

} // namespace dialwright::layout
