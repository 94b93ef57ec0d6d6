// SPDX-License-Identifier: MIT
#pragma once

#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace dialwright::cli {

/// A key that a file may hold. `section` is empty at the top of the file; a section is itself a key there.
struct KnownKey {
    std::string_view section, name;
};

/// Every key of a design file that is read. Reading, "did you mean" and the test of docs/design-file.md all draw on this table.
[[nodiscard]] std::span<const KnownKey> known_keys();
/// What follows asks the design file's table, or another kind of file's.
[[nodiscard]] bool is_known(std::string_view section, std::string_view name,
                            std::span<const KnownKey> table = known_keys());
[[nodiscard]] std::vector<std::string_view> keys_of(std::string_view section,
                                                    std::span<const KnownKey> table = known_keys());

/// "place: latitude", or "title" at the top.
[[nodiscard]] std::string full_name(std::string_view section, std::string_view name);

/// What to do about a key that is not known in `section`.
[[nodiscard]] std::string hint_for_unknown(std::string_view section, std::string_view name,
                                           std::span<const KnownKey> table = known_keys());

} // namespace dialwright::cli
