// SPDX-License-Identifier: MIT
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/commission.hpp"
#include "cli/exit_status.hpp"
#include "cli/report/fixing.hpp"

#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct FixOptions {
    std::string design;
    DateOptions dates;
    SheetOptions sheet;
    bool json = false, csv = false;
};

int run_fix(const FixOptions& options) {
    const auto dates = asked_dates(options.dates, k_most_fixing_days);
    const auto commission = take_commission(options.design);
    if (!dates || !commission)
        return k_error;
    const auto print = asked_print(options.sheet, &commission->design);
    if (!print)
        return k_error;
    const Fixing fixing = fixing_of(*commission, dates->first, dates->last);
    const auto book = [&] {
        return layout::SheetBook{commission->design.title, "The fixing sheet of a sundial",
                                 fixing_sheets(fixing, print->options)};
    };
    if (options.sheet.asked() && !write_pdf(options.sheet.file, *print, book))
        return k_error;
    std::cout << (options.json ? fixing_json(fixing) : options.csv ? fixing_csv(fixing) : fixing_text(fixing));
    return said(k_fine);
}

} // namespace

void add_fix(CLI::App& app, int& status) {
    auto options = std::make_shared<FixOptions>();
    CLI::App* command = app.add_subcommand(
        "fix", "Say for the day of fixing what the dial must read, where north is, and which way to move it");
    command->add_option("DESIGN", options->design, "the design file")->required();
    options->dates.add_to(*command);
    options->sheet.add_to(*command);
    CLI::Option* json = command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->add_flag("--csv", options->csv, "the quarter hours as a table")->excludes(json);
    command->callback([options, &status] { status = run_fix(*options); });
}

} // namespace dialwright::cli
