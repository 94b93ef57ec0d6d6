// SPDX-License-Identifier: MIT
// Random designs through the whole program in one process: each gives a packet or at least one error that a maker can
// read. DIALWRIGHT_FUZZ_COUNT and DIALWRIGHT_FUZZ_SEED ask for more of them, or others.
#include "cli/commission.hpp"
#include "cli/packet/packet.hpp"
#include "layout/sheet/export_error.hpp"

#include <catch2/catch.hpp>
#include <fmt/format.h>
#include <nlohmann/json.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdlib>
#include <random>
#include <string>
#include <string_view>

using namespace dialwright;
using namespace dialwright::cli;

namespace {

class RandomDesign {
  public:
    explicit RandomDesign(unsigned seed) : random_{seed} {}

    std::string text() {
        std::string text = place() + skyline(); // one after the other: the plate's size bounds what follows
        text += dial();
        text += plate();
        for (const auto section :
             {&RandomDesign::borders, &RandomDesign::gnomon, &RandomDesign::hours, &RandomDesign::also,
              &RandomDesign::dates, &RandomDesign::correction, &RandomDesign::lettering, &RandomDesign::cutting,
              &RandomDesign::print, &RandomDesign::years})
            text += (this->*section)();
        return text;
    }

  private:
    bool chance(double part) { return number(0, 1) < part; }
    double number(double least, double most) { return std::uniform_real_distribution{least, most}(random_); }
    int whole(int least, int most) { return std::uniform_int_distribution{least, most}(random_); }
    template <std::size_t n>
    std::string one_of(const std::array<const char*, n>& words) {
        return words[std::size_t(whole(0, int(n) - 1))];
    }
    /// Small as often as large.
    double size_mm(double least, double most) { return std::exp(number(std::log(least), std::log(most))); }
    std::string mm(double least, double most) { return fmt::format("{:.2f} mm", size_mm(least, most)); }
    /// A line of a section, now and then.
    std::string some(double part, const std::string& line) { return chance(part) ? "  " + line + "\n" : ""; }

