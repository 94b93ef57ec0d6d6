// SPDX-License-Identifier: MIT
#include "layout/chart/accuracy_chart.hpp"

#include <catch2/catch.hpp>

#include <algorithm>

using namespace dialwright::layout;
using Catch::WithinAbs;

namespace {

AccuracyChartPlan plan_of(std::vector<AccuracyChartPlan::Hour> hours) {
    AccuracyChartPlan plan;
    plan.hours = std::move(hours);
    plan.seasons = {"June solstice", "equinox", "December solstice"};
    return plan;
}

std::vector<Box> bars(const Chart& chart, const std::string& season) {
    std::vector<Box> found;
    for (const Mark& mark : chart.marks)
        if (mark.name == season)
            found.push_back(bounds_of(mark.paths.front()));
    return found;
}

Box frame_of_chart(const Chart& chart) {
    const auto found =
        std::find_if(chart.marks.begin(), chart.marks.end(), [](const Mark& mark) { return mark.name == "frame"; });
    REQUIRE(found != chart.marks.end());
    return bounds_of(found->paths.front());
}

} // namespace

TEST_CASE("bars are as high as their minutes, and a season without light has none", "[layout][chart]") {
    const Chart chart = accuracy_chart(plan_of({{"XI", {2.0, 3.0, std::nullopt}}, {"XII", {1.0, 4.0, 2.0}}}));
    const Box frame = frame_of_chart(chart);
    const auto june = bars(chart, "June solstice"), december = bars(chart, "December solstice"),
               equinox = bars(chart, "equinox");
    REQUIRE(june.size() == 2);
    REQUIRE(equinox.size() == 2);
    CHECK(december.size() == 1);
    // The scale's top is the highest bar's whole minutes: 4.
    CHECK_THAT(equinox[1].height_mm(), WithinAbs(frame.height_mm(), 1e-9));
    CHECK_THAT(june[0].height_mm(), WithinAbs(frame.height_mm() / 2, 1e-9));
    CHECK(june[0].right_mm <= equinox[0].left_mm + 1e-9);
    CHECK(equinox[0].right_mm < june[1].left_mm);
    for (const Mark& mark : chart.marks)
        CHECK(chart.box.grown(0.2).contains(bounds_of(mark)));
}

TEST_CASE("what is over a quarter of an hour is cut off, and its minutes are written", "[layout][chart]") {
    const Chart chart = accuracy_chart(plan_of({{"VI", {40.0, 3.0, std::nullopt}}, {"VII", {200.0, 3.0, 5.0}}}));
    const Box frame = frame_of_chart(chart);
    for (const Box& bar : bars(chart, "June solstice"))
        CHECK_THAT(bar.top_mm, WithinAbs(frame.top_mm, 1e-9));
    const auto says = [&](const std::string& text) {
        return std::any_of(chart.notes.begin(), chart.notes.end(), [&](const Note& note) { return note.text == text; });
    };
    CHECK(says("40"));
    CHECK(says("over 99"));
}
