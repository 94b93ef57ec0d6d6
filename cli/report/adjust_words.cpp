// SPDX-License-Identifier: MIT
//
// From how a dial stands to what its fitter does. A dial is put right by the opposite of what is wrong with it: what is turned
// anticlockwise goes back clockwise, and what stands out too far at the top is packed out at the bottom.
#include "cli/report/adjust.hpp"
#include "cli/report/ranges.hpp"
#include "cli/report/say.hpp"
#include "engine/survey/real_sun.hpp"
#include "layout/plate/outline.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using Fault = AdjustAnswer::Fault;

struct EdgeNames {
    const char *top, *bottom, *right, *left;
};

class Words {
  public:
    Words(const Commission& commission, const DialPlan& plan)
        : level_{abs(plan.attitude.normal_altitude) > Angle::degrees(89.9)},
          box_{layout::Outline::of(commission.design.plate).box()}, inches_{commission.design.units == Units::inches} {}

    [[nodiscard]] AdjustWords of(const AdjustAnswer& answer, std::string if_so, bool style_asked) {
        AdjustWords words;
        words.if_so = std::move(if_so);
        open_too_ = answer.fault != Fault::level; // there, what is not told is what was supposed
        tilt(words, answer.top, names().top, names().bottom, box_.height_mm());
        tilt(words, answer.right, names().right, names().left, box_.width_mm());
        turn(words, answer.turn);
        constexpr double k_beyond_doubt = 0.01;
        words.proved_off = answer.right_chance < k_beyond_doubt;
        if (words.steps.empty() && words.proved_off)
            words.stands.push_back(
                "together these are off beyond doubt, though the readings don't tell which: try a level and a "
                "plumb line, and see below");
        if (style_asked && (answer.fault == Fault::style || answer.fault == Fault::both)) {
            style(words, answer.style_height, "stands too steep", "stands too flat", "lower", "raise");
            style(words, answer.style_right, "leans to the right of its substyle", "leans to the left of its substyle",
                  "bring back to the left", "bring back to the right");
        }
        return words;
    }

    [[nodiscard]] EdgeNames names() const {
        return level_ ? EdgeNames{"north", "south", "east", "west"} : EdgeNames{"top", "bottom", "right", "left"};
    }

  private:
    static bool proved(const Found& found) { return found.told && std::abs(found.value) > found.range; }

    /// An edge that stands out too far, or not far enough.
    void tilt(AdjustWords& words, const Found& found, const char* edge, const char* opposite, double across_mm) const {
        const char* out = level_ ? "high" : "out too far";
        if (!found.told) {
            if (open_too_)
                words.stands.push_back(fmt::format("{} edge: not told by these readings", edge));
            return;
        }
        if (!proved(found)) {
            words.stands.push_back(
                fmt::format("{} edge: right within {}", edge, say_arc(std::abs(found.value) + found.range)));
            return;
        }
        const char* standing = found.value > 0 ? edge : opposite;
        words.stands.push_back(
            fmt::format("{} edge {} by {} {}", standing, out, say_arc(found.value), say_give(found.range)));
        const auto rise_mm = [&](double degrees) { return across_mm * tan(Angle::degrees(degrees)); };
        words.steps.push_back(fmt::format("{} {} (± {}) {} the {} edge", level_ ? "wedge" : "pack",
                                          say_length(rise_mm(std::abs(found.value)), inches_),
                                          say_length(rise_mm(found.range), inches_), level_ ? "under" : "behind",
                                          found.value > 0 ? opposite : edge));
    }

    void turn(AdjustWords& words, const Found& found) const {
        const char* seen = level_ ? "as seen from above" : "as seen by who faces it";
        if (!found.told) {
            if (open_too_)
                words.stands.push_back("turn in its own plane: not told by these readings");
        } else if (!proved(found)) {
            words.stands.push_back(
                fmt::format("turn in its own plane: right within {}", say_arc(std::abs(found.value) + found.range)));
        } else {
            const bool anticlockwise = found.value > 0;
            words.stands.push_back(fmt::format("turned {} {} {} {}", say_arc(found.value), say_give(found.range),
                                               anticlockwise ? "anticlockwise" : "clockwise", seen));
            words.steps.push_back(fmt::format("turn it {}° ({}) {} {}", fixed(std::abs(found.value), 1),
                                              say_give(found.range), anticlockwise ? "clockwise" : "anticlockwise",
                                              seen));
        }
    }

