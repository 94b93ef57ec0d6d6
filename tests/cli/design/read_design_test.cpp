// SPDX-License-Identifier: MIT
#include "cli/design/read_design.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <locale>
#include <random>
#include <utility>
#include <vector>

using namespace dialwright;
using namespace dialwright::cli;
using Catch::Matchers::WithinAbs;
namespace fs = std::filesystem;

namespace {

const std::string k_place = "place: {latitude: 54° 14' N, longitude: 1° 52' W, zone: Europe/London}\n";
const std::string k_short = k_place + "dial: {kind: level}\nplate: {diameter: 360 mm}\n";

Design good(const std::string& text) {
    INFO(text);
    DesignReading reading = read_design(text, "good.yaml");
    for (const DesignError& error : reading.errors)
        UNSCOPED_INFO(to_text(error));
    REQUIRE(reading.design);
    REQUIRE(reading.errors.empty());
    return *reading.design;
}

const Assumption* assumed(const Design& design, std::string_view key) {
    const auto found =
        std::find_if(design.assumed.begin(), design.assumed.end(), [&](const Assumption& a) { return a.key == key; });
    return found == design.assumed.end() ? nullptr : &*found;
}

/// The design file that gives as keys all that was assumed.
std::string with_assumptions(const std::string& text, const Design& design) {
    std::string more = text;
    for (const Assumption& a : design.assumed) {
        const std::size_t colon = a.key.find(": ");
        if (colon == std::string::npos) {
            more += a.key + ": " + a.value + "\n";
            continue;
        }
        const std::string section = a.key.substr(0, colon) + ": {", entry = a.key.substr(colon + 2) + ": " + a.value;
        const std::size_t at = more.find(section);
        if (at == std::string::npos)
            more += section + entry + "}\n";
        else
            more.insert(at + section.size(), entry + ", ");
    }
    return more;
}

} // namespace

TEST_CASE("the shortest design and what is assumed of it", "[cli]") {
    const Design design = good(k_short);
    CHECK(design.dial.kind == DialKind::level);
    CHECK_THAT(design.place.site.latitude.in_degrees(), WithinAbs(54.0 + 14.0 / 60.0, 1e-12));
    CHECK_THAT(design.place.site.longitude.in_degrees(), WithinAbs(-1.0 - 52.0 / 60.0, 1e-12));
    CHECK(design.place.zone == "Europe/London");
    CHECK(design.title == "Level dial");
    CHECK(design.file == "good.yaml");
    CHECK(design.plate.shape == PlateShape::round);
    CHECK_THAT(design.plate.height_mm, WithinAbs(360.0, 0.0));
    CHECK_THAT(design.borders.margin_mm, WithinAbs(7.0, 0.0));
    CHECK_THAT(design.borders.chapter_ring_mm, WithinAbs(36.0, 0.0));
    CHECK_THAT(design.borders.inner_mm, WithinAbs(18.0, 0.0));
    CHECK_THAT(design.lettering.numeral_height_mm, WithinAbs(16.0, 0.0));
    CHECK_THAT(design.lettering.label_height_mm, WithinAbs(5.0, 0.0));
    CHECK_THAT(design.cutting.line_width_mm, WithinAbs(0.6, 1e-12));
    CHECK_THAT(design.cutting.least_gap_mm, WithinAbs(1.2, 1e-12));
    CHECK_THAT(design.gnomon.thickness_mm, WithinAbs(0.0, 0.0));
    CHECK(design.print.paper == "A4");
    CHECK(design.years.last == 2046);
    REQUIRE(assumed(design, "borders: margin") != nullptr);
    CHECK(assumed(design, "borders: margin")->value == "7 mm");
    for (const Assumption& a : design.assumed) {
        INFO(a.key);
        CHECK_FALSE(a.value.empty());
        CHECK_FALSE(a.why.empty());
    }
}

