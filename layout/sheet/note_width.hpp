// SPDX-License-Identifier: MIT
#pragma once

#include <string_view>

namespace dialwright::layout {

/// How long a note is on paper, for laying out sheets: the same font and the same advances as the PDF shows it with.
/// @param text     UTF-8, one line
/// @param size_mm  height of the em, as Note::size_mm
/// @throws LetteringError  no font for notes is installed
/// Accuracy: that of the PDF's own numbers, 0.001 of the em a character.
[[nodiscard]] double note_width_mm(std::string_view text, double size_mm, bool bold = false);

} // namespace dialwright::layout
