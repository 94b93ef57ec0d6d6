// SPDX-License-Identifier: MIT
#pragma once

#include <CLI/CLI.hpp>

#include <functional>

namespace dialwright::cli {

/// Each adds its command to the program. What it runs gives the program's exit status into `status`.
void add_make(CLI::App& app, int& status);
void add_numbers(CLI::App& app, int& status);
void add_shadow(CLI::App& app, int& status);
void add_check(CLI::App& app, int& status);
void add_calibrate(CLI::App& app, int& status);
void add_sun(CLI::App& app, int& status);
void add_sunlight(CLI::App& app, int& status);
void add_fix(CLI::App& app, int& status);
void add_accuracy(CLI::App& app, int& status);
void add_survey(CLI::App& app, int& status);
void add_adjust(CLI::App& app, int& status);
void add_restore(CLI::App& app, int& status);

} // namespace dialwright::cli
