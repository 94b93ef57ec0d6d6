// SPDX-License-Identifier: MIT
//
// The outline runs anticlockwise: along the foot with its tenons, up the back, round the tip, down the style with its
// notch, and down the front. The tip is an arc that touches the style at the end of its straight and runs on until it
// touches the line to the heel; so the style is straight and true to its very end, and no corner stands up.
#include "layout/gnomon/edge_gnomon.hpp"

#include "layout/plate/points.hpp"
#include "layout/text/figures.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <numbers>
#include <stdexcept>

namespace dialwright::layout {
namespace {

constexpr double k_on_face_mm = 1e-6; ///< a style that passes the foot's start this close to the face meets it there

[[noreturn]] void refuse(const std::string& why) {
    throw GnomonError(why);
}

class Maker {
  public:
    explicit Maker(const EdgeGnomonPlan& plan)
        : plan_{checked(plan)}, joint_{joint_of(plan.joint, plan.foot_mm, plan.thickness_mm, plan.plate_thickness_mm)},
          along_{cos(plan.style_height), sin(plan.style_height)}, square_{left_of(along_)}, nodus_{
                                                                                                plan.nodus_along_mm,
                                                                                                plan.nodus_height_mm} {
        lay_start();
        lay_notch();
        lay_end();
        check_notch();
    }

    EdgeGnomon made() {
        EdgeGnomon gnomon;
        gnomon.joint = joint_;
        gnomon.nodus = nodus_;
        gnomon.style_start = style_start_;
        gnomon.style_end = style_end_;
        Drawing drawing{"gnomon", {}};
        add_guides(drawing);
        add_screw_holes(drawing);
        drawing.marks.push_back({Layer::cut, {outline()}, k_cut_mm, false, "gnomon"});
        gnomon.part.drawings.push_back(std::move(drawing));
        if (joint_.options.kind == FootKind::flange)
            gnomon.part.drawings.push_back(flange_of(joint_));
        gnomon.part.plate_marks = plate_marks_of(joint_);
        add_particulars(gnomon.part);
        add_words(gnomon.part);
        return gnomon;
    }

  private:
    static const EdgeGnomonPlan& checked(const EdgeGnomonPlan& p) {
        if (!(p.style_height >= Angle{}) || p.style_height > Angle::degrees(89))
            refuse(fmt::format(
                "an edge gnomon can't have a style height of {:.2f}°: from 0° to 89°; a steeper style is a pin",
                p.style_height.in_degrees()));
        if (!(p.nodus_height_mm > 0))
            refuse("the nodus must stand above the plate's face");
        if (!(p.rounding_mm >= 0 && p.notch_width_mm >= 0 && p.notch_depth_mm >= 0))
            refuse("a rounding or a notch of the gnomon is below zero");
        return p;
    }

    [[nodiscard]] double style_height_at(double x) const {
        return nodus_.y_mm + (x - nodus_.x_mm) * tan(plan_.style_height);
    }
    [[nodiscard]] Point on_style(double x) const { return {x, style_height_at(x)}; }

    /// Where the gnomon begins: as a wedge on its base, or with an upright front below a style that passes above.
    void lay_start() {
        const double base = joint_.base_mm();
        double front = style_height_at(0);
        if (front < -k_on_face_mm)
            refuse(fmt::format("the style would pass {:.1f} mm under the plate's face at the start of the foot: the "
                               "foot starts too far back",
                               -front));
        if (front < k_on_face_mm)
            front = 0;
        if (front <= base) {
            start_mm_ = base > front ? (base - front) / tan(plan_.style_height) : 0.0;
            style_start_ = {start_mm_, base};
            front_top_ = style_start_;
        } else {
            front_top_ = {0, front};
            // The arc in the corner takes this much of both sides.
            const double tangent = std::tan((std::numbers::pi / 2 - plan_.style_height.in_radians()) / 2);
            front_radius_ = std::min(plan_.rounding_mm, 0.49 * (front - base) / std::max(tangent, 1e-9));
            style_start_ = front_top_ + front_radius_ * tangent * along_;
        }
        if (start_mm_ >= 0.8 * joint_.foot_mm)
            refuse(fmt::format("a flange {:.1f} mm thick hides the style along {:.1f} mm of a foot of {:.1f} mm: take "
                               "a thinner one or a longer foot",
                               base, start_mm_, joint_.foot_mm));
        for (const Span& tenon : joint_.tenons)
            if (tenon.from_mm < start_mm_)
                refuse("a tenon stands before the start of the gnomon");
    }

