// SPDX-License-Identifier: MIT
#include "cli/design/edit_design.hpp"
#include "cli/design/read_design.hpp"

#include <catch2/catch.hpp>

#include <string>

using namespace dialwright::cli;

namespace {

const std::string k_place = "place: {latitude: 54.2, longitude: -1.9, zone: Europe/London}\n";
const std::string k_plate = "plate: {width: 600 mm, height: 750 mm}\n";

std::string edited(const std::string& dial) {
    const DesignEdit edit =
        with_dial_values(k_place + dial + k_plate, "x.yaml", {{"facing", "S 21° 4' E"}, {"lean", "1° back"}});
    if (!edit.errors.empty())
        return to_text(edit.errors.front());
    REQUIRE(edit.text.starts_with(k_place));
    REQUIRE(edit.text.ends_with(k_plate));
    REQUIRE(read_design(edit.text, "x.yaml").design);
    return edit.text.substr(k_place.size(), edit.text.size() - k_place.size() - k_plate.size());
}

} // namespace

TEST_CASE("Values are exchanged where they stand, and every other byte stays", "[edit]") {
    CHECK(edited("dial:\n  kind: wall\n  facing: S 23° E   # by compass\n  lean: \"0°\" # \u00fc\n") ==
          "dial:\n  kind: wall\n  facing: S 21° 4' E   # by compass\n  lean: 1° back # \u00fc\n");
    CHECK(edited("dial: {kind: wall, facing: S 23° E, lean: 0°}\n") ==
          "dial: {kind: wall, facing: S 21° 4' E, lean: 1° back}\n");
    CHECK(edited("dial:\n    lean:   '0°'\n    facing:  157\n    kind: wall\n") ==
          "dial:\n    lean:   1° back\n    facing:  S 21° 4' E\n    kind: wall\n");
}

TEST_CASE("Keys that are missing are added below the one before them", "[edit]") {
    CHECK(edited("dial:\n  kind: wall  # brick\n  facing: south\n  faces: front\n") ==
          "dial:\n  kind: wall  # brick\n  facing: S 21° 4' E\n  lean: 1° back\n  faces: front\n");
    CHECK(edited("dial:\n  kind: wall  # brick\n") ==
          "dial:\n  kind: wall  # brick\n  facing: S 21° 4' E\n  lean: 1° back\n");
    CHECK(edited("dial: {kind: wall}\n") == "dial: {kind: wall, facing: S 21° 4' E, lean: 1° back}\n");
}

TEST_CASE("Other line ends and a byte order mark stay", "[edit]") {
    const std::string text = "\xEF\xBB\xBFplace: {latitude: 54.2, longitude: -1.9, zone: Europe/London}\r\n"
                             "dial:\r\n  kind: wall\r\n  facing: west\r\nplate: {width: 600 mm, height: 750 mm}\r\n";
    const DesignEdit edit = with_dial_values(text, "x.yaml", {{"facing", "south"}, {"lean", "upright"}});
    CHECK(edit.errors.empty());
    std::string wanted = text;
    wanted.replace(wanted.find("west"), 4, "south\r\n  lean: upright");
    CHECK(edit.text == wanted);
}

TEST_CASE("A design that can't have them is left alone", "[edit]") {
    CHECK_THAT(edited("dial: {kind: level}\n"), Catch::Contains("a level dial faces up"));
    CHECK_THAT(edited("dial: {kind: slanting}\n"), Catch::Contains("kind"));
    const DesignEdit broken = with_dial_values("place: [\n", "x.yaml", {{"facing", "south"}});
    CHECK_FALSE(broken.errors.empty());
    CHECK(broken.text.empty());
}
