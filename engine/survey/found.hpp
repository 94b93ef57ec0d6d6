// SPDX-License-Identifier: MIT
#pragma once

namespace dialwright {

/// An angle or a time with the range that holds 19 times in 20.
struct Found {
    double value = 0.0;
    double range = 0.0;
    bool told = true; ///< the readings say something of it beyond what was known beforehand
};

} // namespace dialwright