TEST_CASE("what is assumed, written out, gives the same design and leaves nothing to assume", "[cli]") {
    const std::string wall = k_place + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 300 mm, height: 1.2 m}\n"
                                       "lettering: {motto: Tempus fugit}\ngnomon: {holes: 2}\n";
    const std::string both = k_place + "dial: {kind: equatorial}\nplate: {across: 11 in}\nunits: inch\n";
    const std::string off = k_short + "units: inch\n";
    const std::string tiny = k_place + "dial: {kind: level}\nplate: {diameter: 20 mm}\n";
    const std::string huge = k_place + "dial: {kind: level}\nplate: {diameter: 5 m}\n";
    const std::string pin = k_short + "gnomon: {kind: upright pin}\nalso: {clock: yes, unequal: yes}\n";
    const std::string rod = k_place + "dial: {kind: leaning, facing: west, lean: 80° back, faces: both}\n"
                                      "plate: {diameter: 1 m}\ngnomon: {kind: rod}\nhours: {time: hours left}\n";
    for (const std::string& text : {k_short, wall, both, off, tiny, huge, pin, rod}) {
        const Design first = good(text);
        const Design second = good(with_assumptions(text, first));
        CHECK(second.assumed.empty());
        CHECK(second.title == first.title);
        CHECK_THAT(second.borders.margin_mm, WithinAbs(first.borders.margin_mm, 1e-9));
        CHECK_THAT(second.borders.chapter_ring_mm, WithinAbs(first.borders.chapter_ring_mm, 1e-9));
        CHECK_THAT(second.borders.inner_mm, WithinAbs(first.borders.inner_mm, 1e-9));
        CHECK_THAT(second.lettering.numeral_height_mm, WithinAbs(first.lettering.numeral_height_mm, 1e-9));
        CHECK_THAT(second.lettering.label_height_mm, WithinAbs(first.lettering.label_height_mm, 1e-9));
        CHECK_THAT(second.lettering.motto_height_mm, WithinAbs(first.lettering.motto_height_mm, 1e-9));
        CHECK_THAT(second.gnomon.thickness_mm, WithinAbs(first.gnomon.thickness_mm, 1e-9));
        CHECK_THAT(second.gnomon.joint.hole_mm, WithinAbs(first.gnomon.joint.hole_mm, 1e-9));
        CHECK_THAT(second.cutting.line_width_mm, WithinAbs(first.cutting.line_width_mm, 1e-9));
        CHECK_THAT(second.cutting.least_gap_mm, WithinAbs(first.cutting.least_gap_mm, 1e-9));
        CHECK_THAT(second.print.overlap_mm, WithinAbs(first.print.overlap_mm, 1e-9));
        CHECK(second.print.paper == first.print.paper);
        CHECK(second.hours.divide_min == first.hours.divide_min);
        CHECK(second.gnomon.kind == first.gnomon.kind);
        CHECK(second.hours.reach == first.hours.reach);
        CHECK(second.hours.seen_rise == first.hours.seen_rise);
    }
}

TEST_CASE("a design in inches gets defaults that a rule shows", "[cli]") {
    const Design design = good(k_place + "units: inch\ndial: {kind: level}\nplate: {diameter: 14 1/2 in}\n");
    CHECK(design.units == Units::inches);
    CHECK(design.print.paper == "Letter");
    CHECK(assumed(design, "borders: chapter ring")->value == "1 7/16 in");
    CHECK(assumed(design, "cutting: line width")->value == "1/64 in");
    CHECK(assumed(design, "cutting: least gap")->value == "1/32 in");
}

TEST_CASE("dials that stand", "[cli]") {
    const Design wall = good(k_place + "dial: {kind: wall, facing: S 23° E}\nplate: {width: 600 mm, height: 800 mm}\n");
    CHECK(wall.plate.shape == PlateShape::rectangle);
    CHECK_THAT(wall.dial.facing.in_degrees(), WithinAbs(157.0, 1e-12));
    CHECK_THAT(wall.dial.lean.in_degrees(), WithinAbs(0.0, 0.0));
    CHECK(assumed(wall, "dial: lean")->value == "upright");
    const Design leaning =
        good(k_place + "dial: {kind: leaning, facing: N 60° W, lean: 12° forward}\nplate: {across: 1 ft}\n");
    CHECK(leaning.plate.shape == PlateShape::octagon);
    CHECK_THAT(leaning.dial.lean.in_degrees(), WithinAbs(-12.0, 1e-12));
    CHECK_THAT(leaning.plate.width_mm, WithinAbs(304.8, 1e-10));
    const Design two = good(k_place + "dial: {kind: equatorial, faces: both}\nplate: {diameter: 300 mm}\n");
    CHECK(two.dial.faces == Faces::both);
}

