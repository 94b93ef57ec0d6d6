// SPDX-License-Identifier: MIT
#pragma once

#include "layout/drawing/layers.hpp"
#include "layout/export/pdf_font.hpp"
#include "layout/sheet/sheet.hpp"

#include <hpdf.h>

#include <array>
#include <optional>
#include <string>
#include <string_view>

namespace dialwright::layout {

/// Draws on one page of a PDF, from millimetres of the page. Between its making and `finish()` it leaves the document
/// alone, so that pages can be drawn in several threads. The page's operators are written here and packed here,
/// fast: the library's own writing and packing of a plate's outlines took five times as long. Every number is
/// looked at, and written with three decimals of a point (0.0002 mm).
class PdfPage {
  public:
    explicit PdfPage(HPDF_Page page) : page_{page} { text_.reserve(1U << 13U); }

    /// Makes a font known to the page's notes. It must live on.
    void use_font(bool bold, const PdfFont& font);
    /// What follows comes out this much larger about the page's middle.
    void stretch(double x, double y, double width_mm, double height_mm);
    /// From here on, marks are (or are not) told to the viewer as contents of their workshop layer.
    void use_layers(bool yes) { layered_ = yes; }

    /// @param opening  nothing of the mark is drawn outside
    void mark(const Mark& mark, const Box& opening);
    void note(const Note& note);
    /// Between these two, the page shows nothing outside the opening.
    void open(const Box& opening);
    void close();
    /// Packs what was drawn; once, when nothing more is to come.
    void pack();
    /// Hands what was packed to the page; once, at the end.
    void finish();

  private:
    void number(double points);
    void length(double mm);
    void point(Point p);
    void colour(Tone tone, std::string_view operation);
    void stroke_style(Tone tone, double width_mm);
    void fill_style(Tone tone);
    void path(const Path& path);
    void fill_inside(const Mark& mark, const Box& box, const Box& opening);
    void stroke_inside(const Mark& mark, const Box& box, const Box& opening);

    struct UsedFont {
        const PdfFont* font = nullptr;
        std::string name; ///< on this page
    };

    HPDF_Page page_;
    std::array<UsedFont, 2> fonts_; ///< regular, bold
    std::string text_;
    std::string_view drawing_now_; ///< for the message
    std::optional<Tone> stroke_tone_, fill_tone_;
    double width_mm_ = -1;
    bool joins_set_ = false;
    bool layered_ = false;
};

} // namespace dialwright::layout
