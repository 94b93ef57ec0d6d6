// SPDX-License-Identifier: MIT
#include "engine/style/style.hpp"
#include "engine/surface/plane.hpp"
#include "tests/published/published.hpp"

#include <catch2/catch.hpp>

#include <stdexcept>

using namespace dialwright;
using Catch::Matchers::WithinAbs;

namespace {

double shadow_of_nodus(const published::Case& c, const std::string& name) {
    const Attitude attitude{Angle::degrees(c.number("normal_azimuth_deg")),
                            Angle::degrees(c.number("normal_altitude_deg"))};
    const Plane plane{frame_of(attitude), c.number("nodus_height")};
    const SkyPlace sun{Angle::degrees(c.number("hour_angle_deg")), Angle::degrees(c.number("declination_deg"))};
    const auto shadow = plane.shadow_of_nodus(to_site(sun, Angle::degrees(c.number("latitude_deg"))));
    return name == "u" ? shadow.value().u_mm : shadow.value().v_mm;
}

double style(const published::Case& c, const std::string& name) {
    const Attitude attitude{Angle::degrees(c.number("normal_azimuth_deg")),
                            Angle::degrees(c.number("normal_altitude_deg"))};
    const Style found =
        style_of(frame_of(attitude), c.number("nodus_height"), Angle::degrees(c.number("latitude_deg")));
    if (name == "height_deg")
        return found.height.in_degrees();
    return name == "centre_u" ? found.centre.value().u_mm : found.centre.value().v_mm;
}

/// The angle from the noon line of the hour line `name` hours after noon; the morning's is its mirror image.
double level_hour_line(const published::Case& c, const std::string& name) {
    const Angle latitude = Angle::degrees(c.number("latitude_deg"));
    const PlateFrame level = frame_of({});
    const Style found = style_of(level, 100, latitude);
    const auto after = hour_line_direction(level, found, latitude, Angle::hours(std::stod(name)));
    const auto before = hour_line_direction(level, found, latitude, Angle::hours(-std::stod(name)));
    CHECK_THAT((after.value() + before.value()).in_degrees(), WithinAbs(360, 1e-9));
    return after.value().in_degrees();
}

double value_of(const published::Case& c, const std::string& name) {
    if (c.check == "shadow of a nodus")
        return shadow_of_nodus(c, name);
    if (c.check == "style")
        return style(c, name);
    if (c.check == "level hour lines")
        return level_hour_line(c, name);
    throw std::runtime_error(c.file + ": no test knows the check \"" + c.check + "\"");
}

} // namespace

TEST_CASE("Published dials", "[engine][published]") {
    for (const published::Case& c : published::cases_in("dial"))
        for (const published::Expectation& expected : c.expected) {
            INFO(c.file << ": " << c.source << ", " << expected.name);
            CHECK_THAT(value_of(c, expected.name), WithinAbs(expected.number(), expected.within.value()));
        }
}
