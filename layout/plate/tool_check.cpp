// SPDX-License-Identifier: MIT
#include "layout/plate/tool_check.hpp"

#include "layout/drawing/measures.hpp"
#include "layout/drawing/offset.hpp"
#include "layout/plate/points.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <map>
#include <set>

namespace dialwright::layout {
namespace {

constexpr double k_may_miss = 0.04; ///< of a letter's area: points of serifs that no one misses
/// A stroked letter's capitals in widths of its line; below that its eyes fill up (common practice, no source).
constexpr double k_stroke_widths = 5;

std::string place_text(Point at) {
    const auto part = [](double mm, const char* more, const char* less) {
        return fmt::format("{:.0f} mm {}", std::abs(mm), mm >= 0 ? more : less);
    };
    return fmt::format("{} and {} the plate's middle", part(at.x_mm, "right", "left"),
                       part(at.y_mm, "up from", "down from"));
}

using Letter = std::vector<Path>;

/// The contours that belong together: those whose boxes meet. Mostly one letter, or the mark on one.
std::vector<Letter> letters_of(const Mark& mark) {
    std::vector<Letter> letters;
    std::vector<Box> boxes;
    for (const Path& path : mark.paths) {
        Letter letter{path};
        Box box = bounds_of(path);
        for (std::size_t i = 0; i < letters.size();)
            if (boxes[i].meets(box)) {
                box.add(boxes[i]);
                letter.insert(letter.end(), letters[i].begin(), letters[i].end());
                letters.erase(letters.begin() + std::ptrdiff_t(i));
                boxes.erase(boxes.begin() + std::ptrdiff_t(i));
            } else {
                ++i;
            }
        letters.push_back(std::move(letter));
        boxes.push_back(box);
    }
    return letters;
}

/// The lettering of one kind and height.
class LetterCheck {
  public:
    LetterCheck(const Cutting& cutting, std::string kind, double capital_mm)
        : cutting_{&cutting}, kind_{std::move(kind)}, capital_mm_{capital_mm} {}

    void add(const Mark& mark) {
        if (!mark.filled) {
            if (capital_mm_ < k_stroke_widths * mark.width_mm)
                stroke_mm_ = mark.width_mm;
            return;
        }
        for (Letter& letter : letters_of(mark))
            if (is_new(letter))
                look_at(std::move(letter), mark.name);
    }
    [[nodiscard]] bool trouble() const { return !troubled_.empty() || stroke_mm_ > 0; }
    [[nodiscard]] double share() const { return stroke_mm_ > 0 ? 1.0 : worst_share_; }
    [[nodiscard]] const std::string& kind() const { return kind_; }

    [[nodiscard]] std::string sentence() const {
        if (stroke_mm_ > 0)
            return fmt::format("letters ({}) with capitals of {:.1f} mm fill up when they are cut {:.2f} mm wide: "
                               "{:.1f} mm would do",
                               kind_, capital_mm_, stroke_mm_, k_stroke_widths * stroke_mm_);
        return fmt::format(
            "the tool leaves no line finer than {:.2f} mm, and letters ({}) with capitals of {:.1f} mm are finer: it "
            "misses up to {:.0f} % of one{}, first in \"{}\", {}; {}\"cutting: letters: single strokes\" suits it",
            thinnest_line_mm(*cutting_), kind_, capital_mm_, std::min(100.0, std::ceil(100 * worst_share_)),
            lost_eyes_ > 0 ? " and breaks eyes out" : "", worst_name_, place_text(at_), remedy());
    }

  private:
    [[nodiscard]] static bool spoilt(const DiscFit& fit) {
        return fit.missed_mm2 > k_may_miss * fit.area_mm2 || fit.lost_eyes > 0;
    }

    /// A letter that stands in another place, turned, has the same pieces and the same area.
    bool is_new(const Letter& letter) {
        std::size_t pieces = 0;
        double area = 0;
        for (const Path& path : letter) {
            pieces += path.pieces.size();
            area += area_of(path);
        }
        return seen_.insert({pieces, std::lround(1e5 * area / (capital_mm_ * capital_mm_))}).second;
    }

    void look_at(Letter letter, const std::string& name) {
        const DiscFit fit = fit_of_disc(letter, thinnest_line_mm(*cutting_) / 2);
        if (!spoilt(fit))
            return;
        lost_eyes_ += fit.lost_eyes;
        const double share = fit.missed_mm2 / fit.area_mm2;
        if (troubled_.empty() || share > worst_share_) {
            worst_share_ = share;
            worst_name_ = name;
            Box box;
            for (const Path& path : letter)
                box.add(bounds_of(path));
            at_ = share > 0 ? fit.worst : box.middle();
        }
        troubled_.push_back(std::move(letter));
    }

