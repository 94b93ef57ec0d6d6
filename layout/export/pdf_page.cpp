// SPDX-License-Identifier: MIT
#include "layout/export/pdf_page.hpp"

#include "layout/drawing/clipping.hpp"
#include "layout/export/pdf_layers.hpp"
#include "layout/export/plain_number.hpp"
#include "layout/sheet/export_error.hpp"
#include "layout/sheet/note_width.hpp"

#include <fmt/format.h>
#include <hpdf_pages.h>
#include <libdeflate.h>

#include <algorithm>
#include <cmath>
#include <memory>

// Lines end square (butt): an hour line that stops at a border must not run over it by half its width, and a bar's
// ticks must not grow. Corners are round: a mitre at a sharp turn would run out farther than the line is wide, and a
// round corner is what a cutter leaves.

namespace dialwright::layout {
namespace {

constexpr double k_points_a_mm = 72.0 / 25.4;
constexpr double k_chord_mm = 0.001;

bool same(const std::optional<Tone>& a, Tone b) {
    return a && a->red == b.red && a->green == b.green && a->blue == b.blue;
}

/// The library removes a filter that it has not applied itself, but lets a stream write an entry of its own.
HPDF_STATUS write_filter(HPDF_Dict, HPDF_Stream stream) {
    return HPDF_Stream_WriteStr(stream, "/Filter /FlateDecode\n");
}

} // namespace

/// A number and a space.
void PdfPage::number(double points) {
    // The largest page is 14,400; what lies far outside of it is a mistake of ours or of the design.
    if (!std::isfinite(points) || std::abs(points) > 32000.0) {
        throw ExportError(
            fmt::format("“{}” runs off the paper to a place that a PDF can't name, so no PDF was made.", drawing_now_));
    }
    add_number(text_, points, 3);
    text_ += ' ';
}

void PdfPage::length(double mm) {
    number(mm * k_points_a_mm);
}

void PdfPage::point(Point p) {
    length(p.x_mm);
    length(p.y_mm);
}

void PdfPage::colour(Tone tone, std::string_view operation) {
    number(tone.red);
    number(tone.green);
    number(tone.blue);
    text_ += operation;
}

void PdfPage::stroke_style(Tone tone, double width_mm) {
    if (!joins_set_) {
        text_ += "0 J 1 j\n";
        joins_set_ = true;
    }
    if (!same(stroke_tone_, tone)) {
        colour(tone, "RG\n");
        stroke_tone_ = tone;
    }
    if (width_mm_ != width_mm) {
        length(width_mm);
        text_ += "w\n";
        width_mm_ = width_mm;
    }
}

void PdfPage::fill_style(Tone tone) {
    if (!same(fill_tone_, tone)) {
        colour(tone, "rg\n");
        fill_tone_ = tone;
    }
}

void PdfPage::path(const Path& path) {
    const auto curve_to = [this](const CurveTo& curve) {
        point(curve.control_1);
        point(curve.control_2);
        point(curve.to);
        text_ += "c\n";
    };
    point(path.start);
    text_ += "m\n";
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
            point(end_of(piece)); // closing the path draws a last straight side by itself
            text_ += "l\n";
        }
        at = end_of(piece);
    }
    if (path.closed) {
        text_ += "h\n";
    }
}

void PdfPage::fill_inside(const Mark& mark, const Box& box, const Box& opening) {
    const bool whole = opening.contains(box);
    bool any = false;
    for (const Path& one : mark.paths) {
        if (whole) {
            if (!one.pieces.empty()) {
                path(one);
                any = true;
            }
            continue;
        }
        const std::vector<Point> ring = ring_inside(flattened(one, k_chord_mm), opening);
        if (ring.size() < 3) {
            continue;
        }
        point(ring.front());
        text_ += "m\n";
        for (std::size_t i = 1; i < ring.size(); ++i) {
            point(ring[i]);
            text_ += "l\n";
        }
        text_ += "h\n";
        any = true;
    }
    if (any) {
        text_ += "f\n";
    }
}

void PdfPage::stroke_inside(const Mark& mark, const Box& box, const Box& opening) {
    const bool whole = opening.contains(box);
    // Cut half a width outside the opening, the square end of any slant lies outside it too: the page's own clipping
    // then takes off what is left.
    const Box reach = opening.grown(mark.width_mm / 2);
    bool any = false;
    for (const Path& one : mark.paths) {
        if (whole && !one.pieces.empty()) {
            path(one);
            any = true;
            continue;
        }
        for (const Path& part : line_inside(one, reach)) {
            if (!part.pieces.empty()) {
                path(part);
                any = true;
            }
        }
    }
    if (any) {
        text_ += "S\n";
    }
}