    void lay_notch() {
        if (plan_.nodus == NodusMark::none)
            return;
        const double found = std::clamp(0.06 * nodus_.y_mm, 1.5, 10.0);
        width_ = plan_.notch_width_mm > 0 ? plan_.notch_width_mm : std::min(found, 0.8 * distance(nodus_, front_top_));
        depth_ = plan_.nodus == NodusMark::round_seat ? width_ / 2
                 : plan_.notch_depth_mm > 0           ? plan_.notch_depth_mm
                                                      : width_ / 2;
        if (dot(nodus_ - style_start_, along_) < width_ / 2)
            refuse(fmt::format("the nodus stands {:.1f} mm along the foot, and a notch {:.1f} mm wide has no room "
                               "there: move the foot's start back or take a "
                               "narrower notch",
                               nodus_.x_mm, width_));
    }

    void lay_end() {
        const double r = plan_.rounding_mm, s = along_.y_mm;
        const double past_nodus = nodus_.x_mm + (width_ / 2 + std::max({width_ / 2, r, 2.0})) * along_.x_mm;
        const double for_ring = plan_.least_style_mm * along_.x_mm;
        const double upright_back = joint_.foot_mm - r * (1 + s);
        double end = plan_.style_end_mm > 0 ? plan_.style_end_mm : std::max({past_nodus, for_ring, upright_back});
        if (end < nodus_.x_mm + width_ / 2 * along_.x_mm)
            refuse(fmt::format(
                "the style ends {:.1f} mm along the foot, and the nodus with its notch needs it to run to {:.1f} mm",
                end, nodus_.x_mm + width_ / 2 * along_.x_mm));
        style_end_ = on_style(end);
        heel_ = {joint_.foot_mm, joint_.base_mm()};
        const double below = -dot(heel_ - style_start_, square_); // of the heel, square to the style
        if (below < 1.0 || style_end_.y_mm - heel_.y_mm < 1.0)
            refuse(fmt::format(
                "the gnomon is only {:.2f} mm high at the end of its foot: lengthen the foot, or raise the nodus",
                below));
        tip_radius_ = std::min({r, 0.4 * below, 0.4 * (style_end_.y_mm - heel_.y_mm)});
        tip_centre_ = style_end_ - tip_radius_ * square_;
        const Point to_centre = tip_centre_ - heel_;
        const double far = length(to_centre);
        if (far < 1.5 * tip_radius_ || far < 1e-6)
            refuse("the style ends at the heel of its foot: make it longer");
        const double open = std::asin(tip_radius_ / far), turn = std::atan2(to_centre.y_mm, to_centre.x_mm) - open;
        back_top_ = heel_ + std::sqrt(far * far - tip_radius_ * tip_radius_) * Point{std::cos(turn), std::sin(turn)};
    }

    /// How much of the gnomon stands square below the style at the nodus.
    [[nodiscard]] double section_mm() const {
        const Point down = -1.0 * square_;
        double least = (nodus_.y_mm - heel_.y_mm) / square_.y_mm;
        const Point back = back_top_ - heel_, to_heel = heel_ - nodus_;
        const double turn = cross(down, back);
        if (std::abs(turn) > 1e-12) {
            const double away = cross(to_heel, back) / turn, part = cross(to_heel, down) / turn;
            if (away > 0 && part >= 0 && part <= 1)
                least = std::min(least, away);
        }
        return least;
    }

    void check_notch() const {
        if (plan_.nodus != NodusMark::none && depth_ > section_mm() / 2)
            refuse(fmt::format("a notch {:.1f} mm deep is too deep for the gnomon, which is {:.1f} mm deep at the "
                               "nodus: at most {:.1f} mm",
                               depth_, section_mm(), section_mm() / 2));
    }

    [[nodiscard]] Path outline() const {
        const std::vector<Point> foot = foot_corners(joint_, start_mm_);
        Pen pen{foot.front()};
        for (const Point& corner : foot)
            pen.line_to(corner);
        if (tip_radius_ > 0) {
            pen.line_to(back_top_);
            pen.arc_to(style_end_, tip_centre_, true);
        } else {
            pen.line_to(style_end_);
        }
        const Point mouth = width_ / 2 * along_;
        if (plan_.nodus == NodusMark::v_notch) {
            pen.line_to(nodus_ + mouth);
            pen.line_to(nodus_ - depth_ * square_);
            pen.line_to(nodus_ - mouth);
        } else if (plan_.nodus == NodusMark::round_seat) {
            pen.line_to(nodus_ + mouth);
            pen.arc_to(nodus_ - mouth, nodus_, false);
        }
        if (front_radius_ > 0)
            pen.round_corner(front_top_, foot.front(), front_radius_);
        else
            pen.line_to(front_top_);
        return pen.closed();
    }

