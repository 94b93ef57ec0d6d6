// SPDX-License-Identifier: MIT
#include "cli/plan/feasible.hpp"

#include "cli/report/say.hpp"
#include "layout/lettering/plate_lettering.hpp"
#include "layout/plate/numerals.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <optional>
#include <stdexcept>
#include <tuple>

namespace dialwright::cli {
namespace {

bool counts_from_horizon(HourTime time) {
    return time != HourTime::sun && time != HourTime::zone && time != HourTime::clock;
}

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

std::string span_text(const LitHours& lit) {
    std::string text;
    for (std::size_t i = 0; i < lit.hours.size();) {
        std::size_t k = i;
        while (k + 1 < lit.hours.size() && lit.hours[k + 1] - lit.hours[k] < 0.3)
            ++k;
        text += fmt::format("{}{} to {}", text.empty() ? "" : " and ", layout::time_label(lit.hours[i]),
                            layout::time_label(lit.hours[k]));
        i = k + 1;
    }
    return text;
}

std::optional<DesignError> borders_without_field(const Design& design, const layout::FaceSpec& spec) {
    try {
        static_cast<void>(layout::Rings::of(spec));
        return std::nullopt;
    } catch (const std::invalid_argument& trouble) {
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
    const std::string lit_span = fmt::format("it is lit from {}", span_text(lit));
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
    } catch (const layout::LetteringError& trouble) {
        errors.push_back(error_at(design, "lettering: font", trouble.what(), ""));
    }
    if (errors.empty() && !otherwise.empty())
        errors.push_back(error_at(design, "lettering: font", otherwise, ""));
    return errors;
}

std::vector<DesignError> what_misses_the_plate(const Design& design, const MeanYear& year,
                                               const std::vector<FacePlan>& plans,
                                               const std::vector<layout::Face>& faces) {
    std::vector<DesignError> errors;
    for (std::size_t i = 0; i < faces.size(); ++i) {
        bool hours = false, dates = false;
        for (const layout::DrawnLine& line : faces[i].lines) {
            dates = dates || line.family == Family::date;
            hours = hours || is_hour(line.family);
        }
        if (!hours)
            errors.push_back(no_hours_error(design));
        const bool asked = !plans[i].dial.dates.lines.empty();
        const bool one_can_fall = std::any_of(
            plans[i].dial.dates.lines.begin(), plans[i].dial.dates.lines.end(), [&](const DatePlan::Line& line) {
                const bool equatorial =
                    design.dial.kind == DialKind::equatorial; // an equinox line lies at infinity there
                return !equatorial || std::abs(line.declination.in_degrees()) > 0.5;
            });
        if (asked && one_can_fall && !dates && design.gnomon.nodus_height_mm) {
            DialPlan free = plans[i].dial;
            free.nodus_height_mm = 0.0;
            const double works = layout::place_on_plate(free, year, plans[i].spec).nodus_height_mm;
            errors.push_back(error_at(
                design, "gnomon: nodus height",
                fmt::format("a nodus {} above the plate throws every date line off it",
                            say_length(*design.gnomon.nodus_height_mm, false)),
                fmt::format("about {} would do; leave the key out, and it is taken", say_length(works, false))));
        }
    }
    return errors;
}

} // namespace dialwright::cli
