// SPDX-License-Identifier: MIT
#include "cli/report/sun.hpp"
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"

#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

/// Ten years and their leap days.
constexpr int k_most_days = 3653;

struct SunOptions {
    PlaceOptions place;
    DateOptions dates;
    SheetOptions sheet;
    bool bare = false, json = false, csv = false;
};

int run_sun(const SunOptions& options) {
    const auto asked = asked_place(options.place);
    const auto dates = asked_dates(options.dates, k_most_days);
    if (!asked || !dates)
        return k_error;
    const auto print = asked_print(options.sheet, asked->design ? &*asked->design : nullptr);
    if (!print)
        return k_error;
    const Angle altitude = options.bare ? Angle{} : k_upper_edge_altitude;
    const SunTable table{asked->name, asked->place.site, asked->zone, !options.bare,
                         civil_days(asked->place.site, asked->zone, dates->first, dates->last, altitude)};
    if (options.sheet.asked() &&
        !write_pdf(options.sheet.file, *print, [&] { return sun_sheets(table, print->options); }))
        return k_error;
    std::cout << (options.json ? sun_json(table) : options.csv ? sun_csv(table) : sun_text(table));
    return said(k_fine);
}

} // namespace

void add_sun(CLI::App& app, int& status) {
    auto options = std::make_shared<SunOptions>();
    CLI::App* command = app.add_subcommand(
        "sun", "Say when the Sun rises, stands at noon and sets, how high, and what the equation of time is");
    options->place.add_to(*command);
    options->dates.add_to(*command);
    command->add_flag("--no-refraction", options->bare, "rise and set of the Sun's middle on the bare horizon");
    options->sheet.add_to(*command);
    CLI::Option* json = command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->add_flag("--csv", options->csv, "as a table, a date a row")->excludes(json);
    command->callback([options, &status] { status = run_sun(*options); });
}

} // namespace dialwright::cli