    void add_guides(Drawing& drawing) const {
        const double reach = std::max(joint_.foot_mm, style_end_.x_mm + tip_radius_);
        const Point face_end{reach + 8, 0};
        drawing.marks.push_back({Layer::guide, {polyline({{-8, 0}, face_end})}, k_thin_mm, false, "plate's face"});
        if (joint_.plate_thickness_mm > 0) {
            const Point down{0, -joint_.plate_thickness_mm};
            drawing.marks.push_back(
                {Layer::guide, {polyline({Point{-8, 0} + down, face_end + down})}, k_thin_mm, false, "plate's back"});
        }
        if (joint_.base_mm() > 0)
            drawing.marks.push_back(
                {Layer::guide, {rectangle({0, 0, joint_.foot_mm, joint_.base_mm()})}, k_thin_mm, false, "flange"});
        drawing.marks.push_back(dimension({nodus_.x_mm, 0}, nodus_, "dimension: nodus height " + say(nodus_.y_mm)));
        drawing.marks.push_back(cross_mark(Layer::guide, nodus_, 2.0, "nodus"));
        if (plan_.style_height > Angle::degrees(0.01)) {
            // The angle is drawn where the style, or a line beside it through the foot's start, leaves the face.
            const double r = 0.35 * std::min(joint_.foot_mm, distance(style_start_, style_end_));
            const Point begin{r, 0}, end = r * along_;
            drawing.marks.push_back({Layer::guide,
                                     {Path{begin, {ArcTo{end, {}, plan_.style_height}}, false}},
                                     k_thin_mm,
                                     false,
                                     "style height " + degrees_minutes(plan_.style_height)});
        }
    }

    /// Screws from behind go up into the edge of a plain foot. Seen from the side they are no work for a machine, so they stand
    /// on the sheets alone.
    void add_screw_holes(Drawing& drawing) const {
        if (joint_.options.kind != FootKind::plain)
            return;
        const double d = joint_.options.hole_mm;
        for (std::size_t i = 0; i < joint_.holes.size(); ++i) {
            const double x = joint_.holes[i].x_mm;
            const double over = std::min(style_height_at(x - d / 2), back_height_at(x + d / 2));
            const double deep = std::min(2.5 * d, 0.6 * over);
            if (deep < d)
                refuse(fmt::format("fixing hole {} would come out of the gnomon, which is {:.1f} mm high there: take "
                                   "fewer or smaller screws",
                                   i + 1, over));
            drawing.marks.push_back({Layer::guide,
                                     {polyline({{x - d / 2, 0}, {x - d / 2, deep}, {x + d / 2, deep}, {x + d / 2, 0}})},
                                     k_thin_mm,
                                     false,
                                     fmt::format("tapped hole {} {} deep", i + 1, say(deep))});
            drawing.marks.push_back({Layer::guide,
                                     {polyline({{x, -2}, {x, deep + 2}})},
                                     k_thin_mm,
                                     false,
                                     fmt::format("tapped hole {} axis", i + 1)});
        }
    }

    [[nodiscard]] double back_height_at(double x) const {
        const Point back = back_top_ - heel_;
        return back.x_mm < 0 && x > back_top_.x_mm ? heel_.y_mm + (x - heel_.x_mm) * back.y_mm / back.x_mm : 1e300;
    }