TEST_CASE("a polygon, from the maker's own origin", "[cli]") {
    const Design design =
        good(k_place + "dial: {kind: level}\nplate:\n  corners:\n    - [100 mm, 100 mm]\n    - [500 mm, 100 mm]\n"
                       "    - [300 mm, 350 mm]\n  centre: [0 mm, -300 mm]\n");
    CHECK(design.plate.shape == PlateShape::polygon);
    REQUIRE(design.plate.corners.size() == 3);
    CHECK_THAT(design.plate.corners[2].up_mm, WithinAbs(350.0, 0.0));
    CHECK_THAT(design.plate.width_mm, WithinAbs(400.0, 0.0));
    CHECK_THAT(design.plate.height_mm, WithinAbs(250.0, 0.0));
    REQUIRE(design.plate.centre);
    CHECK_THAT(design.plate.centre->up_mm, WithinAbs(-300.0, 0.0));
    CHECK_THAT(design.borders.inner_mm, WithinAbs(0.0, 0.0)); // the centre is off the plate
}

TEST_CASE("hours, dates, lettering", "[cli]") {
    const Design design =
        good(k_short + "hours: {time: clock, from: 5:30, to: 8 pm, divide: 1 h, numerals: Roman IIII,"
                       " count: 24, stand: upright, noon mark: no}\n"
                       "dates: {solstices: no, days: [29 Feb, {on: June 14, label: The fair}], labels: no}\n"
                       "lettering: {motto: 'Ὥρα', place line: yes}\n");
    CHECK(design.hours.time == HourTime::clock);
    CHECK_THAT(*design.hours.first_h, WithinAbs(5.5, 1e-12));
    CHECK_THAT(*design.hours.last_h, WithinAbs(20.0, 1e-12));
    CHECK(design.hours.divide_min == 60);
    CHECK(design.hours.numerals == Numerals::roman_iiii);
    CHECK(design.hours.count == 24);
    CHECK(design.hours.stand == NumeralStand::upright);
    CHECK_FALSE(design.hours.noon_mark);
    CHECK_FALSE(design.dates.solstices);
    CHECK(design.dates.equinoxes);
    REQUIRE(design.dates.days.size() == 2);
    CHECK(design.dates.days[0].label == "29 February");
    CHECK(design.dates.days[1].label == "The fair");
    CHECK(design.lettering.motto == "Ὥρα");
    CHECK(design.lettering.motto_height_mm > 0.0);
    CHECK(design.lettering.place_line == "54° 14' N  1° 52' W");
    CHECK(good(k_short + "lettering: {place line: no}\n").lettering.place_line.empty());
    CHECK(good(k_short + "lettering: {place line: On the green}\n").lettering.place_line == "On the green");
}

TEST_CASE("faces by the words of each kind of dial", "[cli]") {
    const auto faces = [](const std::string& dial) {
        return good(k_place + "dial: {" + dial + "}\nplate: {diameter: 300 mm}\n").dial.faces;
    };
    for (const std::string kind : {"kind: wall, facing: east", "kind: leaning, facing: east, lean: 80° back"}) {
        CHECK(faces(kind) == Faces::upper);
        CHECK(faces(kind + ", faces: front") == Faces::upper);
        CHECK(faces(kind + ", faces: back") == Faces::lower);
        CHECK(faces(kind + ", faces: both") == Faces::both);
    }
    CHECK(faces("kind: leaning, facing: east, lean: 85° back, faces: front") == Faces::upper);
    CHECK(faces("kind: equatorial, faces: lower") == Faces::lower);
}

TEST_CASE("a skyline is kept rising from its first pair, wherever it starts", "[cli]") {
    const auto skyline = [](const std::string& pairs) {
        return good("place: {latitude: 54° N, longitude: 2° W, zone: Europe/London, skyline: " + pairs +
                    "}\ndial: {kind: level}\nplate: {diameter: 300 mm}\n")
            .place.skyline;
    };
    const auto marks = skyline("[[N 60° W, 5°], [north, 0°], [20°, 12° 30'], [S 1° W, 89.9°], [299.9°, 1°]]");
    const std::vector<std::pair<double, double>> expected = {
        {300.0, 5.0}, {360.0, 0.0}, {380.0, 12.5}, {541.0, 89.9}, {659.9, 1.0}};
    REQUIRE(marks.size() == expected.size());
    for (std::size_t i = 0; i < marks.size(); ++i) {
        CHECK_THAT(marks[i].azimuth.in_degrees(), WithinAbs(expected[i].first, 1e-9));
        CHECK_THAT(marks[i].altitude.in_degrees(), WithinAbs(expected[i].second, 1e-9));
    }
    CHECK_NOTHROW(Skyline{marks}); // what the reader accepts, the engine does
    CHECK(good(k_short).place.skyline.empty());
}

