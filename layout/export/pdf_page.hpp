// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/layers.hpp"
#include "layout/sheet/sheet.hpp"

#include <hpdf.h>

#include <optional>

namespace dialwright::layout {

/// What the library has complained of so far. Its callback writes here; whoever called it throws.
struct PdfTrouble {
    HPDF_STATUS error = HPDF_OK;
    HPDF_STATUS detail = 0;
    /// @throws ExportError  something was recorded
    void check() const;
};

/// Draws on one page of a PDF, from millimetres of the page. Every number is looked at before the library sees it,
/// because the library writes wrong files for numbers that are not finite or too great, without a word.
class PdfPage {
  public:
    PdfPage(HPDF_Page page, const PdfTrouble& trouble) : page_{page}, trouble_{trouble} {}

    /// @param opening  nothing of the mark is drawn outside
    void mark(const Mark& mark, const Box& opening);
    void note(const Note& note, HPDF_Font font);
    /// Between these two, the page shows nothing outside the opening.
    void open(const Box& opening);
    void close();

  private:
    [[nodiscard]] HPDF_REAL points(double mm) const;
    void stroke_style(Tone tone, double width_mm);
    void fill_style(Tone tone);
    void start(Point p);
    void line(Point p);
    void path(const Path& path);
    void fill_inside(const Mark& mark, const Box& opening);
    void stroke_inside(const Mark& mark, const Box& opening);

    HPDF_Page page_;
    const PdfTrouble& trouble_;
    std::string drawing_now_; ///< for the message
    std::optional<Tone> stroke_tone_, fill_tone_;
    double width_mm_ = -1;
    bool joins_set_ = false;
};

} // namespace dialwright::layout