    std::string place() {
        constexpr std::array k_latitudes{"0",     "90 N",   "90 S", "23.44", "-23.44",
                                         "66.56", "-66.56", "89.9", "0.001", "45"};
        const std::string latitude = chance(0.3) ? one_of(k_latitudes) : fmt::format("{:.4f}", number(-90, 90));
        return fmt::format("place:\n  name: {}\n  latitude: {}\n  longitude: {:.4f}\n  zone: {}\n",
                           one_of(std::array{"Nether Beck", "Ærøholm", "Κάτω Λιμήν"}), latitude, number(-180, 180),
                           one_of(std::array{"Europe/London", "Asia/Kathmandu", "Pacific/Kiritimati",
                                             "America/St_Johns", "UTC", "Antarctica/Troll", "Australia/Lord_Howe"}));
    }
    std::string skyline() {
        return chance(0.15) ? "  skyline: [[80°, 6°], [120°, 25°], [200°, 3°], [290°, 12°]]\n" : "";
    }
    std::string facing() {
        return chance(0.4) ? one_of(std::array{"north", "south", "east", "west", "SE", "NNW", "S 23° E", "S 89.99° W",
                                               "S 0.01° W"})
                           : fmt::format("{:.3f}°", number(0, 360));
    }
    std::string dial() {
        switch (whole(0, 3)) {
        case 0:
            return "dial: {kind: level}\n";
        case 1:
            return fmt::format("dial:\n  kind: equatorial\n  faces: {}\n",
                               one_of(std::array{"upper", "lower", "both"}));
        case 2:
            return fmt::format("dial:\n  kind: wall\n  facing: {}\n", facing()) +
                   some(0.5, fmt::format("lean: {:.3f}° {}", number(0, 45), one_of(std::array{"back", "forward"}))) +
                   some(0.25, "faces: " + one_of(std::array{"front", "back", "both"}));
        default:
            return fmt::format("dial:\n  kind: leaning\n  facing: {}\n  lean: {}\n", facing(),
                               chance(0.5) ? fmt::format("{:.3f}° back", number(0.1, 89.9))
                                           : fmt::format("{:.3f}° forward", number(0.1, 80)));
        }
    }
    std::string plate() {
        smaller_mm_ = size_mm(20, chance(0.1) ? 5000 : 1200);
        const double other_mm = std::min(5000.0, smaller_mm_ * number(1, chance(0.1) ? 20 : 2));
        std::string text = "plate:\n";
        switch (whole(0, 3)) {
        case 0:
            text += fmt::format("  diameter: {:.3f} mm\n", smaller_mm_);
            break;
        case 1:
            text += some(0.4, "shape: oval");
            text += chance(0.5) ? fmt::format("  width: {:.3f} mm\n  height: {:.3f} mm\n", smaller_mm_, other_mm)
                                : fmt::format("  width: {:.3f} mm\n  height: {:.3f} mm\n", other_mm, smaller_mm_);
            break;
        case 2:
            text += fmt::format("  across: {:.3f} mm\n", smaller_mm_);
            break;
        default:
            text += "  corners: [";
            for (int i = 0, corners = whole(3, 9); i < corners; ++i) { // a star round a middle: never crossing
                const double turn = 6.283185307 * (i + number(-0.3, 0.3)) / corners,
                             reach = smaller_mm_ * number(0.3, 0.7);
                text += fmt::format("{}[{:.2f} mm, {:.2f} mm]", i == 0 ? "" : ", ", reach * std::cos(turn),
                                    reach * std::sin(turn));
            }
            text += "]\n";
        }
        return text +
               some(0.25, fmt::format("centre: [{:.1f} mm, {:.1f} mm]", number(-0.8, 0.8) * smaller_mm_,
                                      number(-0.8, 0.8) * smaller_mm_)) +
               some(0.3, "material: Welsh slate, 25 mm");
    }
    std::string correction() {
        if (!chance(0.25))
            return "";
        const std::string form = one_of(std::array{"graph", "ring", "table"});
        std::string text = "correction:\n  form: " + form + "\n";
        if (form == "ring")
            text += some(0.5, "diameter: " + mm(60, 600));
        else
            text += some(0.5, "width: " + mm(60, 600)) + some(0.5, "height: " + mm(60, 600));
        if (form == "table")
            text += some(0.5, std::string{"dates: "} +
                                  one_of(std::array{"each 5 days", "each 10 days", "each 15 days", "whole minutes"}));
        return text;
    }
    std::string borders() {
        return "borders:\n  margin: " + mm(0.5, 0.05 * smaller_mm_ + 0.6) + "\n" +
               some(0.3, "chapter ring: " + (chance(0.3) ? "0 mm" : mm(1, 0.3 * smaller_mm_))) +
               some(0.3, "inner border: " + (chance(0.3) ? "0 mm" : mm(1, 0.3 * smaller_mm_)));
    }
    std::string gnomon() {
        const std::string kind = one_of(std::array{"edge", "edge", "edge", "rod", "pin", "disc"});
        std::string text = "gnomon:\n  kind: " + kind + "\n";
        if (kind == "edge")
            text += "  holes: " + std::to_string(whole(0, 4)) + "\n" + some(0.2, "foot: " + mm(20, smaller_mm_ + 21));
        has_style_ = kind == "edge" || kind == "rod";
        return text + some(0.3, "nodus height: " + mm(1, std::max(1.1, smaller_mm_ / 2))) +
               some(0.4, "thickness: " + mm(0.5, 0.1 * smaller_mm_));
    }
    std::string hours() {
        time_ = one_of(std::array{"sun", "zone", "sun", "zone", "clock", "since sunrise", "since sunset", "hours left",
                                  "unequal"});
        std::string text = "hours:\n  time: " + time_ + "\n";
        text += some(0.15, fmt::format("from: {}:00", whole(0, 23)));
        text += some(0.15, fmt::format("to: {}:30", whole(0, 23)));
        text += some(0.7, "divide: " +
                              one_of(std::array{"60 min", "30 min", "15 min", "10 min", "5 min", "2 min", "1 min"}));
        text += some(0.6, "numerals: " + one_of(std::array{"roman", "roman iiii", "arabic"}));
        text += some(0.3, "count: 24");
        text += some(0.4, "stand: " + one_of(std::array{"along border", "upright"}));
        if (time_ == "clock")
            text += some(0.4, "curves: " + one_of(std::array{"whole", "december to june", "june to december"}));
        if (has_style_ && (time_ == "sun" || time_ == "zone"))
            text += some(0.25, "reach: season");
        return text + some(0.3, "noon mark: no");
    }
    std::string also() {
        if (chance(0.6))
            return "";
        std::string text = "also:\n  altitudes: [10°, 30°, 50°]\n";
        for (const char* time : {"sun", "clock", "since sunrise", "since sunset", "hours left", "unequal"})
            if (time_ != time)
                text += some(0.3, std::string{time} + ": yes");
        return text + some(0.4, "azimuths: each 30°") +
               some(0.4, "noon at: [{name: Far Haven, longitude: 30° E}, {name: Old Quay, longitude: 77° 30' W}]");
    }
    std::string dates() {
        return "dates:\n  solstices: " + one_of(std::array{"yes", "no"}) + "\n" + some(0.2, "equinoxes: no") +
               some(0.3, "signs: yes") + some(0.3, "months: yes") +
               some(0.3, "days: [29 February, {on: 14 June, label: The fair}, 21 June]") + some(0.2, "labels: no");
    }
    std::string lettering() {
        return "lettering:\n  place line: " +
               one_of(std::array{"yes", "no", "Long ago and far away, by the old mill"}) + "\n" +
               some(0.4, "motto: " + one_of(std::array{"Lux umbra Dei", "Ὥρα πάντα φέρει", "I",
                                                       "A very long motto that winds on and on about the hours and the "
                                                       "shade and never comes to its end"})) +
               some(0.2, "label height: " + mm(0.5, smaller_mm_ / 12));
    }
    std::string cutting() {
        return "cutting:\n  least gap: " + mm(0.05, 20) + "\n" +
               some(0.3, "line width: " + mm(0.05, std::min(10.0, 0.1 * smaller_mm_)));
    }
    std::string print() {
        return "print:\n  paper: " +
               one_of(std::array{"A4", "A3", "A0", "Letter", "Tabloid", "A6", "roll 610 mm", "B5"}) + "\n" +
               some(0.2, "margin: " + mm(1, 50)) + some(0.2, "overlap: " + mm(1, 100)) + some(0.2, "own size: no");
    }
    std::string years() {
        return std::string{} +
               (chance(0.2)   ? "years: 1901 to 1904\n"
                : chance(0.2) ? "years: 2093 to 2096\n"
                              : "") +
               (chance(0.3) ? "units: inch\n" : "");
    }

