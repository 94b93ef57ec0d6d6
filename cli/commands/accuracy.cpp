// SPDX-License-Identifier: MIT
#include "cli/report/accuracy.hpp"
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"

#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct AccuracyOptions {
    std::string design;
    SheetOptions sheet;
    bool json = false, csv = false;
};

int run_accuracy(const AccuracyOptions& options) {
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    const auto print = asked_print(options.sheet, &commission->design);
    if (!print)
        return k_error;
    const std::vector<FaceAccuracy> faces = accuracy_of(*commission);
    const auto book = [&] {
        return layout::SheetBook{commission->design.title, "How good a sundial will be",
                                 accuracy_sheets(*commission, faces, print->options), false};
    };
    if (options.sheet.asked() && !write_pdf(options.sheet.file, *print, book))
        return k_error;
    std::cout << (options.json  ? accuracy_json(*commission, faces)
                  : options.csv ? accuracy_csv(*commission, faces)
                                : accuracy_text(*commission, faces));
    return said(k_fine);
}

} // namespace

void add_accuracy(CLI::App& app, int& status) {
    auto options = std::make_shared<AccuracyOptions>();
    CLI::App* command = app.add_subcommand(
        "accuracy", "Say how good the dial will be: minutes of error for each likely slip, at each hour");
    command->add_option("DESIGN", options->design, "the design file")->required();
    options->sheet.add_to(*command);
    CLI::Option* json = command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->add_flag("--csv", options->csv, "as a table, an hour line at a season a row")->excludes(json);
    command->callback([options, &status] { status = run_accuracy(*options); });
}

} // namespace dialwright::cli
