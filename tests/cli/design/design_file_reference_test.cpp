// SPDX-License-Identifier: MIT
// docs/design-file.md against the table of known keys and against the reader: nothing missing, nothing too much, and
// every example is read as it stands.
#include "cli/design/keys.hpp"
#include "cli/design/read_design.hpp"

#include <catch2/catch.hpp>

#include <filesystem>
#include <fstream>
#include <map>
#include <set>
#include <string>
#include <vector>

using namespace dialwright::cli;

namespace {

struct Row {
    std::string section, key, meaning, unit, fallback, range, example;
};

struct Reference {
    std::vector<Row> rows;
    std::set<std::string> sections;
    std::vector<std::string> blocks; ///< fenced YAML
};

std::string trimmed(const std::string& text) {
    const std::size_t first = text.find_first_not_of(" `");
    return first == std::string::npos ? std::string{} : text.substr(first, text.find_last_not_of(" `") - first + 1);
}

std::vector<std::string> cells_of(const std::string& line) {
    std::vector<std::string> cells;
    for (std::size_t at = 1; at < line.size();) {
        const std::size_t end = std::min(line.find('|', at), line.size());
        cells.push_back(trimmed(line.substr(at, end - at)));
        at = end + 1;
    }
    return cells;
}

Reference reference() {
    Reference found;
    std::ifstream stream{std::string{DIALWRIGHT_SOURCE_DIR} + "/docs/design-file.md"};
    REQUIRE(stream.good());
    std::string section;
    bool in_yaml = false;
    for (std::string line; std::getline(stream, line);) {
        if (line.starts_with("```")) {
            in_yaml = line == "```yaml";
            if (in_yaml)
                found.blocks.emplace_back();
        } else if (in_yaml) {
            found.blocks.back() += line + '\n';
        } else if (line.starts_with("#")) {
            const std::size_t tick = line.find('`');
            section = tick == std::string::npos ? std::string{} : trimmed(line.substr(tick));
            if (!section.empty())
                found.sections.insert(section);
        } else if (line.starts_with("| `")) {
            const std::vector<std::string> cells = cells_of(line);
            INFO(line);
            REQUIRE(cells.size() == 6);
            found.rows.push_back({section, cells[0], cells[1], cells[2], cells[3], cells[4], cells[5]});
        }
    }
    return found;
}

using Sections = std::map<std::string, std::map<std::string, std::string>>;

/// Which gnomon and which joint have a key of the gnomon's.
void call_for_joint(Sections& design, const std::string& key) {
    const auto is = [&](std::initializer_list<const char*> keys) {
        return std::any_of(keys.begin(), keys.end(), [&](const char* one) { return key == one; });
    };
    auto& gnomon = design["gnomon"];
    if (is({"joint", "tenons", "tenon length", "proud", "fit", "hook", "keel", "flange width", "flange thickness"})) {
        gnomon["thickness"] = "6 mm";
        design["plate"]["thickness"] = "12 mm";
    }
    if (is({"tenons", "tenon length", "proud", "fit"}))
        gnomon["joint"] = "tenons";
    if (is({"hook", "keel"}))
        gnomon["joint"] = "hooked tenons";
    if (is({"flange width", "flange thickness"}))
        gnomon["joint"] = "flange";
    if (key == "ball")
        gnomon["nodus"] = "ball";
    if (is({"socket", "strut"})) {
        gnomon["kind"] = "rod";
        gnomon["thickness"] = "8 mm";
    }
}

/// A good design around one key, with what that key calls for.
Sections design_around(const Row& row) {
    Sections design{{"place", {{"latitude", "54° 14' N"}, {"longitude", "1° 52' W"}, {"zone", "Europe/London"}}},
                    {"dial", {{"kind", "level"}}},
                    {"plate", {{"diameter", "360 mm"}}}};
    const std::string& key = row.key;
    if (row.section == "dial" && (key == "facing" || key == "lean" || key == "kind"))
        design["dial"] = {{"kind", "leaning"}, {"facing", "south"}, {"lean", "20° back"}};
    if (row.section == "dial" && key == "faces")
        design["dial"] = {{"kind", "equatorial"}};
    if (row.section == "plate" && (key == "width" || key == "height"))
        design["plate"] = {{"width", "500 mm"}, {"height", "500 mm"}};
    if (row.section == "plate" && (key == "across" || key == "corners"))
        design["plate"] = {};
    if (key == "motto height")
        design["lettering"] = {{"motto", "Sine sole sileo"}};
    if (key == "hole diameter")
        design["gnomon"] = {{"holes", "2"}};
    if (row.section == "gnomon")
        call_for_joint(design, key);
    if (row.section == "cutting" && (key == "point angle" || key == "depth" || key == "flat"))
        design["cutting"] = {{"tool", "v cutter"}};
    if ((row.section == "weights" || row.section == "extents") && key != "hours" && key != "dates") {
        design["hours"] = {{"time", key == "since sunrise" ? "unequal" : "since sunrise"}};
        design["also"][key] = key == "altitudes" || key == "azimuths" ? "each 15°"
                              : key == "noon at"                      ? "[{name: x, longitude: 5° E}]"
                                                                      : "9 to 11";
    }
    if (row.section == "extents" && key == "hours")
        design["hours"] = {{"reach", "season"}};
    if (row.section == "cutting" && key == "diameter")
        design["cutting"] = {{"tool", "end mill"}};
    if (row.section == "hours" && key == "curves")
        design["hours"] = {{"time", "clock"}};
    if ((row.section == "hours" && key == "summer numerals") || (row.section == "also" && key == "sun"))
        design["hours"] = {{"time", "zone"}};
    if (row.section == "hours" && key == "rise and set")
        design["hours"] = {{"time", "since sunrise"}};
    if (row.section == "correction" && (key == "diameter" || key == "dates"))
        design["correction"] = {{"form", key == "dates" ? "table" : "ring"}};
    if (row.section == "fixing" && key == "to")
        design["fixing"] = {{"on", "2027-06-14"}};
    if (row.section == "also: noon at")
        design["also"]["noon at"] = key == "name" ? "[{longitude: 5° E, name: " + row.example + "}]"
                                                  : "[{name: x, longitude: " + row.example + "}]";
    else if (row.section == "cutting: layers")
        design["cutting"]["layers"] =
            key == "layer" ? "[{layer: " + row.example + "}]" : "[{layer: cut, " + key + ": " + row.example + "}]";
    else if (row.section == "dates: days")
        design["dates"]["days"] =
            key == "on" ? "[{on: " + row.example + "}]" : "[{on: 14 June, label: " + row.example + "}]";
    else
        design[row.section][key] = row.example;
    return design;
}

std::string yaml_of(const Sections& design) {
    std::string text;
    for (const auto& [section, keys] : design) {
        text += section.empty() ? std::string{} : section + ":\n";
        for (const auto& [key, value] : keys)
            text += (section.empty() ? "" : "  ") + key + ": " + value + "\n";
    }
    return text;
}

void check_reads(const std::string& yaml) {
    INFO(yaml);
    const DesignReading reading = read_design(yaml, "reference.yaml");
    for (const DesignError& error : reading.errors)
        UNSCOPED_INFO(to_text(error));
    CHECK(reading.design.has_value());
}

} // namespace