    /// Larger letters under the same tool are these letters under a smaller one.
    [[nodiscard]] std::string remedy() const {
        constexpr double k_step = 1.08, k_most = 12;
        double factor = 1;
        for (const Letter& letter : troubled_)
            while (factor < k_most && spoilt(fit_of_disc(letter, thinnest_line_mm(*cutting_) / 2 / factor)))
                factor *= k_step;
        return factor < k_most
                   ? fmt::format("capitals of {:.1f} mm would do, or ", std::ceil(factor * capital_mm_ * 2) / 2)
                   : std::string{};
    }

    const Cutting* cutting_;
    std::string kind_;
    double capital_mm_;
    std::set<std::pair<std::size_t, long>> seen_;
    std::vector<Letter> troubled_;
    std::string worst_name_;
    double worst_share_ = 0, stroke_mm_ = 0;
    Point at_;
    std::size_t lost_eyes_ = 0;
};

void tell_letters(const Face& face, const Cutting& cutting, std::vector<std::string>& told) {
    constexpr std::size_t k_most = 2;
    std::vector<LetterCheck> checks;
    std::map<std::pair<std::string, double>, std::size_t> index;
    for (const Lettered& one : face.lettering) {
        const auto [it, added] = index.try_emplace({one.kind, one.capital_mm}, checks.size());
        if (added)
            checks.emplace_back(cutting, one.kind, one.capital_mm);
        checks[it->second].add(face.drawing.marks.at(one.mark));
    }
    std::erase_if(checks, [](const LetterCheck& check) { return !check.trouble(); });
    std::stable_sort(checks.begin(), checks.end(),
                     [](const LetterCheck& a, const LetterCheck& b) { return a.share() > b.share(); });
    std::string others;
    for (std::size_t i = 0; i < checks.size(); ++i)
        if (i < k_most)
            told.push_back(checks[i].sentence());
        else if (others.find(checks[i].kind()) == std::string::npos)
            others += (others.empty() ? "" : ", ") + checks[i].kind();
    if (!others.empty())
        told.push_back(fmt::format("the tool is too wide for the letters of these as well: {}", others));
}

std::string pair_text(const CloseLines& close) {
    return fmt::format("\"{}\" and \"{}\"", close.a, close.b);
}

/// Up to a few more pairs, by name; VI in the morning and VI in the evening have one.
std::string more_pairs(const std::vector<CloseLines>& all) {
    constexpr std::size_t k_named = 4;
    std::vector<std::string> names;
    for (const CloseLines& close : all)
        if (const std::string name = pair_text(close); std::find(names.begin(), names.end(), name) == names.end())
            names.push_back(name);
    std::string text;
    for (std::size_t i = 1; i < names.size() && i <= k_named; ++i)
        text += (i == 1 ? "; so with " : ", ") + names[i];
    if (names.size() > k_named + 1)
        text += fmt::format(" and {} more", names.size() - k_named - 1);
    return text;
}

void tell_ring(const std::vector<CloseLines>& ring, const FaceSpec& spec, std::vector<std::string>& told) {
    if (ring.empty())
        return;
    double radius = 0, reach = 1e300;
    bool centre = true;
    for (const CloseLines& close : ring) {
        radius = std::max(radius, close.radius_mm);
        reach = std::min(reach, close.reach_mm);
        centre = centre && close.radius_mm > 0;
    }
    const std::string remedy =
        !centre          ? "no border of the plate parts them; take a finer tool or a larger plate"
        : radius < reach ? fmt::format("\"borders: inner: {:.0f} mm\" would part them", std::ceil(radius))
                         : "no border round the centre parts them on this plate; take a finer tool or a larger plate";
    told.push_back(fmt::format("the {} leave {:.2f} mm between them {}, and the tool wants {:.2f} mm{}; {}",
                               "hour lines " + pair_text(ring.front()), std::max(0.0, ring.front().gap_mm),
                               place_text(ring.front().at), spec.cutting.least_gap_mm, more_pairs(ring), remedy));
}

void tell_lines(const Face& face, const FaceSpec& spec, std::vector<std::string>& told) {
    constexpr std::size_t k_most = 3;
    std::vector<CloseLines> ring;
    std::vector<std::vector<CloseLines>> groups; // by kinds, the closest first
    for (CloseLines& close : close_lines(face, spec)) {
        if (close.of_ring) {
            ring.push_back(std::move(close));
            continue;
        }
        auto group =
            std::find_if(groups.begin(), groups.end(), [&](const auto& of) { return of.front().kinds == close.kinds; });
        if (group == groups.end())
            group = groups.insert(groups.end(), std::vector<CloseLines>{});
        group->push_back(std::move(close));
    }
    tell_ring(ring, spec, told);
    std::size_t others = 0;
    for (std::size_t i = 0; i < groups.size(); ++i) {
        const CloseLines& first = groups[i].front();
        if (i >= k_most)
            others += groups[i].size();
        else
            told.push_back(fmt::format("{} leave {:.2f} mm between them {}, and the tool wants {:.2f} mm{}",
                                       pair_text(first), std::max(0.0, first.gap_mm), place_text(first.at),
                                       spec.cutting.least_gap_mm, more_pairs(groups[i])));
    }
    if (others > 0)
        told.push_back(fmt::format("{} more pairs of lines of other kinds stand closer than the tool's {:.2f} mm: draw "
                                   "fewer kinds of lines, or take a finer tool",
                                   others, spec.cutting.least_gap_mm));
}

/// The gap between the two half-dials of a thick gnomon: one hour is drawn twice, once for each edge, side by side.
void tell_noon_gap(const Face& face, const FaceSpec& spec, std::vector<std::string>& told) {
    constexpr double k_parallel = 1e-6, k_one_line_mm = 0.02, k_rounding_mm = 0.005;
    for (std::size_t i = 0; i < face.lines.size(); ++i)
        for (std::size_t k = i + 1; k < face.lines.size(); ++k) {
            const DrawnLine &a = face.lines[i], &b = face.lines[k];
            const auto of_ring = [](const DrawnLine& line) {
                return line.set == 0 && line.family == Family::hour && line.step_min >= 60 && line.points.size() == 2;
            };
            if (!of_ring(a) || !of_ring(b) || std::abs(a.time_h - b.time_h) > 1e-6)
                continue;
            const auto run_of = [&](const DrawnLine& line) {
                const PlatePoint from = line.points.front(), to = line.points.back();
                return unit({to.u_mm - from.u_mm, to.v_mm - from.v_mm});
            };
            const Point run = run_of(a), start = to_work(a.points.front(), face.placement.foot),
                        other = to_work(b.points.front(), face.placement.foot);
            const double apart = std::abs(cross(run, other - start));
            const double gap = apart - (a.width_mm + b.width_mm) / 2;
            if (std::abs(cross(run, run_of(b))) > k_parallel || apart < k_one_line_mm ||
                gap > spec.cutting.least_gap_mm - k_rounding_mm)
                continue;
            told.push_back(
                fmt::format("the gap for the gnomon leaves {:.2f} mm between the two lines of {}, and the tool "
                            "wants {:.2f} mm: take a thicker gnomon, or a finer tool",
                            std::max(0.0, gap), a.label, spec.cutting.least_gap_mm));
            return;
        }
}

void tell_widths(const FaceSpec& spec, std::vector<std::string>& told) {
    const double thinnest = thinnest_line_mm(spec.cutting);
    const LineWidths& widths = spec.widths;
    double asked = 1e300;
    for (const double one :
         {widths.hours_mm, widths.dates_mm, widths.altitudes_mm, widths.azimuths_mm, widths.noons_mm})
        asked = one > 0 ? std::min(asked, one) : asked;
    for (const double one : widths.more_hours_mm)
        asked = one > 0 ? std::min(asked, one) : asked;
    if (asked < thinnest)
        told.push_back(fmt::format("the design asks for lines {:.2f} mm wide, and the tool leaves none finer than "
                                   "{:.2f} mm: they are drawn so",
                                   asked, thinnest));
}

} // namespace

double thinnest_line_mm(const Cutting& cutting) {
    switch (cutting.tool) {
    case Tool::end_mill:
    case Tool::laser:
        return cutting.diameter_mm;
    case Tool::v_cutter:
    case Tool::chisel:
        return std::max(cutting.flat_mm, cutting.line_width_mm / 2);
    case Tool::any:
        break;
    }
    return 0.0;
}

bool parts_no_hours(const Face& face, const FaceSpec& spec) {
    if (spec.cutting.tool == Tool::any)
        return false;
    std::set<long> hours, crowded; // by minutes of the ring's own time
    for (const DrawnLine& line : face.lines)
        if (line.set == 0 && line.family == Family::hour && line.step_min >= 60)
            hours.insert(std::lround(line.time_h * 60));
    for (const CloseLines& close : close_lines(face, spec))
        if (close.of_ring && !(close.radius_mm > 0 && close.radius_mm < close.reach_mm))
            crowded.insert({std::lround(close.a_h * 60), std::lround(close.b_h * 60)});
    return hours.size() > 1 && crowded == hours;
}

std::vector<std::string> tool_warnings(const Face& face, const FaceSpec& spec) {
    std::vector<std::string> told;
    if (spec.cutting.tool != Tool::any) {
        tell_letters(face, spec.cutting, told);
        tell_noon_gap(face, spec, told);
        tell_widths(spec, told);
    }
    tell_lines(face, spec, told);
    return told;
}

} // namespace dialwright::layout
