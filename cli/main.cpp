// SPDX-License-Identifier: MIT
#include "cli/commands/commands.hpp"
#include "cli/exit_status.hpp"

#include <exception>
#include <iostream>

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
