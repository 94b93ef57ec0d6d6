// SPDX-License-Identifier: MIT
#include "layout/export/svg.hpp"

#include "layout/drawing/machine_order.hpp"
#include "layout/export/plain_number.hpp"
#include "layout/sheet/export_error.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <iterator>

namespace dialwright::layout {
namespace {

/// Writes one file: numbers with four decimals, y downwards from the frame's upper side.
class SvgText {
  public:
    SvgText(const Box& frame, const SvgOptions& options) : frame_{frame}, options_{options} {}

    void number(double value) { add_number(text_, value, 4); }
    void point(Point p) {
        number(p.x_mm - frame_.left_mm);
        text_ += ' ';
        number(frame_.top_mm - p.y_mm);
    }
    void path(const Path& path);
    void mark(const Mark& mark);
    SvgText& operator<<(std::string_view more) {
        text_ += more;
        return *this;
    }
    [[nodiscard]] std::string take() { return std::move(text_); }

  private:
    void arc(Point start, const ArcTo& arc);
    Box frame_;
    const SvgOptions& options_;
    std::string text_;
};

/// SVG's arc knows its two ends, so a whole turn is no arc to it, and one near a half turn is a gamble for the reader
/// which way it bulges. Arcs over 170° are halved.
void SvgText::arc(Point start, const ArcTo& arc) {
    const double radius = std::hypot(start.x_mm - arc.centre.x_mm, start.y_mm - arc.centre.y_mm);
    const double degrees = std::abs(arc.sweep.in_degrees());
    const int count = std::max(1, static_cast<int>(std::ceil(degrees / (degrees > 359.999 ? 180.0 : 170.0) - 1e-9)));
    for (int i = 1; i <= count; ++i) {
        text_ += 'A';
        number(radius);
        text_ += ' ';
        number(radius);
        // y is turned over, so an anticlockwise arc runs clockwise in SVG's numbers but has its sweep flag cleared.
        text_ += arc.sweep.in_radians() > 0 ? " 0 0 0 " : " 0 0 1 ";
        point(point_at(start, arc, static_cast<double>(i) / count));
    }
}

void SvgText::path(const Path& path) {
    text_ += 'M';
    point(path.start);
    Point at = path.start;
    for (std::size_t i = 0; i < path.pieces.size(); ++i) {
        const Piece& piece = path.pieces[i];
        if (const auto* round = std::get_if<ArcTo>(&piece)) {
            arc(at, *round);
        } else if (const auto* curve = std::get_if<CurveTo>(&piece)) {
            text_ += 'C';
            point(curve->control_1);
            text_ += ' ';
            point(curve->control_2);
            text_ += ' ';
            point(curve->to);
        } else if (!(path.closed && i + 1 == path.pieces.size() && end_of(piece) == path.start)) {
            text_ += 'L'; // the closing "Z" draws a last straight side by itself
            point(end_of(piece));
        }
        at = end_of(piece);
    }
    if (path.closed) {
        text_ += 'Z';
    }
}

void SvgText::mark(const Mark& mark) {
    if (mark.paths.empty()) {
        return;
    }
    const Tone tone = options_.layers[mark.layer].tone;
    const auto byte = [](double part) { return static_cast<int>(std::lround(part * 255)); };
    const std::string colour = fmt::format("#{:02x}{:02x}{:02x}", byte(tone.red), byte(tone.green), byte(tone.blue));
    text_ += "    <path d=\"";
    for (const Path& one : mark.paths) {
        path(one);
    }
    if (mark.filled) {
        text_ += "\" fill=\"" + colour + "\" stroke=\"none\"/>\n";
        return;
    }
    text_ += "\" fill=\"none\" stroke=\"" + colour + "\" stroke-width=\"";
    number(options_.hairline_mm.value_or(mark.width_mm));
    text_ += "\" stroke-linecap=\"butt\" stroke-linejoin=\"round\"/>\n";
}

} // namespace

std::string svg_of(const Drawing& drawing, const Box& frame, const SvgOptions& options) {
    options.layers.check();
    if (options.hairline_mm && !(*options.hairline_mm > 0)) {
        throw ExportError("A line of no width is not seen: the hairline of an SVG must be above 0 mm.");
    }
    if (frame.empty() || frame.width_mm() <= 0 || frame.height_mm() <= 0) {
        throw ExportError("There is nothing to draw: the SVG's frame is empty.");
    }
    const Drawing ready = ready_for_machine(drawing, options.with_guides).drawing;
    SvgText svg{frame, options};
    svg << "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"";
    svg.number(frame.width_mm());
    svg << "mm\" height=\"";
    svg.number(frame.height_mm());
    svg << "mm\" viewBox=\"0 0 ";
    svg.number(frame.width_mm());
    svg << " ";
    svg.number(frame.height_mm());
    svg << "\">\n";
    for (const Layer layer : k_machine_order) {
        const auto on_layer = [layer](const Mark& mark) { return mark.layer == layer; };
        if (std::none_of(ready.marks.begin(), ready.marks.end(), on_layer)) {
            continue;
        }
        svg << "  <g id=\"" << options.layers[layer].name << "\">\n";
        for (const Mark& mark : ready.marks) {
            if (on_layer(mark)) {
                svg.mark(mark);
            }
        }
        svg << "  </g>\n";
    }
    svg << "</svg>\n";
    return svg.take();
}

} // namespace dialwright::layout
