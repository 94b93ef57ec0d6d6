// SPDX-License-Identifier: MIT
#include "layout/lettering/font_files.hpp"

#include "layout/lettering/lettering.hpp"

#include <algorithm>
#include <cctype>
#include <cmath>
#include <fontconfig/fontconfig.h>
#include <optional>
#include <set>
#include <tuple>
#include <utility>
#include <vector>

namespace dialwright::layout {
namespace {

struct Release {
    void operator()(FcPattern* pattern) const { FcPatternDestroy(pattern); }
    void operator()(FcObjectSet* names) const { FcObjectSetDestroy(names); }
    void operator()(FcFontSet* fonts) const { FcFontSetDestroy(fonts); }
    void operator()(FcConfig* list) const { FcConfigDestroy(list); }
};
using Pattern = std::unique_ptr<FcPattern, Release>;
using FontSet = std::unique_ptr<FcFontSet, Release>;

const FcChar8* as_fontconfig(const std::string& text) {
    return reinterpret_cast<const FcChar8*>(text.c_str());
}
std::string as_text(const FcChar8* text) {
    return reinterpret_cast<const char*>(text);
}

int wanted_slant(bool italic) {
    return italic ? FC_SLANT_ITALIC : FC_SLANT_ROMAN;
}
int wanted_weight(bool bold) {
    return bold ? FC_WEIGHT_BOLD : FC_WEIGHT_REGULAR;
}

double number(FcPattern* font, const char* object, double if_absent) {
    double value = if_absent;
    return FcPatternGetDouble(font, object, 0, &value) == FcResultMatch ? value : if_absent;
}

bool flag(FcPattern* font, const char* object) {
    FcBool value = FcFalse;
    return FcPatternGetBool(font, object, 0, &value) == FcResultMatch && value != FcFalse;
}

std::vector<std::string> families_of(FcPattern* font) {
    std::vector<std::string> names;
    FcChar8* name = nullptr;
    for (int i = 0; FcPatternGetString(font, FC_FAMILY, i, &name) == FcResultMatch; ++i)
        names.push_back(as_text(name));
    return names;
}

/// A pattern "variable" stands for all instances of a variable font at once; its instances are listed beside it.
bool has_outlines(FcPattern* font) {
    return flag(font, FC_OUTLINE) && !flag(font, FC_COLOR) && !flag(font, FC_VARIABLE);
}

std::optional<FontFile> file_of(FcPattern* font) {
    FcChar8* path = nullptr;
    int index = 0;
    if (FcPatternGetString(font, FC_FILE, 0, &path) != FcResultMatch)
        return std::nullopt;
    FcPatternGetInteger(font, FC_INDEX, 0, &index);
    return FontFile{as_text(path), index};
}

/// The size in points that a face is cut for, from the number at the end of one of its names; 12 without one.
double design_size(FcPattern* font) {
    for (const std::string& name : families_of(font)) {
        const std::size_t last = name.find_last_of(' ');
        if (last == std::string::npos || last + 1 == name.size() || name.size() - last > 4)
            continue;
        const std::string tail = name.substr(last + 1);
        if (std::all_of(tail.begin(), tail.end(), [](char c) { return c >= '0' && c <= '9'; }))
            return std::stod(tail);
    }
    return 12.0;
}

FontSet listed(FcPattern* pattern) {
    const std::unique_ptr<FcObjectSet, Release> names{FcObjectSetBuild(
        FC_FAMILY, FC_FILE, FC_INDEX, FC_SLANT, FC_WEIGHT, FC_WIDTH, FC_OUTLINE, FC_COLOR, FC_VARIABLE, nullptr)};
    return FontSet{FcFontList(font_list(), pattern, names.get())};
}

std::string in_small_letters(std::string text) {
    for (char& c : text)
        c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
    return text;
}

/// Letters to change, add or drop to turn one name into the other; 1 where one name holds the other.
std::size_t distance(const std::string& one, const std::string& other) {
    if (!one.empty() && (other.find(one) != std::string::npos || one.find(other) != std::string::npos))
        return 1;
    std::vector<std::size_t> row(other.size() + 1);
    for (std::size_t j = 0; j < row.size(); ++j)
        row[j] = j;
    for (std::size_t i = 1; i <= one.size(); ++i) {
        std::size_t diagonal = std::exchange(row[0], i);
        for (std::size_t j = 1; j < row.size(); ++j) {
            const std::size_t changed = diagonal + (one[i - 1] == other[j - 1] ? 0U : 1U);
            diagonal = std::exchange(row[j], std::min({row[j] + 1, row[j - 1] + 1, changed}));
        }
    }
    return row.back();
}

/// `"A", "B" and "C"`: the installed families whose names come nearest; empty if there is no font at all.
std::string nearest_families(const std::string& family) {
    const Pattern all{FcPatternCreate()};
    const FontSet fonts = listed(all.get());
    std::set<std::pair<std::size_t, std::string>> ranked;
    for (int i = 0; fonts && i < fonts->nfont; ++i) {
        if (!has_outlines(fonts->fonts[i]))
            continue;
        for (const std::string& name : families_of(fonts->fonts[i]))
            ranked.emplace(distance(in_small_letters(family), in_small_letters(name)), name);
    }
    std::string text;
    const std::size_t count = std::min<std::size_t>(3, ranked.size());
    std::size_t place = 0;
    for (const auto& [unused, name] : ranked) {
        if (place == count)
            break;
        text += (place == 0 ? "\"" : place + 1 == count ? " and \"" : ", \"") + name + "\"";
        ++place;
    }
    return text;
}

[[noreturn]] void refuse(const std::string& family, bool installed) {
    std::string message = "the font \"" + family + "\"";
    message += installed ? " has no outlines that can be drawn" : " is not installed";
    if (const std::string nearest = nearest_families(family); !nearest.empty())
        message += "; the nearest by name are " + nearest;
    throw LetteringError(message + ": install the font or name another under lettering: font");
}

} // namespace

_FcConfig* font_list() {
    static const std::unique_ptr<FcConfig, Release> fonts{FcInitLoadConfigAndFonts()};
    if (!fonts)
        throw LetteringError("the list of the fonts of this machine cannot be read: check its fontconfig set-up");
    return fonts.get();
}

FontFile font_file(std::string_view family, bool italic, bool bold) {
    const std::string name{family};
    const bool has_name = !name.empty() && name.find('\0') == std::string::npos;
    if (!has_name)
        refuse(name.substr(0, name.find('\0')), false);
    const Pattern pattern{FcPatternCreate()};
    FcPatternAddString(pattern.get(), FC_FAMILY, as_fontconfig(name));
    const FontSet fonts = listed(pattern.get());

    using Rank = std::tuple<double, double, double, double, std::string, int>;
    std::optional<std::pair<Rank, FontFile>> best;
    for (int i = 0; fonts && i < fonts->nfont; ++i) {
        FcPattern* font = fonts->fonts[i];
        const std::optional<FontFile> file = file_of(font);
        if (!file || !has_outlines(font))
            continue;
        Rank rank{std::abs(number(font, FC_SLANT, FC_SLANT_ROMAN) - wanted_slant(italic)),
                  std::abs(number(font, FC_WEIGHT, FC_WEIGHT_REGULAR) - wanted_weight(bold)),
                  std::abs(number(font, FC_WIDTH, FC_WIDTH_NORMAL) - FC_WIDTH_NORMAL),
                  std::abs(design_size(font) - 12.0),
                  file->path,
                  file->index};
        if (!best || rank < best->first)
            best.emplace(std::move(rank), *file);
    }
    if (!best)
        refuse(name, fonts && fonts->nfont > 0);
    return best->second;
}

struct StandIns::Sorted {
    FontSet all; ///< owns the patterns that `usable` points to
    std::vector<FcPattern*> usable;
};

StandIns::StandIns(std::string_view family, bool italic, bool bold) : sorted_{std::make_unique<Sorted>()} {
    const Pattern pattern{FcPatternCreate()};
    FcPatternAddString(pattern.get(), FC_FAMILY, as_fontconfig(std::string{family}));
    FcPatternAddInteger(pattern.get(), FC_SLANT, wanted_slant(italic));
    FcPatternAddInteger(pattern.get(), FC_WEIGHT, wanted_weight(bold));
    FcPatternAddBool(pattern.get(), FC_OUTLINE, FcTrue);
    // The language of the machine's user would otherwise choose the fonts.
    FcPatternAddString(pattern.get(), FC_LANG, as_fontconfig("und"));
    FcConfigSubstitute(font_list(), pattern.get(), FcMatchPattern);
    FcDefaultSubstitute(pattern.get());
    FcResult result = FcResultMatch;
    sorted_->all.reset(FcFontSort(font_list(), pattern.get(), FcFalse, nullptr, &result));
    for (int i = 0; sorted_->all && i < sorted_->all->nfont; ++i)
        if (has_outlines(sorted_->all->fonts[i]) && file_of(sorted_->all->fonts[i]))
            sorted_->usable.push_back(sorted_->all->fonts[i]);
}

StandIns::~StandIns() = default;

std::size_t StandIns::size() const {
    return sorted_->usable.size();
}

FontFile StandIns::file(std::size_t place) const {
    return file_of(sorted_->usable.at(place)).value();
}

bool StandIns::lists(std::size_t place, char32_t character) const {
    FcCharSet* characters = nullptr;
    return FcPatternGetCharSet(sorted_->usable.at(place), FC_CHARSET, 0, &characters) == FcResultMatch &&
           FcCharSetHasChar(characters, static_cast<FcChar32>(character)) != FcFalse;
}

} // namespace dialwright::layout
