// SPDX-License-Identifier: MIT
#include "cli/report/families.hpp"
#include "cli/report/lines_of_text.hpp"
#include "cli/report/numbers.hpp"
#include "cli/report/say.hpp"
#include "layout/correction/words.hpp"
#include "layout/plate/family_words.hpp"

#include <cmath>
#include <fmt/format.h>
#include <iterator>

namespace dialwright::cli {
namespace {

using Text = LinesOfText;
/// How wide a column of one coordinate is.
int column(bool inches) {
    return inches ? 10 : 8;
}
std::string ends_words(bool inches) {
    return inches ? "ends in inches from the nodus' foot" : "ends in mm from the nodus' foot";
}
std::string point_text(PlatePoint p, bool inches) {
    return fmt::format("{:>{}} {:>{}}", layout::bare_length(p.u_mm, inches), column(inches),
                       layout::bare_length(p.v_mm, inches), column(inches));
}

void say_site(Text& text, const Commission& commission) {
    const Design& design = commission.design;
    text.line("{}", design.title);
    text.line("  place        {}, {}", say_latitude(design.place.site.latitude),
              say_longitude(design.place.site.longitude));
    const Angle meridian = commission.plans.front().dial.zone_meridian;
    text.line("  zone         {}, standard meridian {}", design.place.zone, say_longitude(meridian));
    const double correction = (meridian - design.place.site.longitude).signed_turn().in_minutes_of_time();
    text.line("  longitude    {} min of time {} the zone's meridian: zone time is Sun time {} {} min",
              fixed(std::abs(correction), 2), correction >= 0 ? "west of" : "east of", correction >= 0 ? "+" : "-",
              fixed(std::abs(correction), 2));
    text.line("  years        {} to {} (means of declination and equation of time)", design.years.first,
              design.years.last);
}

void say_style(Text& text, const layout::Face& face, const FacePlan& plan, bool inches) {
    const Style& style = face.delineation.style;
    text.line("  plate        {}", say_attitude(plan.dial.attitude));
    text.line("  style height {}", both_ways(style.height));
    text.line("  substyle     {} clockwise from up", both_ways(style.substyle));
    text.line("  nodus        {} above the plate", say_length(face.placement.nodus_height_mm, inches));
    if (style.centre)
        text.line("  centre       u {}, v {} from the nodus' foot", say_length(style.centre->u_mm, inches),
                  say_length(style.centre->v_mm, inches));
    else
        text.line("  centre       none: the style is parallel to the plate");
    text.line("  nodus' foot  {} right, {} up of the plate's middle", say_length(face.placement.foot.x_mm, inches),
              say_length(face.placement.foot.y_mm, inches));
    if (face.gnomon_foot_mm > 0)
        text.line("  gnomon foot  {} along the substyle from the centre", say_length(face.gnomon_foot_mm, inches));
    if (style.centre)
        text.line(
            "  nodus at     {} along the style from the centre",
            say_length(std::hypot(std::hypot(style.centre->u_mm, style.centre->v_mm), face.placement.nodus_height_mm),
                       inches));
    if (plan.dial.gnomon_thickness_mm > 0)
        text.line("  gnomon       {} thick: two half-dials, this far apart",
                  say_length(plan.dial.gnomon_thickness_mm, inches));
}

void say_lines(Text& text, const layout::Face& face, bool inches) {
    text.gap();
    text.line("  Hour lines: angle on the plate from the centre, clockwise from up; {}", ends_words(inches));
    const int wide = column(inches);
    text.line("  {:<8} {:>7} {:>11} {:>10} {:>12}   {:>{}} {:>{}}   {:>{}} {:>{}}", "line", "time", "hour angle",
              "angle", "", "from u", wide, "v", wide, "to u", wide, "v", wide);
    for (const layout::DrawnLine& line : face.lines) {
        if (line.set != 0 || !is_hour(line.family))
            continue;
        const std::string angle = line.direction ? fixed(line.direction->in_degrees(), 4) + "°" : "curve";
        const std::string minutes = line.direction ? degrees_minutes(*line.direction) : "";
        text.line("  {:<8} {:>7} {:>10}° {:>10} {:>12}   {}   {}", line.label, say_clock(line.time_h).substr(0, 5),
                  fixed(line.hour_angle.in_degrees(), 4), angle, minutes, point_text(line.points.front(), inches),
                  point_text(line.points.back(), inches));
    }
    text.gap();
    text.line("  Date lines: {}", ends_words(inches));
    for (const layout::DrawnLine& line : face.lines)
        if (line.family == Family::date)
            text.line("  {:<28} {:>24}   {}   {}   {} points", line.label,
                      both_ways(line.declination.value_or(Angle{})), point_text(line.points.front(), inches),
                      point_text(line.points.back(), inches), line.points.size());
}

void say_more_lines(Text& text, const layout::Face& face, bool inches) {
    bool headed = false;
    for (const layout::DrawnLine& line : face.lines) {
        if (line.family == Family::date || (line.set == 0 && is_hour(line.family)))
            continue;
        if (!headed) {
            text.gap();
            text.line("  More lines: {}", ends_words(inches));
        }
        headed = true;
        text.line("  {:<16} {:<12}   {}   {}   {} points", layout::words_of(line.family, line.time).name, line.label,
                  point_text(line.points.front(), inches), point_text(line.points.back(), inches), line.points.size());
    }
}

void say_families(Text& text, const FacePlan& plan, const layout::Face& face) {
    text.gap();
    text.line("  Families of lines, and how they are drawn");
    for (const DrawnFamily& family : drawn_families(plan, face)) {
        std::string row = fmt::format("  {:<28} {}", family.lines,
                                      family.width_mm > 0 ? fixed(family.width_mm, 2) + " mm wide"
                                                          : "on the lines of another family");
        if (family.in_ring)
            row += "; in the chapter ring";
        if (!family.figures.empty())
            row += fmt::format("; {}, as in {}", family.figures, family.sample);
        if (family.between)
            row += "; " + say_between(*family.between);
        text.line("{}", row);
    }
}

void list_equation(Text& text, const MeanYear& year) {
    text.gap();
    text.line("Equation of time, the mean of the years, at noon UT");
    for (unsigned month = 1; month <= 12; ++month) {
        std::string row = fmt::format("  {:.3}", layout::month_name(month));
        for (const unsigned day : {1U, 11U, 21U}) {
            const auto mean = year.at(year.day_of(std::chrono::month{month} / std::chrono::day{day}));
            row += fmt::format("  {:>2}: {:<22}", day, say_equation(mean.equation_of_time));
        }
        row.erase(row.find_last_not_of(' ') + 1);
        text.line("{}", row);
    }
}

void say_correction(Text& text, const Commission& commission) {
    text.gap();
    if (!commission.correction) {
        text.line("Correction: none; these hours become clock time by no minutes of a date");
        return;
    }
    const Correction& correction = *commission.correction;
    text.line("Correction, from the dial to the clock, the mean of the years, at noon");
    text.line("  {}", layout::say_rule(correction, 1e-9));
    const std::string summer = layout::say_summer(correction.summer(), commission.design.hours.summer_numerals);
    text.line("  {}", summer.empty() ? "The zone keeps no summer time." : summer);
    for (const std::string& limit : layout::say_limits(correction))
        text.line("  {}", limit);
    if (!correction.is_needed())
        return;
    const auto spread = correction.spread();
    text.line("  A single year differs from this by at most {} s, about {}.", fixed(spread.seconds, 0),
              layout::say_date(spread.date));
    for (unsigned month = 1; month <= 12; ++month) {
        std::string row = fmt::format("  {:.3}", layout::month_name(month));
        for (const unsigned day : {1U, 11U, 21U})
            row += fmt::format(
                "  {:>2}: {:<18}", day,
                layout::add_or_take_exactly(correction.add_min(std::chrono::month{month} / std::chrono::day{day})));
        row.erase(row.find_last_not_of(' ') + 1);
        text.line("{}", row);
    }
}

} // namespace

std::string numbers_text(const Commission& commission) {
    Text text;
    say_site(text, commission);
    const bool inches = commission.design.units == Units::inches;
    for (std::size_t i = 0; i < commission.faces.size(); ++i) {
        if (commission.faces.size() > 1) {
            text.gap();
            text.line("{} face", commission.plans[i].name);
        }
        say_style(text, commission.faces[i], commission.plans[i], commission.design.units == Units::inches);
        say_lines(text, commission.faces[i], inches);
        say_more_lines(text, commission.faces[i], inches);
        say_families(text, commission.plans[i], commission.faces[i]);
    }
    say_correction(text, commission);
    list_equation(text, commission.year);
    return text.taken();
}

} // namespace dialwright::cli
