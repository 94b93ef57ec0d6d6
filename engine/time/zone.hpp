// SPDX-License-Identifier: MIT
#pragma once

#include "engine/base/angle.hpp"
#include "engine/time/instant.hpp"

#include <chrono>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace date {
class time_zone;
}

namespace dialwright {

/// A reading of the clocks in some zone, to the microsecond: what a watch and a calendar show.
using ClockReading = std::chrono::local_time<std::chrono::microseconds>;

/// How a zone's clocks stand to UTC at one instant. Clock = UTC + from_utc; standard time = clock − summer_time.
struct ZoneOffset {
    std::chrono::seconds from_utc{0};
    std::chrono::seconds summer_time{0}; ///< never negative: the smaller offset of the year is standard time
    std::string abbreviation;            ///< such as "BST"; "+03" where a zone has no letters of its own

    [[nodiscard]] std::chrono::seconds standard() const { return from_utc - summer_time; }
};

/// The instants at which a zone's clocks show a given reading.
struct LocalReading {
    enum class Kind {
        unique, ///< once: first == second
        twice,  ///< the clocks went back: first is the earlier instant (still summer time), second the later
        never,  ///< the clocks went forward over it: first == second == the instant of the change
    };
    Kind kind = Kind::unique;
    Instant first;
    Instant second;
};

/// A time zone of the system's tz database. Cheap to copy; the database is read once, when the first zone is looked up.
/// The database flags as "summer time" a winter offset where a law calls the summer's time standard (Europe/Dublin,
/// Africa/Casablanca). Here the smaller of the two offsets is standard time always: it is the one by which the
/// trade places a dial's zone meridian.
/// Years beyond the tables of the database, which end with 2037, follow the last rule that it holds.
class Zone {
  public:
    /// Nothing if the database has no zone of this name (exact spelling, such as "Europe/London").
    [[nodiscard]] static std::optional<Zone> find(std::string_view tz_name);

    [[nodiscard]] const std::string& name() const;

    [[nodiscard]] ZoneOffset at(Instant utc) const;

    /// When the zone's clocks show `reading`.
    [[nodiscard]] LocalReading to_utc(ClockReading reading) const;
    [[nodiscard]] ClockReading to_clock(Instant utc) const;

    /// The meridian of the zone's standard time, east positive: 15° for each hour ahead of UTC.
    /// If the standard time changes within the year, the one that holds for most of it.
    [[nodiscard]] Angle meridian(int year) const;

    /// Every change of the clocks in [first, last), in order: the first instant of the new offset.
    [[nodiscard]] std::vector<Instant> changes(Instant first, Instant last) const;

  private:
    explicit Zone(const date::time_zone* zone) : zone_{zone} {}
    const date::time_zone* zone_;
};

/// The names in the database that are nearest to `wrong` by edit distance, upper and lower case alike, best first;
/// a city alone ("london") finds its zone. At most `n`.
[[nodiscard]] std::vector<std::string> nearest_zone_names(std::string_view wrong, int n);

} // namespace dialwright
