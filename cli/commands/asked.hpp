// SPDX-License-Identifier: MIT
#pragma once

#include "cli/design/design.hpp"
#include "cli/design/quantity.hpp"
#include "engine/time/zone.hpp"
#include "layout/sheet/compensation.hpp"
#include "layout/sheet/sheet.hpp"
#include "layout/sheet/tiling.hpp"

#include <CLI/CLI.hpp>

#include <chrono>
#include <functional>
#include <optional>
#include <string>
#include <vector>

namespace dialwright::cli {

/// An option's text that is not what is wanted, told on stderr.
void tell_option(const std::string& option, const Trouble& trouble);

/// Where a command that needs no dial is asked for: a design's place, or one that options give.
struct PlaceOptions {
    std::string design, latitude, longitude, zone;
    void add_to(CLI::App& command, bool with_design = true);
};
struct AskedPlace {
    Place place;
    Zone zone;
    std::string name; ///< for headings: the place's own, else the design's title; may be empty
    std::optional<Design> design;
};
/// Options stand before what the design says. Tells on stderr what is wrong, and then gives nothing.
[[nodiscard]] std::optional<AskedPlace> asked_place(const PlaceOptions& options);

/// A date, or dates from one to another.
struct DateOptions {
    std::string on, to;
    void add_to(CLI::App& command);
};
struct AskedDates {
    std::chrono::year_month_day first, last;
};
/// Tells on stderr what is wrong, as a run of over `most_days`, and then gives nothing.
[[nodiscard]] std::optional<AskedDates> asked_dates(const DateOptions& options, int most_days);

/// A PDF to print beside what the command says.
struct SheetOptions {
    std::string file, paper;
    void add_to(CLI::App& command);
    [[nodiscard]] bool asked() const { return !file.empty(); }
};
/// How the sheets are printed: as the design wants, the usual A4 without one, or on the paper that the options name.
struct AskedPrint {
    layout::PrintOptions options;
    layout::Compensation printer;
};
/// Tells on stderr what is wrong, and then gives nothing.
[[nodiscard]] std::optional<AskedPrint> asked_print(const SheetOptions& options, const Design* design);
/// Makes the sheets and writes them as one PDF. Tells on stderr what keeps it from being made, and then is false.
[[nodiscard]] bool write_pdf(const std::string& file, const AskedPrint& print,
                             const std::function<layout::SheetBook()>& make, const char* option = "--pdf");

} // namespace dialwright::cli
