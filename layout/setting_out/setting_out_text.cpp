// SPDX-License-Identifier: MIT
#include "layout/setting_out/setting_out.hpp"

#include "layout/text/figures.hpp"

#include <fmt/format.h>

namespace dialwright::layout {
namespace {

std::string length_text(double mm, bool inches) {
    return inches ? sixty_fourths(mm) : fixed(mm, 1);
}

std::string quoted(const std::string& text) {
    if (text.find_first_of(",\"\r\n") == std::string::npos)
        return text;
    std::string made{'"'};
    for (const char c : text)
        made.append(c == '"' ? 2 : 1, c);
    made += '"';
    return made;
}

void add_row(std::string& csv, const std::vector<std::string>& cells) {
    for (std::size_t i = 0; i < cells.size(); ++i)
        csv.append(i > 0 ? "," : "").append(quoted(cells[i]));
    csv += '\n';
}

/// Line, point, x, y, border, from, along, pole, radius, angle in degrees, angle, chord, diameter.
std::vector<std::string> cells_of(const SettingOutPoint& p, bool inches) {
    const auto say = [&](double mm) { return length_text(mm, inches); };
    return {p.line,
            p.what,
            say(p.at.x_mm),
            say(p.at.y_mm),
            p.border ? p.border->side : "",
            p.border ? fmt::format("{}{}{}", p.border->from, p.border->way.empty() ? "" : ", ", p.border->way) : "",
            p.border ? say(p.border->along_mm) : "",
            p.pole,
            say(p.radius_mm),
            fixed(p.angle.in_degrees(), 4),
            degrees_minutes(p.angle),
            say(p.chord_mm),
            p.diameter_mm > 0 ? say(p.diameter_mm) : ""};
}

} // namespace

SettingOutTable table_of_lines(const SettingOut& out) {
    const char* unit = out.inches ? "in" : "mm";
    SettingOutTable table{{"Line", "Point", fmt::format("x {}", unit), fmt::format("y {}", unit),
                           fmt::format("Along {}", unit), "From", "Pole", fmt::format("Radius {}", unit),
                           "Angle, clockwise +", fmt::format("Chord {}", unit)},
                          {}};
    const std::string* before = nullptr;
    for (const SettingOutPoint& p : out.points) {
        const auto c = cells_of(p, out.inches);
        // A line's name stands once, before its first point.
        table.rows.push_back(
            {before && *before == p.line ? "" : c[0], c[1], c[2], c[3], c[6], c[5], c[7], c[8], c[10], c[11]});
        before = &p.line;
    }
    return table;
}

SettingOutTable table_of_holes(const SettingOut& out) {
    const char* unit = out.inches ? "in" : "mm";
    SettingOutTable table{{"Hole", fmt::format("Diameter {}", unit), fmt::format("x {}", unit),
                           fmt::format("y {}", unit), fmt::format("Radius {}", unit), "Angle, clockwise +",
                           fmt::format("Chord {}", unit)},
                          {}};
    for (const SettingOutPoint& p : out.holes) {
        const auto c = cells_of(p, out.inches);
        table.rows.push_back({c[0], c[12], c[2], c[3], c[8], c[10], c[11]});
    }
    return table;
}

std::string csv_of(const SettingOut& out) {
    const std::string u = out.inches ? "_in" : "_mm";
    std::string csv;
    add_row(csv, {"line", "point", "x" + u, "y" + u, "border", "from", "along" + u, "pole", "radius" + u, "angle_deg",
                  "angle", "chord" + u, "diameter" + u});
    const auto say = [&](double mm) { return length_text(mm, out.inches); };
    add_row(csv, {"datum", out.datum, say(0), say(0), "", "", "", "", "", "", "", "", ""});
    for (const Datum::NamedPoint& pole : out.poles)
        add_row(csv, {"pole", pole.name, say(pole.at.x_mm), say(pole.at.y_mm), "", "", "", "", "", "", "", "", ""});
    add_row(csv, {"chord circle", out.zero_line, "", "", "", "", "", "", say(out.chord_radius_mm), "0.0000", "0° 00.0'",
                  say(0), ""});
    for (const auto* points : {&out.points, &out.holes})
        for (const SettingOutPoint& p : *points)
            add_row(csv, cells_of(p, out.inches));
    return csv;
}

} // namespace dialwright::layout
