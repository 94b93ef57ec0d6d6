// SPDX-License-Identifier: MIT
#include "cli/commands/commands.hpp"
#include "cli/exit_status.hpp"
#include "cli/report/shadow.hpp"
#include "engine/time/instant_text.hpp"

#include <fmt/format.h>
#include <fstream>
#include <iostream>
#include <iterator>
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

constexpr const char* k_instant_hint = "write an instant as 2026-06-21T11:00:00Z, or with an offset: 2026-06-21T12:00:00+01:00";

/// One instant a line; empty lines are passed over.
bool read_lines(const std::string& name, std::vector<std::string>& texts) {
    std::ifstream file;
    if (name != "-") {
        file.open(name);
        if (!file) {
            std::cerr << name << ": cannot be read\n";
            return false;
        }
    }
    std::istream& in = name == "-" ? std::cin : file;
    for (std::string line; std::getline(in, line);) {
        while (!line.empty() && (line.back() == '\r' || line.back() == ' '))
            line.pop_back();
        if (!line.empty())
            texts.push_back(line);
    }
    return true;
}

std::optional<std::vector<Instant>> instants_of(const std::vector<std::string>& texts) {
    std::vector<Instant> instants;
    instants.reserve(texts.size());
    for (std::size_t i = 0; i < texts.size(); ++i) {
        const auto instant = read_instant(texts[i]);
        if (!instant) {
            std::cerr << fmt::format("instant {}: \"{}\" is not one: {}\n", i + 1, texts[i], k_instant_hint);
            return std::nullopt;
        }
        instants.push_back(*instant);
    }
    return instants;
}

std::optional<std::size_t> face_named(const Commission& commission, const std::string& name) {
    for (std::size_t i = 0; i < commission.plans.size(); ++i)
        if (commission.plans[i].name == name)
            return i;
    return std::nullopt;
}

int run_shadow(const ShadowOptions& options) {
    std::vector<std::string> texts = options.at;
    if (!options.at_file.empty() && !read_lines(options.at_file, texts))
        return k_error;
    const auto instants = instants_of(texts);
    if (!instants)
        return k_error;
    if (instants->empty()) {
        std::cerr << "no instant is given: use --at or --at-file; " << k_instant_hint << '\n';
        return k_error;
    }
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    std::optional<std::size_t> face;
    if (!options.face.empty()) {
        face = face_named(*commission, options.face);
        if (!face) {
            std::cerr << fmt::format("--face {}: this design has no such face{}\n", options.face,
                                     commission->plans.size() > 1 ? "; it has upper and lower" : " (it has only one)");
            return k_error;
        }
    }
    try {
        const auto reports = shadow_reports(*commission, *instants, face);
        std::cout << (options.json ? shadow_json(*commission, reports, texts) : shadow_text(*commission, reports));
    } catch (const std::invalid_argument& trouble) {
        std::cerr << trouble.what() << '\n';
        return k_error;
    }
    return std::cout.flush() ? k_fine : k_error;
}

} // namespace

void add_shadow(CLI::App& app, int& status) {
    auto options = std::make_shared<ShadowOptions>();
    CLI::App* command = app.add_subcommand("shadow", "Say where the nodus' shadow falls at an instant, and what the dial reads");
    command->add_option("DESIGN", options->design, "the design file")->required();
    command->add_option("--at", options->at, "an instant, ISO 8601 with Z or an offset; may be given several times")->allow_extra_args(false);
    command->add_option("--at-file", options->at_file, "a file with one instant a line; - for standard input");
    command->add_option("--face", options->face, "upper or lower, of a dial with two faces [the one that is lit]");
    command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->callback([options, &status] { status = run_shadow(*options); });
}

} // namespace dialwright::cli
