// SPDX-License-Identifier: MIT
#include "layout/plate/dress.hpp"
#include "layout/plate/family_words.hpp"

#include <catch2/catch.hpp>

#include <set>

using namespace dialwright;
using namespace dialwright::layout;

namespace {

DialLine hour(HourTime time, int set, double time_h) {
    DialLine line;
    line.family = family_of(time);
    line.time = time;
    line.set = set;
    line.time_h = time_h;
    return line;
}
DialLine level(Family family, double degrees) {
    DialLine line;
    line.family = family;
    line.level = Angle::degrees(degrees);
    return line;
}

} // namespace

TEST_CASE("Each family of figures on the field has a dress of its own, the ring's hours have none", "[layout]") {
    Delineation face;
    face.lines = {hour(HourTime::unequal, 0, 6)};
    int set = 0;
    for (const HourTime time : {HourTime::sun, HourTime::zone, HourTime::clock, HourTime::since_sunrise,
                                HourTime::since_sunset, HourTime::to_sunset})
        face.lines.push_back(hour(time, ++set, 9));
    DialLine date, noon;
    date.family = Family::date;
    date.label = "21 Jun";
    noon.family = Family::place_noon;
    noon.label = "Port Amber";
    face.lines.insert(face.lines.end(), {noon, level(Family::altitude, 20), level(Family::azimuth, 20), date});

    const auto families = figured_families(face);
    REQUIRE(families.size() == 9);
    std::set<std::pair<std::string, bool>> seen; // hours: the figures of one number as they are read
    for (const FiguredFamily& family : families)
        if (is_hour(family.family))
            seen.emplace(field_label(hour(family.time, family.set, 9), family.dress), family.dress.italic);
    CHECK(seen.size() == 7);
    CHECK(families[0].sample == "6");
    CHECK(field_label(hour(HourTime::since_sunrise, 4, 14), {Dress::Figures::small_roman, false}) == "xiv");
    // Altitudes and azimuths both have degrees.
    CHECK(families[7].sample == "20°");
    CHECK(families[8].sample == "20°");
    CHECK(families[7].dress.italic != families[8].dress.italic);
    CHECK(field_label(date, dress_of(date, families)) == "21 Jun");
    CHECK(field_label(noon, dress_of(noon, families)) == "Port Amber");

    Delineation plain;
    plain.lines = {hour(HourTime::zone, 0, 9), hour(HourTime::clock, 1, 9), level(Family::azimuth, 90)};
    for (const FiguredFamily& family : figured_families(plain))
        CHECK(family.dress == Dress{});
    CHECK(figured_families(plain).size() == 2);
}

TEST_CASE("Lines are named with their families", "[layout]") {
    CHECK(line_name(Family::hour, HourTime::zone, 0, "XII") == "hour line XII");
    CHECK(line_name(Family::hour, HourTime::sun, 1, "12") == "Sun's hour 12");
    CHECK(line_name(Family::unequal_hour, HourTime::unequal, 0, "6") == "unequal hour 6");
    CHECK(line_name(Family::azimuth, HourTime::sun, 0, "180°") == "azimuth line 180°");
    CHECK(by_family({{"date lines", "21 Dec"}, {"altitudes of the Sun", "70°"}, {"date lines", "1 Jan"}}) ==
          "date lines 21 Dec, 1 Jan; altitudes of the Sun 70°");
}
