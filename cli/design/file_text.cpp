// SPDX-License-Identifier: MIT
#include "cli/design/file_text.hpp"
#include "cli/design/document.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <fstream>
#include <tuple>

namespace dialwright::cli {

FileText read_text_file(const std::filesystem::path& path, std::string_view what) {
    const std::string name = path.string();
    const auto unreadable = [&](std::string message, std::string hint) {
        return FileText{std::nullopt, {{name, 1, 1, "", std::move(message), std::move(hint)}}};
    };
    std::error_code trouble;
    if (std::filesystem::is_directory(path, trouble))
        return unreadable("this is a folder", fmt::format("give the {} in it", what));
    if (!std::filesystem::exists(path, trouble))
        return unreadable("there is no such file", "check its name and folder");
    std::ifstream stream{path, std::ios::binary};
    if (!stream)
        return unreadable("the file can't be opened", "check that you may read it");
    // One byte more than is accepted, so that an endless device ends too.
    std::string text(k_largest_file_bytes + 1, '\0');
    stream.read(text.data(), static_cast<std::streamsize>(text.size()));
    if (stream.bad())
        return unreadable("the file can't be read to its end", "check the disk that it is on");
    text.resize(static_cast<std::size_t>(stream.gcount()));
    return {std::move(text), {}};
}

std::vector<DesignError> first_errors(std::vector<DesignError> errors) {
    constexpr std::size_t k_most_errors = 100;
    std::stable_sort(errors.begin(), errors.end(), [](const DesignError& a, const DesignError& b) {
        return std::tie(a.line, a.column) < std::tie(b.line, b.column);
    });
    if (errors.size() > k_most_errors)
        errors.resize(k_most_errors);
    return errors;
}

} // namespace dialwright::cli
