// SPDX-License-Identifier: MIT
#include "cli/report/survey.hpp"
#include "cli/design/quantity.hpp"
#include "cli/report/json_text.hpp"
#include "cli/report/lines_of_text.hpp"
#include "cli/report/ranges.hpp"
#include "cli/report/say.hpp"
#include "engine/time/instant_text.hpp"

#include <algorithm>
#include <array>
#include <cmath>

namespace dialwright::cli {
namespace {

using Fault = WallAnswer::Fault;

/// A facing that is known no better than the first spoils a dial by several minutes; than the second, it is no survey.
constexpr double k_good_facing_deg = 1.0, k_least_facing_deg = 5.0, k_one_moment_deg = 2.0;

/// The clock may have been off by an hour of summer time or of the zone.
bool whole_hour(const WallAnswer& answer) {
    const double hours = answer.clock_s.value / 3600, range = answer.clock_s.range / 3600;
    return answer.fault == Fault::clock && std::abs(hours) > 0.75 &&
           std::abs(hours - std::round(hours)) < std::max(range, 0.02);
}

std::string next_words(const SurveyFile& file, const WallSurvey& survey) {
    if (!survey.next)
        return "take more readings, with the Sun as far to the other side of the wall as it comes";
    return fmt::format(
        "one more shadow would help most at about {} on such a day: the facing would then be known to {}",
        say_clock(*file.zone, survey.next->at), say_give(survey.next->facing_range_deg));
}

/// A figure beside the shadows was held to be wrong.
bool of_figure(Fault fault) {
    return fault == Fault::bearing || fault == Fault::lean || fault == Fault::grazing;
}

void judge_faults(const SurveyFile& file, const WallSurvey& survey, SurveyVerdict& verdict) {
    const WallAnswer& first = survey.answers.front();
    if (survey.answers.size() > 1) {
        std::string ways;
        for (const WallAnswer& answer : survey.answers)
            ways += (ways.empty() ? "either " : ", or ") + fault_words(answer);
        ways += ". Such readings alone can't tell which, and the facing depends on it. ";
        if (file.readings.shadows.empty())
            ways += "Measure each again, and time the shadow of a peg, six times over a day";
        else
            ways += "Try the clock against a time signal and the board against a plumb line; ";
        if (!file.readings.shadows.empty() && file.readings.lean_deg)
            ways += "measure again what was measured beside the shadows";
        else if (!file.readings.shadows.empty())
            ways += "a lean measured with plumb line and rule (\"lean: 0° 10' back ± 0.2°\") may tell them apart";
        verdict.notes.push_back(std::move(ways));
    } else if (of_figure(first.fault)) {
        verdict.notes.push_back(fault_words(first) + ", if all else is right. It was left out; measure it again");
    } else if (first.fault != Fault::none) {
        verdict.notes.push_back(fault_words(first) +
                                ". The facing allows for it; put it right and take another reading to be sure");
    }
    if (std::any_of(survey.answers.begin(), survey.answers.end(), whole_hour))
        verdict.notes.push_back(
            "a clock a whole hour off is likelier than a crooked board: was summer time forgotten, or "
            "the zone another?");
}

void judge_strays(const SurveyFile& file, const WallAnswer& answer, SurveyVerdict& verdict) {
    for (std::size_t i = 0; i < answer.stray.size(); ++i)
        if (answer.stray[i])
            verdict.notes.push_back(fmt::format("shadow {} ({}, line {}) lies {} mm from where the others put it and "
                                                "was left out: look at its figures again",
                                                i + 1, say_moment(*file.zone, file.readings.shadows[i].at),
                                                file.at_shadows[i].line,
                                                fixed(std::hypot(answer.off_right_mm[i], answer.off_down_mm[i]), 1)));
}

void fail(const SurveyFile& file, SurveyVerdict& verdict, std::string message, std::string hint) {
    verdict.errors.push_back({file.file, file.at.line, file.at.column, "shadows", std::move(message), std::move(hint)});
}

const char* fault_name(Fault fault) {
    static constexpr std::array<const char*, 6> k_names{"none", "clock", "level", "bearing", "lean", "grazing"};
    return k_names[std::size_t(fault)];
}

void say_answer(LinesOfText& text, const WallAnswer& answer, bool several) {
    if (several)
        text.line("If {}:", fault_words(answer));
    text.line("  facing       {}   ({} from north through east)", say_facing(answer.facing_deg),
              say_decimal(answer.facing_deg));
    if (answer.lean_deg.told)
        text.line("  lean         {}   ({})", say_lean(answer.lean_deg), say_decimal(answer.lean_deg));
    else
        text.line("  lean         not told by these readings: measure it with a plumb line and a rule");
}

} // namespace

std::string fault_words(const WallAnswer& answer) {
    if (answer.fault == Fault::clock)
        return fmt::format("the clock was {} {} (± {})", say_seconds(answer.clock_s.value),
                           answer.clock_s.value > 0 ? "slow" : "fast", say_seconds(answer.clock_s.range));
    if (answer.fault == Fault::level)
        return fmt::format("the board was out of plumb by {} {}, its top to the {}", say_arc(answer.level_deg.value),
                           say_give(answer.level_deg.range), answer.level_deg.value > 0 ? "right" : "left");
    if (answer.fault == Fault::bearing)
        return fmt::format("the compass bearing was off by {}", say_arc(answer.figure_off_deg));
    if (answer.fault == Fault::lean)
        return fmt::format("the lean was measured wrong by {}", say_arc(answer.figure_off_deg));
    if (answer.fault == Fault::grazing)
        return fmt::format("grazing moment {} was wrong, with the Sun {} from the wall's plane", answer.grazing + 1,
                           say_arc(answer.figure_off_deg));
    return "all was as good as its ± says";
}

ShadowTable shadow_table(const SurveyFile& file, const WallAnswer& answer) {
    using layout::Align;
    ShadowTable table;
    table.columns = {{"", Align::right},          {"clock"},
                     {"right mm", Align::right},  {"down mm", Align::right},
                     {"off right", Align::right}, {"off down", Align::right}};
    for (std::size_t i = 0; i < file.readings.shadows.size(); ++i) {
        const PegShadow& shadow = file.readings.shadows[i];
        table.rows.push_back({std::to_string(i + 1), say_moment(*file.zone, shadow.at), fixed(shadow.right_mm, 1),
                              fixed(shadow.down_mm, 1), say_signed(answer.off_right_mm[i], 1),
                              say_signed(answer.off_down_mm[i], 1)});
        if (answer.stray[i])
            table.rows.back().push_back("left out");
    }
    return table;
}

SurveyVerdict verdict_on(const SurveyFile& file, const WallSurvey& survey) {
    SurveyVerdict verdict;
    const bool shadows = !file.readings.shadows.empty();
    if (shadows && survey.sun_span < Angle::degrees(k_one_moment_deg)) {
        fail(file, verdict,
             fmt::format("all shadows were taken within {} of the Sun's way: as good as one moment",
                         say_arc(survey.sun_span.in_degrees())),
             "take two more at least, each an hour or more from the others");
        return verdict;
    }
    if (survey.answers.empty() || survey.too_scattered) {
        std::string hint = "check the peg's length, the place, the zone, that morning and afternoon are not confused, "
                           "and that all were taken on this wall";
        if (survey.swap == WallSurvey::Swap::left_for_right)
            hint = "with left and right exchanged they fit: right is to the right of who faces the wall, left is below "
                   "zero";
        if (survey.swap == WallSurvey::Swap::up_for_down)
            hint = "with up and down exchanged they fit: down counts downwards, what lies above the peg is below zero";
        const std::string scatter = survey.answers.empty() ? std::string{}
                                                           : fmt::format(": they scatter by {} mm",
                                                                         fixed(survey.answers.front().scatter_mm, 0));
        fail(file, verdict, "these readings fit no wall" + scatter, hint);
        return verdict;
    }
    const WallAnswer& answer = survey.answers.front();
    if (answer.facing_deg.range > 45 || !answer.facing_deg.told) {
        fail(file, verdict, "these readings leave the facing open", next_words(file, survey));
        return verdict;
    }
    judge_strays(file, answer, verdict);
    judge_faults(file, survey, verdict);
    if (answer.facing_deg.range > k_good_facing_deg)
        verdict.notes.push_back(
            fmt::format("{} is not near enough to cut a dial by; {}", say_give(answer.facing_deg.range),
                        shadows ? next_words(file, survey) : "time the shadow of a peg, six times over a day"));
    if (file.by_compass)
        verdict.notes.push_back(
            "a compass is pulled by iron in walls, gutters, rails and cars, and by the pocket it came "
            "from: hold it a few metres off the wall, at several places, and trust shadows over it");
    // Facing and lean take two figures.
    if (const WallReadings& given = file.readings;
        !shadows && given.grazings.size() + (given.bearing_deg ? 1 : 0) + (given.lean_deg ? 1 : 0) < 3)
        verdict.notes.push_back("nothing here checks these figures against each other");
    verdict.good_to_cut = survey.answers.size() == 1 && answer.facing_deg.range <= k_least_facing_deg;
    return verdict;
}

std::vector<std::pair<std::string, std::string>> dial_values(const WallSurvey& survey) {
    const WallAnswer& answer = survey.answers.front();
    std::vector<std::pair<std::string, std::string>> values{
        {"facing", bearing_text(to_minutes(answer.facing_deg.value))}};
    if (answer.lean_deg.told)
        values.emplace_back("lean", lean_text(to_minutes(answer.lean_deg.value)));
    return values;
}

std::string survey_text(const SurveyFile& file, const WallSurvey& survey, const SurveyVerdict& verdict) {
    LinesOfText text;
    text.line("{}", file.title.empty() ? file.file : file.title);
    text.line("  place        {}, {}", say_latitude(file.place.site.latitude),
              say_longitude(file.place.site.longitude));
    const bool several = survey.answers.size() > 1;
    for (const WallAnswer& answer : survey.answers)
        say_answer(text, answer, several);
    const WallAnswer& first = survey.answers.front();
    text.line("  every ± here holds 19 times in 20");
    if (!file.readings.shadows.empty()) {
        const ShadowTable table = shadow_table(file, first);
        text.gap();
        text.add(text_table(table.columns, table.rows, 2));
    }
    if (survey.checked) {
        text.gap();
        text.line("  scatter      {} mm either way beside the peg", fixed(first.scatter_mm, 1));
        if (!several && first.fault == Fault::none) {
            text.line("  clock        within its ± {} as far as these readings tell; they would show it from {} off",
                      say_seconds(file.readings.clock_give_s), say_seconds(survey.clock_told_s));
            text.line("  board        plumb within its {} as far as they tell; they would show it from {} off",
                      say_give(file.readings.level_give.in_degrees()), say_arc(survey.level_told_deg));
        }
        text.line("  next         {}", next_words(file, survey));
    }
    if (!verdict.good_to_cut)
        return text.taken();
    text.gap();
    text.line("For the design file, under \"dial:\"");
    for (const auto& [key, value] : dial_values(survey))
        text.line("  {}: {}", key, value);
    return text.taken();
}

std::string survey_json(const SurveyFile& file, const WallSurvey& survey, const SurveyVerdict& verdict) {
    Json out{{"format", 1}, {"title", file.title}};
    out["site"] = {{"latitude_deg", json_number(file.place.site.latitude.in_degrees())},
                   {"longitude_deg", json_number(file.place.site.longitude.in_degrees())},
                   {"zone", file.place.zone}};
    out["good_to_cut"] = verdict.good_to_cut;
    out["checked"] = survey.checked;
    Json answers = Json::array();
    for (const WallAnswer& answer : survey.answers) {
        Json one{{"fault", fault_name(answer.fault)},
                 {"figure_off_deg", of_figure(answer.fault) ? json_number(answer.figure_off_deg) : Json{}},
                 {"facing_deg", json_found(answer.facing_deg)},
                 {"lean_deg", json_found(answer.lean_deg)},
                 {"clock_slow_s", json_found(answer.clock_s)},
                 {"board_turned_deg", json_found(answer.level_deg)},
                 {"scatter_mm", survey.checked ? json_number(answer.scatter_mm) : Json{}}};
        Json shadows = Json::array();
        for (std::size_t i = 0; i < answer.stray.size(); ++i)
            shadows.push_back({{"at", write_instant(file.readings.shadows[i].at)},
                               {"off_right_mm", json_number(answer.off_right_mm[i])},
                               {"off_down_mm", json_number(answer.off_down_mm[i])},
                               {"left_out", bool(answer.stray[i])}});
        one["shadows"] = std::move(shadows);
        answers.push_back(std::move(one));
    }
    out["answers"] = std::move(answers);
    out["shows_from"] = {{"clock_s", survey.checked ? json_number(survey.clock_told_s) : Json{}},
                         {"board_deg", survey.checked ? json_number(survey.level_told_deg) : Json{}}};
    out["next"] = survey.next ? Json{{"at", write_instant(survey.next->at)},
                                     {"facing_range_deg", json_number(survey.next->facing_range_deg)}}
                              : Json{};
    out["notes"] = verdict.notes;
    return json_text(out);
}

} // namespace dialwright::cli
