// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/export_error.hpp"
#include "layout/sheet/sheet.hpp"

#include <string>

namespace dialwright::layout {

/// The book as a PDF file's bytes: pages exactly of their sheets' sizes, PrintScaling None, a bookmark a sheet, no date.
/// The same book gives the same bytes.
/// @throws ExportError  a coordinate is not finite or beyond what PDF carries, a page side is outside 5 to 5080 mm,
///                      or the library reports an error
/// Accuracy: positions as written within 0.002 mm of the sheet's.
[[nodiscard]] std::string pdf_of(const SheetBook& book);

} // namespace dialwright::layout
