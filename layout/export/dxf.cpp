// SPDX-License-Identifier: MIT
#include "layout/export/dxf.hpp"

#include "layout/drawing/machine_order.hpp"
#include "layout/export/plain_number.hpp"
#include "layout/sheet/export_error.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <string_view>
#include <utility>

namespace dialwright::layout {
namespace {

constexpr int k_decimals = 4;
constexpr double k_pi = std::numbers::pi;

/// A corner of a polyline, and how its way on to the next bulges: the tangent of a quarter of the arc's sweep.
struct Corner {
    Point at;
    double bulge = 0;
};

double radius_of(Point start, const ArcTo& arc) {
    return std::hypot(start.x_mm - arc.centre.x_mm, start.y_mm - arc.centre.y_mm);
}

/// Writes the pairs of group code and value.
class DxfText {
  public:
    explicit DxfText(const DxfOptions& options) : options_{options} {}

    void word(int code, std::string_view value) {
        text_ += std::to_string(code);
        text_ += '\n';
        text_ += value;
        text_ += '\n';
    }
    void whole(int code, int value) { word(code, std::to_string(value)); }
    void number(int code, double value, int decimals = k_decimals) {
        text_ += std::to_string(code);
        text_ += '\n';
        add_number(text_, value, decimals, 1);
        text_ += '\n';
    }
    /// x, y and z = 0, in the codes 10, 20 and 30 with `more` added.
    void point(Point p, int more = 0) {
        number(10 + more, p.x_mm - options_.origin.x_mm);
        number(20 + more, p.y_mm - options_.origin.y_mm);
        number(30 + more, 0);
    }
    void head(const Box& box);
    void tables();
    void mark(const Mark& mark);
    [[nodiscard]] std::string take() && {
        word(0, "ENDSEC");
        word(0, "EOF");
        return std::move(text_);
    }

  private:
    void entity(std::string_view kind) {
        word(0, kind);
        word(8, layer_);
    }
    [[nodiscard]] bool one_place(Point a, Point b) const {
        const auto digits = [](double v) { return std::llround(v * 1e4); };
        return digits(a.x_mm - options_.origin.x_mm) == digits(b.x_mm - options_.origin.x_mm) &&
               digits(a.y_mm - options_.origin.y_mm) == digits(b.y_mm - options_.origin.y_mm);
    }
    bool whole_circle(const Path& path);
    void arc(Point start, const ArcTo& arc);
    void polyline(const std::vector<Corner>& corners, bool closed);
    [[nodiscard]] std::vector<Corner> corners_of(const Path& path) const;
    void path(const Path& path);

