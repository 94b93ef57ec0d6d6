// SPDX-License-Identifier: MIT
// Reads lines "ZONE INSTANT" and prints the offset from UTC in seconds and the abbreviation, for the script beside it.
#include "engine/time/instant_text.hpp"
#include "engine/time/zone.hpp"

#include <iostream>
#include <string>

int main() {
    std::string name, at;
    while (std::cin >> name >> at) {
        const auto zone = dialwright::Zone::find(name);
        const auto instant = dialwright::read_instant(at);
        if (!zone || !instant) {
            std::cerr << "cannot read: " << name << ' ' << at << '\n';
            return 2;
        }
        const dialwright::ZoneOffset offset = zone->at(*instant);
        std::cout << offset.from_utc.count() << ' ' << offset.abbreviation << '\n';
    }
}
