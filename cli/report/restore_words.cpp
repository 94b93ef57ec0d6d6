// SPDX-License-Identifier: MIT
//
// Which of the plates that the lines allow is likeliest: the one of a fact that is known, else the one in which most facts that it
// did not suppose come out right by themselves (the latitude of the place, its noon, an upright or level plate).
#include "cli/report/ranges.hpp"
#include "cli/report/restore.hpp"
#include "cli/report/say.hpp"
#include "engine/time/zone.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::cli {
namespace {

using Fact = PlateSolution::Fact;

/// Nominal deviations: lines that scatter more are those of no such dial.
constexpr double k_scattered = 10;
/// A figure that is known no better says nothing when it comes out right.
constexpr double k_telling_deg = 3, k_telling_min = 20;

bool holds(const Found& found, double value) {
    return std::abs(found.value - value) <= found.range;
}

class Judge {
  public:
    explicit Judge(const RestoreFile& file) : file_{file} {}

    [[nodiscard]] RestoreWay way(PlateSolution solution) const {
        RestoreWay way;
        way.solution = std::move(solution);
        if (!file_.noon_certain) // by whole hours that nobody knows
            way.solution.ahead_min.value = std::remainder(way.solution.ahead_min.value, 60.0);
        const Fact fact = way.solution.fact;
        way.supposed_known = (fact == Fact::upright && file_.stood == Stood::upright) ||
                             (fact == Fact::level && file_.stood == Stood::level) || fact == Fact::lean;
        weigh_latitude(way);
        weigh_hours(way);
        weigh_lean(way);
        return way;
    }

  private:
    void weigh_latitude(RestoreWay& way) const {
        if (!file_.place || way.solution.fact == Fact::latitude)
            return;
        const Found& found = way.solution.latitude_deg;
        const double off = found.value - file_.place->site.latitude.in_degrees();
        if (holds(found, file_.place->site.latitude.in_degrees())) {
            if (found.range > k_telling_deg)
                return;
            ++way.signs;
            way.for_this_place = true;
            way.speaks.push_back("its latitude is that of the place where it was found");
        } else {
            way.speaks.push_back(fmt::format("not made for where it was found: cut for a latitude {} further {}",
                                             say_arc(off), off > 0 ? "north" : "south"));
        }
    }

    void weigh_hours(RestoreWay& way) const {
        if (way.solution.fact == Fact::sun_time)
            return;
        const Found& found = way.solution.ahead_min;
        if (found.range > k_telling_min || !file_.noon_certain)
            return;
        if (holds(found, 0)) {
            ++way.signs;
            way.speaks.push_back("XII is its own place's noon by the Sun");
            return;
        }
        if (!file_.place)
            return;
        const auto zone = Zone::find(file_.place->zone);
        const double wanted =
            zone ? 4 * (zone->meridian(2027) - file_.place->site.longitude).signed_turn().in_degrees() : 0;
        if (zone && std::abs(wanted) > found.range && holds(found, wanted)) {
            ++way.signs;
            way.speaks.push_back("its hours are corrected for the longitude of the place where it was found");
        }
    }

    void weigh_lean(RestoreWay& way) const {
        const Found& lean = way.solution.lean_deg;
        if (way.solution.fact != Fact::latitude && way.solution.fact != Fact::sun_time)
            return;
        if (lean.range > k_telling_deg)
            return;
        if (holds(lean, 0) || holds(lean, 90)) {
            ++way.signs;
            way.speaks.push_back(holds(lean, 0) ? "it comes out upright" : "it comes out level");
        }
    }

    const RestoreFile& file_;
};

void fail(const RestoreFile& file, RestoreReport& report, std::string message, std::string hint) {
    report.errors.push_back({file.file, file.at.line, file.at.column, "lines", std::move(message), std::move(hint)});
}

void note_lines(const RestoreFile& file, const PlateFigure& figure, RestoreReport& report) {
    for (std::size_t i = 0; i < figure.stray.size(); ++i)
        if (figure.stray[i]) {
            const std::string mm = figure.off_mm[i] != 0.0
                                       ? fmt::format(", {} mm at its outer point", fixed(std::abs(figure.off_mm[i]), 1))
                                       : std::string{};
            report.notes.push_back(
                fmt::format("the line of {} (line {} of the file) was cut or read wrong: it lies {} {}{} from where "
                            "it should, and was left out",
                            file.names[i], file.at_lines[i].line, say_arc(figure.off_deg[i]),
                            figure.off_deg[i] > 0 ? "clockwise" : "anticlockwise", mm));
        }
}

} // namespace

const char* fact_name(Fact fact) {
    static constexpr const char* k_names[] = {"upright", "level", "lean", "latitude", "sun"};
    return k_names[std::size_t(fact)];
}

RestoreReport report_on(const RestoreFile& file, const std::optional<PlateFigure>& figure) {
    RestoreReport report;
    constexpr const char* k_check =
        "hour lines of one style meet in a point and spread like those of a level dial: check the "
        "numerals, which way directions count (clockwise), and whether the hours are those of "
        "another time (unequal, from sunrise)";
    if (!figure || (figure->fit.checked() && figure->scatter > k_scattered)) {
        fail(file, report,
             figure ? fmt::format("these lines fit no dial: they scatter by {}°",
                                  fixed(figure->scatter * file.readings.direction_give_deg / 2, 1))
                    : std::string{"these lines fit no dial"},
             k_check);
        return report;
    }
    constexpr double k_open_deg = 30;
    if (figure->style_height_deg.range > k_open_deg) {
        fail(file, report, "these lines leave the plate open",
             "measure more of them, over as much of the day as there is, or the style's height where it survives");
        return report;
    }
    const Judge judge{file};
    for (PlateSolution& solution : solutions_of(*figure, file.readings.up_known, file.facts))
        if (!(solution.fact == Fact::sun_time && !file.noon_certain))
            report.ways.push_back(judge.way(std::move(solution)));
    std::stable_sort(report.ways.begin(), report.ways.end(), [](const RestoreWay& a, const RestoreWay& b) {
        return std::pair{a.supposed_known, a.signs} > std::pair{b.supposed_known, b.signs};
    });
    // What is known to be so leaves out what speaks for nothing; and nobody reads a tenth way.
    constexpr std::size_t k_most_ways = 6;
    if (!report.ways.empty() && report.ways.front().supposed_known)
        std::erase_if(report.ways, [](const RestoreWay& way) { return !way.supposed_known && way.signs == 0; });
    if (report.ways.size() > k_most_ways)
        report.ways.resize(k_most_ways);
    if (report.ways.empty()) {
        fail(file, report, "these lines fit no plate of which anything is known here", k_check);
        return report;
    }
    const auto rank = [](const RestoreWay& way) { return std::pair{way.supposed_known, way.signs}; };
    report.settled = report.ways.size() == 1 || rank(report.ways[0]) > rank(report.ways[1]);
    note_lines(file, *figure, report);
    if (!report.settled)
        report.notes.push_back(
            "hour lines alone don't tell how a plate stood: the ways below fit alike. What would tell: whether "
            "it hung upright or lay level (\"stood:\"), its lean where it still hangs, the place that it "
            "came from");
    if (!file.readings.up_known)
        report.notes.push_back(
            "with up unknown, an upright plate is taken for one that kept its own place's time: then its XII is "
            "plumb");
    if (!figure->fit.checked())
        report.notes.push_back("so few lines do not check each other: measure more");
    return report;
}

} // namespace dialwright::cli