    const DxfOptions& options_;
    std::string layer_, text_;
};

void DxfText::head(const Box& box) {
    const auto variable = [&](std::string_view name) { word(9, name); };
    word(0, "SECTION");
    word(2, "HEADER");
    variable("$ACADVER");
    word(1, "AC1009");
    variable("$INSUNITS"); // 4: millimetres
    whole(70, 4);
    variable("$MEASUREMENT"); // 1: metric
    whole(70, 1);
    variable("$EXTMIN");
    point({box.left_mm, box.bottom_mm});
    variable("$EXTMAX");
    point({box.right_mm, box.top_mm});
    word(0, "ENDSEC");
}

void DxfText::tables() {
    const auto table = [&](std::string_view name, int count) {
        word(0, "TABLE");
        word(2, name);
        whole(70, count);
    };
    word(0, "SECTION");
    word(2, "TABLES");
    table("LTYPE", 1);
    word(0, "LTYPE");
    word(2, "CONTINUOUS");
    whole(70, 0);
    word(3, "Solid line");
    whole(72, 65);
    whole(73, 0);
    number(40, 0);
    word(0, "ENDTAB");
    table("LAYER", static_cast<int>(std::size(k_layers)) + 1);
    const auto layer = [&](std::string_view name, int colour) {
        word(0, "LAYER");
        word(2, name);
        whole(70, 0);
        whole(62, colour);
        word(6, "CONTINUOUS");
    };
    layer("0", 7); // every DXF has it; nothing of ours is on it
    for (const Layer one : k_machine_order)
        layer(in_capitals(options_.layers[one].name), options_.layers[one].colour);
    word(0, "ENDTAB");
    word(0, "ENDSEC");
    word(0, "SECTION");
    word(2, "BLOCKS");
    word(0, "ENDSEC");
    word(0, "SECTION");
    word(2, "ENTITIES");
}

/// Writes the path as a CIRCLE if all of it is arcs round one centre that make one turn.
bool DxfText::whole_circle(const Path& path) {
    const auto* first = path.pieces.empty() ? nullptr : std::get_if<ArcTo>(&path.pieces.front());
    if (first == nullptr || !one_place(path.start, end_of(path)))
        return false;
    double turn = 0;
    for (const Piece& piece : path.pieces) {
        const auto* arc = std::get_if<ArcTo>(&piece);
        if (arc == nullptr || !(arc->centre == first->centre))
            return false;
        turn += arc->sweep.in_radians();
    }
    if (std::abs(std::abs(turn) - 2 * k_pi) > 1e-9)
        return false;
    entity("CIRCLE");
    point(first->centre);
    number(40, radius_of(path.start, *first));
    return true;
}

/// An ARC runs anticlockwise, whichever way ours went.
void DxfText::arc(Point start, const ArcTo& arc) {
    const auto degrees = [&](Point p) {
        const double d = std::atan2(p.y_mm - arc.centre.y_mm, p.x_mm - arc.centre.x_mm) * (180 / k_pi);
        const double turned = d < 0 ? d + 360 : d;
        return turned >= 360 - 5e-10 ? 0.0 : turned;
    };
    entity("ARC");
    point(arc.centre);
    number(40, radius_of(start, arc));
    const bool forward = arc.sweep.in_radians() > 0;
    number(50, degrees(forward ? start : arc.to), 9);
    number(51, degrees(forward ? arc.to : start), 9);
}

void DxfText::polyline(const std::vector<Corner>& corners, bool closed) {
    entity("POLYLINE");
    whole(66, 1); // vertices follow
    point(options_.origin);
    whole(70, closed ? 1 : 0);
    for (const Corner& corner : corners) {
        entity("VERTEX");
        point(corner.at);
        if (corner.bulge != 0)
            number(42, corner.bulge, 10);
    }
    entity("SEQEND");
}

/// Corners without those that would be written twice. Arcs over 170° are halved: a reader finds an arc's centre from its
/// ends and its bulge, and near a full turn the last digit of an end would move it far.
std::vector<Corner> DxfText::corners_of(const Path& path) const {
    std::vector<Corner> corners{{path.start, 0}};
    const auto add = [&](Point to, double bulge) {
        if (one_place(corners.back().at, to))
            return;
        corners.back().bulge = bulge;
        corners.push_back({to, 0});
    };
    Point at = path.start;
    for (const Piece& piece : path.pieces) {
        const auto* round = std::get_if<ArcTo>(&piece);
        if (round != nullptr && !options_.chords_only) {
            const double sweep = round->sweep.in_radians();
            const int count = std::max(1, static_cast<int>(std::ceil(std::abs(sweep) / (k_pi * 170 / 180) - 1e-9)));
            for (int i = 1; i <= count; ++i)
                add(point_at(at, *round, static_cast<double>(i) / count), std::tan(sweep / count / 4));
        } else {
            std::vector<Point> points;
            flatten(points, at, piece, options_.flatten_mm);
            for (const Point p : points)
                add(p, 0);
        }
        at = end_of(piece);
    }
    return corners;
}

void DxfText::path(const Path& path) {
    if (!options_.chords_only && whole_circle(path))
        return;
    const auto* lone = path.pieces.size() == 1 ? std::get_if<ArcTo>(&path.pieces.front()) : nullptr;
    if (lone != nullptr && !options_.chords_only && !path.closed && !one_place(path.start, lone->to)) {
        arc(path.start, *lone);
        return;
    }
    std::vector<Corner> corners = corners_of(path);
    if (path.closed && corners.size() > 1 && one_place(corners.front().at, corners.back().at))
        corners.pop_back();
    if (corners.size() < 2)
        return; // a point: nothing to follow
    if (corners.size() > 2 || corners.front().bulge != 0) {
        polyline(corners, path.closed);
        return;
    }
    entity("LINE");
    point(corners[0].at);
    point(corners[1].at, 1);
}

void DxfText::mark(const Mark& mark) {
    layer_ = in_capitals(options_.layers[mark.layer].name);
    for (const Path& one : mark.paths) {
        if (!mark.filled || one.closed) {
            path(one);
            continue;
        }
        Path ring = one; // a filled shape is closed, whether its path says so or not
        ring.closed = true;
        path(ring);
    }
}

} // namespace

std::string dxf_of(const Drawing& drawing, const DxfOptions& options) {
    options.layers.check();
    if (!(options.flatten_mm > 0) || !std::isfinite(options.flatten_mm))
        throw ExportError("Curves can't be made into chords without a tolerance: flatten must be above 0 mm.");
    const Drawing ready = ready_for_machine(drawing, options.with_guides).drawing;
    Box box;
    for (const Mark& mark : ready.marks) {
        for (const Path& path : mark.paths)
            box.add(bounds_of(path));
    }
    if (box.empty())
        throw ExportError("\"" + drawing.name + "\" holds nothing for a machine to do, so no DXF was made.");
    DxfText dxf{options};
    dxf.head(box);
    dxf.tables();
    for (const Mark& mark : ready.marks)
        dxf.mark(mark);
    return std::move(dxf).take();
}

} // namespace dialwright::layout