TEST_CASE("gnomons and how far lines run", "[cli]") {
    const auto reach = [](const std::string& more) { return good(k_short + more).hours.reach; };
    CHECK(reach("") == HourExtent::style);
    CHECK(reach("gnomon: {kind: rod}\n") == HourExtent::style);
    CHECK(reach("gnomon: {kind: pin}\n") == HourExtent::nodus);
    CHECK(reach("gnomon: {kind: upright pin}\n") == HourExtent::nodus);
    CHECK(reach("gnomon: {kind: disc}\n") == HourExtent::nodus);
    CHECK(reach("hours: {reach: season}\n") == HourExtent::nodus);
    CHECK(reach("gnomon: {kind: disc}\nhours: {reach: season}\n") == HourExtent::nodus);
    CHECK(good(k_short + "gnomon: {kind: disc}\n").gnomon.kind == GnomonKind::disc);
    CHECK(assumed(good(k_short), "gnomon: kind")->value == "edge");
    CHECK(assumed(good(k_short + "gnomon: {kind: pin}\n"), "hours: reach")->value == "season");
    CHECK(assumed(good(k_short + "gnomon: {kind: pin}\n"), "gnomon: holes") == nullptr);
    CHECK(assumed(good(k_short + "hours: {time: clock}\n"), "hours: reach") == nullptr);
    const std::string wall = k_place + "plate: {diameter: 300 mm}\ngnomon: {kind: upright pin}\n";
    CHECK(good(wall + "dial: {kind: wall, facing: south, lean: 5° back}\n").gnomon.kind == GnomonKind::upright_pin);
    // A lean that can't be read is one error, not two.
    CHECK(read_design(wall + "dial: {kind: wall, facing: south, lean: 5°}\n", "x").errors.size() == 1);
}

TEST_CASE("hours that count from the Sun's rising and setting", "[cli]") {
    const auto hours = [](const std::string& keys) { return good(k_short + "hours: {" + keys + "}\n").hours; };
    CHECK(hours("time: since sunrise").time == HourTime::since_sunrise);
    CHECK(hours("time: since sunset, from: 14, to: 24").time == HourTime::since_sunset);
    CHECK(hours("time: hours left").time == HourTime::to_sunset);
    const Hours unequal = hours("time: unequal, from: 0, to: 12, rise and set: seen");
    CHECK(unequal.time == HourTime::unequal);
    CHECK_THAT(*unequal.last_h, WithinAbs(12.0, 0.0));
    CHECK(unequal.seen_rise);
    CHECK_FALSE(hours("time: unequal, rise and set: level horizon").seen_rise);
    CHECK(hours("time: clock, summer numerals: yes").summer_numerals);
    CHECK_FALSE(hours("time: sun, summer numerals: no").summer_numerals);
    // A zone south of the equator, where summer time runs over the new year.
    std::string south = k_short;
    south.replace(south.find("Europe/London"), 13, "Pacific/Auckland");
    CHECK(good(south + "hours: {time: zone, summer numerals: yes}\n").hours.summer_numerals);
    const Design assumed_level = good(k_short + "also: {unequal: yes}\n");
    CHECK(assumed(assumed_level, "hours: rise and set")->value == "level horizon");
    CHECK(assumed(good(k_short), "hours: rise and set") == nullptr);
}

