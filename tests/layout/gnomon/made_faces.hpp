// SPDX-License-Identifier: MIT
#pragma once

#include "layout/plate/face.hpp"

// Faces of invented commissions, for tests of what goes with a plate.
namespace made_faces {

using namespace dialwright;
using namespace dialwright::layout;

struct Made {
    DialPlan plan;
    FaceSpec spec;
    Face face;
};

inline const MeanYear& year() {
    static const MeanYear made{2027, 2030};
    return made;
}

inline DialPlan dial_plan(double latitude_deg, Attitude attitude, double thickness_mm) {
    DialPlan plan;
    plan.site = {Angle::degrees(latitude_deg), Angle::degrees(-3)};
    plan.attitude = attitude;
    plan.gnomon_thickness_mm = thickness_mm;
    plan.hours.divide_min = 30;
    plan.dates.lines = {{"21 Jun", year().obliquity()}, {"equinox", Angle{}}, {"21 Dec", -year().obliquity()}};
    return plan;
}

inline FaceSpec face_spec(PlateShape shape, double width_mm, double height_mm, double thickness_mm) {
    FaceSpec spec;
    spec.plate.shape = shape;
    spec.plate.width_mm = width_mm;
    spec.plate.height_mm = height_mm;
    spec.borders = {8, 40, 12};
    spec.gnomon.kind = GnomonKind::edge;
    spec.gnomon.thickness_mm = thickness_mm;
    spec.plate.thickness_mm = 10;
    spec.gnomon.joint.count = 3;
    spec.gnomon.joint.hole_mm = 3;
    spec.lettering.numeral_height_mm = 12;
    spec.lettering.label_height_mm = 5;
    spec.divide_min = 30;
    return spec;
}

inline Made made(DialPlan plan, FaceSpec spec) {
    Face face = draw_face(plan, year(), spec);
    return {std::move(plan), std::move(spec), std::move(face)};
}

/// A level dial on a round plate at 52.25° north.
inline Made level_round(double thickness_mm = 6) {
    return made(dial_plan(52.25, {}, thickness_mm), face_spec(PlateShape::round, 420, 420, thickness_mm));
}
/// An upright dial on an oblong plate at 52.25° north that declines 23° east of south.
inline Made wall_oblong(double thickness_mm = 6) {
    return made(dial_plan(52.25, {Angle::degrees(157), Angle{}}, thickness_mm),
                face_spec(PlateShape::rectangle, 500, 620, thickness_mm));
}
/// A level dial on an octagon at 34° south, which its reader sees from the north.
inline Made southern_octagon() {
    FaceSpec spec = face_spec(PlateShape::octagon, 400, 400, 5);
    spec.reader_up = Angle::degrees(180);
    return made(dial_plan(-34, {}, 5), spec);
}
/// A wall that declines so far that the centre is off the plate.
inline Made great_decliner() {
    return made(dial_plan(50, {Angle::degrees(98), Angle{}}, 5), face_spec(PlateShape::rectangle, 400, 500, 5));
}

} // namespace made_faces
