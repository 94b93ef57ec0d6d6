// SPDX-License-Identifier: MIT
#include "layout/gnomon/rod_gnomon.hpp"

#include "layout/plate/points.hpp"
#include "layout/text/figures.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <numbers>
#include <stdexcept>

namespace dialwright::layout {
namespace {

constexpr Angle k_least_for_socket = Angle::degrees(5);
constexpr Angle k_skids =
    Angle::degrees(35); ///< common practice, no source: a twist drill at a flatter angle wanders off

[[noreturn]] void refuse(const std::string& why) {
    throw GnomonError(why);
}

class Maker {
  public:
    explicit Maker(const RodPlan& plan) : plan_{plan}, along_{cos(plan.style_height), sin(plan.style_height)} {
        check();
        rod_.nodus = {plan.nodus_along_mm, plan.nodus_height_mm};
        lay_axis();
        lay_struts();
    }

    RodGnomon made() {
        Drawing drawing{"gnomon rod", {}};
        add_guides(drawing);
        for (std::size_t i = 0; i < rod_.struts.size(); ++i)
            drawing.marks.push_back(
                {Layer::cut, {strut_outline(rod_.struts[i])}, k_cut_mm, false, fmt::format("strut {}", i + 1)});
        drawing.marks.push_back(
            {Layer::cut, {bar_outline(low_, tip_, plan_.diameter_mm, !socket_, true)}, k_cut_mm, false, "rod"});
        if (plan_.bead_mm > 0)
            drawing.marks.push_back({Layer::guide, {circle(rod_.nodus, plan_.bead_mm / 2)}, k_thin_mm, false, "bead"});
        rod_.part.drawings.push_back(std::move(drawing));
        if (socket_)
            rod_.part.drawings.push_back(
                drilling_jig(plan_.style_height, plan_.diameter_mm, plan_.jig_width_mm, plan_.jig_guide_mm));
        add_plate_marks();
        add_particulars();
        add_words();
        return std::move(rod_);
    }

  private:
    void check() const {
        if (!(plan_.style_height >= Angle{}) || plan_.style_height > Angle::degrees(90))
            refuse("a rod's style height is from 0° to 90°");
        if (!(plan_.nodus_height_mm > 0))
            refuse("the nodus must stand above the plate's face");
        if (!(plan_.diameter_mm > 0))
            refuse("the rod has no diameter");
        if (plan_.bead_mm > 0 && plan_.bead_mm <= plan_.diameter_mm)
            refuse(fmt::format("a bead of {:.1f} mm does not show on a rod of {:.1f} mm", plan_.bead_mm,
                               plan_.diameter_mm));
        for (const double length : {plan_.exposed_mm, plan_.socket_mm, plan_.strut_at_mm, plan_.strut_diameter_mm,
                                    plan_.strut_embedment_mm, plan_.bead_mm})
            if (!(length >= 0))
                refuse("a length of the rod is below zero");
    }

