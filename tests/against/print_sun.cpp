// SPDX-License-Identifier: MIT
// Reads lines "INSTANT LATITUDE_DEG LONGITUDE_DEG" and prints what the engine says of each, for the scripts beside it:
// declination and Greenwich hour angle in degrees; rise, noon and set as seconds after the instant ("-" for none).
#include "engine/sun/solar_day.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>

#include <iostream>
#include <string>

using namespace dialwright;

int main() {
    std::string at;
    double latitude_deg = 0.0, longitude_deg = 0.0;
    while (std::cin >> at >> latitude_deg >> longitude_deg) {
        const auto instant = read_instant(at);
        if (!instant) {
            std::cerr << "not an instant: " << at << '\n';
            return 2;
        }
        const auto seconds_after = [&](Instant other) {
            return fmt::format("{:.3f}", std::chrono::duration<double>(other - *instant).count());
        };
        const ApparentSun sun = apparent_sun(*instant);
        const SolarDay day = solar_day({Angle::degrees(latitude_deg), Angle::degrees(longitude_deg)}, *instant);
        std::cout << fmt::format("{:.9f} {:.9f} {} {} {}\n", sun.declination.in_degrees(),
                                 sun.greenwich_hour_angle.in_degrees(), day.rise ? seconds_after(day.rise->at) : "-",
                                 seconds_after(day.noon), day.set ? seconds_after(day.set->at) : "-");
    }
}
