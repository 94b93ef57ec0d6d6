// SPDX-License-Identifier: MIT
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"
#include "cli/packet/packet.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

struct MakeOptions {
    std::string design;
    std::string folder;
    std::string sheet;
    std::vector<std::string> layers;
};

/// The layers that are asked for by name; nothing after an unknown one has been told.
std::optional<std::vector<layout::Layer>> layers_named(const std::vector<std::string>& names) {
    std::vector<layout::Layer> layers;
    for (const std::string& name : names) {
        const auto found = std::find_if(std::begin(layout::k_layers), std::end(layout::k_layers),
                                        [&](layout::Layer layer) { return layout::name_of(layer) == name; });
        if (found == std::end(layout::k_layers)) {
            std::cerr << fmt::format(
                "--layers: \"{}\" is no layer: give some of cut, engrave, fill, drill, score, guide, "
                "as in --layers cut,drill\n",
                name);
            return std::nullopt;
        }
        layers.push_back(*found);
    }
    return layers;
}

/// Files for machines in the folder that this packet has not written: of an earlier design, perhaps, and cut by mistake.
std::vector<std::string> strangers_in(const std::filesystem::path& folder, const std::vector<OutputFile>& files) {
    std::vector<std::string> found;
    std::error_code trouble;
    for (const auto& entry : std::filesystem::directory_iterator{folder, trouble}) {
        const std::string name = entry.path().filename().string(), kind = entry.path().extension().string();
        if ((kind == ".svg" || kind == ".dxf") &&
            std::none_of(files.begin(), files.end(), [&](const OutputFile& file) { return file.name == name; }))
            found.push_back(name);
    }
    std::sort(found.begin(), found.end());
    return found;
}

int run_make(const MakeOptions& options) {
    const auto commission = take_commission(options.design);
    if (!commission)
        return k_error;
    const std::filesystem::path folder =
        options.folder.empty()
            ? std::filesystem::path{std::filesystem::path{options.design}.stem().string() + "-packet"}
            : std::filesystem::path{options.folder};
    const auto layers = layers_named(options.layers);
    if (!layers)
        return k_error;
    auto packet = take_packet(*commission, {*layers, options.sheet});
    if (!packet)
        return k_error;
    if (packet->items.empty()) {
        std::cerr << fmt::format(
            "nothing is printed: no sheet {} of this design has anything on it; the first page of its "
            "packet shows the sheets and their names\n",
            options.sheet);
        return k_error;
    }
    std::vector<OutputFile> files;
    for (const Packet::Item& item : packet->items)
        files.push_back(item.file);
    try {
        write_files(folder, files);
    } catch (const WriteError& trouble) {
        std::cerr << trouble.what() << "; nothing was changed there\n";
        return k_error;
    }
    if (layers->empty() && options.sheet.empty())
        for (const std::string& name : strangers_in(folder, files))
            packet->warnings.push_back(
                fmt::format("{} in this folder is not of this packet; it stays there, but is not to be cut", name));
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
    command->add_option("--sheet", options->sheet, "one sheet again, by its name, such as B2");
    command->add_option("--layers", options->layers, "sheets with these layers alone, such as cut,drill")
        ->delimiter(',');
    command->callback([options, &status] { status = run_make(*options); });
}

} // namespace dialwright::cli
