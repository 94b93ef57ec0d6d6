// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/part.hpp"

#include <stdexcept>

namespace dialwright::layout {

/// A gnomon, a joint or a gauge that can't be made as it is asked for. The text is for the maker.
struct GnomonError : std::invalid_argument {
    using std::invalid_argument::invalid_argument;
};

/// How an edge gnomon is fixed to its plate. One set of numbers gives the gnomon's foot and the plate's slots and holes.
enum class FootKind {
    plain,         ///< stands on the face; screws from behind the plate into its foot, or solder
    tenons,        ///< pass through slots in the plate
    hooked_tenons, ///< of sheet: pass through, slide along the substyle and lock under the plate; a key fills the slots
    flange,        ///< stands on a strip that is screwed to the face on both sides
    halving        ///< of sheet: gnomon and plate are slotted half the foot's length each and slide into each other
};

/// Lengths in millimetres; 0 means: found from the foot and the plate.
struct JointOptions {
    FootKind kind = FootKind::tenons;
    int count = 2;         ///< of tenons, or of places for screws along the foot
    double tenon_mm = 0.0; ///< length of each along the substyle
    double proud_mm = 0.0; ///< how far tenons stand out behind the plate, to be riveted or wedged
    double fit_mm = 0.2;   ///< how much wider and longer a slot is than what goes into it, both sides together
    double hole_mm = 0.0;  ///< diameter of the screw holes; 0: none
    double flange_width_mm = 0.0, flange_thickness_mm = 3.0;
    double hook_mm = 0.0;   ///< how far hooks reach under the plate
    double keel_mm = 0.0;   ///< height of hooks, or of the strip under the plate in a halving
    double behind_mm = 0.0; ///< halving: from the start of the foot back along the substyle to the plate's edge
};

struct Span {
    double from_mm = 0.0, to_mm = 0.0; ///< along the substyle from the start of the foot
    [[nodiscard]] double length_mm() const { return to_mm - from_mm; }
};

/// The joint in numbers. Seat frame: x along the substyle from the start of the gnomon's foot, y to its left.
struct Joint {
    JointOptions options; ///< nothing left open
    double foot_mm = 0.0, thickness_mm = 0.0, plate_thickness_mm = 0.0;
    std::vector<Span> tenons; ///< of the gnomon; of hooked ones the stem
    std::vector<Span> slots;  ///< of the plate, with the fit
    std::vector<Point> holes; ///< of the plate
    /// The gnomon's lowest edge above the face.
    [[nodiscard]] double base_mm() const {
        return options.kind == FootKind::flange ? options.flange_thickness_mm : 0.0;
    }
    [[nodiscard]] double slot_width_mm() const { return thickness_mm + options.fit_mm; }
};

/// The middles of `count` places that share the foot evenly: where fixing holes and tenons stand.
[[nodiscard]] std::vector<double> stations(double foot_mm, int count);

/// @param thickness_mm  of the gnomon's sheet; 0 where it is not known, which a plain foot bears with
/// @throws GnomonError  with a message for the maker: tenons longer than the foot, a fit that is wider than
///                                the slot's material, holes wider than the edge that they go into, …
[[nodiscard]] Joint joint_of(const JointOptions& options, double foot_mm, double thickness_mm,
                             double plate_thickness_mm);

/// The foot's outline from its start to its end, tenons and all: corners of the gnomon, side view, in order.
/// @param start_mm  where the gnomon begins along the substyle
[[nodiscard]] std::vector<Point> foot_corners(const Joint& joint, double start_mm);

/// What the plate gets: slots on the cut layer, holes on the drill layer, the foot's outline lightly scored. Seat frame.
[[nodiscard]] std::vector<Mark> plate_marks_of(const Joint& joint);

/// The flange from above, seat frame: outline, where the gnomon stands, holes.
[[nodiscard]] Drawing flange_of(const Joint& joint);

} // namespace dialwright::layout
