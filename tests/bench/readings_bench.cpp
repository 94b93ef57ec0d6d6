// SPDX-License-Identifier: MIT
// What it costs to work back from readings: a wall from twelve shadows, an old plate from twelve lines (directions, and two
// points each). In time of the processor. --quick: fewer repeats, to see that the program runs; it fails where a plate takes
// 0.2 s or more, but not under sanitizers, which take ten times as long.
#include "engine/style/style.hpp"
#include "engine/surface/plane.hpp"
#include "engine/survey/plate_restore.hpp"
#include "engine/survey/wall_survey.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <ctime>
#include <random>
#include <string_view>

using namespace dialwright;

namespace {

const Site k_site{Angle::degrees(52), Angle::degrees(-1.5)};
const Attitude k_wall{Angle::degrees(157), Angle::degrees(1)};

/// Least of several runs, milliseconds.
template <class Work>
double milliseconds(int repeats, Work&& work) {
    double least = 1e300;
    for (int i = 0; i < repeats; ++i) {
        const std::clock_t before = std::clock();
        work();
        least = std::min(least, 1000.0 * double(std::clock() - before) / CLOCKS_PER_SEC);
    }
    return least;
}

WallReadings twelve_shadows() {
    WallReadings readings;
    readings.site = k_site;
    std::vector<Instant> times;
    for (int i = 0; i < 12; ++i)
        times.push_back(*read_instant("2027-05-03T07:30:00Z") + i * std::chrono::minutes{35});
    const Plane plane{frame_of(k_wall), readings.peg_mm};
    for (const RealSun& sun : real_suns(k_site, times))
        if (const auto at = plane.shadow_of_nodus(sun.seen(LatitudeSines{k_site.latitude})))
            readings.shadows.push_back({sun.at, at->u_mm, -at->v_mm});
    return readings;
}

PlateReadings twelve_lines(bool points) {
    std::mt19937 random{1};
    std::normal_distribution<double> scatter{0.0, 0.3};
    const PlateFrame frame = frame_of(k_wall);
    const Style style = style_of(frame, 100, k_site.latitude);
    PlateReadings readings;
    for (int hour = 6; hour < 18; ++hour) {
        const Angle run = *hour_line_direction(frame, style, k_site.latitude, Angle::hours(hour - 12)) +
                          Angle::degrees(scatter(random));
        PlateLine line;
        line.hour_h = hour;
        if (!points)
            line.direction_deg = run.in_degrees();
        for (const double reach : {60.0, 240.0})
            if (points)
                line.points.push_back({15 + reach * sin(run), -20 + reach * cos(run)});
        readings.lines.push_back(line);
    }
    return readings;
}

} // namespace

int main(int count, char** arguments) {
    const bool quick = count > 1 && std::string_view{arguments[1]} == "--quick";
    const int repeats = quick ? 2 : 30;
    const WallReadings shadows = twelve_shadows();
    std::size_t answers = 0;
    fmt::print("survey, {} shadows: {:.2f} ms\n", shadows.shadows.size(),
               milliseconds(repeats, [&] { answers += survey_wall(shadows).answers.size(); }));
    double slowest = 0;
    for (const bool points : {false, true}) {
        const PlateReadings lines = twelve_lines(points);
        const double ms = milliseconds(repeats, [&] {
            if (const auto figure = figure_of(lines))
                answers += solutions_of(*figure, true, {Known{52, 0.05}, {}}).size();
        });
        fmt::print("restore, 12 lines by {}: {:.2f} ms\n", points ? "points" : "directions", ms);
        slowest = std::max(slowest, ms);
    }
#ifdef NDEBUG
    constexpr double k_most_ms = 200;
#else
    constexpr double k_most_ms = 20000;
#endif
    return answers > 0 && slowest < k_most_ms ? 0 : 1;
}