    void lay_axis() {
        const double front = plan_.nodus_height_mm - plan_.nodus_along_mm * tan(plan_.style_height);
        if (plan_.style_height < Angle::degrees(89.9) && front < -1e-6)
            refuse(fmt::format("the rod's axis would pass {:.1f} mm under the plate's face at the start of its seat",
                               -front));
        socket_ = plan_.style_height >= Angle::degrees(89.9) || front < 1e-6;
        const double past = plan_.bead_mm > 0 ? 1.5 * plan_.bead_mm : 0.0;
        if (!socket_) {
            // Evenly about the nodus, where the design gives no length.
            rod_.exposed_mm =
                plan_.exposed_mm > 0 ? plan_.exposed_mm : 2 * std::max(plan_.nodus_height_mm, 10 * plan_.diameter_mm);
            low_ = rod_.nodus - rod_.exposed_mm / 2 * along_;
            tip_ = rod_.nodus + rod_.exposed_mm / 2 * along_;
            if (low_.y_mm < plan_.diameter_mm)
                refuse("the rod's lower end would run into the plate: make it shorter");
            return;
        }
        if (plan_.style_height < k_least_for_socket)
            refuse(fmt::format("a rod only {} above the plate can't be drilled in: use an edge gnomon",
                               degrees_minutes(plan_.style_height)));
        const double to_nodus = plan_.nodus_height_mm / along_.y_mm, through = plan_.plate_thickness_mm / along_.y_mm;
        rod_.exposed_mm = plan_.exposed_mm > 0 ? plan_.exposed_mm : to_nodus + past;
        if (rod_.exposed_mm < to_nodus + plan_.bead_mm / 2 - 1e-9)
            refuse(fmt::format("the rod stands out {:.1f} mm, and its nodus is {:.1f} mm from the face along it",
                               rod_.exposed_mm, to_nodus));
        // Deeper than this, and short of right through, the drill's edge breaks out behind.
        const double blind = (plan_.plate_thickness_mm - 1.0 - plan_.diameter_mm / 2 * along_.x_mm) / along_.y_mm;
        const double wanted = 5 * plan_.diameter_mm;
        const double found = blind >= wanted || plan_.plate_thickness_mm == 0 ? wanted
                             : through <= 1.2 * wanted                        ? through
                                                                              : blind;
        rod_.socket_mm = plan_.socket_mm > 0 ? plan_.socket_mm : found;
        if (plan_.plate_thickness_mm > 0 && rod_.socket_mm > through + 1e-9)
            refuse(fmt::format("a socket {:.1f} mm deep leaves the plate, which the rod has crossed after {:.1f} mm",
                               rod_.socket_mm, through));
        through_ = plan_.plate_thickness_mm > 0 && rod_.socket_mm > through - 1e-6;
        if (plan_.plate_thickness_mm > 0 && !through_ && rod_.socket_mm > blind + 1e-9)
            refuse(fmt::format("a socket {:.1f} mm deep breaks out behind the plate: at most {:.1f} mm, or {:.1f} mm "
                               "to go right through",
                               rod_.socket_mm, std::max(blind, 0.0), through));
        const Point foot = rod_.nodus - to_nodus * along_;
        low_ = foot - rod_.socket_mm * along_;
        tip_ = foot + rod_.exposed_mm * along_;
        start_ = foot;
    }

    void lay_struts() {
        rod_.length_mm = rod_.exposed_mm + rod_.socket_mm;
        strut_diameter_ = plan_.strut_diameter_mm > 0 ? plan_.strut_diameter_mm : 0.7 * plan_.diameter_mm;
        if (!socket_) {
            add_strut(between(low_, tip_, 0.15).x_mm);
            add_strut(between(low_, tip_, 0.85).x_mm);
        } else if (plan_.strut_at_mm > 0) {
            add_strut(plan_.strut_at_mm);
        }
    }

    void add_strut(double x) {
        if (along_.x_mm < 0.1)
            refuse("a rod that stands nearly square on the plate takes no strut");
        Strut strut;
        strut.along_mm = x;
        strut.meets = {x, rod_.nodus.y_mm + (x - rod_.nodus.x_mm) * along_.y_mm / along_.x_mm};
        if (x < (socket_ ? start_ : low_).x_mm || x > tip_.x_mm - strut_diameter_)
            refuse(
                fmt::format("a strut {:.1f} mm along the substyle stands clear of the rod, which ends over {:.1f} mm",
                            x, tip_.x_mm));
        strut.above_mm = strut.meets.y_mm - plan_.diameter_mm / 2 / along_.x_mm;
        if (strut.above_mm < strut_diameter_)
            refuse(fmt::format(
                "a strut {:.1f} mm along the substyle has no height under the rod: move it towards the tip", x));
        strut.embedment_mm = plan_.strut_embedment_mm > 0   ? plan_.strut_embedment_mm
                             : plan_.plate_thickness_mm > 0 ? std::min(plan_.plate_thickness_mm, 4 * strut_diameter_)
                                                            : 3 * strut_diameter_;
        rod_.struts.push_back(strut);
    }

    /// Its head is filed to the slope of the rod's underside.
    [[nodiscard]] Path strut_outline(const Strut& strut) const {
        const double r = strut_diameter_ / 2, rise = r * along_.y_mm / along_.x_mm, x = strut.along_mm;
        return polyline({{x - r, -strut.embedment_mm},
                         {x + r, -strut.embedment_mm},
                         {x + r, strut.above_mm + rise},
                         {x - r, strut.above_mm - rise}},
                        true);
    }

