// SPDX-License-Identifier: MIT
#include "cli/report/numbers.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"

#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct NumbersOptions {
    std::string design;
    bool json = false, csv = false;
};

int run_numbers(const NumbersOptions& options) {
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    std::cout << (options.json  ? numbers_json(*commission)
                  : options.csv ? hour_lines_csv(*commission)
                                : numbers_text(*commission));
    return said(k_fine);
}

} // namespace

void add_numbers(CLI::App& app, int& status) {
    auto options = std::make_shared<NumbersOptions>();
    CLI::App* command =
        app.add_subcommand("numbers", "Print what was computed: style, hour lines, date lines, equation of time");
    command->add_option("DESIGN", options->design, "the design file")->required();
    CLI::Option* json = command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->add_flag("--csv", options->csv, "the hour lines as a table")->excludes(json);
    command->callback([options, &status] { status = run_numbers(*options); });
}

} // namespace dialwright::cli
