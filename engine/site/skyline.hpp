// SPDX-License-Identifier: MIT
#pragma once

#include "engine/site/site.hpp"

#include <vector>

namespace dialwright {

/// What hides the Sun at the site: the flat horizon, or hills, roofs and trees as altitudes by azimuth.
class Skyline {
  public:
    struct Mark {
        Angle azimuth, altitude;
    };

    /// The flat horizon.
    Skyline() = default;
    /// @param marks  azimuths rising within one turn; between two marks the skyline runs straight in azimuth and
    ///               altitude, and round from the last to the first
    /// @throws std::invalid_argument  fewer than two marks, azimuths that do not rise, an altitude outside 0° to 90°
    explicit Skyline(std::vector<Mark> marks);

    [[nodiscard]] bool flat() const { return marks_.empty(); }
    [[nodiscard]] Angle altitude_at(Angle azimuth) const;
    /// Sine of its highest mark's altitude: a Sun above this is seen.
    [[nodiscard]] double highest_sine() const { return highest_sine_; }
    /// True where the Sun stands above the skyline. No refraction. A Sun on the skyline itself, as at every moment of the
    /// hour 0 from sunrise, is not seen, however its sines round.
    [[nodiscard]] bool sees(const SiteDirection& sun) const {
        return sun.enu.z() > highest_sine_ + k_on_skyline || clearance(sun) > k_on_skyline;
    }
    /// Sine of the Sun's altitude less that of the skyline beneath it: > 0 where the Sun is seen. No refraction.
    [[nodiscard]] double clearance(const SiteDirection& sun) const {
        return flat() ? sun.enu.z() : sun.enu.z() - sin(altitude_at(sun.azimuth()));
    }

  private:
    static constexpr double k_on_skyline = 1e-12; // sine
    std::vector<Mark> marks_;
    double highest_sine_ = 0.0;
};

} // namespace dialwright
