// SPDX-License-Identifier: MIT
#pragma once

#include "engine/sun/apparent_sun.hpp"

#include <span>
#include <vector>

namespace dialwright {

/// A table of the Sun's places, for many instants of one stretch of time. A place from it costs 0.1 µs.
class Almanac {
  public:
    /// Covers first to last, both included. Builds one place for every two days and a few beyond either end.
    /// @throws std::invalid_argument  last is before first, or either lies outside the years of apparent_sun()
    Almanac(Instant first, Instant last);

    /// The whole of one calendar year, UTC.
    [[nodiscard]] static Almanac of_year(int year);

    /// @param utc  between first and last (asserted)
    /// Accuracy against apparent_sun(): 0.004″ in declination and 0.005″ in hour angle; within two days of a leap
    /// second 0.02″ and 0.046″. Test: tests/engine/sun/almanac_test.cpp
    [[nodiscard]] ApparentSun at(Instant utc) const;

    [[nodiscard]] Instant first() const { return first_; }
    [[nodiscard]] Instant last() const { return last_; }

  private:
    struct Node {
        double declination; // radians
        double equation_of_time;
    };
    Instant first_;
    Instant last_;
    std::vector<Node> nodes_; // two days apart; first_ is the third
};

/// The Sun at many instants, in their order, over any years: from a table where a year has many of them, singly where
/// it has few. Accuracy: as Almanac.
/// @throws std::invalid_argument  an instant lies outside the years of apparent_sun()
[[nodiscard]] std::vector<ApparentSun> apparent_suns(std::span<const Instant> instants);

} // namespace dialwright