TEST_CASE("the reference has every known key, and none besides", "[cli]") {
    const Reference found = reference();
    std::set<std::string> documented = found.sections;
    for (const Row& row : found.rows) {
        INFO(full_name(row.section, row.key));
        CHECK(is_known(row.section, row.key));
        documented.insert(full_name(row.section, row.key));
        for (const std::string* cell : {&row.meaning, &row.unit, &row.fallback, &row.range, &row.example})
            CHECK_FALSE(cell->empty());
    }
    for (const KnownKey& key : known_keys()) {
        INFO("docs/design-file.md has no entry for " << full_name(key.section, key.name));
        CHECK(documented.contains(full_name(key.section, key.name)));
    }
}

TEST_CASE("every example of the reference is read", "[cli]") {
    const Reference found = reference();
    for (const Row& row : found.rows)
        check_reads(yaml_of(design_around(row)));
    REQUIRE(found.blocks.size() >= 2);
    for (const std::string& block : found.blocks)
        check_reads(block);
}

TEST_CASE("the long example of the reference gives every key that can stand together", "[cli]") {
    // What its wall and its rectangle exclude.
    const std::set<std::string> others = {
        "plate: diameter",      "plate: across",  "plate: corners", "correction: diameter", "gnomon: tenons",
        "gnomon: tenon length", "gnomon: proud",  "gnomon: fit",    "gnomon: hook",         "gnomon: keel",
        "gnomon: ball",         "gnomon: socket", "gnomon: strut",  "cutting: depth",       "cutting: diameter"};
    const DesignReading reading = read_design(reference().blocks.at(1), "long.yaml");
    REQUIRE(reading.design);
    CHECK(reading.design->assumed.empty());
    for (const KnownKey& key : known_keys()) {
        INFO(full_name(key.section, key.name));
        if (!others.contains(full_name(key.section, key.name)))
            CHECK(reference().blocks.at(1).find(std::string{key.name} + ":") != std::string::npos);
    }
}
