// SPDX-License-Identifier: MIT
#pragma once

#include <stdexcept>

namespace dialwright::layout {

/// A sheet or a file that can't be made. The text is for the maker.
struct ExportError : std::runtime_error {
    using std::runtime_error::runtime_error;
};

} // namespace dialwright::layout
