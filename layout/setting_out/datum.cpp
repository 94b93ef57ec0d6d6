// SPDX-License-Identifier: MIT
#include "layout/setting_out/datum.hpp"

#include "layout/plate/points.hpp"
#include "layout/text/figures.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_upright_mm = 1e-6;

std::string letter(std::size_t i) {
    return i < 26 ? fmt::format("{}", static_cast<char>('A' + i)) : fmt::format("{}", i + 1);
}

} // namespace

std::string say_place(const BorderPlace& place, bool inches) {
    const std::string along = say_length(place.along_mm, inches);
    return place.way.empty()
               ? fmt::format("{} {} from the {}", place.side, along, place.from)
               : fmt::format("{} {} {} of the {}, straight across", place.side, along, place.way, place.from);
}

Datum::Datum(Outline border, std::string what) : border_{std::move(border)}, what_{std::move(what)} {
    if (border_.is_round()) {
        const Point c = border_.centre();
        const double r = border_.radius_mm();
        marks_ = {
            {"middle of the plate", c}, {"top mark", {c.x_mm, c.y_mm + r}}, {"right-hand mark", {c.x_mm + r, c.y_mm}}};
        return;
    }
    name_corners();
}

void Datum::name_corners() {
    corners_ = border_.corners();
    std::reverse(corners_.begin(), corners_.end());
    const auto low_left = [](Point a, Point b) {
        const double sa = a.x_mm + a.y_mm, sb = b.x_mm + b.y_mm;
        return std::abs(sa - sb) > k_upright_mm ? sa < sb
                                                : a.y_mm < b.y_mm - k_upright_mm; // of two that are level, the lower
    };
    std::rotate(corners_.begin(), std::min_element(corners_.begin(), corners_.end(), low_left), corners_.end());
    const auto same = [](double a, double b) { return std::abs(a - b) < k_upright_mm; };
    upright_rectangle_ = corners_.size() == 4 && same(corners_[0].x_mm, corners_[1].x_mm) &&
                         same(corners_[1].y_mm, corners_[2].y_mm) && same(corners_[2].x_mm, corners_[3].x_mm) &&
                         same(corners_[3].y_mm, corners_[0].y_mm);
    static constexpr const char* k_names[] = {"lower left corner", "upper left corner", "upper right corner",
                                              "lower right corner"};
    for (std::size_t i = 0; i < corners_.size(); ++i)
        marks_.push_back(
            {upright_rectangle_ ? std::string{k_names[i]} : fmt::format("corner {}", letter(i)), corners_[i]});
}

BorderPlace Datum::place_of(Point p) const {
    if (border_.is_round()) {
        const bool right = p.x_mm >= border_.centre().x_mm;
        return {what_, "top mark", right ? "right" : "left", distance(p, marks_[1].at)};
    }
    std::size_t nearest = 0;
    double least = 1e300;
    for (std::size_t i = 0; i < corners_.size(); ++i)
        if (const double off = distance_to_side(p, corners_[i], corners_[(i + 1) % corners_.size()]);
            off < least - 1e-9) {
            least = off;
            nearest = i;
        }
    const std::size_t next = (nearest + 1) % corners_.size();
    if (!upright_rectangle_)
        return {fmt::format("side {}{}", letter(nearest), letter(next)), marks_[nearest].name, "",
                distance(p, corners_[nearest])};
    // Level sides from the left, upright ones from below.
    static constexpr const char* k_sides[] = {"left", "top", "right", "bottom"};
    const std::size_t from = nearest >= 2 ? next : nearest;
    return {fmt::format("{} {}", k_sides[nearest], what_), marks_[from].name, "", distance(p, corners_[from])};
}

std::vector<Datum::NamedPoint> Datum::pair_of_marks() const {
    if (border_.is_round())
        return {marks_[1], marks_[2]};
    return {marks_[0], upright_rectangle_ ? marks_[3] : marks_[marks_.size() / 2]};
}

std::vector<std::string> Datum::checks(bool inches) const {
    const auto say = [&](double mm) { return say_length(mm, inches); };
    if (border_.is_round())
        return {fmt::format("the {} is {} across, every way", what_, say(2 * border_.radius_mm())),
                fmt::format("the top mark and the right-hand mark stand {} apart",
                            say(distance(marks_[1].at, marks_[2].at)))};
    if (upright_rectangle_)
        return {fmt::format("both diagonals of the {} measure {}", what_, say(distance(corners_[0], corners_[2])))};
    std::vector<std::string> sentences;
    for (std::size_t i = 2; i + 1 < corners_.size(); ++i)
        sentences.push_back(fmt::format("{} to {} measures {}", marks_[0].name, marks_[i].name,
                                        say(distance(corners_[0], corners_[i]))));
    return sentences;
}

} // namespace dialwright::layout
