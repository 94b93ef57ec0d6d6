// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/drawing.hpp"

#include <hpdf.h>

#include <array>
#include <string_view>

namespace dialwright::layout {

/// The workshop's layers as optional content of a PDF, which a viewer can show and print by themselves. The library has no
/// call for it; its dictionaries are made here.
/// Source: ISO 32000-1, 8.11 (from memory); tests ask mupdf for the layers.
class PdfLayers {
  public:
    /// Enters all layers in the document, shown and in the order of `k_layers`.
    explicit PdfLayers(HPDF_Doc document);
    /// Makes the layers known to a page, whose marks name them by `pdf_name_of()`.
    void use_on(HPDF_Page page);

  private:
    HPDF_Doc document_;
    std::array<HPDF_Dict, std::size(k_layers)> groups_{};
};

/// How a page's operators call the layer.
[[nodiscard]] std::string_view pdf_name_of(Layer layer);

} // namespace dialwright::layout