    void add_guides(Drawing& drawing) const {
        const double reach = tip_.x_mm + 8, begin = std::min(low_.x_mm, 0.0) - 8;
        drawing.marks.push_back({Layer::guide, {polyline({{begin, 0}, {reach, 0}})}, k_thin_mm, false, "plate's face"});
        if (plan_.plate_thickness_mm > 0) {
            const double back = -plan_.plate_thickness_mm;
            drawing.marks.push_back(
                {Layer::guide, {polyline({{begin, back}, {reach, back}})}, k_thin_mm, false, "plate's back"});
        }
        drawing.marks.push_back({Layer::guide, {polyline({low_, tip_})}, k_thin_mm, false, "style"});
        drawing.marks.push_back(cross_mark(Layer::guide, rod_.nodus, 2.0, "nodus"));
        drawing.marks.push_back(
            dimension({rod_.nodus.x_mm, 0}, rod_.nodus, "dimension: nodus height " + say(rod_.nodus.y_mm)));
        for (const Strut& strut : rod_.struts)
            drawing.marks.push_back(dimension({strut.along_mm, 0}, {strut.along_mm, strut.above_mm},
                                              "dimension: strut " + say(strut.above_mm)));
        if (socket_) {
            const double r = 0.35 * rod_.exposed_mm;
            drawing.marks.push_back(
                {Layer::guide,
                 {Path{start_ + Point{r, 0}, {ArcTo{start_ + r * along_, start_, plan_.style_height}}, false}},
                 k_thin_mm,
                 false,
                 "style height " + degrees_minutes(plan_.style_height)});
        }
    }

    void add_plate_marks() {
        if (socket_)
            add_hole(rod_.part.plate_marks, {start_.x_mm, 0}, plan_.diameter_mm,
                     "hole for the rod, drilled at the style height along the substyle");
        for (std::size_t i = 0; i < rod_.struts.size(); ++i)
            add_hole(rod_.part.plate_marks, {rod_.struts[i].along_mm, 0}, strut_diameter_,
                     fmt::format("hole for strut {}", i + 1));
    }

    void add_particulars() {
        const auto add = [&](std::string name, std::string value) {
            rod_.part.particulars.emplace_back(std::move(name), std::move(value));
        };
        add("Style height", degrees_minutes(plan_.style_height));
        add("Rod, diameter", say(plan_.diameter_mm));
        add("Rod, whole length", say(rod_.length_mm));
        if (socket_) {
            add("Rod, face to tip", say(rod_.exposed_mm));
            add("Socket, along the rod", say(rod_.socket_mm));
            add("Socket's mouth on the face",
                fmt::format("{} × {}", say(plan_.diameter_mm / along_.y_mm), say(plan_.diameter_mm)));
            add("Nodus from the face, along the rod", say(plan_.nodus_height_mm / along_.y_mm));
        }
        add("Nodus above the face", say(plan_.nodus_height_mm));
        if (plan_.bead_mm > 0)
            add("Bead at the nodus, diameter", say(plan_.bead_mm));
        for (std::size_t i = 0; i < rod_.struts.size(); ++i) {
            const Strut& strut = rod_.struts[i];
            add(fmt::format("Strut {}", i + 1),
                fmt::format("{} along the substyle, {} diameter, {} above the face and {} in the plate",
                            say(strut.along_mm), say(strut_diameter_), say(strut.above_mm), say(strut.embedment_mm)));
        }
    }

    void add_words() {
        Part& part = rod_.part;
        part.notes.push_back("The rod's axis is the style: hour lines are read by the middle of its shadow.");
        if (socket_ && plan_.style_height < Angle::degrees(80))
            part.notes.push_back("Clamp the jig with its centre line on the substyle and its bore's mark on the "
                                 "centre, and stop the drill at the socket's depth.");
        if (through_ && plan_.style_height < Angle::degrees(89))
            part.notes.push_back(
                "The rod comes out behind the plate on the slant: file it flush, or leave it standing and pin it.");
        if (socket_ && plan_.style_height < k_skids)
            part.cautions.push_back("So flat a drill skids before it bites: spot-face the mouth with an end mill, or "
                                    "start with a short stiff drill in the jig; "
                                    "clamp plate and jig.");
        part.cautions.push_back(plan_.bead_mm > 0 ? "The rod's end stands where an eye can meet it: keep its tip "
                                                    "rounded, and put a guard where people pass close by."
                                                  : "The rod's tip stands where an eye can meet it: it is drawn "
                                                    "rounded; put a bead on it or a guard where people "
                                                    "pass close by.");
    }

