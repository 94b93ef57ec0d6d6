// SPDX-License-Identifier: MIT
#include "layout/export/layer_table.hpp"

#include "layout/export/plain_number.hpp"
#include "layout/sheet/export_error.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace dialwright::layout {

LayerTable usual_layers() {
    LayerTable table;
    for (const Layer layer : k_layers)
        table[layer] = {std::string{name_of(layer)}, tone_of(layer), 7};
    table[Layer::cut].colour = 1;
    table[Layer::fill].colour = 5;
    table[Layer::drill].colour = 4;
    table[Layer::score].colour = 30;
    table[Layer::guide].colour = 8;
    return table;
}

void LayerTable::check() const {
    const auto allowed = [](char c) {
        return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '-' || c == '_' ||
               c == '$';
    };
    const auto share = [](double part) { return part >= 0 && part <= 1; };
    for (std::size_t i = 0; i < styles.size(); ++i) {
        const LayerStyle& style = styles[i];
        if (style.name.empty() || style.name.size() > 31 || !std::all_of(style.name.begin(), style.name.end(), allowed))
            throw ExportError(
                fmt::format("\"{}\" can't name a layer of a DXF: give 1 to 31 letters a to z, digits, \"-\", "
                            "\"_\" or \"$\".",
                            style.name));
        for (std::size_t j = 0; j < i; ++j) {
            if (in_capitals(styles[j].name) == in_capitals(style.name))
                throw ExportError(
                    fmt::format("Two layers are called \"{}\": a machine could not tell \"{}\" from \"{}\".",
                                style.name, name_of(static_cast<Layer>(j)), name_of(static_cast<Layer>(i))));
        }
        if (style.colour < 1 || style.colour > 255)
            throw ExportError(fmt::format("Colour {} of the layer \"{}\" is none: a DXF numbers its colours 1 to 255.",
                                          style.colour, style.name));
        if (!share(style.tone.red) || !share(style.tone.green) || !share(style.tone.blue))
            throw ExportError(
                fmt::format("The tone of the layer \"{}\" is none: red, green and blue are 0 to 1 each.", style.name));
    }
}

} // namespace dialwright::layout
