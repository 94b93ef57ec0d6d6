// SPDX-License-Identifier: MIT
//
// Reads cases of readings that another program's Sun made, and prints what is found from them, for comparison with what
// was put in. A case is a line with its kind and figures, a line a reading, and "end".
//   dial LATITUDE LONGITUDE ZONE_MERIDIAN TIME NORMAL_AZIMUTH NORMAL_ALTITUDE CLOCK_GIVE | INSTANT READS_H
//   plate KIND(directions, centre or points) LATITUDE LATITUDE_GIVE | HOUR DIRECTION, or HOUR U V [U V]
//   wall LATITUDE LONGITUDE PEG PEG_GIVE FOOT_GIVE LEVEL_GIVE CLOCK_GIVE | INSTANT RIGHT DOWN
#include "engine/survey/dial_adjust.hpp"
#include "engine/survey/plate_restore.hpp"
#include "engine/survey/wall_survey.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>

#include <iostream>
#include <sstream>
#include <stdexcept>
#include <string>

namespace {

using namespace dialwright;

Instant instant_in(std::istream& in) {
    std::string text;
    in >> text;
    const auto instant = read_instant(text);
    if (!instant)
        throw std::runtime_error("not an instant: " + text);
    return *instant;
}

/// Each line up to "end".
template <class Take>
void take_readings(Take&& take) {
    for (std::string line; std::getline(std::cin, line) && line != "end";) {
        std::istringstream in{line};
        take(in);
        if (!in)
            throw std::runtime_error("not a reading: " + line);
    }
}

void print(const Found& found) {
    fmt::print(" {:.6f} {:.6f} {}", found.value, found.range, found.told ? 1 : 0);
}

void wall(std::istream& in) {
    WallReadings readings;
    double latitude = 0, longitude = 0, level_give = 0;
    in >> latitude >> longitude >> readings.peg_mm >> readings.peg_give_mm >> readings.foot_give_mm >> level_give >>
        readings.clock_give_s;
    readings.site = {Angle::degrees(latitude), Angle::degrees(longitude)};
    readings.level_give = Angle::degrees(level_give);
    take_readings([&](std::istream& line) {
        PegShadow shadow;
        shadow.at = instant_in(line);
        line >> shadow.right_mm >> shadow.down_mm;
        readings.shadows.push_back(shadow);
    });
    const WallSurvey survey = survey_wall(readings);
    fmt::print("wall {} {} {:.3f} {:.3f}", survey.checked ? 1 : 0, survey.too_scattered ? 1 : 0, survey.clock_told_s,
               survey.level_told_deg);
    for (const WallAnswer& answer : survey.answers) {
        fmt::print(" | {}", int(answer.fault));
        for (const Found& found : {answer.facing_deg, answer.lean_deg, answer.clock_s, answer.level_deg})
            print(found);
        fmt::print(" ");
        for (const bool stray : answer.stray)
            fmt::print("{}", stray ? 1 : 0);
    }
    fmt::print("\n");
}

void print(const AdjustAnswer& answer) {
    fmt::print(" | {}", int(answer.fault));
    for (const Found& found :
         {answer.turn, answer.top, answer.right, answer.style_height, answer.style_right, answer.clock_s})
        print(found);
    fmt::print(" ");
    for (const bool stray : answer.stray)
        fmt::print("{}", stray ? 1 : 0);
}

void dial(std::istream& in, const MeanYear& year) {
    DialReadings readings;
    double latitude = 0, longitude = 0, meridian = 0, azimuth = 0, altitude = 0;
    std::string time;
    in >> latitude >> longitude >> meridian >> time >> azimuth >> altitude >> readings.clock_give_s;
    readings.plan.site = {Angle::degrees(latitude), Angle::degrees(longitude)};
    readings.plan.zone_meridian = Angle::degrees(meridian);
    readings.plan.attitude = {Angle::degrees(azimuth), Angle::degrees(altitude)};
    readings.plan.nodus_height_mm = 100;
    readings.plan.hours.time = time == "zone" ? HourTime::zone : HourTime::sun;
    take_readings([&](std::istream& line) {
        DialReading one;
        one.at = instant_in(line);
        line >> one.reads_h;
        readings.readings.push_back(one);
    });
    const DialAdjustment made = adjust_dial(readings, year);
    fmt::print("dial {} {} {:.4f}", made.checked ? 1 : 0, made.if_level ? 1 : 0, made.style_told_deg);
    for (const AdjustAnswer& answer : made.answers)
        print(answer);
    if (made.if_level)
        print(*made.if_level);
    fmt::print("\n");
}

void plate(std::istream& in) {
    PlateReadings readings;
    PlateFacts facts;
    std::string kind;
    double latitude = 0, give = 0;
    in >> kind >> latitude >> give;
    facts.latitude_deg = Known{latitude, give};
    readings.origin_is_centre = kind == "centre";
    take_readings([&](std::istream& line) {
        PlateLine one;
        double hour = 0;
        line >> hour;
        one.hour_h = hour;
        if (kind == "directions") {
            double direction = 0;
            line >> direction;
            one.direction_deg = direction;
        } else {
            for (int i = 0; i < (kind == "points" ? 2 : 1); ++i) {
                PlatePoint p;
                line >> p.u_mm >> p.v_mm;
                one.points.push_back(p);
            }
        }
        readings.lines.push_back(one);
    });
    const auto figure = figure_of(readings);
    if (!figure) {
        fmt::print("plate 0 0\n");
        return;
    }
    fmt::print("plate 1 {} {:.6f} {:.6f}", figure->fit.checked() ? 1 : 0, figure->style_height_deg.value,
               figure->style_height_deg.range);
    for (const PlateSolution& one : solutions_of(*figure, true, facts)) {
        fmt::print(" | {}", int(one.fact));
        for (const Found& found : {one.latitude_deg, one.facing_deg.value_or(Found{0, 0, false}), one.lean_deg, one.ahead_min})
            print(found);
        fmt::print(" ");
        for (const bool stray : figure->stray)
            fmt::print("{}", stray ? 1 : 0);
    }
    fmt::print("\n");
}

} // namespace

int main() {
    try {
        const MeanYear year{2025, 2044};
        for (std::string line; std::getline(std::cin, line);) {
            std::istringstream in{line};
            std::string kind;
            in >> kind;
            if (kind == "wall")
                wall(in);
            else if (kind == "dial")
                dial(in, year);
            else if (kind == "plate")
                plate(in);
            else
                throw std::runtime_error("no such kind: " + line);
        }
    } catch (const std::exception& trouble) {
        fmt::print(stderr, "{}\n", trouble.what());
        return 2;
    }
}