TEST_CASE("what is drawn beside the hours of the ring", "[cli]") {
    const Design design =
        good(k_short + "hours: {curves: june to december}\n"
                       "also:\n  unequal: 1 to 11\n  clock: 9 am-3 pm\n  zone: noon\n  hours left: yes\n"
                       "  since sunset: no\n  since sunrise: 3\n"
                       "  altitudes: [5° 30', 45]\n  azimuths: [S 30° E, 210°]\n"
                       "  noon at:\n    - {name: Port Amber, longitude: 12° 29' E}\n"
                       "    - {name: Westholm, longitude: -70.5}\n");
    const std::vector<MoreHours>& more = design.also.hours;
    REQUIRE(more.size() == 5);
    CHECK(more[0].time == HourTime::unequal);
    CHECK_THAT(*more[0].first_h, WithinAbs(1.0, 0.0));
    CHECK_THAT(*more[0].last_h, WithinAbs(11.0, 0.0));
    CHECK(more[1].time == HourTime::clock);
    CHECK_THAT(*more[1].last_h, WithinAbs(15.0, 0.0));
    CHECK(more[1].curves == HalfYear::june_to_december);
    CHECK(more[2].time == HourTime::zone);
    CHECK_THAT(*more[2].first_h, WithinAbs(12.0, 0.0));
    CHECK_THAT(*more[2].last_h, WithinAbs(12.0, 0.0));
    CHECK(more[3].time == HourTime::to_sunset);
    CHECK_FALSE(more[3].first_h);
    CHECK(more[4].time == HourTime::since_sunrise);
    REQUIRE(design.also.altitudes.size() == 2);
    CHECK_THAT(design.also.altitudes[0].in_degrees(), WithinAbs(5.5, 1e-12));
    REQUIRE(design.also.azimuths.size() == 2);
    CHECK_THAT(design.also.azimuths[0].in_degrees(), WithinAbs(150.0, 1e-12));
    REQUIRE(design.also.noons.size() == 2);
    CHECK(design.also.noons[1].name == "Westholm");
    CHECK_THAT(design.also.noons[1].longitude.in_degrees(), WithinAbs(-70.5, 1e-12));
    for (const Assumption& a : design.assumed)
        CHECK_FALSE(a.key.starts_with("also"));
}

TEST_CASE("each so many degrees", "[cli]") {
    const auto also = [](const std::string& keys) { return good(k_short + "also: {" + keys + "}\n").also; };
    const std::vector<Angle> tens = also("altitudes: each 10°").altitudes;
    REQUIRE(tens.size() == 8);
    CHECK_THAT(tens.front().in_degrees(), WithinAbs(10.0, 1e-12));
    CHECK_THAT(tens.back().in_degrees(), WithinAbs(80.0, 1e-12));
    CHECK(also("altitudes: each 40°").altitudes.size() == 2);
    CHECK(also("altitudes: each 2° 15'").altitudes.size() == 39);
    const std::vector<Angle> round = also("azimuths: each 15°").azimuths;
    REQUIRE(round.size() == 24);
    CHECK_THAT(round.front().in_degrees(), WithinAbs(0.0, 0.0));
    CHECK_THAT(round.back().in_degrees(), WithinAbs(345.0, 1e-12));
    CHECK(also("azimuths: each 9°").azimuths.size() == 40);
    CHECK(also("azimuths: each 22.5°").azimuths.size() == 16);
    CHECK(also("azimuths: each 180°").azimuths.size() == 2);
}

TEST_CASE("line ends and a byte order mark make no difference", "[cli]") {
    std::string text = k_short;
    for (std::size_t at = 0; (at = text.find('\n', at)) != std::string::npos; at += 2)
        text.replace(at, 1, "\r\n");
    CHECK(good("\xEF\xBB\xBF" + text).plate.width_mm == good(k_short).plate.width_mm);
    CHECK(good("---\n" + k_short + "...\n").plate.width_mm == good(k_short).plate.width_mm);
}

TEST_CASE("errors are told in one line each, several in one run", "[cli]") {
    const DesignReading reading =
        read_design("place: {latitude: 95°, longitude: x, zone: Nowhere/Land}\ndial: {kind: level}\n"
                    "plate: {diameter: 360}\n",
                    "garden.yaml");
    CHECK_FALSE(reading.design);
    REQUIRE(reading.errors.size() == 4);
    CHECK(to_text(reading.errors[0]) ==
          "garden.yaml:1:19: place: latitude: \"95°\" is no latitude: it is over 90°: give 90° S to 90° N");
    CHECK(to_text({"a", 1, 2, "", "found", ""}) == "a:1:2: found");
    std::string many;
    for (int i = 0; i < 500; ++i)
        many += "key " + std::to_string(i) + ": x\n";
    CHECK(read_design(many, "x").errors.size() == 100);
}

