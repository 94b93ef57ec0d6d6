// SPDX-License-Identifier: MIT
#include "cli/design/polygon.hpp"
#include "cli/design/sections.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <cmath>

namespace dialwright::cli {

namespace {

constexpr std::array<Choice<PlateShape>, 5> k_shapes = {{{"round", PlateShape::round},
                                                         {"oval", PlateShape::oval},
                                                         {"rectangle", PlateShape::rectangle},
                                                         {"octagon", PlateShape::octagon},
                                                         {"polygon", PlateShape::polygon}}};
constexpr std::size_t k_most_corners = 200;

struct SizeKey {
    std::string_view key;
    PlateShape shape;
};
constexpr std::array<SizeKey, 5> k_size_keys = {{{"diameter", PlateShape::round},
                                                 {"width", PlateShape::rectangle},
                                                 {"height", PlateShape::rectangle},
                                                 {"across", PlateShape::octagon},
                                                 {"corners", PlateShape::polygon}}};

std::string_view name_of(PlateShape shape) {
    for (const auto& [word, value] : k_shapes)
        if (value == shape)
            return word;
    return {};
}

/// What a plate of this shape is measured by.
std::string_view size_hint(PlateShape shape) {
    switch (shape) {
    case PlateShape::round:
        return "a round plate has a diameter, as in \"diameter: 360 mm\"";
    case PlateShape::rectangle:
        return "a rectangle has a width and a height, as in \"width: 400 mm\" and \"height: 300 mm\"";
    case PlateShape::oval:
        return "an oval has a width and a height, as in \"width: 400 mm\" and \"height: 300 mm\"";
    case PlateShape::octagon:
        return "an octagon is measured across its flats, as in \"across: 300 mm\"";
    case PlateShape::polygon:
        return "a polygon has corners, as in \"corners: [[0 mm, 0 mm], [400 mm, 0 mm], [200 mm, 300 mm]]\"";
    }
    return {};
}

/// The shape that the file names, or else the one that its sizes belong to.
std::optional<PlateShape> shape_of(Design& design, const Section& plate) {
    if (plate.has("shape"))
        return plate.choice<PlateShape>("shape", k_shapes);
    for (const SizeKey& size : k_size_keys)
        if (plate.has(size.key)) {
            design.assumed.push_back(
                {"plate: shape", std::string{name_of(size.shape)},
                 fmt::format("the plate has a {}", size.key == "corners" ? "list of corners" : size.key)});
            return size.shape;
        }
    const auto meant = [&](const SizeKey& size) { return plate.misspelt(size.key); };
    if (std::none_of(k_size_keys.begin(), k_size_keys.end(), meant))
        plate.error_here("the plate has no size", "give its diameter; or width and height; or across; or corners");
    return std::nullopt;
}

/// Corner and side numbers in messages start at 1.
bool check_polygon(const std::vector<PlatePointMm>& corners, const Section& plate) {
    const auto sides = first_sides_in_trouble(corners);
    const auto side_name = [&](std::size_t i) { return fmt::format("{}–{}", i + 1, (i + 1) % corners.size() + 1); };
    if (sides && sides->first == sides->second) {
        plate.error("corners", fmt::format("the side {} has no length", side_name(sides->first)),
                    "leave out the corner that is given twice");
        return false;
    }
    if (sides) {
        plate.error("corners",
                    fmt::format("the side {} crosses or touches the side {}", side_name(sides->first),
                                side_name(sides->second)),
                    "give the corners in the order in which they follow round the edge");
        return false;
    }
    return true;
}

void read_corners(Plate& made, const Section& plate) {
    const Entry* entry = plate.entry("corners");
    if (entry == nullptr || entry->value.kind == Node::Kind::refused)
        return;
    const Node& list = entry->value;
    if (list.kind != Node::Kind::list || list.items.size() < 3 || list.items.size() > k_most_corners) {
        const std::string found = list.kind == Node::Kind::list ? fmt::format("{} corners are given", list.items.size())
                                                                : fmt::format("{} stands where a list of corners is "
                                                                              "wanted",
                                                                              kind_name(list));
        plate.error(
            "corners", found,
            fmt::format("give 3 to {}, as in [[0 mm, 0 mm], [400 mm, 0 mm], [200 mm, 300 mm]]", k_most_corners));
        return;
    }
    std::vector<PlatePointMm> corners;
    for (const Node& item : list.items)
        if (const auto point = read_point(item, "plate: corners", k_largest_plate_mm, plate.state()))
            corners.push_back(*point);
    if (corners.size() != list.items.size() || !check_polygon(corners, plate))
        return;
    const auto [left, right] = std::minmax_element(
        corners.begin(), corners.end(), [](const auto& a, const auto& b) { return a.right_mm < b.right_mm; });
    const auto [low, high] = std::minmax_element(corners.begin(), corners.end(),
                                                 [](const auto& a, const auto& b) { return a.up_mm < b.up_mm; });
    const double width = right->right_mm - left->right_mm, height = high->up_mm - low->up_mm;
    const std::string range =
        fmt::format("give {} to {} each way", length_text(k_smallest_plate_mm, plate.state().units),
                    length_text(k_largest_plate_mm, plate.state().units));
    if (std::min(width, height) < k_smallest_plate_mm || std::max(width, height) > k_largest_plate_mm) {
        plate.error("corners",
                    fmt::format("the plate is {} by {}", length_text(width, plate.state().units),
                                length_text(height, plate.state().units)),
                    range);
        return;
    }
    if (std::abs(twice_area_mm2(corners)) < 0.02 * width * height) {
        plate.error("corners", "the plate has next to no area", "check the corners");
        return;
    }
    made.corners = std::move(corners);
    made.width_mm = width;
    made.height_mm = height;
}

/// Which shape's keys a plate is measured by: an oval has the sides of its rectangle.
PlateShape measured_as(PlateShape shape) {
    return shape == PlateShape::oval ? PlateShape::rectangle : shape;
}

void read_size(Plate& made, const Section& plate) {
    const auto side = [&](std::string_view key) { return plate.length(key, k_smallest_plate_mm, k_largest_plate_mm); };
    for (const SizeKey& size : k_size_keys) {
        if (size.shape != measured_as(made.shape))
            plate.refuse({size.key}, fmt::format("\"{}\" does not go with the shape {}", size.key, name_of(made.shape)),
                         std::string{size_hint(made.shape)});
        else if (!plate.has(size.key))
            plate.missing(size.key, std::string{size_hint(made.shape)});
    }
    if (made.shape == PlateShape::polygon) {
        read_corners(made, plate);
    } else if (made.shape == PlateShape::rectangle || made.shape == PlateShape::oval) {
        made.width_mm = side("width").value_or(0.0);
        made.height_mm = side("height").value_or(0.0);
    } else {
        made.width_mm = made.height_mm = side(made.shape == PlateShape::round ? "diameter" : "across").value_or(0.0);
    }
}

} // namespace

double smaller_side_mm(const Plate& plate) {
    return std::min(plate.width_mm, plate.height_mm);
}

void read_plate(Design& design, const Section& top) {
    if (!top.has("plate")) {
        top.missing("plate", "say how large the plate is, as in \"diameter: 360 mm\", indented below \"plate:\"");
        return;
    }
    const Section plate{top.entry("plate"), "plate", top.state()};
    if (!plate.given())
        return;
    if (const auto shape = shape_of(design, plate)) {
        design.plate.shape = *shape;
        read_size(design.plate, plate);
    }
    if (const Entry* centre = plate.entry("centre"))
        design.plate.centre = read_point(centre->value, "plate: centre", k_largest_plate_mm, top.state());
    if (const auto material = plate.line("material", 200))
        design.plate.material = *material;
    if (const auto mm = plate.length("thickness", 0.3, 1000.0))
        design.plate.thickness_mm = *mm;
}

} // namespace dialwright::cli
