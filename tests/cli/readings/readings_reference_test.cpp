// SPDX-License-Identifier: MIT
//
// Every key of a file of readings has its place in the page that describes it, and its worked example is read.
#include "cli/readings/adjust_readings.hpp"
#include "cli/readings/restore_readings.hpp"
#include "cli/readings/survey_readings.hpp"

#include <catch2/catch.hpp>

#include <fstream>
#include <iterator>
#include <string>

using namespace dialwright::cli;

namespace {

std::string page(const std::string& name) {
    std::ifstream file{std::string{DIALWRIGHT_SOURCE_DIR} + "/docs/" + name};
    return {std::istreambuf_iterator<char>{file}, {}};
}

std::string first_yaml(const std::string& text) {
    const std::size_t start = text.find("```yaml\n") + 8;
    return text.substr(start, text.find("```", start) - start);
}

void check_keys(std::span<const KnownKey> keys, const std::string& text) {
    REQUIRE(text.size() > 1000);
    for (const KnownKey& key : keys) {
        INFO(full_name(key.section, key.name));
        std::string quoted{"`"};
        quoted.append(key.name).append("`");
        CHECK(text.find(quoted) != std::string::npos);
    }
}

} // namespace

TEST_CASE("Every key of a file of readings is described", "[readings]") {
    check_keys(survey_keys(), page("survey.md"));
    check_keys(adjust_keys(), page("adjust.md"));
    check_keys(restore_keys(), page("restore.md"));
}

TEST_CASE("The worked examples are read whole", "[readings]") {
    const SurveyReading survey = read_survey(first_yaml(page("survey.md")), "x.yaml");
    REQUIRE(survey.survey);
    CHECK(survey.survey->readings.shadows.size() == 7);
    CHECK(survey.survey->at_shadows[3].line == 13);
    const RestoreReading restore = read_restore(first_yaml(page("restore.md")), "x.yaml");
    REQUIRE(restore.restore);
    CHECK(restore.restore->readings.lines.size() == 10);
    CHECK_FALSE(restore.restore->readings.lines.back().hour_h);
}

TEST_CASE("Spoilt readings never crash their readers", "[readings]") {
    for (const char* name : {"survey.md", "restore.md"}) {
        const std::string good = first_yaml(page(name));
        for (std::size_t i = 0; i < good.size(); i += 3)
            for (const char c : {':', '-', ' ', '\n', '"', '[', '9', '\xFF'}) {
                std::string bad = good;
                bad[i] = c;
                const SurveyReading survey = read_survey(bad, "x.yaml");
                CHECK(survey.survey.has_value() == survey.errors.empty());
                const RestoreReading restore = read_restore(bad, "x.yaml");
                CHECK(restore.restore.has_value() == restore.errors.empty());
            }
    }
}
