// SPDX-License-Identifier: MIT
// What delineating a declining wall costs, family by family and with every family at once, and how the cost grows with
// the lines drawn: the last column stays near 1 if it grows in proportion. In time of the processor; the ratios of one
// run count. --quick: fewer repeats, to see that the program runs.
#include "engine/dial/delineation.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <ctime>
#include <functional>
#include <string_view>

using namespace dialwright;

namespace {

constexpr PlateBox k_wall{-300, -400, 300, 200};

DialPlan bare_wall() {
    DialPlan plan;
    plan.site = {Angle::degrees(52), Angle::degrees(-1.5)};
    plan.attitude = {Angle::degrees(157), Angle{}}; // S 23° E
    plan.nodus_height_mm = 100;
    plan.gnomon_thickness_mm = 5;
    plan.hours.first_h = plan.hours.last_h = 12;
    return plan;
}

HourPlan hours(HourTime time, int divide_min = 60) {
    HourPlan made;
    made.time = time;
    made.divide_min = divide_min;
    return made;
}

void add_sun_hours(DialPlan& plan) {
    plan.hours = hours(HourTime::sun, 15);
}
void add_altitudes(DialPlan& plan) {
    for (int degrees = 10; degrees < 90; degrees += 10)
        plan.altitudes.push_back(Angle::degrees(degrees));
}
void add_azimuths(DialPlan& plan) {
    for (int degrees = 0; degrees < 360; degrees += 15)
        plan.azimuths.push_back(Angle::degrees(degrees));
}
void add_dates(DialPlan& plan) {
    for (const double degrees : {-23.44, -20.15, -11.47, 0.0, 11.47, 20.15, 23.44})
        plan.dates.lines.push_back({"date", Angle::degrees(degrees)});
}
void add_noons(DialPlan& plan) {
    for (const double degrees : {-70.0, -20.0, 10.0, 35.0, 60.0})
        plan.noons.push_back({"place", Angle::degrees(degrees)});
}
auto more(HourTime time, int divide_min = 60) {
    return [=](DialPlan& plan) { plan.more_hours.push_back(hours(time, divide_min)); };
}

struct Cost {
    double ms = 0;
    std::size_t lines = 0, points = 0;
};

Cost cost_of(const DialPlan& plan, const MeanYear& year, int runs) {
    Cost cost{1e300};
    for (int i = 0; i < runs; ++i) {
        const std::clock_t start = std::clock();
        const Delineation dial = delineate(plan, year, k_wall);
        cost.ms = std::min(cost.ms, 1000.0 * double(std::clock() - start) / CLOCKS_PER_SEC);
        cost.lines = dial.lines.size();
        cost.points = 0;
        for (const DialLine& line : dial.lines)
            for (const PlatePolyline& piece : line.pieces)
                cost.points += piece.size();
    }
    return cost;
}

double row(std::string_view what, const Cost& cost, double compared_us) {
    const double each_us = 1000 * cost.ms / double(std::max<std::size_t>(cost.lines, 1));
    fmt::print("{:<34}{:>8.3f} ms {:>6} lines {:>7} points {:>9.1f} us a line", what, cost.ms, cost.lines, cost.points,
               each_us);
    fmt::print("{}\n", compared_us > 0 ? fmt::format("   x {:.2f}", each_us / compared_us) : "");
    return each_us;
}

} // namespace

int main(int count, char** arguments) {
    const int runs = count > 1 && std::string_view{arguments[1]} == "--quick" ? 1 : 60;
    const MeanYear year{2025, 2044};
    struct Part {
        std::string_view name;
        std::function<void(DialPlan&)> add;
    };
    const Part parts[] = {{"Sun hours, 15 min", add_sun_hours},
                          {"clock curves, hourly", more(HourTime::clock)},
                          {"since sunrise", more(HourTime::since_sunrise)},
                          {"to sunset", more(HourTime::to_sunset)},
                          {"unequal hours", more(HourTime::unequal)},
                          {"altitudes, 10°", add_altitudes},
                          {"azimuths, 15°", add_azimuths},
                          {"7 dates", add_dates},
                          {"5 noons", add_noons}};
    DialPlan all = bare_wall();
    all.horizon = Angle::degrees(-50.0 / 60);
    double sum_ms = 0;
    for (const Part& part : parts) {
        DialPlan alone = bare_wall();
        alone.horizon = all.horizon;
        part.add(alone);
        part.add(all);
        const Cost cost = cost_of(alone, year, runs);
        sum_ms += cost.ms;
        row(part.name, cost, 0);
    }
    const Cost together = cost_of(all, year, runs);
    row("every family at once", together, 0);
    fmt::print("their sum, one by one: {:.3f} ms; together x {:.2f} of it\n\n", sum_ms, together.ms / sum_ms);

    for (const HourTime time : {HourTime::clock, HourTime::unequal, HourTime::sun}) {
        double first_us = 0;
        for (const int divide_min : {60, 30, 15, 5, 1}) {
            DialPlan plan = bare_wall();
            plan.horizon = all.horizon;
            plan.hours = hours(time, divide_min);
            const std::string_view name = time == HourTime::clock ? "clock" : time == HourTime::sun ? "Sun" : "unequal";
            const double each_us = row(fmt::format("{} hours, each {} min", name, divide_min),
                                       cost_of(plan, year, std::max(1, runs / 6)), first_us);
            first_us = first_us > 0 ? first_us : each_us;
        }
    }
    return 0;
}
