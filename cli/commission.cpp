// SPDX-License-Identifier: MIT
#include "cli/commission.hpp"

#include "cli/plan/feasible.hpp"
#include "layout/lettering/lettering.hpp"

#include <fmt/format.h>
#include <iostream>
#include <stdexcept>

namespace dialwright::cli {
namespace {

void tell(const std::vector<DesignError>& errors) {
    for (const DesignError& error : errors)
        std::cerr << to_text(error) << '\n';
}

} // namespace

std::optional<Commission> take_commission(const std::filesystem::path& file) {
    DesignReading reading = read_design_file(file);
    if (!reading.design) {
        tell(reading.errors);
        return std::nullopt;
    }
    Design& design = *reading.design;
    MeanYear year{design.years.first, design.years.last};
    std::vector<FacePlan> plans = face_plans(design, year);
    if (const auto errors = what_cannot_be(design, year, plans); !errors.empty()) {
        tell(errors);
        return std::nullopt;
    }
    std::vector<layout::Face> faces;
    for (FacePlan& plan : plans) {
        try {
            faces.push_back(layout::draw_face(plan.dial, year, plan.spec));
        } catch (const layout::LetteringError& trouble) {
            tell({error_at(design, "lettering: font", trouble.what(), "")});
            return std::nullopt;
        } catch (const std::invalid_argument& trouble) {
            tell({error_at(design, "borders", trouble.what(), "make the borders narrower or the plate larger")});
            return std::nullopt;
        }
        plan.dial.nodus_height_mm = faces.back().placement.nodus_height_mm;
    }
    if (const auto errors = what_misses_the_plate(design, plans, faces); !errors.empty()) {
        tell(errors);
        return std::nullopt;
    }
    return Commission{std::move(design), std::move(year), std::move(plans), std::move(faces)};
}

} // namespace dialwright::cli
