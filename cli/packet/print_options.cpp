// SPDX-License-Identifier: MIT
#include "cli/packet/print_options.hpp"

#include "layout/sheet/compensation.hpp"

namespace dialwright::cli {

layout::PrintOptions print_options(const Design& design) {
    const Print& print = design.print;
    layout::PrintOptions options;
    options.paper = layout::paper_named(print.paper).value();
    options.margin_mm = layout::margin_for(print.printer, options.paper, print.margin_mm);
    options.overlap_mm = print.overlap_mm;
    options.inches = design.units == Units::inches;
    options.turn = print.turn;
    options.title = design.title;
    if (!print.printer.none())
        options.remark = "corrected for this printer";
    return options;
}

} // namespace dialwright::cli