void PdfPage::mark(const Mark& mark, const Box& opening) {
    drawing_now_ = mark.name.empty() ? name_of(mark.layer) : std::string_view{mark.name};
    const Box box = bounds_of(mark);
    if (!opening.meets(box)) {
        return;
    }
    if (layered_) {
        text_ += "/OC /";
        text_ += pdf_name_of(mark.layer);
        text_ += " BDC\n";
    }
    if (mark.filled) {
        fill_style(tone_of(mark.layer));
        fill_inside(mark, box, opening);
    } else {
        stroke_style(tone_of(mark.layer), mark.width_mm);
        stroke_inside(mark, box, opening);
    }
    if (layered_) {
        text_ += "EMC\n";
    }
}

void PdfPage::stretch(double x, double y, double width_mm, double height_mm) {
    if (x == 1.0 && y == 1.0) {
        return;
    }
    // More decimals than a coordinate has: over a long page a coarse factor would be seen.
    text_ += fmt::format("{:.7f} 0 0 {:.7f} ", x, y);
    point({(1 - x) * width_mm / 2, (1 - y) * height_mm / 2});
    text_ += "cm\n";
}

void PdfPage::open(const Box& opening) {
    drawing_now_ = "the opening";
    text_ += "q ";
    point({opening.left_mm, opening.bottom_mm});
    point({opening.width_mm(), opening.height_mm()});
    text_ += "re W n\n";
}

void PdfPage::close() {
    text_ += "Q\n";
    // The page is again as it was before it was opened, whatever was set since.
    stroke_tone_.reset();
    fill_tone_.reset();
    width_mm_ = -1;
    joins_set_ = false;
}

void PdfPage::use_font(bool bold, const PdfFont& font) {
    fonts_[bold ? 1U : 0U] = {&font, HPDF_Page_GetLocalFontName(page_, font.get())};
}

void PdfPage::note(const Note& note) {
    drawing_now_ = note.text;
    if (note.text.empty()) {
        return;
    }
    const UsedFont& font = fonts_[note.bold ? 1U : 0U];
    const double width_mm = note_width_mm(note.text, note.size_mm, note.bold);
    const double back_mm = note.align == Align::left ? 0.0 : note.align == Align::middle ? width_mm / 2 : width_mm;
    const double c = cos(note.turn), s = sin(note.turn);
    if (!std::isfinite(c) || !(note.size_mm > 0.0 && note.size_mm <= 200.0)) {
        throw ExportError(fmt::format("The note “{}” has no usable size or turn, so no PDF was made.", note.text));
    }
    fill_style(tone_of(Layer::engrave));
    text_ += "BT /";
    text_ += font.name;
    text_ += ' ';
    length(note.size_mm);
    // A long line's end must not drift with a coarse turn, so the turn has more decimals than `number` gives.
    text_ += fmt::format("Tf {:.7f} {:.7f} {:.7f} {:.7f} ", c, s, -s, c);
    point({note.at.x_mm - back_mm * c, note.at.y_mm - back_mm * s});
    text_ += "Tm " + font.font->shown(note.text) + " Tj ET\n";
}

void PdfPage::pack() {
    constexpr int k_fastest = 1;
    const std::unique_ptr<libdeflate_compressor, void (*)(libdeflate_compressor*)> packer{
        libdeflate_alloc_compressor(k_fastest), &libdeflate_free_compressor};
    if (!packer) {
        throw ExportError("The PDF could not be made: no memory is left.");
    }
    std::string packed(libdeflate_zlib_compress_bound(packer.get(), text_.size()), '\0');
    packed.resize(libdeflate_zlib_compress(packer.get(), text_.data(), text_.size(), packed.data(), packed.size()));
    text_ = std::move(packed);
}

void PdfPage::finish() {
    auto* attributes = static_cast<HPDF_PageAttr>(page_->attr);
    HPDF_Stream_Write(attributes->stream, reinterpret_cast<const HPDF_BYTE*>(text_.data()),
                      static_cast<HPDF_UINT>(text_.size()));
    attributes->contents->filter = HPDF_STREAM_FILTER_NONE;
    attributes->contents->write_fn = &write_filter;
}

} // namespace dialwright::layout
