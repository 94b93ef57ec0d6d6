// SPDX-License-Identifier: MIT
#include "cli/plan/face_plans.hpp"

#include "engine/time/zone.hpp"
#include "layout/correction/words.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <fmt/format.h>
#include <stdexcept>

namespace dialwright::cli {
namespace {

/// The signs in the order of the Sun's longitude.
constexpr std::array<const char*, 12> k_signs{"♈", "♉", "♊", "♋", "♌", "♍", "♎", "♏", "♐", "♑", "♒", "♓"};

/// Refraction at the horizon, 34′, and the Sun's semidiameter, 16′: the almanacs' convention.
constexpr Angle k_seen_horizon = Angle::degrees(-50.0 / 60.0);

/// "21 Jun".
std::string say_day_of_year(std::chrono::month_day day) {
    return layout::say_date(day, true);
}

class DateLines {
  public:
    explicit DateLines(const Design& design, const MeanYear& year)
        : year_{year}, local_noon_ut_h_{12.0 - design.place.site.longitude.in_hours()} {}

    /// @param own_label  false: where a line is there already, its label will do
    void add(std::string label, Angle declination, bool own_label = true) {
        constexpr Angle k_same = Angle::degrees(0.01);
        for (DatePlan::Line& line : plan.lines)
            if (abs(line.declination - declination) < k_same) {
                if (own_label)
                    line.label += " · " + label;
                return;
            }
        plan.lines.push_back({std::move(label), declination});
    }
    void add_day(std::chrono::month_day day, std::string label) {
        add(label.empty() ? say_day_of_year(day) : std::move(label),
            year_.at(year_.day_of(day, local_noon_ut_h_)).declination);
    }
    [[nodiscard]] std::string date_of(double day) const { return say_day_of_year(year_.date_of(day)); }

    DatePlan plan;

