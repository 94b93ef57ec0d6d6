// SPDX-License-Identifier: MIT
#pragma once

#include <map>
#include <optional>
#include <string>
#include <vector>

/// Published values, one small text file a source, that anyone can add to. A file is lines of
///
///     source: book or paper, edition, page or example; "from memory" if the source was not at hand
///     check: what is compared (the tests that read the folder list what they know)
///     given latitude_deg: 39.742476
///     expect declination_deg: -9.31434 within 0.000005    # half the last printed digit, or the reason for more
///     expect rise: nothing
///
/// A further `check:` line begins a further case of the same source. What follows a # is for the reader.
namespace published {

struct Expectation {
    std::string name;
    std::string value;            ///< as printed
    std::optional<double> within; ///< in the unit that the name ends with
    [[nodiscard]] bool nothing() const { return value == "nothing"; }
    [[nodiscard]] double number() const;
};

struct Case {
    std::string file;
    std::string source;
    std::string check;
    std::map<std::string, std::string> given;
    std::vector<Expectation> expected;

    [[nodiscard]] const std::string& text(const std::string& name) const;
    [[nodiscard]] double number(const std::string& name) const;
};

/// All cases in tests/published/<folder>, by file name.
/// @throws std::runtime_error  names the file and line that cannot be read, a missing source, an empty folder
[[nodiscard]] std::vector<Case> cases_in(const std::string& folder);

} // namespace published
