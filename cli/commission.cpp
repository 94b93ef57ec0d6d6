// SPDX-License-Identifier: MIT
#include "cli/commission.hpp"

#include "cli/plan/correction_plan.hpp"
#include "cli/plan/feasible.hpp"
#include "layout/lettering/lettering.hpp"

#include <fmt/format.h>
#include <future>
#include <iostream>
#include <stdexcept>

namespace dialwright::cli {

namespace {

/// An equatorial slab of two faces has one pin through both, which stands with the first.
std::vector<std::vector<layout::Part>> made_gnomons(const Design& design, const std::vector<FacePlan>& plans,
                                                    const std::vector<layout::Face>& faces) {
    std::vector<std::vector<layout::Part>> gnomons(plans.size());
    const bool one_pin = design.dial.kind == DialKind::equatorial && plans.size() > 1;
    for (std::size_t i = 0; i < (one_pin ? 1 : plans.size()); ++i)
        gnomons[i] =
            layout::gnomon_parts(plans[i].dial, faces[i], plans[i].spec,
                                 {design.units == Units::inches, one_pin ? faces[1].placement.nodus_height_mm : 0.0});
    return gnomons;
}

DesignError gnomon_error(const Design& design, const std::string& message) {
    return error_at(design,
                    first_given(design, {"gnomon: joint", "gnomon: socket", "gnomon: strut", "gnomon: foot",
                                         "gnomon: thickness", "gnomon: nodus height", "gnomon"}),
                    message, "");
}

} // namespace

void tell(const std::vector<DesignError>& errors) {
    for (const DesignError& error : errors)
        std::cerr << to_text(error) << '\n';
}

std::optional<Commission> take_commission(const std::filesystem::path& file) {
    CommissionTaking taking = take_commission(read_design_file(file));
    tell(taking.errors);
    return std::move(taking.commission);
}

CommissionTaking take_commission(DesignReading reading) {
    if (!reading.design)
        return {std::nullopt, std::move(reading.errors)};
    Design& design = *reading.design;
    // The Sun's mean year and the machine's list of fonts take the longest to have: at the same time.
    auto sun = std::async(std::launch::async, [years = design.years] { return MeanYear{years.first, years.last}; });
    auto unlettered = what_cannot_be_lettered(design, "");
    MeanYear year = sun.get();
    std::vector<FacePlan> plans = face_plans(design, year);
    if (auto errors = what_cannot_be(design, year, plans); !errors.empty())
        return {std::nullopt, in_order(std::move(errors))};
    if (!unlettered.empty())
        return {std::nullopt, in_order(std::move(unlettered))};
    std::vector<layout::Face> faces;
    for (FacePlan& plan : plans) {
        try {
            faces.push_back(layout::draw_face(plan.dial, year, plan.spec));
        } catch (const layout::LetteringError& trouble) {
            return {std::nullopt, in_order(what_cannot_be_lettered(design, trouble.what()))};
        } catch (const layout::GnomonError& trouble) {
            return {std::nullopt, {gnomon_error(design, trouble.what())}};
        } catch (const layout::BordersError& trouble) {
            return {std::nullopt, {borders_error(design, trouble.what())}};
        } catch (const std::invalid_argument& trouble) {
            return {std::nullopt, {error_at(design, "plate", trouble.what(), "")}};
        }
        plan.dial.nodus_height_mm = faces.back().placement.nodus_height_mm;
    }
    if (auto errors = what_misses_the_plate(design, year, plans, faces); !errors.empty())
        return {std::nullopt, in_order(std::move(errors))};
    std::vector<std::vector<layout::Part>> gnomons;
    try {
        gnomons = made_gnomons(design, plans, faces);
    } catch (const layout::GnomonError& trouble) {
        return {std::nullopt, {gnomon_error(design, trouble.what())}};
    }
    std::optional<Correction> correction = correction_of(design, year, plans.front().dial.zone_meridian);
    std::optional<layout::CorrectionPlate> correction_plate;
    if (design.correction.wanted && correction)
        try {
            correction_plate = layout::draw_correction(*correction, correction_spec(design));
        } catch (const layout::LetteringError& trouble) {
            return {std::nullopt, in_order(what_cannot_be_lettered(design, trouble.what()))};
        } catch (const std::invalid_argument& trouble) {
            return {std::nullopt,
                    {error_at(design,
                              first_given(design, {"correction: width", "correction: diameter", "correction: height",
                                                   "correction"}),
                              trouble.what(), "make the plate larger, or give \"cutting: line width\" a finer line")}};
        }
    return {Commission{std::move(design), std::move(year), std::move(plans), std::move(faces), std::move(gnomons),
                       std::move(correction), std::move(correction_plate)},
            {}};
}

std::optional<std::size_t> face_named(const Commission& commission, const std::string& name) {
    for (std::size_t i = 0; i < commission.plans.size(); ++i)
        if (commission.plans[i].name == name)
            return i;
    std::cerr << fmt::format("--face {}: this design has no such face{}\n", name,
                             commission.plans.size() > 1
                                 ? "; it has " + commission.plans[0].name + " and " + commission.plans[1].name
                                 : std::string{" (it has only one)"});
    return std::nullopt;
}

} // namespace dialwright::cli
