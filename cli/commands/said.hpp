// SPDX-License-Identifier: MIT
#pragma once

#include "cli/exit_status.hpp"

#include <iostream>

namespace dialwright::cli {

/// Ends a command's output: its status, or an error where standard output did not take all (a full disk behind it).
[[nodiscard]] inline int said(int status) {
    if (std::cout.flush())
        return status;
    std::cerr << "standard output did not take all that was written to it\n";
    return k_error;
}

} // namespace dialwright::cli
