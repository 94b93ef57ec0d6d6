// SPDX-License-Identifier: MIT
#include "cli/readings/adjust_readings.hpp"
#include "cli/design/file_text.hpp"
#include "cli/readings/clock_text.hpp"
#include "cli/readings/given.hpp"
#include "cli/readings/readings.hpp"
#include "cli/report/say.hpp"
#include "engine/survey/real_sun.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

namespace dialwright::cli {
namespace {

constexpr auto k_keys = std::to_array<KnownKey>({
    {"", "title"},
    {"", "day"},
    {"", "clock"},

    {"", "readings"},
    {"readings", "at"},
    {"readings", "reads"},

    {"", "checked"},
    {"checked", "turn"},
    {"checked", "top"},
    {"checked", "right"},
    {"checked", "style height"},
    {"checked", "style side"},
});

constexpr std::size_t k_most_readings = 500;
constexpr double k_checked_give_deg = 0.2;
constexpr std::chrono::minutes k_one_moment{30};
constexpr const char* k_reading_hint = "- {at: 2027-06-21 10:15, reads: 9:08}";

/// The Sun must reach the dial, or no dial of this design was read.
bool check_lit(const Section& reading, const DialPlan& plan, Instant at, const Zone& zone) {
    const std::array<Instant, 1> times{at};
    const SiteDirection sun = real_suns(plan.site, times).front().seen(LatitudeSines{plan.site.latitude});
    constexpr double k_far_behind = -0.14; // sine: a dial is not tilted by more than 8°
    if (sun.enu.dot(frame_of(plan.attitude).n) > k_far_behind)
        return true;
    reading.error("at", fmt::format("at {} the Sun was behind this dial", say_moment(zone, at)),
                  "check the time, the zone, and whether a.m. and p.m. are confused");
    return false;
}

void read_readings(AdjustFile& made, const Section& top, std::optional<std::chrono::year_month_day> day) {
    const DialPlan& plan = made.readings.plan;
    if (const Entry* entry = top.entry("readings"))
        made.at = entry->at;
    for (const Node* node : mappings_at(top, "readings", "reading", k_most_readings, k_reading_hint)) {
        const Section reading{*node, "readings", top.state()};
        const auto at = read_time(reading, "at", day, *made.zone);
        if (!reading.has("reads"))
            reading.missing("reads", fmt::format("write what the dial showed, as in \"{}\"", k_reading_hint));
        const auto reads =
            reading.read<double>("reads", std::function<Read<double>(std::string_view)>{
                                              [&](std::string_view text) { return hour_on(plan.hours.time, text); }});
        if (!at || !reads || !check_sun_up(reading, "at", plan.site, *at, *made.zone) ||
            !check_lit(reading, plan, *at, *made.zone))
            continue;
        made.readings.readings.push_back({*at, *reads});
        made.at_readings.push_back(node->at);
    }
}

void read_checked(AdjustFile& made, const Section& top) {
    const Section checked{top.entry("checked"), "checked", top.state()};
    if (!checked.given())
        return;
    const auto read = [&](std::string_view key) {
        return read_given(checked, key, given_angle_deg, k_checked_give_deg);
    };
    DialReadings& readings = made.readings;
    readings.turn = read("turn");
    readings.top = read("top");
    readings.right = read("right");
    readings.style_height = read("style height");
    readings.style_right = read("style side");
}

void check_enough(const AdjustFile& made, const Section& top) {
    const std::vector<DialReading>& readings = made.readings.readings;
    constexpr const char* k_more = "take six at least, best from morning to evening of one day in summer or winter";
    if (!top.has("readings")) {
        top.missing("readings", std::string{"give \"readings:\" with items like "} + k_reading_hint);
        return;
    }
    if (readings.size() < 3) {
        top.error("readings",
                  fmt::format("{} reading{} of a dial check nothing", readings.size(), readings.size() == 1 ? "" : "s"),
                  k_more);
        return;
    }
    const auto [first, last] =
        std::minmax_element(readings.begin(), readings.end(), [](const auto& a, const auto& b) { return a.at < b.at; });
    if (last->at - first->at < k_one_moment)
        top.error("readings", "all readings were taken within half an hour: as good as one moment", k_more);
}

} // namespace

std::span<const KnownKey> adjust_keys() {
    return k_keys;
}

AdjustReading read_adjust(std::string_view text, std::string file_name, const Commission& commission,
                          std::size_t face) {
    DocumentReading document = read_document(text, file_name, "start with \"readings:\"");
    ReadingState state;
    state.file = std::move(file_name);
    state.keys = k_keys;
    state.whose = "a dial's adjustment";
    state.errors = std::move(document.errors);
    AdjustFile made;
    made.file = state.file;
    made.zone = Zone::find(commission.design.place.zone);
    made.readings.plan = commission.plans[face].dial;
    if (document.root && made.zone) {
        const Section top{*document.root, "", state};
        if (const auto title = top.line("title", 200))
            made.title = *title;
        top.read_into(made.readings.clock_give_s, "clock", give_seconds);
        read_readings(made, top, read_day(top));
        read_checked(made, top);
        if (state.errors.empty())
            check_enough(made, top);
    }
    if (!state.errors.empty() || !made.zone)
        return {std::nullopt, first_errors(std::move(state.errors))};
    return {std::move(made), {}};
}

AdjustReading read_adjust_file(const std::filesystem::path& path, const Commission& commission, std::size_t face) {
    FileText file = read_text_file(path, "file of readings");
    if (!file.text)
        return {std::nullopt, std::move(file.errors)};
    return read_adjust(*file.text, path.string(), commission, face);
}

} // namespace dialwright::cli
