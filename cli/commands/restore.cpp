// SPDX-License-Identifier: MIT
#include "cli/report/restore.hpp"
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/commission.hpp"
#include "cli/design/nearest.hpp"
#include "cli/packet/write_files.hpp"

#include <algorithm>
#include <filesystem>
#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct RestoreOptions {
    std::string lines;
    std::string recut, as;
    SheetOptions sheet;
    bool json = false;
};

/// The way that is to be cut again; tells why there is none.
const RestoreWay* chosen(const RestoreOptions& options, const RestoreReport& report) {
    std::vector<std::string_view> names;
    for (const RestoreWay& way : report.ways)
        if (std::find(names.begin(), names.end(), fact_name(way.solution.fact)) == names.end())
            names.emplace_back(fact_name(way.solution.fact));
    if (options.as.empty()) {
        if (report.settled)
            return &report.ways.front();
        std::cerr << fmt::format("--recut: these lines fit several plates alike: say which with --as {}\n",
                                 one_of(names));
        return nullptr;
    }
    for (const RestoreWay& way : report.ways)
        if (options.as == fact_name(way.solution.fact))
            return &way;
    std::cerr << fmt::format("--as {}: there is no such plate here: give {}\n", options.as, one_of(names));
    return nullptr;
}

bool write_recut(const RestoreOptions& options, const RestoreFile& file, const RestoreReport& report) {
    const RestoreWay* way = chosen(options, report);
    if (way == nullptr)
        return false;
    const std::filesystem::path path{options.recut};
    std::error_code trouble;
    if (std::filesystem::exists(path, trouble)) {
        std::cerr << fmt::format("--recut {}: there is a file of this name: give another, or take it away\n",
                                 options.recut);
        return false;
    }
    const std::string text = recut_design(file, *way);
    if (const DesignReading reading = read_design(text, options.recut); !reading.design) {
        tell(reading.errors);
        std::cerr << "--recut: no design can be made of this plate; nothing was written\n";
        return false;
    }
    try {
        write_files(path.has_parent_path() ? path.parent_path() : std::filesystem::path{"."},
                    {{path.filename().string(), text}});
    } catch (const WriteError& error) {
        std::cerr << error.what() << "; nothing was changed there\n";
        return false;
    }
    return true;
}

bool write_sheet(const RestoreOptions& options, const RestoreFile& file, const PlateFigure& figure,
                 const RestoreReport& report) {
    const auto print = asked_print(options.sheet, nullptr);
    return print && write_pdf(options.sheet.file, *print, [&] {
               layout::PrintOptions on = print->options;
               on.title = file.title.empty() ? std::string{"An old plate"} : file.title;
               return layout::SheetBook{"Restoring a plate", on.title, restore_sheets(file, figure, report, on)};
           });
}

int run_restore(const RestoreOptions& options) {
    const RestoreReading reading = read_restore_file(options.lines);
    tell(reading.errors);
    if (!reading.restore)
        return k_error;
    const RestoreFile& file = *reading.restore;
    const auto figure = figure_of(file.readings);
    const RestoreReport report = report_on(file, figure);
    tell(report.errors);
    if (!report.errors.empty())
        return k_error;
    if (options.sheet.asked() && !write_sheet(options, file, *figure, report))
        return k_error;
    if (!options.recut.empty() && !write_recut(options, file, report))
        return k_error;
    std::cout << (options.json ? restore_json(file, *figure, report) : restore_text(file, *figure, report));
    if (!options.recut.empty() && !options.json)
        std::cout << fmt::format("\nwritten: {}; read it through before anything is cut\n", options.recut);
    for (const std::string& note : report.notes)
        std::cerr << "note: " << note << '\n';
    return said(report.notes.empty() ? k_fine : k_with_warnings);
}

} // namespace

void add_restore(CLI::App& app, int& status) {
    auto options = std::make_shared<RestoreOptions>();
    CLI::App* command =
        app.add_subcommand("restore", "Find from the lines of an old plate what it was cut for, and cut it again");
    command->add_option("LINES", options->lines, "the file of the plate's lines (docs/restore.md)")->required();
    CLI::Option* recut = command->add_option("--recut", options->recut, "write a design file that cuts it again");
    command->add_option("--as", options->as, "of several plates: upright, level, lean, latitude or sun")->needs(recut);
    options->sheet.add_to(*command);
    command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->callback([options, &status] { status = run_restore(*options); });
}

} // namespace dialwright::cli
