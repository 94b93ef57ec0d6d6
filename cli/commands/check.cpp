// SPDX-License-Identifier: MIT
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/exit_status.hpp"
#include "cli/packet/packet.hpp"
#include "cli/report/say.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

/// What the drawing chose besides what the reader assumed.
std::vector<Assumption> chosen(const Commission& commission) {
    std::vector<Assumption> list = commission.design.assumed;
    const bool inches = commission.design.units == Units::inches;
    for (std::size_t i = 0; i < commission.faces.size(); ++i) {
        const layout::Placement& placement = commission.faces[i].placement;
        const std::string face = commission.plans[i].name.empty() ? "" : " (" + commission.plans[i].name + ")";
        if (!placement.why_height.empty())
            list.push_back(
                {"gnomon: nodus height" + face, say_length(placement.nodus_height_mm, inches), placement.why_height});
        if (!placement.why_place.empty()) {
            const layout::Point at = placement.key;
            list.push_back({"plate: centre" + face,
                            fmt::format("[{}, {}]", say_length(at.x_mm, false), say_length(at.y_mm, false)),
                            placement.why_place});
        }
    }
    return list;
}

int run_check(const std::string& design) {
    const auto commission = take_commission(design);
    if (!commission)
        return k_error;
    const auto packet = take_packet(*commission);
    if (!packet)
        return k_error;
    std::cout << fmt::format("{}: can be made, {} sheets\n", commission->design.title, packet->sheets);
    const auto list = chosen(*commission);
    if (!list.empty()) {
        std::size_t key = 0, value = 0;
        for (const Assumption& a : list) {
            key = std::max(key, a.key.size());
            value = std::max(value, a.value.size());
        }
        std::cout << "Taken, since the design leaves it open:\n";
        for (const Assumption& a : list)
            std::cout << fmt::format("  {:<{}}  {:<{}}  {}\n", a.key, key, a.value, value, a.why);
    }
    for (const std::string& warning : packet->warnings)
        std::cout << "note: " << warning << '\n';
    for (const std::string& caution : packet->cautions)
        std::cout << "take care: " << caution << '\n';
    return said(packet->warnings.empty() ? k_fine : k_with_warnings);
}

} // namespace

void add_check(CLI::App& app, int& status) {
    auto design = std::make_shared<std::string>();
    CLI::App* command =
        app.add_subcommand("check", "Read a design, say what was assumed and what to be careful of; write nothing");
    command->add_option("DESIGN", *design, "the design file")->required();
    command->callback([design, &status] { status = run_check(*design); });
}

} // namespace dialwright::cli
