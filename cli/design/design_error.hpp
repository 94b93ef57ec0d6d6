// SPDX-License-Identifier: MIT
#pragma once

#include <string>

namespace dialwright::cli {

/// Something in a design file that a maker has to put right.
struct DesignError {
    std::string file;
    int line = 1, column = 1; ///< from 1; columns count characters
    std::string key;          ///< "place: latitude"; empty where no key is at fault
    std::string message;      ///< what was found
    std::string hint;         ///< what would be right; may be empty
};

/// One line: "file:line:column: key: message: hint", with what is empty left out.
[[nodiscard]] inline std::string to_text(const DesignError& error) {
    std::string text = error.file + ':' + std::to_string(error.line) + ':' + std::to_string(error.column);
    for (const std::string* part : {&error.key, &error.message, &error.hint})
        if (!part->empty())
            text += ": " + *part;
    return text;
}

} // namespace dialwright::cli
