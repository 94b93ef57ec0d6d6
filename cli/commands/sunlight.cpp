// SPDX-License-Identifier: MIT
#include "cli/report/sunlight.hpp"
#include "cli/commands/asked.hpp"
#include "cli/commands/commands.hpp"
#include "cli/commands/said.hpp"
#include "cli/commission.hpp"
#include "cli/design/plain_text.hpp"
#include "cli/design/quantity.hpp"
#include "cli/exit_status.hpp"
#include "cli/plan/face_plans.hpp"
#include "cli/report/say.hpp"

#include <fmt/format.h>
#include <iostream>
#include <memory>

namespace dialwright::cli {
namespace {

constexpr int k_first_year = 1901, k_last_year = 2099;
constexpr std::size_t k_most_faces = 12;

struct SunlightOptions {
    std::vector<std::string> designs;
    PlaceOptions place;
    std::vector<std::string> facings;
    std::string lean, year;
    bool level = false;
    SheetOptions sheet;
    bool json = false, csv = false;
};

/// The faces of one design; false after an error has been told.
bool add_design(std::vector<LightFace>& faces, const std::string& file, std::optional<Design>& first) {
    DesignReading reading = read_design_file(file);
    tell(reading.errors);
    if (!reading.design)
        return false;
    const Design& design = *reading.design;
    const auto zone = Zone::find(design.place.zone);
    if (!zone)
        return false; // its reader has told
    const Skyline skyline = design.place.skyline.empty() ? Skyline{} : Skyline{design.place.skyline};
    for (const FaceAttitude& face : face_attitudes(design))
        faces.push_back({face.name.empty() ? design.title : fmt::format("{}, {} face", design.title, face.name),
                         design.place.site, *zone, face.attitude, skyline});
    if (!first)
        first = std::move(reading.design);
    return true;
}

/// The walls that options describe, at one place.
bool add_walls(std::vector<LightFace>& faces, const SunlightOptions& options) {
    if (options.facings.empty() && !options.level)
        return true;
    PlaceOptions at = options.place;
    at.design = options.designs.empty() ? "" : options.designs.front();
    const auto asked = asked_place(at);
    Angle leaning;
    bool good = asked.has_value();
    if (!options.lean.empty()) {
        const Read<Angle> read = lean(options.lean);
        if (read)
            leaning = *read;
        else
            tell_option("--lean", read.trouble());
        good = good && read;
    }
    for (const std::string& text : options.facings) {
        const Read<Angle> facing = bearing(text);
        if (!facing)
            tell_option("--facing", facing.trouble());
        good = good && facing;
        if (!good)
            continue;
        const Attitude attitude{*facing, leaning};
        faces.push_back({"facing " + say_bearing(*facing), asked->place.site, asked->zone, attitude,
                         asked->place.skyline.empty() ? Skyline{} : Skyline{asked->place.skyline}});
    }
    if (good && options.level)
        faces.push_back({"level", asked->place.site, asked->zone, Attitude{},
                         asked->place.skyline.empty() ? Skyline{} : Skyline{asked->place.skyline}});
    return good;
}

std::optional<int> asked_year(const std::string& text, const std::optional<Design>& design) {
    if (text.empty())
        return design ? design->years.first : Years{}.first;
    const Read<int> year = whole_number(text);
    if (year && *year >= k_first_year && *year <= k_last_year)
        return *year;
    tell_option("--year", {in_quotes(text) + (year ? fmt::format(" is outside {} to {}", k_first_year, k_last_year)
                                                   : std::string{" is not a year"}),
                           "write it as in 2027"});
    return std::nullopt;
}

bool fitting(const SunlightOptions& options) {
    const bool walls = !options.facings.empty() || options.level;
    const bool place = !options.place.latitude.empty() || !options.place.longitude.empty();
    if (options.designs.empty() && !walls)
        std::cerr << "no plate is given: name a design file, or give --facing or --level with the place\n";
    else if (walls && options.designs.size() > 1)
        std::cerr << "--facing and --level stand at one place: name one design with them\n";
    else if (place && !options.designs.empty())
        std::cerr << "a design has its own place: leave out --latitude and --longitude, or the design\n";
    else if (!options.lean.empty() && options.facings.empty())
        std::cerr << "--lean goes with --facing: a design has its own lean\n";
    else if (options.designs.size() + options.facings.size() > k_most_faces)
        std::cerr << fmt::format("{} plates are too many to compare: give at most {}\n",
                                 options.designs.size() + options.facings.size(), k_most_faces);
    else
        return true;
    return false;
}

int run_sunlight(const SunlightOptions& options) {
    if (!fitting(options))
        return k_error;
    std::vector<LightFace> faces;
    std::optional<Design> first;
    bool good = true;
    for (const std::string& design : options.designs)
        good = add_design(faces, design, first) && good;
    good = add_walls(faces, options) && good;
    const auto year = asked_year(options.year, first);
    const auto print = asked_print(options.sheet, first ? &*first : nullptr);
    if (!good || !year || !print)
        return k_error;
    std::vector<LightYear> years;
    for (LightFace& face : faces)
        years.push_back(light_year(std::move(face), *year));
    if (options.sheet.asked() &&
        !write_pdf(options.sheet.file, *print, [&] { return sunlight_sheets(years, print->options); }))
        return k_error;
    std::cout << (options.json ? sunlight_json(years) : options.csv ? sunlight_csv(years) : sunlight_text(years));
    return said(k_fine);
}

} // namespace

void add_sunlight(CLI::App& app, int& status) {
    auto options = std::make_shared<SunlightOptions>();
    CLI::App* command =
        app.add_subcommand("sunlight", "Say through the year when a plate is lit; of several walls, which has more");
    command->add_option("DESIGN", options->designs, "design files, for their places, skylines and faces");
    command
        ->add_option("--facing", options->facings,
                     "a wall that faces this way: \"S 23° E\"; may be given several times")
        ->allow_extra_args(false);
    command->add_option("--lean", options->lean, "of these walls from upright: \"5° back\" [upright]");
    command->add_flag("--level", options->level, "a level plate beside them");
    options->place.add_to(*command, false);
    command->add_option("--year", options->year, "[the first of the design's years, else 2027]");
    options->sheet.add_to(*command);
    CLI::Option* json = command->add_flag("--json", options->json, "for programs (docs/output-formats.md)");
    command->add_flag("--csv", options->csv, "as a table, a date and face a row")->excludes(json);
    command->callback([options, &status] { status = run_sunlight(*options); });
}

} // namespace dialwright::cli