    std::mt19937 random_;
    double smaller_mm_ = 0;
    bool has_style_ = true;
    std::string time_;
};

unsigned asked(const char* name, unsigned otherwise) {
    const char* text = std::getenv(name);
    return text == nullptr ? otherwise : unsigned(std::strtoul(text, nullptr, 10));
}

/// Whether the Sun comes to where it would stand to throw this point's shadow: by either edge of the gnomon.
bool sun_comes_there(const FacePlan& plan, const layout::Face& face, PlatePoint p, const MeanYear& year) {
    // A border cuts a chord, which lies up to 0.004 mm beside the shadow; seen from the nodus that is at most this.
    const Angle slack = Angle::radians(0.005 / face.placement.nodus_height_mm) + Angle::arcseconds(2);
    const PlateFrame& frame = face.delineation.frame;
    const GnomonEdges edges{frame, face.delineation.style, plan.dial.site.latitude, plan.dial.gnomon_thickness_mm};
    for (const Edge edge : {Edge::left, Edge::right}) {
        const PlatePoint nodus = edges.shift(edge);
        const Eigen::Vector3d towards = (nodus.u_mm - p.u_mm) * frame.u + (nodus.v_mm - p.v_mm) * frame.v +
                                        face.placement.nodus_height_mm * frame.n;
        const SiteDirection sun{towards.normalized()};
        const SkyPlace sky = to_sky(sun, plan.dial.site.latitude);
        const bool in_season = abs(sky.declination) <=
                               std::max(abs(year.at(year.june_solstice_day()).declination), year.obliquity()) + slack;
        if (in_season && plan.dial.skyline.clearance(sun) > -slack.in_radians())
            return true;
    }
    return false;
}

/// No line outside its plate's ring, and no point of a nodus' line that the Sun cannot reach.
void check_lines(const Commission& commission) {
    for (std::size_t i = 0; i < commission.faces.size(); ++i) {
        const layout::Face& face = commission.faces[i];
        const FacePlan& plan = commission.plans[i];
        const layout::Outline field = layout::Rings::of(plan.spec).numerals;
        for (const layout::DrawnLine& line : face.lines) {
            const bool of_style =
                (line.family == Family::hour && line.set == 0 && plan.dial.hours.extent == HourExtent::style) ||
                (line.family == Family::place_noon && plan.dial.hours.extent == HourExtent::style);
            INFO("line " << line.label);
            REQUIRE(line.points.size() >= 2);
            for (const PlatePoint& p : line.points) {
                REQUIRE(std::isfinite(p.u_mm));
                REQUIRE(std::isfinite(p.v_mm));
                const layout::Point at = layout::to_work(p, face.placement.foot);
                REQUIRE((field.contains(at) || field.distance_mm(at) < 1e-5));
                if (!of_style)
                    REQUIRE(sun_comes_there(plan, face, p, commission.year));
            }
        }
    }
}

/// "packet", or the first error.
std::string outcome(const std::string& text) {
    CommissionTaking taking = take_commission(read_design(text, "random.yaml"));
    REQUIRE(taking.commission.has_value() == taking.errors.empty());
    for (const DesignError& error : taking.errors) {
        CHECK_FALSE(error.message.empty());
        CHECK(error.line >= 1);
        CHECK(to_text(error).find("nan") == std::string::npos);
    }
    if (!taking.commission)
        return to_text(taking.errors.front());
    check_lines(*taking.commission);
    try {
        const Packet packet = make_packet(*taking.commission);
        REQUIRE(packet.items.size() >= 5);
        REQUIRE(packet.items.front().file.bytes.substr(0, 5) == "%PDF-");
        for (const Packet::Item& item : packet.items)
            REQUIRE_FALSE(item.file.bytes.empty());
        const auto numbers = std::find_if(packet.items.begin(), packet.items.end(),
                                          [](const Packet::Item& item) { return item.file.name == "numbers.json"; });
        REQUIRE(numbers != packet.items.end());
        REQUIRE_NOTHROW(nlohmann::json::parse(numbers->file.bytes));
    } catch (const layout::ExportError& trouble) {
        return trouble.what(); // told at the design's key by take_packet
    }
    return "packet";
}

} // namespace

TEST_CASE("each random design gives a packet or an error", "[cli]") {
    const unsigned seed = asked("DIALWRIGHT_FUZZ_SEED", 1), count = asked("DIALWRIGHT_FUZZ_COUNT", 200);
    const bool told = std::getenv("DIALWRIGHT_FUZZ_TELL") != nullptr;
    unsigned packets = 0;
    for (unsigned i = 0; i < count; ++i) {
        const std::string text = RandomDesign{seed * 1'000'003U + i}.text();
        INFO("seed " << seed << ", design " << i << "\n" << text);
        std::string said;
        try {
            said = outcome(text);
        } catch (const std::exception& trouble) {
            FAIL_CHECK("left by an exception: " << trouble.what());
        }
        packets += said == "packet";
        if (told)
            fmt::print("{}: {}\n", i, said);
    }
    CHECK(packets > count / 4);
}
