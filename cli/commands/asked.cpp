// SPDX-License-Identifier: MIT
#include "cli/commands/asked.hpp"

#include "cli/commission.hpp"
#include "cli/design/nearest.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/quantity.hpp"
#include "cli/packet/print_options.hpp"
#include "cli/packet/write_files.hpp"
#include "layout/export/pdf.hpp"
#include "layout/sheet/export_error.hpp"

#include <filesystem>
#include <fmt/format.h>
#include <iostream>

namespace dialwright::cli {
namespace {

/// Reads an option that is given into `target`; false (told) where its text is wrong.
template <class T>
bool read_option(T& target, const std::string& option, const std::string& text, Read<T> (*reader)(std::string_view)) {
    if (text.empty())
        return true;
    const Read<T> value = reader(text);
    if (value)
        target = *value;
    else
        tell_option(option, value.trouble());
    return static_cast<bool>(value);
}

} // namespace

void tell_option(const std::string& option, const Trouble& trouble) {
    std::cerr << fmt::format("{}: {}{}{}\n", option, trouble.message, trouble.hint.empty() ? "" : ": ", trouble.hint);
}

void PlaceOptions::add_to(CLI::App& command, bool with_design) {
    if (with_design)
        command.add_option("DESIGN", design, "a design file, for its place; or give the three options");
    command.add_option("--latitude", latitude, "of the place: \"54° 27' N\" or 54.45");
    command.add_option("--longitude", longitude, "of the place: \"0° 44' W\" or -0.7333");
    command.add_option("--zone", zone, "of the place's clocks: Europe/London");
}

std::optional<AskedPlace> asked_place(const PlaceOptions& options) {
    Place place;
    std::string name;
    std::optional<Design> design;
    if (!options.design.empty()) {
        DesignReading reading = read_design_file(options.design);
        tell(reading.errors);
        if (!reading.design)
            return std::nullopt;
        design = std::move(reading.design);
        place = design->place;
        name = place.name.empty() ? design->title : place.name;
    } else if (options.latitude.empty() || options.longitude.empty() || options.zone.empty()) {
        std::cerr << "no place is given: name a design file, or give --latitude, --longitude and --zone\n";
        return std::nullopt;
    }
    const bool latitude_good = read_option(place.site.latitude, "--latitude", options.latitude, latitude);
    const bool longitude_good = read_option(place.site.longitude, "--longitude", options.longitude, longitude);
    const bool zone_good = read_option(place.zone, "--zone", options.zone, zone_name);
    if (!latitude_good || !longitude_good || !zone_good)
        return std::nullopt;
    if (!options.latitude.empty() || !options.longitude.empty())
        name.clear(); // it is another place now
    const auto zone = Zone::find(place.zone);
    if (!zone)
        return std::nullopt; // its reader has told
    return AskedPlace{std::move(place), *zone, std::move(name), std::move(design)};
}

void DateOptions::add_to(CLI::App& command) {
    command.add_option("--on", on, "the date: 2027-06-14 or \"14 June 2027\"")->required();
    command.add_option("--to", to, "the last date of several [the same]");
}

std::optional<AskedDates> asked_dates(const DateOptions& options, int most_days) {
    using namespace std::chrono;
    AskedDates asked{};
    const bool first_good = read_option(asked.first, "--on", options.on, calendar_date);
    asked.last = asked.first;
    const bool last_good = read_option(asked.last, "--to", options.to, calendar_date);
    if (options.on.empty())
        tell_option("--on", {"no date is given", "write it as in 2027-06-14 or 14 June 2027"});
    if (!first_good || !last_good || options.on.empty())
        return std::nullopt;
    const auto days = (sys_days{asked.last} - sys_days{asked.first}).count() + 1;
    if (days < 1) {
        tell_option("--to", {in_quotes(options.to) + " is before the first date, " + in_quotes(options.on),
                             "give the later date to --to"});
        return std::nullopt;
    }
    if (days > most_days) {
        tell_option("--to",
                    {fmt::format("{} is {} days after {}", in_quotes(options.to), days - 1, in_quotes(options.on)),
                     fmt::format("give at most {} days", most_days)});
        return std::nullopt;
    }
    return asked;
}

void SheetOptions::add_to(CLI::App& command) {
    command.add_option("--pdf", file, "a PDF to print, written there as well");
    command.add_option("--paper", paper, "for the PDF: A4, Letter, … [the design's, else A4]");
}

std::optional<AskedPrint> asked_print(const SheetOptions& options, const Design* design) {
    Design asked = design != nullptr ? *design : Design{};
    if (!options.paper.empty()) {
        const std::vector<std::string> names = layout::paper_names();
        if (!layout::paper_named(options.paper)) {
            const std::string_view near =
                nearest(options.paper, std::vector<std::string_view>{names.begin(), names.end()});
            tell_option("--paper", {in_quotes(options.paper) + " is not a paper",
                                    near.empty() ? std::string{"write it as in A4, Letter or roll 610 mm"}
                                                 : fmt::format("did you mean {}?", near)});
            return std::nullopt;
        }
        asked.print.paper = options.paper;
    }
    return AskedPrint{print_options(asked), asked.print.printer};
}

bool write_pdf(const std::string& file, const AskedPrint& print, const std::function<layout::SheetBook()>& make,
               const char* option) {
    const std::filesystem::path path{file};
    try {
        std::error_code trouble;
        if (path.filename().empty() || std::filesystem::is_directory(path, trouble)) {
            std::cerr << fmt::format("{}: {} is a folder: give the name of a file in it\n", option, file);
            return false;
        }
        layout::SheetBook book = make();
        for (layout::Sheet& sheet : book.sheets)
            layout::compensate(sheet, print.printer, print.options.paper.roll);
        write_files(path.has_parent_path() ? path.parent_path() : std::filesystem::path{"."},
                    {{path.filename().string(), layout::pdf_of(book)}});
        return true;
    } catch (const WriteError& trouble) {
        std::cerr << trouble.what() << "; nothing was changed there\n";
    } catch (const layout::ExportError& trouble) {
        std::cerr << option << ": " << trouble.what() << '\n';
    }
    return false;
}

} // namespace dialwright::cli