  private:
    const MeanYear& year_;
    double local_noon_ut_h_;
};

std::string pair_text(const std::string& first, const std::string& second) {
    return first + " · " + second;
}

/// The other face of the same slab.
Attitude turned_over(const Attitude& front) {
    return {(front.normal_azimuth + Angle::degrees(180)).positive_turn(), -front.normal_altitude};
}

Attitude attitude_of(const Design& design, bool first_face) {
    if (design.dial.kind == DialKind::level)
        return {};
    if (design.dial.kind == DialKind::equatorial)
        return equatorial_attitude(design.place.site.latitude, first_face);
    const Attitude front{design.dial.facing, design.dial.lean};
    return first_face ? front : turned_over(front);
}

bool has_two_faces(const Design& design) {
    return design.dial.faces == Faces::both;
}

std::string face_name(const Design& design, bool first_face) {
    if (design.dial.kind == DialKind::level ||
        (design.dial.kind != DialKind::equatorial && design.dial.faces == Faces::upper))
        return "";
    if (design.dial.kind == DialKind::equatorial)
        return first_face ? "upper" : "lower";
    return first_face ? "front" : "back";
}

/// The Sun's declinations on the days of a part of the year, which may pass the year's end.
std::optional<Season> declinations(const FamilyLook& look, const Design& design, const MeanYear& year) {
    if (!look.between)
        return std::nullopt;
    const double local_noon_ut_h = 12.0 - design.place.site.longitude.in_hours();
    const double first = year.day_of(look.between->first, local_noon_ut_h);
    double last = year.day_of(look.between->second, local_noon_ut_h);
    if (last < first)
        last += year.length_days();
    Season season{Angle::degrees(90), Angle::degrees(-90)};
    const auto add = [&](double day) {
        const Angle declination = year.at(day).declination;
        season.least = std::min(season.least, declination);
        season.greatest = std::max(season.greatest, declination);
    };
    for (double day = first; day < last; day += 0.5) // fine enough for a solstice between: 0.1″
        add(day);
    add(last);
    return season;
}

HourPlan hour_plan(const Design& design, const MeanYear& year) {
    const Hours& hours = design.hours;
    return {hours.time,
            hours.first_h,
            hours.last_h,
            has_straight_lines(hours.time) ? hours.divide_min : 60,
            hours.curves,
            hours.reach,
            declinations(hours.look, design, year)};
}

HourPlan hour_plan(const MoreHours& more, const Design& design, const MeanYear& year) {
    return {more.time,
            more.first_h,
            more.last_h,
            60,
            more.curves,
            HourExtent::nodus,
            declinations(more.look, design, year)};
}

/// The zone's summer time beside its standard time.
struct SummerNumerals {
    double shift_h = 0.0; ///< 0 where it has none
    std::string word;     ///< the zone's letters for it, as in BST; "summer" where it has figures alone
};
SummerNumerals summer_numerals(const Zone& zone, int year) {
    using namespace std::chrono;
    SummerNumerals most{0.0, "summer"};
    for (unsigned month = 1; month <= 12; ++month) {
        const auto at = zone.at(sys_days{std::chrono::year{year} / month / 1});
        const double shift = duration<double, std::ratio<3600>>(at.summer_time).count();
        if (shift <= most.shift_h)
            continue;
        most.shift_h = shift;
        const std::string_view letters = at.abbreviation;
        const bool word = std::all_of(letters.begin(), letters.end(),
                                      [](char c) { return (c >= 'A' && c <= 'Z') || (c >= 'a' && c <= 'z'); });
        most.word = word && !letters.empty() ? std::string{letters} : "summer";
    }
    return most;
}

/// The plate as who looks at its other face sees it: left and right change places.
Plate seen_from_behind(Plate plate) {
    for (PlatePointMm& corner : plate.corners)
        corner.right_mm = -corner.right_mm;
    if (plate.centre)
        plate.centre->right_mm = -plate.centre->right_mm;
    return plate;
}

FacePlan plan_of(const Design& design, const MeanYear& year, bool upper_face) {
    FacePlan face;
    const bool equatorial = design.dial.kind == DialKind::equatorial;
    face.name = face_name(design, upper_face);
    const auto zone = Zone::find(design.place.zone);
    if (!zone)
        throw std::invalid_argument(fmt::format("no time zone \"{}\"", design.place.zone));

    DialPlan& dial = face.dial;
    dial.site = design.place.site;
    dial.zone_meridian = zone->meridian(design.years.first);
    dial.attitude = attitude_of(design, upper_face);
    dial.nodus_height_mm = design.gnomon.nodus_height_mm.value_or(0.0);
    dial.gnomon_thickness_mm =
        equatorial || design.gnomon.kind != layout::GnomonKind::edge ? 0.0 : design.gnomon.thickness_mm;
    if (!design.place.skyline.empty())
        dial.skyline = Skyline{design.place.skyline};
    dial.hours = hour_plan(design, year);
    for (const MoreHours& more : design.also.hours)
        dial.more_hours.push_back(hour_plan(more, design, year));
    dial.horizon = design.hours.seen_rise ? k_seen_horizon : Angle{};
    dial.altitudes = design.also.altitudes;
    dial.azimuths = design.also.azimuths;
    dial.noons = design.also.noons;
    dial.altitudes_between = declinations(design.also.altitude_look, design, year);
    dial.azimuths_between = declinations(design.also.azimuth_look, design, year);
    dial.noons_between = declinations(design.also.noon_look, design, year);
    dial.dates = date_plan(design, year);
    if (const auto& hours = design.dates.hours) {
        const HourTime scale = has_straight_lines(dial.hours.time) ? dial.hours.time : HourTime::sun;
        dial.dates.first = hour_angle_of(scale, hours->first, dial.site, dial.zone_meridian);
        dial.dates.last = hour_angle_of(scale, hours->second, dial.site, dial.zone_meridian);
    }
    if (equatorial) // the Sun stands on this face's side of the equator, or never lights it
        std::erase_if(dial.dates.lines, [&](const DatePlan::Line& line) {
            const bool north = (dial.site.latitude >= Angle{}) == upper_face;
            return (north ? line.declination : -line.declination) < Angle::degrees(0.1);
        });

    layout::FaceSpec& spec = face.spec;
    spec.name = face.name.empty() ? "" : face.name + " face";
    spec.plate = !upper_face ? seen_from_behind(design.plate) : design.plate;
    spec.borders = design.borders;
    spec.gnomon = design.gnomon;
    spec.lettering = design.lettering;
    spec.cutting = design.cutting;
    const double tool_mm = design.cutting.line_width_mm;
    spec.widths = {design.hours.look.weight.of(tool_mm),         design.dates.weight.of(tool_mm),
                   design.also.altitude_look.weight.of(tool_mm), design.also.azimuth_look.weight.of(tool_mm),
                   design.also.noon_look.weight.of(tool_mm),     {}};
    for (const MoreHours& more : design.also.hours)
        spec.widths.more_hours_mm.push_back(more.look.weight.of(tool_mm));
    spec.numerals = design.hours.numerals;
    spec.stand = design.hours.stand;
    spec.numeral_count = design.hours.count;
    spec.divide_min =
        has_straight_lines(design.hours.time) && design.hours.reach == HourExtent::style ? design.hours.divide_min : 0;
    if (design.hours.summer_numerals) {
        const SummerNumerals summer = summer_numerals(*zone, design.years.first);
        spec.summer_shift_h = summer.shift_h;
        spec.summer_word = summer.word;
    }
    spec.numeral_height_asked = design.where.contains("lettering: numeral height");
    spec.motto_height_asked = design.where.contains("lettering: motto height");
    spec.noon_mark = design.hours.noon_mark;
    spec.date_labels = design.dates.labels;
    spec.compass = design.dial.kind == DialKind::level;
    // Who reads a level dial stands where the gnomon's foot is lowest and looks along it to the elevated pole.
    const bool south = design.place.site.latitude < Angle{};
    spec.reader_up = Angle::degrees(design.dial.kind == DialKind::level && south ? 180 : 0);
    return face;
}

} // namespace

DatePlan date_plan(const Design& design, const MeanYear& year) {
    DateLines lines{design, year};
    const Angle tilt = year.obliquity();
    if (design.dates.solstices) {
        lines.add(lines.date_of(year.june_solstice_day()), tilt);
        lines.add(lines.date_of(year.december_solstice_day()), -tilt);
    }
    if (design.dates.equinoxes)
        lines.add(pair_text(lines.date_of(year.march_equinox_day()), lines.date_of(year.september_equinox_day())),
                  Angle{});
    if (design.dates.signs)
        for (const auto& [first, second] : {std::pair{3, 3}, {2, 4}, {1, 5}, {0, 6}, {11, 7}, {10, 8}, {9, 9}}) {
            const Angle longitude = Angle::degrees(30.0 * first);
            const std::string label =
                first == second ? k_signs[std::size_t(first)]
                                : fmt::format("{} {}", k_signs[std::size_t(first)], k_signs[std::size_t(second)]);
            lines.add(label, arc_sine(sin(tilt) * sin(longitude)), false);
        }
    if (design.dates.months)
        for (unsigned month = 1; month <= 12; ++month)
            lines.add_day(std::chrono::month{month} / 1, "");
    for (const NamedDay& day : design.dates.days)
        lines.add_day(day.day, day.label);
    return std::move(lines.plan);
}

std::vector<FaceAttitude> face_attitudes(const Design& design) {
    std::vector<FaceAttitude> faces;
    for (const bool upper : {true, false})
        if (has_two_faces(design) || design.dial.faces == (upper ? Faces::upper : Faces::lower))
            faces.push_back({face_name(design, upper), attitude_of(design, upper)});
    return faces;
}

std::vector<FacePlan> face_plans(const Design& design, const MeanYear& year) {
    std::vector<FacePlan> faces;
    if (has_two_faces(design) || design.dial.faces == Faces::upper)
        faces.push_back(plan_of(design, year, true));
    if (has_two_faces(design) || design.dial.faces == Faces::lower)
        faces.push_back(plan_of(design, year, false));
    return faces;
}

} // namespace dialwright::cli
