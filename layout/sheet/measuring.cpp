// SPDX-License-Identifier: MIT
#include "layout/sheet/measuring.hpp"

#include "layout/sheet/note_width.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

// The strips of a sheet, from the opening outwards:
//   right, top      the neighbours' names
//   left            the neighbour's name, the bar in y
//   bottom          the neighbour's name, the bar in x, the notes (beside the bar on wide paper, else under it)
//   lower left      the square

namespace dialwright::layout {
namespace {

constexpr double k_hair_mm = 0.15;
constexpr double k_gap_mm = 0.6;   // of the opening from the printable box where there is no strip
constexpr double k_names_mm = 4.4; // a strip of neighbours' names
constexpr double k_small_mm = 2.6, k_small_line_mm = 3.5;
constexpr double k_title_mm = 3.4, k_title_line_mm = 4.4;
constexpr double k_label_mm = 7.0, k_label_room_mm = 17.0;
constexpr double k_longest_line_mm = 190.0; // longer ones are hard to read
constexpr double k_below_bar_mm = 1.4;
constexpr double k_square_mm = 10.0;
constexpr double k_inch_mm = 25.4;

double bar_down(bool inches) {
    return inches ? k_bar_down_inches_mm : k_bar_down_mm;
}

/// The longest bar that leaves `beside_mm` of the opening's side free.
double bar_for(double side_mm, double beside_mm) {
    for (const double length : {100.0, 50.0}) {
        if (length * 1.016 + beside_mm <= side_mm) { // 4 in are 101.6 mm
            return length;
        }
    }
    return 20.0;
}

double inches_on(double bar_mm) {
    return std::max(0.5, std::floor(bar_mm / k_inch_mm + 0.1));
}

std::string bars_said(const Surround& surround) {
    const auto said = [&](double bar_mm) {
        return surround.inches ? fmt::format("{:.1f} mm and {:.3f} in", bar_mm, inches_on(bar_mm))
                               : fmt::format("{:.1f} mm", bar_mm);
    };
    const double x = surround.bar_x_mm, y = surround.bar_y_mm;
    return x == y ? said(x) + " each" : said(x) + " across, " + said(y) + " up";
}

std::string notes_text(const Surround& surround, const SheetWords& words) {
    std::string text = fmt::format("Paper: {}. Print at 100 % (actual size), never “fit to page”. Measure both bars "
                                   "before you cut, from the middle of one end tick to the middle of the other: {}. "
                                   "If either is off, do not cut: print again.",
                                   words.paper, bars_said(surround));
    if (surround.tiled) {
        text += fmt::format(" Sheet {} of {}. To join: cut through the crosses on the left and top sides and lay the "
                            "sheet on its neighbours, so that half crosses meet whole ones.",
                            words.number, words.count);
    }
    return text;
}

double notes_height(const Surround& surround) {
    return static_cast<double>(surround.title_lines.size()) * k_title_line_mm +
           static_cast<double>(surround.note_lines.size()) * k_small_line_mm + 1.0;
}

void set_notes(Surround& surround, const SheetWords& words, double room_mm) {
    const double width_mm = std::min(room_mm, k_longest_line_mm);
    surround.notes_width_mm = width_mm;
    surround.title_lines =
        words.title.empty() ? std::vector<std::string>{} : wrapped(words.title, width_mm, k_title_mm, true);
    surround.note_lines = wrapped(notes_text(surround, words), width_mm, k_small_mm, false);
}

/// Places what is drawn along x from (0, 0) at `at`, along x or (turned) along y.
void put(Sheet& sheet, const Bar& bar, Point at, bool turned) {
    const Placing placing{turned ? Angle::degrees(90) : Angle{}, at};
    for (const Mark& mark : bar.marks) {
        sheet.furniture.push_back(placing(mark));
    }
    for (Note note : bar.notes) {
        note.at = placing(note.at);
        note.turn += placing.turn;
        sheet.notes.push_back(std::move(note));
    }
}

void put_square(Sheet& sheet) {
    const Box square{sheet.printable.left_mm + k_hair_mm, sheet.printable.bottom_mm + k_hair_mm,
                     sheet.printable.left_mm + k_hair_mm + k_square_mm,
                     sheet.printable.bottom_mm + k_hair_mm + k_square_mm};
    sheet.furniture.push_back({Layer::engrave, {rectangle(square)}, k_hair_mm, false, "square"});
    sheet.notes.push_back({{square.middle().x_mm, square.middle().y_mm - 0.9}, "10 mm", 2.5, Align::middle, false, {}});
}

void put_notes(Sheet& sheet, const Box& opening, const Surround& surround, const SheetWords& words) {
    const double bar_block = k_bar_up_mm + bar_down(surround.inches);
    const double top = opening.bottom_mm - (surround.tiled ? k_names_mm : 1.0);
    const double x = opening.left_mm + (surround.notes_beside_bar ? surround.bar_x_mm * 1.016 + 6.0 : 0.0);
    double y = top - (surround.notes_beside_bar ? 0.0 : bar_block + k_below_bar_mm);
    for (const std::string& line : surround.title_lines) {
        y -= k_title_line_mm;
        sheet.notes.push_back({{x, y + 1.0}, line, k_title_mm, Align::left, true, {}});
    }
    for (const std::string& line : surround.note_lines) {
        y -= k_small_line_mm;
        sheet.notes.push_back({{x, y + 0.8}, line, k_small_mm, Align::left, false, {}});
    }
    if (!words.label.empty()) {
        sheet.notes.push_back({{opening.right_mm, top - 5.4}, words.label, k_label_mm, Align::right, true, {}});
    }
}

/// A base line and its ticks, each `step_mm` from number 0 to `last`, of heights by their number.
template <class Height>
std::vector<Path> comb(double step_mm, int last, Height height) {
    std::vector<Path> paths{polyline({{0, 0}, {step_mm * last, 0}})};
    for (int i = 0; i <= last; ++i) {
        paths.push_back(polyline({{step_mm * i, 0}, {step_mm * i, height(i)}}));
    }
    return paths;
}

/// The longest of the wordings that stands between the end ticks.
std::string wording(double room_mm, const std::string& length) {
    for (const char* more :
         {" from the middle of this end tick to the middle of that", " from end tick to end tick", ""}) {
        const std::string text = length + more;
        if (note_width_mm(text, k_small_mm) <= room_mm) {
            return text;
        }
    }
    return length;
}

} // namespace

std::vector<std::string> wrapped(std::string_view text, double width_mm, double size_mm, bool bold) {
    std::vector<std::string> lines;
    std::string line;
    while (!text.empty()) {
        const std::size_t space = std::min(text.find(' '), text.size());
        const std::string word{text.substr(0, space)};
        text.remove_prefix(std::min(space + 1, text.size()));
        if (word.empty()) {
            continue;
        }
        const std::string longer = line.empty() ? word : line + ' ' + word;
        if (!line.empty() && note_width_mm(longer, size_mm, bold) > width_mm) {
            lines.push_back(line);
            line = word;
        } else {
            line = longer;
        }
    }
    if (!line.empty()) {
        lines.push_back(line);
    }
    return lines;
}

Bar measuring_bar(double length_mm, bool inches) {
    Bar bar;
    const int tens = static_cast<int>(std::lround(length_mm / 10));
    const auto up = [tens](int i) { return i == 0 || i == tens ? k_bar_up_mm - 0.4 : i == tens / 2 ? 1.6 : 1.1; };
    bar.marks.push_back({Layer::engrave, comb(10, tens, up), k_hair_mm, false, "bar"});
    bar.notes.push_back({{length_mm / 2, 2.4},
                         wording(length_mm - 6, fmt::format("{:.1f} mm", length_mm)),
                         k_small_mm,
                         Align::middle,
                         false,
                         {}});
    if (inches) {
        const int quarters = static_cast<int>(std::lround(inches_on(length_mm) * 4));
        const double whole_mm = quarters * k_inch_mm / 4;
        const auto down = [quarters](int i) {
            return i == 0 || i == quarters ? -(k_bar_down_inches_mm - 0.4) : i % 4 == 0 ? -1.6 : -1.1;
        };
        bar.marks.push_back({Layer::engrave, comb(k_inch_mm / 4, quarters, down), k_hair_mm, false, "bar in inches"});
        bar.notes.push_back({{whole_mm / 2, -4.2},
                             wording(whole_mm - 6, fmt::format("{:.3f} in", whole_mm / k_inch_mm)),
                             k_small_mm,
                             Align::middle,
                             false,
                             {}});
    }
    return bar;
}

Surround surround_of(double width_mm, double height_mm, double margin_mm, bool inches, const SheetWords& words) {
    Surround surround;
    surround.inches = inches;
    surround.tiled = !words.label.empty();
    surround.right_mm = surround.top_mm = surround.tiled ? k_names_mm : k_gap_mm;
    const double names = surround.tiled ? k_names_mm : 1.0;
    const double bar_block = k_bar_up_mm + bar_down(inches);
    surround.left_mm = std::max(names + bar_block, k_square_mm + 2 * k_hair_mm + 1.5);
    const double width = width_mm - 2 * margin_mm - surround.left_mm - surround.right_mm;
    surround.bar_x_mm = bar_for(width, k_label_room_mm);
    surround.bar_y_mm = bar_for(height_mm - 2 * margin_mm - surround.top_mm, 45.0);

    Surround beside = surround;
    beside.notes_beside_bar = true;
    const double beside_width = width - surround.bar_x_mm * 1.016 - 6.0 - (surround.tiled ? k_label_room_mm : 0.0);
    set_notes(surround, words, width);
    surround.bottom_mm = names + bar_block + k_below_bar_mm + notes_height(surround);
    if (beside_width > 60) {
        set_notes(beside, words, beside_width);
        beside.bottom_mm = names + std::max(bar_block + k_below_bar_mm, notes_height(beside));
        if (beside.bottom_mm <= surround.bottom_mm) {
            surround = beside;
        }
    }
    surround.bottom_mm = std::max(surround.bottom_mm, k_square_mm + 2 * k_hair_mm + 1.0);
    return surround;
}

Box opening_of(double width_mm, double height_mm, double margin_mm, const Surround& surround) {
    return {margin_mm + surround.left_mm, margin_mm + surround.bottom_mm, width_mm - margin_mm - surround.right_mm,
            height_mm - margin_mm - surround.top_mm};
}

void furnish(Sheet& sheet, const Box& opening, Surround surround, const SheetWords& words) {
    set_notes(surround, words, surround.notes_width_mm);
    const double names = surround.tiled ? k_names_mm : 1.0;
    put(sheet, measuring_bar(surround.bar_x_mm, surround.inches),
        {opening.left_mm, opening.bottom_mm - names - k_bar_up_mm}, false);
    // Turned, the bar's upper side lies to the left.
    put(sheet, measuring_bar(surround.bar_y_mm, surround.inches),
        {opening.left_mm - names - bar_down(surround.inches), opening.bottom_mm}, true);
    put_square(sheet);
    put_notes(sheet, opening, surround, words);
}

} // namespace dialwright::layout
