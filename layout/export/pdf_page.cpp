// SPDX-License-Identifier: MIT
#include "layout/export/pdf_page.hpp"

#include "layout/drawing/clipping.hpp"
#include "layout/lettering/sheet_font.hpp"
#include "layout/sheet/export_error.hpp"
#include "layout/sheet/note_width.hpp"

#include <fmt/format.h>

#include <cmath>

// Lines end square (butt): an hour line that stops at a border must not run over it by half its width, and a bar's
// ticks must not grow. Corners are round: a mitre at a sharp turn would run out farther than the line is wide, and a
// round corner is what a cutter leaves.

namespace dialwright::layout {
namespace {

constexpr double k_points_a_mm = 72.0 / 25.4;
constexpr double k_chord_mm = 0.001;

/// The bytes for the library: UTF-8 it can read, of characters the font has; "?" for the others.
std::string printable_text(const std::string& text, const SheetFont& font) {
    std::string out;
    std::string_view rest{text};
    while (!rest.empty()) {
        const std::string_view before = rest;
        const char32_t character = take_character(rest);
        if (font.has(character)) {
            out += before.substr(0, before.size() - rest.size());
        } else {
            out += '?';
        }
    }
    return out;
}

bool same(const std::optional<Tone>& a, Tone b) {
    return a && a->red == b.red && a->green == b.green && a->blue == b.blue;
}

HPDF_REAL real(double value) {
    return static_cast<HPDF_REAL>(value);
}

} // namespace

void PdfTrouble::check() const {
    if (error != HPDF_OK) {
        throw ExportError(
            fmt::format("The PDF could not be made: the PDF library stopped with error 0x{:04X} ({}).", error, detail));
    }
}

HPDF_REAL PdfPage::points(double mm) const {
    const double value = mm * k_points_a_mm;
    // The library cuts numbers off at 32,767; the largest page is 14,400.
    if (!std::isfinite(value) || std::abs(value) > 32000.0) {
        throw ExportError(
            fmt::format("“{}” runs off the paper to a place that a PDF can't name, so no PDF was made.", drawing_now_));
    }
    return real(value);
}

void PdfPage::stroke_style(Tone tone, double width_mm) {
    if (!joins_set_) {
        HPDF_Page_SetLineCap(page_, HPDF_BUTT_END);
        HPDF_Page_SetLineJoin(page_, HPDF_ROUND_JOIN);
        joins_set_ = true;
    }
    if (!same(stroke_tone_, tone)) {
        HPDF_Page_SetRGBStroke(page_, real(tone.red), real(tone.green), real(tone.blue));
        stroke_tone_ = tone;
    }
    if (width_mm_ != width_mm) {
        HPDF_Page_SetLineWidth(page_, points(width_mm));
        width_mm_ = width_mm;
    }
    trouble_.check();
}

void PdfPage::fill_style(Tone tone) {
    if (!same(fill_tone_, tone)) {
        HPDF_Page_SetRGBFill(page_, real(tone.red), real(tone.green), real(tone.blue));
        fill_tone_ = tone;
    }
    trouble_.check();
}

void PdfPage::start(Point p) {
    HPDF_Page_MoveTo(page_, points(p.x_mm), points(p.y_mm));
}

void PdfPage::line(Point p) {
    HPDF_Page_LineTo(page_, points(p.x_mm), points(p.y_mm));
}

void PdfPage::path(const Path& path) {
    const auto curve_to = [this](const CurveTo& curve) {
        HPDF_Page_CurveTo(page_, points(curve.control_1.x_mm), points(curve.control_1.y_mm),
                          points(curve.control_2.x_mm), points(curve.control_2.y_mm), points(curve.to.x_mm),
                          points(curve.to.y_mm));
    };
    start(path.start);
    Point at = path.start;
    for (std::size_t i = 0; i < path.pieces.size(); ++i) {
        const Piece& piece = path.pieces[i];
        if (const auto* arc = std::get_if<ArcTo>(&piece)) {
            for (const CurveTo& curve : curves_of(at, *arc)) {
                curve_to(curve);
            }
        } else if (const auto* curve = std::get_if<CurveTo>(&piece)) {
            curve_to(*curve);
        } else if (!(path.closed && i + 1 == path.pieces.size() && end_of(piece) == path.start)) {
            line(end_of(piece)); // closing the path draws a last straight side by itself
        }
        at = end_of(piece);
    }
    if (path.closed) {
        HPDF_Page_ClosePath(page_);
    }
    trouble_.check();
}

void PdfPage::fill_inside(const Mark& mark, const Box& opening) {
    const bool whole = opening.contains(bounds_of(mark));
    bool any = false;
    for (const Path& one : mark.paths) {
        if (whole) {
            path(one);
            any = any || !one.pieces.empty();
            continue;
        }
        const std::vector<Point> ring = ring_inside(flattened(one, k_chord_mm), opening);
        if (ring.size() < 3) {
            continue;
        }
        start(ring.front());
        for (std::size_t i = 1; i < ring.size(); ++i) {
            line(ring[i]);
        }
        HPDF_Page_ClosePath(page_);
        any = true;
    }
    if (any) {
        HPDF_Page_Fill(page_);
    }
}

void PdfPage::stroke_inside(const Mark& mark, const Box& opening) {
    // Cut half a width outside the opening, the square end of any slant lies outside it too: the page's own clipping
    // then takes off what is left.
    const Box reach = opening.grown(mark.width_mm / 2);
    bool any = false;
    for (const Path& one : mark.paths) {
        for (const Path& part : line_inside(one, reach)) {
            if (!part.pieces.empty()) {
                path(part);
                any = true;
            }
        }
    }
    if (any) {
        HPDF_Page_Stroke(page_);
    }
}

void PdfPage::mark(const Mark& mark, const Box& opening) {
    drawing_now_ = mark.name.empty() ? std::string{name_of(mark.layer)} : mark.name;
    if (!opening.meets(bounds_of(mark))) {
        return;
    }
    if (mark.filled) {
        fill_style(tone_of(mark.layer));
        fill_inside(mark, opening);
    } else {
        stroke_style(tone_of(mark.layer), mark.width_mm);
        stroke_inside(mark, opening);
    }
    trouble_.check();
}

void PdfPage::open(const Box& opening) {
    drawing_now_ = "the opening";
    HPDF_Page_GSave(page_);
    HPDF_Page_Rectangle(page_, points(opening.left_mm), points(opening.bottom_mm), points(opening.width_mm()),
                        points(opening.height_mm()));
    HPDF_Page_Clip(page_);
    HPDF_Page_EndPath(page_);
    trouble_.check();
}

void PdfPage::close() {
    HPDF_Page_GRestore(page_);
    // The page is again as it was before it was opened, whatever was set since.
    stroke_tone_.reset();
    fill_tone_.reset();
    width_mm_ = -1;
    joins_set_ = false;
    trouble_.check();
}

void PdfPage::note(const Note& note, HPDF_Font font) {
    drawing_now_ = note.text;
    const std::string text = printable_text(note.text, sheet_font(note.bold));
    if (text.empty()) {
        return;
    }
    const double width_mm = note_width_mm(note.text, note.size_mm, note.bold);
    const double back_mm = note.align == Align::left ? 0.0 : note.align == Align::middle ? width_mm / 2 : width_mm;
    const double c = cos(note.turn), s = sin(note.turn);
    if (!std::isfinite(c) || !(note.size_mm > 0.0 && note.size_mm <= 200.0)) {
        throw ExportError(fmt::format("The note “{}” has no usable size or turn, so no PDF was made.", note.text));
    }
    fill_style(tone_of(Layer::engrave));
    HPDF_Page_BeginText(page_);
    HPDF_Page_SetFontAndSize(page_, font, points(note.size_mm));
    HPDF_Page_SetTextMatrix(page_, real(c), real(s), real(-s), real(c), points(note.at.x_mm - back_mm * c),
                            points(note.at.y_mm - back_mm * s));
    HPDF_Page_ShowText(page_, text.c_str());
    HPDF_Page_EndText(page_);
    trouble_.check();
}

} // namespace dialwright::layout
