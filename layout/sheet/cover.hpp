// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/tiling.hpp"

#include <string>
#include <utility>
#include <vector>

namespace dialwright::layout {

/// What the packet's first page says.
struct CoverWords {
    std::string title, subtitle;
    std::vector<std::string> steps; ///< in the order of work; the first is what to measure
    std::vector<std::string> cautions;
    std::vector<std::string> warnings; ///< what the maker should know of this very design
};

/// One face on the first page: a small picture and its key numbers.
struct CoverFace {
    std::string name; ///< empty where there is only one
    std::shared_ptr<const Drawing> drawing;
    std::vector<std::pair<std::string, std::string>> numbers;
    const Tiling* tiling = nullptr; ///< its map is shown when it has more than one sheet
};

/// The first page and as many more as the words need, on the paper of the options, each with its bars.
[[nodiscard]] std::vector<Sheet> cover_sheets(const CoverWords& words, const std::vector<CoverFace>& faces,
                                              const PrintOptions& options);

} // namespace dialwright::layout
