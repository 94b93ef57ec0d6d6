// SPDX-License-Identifier: MIT
#include "engine/sun/equal_altitudes.hpp"

namespace dialwright {
namespace {

using namespace std::chrono;

constexpr microseconds k_close_enough{5'000};
constexpr Angle k_overhead = Angle::degrees(89);

} // namespace

std::optional<EqualAltitudes> equal_altitudes(const Site& site, Instant noon, minutes before_noon,
                                              const Almanac& almanac) {
    const auto towards = [&](Instant at) { return to_site(sky_place(almanac.at(at), site.longitude), site.latitude); };
    EqualAltitudes pair;
    pair.before = noon - before_noon;
    const SiteDirection first = towards(pair.before);
    pair.altitude = first.altitude();
    if (!(pair.altitude > Angle{}) || towards(noon).altitude() > k_overhead)
        return std::nullopt;
    // Down from noon to the lowest the Sun comes in the half day after it the altitude runs one way, but for seconds at noon.
    Instant above = noon, below = noon + hours{11} + minutes{50};
    if (!(towards(above).altitude() > pair.altitude) || towards(below).altitude() > pair.altitude)
        return std::nullopt;
    while (below - above > k_close_enough) {
        const Instant middle = above + (below - above) / 2;
        (towards(middle).altitude() > pair.altitude ? above : below) = middle;
    }
    pair.after = above + (below - above) / 2;
    pair.before_azimuth = first.azimuth();
    pair.after_azimuth = towards(pair.after).azimuth();
    const Angle middle = pair.before_azimuth + (pair.after_azimuth - pair.before_azimuth).positive_turn() / 2.0;
    // North or south: the Sun passes on one side of overhead or on the other.
    const Angle off = middle.signed_turn();
    pair.middle_off = abs(off) < Angle::degrees(90) ? off : (middle - Angle::degrees(180)).signed_turn();
    return pair;
}

} // namespace dialwright
