// SPDX-License-Identifier: MIT
#include "cli/commands/commands.hpp"
#include "cli/design/nearest.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/exit_status.hpp"

#include <algorithm>
#include <exception>
#include <iostream>
#include <string>
#include <string_view>
#include <vector>

namespace {

/// What is wrong with the first word, where it is no command and no option; empty where nothing is.
std::string no_command(const CLI::App& app, std::string_view word) {
    using namespace dialwright::cli;
    std::vector<std::string> names;
    for (const CLI::App* command : app.get_subcommands([](const CLI::App*) { return true; }))
        names.push_back(command->get_name());
    const std::vector<std::string_view> commands{names.begin(), names.end()};
    if (word.starts_with('-') || std::find(commands.begin(), commands.end(), word) != commands.end())
        return {};
    const std::string_view near = nearest(word, commands);
    return in_quotes(word) + " is not a command: " +
           (near.empty() ? "give " + one_of(commands) : "did you mean " + std::string{near} + "?");
}

} // namespace

int main(int count, char** words) {
    using namespace dialwright::cli;
    CLI::App app{"dialwright makes sundials: from a design file to full-scale sheets for the bench", "dialwright"};
    app.set_version_flag("--version", std::string{"dialwright "} + DIALWRIGHT_VERSION);
    app.require_subcommand(1);
    app.footer("Each command has its own --help. A design file is described in docs/design-file.md.");
    int status = k_fine;
    add_make(app, status);
    add_numbers(app, status);
    add_shadow(app, status);
    add_check(app, status);
    add_calibrate(app, status);
    add_sun(app, status);
    add_sunlight(app, status);
    add_fix(app, status);
    add_accuracy(app, status);
    add_survey(app, status);
    add_adjust(app, status);
    add_restore(app, status);
    if (const std::string wrong = count > 1 ? no_command(app, words[1]) : std::string{}; !wrong.empty()) {
        std::cerr << "dialwright: " << wrong << '\n';
        return k_error;
    }
    try {
        app.parse(count, words);
    } catch (const CLI::ParseError& error) {
        return app.exit(error) == 0 ? k_fine : k_error;
    } catch (const std::exception& error) {
        std::cerr << "dialwright: " << error.what() << '\n';
        return k_error;
    }
    return status;
}
