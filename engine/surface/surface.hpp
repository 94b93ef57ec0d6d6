// SPDX-License-Identifier: MIT
#pragma once

#include "engine/surface/plate_frame.hpp"

#include <concepts>
#include <optional>

namespace dialwright {

/// What anything that carries a dial must answer: how squarely the Sun lights it (> 0 where lit), and where the shadow
/// of its nodus falls, in flat millimetres of the work (a band unrolled). `shifted_mm` moves the nodus along the
/// work, for the two edges of a gnomon that has thickness. `straight_paths` says that a great circle of the sky throws
/// a straight line.
template <class S>
concept Surface = requires(const S& surface, const SiteDirection& sun, PlatePoint shifted_mm) {
    { surface.light(sun) } -> std::convertible_to<double>;
    { surface.shadow_of_nodus(sun, shifted_mm) } -> std::same_as<std::optional<PlatePoint>>;
    { S::straight_paths } -> std::convertible_to<bool>;
};

} // namespace dialwright
