// SPDX-License-Identifier: MIT
#include "cli/packet/contents.hpp"

#include "cli/packet/cover_words.hpp"

#include <fmt/format.h>

namespace dialwright::cli {
namespace {

void put_list(std::string& text, const char* heading, const std::vector<std::string>& items) {
    if (items.empty())
        return;
    text += fmt::format("\n{}\n", heading);
    int number = 0;
    for (const std::string& item : items)
        text += fmt::format("  {}. {}\n", ++number, item);
}

} // namespace

std::string contents_of(const Commission& commission, const Packet& packet) {
    std::string text = commission.design.title + "\n\nWhat each file is for\n";
    std::size_t widest = 0;
    for (const Packet::Item& item : packet.items)
        widest = std::max(widest, item.file.name.size());
    for (const Packet::Item& item : packet.items)
        text += fmt::format("  {:<{}}  {}\n", item.file.name, widest, item.purpose);
    std::vector<std::string> order{"Print the sheets at 100 %, on the paper that the design names."};
    for (const std::string& step : steps(commission.design, true))
        order.push_back(step);
    order.push_back(
        "For a machine, load the SVG or the DXF of each part and measure its width there: parts.csv says what "
        "it must be.");
    order.push_back("Make the gauge first, then the gnomon; try them on each other before anything is fixed.");
    put_list(text, "In this order", order);
    put_list(text, "Of this design", packet.warnings);
    put_list(text, "Done for the machine", packet.remarks);
    put_list(text, "Take care", packet.cautions);
    return text;
}

} // namespace dialwright::cli
