// SPDX-License-Identifier: MIT
//
// Reads lines of "instant latitude longitude normal_azimuth normal_altitude" (degrees) and prints for each the shadow
// "u v" in millimetres of a nodus 100 mm above the plate, or "unlit". For comparison with another program's Sun.
#include "engine/sun/apparent_sun.hpp"
#include "engine/surface/plane.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>

#include <iostream>
#include <string>

int main() {
    using namespace dialwright;
    std::string at;
    double latitude = 0, longitude = 0, azimuth = 0, altitude = 0;
    while (std::cin >> at >> latitude >> longitude >> azimuth >> altitude) {
        const auto instant = read_instant(at);
        if (!instant) {
            fmt::print(stderr, "not an instant: {}\n", at);
            return 2;
        }
        const Plane plane{frame_of({Angle::degrees(azimuth), Angle::degrees(altitude)}), 100};
        const SkyPlace sky = sky_place(apparent_sun(*instant), Angle::degrees(longitude));
        const auto shadow = plane.shadow_of_nodus(to_site(sky, Angle::degrees(latitude)));
        if (shadow)
            fmt::print("{:.9f} {:.9f}\n", shadow->u_mm, shadow->v_mm);
        else
            fmt::print("unlit\n");
    }
}
