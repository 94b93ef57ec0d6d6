// SPDX-License-Identifier: MIT
#include "cli/report/shadow.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/exit_status.hpp"
#include "engine/time/instant_text.hpp"

#include <filesystem>
#include <fmt/format.h>
#include <fstream>
#include <iostream>
#include <memory>
#include <stdexcept>

namespace dialwright::cli {
namespace {

struct ShadowOptions {
    std::string design;
    std::vector<std::string> at;
    std::string at_file;
    std::string face;
    bool json = false;
};

constexpr const char* k_instant_hint =
    "write an instant as 2026-06-21T11:00:00Z, or with an offset: 2026-06-21T12:00:00+01:00";
constexpr std::size_t k_most_told = 100;

/// Instants as they were asked for, and what they mean.
struct Asked {
    std::vector<std::string> texts;
    std::vector<Instant> instants;
    std::size_t bad = 0; ///< told on stderr, the first hundred

    /// @param where  the start of the message: "--at" or "times.txt:12:1"
    void add(std::string text, const std::string& where) {
        if (const auto instant = read_instant(text)) {
            instants.push_back(*instant);
            texts.push_back(std::move(text));
        } else if (++bad <= k_most_told) {
            std::cerr << fmt::format("{}: {} is not an instant: {}\n", where, in_quotes(text), k_instant_hint);
        }
    }
};

std::string without_blanks(const std::string& line) {
    constexpr const char* k_blanks = " \t\r";
    const std::size_t first = line.find_first_not_of(k_blanks);
    return first == std::string::npos ? std::string{} : line.substr(first, line.find_last_not_of(k_blanks) - first + 1);
}

/// One instant a line; empty lines are passed over, and so is the mark that some editors put before the first.
bool read_lines(const std::string& name, Asked& asked) {
    std::ifstream file;
    if (name != "-") {
        std::error_code trouble;
        file.open(name);
        if (!file || std::filesystem::is_directory(name, trouble)) {
            std::cerr << fmt::format("{}: {}\n", name,
                                     file ? "this is a folder: give a file with one instant a line" : "cannot be read");
            return false;
        }
    }
    std::istream& in = name == "-" ? std::cin : file;
    std::string line;
    for (std::size_t number = 1; std::getline(in, line); ++number) {
        if (number == 1 && line.starts_with("\xEF\xBB\xBF"))
            line.erase(0, 3);
        if (std::string text = without_blanks(line); !text.empty())
            asked.add(std::move(text), fmt::format("{}:{}:1", name == "-" ? "standard input" : name, number));
    }
    return true;
}

int run_shadow(const ShadowOptions& options) {
    Asked asked;
    for (const std::string& text : options.at)
        asked.add(text, "--at");
    if ((!options.at_file.empty() && !read_lines(options.at_file, asked)) || asked.bad > 0)
        return k_error;
    if (asked.instants.empty()) {
        std::cerr << "no instant is given: use --at or --at-file; " << k_instant_hint << '\n';
        return k_error;
    }
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    std::optional<std::size_t> face;
    if (!options.face.empty()) {
        face = face_named(*commission, options.face);
        if (!face)
            return k_error;
    }
    try {
        const auto reports = shadow_reports(*commission, asked.instants, face);
        std::cout << (options.json ? shadow_json(*commission, reports, asked.texts)
                                   : shadow_text(*commission, reports));
    } catch (const std::invalid_argument& trouble) {
        std::cerr << trouble.what() << '\n';
        return k_error;
    }
    return said(k_fine);
}

} // namespace

void add_shadow(CLI::App& app, int& status) {
    auto options = std::make_shared<ShadowOptions>();
    CLI::App* command =
        app.add_subcommand("shadow", "Say where the nodus' shadow falls at an instant, and what the dial reads");
    command->add_option("DESIGN", options->design, "the design file")->required();
    command->add_option("--at", options->at, "an instant, ISO 8601 with Z or an offset; may be given several times")
        ->allow_extra_args(false);
    command->add_option("--at-file", options->at_file, "a file with one instant a line; - for standard input");
    command->add_option("--face", options->face,
                        "of a dial with two faces: upper or lower, front or back [the one that is lit]");
    command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->callback([options, &status] { status = run_shadow(*options); });
}

} // namespace dialwright::cli
