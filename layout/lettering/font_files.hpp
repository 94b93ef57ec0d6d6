// SPDX-License-Identifier: MIT
#pragma once

#include <cstddef>
#include <memory>
#include <string>
#include <string_view>

struct _FcConfig; // fontconfig's own name for what its calls take as FcConfig

namespace dialwright::layout {

/// The machine's fonts as fontconfig lists them: read once (3 ms) and given back when the program ends. Every call of
/// fontconfig takes this one, since its own default would be read a second time and never be given back.
/// @throws LetteringError  the machine's set-up of fontconfig cannot be read
[[nodiscard]] _FcConfig* font_list();

/// A face in a font file of the system.
struct FontFile {
    std::string path;
    int index = 0; ///< face in the file; the upper 16 bits number a named instance of a variable font
    friend bool operator==(const FontFile&, const FontFile&) = default;
};

/// The file of an installed scalable family, through fontconfig: the same one each time on the same machine.
/// @param family  matched whole, case-insensitively, against all names that a family goes by
/// Of the family's faces the nearest in slant is taken, then in weight, then in width, then the one cut for the size
/// nearest 12 point (a number at the end of one of its names says so: "EB Garamond 08"), then the first by file name.
/// A family without a bold or an italic face therefore gives what it has.
/// @throws LetteringError  not installed, or without outlines; names up to three installed families that come nearest
[[nodiscard]] FontFile font_file(std::string_view family, bool italic = false, bool bold = false);

/// Fonts that fontconfig offers in place of a family, best first, scalable and without colour. Built only when it is
/// needed: sorting all fonts of a machine takes longer than all other lettering.
class StandIns {
  public:
    StandIns(std::string_view family, bool italic, bool bold);
    ~StandIns();
    StandIns(const StandIns&) = delete;
    StandIns& operator=(const StandIns&) = delete;

    [[nodiscard]] std::size_t size() const;
    [[nodiscard]] FontFile file(std::size_t place) const;
    /// Whether the font lists the character. Opens no file.
    [[nodiscard]] bool lists(std::size_t place, char32_t character) const;

  private:
    struct Sorted;
    std::unique_ptr<Sorted> sorted_;
};

} // namespace dialwright::layout
