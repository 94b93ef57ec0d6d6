// SPDX-License-Identifier: MIT
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"
#include "cli/packet/packet.hpp"

#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct MakeOptions {
    std::string design;
    std::string folder;
};

int run_make(const MakeOptions& options) {
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    const std::filesystem::path folder =
        options.folder.empty()
            ? std::filesystem::path{std::filesystem::path{options.design}.stem().string() + "-packet"}
            : std::filesystem::path{options.folder};
    const auto packet = take_packet(*commission);
    if (!packet)
        return k_error;
    std::vector<OutputFile> files;
    for (const Packet::Item& item : packet->items)
        files.push_back(item.file);
    try {
        write_files(folder, files);
    } catch (const WriteError& trouble) {
        std::cerr << trouble.what() << "; nothing was changed there\n";
        return k_error;
    }
    std::cout << fmt::format("{}: {} sheets\n", commission->design.title, packet->sheets);
    for (const Packet::Item& item : packet->items)
        std::cout << fmt::format("  {:<40} {}\n", (folder / item.file.name).string(), item.purpose);
    for (const std::string& warning : packet->warnings)
        std::cerr << "note: " << warning << '\n';
    return said(packet->warnings.empty() ? k_fine : k_with_warnings);
}

} // namespace

void add_make(CLI::App& app, int& status) {
    auto options = std::make_shared<MakeOptions>();
    CLI::App* command =
        app.add_subcommand("make", "Write the packet: full-scale sheets, the plate for a machine, and all numbers");
    command->add_option("DESIGN", options->design, "the design file")->required();
    command->add_option("--to", options->folder, "folder for the packet [the design's name with -packet, here]");
    command->callback([options, &status] { status = run_make(*options); });
}

} // namespace dialwright::cli
