// SPDX-License-Identifier: MIT
//
// Reads plans, one a line: "latitude longitude zone_meridian normal_azimuth normal_altitude horizon" (degrees), and prints
// every line of the families beside the Sun's own hours, "family value u,v u,v …" in millimetres for a nodus 100 mm above
// the plate, one piece of a line in each row; "end" after each plan. The mean year is that of 2025 to 2044.
// A first argument N > 1 divides the straight pieces of two points into N parts, for more points to compare.
#include "engine/dial/delineation.hpp"

#include <fmt/format.h>

#include <cstdlib>
#include <iostream>

namespace {

using namespace dialwright;

const char* name_of(Family family) {
    switch (family) {
    case Family::clock_hour:
        return "clock";
    case Family::since_sunrise:
        return "since_sunrise";
    case Family::since_sunset:
        return "since_sunset";
    case Family::to_sunset:
        return "to_sunset";
    case Family::unequal_hour:
        return "unequal";
    case Family::altitude:
        return "altitude";
    case Family::azimuth:
        return "azimuth";
    default:
        return nullptr;
    }
}

void print_piece(const PlatePolyline& piece, int parts) {
    const int divided = piece.size() == 2 ? parts : 1;
    for (std::size_t k = 1; k < piece.size(); ++k)
        for (int i = k == 1 ? 0 : 1; i <= divided; ++i) {
            const double t = double(i) / divided;
            fmt::print(" {:.9f},{:.9f}", piece[k - 1].u_mm + t * (piece[k].u_mm - piece[k - 1].u_mm),
                       piece[k - 1].v_mm + t * (piece[k].v_mm - piece[k - 1].v_mm));
        }
    fmt::print("\n");
}

DialPlan asked(DialPlan plan) {
    plan.nodus_height_mm = 100;
    for (const HourTime time :
         {HourTime::clock, HourTime::since_sunrise, HourTime::since_sunset, HourTime::to_sunset, HourTime::unequal}) {
        HourPlan hours;
        hours.time = time;
        plan.more_hours.push_back(hours);
    }
    for (int degrees = 10; degrees < 90; degrees += 10)
        plan.altitudes.push_back(Angle::degrees(degrees));
    for (int degrees = 0; degrees < 360; degrees += 15)
        plan.azimuths.push_back(Angle::degrees(degrees));
    return plan;
}

} // namespace

int main(int count, char** arguments) {
    const int parts = count > 1 ? std::max(1, std::atoi(arguments[1])) : 1;
    const MeanYear year{2025, 2044};
    double latitude = 0, longitude = 0, meridian = 0, azimuth = 0, altitude = 0, horizon = 0;
    while (std::cin >> latitude >> longitude >> meridian >> azimuth >> altitude >> horizon) {
        DialPlan plan;
        plan.site = {Angle::degrees(latitude), Angle::degrees(longitude)};
        plan.zone_meridian = Angle::degrees(meridian);
        plan.attitude = {Angle::degrees(azimuth), Angle::degrees(altitude)};
        plan.horizon = Angle::degrees(horizon);
        for (const DialLine& line : delineate(asked(plan), year, {-400, -400, 400, 400}).lines)
            if (const char* name = name_of(line.family))
                for (const PlatePolyline& piece : line.pieces) {
                    const bool level = line.family == Family::altitude || line.family == Family::azimuth;
                    fmt::print("{} {}", name, level ? line.level.in_degrees() : line.time_h);
                    print_piece(piece, parts);
                }
        fmt::print("end\n");
    }
}
