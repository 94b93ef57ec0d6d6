// SPDX-License-Identifier: MIT
#include "cli/report/accuracy.hpp"

#include "cli/report/accuracy_words.hpp"
#include "cli/report/json_text.hpp"
#include "cli/report/say.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <iterator>

namespace dialwright::cli {
namespace {

/// A centre that is farther from the plate than this many times its size holds no style: the style stands on the plate.
constexpr double k_centre_in_reach = 1.5;

/// Where a face's style or pin is fixed, plate frame (u, v, above).
Eigen::Vector3d pivot_of(const Design& design, const FacePlan& plan, const layout::Face& face) {
    const double height = plan.dial.nodus_height_mm;
    const PlateFrame& frame = face.delineation.frame;
    if (!has_style(design.gnomon.kind)) {
        const bool plumb = design.gnomon.kind == GnomonKind::upright_pin && frame.n.z() > 0.01;
        if (!plumb)
            return Eigen::Vector3d::Zero();
        const double along = height / frame.n.z(); // down the plumb line from the nodus
        return {-along * frame.u.z(), -along * frame.v.z(), 0};
    }
    const auto& centre = face.delineation.style.centre;
    const double size = std::hypot(design.plate.width_mm, design.plate.height_mm);
    if (centre && std::hypot(centre->u_mm, centre->v_mm) < k_centre_in_reach * size)
        return {centre->u_mm, centre->v_mm, 0};
    return {0, 0, height};
}

SlipSizes sizes_of(const Tolerances& own) {
    SlipSizes sizes;
    sizes.marking_mm = own.marking_mm;
    sizes.style_height = own.style_height;
    sizes.substyle = own.substyle;
    sizes.facing = own.facing;
    sizes.lean = own.lean;
    sizes.print = own.print_mm / 100.0;
    sizes.position = own.position;
    return sizes;
}

void add_lines(FaceAccuracy& made, const layout::Face& face) {
    const Eigen::Vector3d& pivot = made.plan.pivot_mm;
    for (const layout::DrawnLine& line : face.lines) {
        if (line.set != 0 || !is_hour(line.family) || line.step_min != 60)
            continue;
        auto known = std::find_if(made.plan.lines.begin(), made.plan.lines.end(),
                                  [&](const AccuracyPlan::Line& one) { return one.time_h == line.time_h; });
        if (known == made.plan.lines.end()) {
            made.labels.push_back(line.label);
            known = made.plan.lines.insert(made.plan.lines.end(), {line.time_h, {}, 0.0});
        }
        for (const PlatePoint p : line.points)
            if (const double reach = std::hypot(p.u_mm - pivot.x(), p.v_mm - pivot.y()); reach > known->reach_mm) {
                known->reach_mm = reach;
                known->outer = p;
            }
    }
}

Json cell_json(const AccuracyCell& cell) {
    Json out;
    for (std::size_t i = 0; i < k_slips.size(); ++i)
        if (cell.minutes[i])
            out[slip_name(k_slips[i])] = json_number(*cell.minutes[i]);
    return {{"at_mm", {json_number(cell.at.u_mm), json_number(cell.at.v_mm)}},
            {"slips_min", std::move(out)},
            {"total_min", json_number(cell.total_min)},
            {"most", slip_name(cell.most)}};
}

Json face_json(const FaceAccuracy& face, const std::string& name) {
    Json out;
    out["face"] = name;
    const SlipSizes& sizes = face.plan.sizes;
    out["sizes"] = {{"half_shadow_deg", json_number(sizes.half_shadow.in_degrees())},
                    {"marking_mm", json_number(sizes.marking_mm)},
                    {"style_height_deg", json_number(sizes.style_height.in_degrees())},
                    {"substyle_deg", json_number(sizes.substyle.in_degrees())},
                    {"facing_deg", json_number(sizes.facing.in_degrees())},
                    {"lean_deg", json_number(sizes.lean.in_degrees())},
                    {"print_per_100_mm", json_number(100 * sizes.print)},
                    {"position_deg", json_number(sizes.position.in_degrees())}};
    out["supported"] = Json::array();
    for (const Supported& one : face.supported)
        out["supported"].push_back({{"minutes", json_number(one.minutes)},
                                    {"from_h", json_number(one.first_h)},
                                    {"to_h", json_number(one.last_h)}});
    out["lines"] = Json::array();
    for (std::size_t i = 0; i < face.lines.size(); ++i) {
        const AccuracyLine& line = face.lines[i];
        Json seasons;
        for (std::size_t k = 0; k < line.at.size(); ++k)
            seasons[k_season_keys[k]] = line.at[k] ? cell_json(*line.at[k]) : Json(nullptr);
        out["lines"].push_back(
            {{"label", face.labels[i]}, {"time_h", json_number(line.time_h)}, {"at", std::move(seasons)}});
    }
    return out;
}

} // namespace

std::vector<FaceAccuracy> accuracy_of(const Commission& commission) {
    const Design& design = commission.design;
    std::vector<FaceAccuracy> faces;
    for (std::size_t i = 0; i < commission.faces.size(); ++i) {
        FaceAccuracy made;
        AccuracyPlan& plan = made.plan;
        plan.dial = commission.plans[i].dial;
        plan.by_nodus = !has_style(design.gnomon.kind) || design.hours.reach == HourExtent::nodus ||
                        family_of(design.hours.time) != Family::hour;
        plan.at_outer_end = design.gnomon.kind == GnomonKind::edge;
        plan.level = design.dial.kind == DialKind::level;
        plan.pivot_mm = pivot_of(design, commission.plans[i], commission.faces[i]);
        plan.stretch_from = {plan.pivot_mm.x(), plan.pivot_mm.y()};
        plan.sizes = sizes_of(design.tolerances);
        add_lines(made, commission.faces[i]);
        made.lines = accuracy_of(plan, commission.year);
        made.supported = supported_readings(made.lines);
        faces.push_back(std::move(made));
    }
    return faces;
}

std::string accuracy_text(const Commission& commission, const std::vector<FaceAccuracy>& faces) {
    std::string text = fmt::format("How good {} will be\n", commission.design.title);
    const auto put = std::back_inserter(text);
    for (std::size_t i = 0; i < faces.size(); ++i) {
        const FaceAccuracy& face = faces[i];
        if (!commission.plans[i].spec.name.empty())
            fmt::format_to(put, "\n{}\n", commission.plans[i].spec.name);
        for (const std::string& line : accuracy_words(commission, face))
            fmt::format_to(put, "  {}\n", line);
        fmt::format_to(put, "\n  Minutes of error, by squares of all slips; then each slip at its worst season\n{}",
                       text_table(accuracy_columns(face), accuracy_rows(face), 2));
    }
    fmt::format_to(put, "\n{}\n", k_accuracy_note);
    return text;
}

std::string accuracy_json(const Commission& commission, const std::vector<FaceAccuracy>& faces) {
    Json out{{"format", 1}, {"title", commission.design.title}, {"faces", Json::array()}};
    for (std::size_t i = 0; i < faces.size(); ++i)
        out["faces"].push_back(face_json(faces[i], commission.plans[i].name));
    return json_text(out);
}

std::string accuracy_csv(const Commission& commission, const std::vector<FaceAccuracy>& faces) {
    std::string text = "face,label,time_h,season,u_mm,v_mm,total_min";
    for (const SlipKind kind : k_slips)
        text.append(",").append(slip_name(kind)).append("_min");
    text += '\n';
    for (std::size_t i = 0; i < faces.size(); ++i)
        for (std::size_t k = 0; k < faces[i].lines.size(); ++k)
            for (std::size_t season = 0; season < 3; ++season) {
                const auto& cell = faces[i].lines[k].at[season];
                if (!cell)
                    continue;
                fmt::format_to(std::back_inserter(text), "{},{},{},{},{},{},{}", commission.plans[i].name,
                               faces[i].labels[k], fixed(faces[i].lines[k].time_h, 4), k_season_keys[season],
                               fixed(cell->at.u_mm, 3), fixed(cell->at.v_mm, 3), fixed(cell->total_min, 4));
                for (const auto& minutes : cell->minutes)
                    text.append(",").append(minutes ? fixed(*minutes, 4) : "");
                text += '\n';
            }
    return text;
}

} // namespace dialwright::cli
