// SPDX-License-Identifier: MIT
#include "engine/site/skyline.hpp"

#include <algorithm>
#include <stdexcept>

namespace dialwright {

Skyline::Skyline(std::vector<Mark> marks) : marks_{std::move(marks)} {
    if (marks_.size() < 2)
        throw std::invalid_argument("a skyline needs at least two marks");
    for (std::size_t i = 0; i < marks_.size(); ++i) {
        if (i > 0 && !(marks_[i - 1].azimuth < marks_[i].azimuth))
            throw std::invalid_argument("the azimuths of a skyline must rise from mark to mark");
        if (!(marks_[i].altitude >= Angle{} && marks_[i].altitude < Angle::degrees(90)))
            throw std::invalid_argument("a skyline's altitude must be from 0° to less than 90°");
        highest_sine_ = std::max(highest_sine_, sin(marks_[i].altitude));
    }
    if (marks_.back().azimuth - marks_.front().azimuth >= Angle::degrees(360))
        throw std::invalid_argument("the azimuths of a skyline must lie within one turn");
}

Angle Skyline::altitude_at(Angle azimuth) const {
    if (flat())
        return Angle{};
    const Angle turn = Angle::degrees(360);
    const Angle from_first = (azimuth - marks_.front().azimuth).positive_turn();
    const auto next =
        std::upper_bound(marks_.begin() + 1, marks_.end(), from_first, [&](Angle turned, const Mark& mark) {
            return turned < mark.azimuth - marks_.front().azimuth;
        });
    const Mark& before = *(next - 1);
    const Mark after = next != marks_.end() ? *next : Mark{marks_.front().azimuth + turn, marks_.front().altitude};
    const double part = (from_first - (before.azimuth - marks_.front().azimuth)) / (after.azimuth - before.azimuth);
    return before.altitude + part * (after.altitude - before.altitude);
}

} // namespace dialwright
