// SPDX-License-Identifier: MIT
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"
#include "layout/sheet/compensation.hpp"

#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct CalibrateOptions {
    SheetOptions sheet;
    bool inches = false;
};

int run_calibrate(const CalibrateOptions& options) {
    auto print = asked_print(options.sheet, nullptr);
    if (!print)
        return k_error;
    print->options.inches = options.inches;
    const bool made = write_pdf(
        options.sheet.file, *print,
        [&] {
            return layout::SheetBook{"Calibration of the printer",
                                     "A page to measure a printer with",
                                     {layout::calibration_sheet(print->options)},
                                     false};
        },
        "");
    if (!made)
        return k_error;
    std::cout << fmt::format(
        "{}: print it at 100 %, measure its two bars, and write what you find into the design under "
        "\"print\"\n",
        options.sheet.file);
    return said(k_fine);
}

} // namespace

void add_calibrate(CLI::App& app, int& status) {
    auto options = std::make_shared<CalibrateOptions>();
    CLI::App* command = app.add_subcommand("calibrate", "Write a page that shows how far a printer is off");
    command->add_option("PDF", options->sheet.file, "the file to write")->required();
    command->add_option("--paper", options->sheet.paper, "A4, Letter, … [A4]");
    command->add_flag("--inches", options->inches, "inches beside millimetres");
    command->callback([options, &status] { status = run_calibrate(*options); });
}

} // namespace dialwright::cli
