// SPDX-License-Identifier: MIT
#pragma once

namespace dialwright::cli {

/// What the program tells the shell.
enum ExitStatus : int {
    k_fine = 0,
    k_error = 2,
    k_with_warnings = 3, ///< made, with something that the maker should know
};

} // namespace dialwright::cli
