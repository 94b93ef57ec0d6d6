// SPDX-License-Identifier: MIT
#pragma once

#include "layout/gnomon/joint.hpp"

namespace dialwright::layout {

/// A pierced disc whose hole is the nodus: it lies parallel to the plate, so its spot of light is as wide as the hole and
/// the Sun's half-shadow round it. The hole is 1/60 of its height, from 2 mm to 12 mm; the disc is nine holes wide, so that
/// the spot stands in shade of its own.
/// Common practice, no source.
/// @param nodus_height_mm  of the hole's middle above the plate; > 0
/// @throws GnomonError
[[nodiscard]] Part disc_of(double nodus_height_mm, bool inches);

} // namespace dialwright::layout
