// SPDX-License-Identifier: MIT
#include "tests/published/published.hpp"

#include <algorithm>
#include <charconv>
#include <filesystem>
#include <fstream>
#include <stdexcept>
#include <string_view>

namespace published {
namespace {

std::string trimmed(std::string_view text) {
    const auto first = text.find_first_not_of(" \t\r");
    if (first == std::string_view::npos)
        return {};
    return std::string{text.substr(first, text.find_last_not_of(" \t\r") - first + 1)};
}

double to_number(const std::string& text) {
    double value = 0.0;
    const char* first = text.data() + (!text.empty() && text.front() == '+' ? 1 : 0);
    const auto [end, error] = std::from_chars(first, text.data() + text.size(), value);
    if (error != std::errc{} || end != text.data() + text.size())
        throw std::runtime_error("not a number: \"" + text + "\"");
    return value;
}

Expectation to_expectation(const std::string& name, const std::string& value) {
    constexpr std::string_view k_within = " within ";
    const auto at = value.find(k_within);
    if (at == std::string::npos)
        return {name, value, std::nullopt};
    return {name, trimmed(value.substr(0, at)), to_number(trimmed(value.substr(at + k_within.size())))};
}

void read_line(const std::string& line, const std::string& file, std::string& source, std::vector<Case>& cases) {
    const auto colon = line.find(": ");
    if (colon == std::string::npos)
        throw std::runtime_error("no \": \" in \"" + line + "\"");
    const std::string key = trimmed(line.substr(0, colon)), value = trimmed(line.substr(colon + 2));
    if (key == "source") {
        source = value;
    } else if (key == "check") {
        if (source.empty())
            throw std::runtime_error("a case without a source");
        cases.push_back({file, source, value, {}, {}});
    } else if (cases.empty()) {
        throw std::runtime_error("\"" + key + "\" before the first check");
    } else if (key.starts_with("given ")) {
        cases.back().given[key.substr(6)] = value;
    } else if (key.starts_with("expect ")) {
        cases.back().expected.push_back(to_expectation(key.substr(7), value));
    } else {
        throw std::runtime_error("unknown key \"" + key + "\"");
    }
}

std::vector<Case> cases_of_file(const std::filesystem::path& path) {
    std::ifstream file{path};
    std::vector<Case> cases;
    std::string source, line;
    for (int number = 1; std::getline(file, line); ++number) {
        const std::string content = trimmed(line.substr(0, line.find('#')));
        if (content.empty())
            continue;
        try {
            read_line(content, path.filename().string(), source, cases);
        } catch (const std::runtime_error& error) {
            throw std::runtime_error(path.string() + ":" + std::to_string(number) + ": " + error.what());
        }
    }
    return cases;
}

} // namespace

double Expectation::number() const {
    return to_number(value);
}

const std::string& Case::text(const std::string& name) const {
    const auto found = given.find(name);
    if (found == given.end())
        throw std::runtime_error(file + ": \"given " + name + "\" is missing");
    return found->second;
}

double Case::number(const std::string& name) const {
    return to_number(text(name));
}

std::vector<Case> cases_in(const std::string& folder) {
    const std::filesystem::path path = std::filesystem::path{DIALWRIGHT_SOURCE_DIR} / "tests/published" / folder;
    std::vector<std::filesystem::path> files;
    for (const auto& entry : std::filesystem::directory_iterator{path})
        if (entry.path().extension() == ".txt")
            files.push_back(entry.path());
    std::sort(files.begin(), files.end());
    std::vector<Case> cases;
    for (const auto& file : files) {
        const auto more = cases_of_file(file);
        if (more.empty())
            throw std::runtime_error(file.string() + ": no case in it");
        cases.insert(cases.end(), more.begin(), more.end());
    }
    if (cases.empty())
        throw std::runtime_error(path.string() + ": no published values");
    return cases;
}

} // namespace published
