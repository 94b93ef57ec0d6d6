// SPDX-License-Identifier: MIT
#include "layout/drawing/kerf.hpp"

#include "layout/drawing/clipping.hpp"
#include "layout/drawing/measures.hpp"
#include "layout/drawing/offset.hpp"
#include "layout/sheet/export_error.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <optional>
#include <stdexcept>

namespace dialwright::layout {
namespace {

std::string plain(double mm) {
    std::string text = fmt::format("{:.4f}", mm);
    text.erase(text.find_last_not_of('0') + 1);
    if (text.back() == '.')
        text.pop_back();
    return text;
}

/// What the outline has to be fit for, whichever way it moves: the cut passes everywhere that it must.
Path outline_moved(const Path& path, double kerf_mm, bool hole, const std::string& part) {
    const double half = kerf_mm / 2;
    const std::string kerf = "A kerf of " + plain(kerf_mm) + " mm ";
    const std::vector<Path> inner = offset_by_chords(path, -half);
    if (inner.empty()) {
        throw ExportError(hole ? kerf + "closes a hole of \"" + part + "\": cut it with a finer tool, or engrave it."
                               : kerf + "is wider than \"" + part + "\" itself, so nothing of the part would be left.");
    }
    if (hole && inner.size() > 1)
        throw ExportError(kerf + "does not pass through the narrowest place of a hole in \"" + part + "\".");
    const std::vector<Path> chords = hole ? inner : offset_by_chords(path, half);
    if (chords.size() != 1)
        throw ExportError(kerf + "does not pass through a gap in the outline of \"" + part + "\".");
    const std::optional<Path> pieces = offset_by_pieces(path, hole ? -half : half);
    if (!pieces)
        return chords.front();
    // Two routes to one outline: they differ by the corners, which chords round, and by the chords themselves. Each
    // corner that is not rounded gains up to (1 − π/4) half²; more than that means that pieces crossed.
    const double corners = (1 - std::numbers::pi / 4) * half * half * static_cast<double>(path.pieces.size());
    const double slack = corners + 0.006 * length_of(path) + 1e-6;
    return std::abs(std::abs(area_of(*pieces)) - area_of(chords.front())) <= slack ? *pieces : chords.front();
}

Point pushed(Point at, Point from, double by_mm) {
    const double x = at.x_mm - from.x_mm, y = at.y_mm - from.y_mm, run = std::hypot(x, y);
    return {at.x_mm + by_mm * x / run, at.y_mm + by_mm * y / run};
}

/// An open cut that comes from outside the part, goes round a bite of it and leaves again, moved into the bite.
/// @return none for any other open line
std::optional<Path> slot_moved(const Path& path, double kerf_mm, const std::vector<const Path*>& outlines,
                               const std::string& part) {
    constexpr double k_fine_mm = 0.01;
    const auto inside = [&](Point at) {
        return std::any_of(outlines.begin(), outlines.end(),
                           [&](const Path* outline) { return winding_round(flattened(*outline, k_fine_mm), at) != 0; });
    };
    if (path.pieces.size() < 3 || inside(path.start) || inside(end_of(path)) || !inside(end_of(path.pieces.front())))
        return std::nullopt;
    Path closed = path;
    closed.pieces.emplace_back(LineTo{path.start});
    closed.closed = true;
    Path moved = outline_moved(closed, kerf_mm, true, part);
    if (moved.pieces.size() != closed.pieces.size())
        return std::nullopt;
    // Open again, its ends as far outside as they were.
    moved.closed = false;
    moved.pieces.pop_back();
    moved.start = pushed(moved.start, end_of(moved.pieces.front()), kerf_mm / 2);
    const Point before = end_of(moved.pieces[moved.pieces.size() - 2]), end = end_of(moved);
    moved.pieces.back() = LineTo{pushed(end, before, kerf_mm / 2)};
    return moved;
}

} // namespace

Kerfed with_kerf(const Drawing& drawing, double kerf_mm) {
    if (!(kerf_mm >= 0) || !std::isfinite(kerf_mm))
        throw std::invalid_argument("a kerf is 0 mm or more");
    Kerfed made{drawing, 0, 0, {}};
    std::vector<const Path*> outlines;
    for (const Mark& mark : drawing.marks) {
        for (const Path& path : mark.paths) {
            if (mark.layer == Layer::cut && path.closed)
                outlines.push_back(&path);
        }
    }
    const std::vector<Nest> nests = nests_of(outlines);
    std::size_t at = 0; // in nests
    for (Mark& mark : made.drawing.marks) {
        for (Path& path : mark.paths) {
            if (mark.layer != Layer::cut)
                break;
            const std::string& part = mark.name.empty() ? drawing.name : mark.name;
            if (path.closed) {
                const bool hole = nests[at++].depth % 2 == 1;
                if (kerf_mm > 0)
                    path = outline_moved(path, kerf_mm, hole, part);
            } else if (std::optional<Path> slot =
                           kerf_mm > 0 ? slot_moved(path, kerf_mm, outlines, part) : std::nullopt) {
                path = std::move(*slot);
            } else {
                ++made.left_alone;
                continue;
            }
            made.moved += kerf_mm > 0;
        }
    }
    made.said = kerf_mm == 0
                    ? "Kerf: none allowed for; lines to cut are where the part ends."
                    : fmt::format("Kerf: {} mm, the whole width of the cut. Outlines stand {} mm outside the part, "
                                  "holes as much inside.",
                                  plain(kerf_mm), plain(kerf_mm / 2));
    if (kerf_mm > 0 && made.left_alone > 0)
        made.said += fmt::format(" Open lines to cut, which were not moved: {}.", made.left_alone);
    return made;
}

} // namespace dialwright::layout
