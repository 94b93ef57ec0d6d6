// SPDX-License-Identifier: MIT
#include "cli/plan/feasible.hpp"

#include "cli/report/say.hpp"
#include "layout/lettering/plate_lettering.hpp"
#include "layout/plate/numerals.hpp"
#include "layout/plate/tool_check.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <optional>
#include <stdexcept>
#include <tuple>

namespace dialwright::cli {
namespace {

struct LitHours {
    std::vector<double> hours; ///< quarter hours of the dial's own time
};

LitHours lit_hours(DialPlan plan, const MeanYear& year) {
    plan.nodus_height_mm = 1.0;
    if (counts_from_horizon(plan.hours.time))
        plan.hours.time = HourTime::sun;
    const auto caster = caster_of(plan);
    const Season season{-year.obliquity(), year.obliquity()};
    LitHours lit;
    for (int quarter = 0; quarter < 96; ++quarter)
        if (caster.ever_lit(hour_angle_of(plan.hours.time, quarter / 4.0, plan.site, plan.zone_meridian), season))
            lit.hours.push_back(quarter / 4.0);
    return lit;
}

/// "it is lit from 4:00 to 10:15 and 17:00 to 20:00"; a span that passes midnight is one.
std::string say_lit(const LitHours& lit) {
    struct Span {
        double first, last;
    };
    std::vector<Span> spans;
    for (const double hour : lit.hours)
        if (!spans.empty() && hour - spans.back().last < 0.3)
            spans.back().last = hour;
        else
            spans.push_back({hour, hour});
    const bool through_midnight = !spans.empty() && spans.front().first == 0.0 && spans.back().last == 23.75;
    if (through_midnight && spans.size() == 1)
        return "it is lit at every hour, at some time of the year";
    if (through_midnight) {
        spans.front().first = spans.back().first;
        spans.pop_back();
    }
    std::string text;
    for (const Span& span : spans)
        text += fmt::format("{}{} to {}", text.empty() ? "it is lit from " : " and ", layout::time_label(span.first),
                            layout::time_label(span.last));
    return text;
}

std::optional<DesignError> borders_without_field(const Design& design, const layout::FaceSpec& spec) {
    try {
        static_cast<void>(layout::Rings::of(spec));
        return std::nullopt;
    } catch (const layout::BordersError& trouble) {
        return borders_error(design, trouble.what());
    }
}

/// Hours that the design asks for and that are never lit.
void add_unlit_hours(std::vector<DesignError>& errors, const Design& design, const FacePlan& plan, const LitHours& lit,
                     bool several_faces) {
    const auto outside = [&](std::optional<double> hour) {
        return hour &&
               std::none_of(lit.hours.begin(), lit.hours.end(), [&](double h) { return std::abs(h - *hour) < 0.2501; });
    };
    const auto lit_between = [&](double first, double last) {
        return std::any_of(lit.hours.begin(), lit.hours.end(), [&](double h) { return h >= first && h <= last; });
    };
    const std::string face = plan.name.empty() ? "this plate" : "the " + plan.name + " face";
    const std::string lit_span = say_lit(lit);
    const auto& first = design.hours.first_h;
    const auto& last = design.hours.last_h;
    const auto never_at = [&](const char* key, double hour) {
        errors.push_back(error_at(design, key, fmt::format("{} is never lit at {}", face, layout::time_label(hour)),
                                  lit_span + "; leave the key out for all hours that are ever lit"));
    };
    if ((first || last) && !lit_between(first.value_or(0), last.value_or(24)))
        errors.push_back(
            error_at(design, first ? "hours: from" : "hours: to",
                     fmt::format("{} is never lit between {} and {}", face, layout::time_label(first.value_or(0)),
                                 layout::time_label(last.value_or(24))),
                     lit_span));
    else if (!several_faces && outside(first))
        never_at("hours: from", *first);
    else if (!several_faces && outside(last))
        never_at("hours: to", *last);
}

/// Hours that count from the Sun's rising or setting, at a place where it does neither on any day.
void add_missing_families(std::vector<DesignError>& errors, const Design& design, const DialPlan& dial,
                          const MeanYear& year) {
    for (int part = -50; part <= 50; ++part)
        if (half_day_arc(dial.site.latitude, year.obliquity() * (part / 50.0), dial.horizon))
            return;
    const auto tell = [&](const std::string& key, HourTime time) {
        if (counts_from_horizon(time))
            errors.push_back(
                error_at(design, key,
                         fmt::format("hours {} need a sunrise and a sunset, and at {} no day of the year has both",
                                     say_time(time), say_latitude(dial.site.latitude)),
                         "give sun, zone or clock"));
    };
    tell("hours: time", dial.hours.time);
    for (const HourPlan& more : dial.more_hours)
        tell(std::string{"also: "} + say_time(more.time), more.time);
}

/// At what the maker chose that most likely threw the lines off.
DesignError no_hours_error(const Design& design) {
    constexpr const char* k_message = "no hour line falls on the plate";
    if (design.plate.centre)
        return error_at(design, "plate: centre", k_message,
                        "move the centre nearer to the plate, or leave \"centre\" out");
    if (design.gnomon.nodus_height_mm)
        return error_at(design, "gnomon: nodus height", k_message,
                        "give a lower nodus, or leave the key out and one that works is taken");
    return error_at(design, "plate", k_message, "make the plate larger, or choose other hours");
}

} // namespace

DesignError error_at(const Design& design, const std::string& key, std::string message, std::string hint) {
    DesignError error{design.file, 1, 1, key, std::move(message), std::move(hint)};
    // A key that the file leaves out is told at its section.
    for (std::string name = key; !name.empty();
         name = name.substr(0, name.rfind(": ") == std::string::npos ? 0 : name.rfind(": ")))
        if (const auto at = design.where.find(name); at != design.where.end()) {
            error.line = at->second.line;
            error.column = at->second.column;
            break;
        }
    return error;
}

std::string first_given(const Design& design, std::initializer_list<const char*> keys) {
    for (const char* key : keys)
        if (design.where.contains(key))
            return key;
    return keys.end()[-1];
}

DesignError borders_error(const Design& design, std::string message) {
    return error_at(design, first_given(design, {"borders: chapter ring", "borders: margin", "borders", "plate"}),
                    std::move(message), "make the borders narrower or the plate larger");
}

std::vector<DesignError> in_order(std::vector<DesignError> errors) {
    std::stable_sort(errors.begin(), errors.end(), [](const DesignError& a, const DesignError& b) {
        return std::tie(a.line, a.column) < std::tie(b.line, b.column);
    });
    return errors;
}

std::vector<DesignError> what_cannot_be(const Design& design, const MeanYear& year,
                                        const std::vector<FacePlan>& plans) {
    std::vector<DesignError> errors;
    for (const FacePlan& plan : plans) {
        const LitHours lit = lit_hours(plan.dial, year);
        if (lit.hours.empty()) {
            errors.push_back(error_at(
                design,
                design.dial.kind == DialKind::level || design.dial.kind == DialKind::equatorial ? "dial: kind"
                                                                                                : "dial: facing",
                fmt::format("the Sun never lights a plate that is {} at {}", say_attitude(plan.dial.attitude),
                            say_latitude(plan.dial.site.latitude)),
                "check which way the plate faces and how it leans; the Sun passes on the other side"));
            continue;
        }
        if (!counts_from_horizon(plan.dial.hours.time))
            add_unlit_hours(errors, design, plan, lit, plans.size() > 1);
        add_missing_families(errors, design, plan.dial, year);
        if (std::fmod(plan.spec.summer_shift_h, 1.0) != 0)
            errors.push_back(
                error_at(design, "hours: summer numerals",
                         fmt::format("the zone's summer time is {:.0f} minutes on, which no row of hours can show",
                                     plan.spec.summer_shift_h * 60),
                         "leave the key out"));
    }
    if (!errors.empty()) {
        for (DesignError& error : what_cannot_be_lettered(design, ""))
            errors.push_back(std::move(error));
        if (auto error = borders_without_field(design, plans.front().spec))
            errors.push_back(std::move(*error));
    }
    return errors;
}

std::vector<DesignError> what_cannot_be_lettered(const Design& design, const std::string& otherwise) {
    std::vector<DesignError> errors;
    try {
        const layout::PlateLettering lettering{design.lettering.family, design.cutting.single_strokes};
        const auto try_text = [&](const std::string& key, const std::string& text) {
            try {
                if (!text.empty())
                    static_cast<void>(lettering.line(text, 1.0));
            } catch (const layout::LetteringError& trouble) {
                errors.push_back(error_at(design, key, trouble.what(), ""));
            }
        };
        try_text("lettering: motto", design.lettering.motto);
        try_text("lettering: place line", design.lettering.place_line);
        for (const NamedDay& day : design.dates.days)
            try_text("dates: days", day.label);
        if (design.dates.signs)
            try_text("dates: signs", "♈");
    } catch (const layout::LetteringError& trouble) {
        errors.push_back(error_at(design, "lettering: font", trouble.what(), ""));
    }
    if (errors.empty() && !otherwise.empty())
        errors.push_back(error_at(design, "lettering: font", otherwise, ""));
    return errors;
}

namespace {

/// Labels of the date lines that a face was to have and has not.
std::vector<std::string> lost_dates(const FacePlan& plan, const layout::Face& face) {
    std::vector<std::string> lost;
    for (const DatePlan::Line& date : plan.dial.dates.lines)
        if (std::none_of(face.lines.begin(), face.lines.end(), [&](const layout::DrawnLine& line) {
                return line.family == Family::date && line.declination == date.declination;
            }))
            lost.push_back(date.label);
    return lost;
}

/// The face as it would be with the nodus left open; none where its gnomon could not be made.
std::optional<layout::Face> with_free_nodus(const FacePlan& plan, const MeanYear& year) {
    DialPlan free = plan.dial;
    free.nodus_height_mm = 0.0;
    try {
        return layout::draw_face(free, year, plan.spec);
    } catch (const layout::GnomonError&) {
        return std::nullopt;
    }
}

} // namespace

std::vector<DesignError> what_misses_the_plate(const Design& design, const MeanYear& year,
                                               const std::vector<FacePlan>& plans, std::vector<layout::Face>& faces) {
    std::vector<DesignError> errors;
    for (std::size_t i = 0; i < faces.size(); ++i) {
        if (std::none_of(faces[i].lines.begin(), faces[i].lines.end(),
                         [](const layout::DrawnLine& line) { return is_hour(line.family); }))
            errors.push_back(no_hours_error(design));
        if (layout::parts_no_hours(faces[i], plans[i].spec))
            errors.push_back(error_at(
                design,
                first_given(design,
                            {"cutting: diameter", "cutting: depth", "cutting: line width", "cutting: tool", "cutting"}),
                fmt::format("the tool leaves a line of {}, and no hour line of this plate stands clear of the next",
                            say_length(plans[i].spec.cutting.line_width_mm, false)),
                "take a finer tool, or a larger plate"));
        const std::vector<std::string> lost = lost_dates(plans[i], faces[i]);
        if (lost.empty() || !design.gnomon.nodus_height_mm)
            continue;
        const std::optional<layout::Face> free = with_free_nodus(plans[i], year);
        if (!free || lost_dates(plans[i], *free).size() >= lost.size())
            continue; // not for the height of the nodus, or no other would do
        const std::string given = say_length(*design.gnomon.nodus_height_mm, false),
                          works = say_length(free->placement.nodus_height_mm, false);
        if (lost.size() == plans[i].dial.dates.lines.size()) {
            errors.push_back(error_at(design, "gnomon: nodus height",
                                      fmt::format("a nodus {} above the plate throws every date line off it", given),
                                      fmt::format("about {} would do; leave the key out, and it is taken", works)));
            continue;
        }
        std::string all;
        for (const std::string& label : lost)
            all += (all.empty() ? "" : ", ") + label;
        faces[i].warnings.push_back(
            fmt::format("a nodus {} above the plate throws {} of its date lines off it ({}): about {} would keep more",
                        given, lost.size(), all, works));
    }
    return errors;
}

} // namespace dialwright::cli
