// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/pin.hpp"
#include "layout/gnomon/rod_gnomon.hpp"
#include "layout/gnomon/seat.hpp"

#include <optional>
#include <vector>

namespace dialwright::layout {

/// The plan of a face's rod; its diameter is the gnomon's thickness.
[[nodiscard]] RodPlan rod_plan(const GnomonSeat& seat, const FaceSpec& spec);

/// The plan of a face's pin: square on the plate, plumb, or the style of a face that it stands square on.
/// @return nothing for a disc, or where the pin has no diameter yet
[[nodiscard]] std::optional<PinPlan> pin_plan(const PlateFrame& frame, double nodus_height_mm, const FaceSpec& spec);

struct GnomonPartsOptions {
    bool inches = false;
    double beyond_mm =
        0.0; ///< of a pin: how far it stands out behind the plate, where the other face is a dial as well
};

/// All that is made for a face's gnomon beside its plate: the gnomon itself with its flange or its drilling jig, the gauge
/// for the style's height, and on a plate whose substyle is not its noon line the gauge for that.
/// @param plan  as the face was drawn from
/// @return a rod or a pin of no thickness has no part of its own
/// @throws GnomonError, LetteringError  with a message for the maker
[[nodiscard]] std::vector<Part> gnomon_parts(const DialPlan& plan, const Face& face, const FaceSpec& spec,
                                             const GnomonPartsOptions& options);

} // namespace dialwright::layout
