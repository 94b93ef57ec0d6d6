// SPDX-License-Identifier: MIT
#include "cli/readings/readings.hpp"
#include "cli/readings/clock_text.hpp"
#include "cli/report/ranges.hpp"
#include "cli/report/say.hpp"
#include "engine/survey/real_sun.hpp"

#include <fmt/format.h>

#include <array>
#include <functional>
#include <stdexcept>

namespace dialwright::cli {

std::optional<std::chrono::year_month_day> read_day(const Section& top) {
    return top.read("day", calendar_date);
}

std::optional<Instant> read_time(const Section& reading, std::string_view key,
                                 std::optional<std::chrono::year_month_day> day, const Zone& zone) {
    if (!reading.has(key)) {
        reading.missing(key, "say when, as in \"at: 2027-05-03 10:12:30\"");
        return std::nullopt;
    }
    return reading.read<Instant>(key, std::function<Read<Instant>(std::string_view)>{
                                          [&](std::string_view text) { return clock_instant(text, day, zone); }});
}

bool check_sun_up(const Section& reading, std::string_view key, const Site& site, Instant at, const Zone& zone) {
    constexpr std::chrono::hours k_half_day{12};
    // Half a day on or back, whichever is of the same date.
    const auto of_day = [&](Instant when) { return std::chrono::floor<std::chrono::days>(zone.to_clock(when)); };
    const Instant other = of_day(at + k_half_day) == of_day(at) ? at + k_half_day : at - k_half_day;
    const std::array<Instant, 2> times{at, other};
    const std::vector<RealSun> suns = real_suns(site, times);
    const LatitudeSines latitude{site.latitude};
    const auto altitude = [&](std::size_t i) { return suns[i].seen(latitude).altitude(); };
    if (altitude(0) > Angle{})
        return true;
    const std::string hint = altitude(1) > Angle{}
                                 ? fmt::format("a.m. and p.m. confused? At {} it was up", say_moment(zone, other))
                                 : std::string{"check the day, the time and the zone"};
    reading.error(key,
                  fmt::format("at {} the Sun was {} below the horizon there", say_moment(zone, at),
                              say_arc(altitude(0).in_degrees())),
                  hint);
    return false;
}

std::optional<Known> read_given(const Section& section, std::string_view key,
                                Read<Known> (*reader)(std::string_view, double), double give) {
    return section.read<Known>(
        key, std::function<Read<Known>(std::string_view)>{[&](std::string_view text) { return reader(text, give); }});
}

std::vector<const Node*> mappings_at(const Section& top, std::string_view key, std::string_view item, std::size_t most,
                                     const std::string& hint) {
    std::vector<const Node*> found;
    for (const Node& node : list_at(top, key, item, 1, most, hint)) {
        if (node.kind == Node::Kind::mapping)
            found.push_back(&node);
        else if (node.kind != Node::Kind::refused)
            top.state().error(node.at, std::string{key},
                              fmt::format("{} stands where a {} is wanted", kind_name(node), item),
                              "write it as in " + hint);
    }
    return found;
}

} // namespace dialwright::cli