    void add_particulars(Part& part) const {
        const auto add = [&](std::string name, std::string value) {
            part.particulars.emplace_back(std::move(name), std::move(value));
        };
        add("Style height", degrees_minutes(plan_.style_height));
        add("Style, straight length", say(distance(style_start_, style_end_)));
        add("Nodus above the face", say(nodus_.y_mm));
        add("Nodus from the foot's start, along the style", say(distance(nodus_, front_top_)));
        add("Foot", say(joint_.foot_mm));
        add("Sheet", joint_.thickness_mm > 0 ? fmt::format("{} thick", say(joint_.thickness_mm))
                                             : std::string{"as thin as is stiff: the lines are those of a thin edge"});
        if (width_ > 0)
            add(plan_.nodus == NodusMark::v_notch ? "Notch" : "Round seat",
                fmt::format("{} wide, {} deep", say(width_), say(depth_)));
        if (front_top_.y_mm > joint_.base_mm())
            add("Style above the foot's start", say(front_top_.y_mm));
        if (joint_.base_mm() > 0)
            add("Gnomon starts behind the foot's start by", say(start_mm_));
        for (std::size_t i = 0; i < joint_.tenons.size(); ++i) {
            add(fmt::format("Tenon {}", i + 1),
                fmt::format("{} to {} from the foot's start", say(joint_.tenons[i].from_mm),
                            say(joint_.tenons[i].to_mm)));
            add(fmt::format("Slot {}", i + 1),
                fmt::format("{} × {}, a fit of {:.2f} mm", say(joint_.slots[i].length_mm()),
                            say(joint_.slot_width_mm()), joint_.options.fit_mm));
        }
        for (std::size_t i = 0; i < joint_.holes.size(); ++i)
            add(fmt::format("Fixing hole {}", i + 1),
                fmt::format("{} from the foot's start, {} diameter", say(joint_.holes[i].x_mm),
                            say(joint_.options.hole_mm)));
    }

    void add_words(Part& part) const {
        part.notes.push_back("The style's two edges throw the shadow: leave them straight and square, and take off no "
                             "more than the burr.");
        part.notes.push_back("Check the style against the gauge before the joint is made fast.");
        if (joint_.options.kind == FootKind::tenons || joint_.options.kind == FootKind::hooked_tenons)
            part.notes.push_back("A milled slot has round corners: file them square, or round the tenons' edges.");
        if (joint_.options.kind == FootKind::hooked_tenons)
            part.notes.push_back(fmt::format("Set the tenons in, push the gnomon {} along the substyle until they "
                                             "bear, and fill each slot behind them with a key.",
                                             say(joint_.options.hook_mm)));
        if (joint_.options.kind == FootKind::halving)
            part.notes.push_back("Slide the gnomon in from the plate's edge until both slots bear; the foot's start is "
                                 "then at its mark.");
        part.cautions.push_back(tip_radius_ > 0 ? "The gnomon's tip and back edge stand where a face or a child's head "
                                                  "can meet them: round them over, and put a "
                                                  "guard where people pass close by."
                                                : "This gnomon's tip is sharp. Where a face or a child's head can meet "
                                                  "it, round it or put up a guard.");
        part.cautions.push_back("Sheet has edges that cut: take off the burr before handling.");
    }

    [[nodiscard]] std::string say(double mm) const { return say_length(mm, plan_.inches); }

    const EdgeGnomonPlan& plan_;
    Joint joint_;
    Point along_, square_; ///< up the style, and square to it away from the plate
    Point nodus_;
    double start_mm_ = 0.0, front_radius_ = 0.0, width_ = 0.0, depth_ = 0.0, tip_radius_ = 0.0;
    Point front_top_, style_start_, style_end_, heel_, tip_centre_, back_top_;
};

} // namespace

EdgeGnomon edge_gnomon(const EdgeGnomonPlan& plan) {
    return Maker{plan}.made();
}

std::optional<EdgeGnomonPlan> edge_gnomon_plan(const DialPlan& plan, const Face& face, const FaceSpec& spec) {
    const auto seat = seat_of(face, spec);
    if (!seat || spec.gnomon.kind != GnomonKind::edge)
        return std::nullopt;
    EdgeGnomonPlan made;
    made.style_height = seat->style_height;
    made.nodus_height_mm = seat->nodus_height_mm;
    made.nodus_along_mm = seat->nodus_along_mm;
    made.foot_mm = seat->foot_mm;
    made.thickness_mm = spec.gnomon.thickness_mm;
    made.plate_thickness_mm = spec.plate.thickness_mm;
    made.least_style_mm = least_style_mm(plan, face, spec);
    made.rounding_mm = spec.gnomon.rounding_mm;
    made.joint = joint_on(*seat, spec.gnomon, spec.plate.thickness_mm).options;
    if (spec.gnomon.nodus == NodusKind::ball) {
        made.nodus = NodusMark::round_seat;
        made.notch_width_mm = spec.gnomon.ball_mm;
    } else if (spec.gnomon.nodus == NodusKind::tip) {
        made.nodus = NodusMark::none;
        made.style_end_mm = made.nodus_along_mm;
        made.rounding_mm = 0;
    }
    return made;
}

} // namespace dialwright::layout
