// SPDX-License-Identifier: MIT
// How the work is cut and printed: cutting, print.
#include "cli/design/nearest.hpp"
#include "cli/design/sections.hpp"
#include "layout/sheet/paper.hpp"

#include <fmt/format.h>

#include <array>
#include <charconv>
#include <cmath>
#include <vector>

namespace dialwright::cli {

namespace {

constexpr std::array<Choice<Tool>, 4> k_tools = {
    {{"v cutter", Tool::v_cutter}, {"end mill", Tool::end_mill}, {"laser", Tool::laser}, {"chisel", Tool::chisel}}};
constexpr std::array<Choice<bool>, 2> k_letters = {{{"outlines", false}, {"single strokes", true}}};
constexpr std::array<Choice<layout::PaperTurn>, 3> k_orientations = {
    {{"fewest sheets", layout::PaperTurn::fewest_sheets},
     {"upright", layout::PaperTurn::upright},
     {"lying", layout::PaperTurn::lying}}};
constexpr std::array<Choice<PrintedLayers>, 3> k_printed_layers = {{{"together", PrintedLayers::together},
                                                                    {"one by one", PrintedLayers::one_by_one},
                                                                    {"in the viewer", PrintedLayers::in_viewer}}};

bool is_v(Tool tool) {
    return tool == Tool::v_cutter || tool == Tool::chisel;
}

Read<Angle> v_angle(std::string_view text) {
    Read<Angle> angle = plain_angle(text);
    if (angle && (*angle < Angle::degrees(10) || *angle > Angle::degrees(150)))
        return Trouble{in_quotes(text) + " is no angle of a V", "give 10° to 150°, between its two sides"};
    return angle;
}

/// What of width, depth and angle follows from the others.
void settle_tool(Design& design, const Section& cutting) {
    Cutting& made = design.cutting;
    const bool has_width = cutting.has("line width");
    if (is_v(made.tool)) {
        const double slope = 2 * tan(made.point_angle / 2);
        if (has_width && cutting.has("depth"))
            cutting.error("depth", "the V's angle and the line width give the depth already",
                          "leave one of \"depth\" and \"line width\" out");
        else if (cutting.has("depth"))
            made.line_width_mm = made.flat_mm + made.depth_mm * slope;
        else if (has_width && made.line_width_mm <= made.flat_mm)
            cutting.error("line width",
                          fmt::format("a cutter with a point {} wide cuts no line of {}",
                                      length_text(made.flat_mm, design.units),
                                      length_text(made.line_width_mm, design.units)),
                          "widen the lines or take a sharper cutter");
        return;
    }
    if (made.tool == Tool::any || made.diameter_mm <= 0)
        return;
    if (!has_width)
        made.line_width_mm = made.diameter_mm;
    else if (made.line_width_mm < made.diameter_mm)
        cutting.error("line width",
                      fmt::format("a {} of {} cuts no line of {}", made.tool == Tool::laser ? "laser's spot" : "cutter",
                                  length_text(made.diameter_mm, design.units),
                                  length_text(made.line_width_mm, design.units)),
                      "widen the lines or take a finer tool");
}

void read_tool(Design& design, const Section& cutting) {
    Cutting& made = design.cutting;
    if (const auto tool = cutting.choice<Tool>("tool", k_tools))
        made.tool = *tool;
    else if (cutting.has("tool"))
        return;
    made.point_angle = Angle::degrees(made.tool == Tool::chisel ? 60 : 90);
    cutting.read_into(made.point_angle, "point angle", v_angle);
    cutting.length_into(made.depth_mm, "depth", 0.02, 50.0);
    cutting.length_into(made.flat_mm, "flat", 0.0, 10.0);
    cutting.length_into(made.diameter_mm, "diameter", 0.02, 30.0);
    const std::string hint = "leave it out, or name the tool that has it, as in \"tool: v cutter\"";
    if (!is_v(made.tool))
        cutting.refuse({"point angle"}, "only a V cutter or a chisel has it", hint);
    if (made.tool != Tool::v_cutter)
        cutting.refuse({"flat"}, "only a V cutter has it", hint);
    if (made.tool == Tool::any)
        cutting.refuse({"depth"}, "how deep a tool cuts is asked of a tool", hint);
    if (made.tool != Tool::end_mill && made.tool != Tool::laser)
        cutting.refuse({"diameter"}, "only an end mill or a laser's spot has it", hint);
    else if (!cutting.has("diameter"))
        cutting.missing("diameter", made.tool == Tool::laser ? "how wide the spot burns, as in \"diameter: 0.2 mm\""
                                                             : "of the end mill, as in \"diameter: 1 mm\"");
    settle_tool(design, cutting);
}

/// "#7b142b", or three numbers of 0 to 255 are not taken: one way is enough.
Read<layout::Tone> tone_of_text(std::string_view text) {
    const Trouble trouble{in_quotes(text) + " is no colour",
                          "give red, green and blue in hexadecimal, as in \"#73142b\""};
    if (text.size() != 7 || text.front() != '#')
        return trouble;
    std::array<int, 3> parts{};
    for (std::size_t i = 0; i < 3; ++i) {
        const char* from = text.data() + 1 + 2 * i;
        const auto [end, error] = std::from_chars(from, from + 2, parts[i], 16);
        if (error != std::errc{} || end != from + 2)
            return trouble;
    }
    return layout::Tone{parts[0] / 255.0, parts[1] / 255.0, parts[2] / 255.0};
}

void read_layers(Design& design, const Section& cutting) {
    static constexpr std::array<Choice<layout::Layer>, 5> k_words = {{{"cut", layout::Layer::cut},
                                                                      {"engrave", layout::Layer::engrave},
                                                                      {"fill", layout::Layer::fill},
                                                                      {"drill", layout::Layer::drill},
                                                                      {"score", layout::Layer::score}}};
    const std::string hint = "write a list, as in [{layer: cut, name: OUTLINE, colour: \"#ff0000\", number: 1}]";
    std::vector<layout::Layer> seen;
    for (const Node& item : list_at(cutting, "layers", "layer", 1, k_words.size(), hint)) {
        if (item.kind != Node::Kind::mapping) {
            if (item.kind != Node::Kind::refused)
                cutting.state().error(item.at, "cutting: layers",
                                      fmt::format("{} stands where a layer is wanted", kind_name(item)), hint);
            continue;
        }
        const Section one{item, "cutting: layers", cutting.state()};
        const auto layer = one.choice<layout::Layer>("layer", k_words);
        if (!layer) {
            if (!one.has("layer"))
                one.missing("layer", "which of cut, engrave, fill, drill and score it is");
            continue;
        }
        if (std::find(seen.begin(), seen.end(), *layer) != seen.end())
            one.error("layer", "this layer stands twice in the list", "say all of it once");
        seen.push_back(*layer);
        layout::LayerStyle& style = design.machine.layers[*layer];
        if (const auto name = one.line("name", 31))
            style.name = *name;
        one.read_into(style.tone, "colour", tone_of_text);
        if (const auto number = one.count("number", 1, 255))
            style.colour = *number;
    }
    try {
        design.machine.layers.check();
    } catch (const layout::ExportError& trouble) {
        cutting.error("layers", trouble.what(), "");
    }
}

/// What a printer makes of a length: "[180 mm, 179.4 mm]", printed and measured.
void read_feed(double& factor, const Section& print, std::string_view key) {
    const Entry* entry = print.entry(key);
    if (entry == nullptr)
        return;
    const std::string name = fmt::format("print: {}", key);
    if (entry->value.kind != Node::Kind::list && entry->value.kind != Node::Kind::refused) {
        print.error(key, "one length stands where two are wanted",
                    "give what is printed beside the bar and what you measured, as in [180 mm, 179.4 mm]");
        return;
    }
    const auto pair = read_point(entry->value, name, k_largest_plate_mm, print.state());
    if (!pair)
        return;
    const double printed = pair->right_mm, measured = pair->up_mm;
    if (!(printed >= 20) || !(measured > 0)) {
        print.error(key, "these are no two lengths of a bar",
                    "give what is printed beside the bar, from 20 mm, and what you measured, as in [180 mm, 179.4 mm]");
        return;
    }
    if (std::abs(measured / printed - 1) > layout::k_most_compensation) {
        print.error(
            key, fmt::format("a bar that comes out {:.4g} times as long was fitted to the paper", measured / printed),
            fmt::format("print the calibration sheet at 100 % and measure again: a printer is off by less than "
                        "{:.0f} %",
                        100 * layout::k_most_compensation));
        return;
    }
    factor = measured / printed;
}

void read_paper(Design& design, const Section& print) {
    const std::optional<std::string> name = print.line("paper", 100);
    if (!name)
        return;
    design.print.paper = *name;
    if (layout::paper_named(*name))
        return;
    std::vector<std::string> names = layout::paper_names();
    std::erase_if(names, [](const std::string& one) { return one.starts_with("roll"); }); // examples, not names
    const std::vector<std::string_view> candidates{names.begin(), names.end()};
    const std::string_view near = nearest(*name, candidates);
    print.error("paper", in_quotes(*name) + " is not a paper that is known here",
                near.empty()
                    ? "give A4, A3, Letter, Tabloid, or a roll by its width from 100 mm to 5 m, as in \"roll 610 mm\""
                    : fmt::format("did you mean {}?", near));
}

} // namespace

void read_cutting(Design& design, const Section& top) {
    const Section cutting{top.entry("cutting"), "cutting", top.state()};
    cutting.length_into(design.cutting.line_width_mm, "line width", 0.05, 10.0);
    cutting.length_into(design.cutting.least_gap_mm, "least gap", 0.05, 50.0);
    read_tool(design, cutting);
    design.cutting.single_strokes = cutting.choice<bool>("letters", k_letters).value_or(false);
    Machine& machine = design.machine;
    cutting.length_into(machine.kerf_mm, "kerf", 0.0, 20.0);
    cutting.read_into(machine.arcs, "arcs", yes_or_no);
    cutting.length_into(machine.flatten_mm, "flatten", 0.001, 1.0);
    if (const auto mm = cutting.length("hairline", 0.001, 2.0))
        machine.hairline_mm = *mm;
    cutting.read_into(machine.mirrored, "mirrored", yes_or_no);
    read_layers(design, cutting);
}

void read_print(Design& design, const Section& top) {
    const Section print{top.entry("print"), "print", top.state()};
    Print& made = design.print;
    read_paper(design, print);
    print.length_into(made.margin_mm, "margin", 0.0, 50.0);
    print.length_into(made.overlap_mm, "overlap", 0.0, 100.0);
    print.read_into(made.own_size, "own size", yes_or_no);
    made.turn = print.choice<layout::PaperTurn>("orientation", k_orientations).value_or(made.turn);
    read_feed(made.printer.across, print, "across feed");
    read_feed(made.printer.along, print, "along feed");
    print.read_into(made.mirrored, "mirrored", yes_or_no);
    made.layers = print.choice<PrintedLayers>("layers", k_printed_layers).value_or(made.layers);
}

} // namespace dialwright::cli
