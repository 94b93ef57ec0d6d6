// SPDX-License-Identifier: MIT
#include "cli/report/survey.hpp"
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/commission.hpp"
#include "cli/design/edit_design.hpp"
#include "cli/design/file_text.hpp"
#include "cli/packet/write_files.hpp"
#include "layout/survey/board.hpp"

#include <filesystem>
#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct SurveyOptions {
    std::string readings;
    std::string into;
    std::string board;
    SheetOptions sheet;
    bool json = false;
};

/// @return false after an error has been told
bool write_one(const std::filesystem::path& path, std::string bytes) {
    try {
        const auto folder = path.has_parent_path() ? path.parent_path() : std::filesystem::path{"."};
        write_files(folder, {{path.filename().string(), std::move(bytes)}});
        return true;
    } catch (const WriteError& trouble) {
        std::cerr << trouble.what() << "; nothing was changed there\n";
        return false;
    }
}

int write_board(const SurveyOptions& options) {
    const auto print = asked_print({options.board, options.sheet.paper}, nullptr);
    if (!print)
        return k_error;
    const auto make = [&] {
        layout::PrintOptions on = print->options;
        on.title = "Survey of a wall";
        return layout::SheetBook{"Survey board", "for the shadow of a peg", layout::survey_board(on)};
    };
    if (!write_pdf(options.board, *print, make, "--board"))
        return k_error;
    std::cout << fmt::format("{}: the board at full scale; print it at 100 % and measure its bars\n", options.board);
    return k_fine;
}

bool write_sheet(const SurveyOptions& options, const SurveyFile& file, const WallSurvey& survey,
                 const SurveyVerdict& verdict) {
    const auto print = asked_print(options.sheet, nullptr);
    return print && write_pdf(options.sheet.file, *print, [&] {
               layout::PrintOptions on = print->options;
               on.title = file.title.empty() ? std::string{"Survey of a wall"} : file.title;
               return layout::SheetBook{"Survey", on.title, survey_sheets(file, survey, verdict, on)};
           });
}

/// Facing and lean into a design file.
bool write_into(const std::string& design, const WallSurvey& survey) {
    std::error_code trouble;
    const auto path = std::filesystem::canonical(design, trouble); // what a link leads to is changed, not the link
    const FileText file = read_text_file(trouble ? std::filesystem::path{design} : path, "design file");
    if (!file.text) {
        tell(file.errors);
        return false;
    }
    const auto values = dial_values(survey);
    DesignEdit edit = with_dial_values(*file.text, design, values);
    if (!edit.errors.empty()) {
        tell(edit.errors);
        std::cerr << "--into: nothing was changed in " << design << '\n';
        return false;
    }
    return write_one(path, std::move(edit.text));
}

int run_survey(const SurveyOptions& options) {
    if (options.readings.empty() && options.board.empty()) {
        std::cerr << "give a file of readings, or --board FILE for the board to take them with\n";
        return k_error;
    }
    if (!options.into.empty() && options.readings.empty()) {
        std::cerr << "--into: there are no readings to write from: give their file too\n";
        return k_error;
    }
    if (!options.board.empty())
        if (const int status = write_board(options); status != k_fine || options.readings.empty())
            return said(status);
    const SurveyReading reading = read_survey_file(options.readings);
    tell(reading.errors);
    if (!reading.survey)
        return k_error;
    const WallSurvey survey = survey_wall(reading.survey->readings);
    const SurveyVerdict verdict = verdict_on(*reading.survey, survey);
    tell(verdict.errors);
    if (!verdict.errors.empty())
        return k_error;
    if (!options.into.empty() && !verdict.good_to_cut) {
        for (const std::string& note : verdict.notes)
            std::cerr << "note: " << note << '\n';
        std::cerr << "--into: these readings are not settled enough to write into a design; nothing was changed\n";
        return k_error;
    }
    if (options.sheet.asked() && !write_sheet(options, *reading.survey, survey, verdict))
        return k_error;
    if (!options.into.empty() && !write_into(options.into, survey))
        return k_error;
    std::cout << (options.json ? survey_json(*reading.survey, survey, verdict)
                               : survey_text(*reading.survey, survey, verdict));
    if (!options.into.empty() && !options.json)
        std::cout << fmt::format("written into {}\n", options.into);
    for (const std::string& note : verdict.notes)
        std::cerr << "note: " << note << '\n';
    return said(verdict.notes.empty() ? k_fine : k_with_warnings);
}

} // namespace

void add_survey(CLI::App& app, int& status) {
    auto options = std::make_shared<SurveyOptions>();
    CLI::App* command = app.add_subcommand("survey", "Find a wall's facing and lean from timed shadows of a peg");
    command->add_option("READINGS", options->readings, "the file of readings (docs/survey.md)");
    command->add_option("--into", options->into, "a design file to write facing and lean into");
    command->add_option("--board", options->board, "write the board for taking readings, as PDF");
    options->sheet.add_to(*command);
    command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->callback([options, &status] { status = run_survey(*options); });
}

} // namespace dialwright::cli
