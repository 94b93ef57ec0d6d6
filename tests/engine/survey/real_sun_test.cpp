// SPDX-License-Identifier: MIT
#include "engine/survey/real_sun.hpp"
#include "engine/time/instant_text.hpp"

#include <catch2/catch.hpp>

using Catch::Matchers::WithinAbs;
using namespace dialwright;

TEST_CASE("A real Sun some minutes later is the Sun of that minute, lifted by the air", "[survey]") {
    const Site site{Angle::degrees(54), Angle::degrees(-2)};
    const LatitudeSines latitude{site.latitude};
    for (const char* at : {"2027-03-21T08:00:00Z", "2027-12-21T12:30:00Z"}) {
        const std::vector<Instant> times{*read_instant(at), *read_instant(at) + std::chrono::minutes{40}};
        const auto suns = real_suns(site, times);
        const SiteDirection moved = suns[0].seen(latitude, 2400), there = suns[1].seen(latitude);
        CHECK_THAT((moved.enu - there.enu).norm(), WithinAbs(0, 2e-6)); // 0.4″
        const SiteDirection bare = to_site(suns[0].place, latitude);
        CHECK(suns[0].seen(latitude).altitude() > bare.altitude());
    }
}