    [[nodiscard]] std::string say(double mm) const { return say_length(mm, plan_.inches); }

    const RodPlan& plan_;
    RodGnomon rod_;
    Point along_, low_, tip_, start_;
    bool socket_ = true, through_ = false;
    double strut_diameter_ = 0.0;
};

} // namespace

RodGnomon rod_gnomon(const RodPlan& plan) {
    return Maker{plan}.made();
}

Drawing drilling_jig(Angle style_height, double diameter_mm, double width_mm, double guide_mm) {
    if (!(style_height >= k_least_for_socket) || style_height > Angle::degrees(90) || !(diameter_mm > 0))
        refuse("a drilling jig needs a style height of 5° to 90° and a drill's diameter");
    const Point along{cos(style_height), sin(style_height)}, square = left_of(along);
    const double wall = std::max(diameter_mm, 6.0), half = diameter_mm / 2 + wall; // beside the axis
    const double width = width_mm > 0 ? width_mm : std::max(4 * diameter_mm, 25.0);
    if (width < diameter_mm + 6)
        refuse(fmt::format("a drilling jig {:.1f} mm wide is too narrow for a drill of {:.1f} mm: at least {:.1f} mm",
                           width, diameter_mm, diameter_mm + 6));
    // Long enough that the block's lower upper corner still stands above the plate.
    const double guide =
        std::max(guide_mm > 0 ? guide_mm : std::max(5 * diameter_mm, 25.0), (half * along.x_mm + 6) / along.y_mm);
    const Point front = guide * along - half * square, back = guide * along + half * square;
    const double heel = -half / along.y_mm;
    Drawing jig{"drilling jig", {}};
    jig.marks.push_back(
        {Layer::guide, {polyline({{heel - 10, 0}, {front.x_mm + 10, 0}})}, k_thin_mm, false, "plate's face"});
    const double r = diameter_mm / 2;
    const auto bore = [&](double side) {
        return polyline({{side / along.y_mm * -1.0, 0}, guide * along + side * square});
    };
    jig.marks.push_back({Layer::drill, {bore(r), bore(-r)}, k_thin_mm, false, "bore"});
    jig.marks.push_back(
        {Layer::drill, {polyline({-8.0 * along, (guide + 12) * along})}, k_thin_mm, false, "drill's axis"});
    jig.marks.push_back({Layer::guide,
                         {Path{{0.4 * guide, 0}, {ArcTo{0.4 * guide * along, {}, style_height}}, false}},
                         k_thin_mm,
                         false,
                         "style height " + degrees_minutes(style_height)});
    jig.marks.push_back({Layer::cut,
                         {polyline({{heel, 0}, {front.x_mm, 0}, front, back}, true)},
                         k_cut_mm,
                         false,
                         "jig, from the side"});
    // The footprint stands below, x as above it.
    const double middle = -12 - width / 2;
    const Box foot{heel, middle - width / 2, front.x_mm, middle + width / 2};
    jig.marks.push_back({Layer::score,
                         {polyline({{heel, middle}, {front.x_mm, middle}})},
                         k_thin_mm,
                         false,
                         "centre line, on the substyle"});
    jig.marks.push_back(
        {Layer::score, {polyline({{0, foot.bottom_mm}, {0, foot.top_mm}})}, k_thin_mm, false, "across the centre"});
    // The bore's mouth is an ellipse: four cubics, each a quarter circle's, stretched.
    const Point start{r, 0};
    Path mouth{{r / along.y_mm, middle}, {}, true};
    const auto stretch = [&](Point p) { return Point{p.x_mm / along.y_mm, middle + p.y_mm}; };
    for (const CurveTo& c : curves_of(start, ArcTo{start, {}, Angle::radians(2 * std::numbers::pi)}))
        mouth.pieces.emplace_back(CurveTo{stretch(c.control_1), stretch(c.control_2), stretch(c.to)});
    jig.marks.push_back({Layer::guide, {mouth}, k_thin_mm, false, "bore's mouth"});
    jig.marks.push_back({Layer::cut, {rectangle(foot)}, k_cut_mm, false, "jig, footprint"});
    return jig;
}

} // namespace dialwright::layout
