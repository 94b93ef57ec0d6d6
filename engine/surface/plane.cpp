// SPDX-License-Identifier: MIT
#include "engine/surface/plane.hpp"

#include <cmath>
#include <stdexcept>

namespace dialwright {

Plane::Plane(const PlateFrame& frame, double nodus_height_mm) : frame_{frame}, nodus_height_mm_{nodus_height_mm} {
    if (!(std::isfinite(nodus_height_mm) && nodus_height_mm > 0))
        throw std::invalid_argument("the nodus must stand above the plate");
}

} // namespace dialwright
