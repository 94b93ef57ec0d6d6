// SPDX-License-Identifier: MIT
#include "engine/survey/real_sun.hpp"

#include "engine/sun/almanac.hpp"

namespace dialwright {

std::vector<RealSun> real_suns(const Site& site, std::span<const Instant> instants) {
    constexpr std::chrono::minutes k_apart{30};
    std::vector<Instant> asked;
    asked.reserve(instants.size() * 3);
    for (const Instant at : instants)
        for (const Instant when : {at - k_apart, at, at + k_apart})
            asked.push_back(when);
    const std::vector<ApparentSun> suns = apparent_suns(asked);
    std::vector<RealSun> real;
    real.reserve(instants.size());
    for (std::size_t i = 0; i < instants.size(); ++i) {
        const SkyPlace before = sky_place(suns[3 * i], site.longitude);
        const SkyPlace after = sky_place(suns[3 * i + 2], site.longitude);
        const double seconds = 2 * std::chrono::duration<double>(k_apart).count();
        real.push_back({instants[i], sky_place(suns[3 * i + 1], site.longitude),
                        (after.hour_angle - before.hour_angle).signed_turn().in_radians() / seconds,
                        (after.declination - before.declination).in_radians() / seconds});
    }
    return real;
}

} // namespace dialwright