TEST_CASE("files that can't be read", "[cli]") {
    const fs::path folder = fs::temp_directory_path() / ("dialwright-read-" + std::to_string(std::random_device{}()));
    fs::create_directories(folder);
    CHECK(read_design_file(folder).errors.at(0).message == "this is a folder");
    CHECK(read_design_file(folder / "none.yaml").errors.at(0).message == "there is no such file");
    std::ofstream{folder / "large.yaml"} << std::string(1'100'000, '#');
    CHECK(read_design_file(folder / "large.yaml").errors.at(0).message == "the file is larger than 1 MB");
    std::ofstream{folder / "good.yaml"} << k_short;
    CHECK(read_design_file(folder / "good.yaml").design);
    if (fs::exists("/dev/zero")) // endless
        CHECK(read_design_file("/dev/zero").errors.size() == 1);
    fs::remove_all(folder);
}

namespace {
struct CommaPoint : std::numpunct<char> {
    char do_decimal_point() const override { return ','; }
    char do_thousands_sep() const override { return '.'; }
    std::string do_grouping() const override { return "\3"; }
};
} // namespace

TEST_CASE("a locale with a decimal comma gives the same design", "[cli]") {
    const std::string text = k_place + "dial: {kind: level}\nplate: {diameter: 1.234 m}\nyears: 2027 to 2046\n";
    const Design plain = good(text);
    const std::locale before = std::locale::global(std::locale{std::locale::classic(), new CommaPoint});
    const DesignReading reading = read_design(text, "good.yaml");
    const DesignReading wrong = read_design("a: b\n" + std::string(2000, '\n') + "c: d\n", "x");
    std::locale::global(before);
    REQUIRE(reading.design);
    CHECK_THAT(reading.design->plate.width_mm, WithinAbs(1234.0, 1e-9));
    CHECK(reading.design->title == plain.title);
    for (std::size_t i = 0; i < plain.assumed.size(); ++i)
        CHECK(reading.design->assumed.at(i).value == plain.assumed[i].value);
    CHECK(to_text(wrong.errors.back()).starts_with("x:2002:1: "));
}

TEST_CASE("spoilt designs never crash the reader, and end in a design or in errors", "[cli]") {
    std::vector<std::string> seeds = {k_short};
    for (const char* folder : {"tests/bad_designs", "designs"}) {
        const fs::path path = fs::path{DIALWRIGHT_SOURCE_DIR} / folder;
        if (fs::is_directory(path))
            for (const auto& entry : fs::directory_iterator{path})
                if (entry.path().extension() == ".yaml") {
                    std::ifstream stream{entry.path(), std::ios::binary};
                    seeds.emplace_back(std::istreambuf_iterator<char>{stream}, std::istreambuf_iterator<char>{});
                }
    }
    std::sort(seeds.begin(), seeds.end());
    constexpr const char* k_scraps[] = {
        "&a ",   "*a",         "!!x ", "[",    "]", "{",  "}",    ": ",  "\n",
        "\n  ",  "- ",         "\t",   "\"",   "'", "#",  "|\n",  "? ",  "---\n",
        "...\n", "%TAG ! x\n", "\xFF", "\xC3", "°", "mm", "in",   "1/0", "999999999999999999",
        "-",     ".",          ",",    "<<: ", "~", "\\", ">-\n", "@",   "`",
        "\r"};
    const auto seed = std::random_device{}();
    INFO("seed " << seed);
    std::mt19937 random{seed};
    for (int round = 0; round < 4000; ++round) {
        std::string text = seeds[random() % seeds.size()];
        for (std::size_t n = 1 + random() % 5; n > 0; --n) {
            const std::size_t at = text.empty() ? 0 : random() % text.size();
            switch (random() % 4) {
            case 0:
                text.erase(at, 1 + random() % 6);
                break;
            case 1:
                text.insert(at, k_scraps[random() % std::size(k_scraps)]);
                break;
            case 2:
                if (!text.empty())
                    text[at] = static_cast<char>(random() % 256);
                break;
            default: {
                const std::string& other = seeds[random() % seeds.size()];
                if (!other.empty())
                    text.insert(at, other.substr(random() % other.size(), random() % 40));
            }
            }
        }
        const DesignReading reading = read_design(text, "x.yaml");
        INFO(text);
        REQUIRE(reading.design.has_value() == reading.errors.empty());
        for (const DesignError& error : reading.errors)
            REQUIRE((error.line >= 1 && error.column >= 1 && !error.message.empty()));
    }
}
