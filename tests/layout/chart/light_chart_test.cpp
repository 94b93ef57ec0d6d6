// SPDX-License-Identifier: MIT
#include "layout/chart/light_chart.hpp"

#include <catch2/catch.hpp>

#include <algorithm>

using namespace dialwright::layout;
using Catch::WithinAbs;

namespace {

const Mark& named(const Chart& chart, const std::string& name) {
    const auto found =
        std::find_if(chart.marks.begin(), chart.marks.end(), [&](const Mark& mark) { return mark.name == name; });
    REQUIRE(found != chart.marks.end());
    return *found;
}

LightChartPlan year_of(double from_h, double to_h) {
    LightChartPlan plan;
    plan.days.assign(365, {});
    for (LightChartDay& day : plan.days) {
        day.behind = {{from_h - 2, to_h + 2}};
        day.lit = {{from_h, to_h}};
    }
    return plan;
}

} // namespace

TEST_CASE("light stands at its hours, across the whole year, in its tone", "[layout][chart]") {
    const LightChartPlan plan = year_of(6, 18);
    const Chart chart = light_chart(plan);
    const Box frame = bounds_of(named(chart, "frame").paths.front());
    const Mark& lit = named(chart, "lit");
    CHECK(lit.filled);
    CHECK(lit.layer == Layer::score);
    CHECK(lit.paths.size() == 365);
    Box all;
    for (const Path& path : lit.paths)
        all.add(bounds_of(path));
    CHECK_THAT(all.left_mm, WithinAbs(frame.left_mm, 1e-9));
    CHECK_THAT(all.right_mm, WithinAbs(frame.right_mm, 1e-9));
    CHECK_THAT(all.bottom_mm, WithinAbs(frame.bottom_mm + frame.height_mm() / 4, 1e-9));
    CHECK_THAT(all.top_mm, WithinAbs(frame.bottom_mm + 3 * frame.height_mm() / 4, 1e-9));
    // The Sun's noon lies over the light, and nothing leaves the chart's box.
    const Box noon = bounds_of(named(chart, "noon").paths.front());
    CHECK_THAT(noon.middle().y_mm, WithinAbs(frame.middle().y_mm, 1e-9));
    for (const Mark& mark : chart.marks)
        CHECK(chart.box.grown(0.2).contains(bounds_of(mark)));
    // Without a skyline there is no shade to draw.
    CHECK(std::none_of(chart.marks.begin(), chart.marks.end(),
                       [](const Mark& mark) { return mark.name == "shade of the skyline"; }));
}

TEST_CASE("summer time's hours stand on the right alone where the zone has it", "[layout][chart]") {
    LightChartPlan plan = year_of(6, 18);
    const std::size_t without = light_chart(plan).notes.size();
    plan.summer_shift_h = 1;
    const Chart chart = light_chart(plan);
    CHECK(chart.notes.size() == without + 10); // nine hours, and the words for them
    CHECK(std::any_of(chart.notes.begin(), chart.notes.end(), [](const Note& note) { return note.text == "13"; }));
    CHECK(std::none_of(chart.notes.begin(), chart.notes.end(), [](const Note& note) { return note.text == "25"; }));
}
