// SPDX-License-Identifier: MIT
#include "cli/report/adjust.hpp"
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/quantity.hpp"

#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct AdjustOptions {
    std::string design, readings;
    std::string face;
    std::string latitude, longitude, zone;
    SheetOptions sheet;
    bool json = false;
};

/// Tells what is wrong with an option's text.
template <class T>
std::optional<T> option_value(const char* option, const std::string& text, Read<T> (*reader)(std::string_view)) {
    const Read<T> value = reader(text);
    if (value)
        return *value;
    std::cerr << fmt::format("{}: {}: {}\n", option, value.trouble().message, value.trouble().hint);
    return std::nullopt;
}

/// Mounting for another place.
int run_moved(const AdjustOptions& options, const Commission& commission, const DialPlan& plan) {
    Site there = plan.site;
    if (!options.latitude.empty()) {
        const auto value = option_value<Angle>("--latitude", options.latitude, latitude);
        if (!value)
            return k_error;
        there.latitude = *value;
    }
    if (!options.longitude.empty()) {
        const auto value = option_value<Angle>("--longitude", options.longitude, longitude);
        if (!value)
            return k_error;
        there.longitude = *value;
    }
    Angle meridian = plan.zone_meridian;
    if (!options.zone.empty()) {
        const auto zone = Zone::find(options.zone);
        if (!zone) {
            std::cerr << fmt::format("--zone: {} is not a time zone: write it as in Europe/London\n",
                                     in_quotes(options.zone));
            return k_error;
        }
        meridian = zone->meridian(commission.design.years.first);
    }
    std::cout << (options.json ? moved_json(commission, plan, there, meridian)
                               : moved_text(commission, plan, there, meridian));
    return said(k_fine);
}

bool write_sheet(const AdjustOptions& options, const AdjustFile& file, const AdjustReport& report,
                 const Commission& commission) {
    const auto print = asked_print(options.sheet, &commission.design);
    return print && write_pdf(options.sheet.file, *print, [&] {
               layout::PrintOptions on = print->options;
               on.title = commission.design.title;
               return layout::SheetBook{"Adjusting the dial", commission.design.title,
                                        adjust_sheets(file, report, commission, on)};
           });
}

int run_adjust(const AdjustOptions& options) {
    const bool moved = !options.latitude.empty() || !options.longitude.empty() || !options.zone.empty();
    if (options.readings.empty() != moved) {
        std::cerr
            << "give a file of readings, or the place that the dial is to serve with --latitude and --longitude\n";
        return k_error;
    }
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    const auto face = options.face.empty() ? std::optional<std::size_t>{0} : face_named(*commission, options.face);
    if (!face)
        return k_error;
    if (moved)
        return run_moved(options, *commission, commission->plans[*face].dial);
    const AdjustReading reading = read_adjust_file(options.readings, *commission, *face);
    tell(reading.errors);
    if (!reading.adjust)
        return k_error;
    const DialAdjustment found = adjust_dial(reading.adjust->readings, commission->year);
    const AdjustReport report = report_on(*reading.adjust, found, *commission);
    tell(report.errors);
    if (!report.errors.empty())
        return k_error;
    if (options.sheet.asked() && !write_sheet(options, *reading.adjust, report, *commission))
        return k_error;
    std::cout << (options.json ? adjust_json(*reading.adjust, found, report, *commission)
                               : adjust_text(*reading.adjust, found, report, *commission));
    for (const std::string& note : report.notes)
        std::cerr << "note: " << note << '\n';
    return said(report.notes.empty() ? k_fine : k_with_warnings);
}

} // namespace

void add_adjust(CLI::App& app, int& status) {
    auto options = std::make_shared<AdjustOptions>();
    CLI::App* command =
        app.add_subcommand("adjust", "Find how a fixed dial stands from its readings, and what puts it right");
    command->add_option("DESIGN", options->design, "the design file")->required();
    command->add_option("READINGS", options->readings, "the file of readings (docs/adjust.md)");
    command->add_option("--face", options->face, "of a dial with two faces: upper or lower, front or back [the first]");
    command->add_option("--latitude", options->latitude, "instead of readings: the latitude where it is to serve");
    command->add_option("--longitude", options->longitude, "the longitude where it is to serve");
    command->add_option("--zone", options->zone, "the zone of the clocks there [the design's]");
    options->sheet.add_to(*command);
    command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->callback([options, &status] { status = run_adjust(*options); });
}

} // namespace dialwright::cli
