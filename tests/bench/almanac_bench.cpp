// SPDX-License-Identifier: MIT
// What the almanac and the mean year cost, as ratios to single places measured in the same run.
// --quick: fewer repeats, to see that the program runs.
#include "engine/sun/almanac.hpp"
#include "engine/sun/mean_year.hpp"
#include "engine/sun/solar_day.hpp"
#include "engine/time/instant_text.hpp"
#include "engine/time/zone.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <random>
#include <string>
#include <string_view>
#include <vector>

using namespace dialwright;
using namespace std::chrono;

namespace {

double g_sink = 0.0; // keeps the optimizer from leaving the work out

/// Milliseconds of the fastest of some runs: the one least disturbed.
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

void row(std::string_view what, double ms, std::string_view remark) {
    fmt::print("{:<46}{:>10.3f} ms   {}\n", what, ms, remark);
}

std::vector<Instant> instants_of_year(int count) {
    std::mt19937_64 random{2026};
    const Instant first = sys_days{2026y / 1 / 1};
    std::uniform_int_distribution<std::int64_t> any{0, microseconds{days{365}}.count() - 1};
    std::vector<Instant> instants;
    for (int i = 0; i < count; ++i)
        instants.push_back(first + microseconds{any(random)});
    return instants;
}

} // namespace

int main(int count, char** arguments) {
    const bool quick = count > 1 && std::string_view{arguments[1]} == "--quick";
    const int runs = quick ? 1 : 15;
    const int places = quick ? 50 : 1000;

    const double place_ms =
        fastest_ms(runs,
                   [&] {
                       for (int i = 0; i < places; ++i)
                           g_sink +=
                               apparent_sun(Instant{sys_days{2026y / 1 / 1}} + hours{8 * i}).declination.in_radians();
                   }) /
        places;
    const double hours_ms = 366 * 24 * place_ms;
    row("one place of the Sun, from the theory", place_ms, "");
    row("366 x 24 of them", hours_ms, "");

    const double almanac_ms =
        fastest_ms(runs, [] { g_sink += Almanac::of_year(2028).at(sys_days{2028y / 5 / 1}).declination.in_radians(); });
    row("a year's almanac", almanac_ms,
        fmt::format("1/{:.1f} of the above (asked: 1/20 or less)", hours_ms / almanac_ms));

    const double read_ms = fastest_ms(runs, [almanac = Almanac::of_year(2028)] {
        for (int i = 0; i < 366 * 24; ++i)
            g_sink += almanac.at(almanac.first() + hours{i}).declination.in_radians();
    });
    row("366 x 24 places from it", read_ms,
        fmt::format("with the almanac 1/{:.1f}", hours_ms / (almanac_ms + read_ms)));

    const double mean_ms = fastest_ms(runs, [] { g_sink += MeanYear{2021, 2040}.obliquity().in_radians(); });
    row("the mean over twenty years", mean_ms, fmt::format("{:.2f} almanacs (asked: 2 or less)", mean_ms / almanac_ms));

    const int many = quick ? 1000 : 100'000;
    const std::vector<Instant> instants = instants_of_year(many);
    row(fmt::format("{} instants of one year", many),
        fastest_ms(runs, [&] { g_sink += apparent_suns(instants).back().declination.in_radians(); }), "");

    std::vector<std::string> texts;
    for (const Instant instant : instants)
        texts.push_back(write_instant(instant));
    row(fmt::format("reading {} instants", many),
        fastest_ms(runs,
                   [&] {
                       for (const std::string& text : texts)
                           g_sink += static_cast<double>(read_instant(text)->time_since_epoch().count());
                   }),
        "");

    const auto start = steady_clock::now();
    const Zone zone = Zone::find("Europe/London").value();
    g_sink += zone.meridian(2026).in_radians();
    row("the first zone looked up", duration<double, std::milli>(steady_clock::now() - start).count(), "");

    const Site site{Angle::degrees(54.2), Angle::degrees(-2.5)};
    row("rise, noon and set of a day",
        fastest_ms(runs, [&] { g_sink += solar_day(site, 2026y / 6 / 21, zone).noon_altitude.in_radians(); }), "");
    return g_sink > 0.0 ? 0 : 1;
}
