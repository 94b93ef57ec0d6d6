// SPDX-License-Identifier: MIT
// What a year of light on a plate costs, found exactly, beside asking at each of its minutes. Asked: under 100 ms.
// --quick: fewer repeats, to see that the program runs.
#include "engine/light/plate_light.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <string_view>

using namespace dialwright;
using namespace std::chrono;

namespace {

double g_sink = 0.0; // keeps the optimizer from leaving the work out

template <class Work>
double fastest_ms(int runs, const Work& work) {
    double best = 1e300;
    for (int i = 0; i < runs; ++i) {
        const auto start = steady_clock::now();
        work();
        best = std::min(best, duration<double, std::milli>(steady_clock::now() - start).count());
    }
    return best;
}

/// Hills and roofs all round, `count` marks.
Skyline skyline_of(int count) {
    std::vector<Skyline::Mark> marks;
    for (int i = 0; i < count; ++i)
        marks.push_back({Angle::degrees(360.0 * i / count), Angle::degrees(4.0 + 3.0 * ((i * 7) % 5))});
    return Skyline{marks};
}

} // namespace

int main(int count, char** arguments) {
    const bool quick = count > 1 && std::string_view{arguments[1]} == "--quick";
    const int runs = quick ? 1 : 9;
    const Site site{Angle::degrees(52.2), Angle::degrees(-1.67)};
    const PlateFrame wall = frame_of({Angle::degrees(157), Angle{}});
    const Instant from = sys_days{2027y / 1 / 1}, to = sys_days{2028y / 1 / 1};
    const auto year = [&](const Skyline& skyline) {
        const Almanac almanac{from, to};
        const PlateLight light = plate_light(site, wall, skyline, almanac, from, to);
        g_sink += duration<double>(time_within(light.lit, from, to)).count();
    };
    for (const auto& [name, skyline] : {std::pair{"level horizon", Skyline{}},
                                        {"skyline of 12 marks", skyline_of(12)},
                                        {"skyline of 360 marks", skyline_of(360)}})
        fmt::print("a year's light, {:<24}{:>8.1f} ms\n", name, fastest_ms(runs, [&] { year(skyline); }));
    const Skyline skyline = skyline_of(12);
    fmt::print("asked at each minute of the year       {:>8.1f} ms\n", fastest_ms(runs, [&] {
                   const Almanac almanac{from, to};
                   for (Instant at = from; at < to; at += minutes{1}) {
                       const SiteDirection sun = to_site(sky_place(almanac.at(at), site.longitude), site.latitude);
                       g_sink += sun.enu.dot(wall.n) > 0 && skyline.sees(sun) ? 1 : 0;
                   }
               }));
    return g_sink > 0.0 ? 0 : 1;
}