    static void style(AdjustWords& words, const Found& found, const char* more, const char* less,
                      const char* back_from_more, const char* back_from_less) {
        if (!found.told || !proved(found))
            return;
        words.stands.push_back(fmt::format("the style {} by {} {}", found.value > 0 ? more : less, say_arc(found.value),
                                           say_give(found.range)));
        words.steps.push_back(fmt::format("{} the style by {}° ({}), by the gauge of the packet",
                                          found.value > 0 ? back_from_more : back_from_less,
                                          fixed(std::abs(found.value), 1), say_give(found.range)));
    }

    bool level_;
    layout::Box box_;
    bool inches_, open_too_ = true;
};

std::string supposed(Fault fault, bool several) {
    switch (fault) {
    case Fault::style:
        return "if the plate is fixed right but the style is not";
    case Fault::both:
        return "if both plate and style are off";
    case Fault::level:
        return "if a level and a plumb line find the plate right";
    case Fault::fixing:
        break;
    }
    return several ? "if the dial is as it was cut but fixed wrongly" : "";
}

void note_strays(const AdjustFile& file, const AdjustAnswer& answer, AdjustReport& report) {
    for (std::size_t i = 0; i < answer.stray.size(); ++i)
        if (answer.stray[i])
            report.notes.push_back(
                fmt::format("reading {} ({}, line {}) is {} min from what the others say and was left out: "
                            "look at it again",
                            i + 1, say_moment(*file.zone, file.readings.readings[i].at), file.at_readings[i].line,
                            fixed(std::abs(answer.off_min[i]), 0)));
}

/// What would tell the tilts that these readings leave open.
void note_what_helps(const AdjustFile& file, const AdjustAnswer& answer, AdjustReport& report) {
    if (answer.top.told && answer.right.told && answer.turn.told)
        return;
    std::vector<Instant> times;
    for (const DialReading& reading : file.readings.readings)
        times.push_back(reading.at);
    double most_deg = 0;
    for (const RealSun& sun : real_suns(file.readings.plan.site, times))
        most_deg = std::max(most_deg, std::abs(sun.place.declination.in_degrees()));
    constexpr double k_near_equinox_deg = 8;
    report.notes.push_back(
        std::string{"these readings can't tell turning from tilting: "} +
        (most_deg < k_near_equinox_deg
             ? "near an equinox a tilt that keeps the noon shadow right does not show. Try the plate with a level and "
               "a plumb line and say so under \"checked:\", or read again within two months of a solstice"
             : "read again early, at noon and late of one day, or try the plate with a level and a plumb line and say "
               "so under \"checked:\""));
}

void note_whole_hours(const DialAdjustment& found, AdjustReport& report) {
    std::vector<double> off = found.as_designed_min;
    std::nth_element(off.begin(), off.begin() + std::ptrdiff_t(off.size() / 2), off.end());
    const double middle = off[off.size() / 2];
    if (std::abs(std::abs(middle) - 60) < 6)
        report.notes.push_back(
            fmt::format("the dial reads about an hour too {}: was it read by its summer numerals, or is the "
                        "clock's zone another?",
                        middle > 0 ? "much" : "little"));
}

} // namespace

AdjustReport report_on(const AdjustFile& file, const DialAdjustment& found, const Commission& commission) {
    AdjustReport report;
    if (found.answers.empty() || found.too_scattered) {
        const std::string scatter = found.answers.empty() ? ""
                                                          : fmt::format(": they scatter by {} min",
                                                                        fixed(found.answers.front().scatter_min, 0));
        report.errors.push_back({file.file, file.at.line, file.at.column, "readings",
                                 "no way of fixing this dial would give these readings" + scatter,
                                 "check that the design is this dial's, the days and the zone, and that morning and "
                                 "evening are not confused"});
        return report;
    }
    Words words{commission, file.readings.plan};
    for (const AdjustAnswer& answer : found.answers)
        report.ways.push_back(words.of(answer, supposed(answer.fault, found.answers.size() > 1), found.style_asked));
    if (found.if_level)
        report.ways.push_back(words.of(*found.if_level, supposed(Fault::level, true), found.style_asked));
    const AdjustAnswer& first = found.answers.front();
    note_strays(file, first, report);
    note_whole_hours(found, report);
    if (found.answers.size() > 1)
        report.notes.push_back(
            "the readings fit in more than one way; try the style with the packet's gauge before anything is "
            "moved");
    note_what_helps(file, first, report);
    constexpr double k_far_deg = 20;
    if (first.turn.told && std::abs(first.turn.value) - first.turn.range > k_far_deg)
        report.notes.push_back(
            "a dial that is turned so far is seldom only fixed wrongly: is the design this dial's, and was it "
            "read by the right hours?");
    if (!found.checked)
        report.notes.push_back("so few readings do not check each other: take more, from morning to evening");
    return report;
}

} // namespace dialwright::cli
