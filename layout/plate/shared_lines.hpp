// SPDX-License-Identifier: MIT
#pragma once

#include "engine/dial/delineation.hpp"
#include "layout/plate/outline.hpp"

#include <string>
#include <utility>
#include <vector>

namespace dialwright::layout {

/// Lines of different families that run along each other: each is cut once. Hours since sunset and hours left until the
/// next are the same lines; so are hours of the Sun and of the zone on the zone's meridian.
class SharedLines {
  public:
    /// A part of a line that is on the plate. The line and its label must live on.
    void add(const DialLine& line, std::string label, const Polyline& part);
    /// Whether a part of another line lies along one of those, within a hair, for all its length; it is then noted.
    [[nodiscard]] bool has(const DialLine& line, const std::string& label, const Polyline& part);
    /// What the maker should know: by families where they share most of their lines.
    [[nodiscard]] std::vector<std::string> told() const;

  private:
    struct Part {
        const DialLine* line;
        std::string label;
        Polyline points;
        Box reach;
    };
    struct Pair {
        const DialLine *there, *other;
        std::string there_label, other_label;
    };
    [[nodiscard]] static bool covers(const Part& whole, const Polyline& part);

    std::vector<Part> parts_;
    std::vector<Pair> pairs_;
};

} // namespace dialwright::layout
