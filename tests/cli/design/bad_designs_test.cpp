// SPDX-License-Identifier: MIT
// Each tests/bad_designs/NAME.yaml must be refused with the very lines of NAME.expect.
#include "cli/design/read_design.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <string>
#include <vector>

using namespace dialwright::cli;
namespace fs = std::filesystem;

namespace {

std::string contents_of(const fs::path& path) {
    std::ifstream stream{path, std::ios::binary};
    return {std::istreambuf_iterator<char>{stream}, {}};
}

std::vector<fs::path> bad_designs() {
    std::vector<fs::path> found;
    for (const auto& entry : fs::directory_iterator{fs::path{DIALWRIGHT_SOURCE_DIR} / "tests/bad_designs"})
        if (entry.path().extension() == ".yaml")
            found.push_back(entry.path());
    std::sort(found.begin(), found.end());
    return found;
}

} // namespace

TEST_CASE("every bad design is refused with the message beside it", "[cli]") {
    const std::vector<fs::path> found = bad_designs();
    REQUIRE(found.size() > 150);
    for (const fs::path& path : found) {
        INFO(path.filename().string());
        const DesignReading reading = read_design(contents_of(path), path.filename().string());
        CHECK_FALSE(reading.design.has_value());
        std::string said;
        for (const DesignError& error : reading.errors) {
            said += to_text(error) + '\n';
            CHECK_FALSE(error.message.empty());
        }
        fs::path expected = path;
        expected.replace_extension(".expect");
        REQUIRE(fs::exists(expected));
        CHECK(said == contents_of(expected));
    }
}

TEST_CASE("errors come in the order of the file", "[cli]") {
    for (const fs::path& path : bad_designs()) {
        INFO(path.filename().string());
        const DesignReading reading = read_design(contents_of(path), "x");
        CHECK(std::is_sorted(reading.errors.begin(), reading.errors.end(),
                             [](const DesignError& a, const DesignError& b) {
                                 return std::pair{a.line, a.column} < std::pair{b.line, b.column};
                             }));
    }
}
