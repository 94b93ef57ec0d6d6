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
        std::string text = place(); // one after the other: the plate's size bounds what follows
        text += dial();
        text += plate();
        for (const auto section : {&RandomDesign::borders, &RandomDesign::gnomon, &RandomDesign::hours, &RandomDesign::dates, &RandomDesign::lettering,
                                   &RandomDesign::cutting, &RandomDesign::print, &RandomDesign::years})
            text += (this->*section)();
        return text;
    }

  private:
    bool chance(double part) { return number(0, 1) < part; }
    double number(double least, double most) { return std::uniform_real_distribution{least, most}(random_); }
    int whole(int least, int most) { return std::uniform_int_distribution{least, most}(random_); }
    template <std::size_t n> std::string one_of(const std::array<const char*, n>& words) { return words[std::size_t(whole(0, int(n) - 1))]; }
    /// Small as often as large.
    double size_mm(double least, double most) { return std::exp(number(std::log(least), std::log(most))); }
    std::string mm(double least, double most) { return fmt::format("{:.2f} mm", size_mm(least, most)); }
    /// A line of a section, now and then.
    std::string some(double part, const std::string& line) { return chance(part) ? "  " + line + "\n" : ""; }

    std::string place() {
        constexpr std::array k_latitudes{"0", "90 N", "90 S", "23.44", "-23.44", "66.56", "-66.56", "89.9", "0.001", "45"};
        const std::string latitude = chance(0.3) ? one_of(k_latitudes) : fmt::format("{:.4f}", number(-90, 90));
        return fmt::format("place:\n  name: {}\n  latitude: {}\n  longitude: {:.4f}\n  zone: {}\n", one_of(std::array{"Nether Beck", "Ærøholm", "Κάτω Λιμήν"}), latitude,
                           number(-180, 180), one_of(std::array{"Europe/London", "Asia/Kathmandu", "Pacific/Kiritimati", "America/St_Johns", "UTC", "Antarctica/Troll", "Australia/Lord_Howe"}));
    }
    std::string facing() {
        return chance(0.4) ? one_of(std::array{"north", "south", "east", "west", "SE", "NNW", "S 23° E", "S 89.99° W", "S 0.01° W"})
                           : fmt::format("{:.3f}°", number(0, 360));
    }
    std::string dial() {
        switch (whole(0, 3)) {
        case 0:
            return "dial: {kind: level}\n";
        case 1:
            return fmt::format("dial:\n  kind: equatorial\n  faces: {}\n", one_of(std::array{"upper", "lower", "both"}));
        case 2:
            return fmt::format("dial:\n  kind: wall\n  facing: {}\n", facing()) + some(0.5, fmt::format("lean: {:.3f}° {}", number(0, 45), one_of(std::array{"back", "forward"})));
        default:
            return fmt::format("dial:\n  kind: leaning\n  facing: {}\n  lean: {}\n", facing(),
                               chance(0.5) ? fmt::format("{:.3f}° back", number(0.1, 89.9)) : fmt::format("{:.3f}° forward", number(0.1, 80)));
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
            text += chance(0.5) ? fmt::format("  width: {:.3f} mm\n  height: {:.3f} mm\n", smaller_mm_, other_mm)
                                : fmt::format("  width: {:.3f} mm\n  height: {:.3f} mm\n", other_mm, smaller_mm_);
            break;
        case 2:
            text += fmt::format("  across: {:.3f} mm\n", smaller_mm_);
            break;
        default:
            text += "  corners: [";
            for (int i = 0, corners = whole(3, 9); i < corners; ++i) { // a star round a middle: never crossing
                const double turn = 6.283185307 * (i + number(-0.3, 0.3)) / corners, reach = smaller_mm_ * number(0.3, 0.7);
                text += fmt::format("{}[{:.2f} mm, {:.2f} mm]", i == 0 ? "" : ", ", reach * std::cos(turn), reach * std::sin(turn));
            }
            text += "]\n";
        }
        return text + some(0.25, fmt::format("centre: [{:.1f} mm, {:.1f} mm]", number(-0.8, 0.8) * smaller_mm_, number(-0.8, 0.8) * smaller_mm_)) +
               some(0.3, "material: Welsh slate, 25 mm");
    }
    std::string borders() {
        return "borders:\n  margin: " + mm(0.5, 0.05 * smaller_mm_ + 0.6) + "\n" + some(0.3, "chapter ring: " + (chance(0.3) ? "0 mm" : mm(1, 0.3 * smaller_mm_))) +
               some(0.3, "inner border: " + (chance(0.3) ? "0 mm" : mm(1, 0.3 * smaller_mm_)));
    }
    std::string gnomon() {
        return "gnomon:\n  holes: " + std::to_string(whole(0, 4)) + "\n" + some(0.3, "nodus height: " + mm(1, std::max(1.1, smaller_mm_ / 2))) +
               some(0.4, "thickness: " + mm(0.5, 0.1 * smaller_mm_)) + some(0.2, "foot: " + mm(20, smaller_mm_ + 21));
    }
    std::string hours() {
        const std::string time = one_of(std::array{"sun", "zone", "clock"});
        std::string text = "hours:\n  time: " + time + "\n";
        text += some(0.15, fmt::format("from: {}:00", whole(0, 23)));
        text += some(0.15, fmt::format("to: {}:30", whole(0, 23)));
        text += some(0.7, "divide: " + one_of(std::array{"60 min", "30 min", "15 min", "10 min", "5 min", "2 min", "1 min"}));
        text += some(0.6, "numerals: " + one_of(std::array{"roman", "roman iiii", "arabic"}));
        text += some(0.3, "count: 24");
        text += some(0.4, "stand: " + one_of(std::array{"along border", "upright"}));
        if (time == "clock")
            text += some(0.4, "curves: " + one_of(std::array{"whole", "december to june", "june to december"}));
        return text + some(0.3, "noon mark: no");
    }
    std::string dates() {
        return "dates:\n  solstices: " + one_of(std::array{"yes", "no"}) + "\n" + some(0.2, "equinoxes: no") + some(0.3, "signs: yes") + some(0.3, "months: yes") +
               some(0.3, "days: [29 February, {on: 14 June, label: The fair}, 21 June]") + some(0.2, "labels: no");
    }
    std::string lettering() {
        return "lettering:\n  place line: " + one_of(std::array{"yes", "no", "Long ago and far away, by the old mill"}) + "\n" +
               some(0.4, "motto: " + one_of(std::array{"Lux umbra Dei", "Ὥρα πάντα φέρει", "I", "A very long motto that winds on and on about the hours and the shade and never comes to its end"})) +
               some(0.2, "label height: " + mm(0.5, smaller_mm_ / 12));
    }
    std::string cutting() { return "cutting:\n  least gap: " + mm(0.05, 20) + "\n" + some(0.3, "line width: " + mm(0.05, std::min(10.0, 0.1 * smaller_mm_))); }
    std::string print() {
        return "print:\n  paper: " + one_of(std::array{"A4", "A3", "A0", "Letter", "Tabloid", "A6", "roll 610 mm", "B5"}) + "\n" + some(0.2, "margin: " + mm(1, 50)) +
               some(0.2, "overlap: " + mm(1, 100)) + some(0.2, "own size: no");
    }
    std::string years() { return std::string{} + (chance(0.2) ? "years: 1901 to 1904\n" : chance(0.2) ? "years: 2093 to 2096\n" : "") + (chance(0.3) ? "units: inch\n" : ""); }

    std::mt19937 random_;
    double smaller_mm_ = 0;
};

unsigned asked(const char* name, unsigned otherwise) {
    const char* text = std::getenv(name);
    return text == nullptr ? otherwise : unsigned(std::strtoul(text, nullptr, 10));
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
    try {
        const Packet packet = make_packet(*taking.commission);
        REQUIRE(packet.items.size() >= 5);
        REQUIRE(packet.items.front().file.bytes.substr(0, 5) == "%PDF-");
        for (const Packet::Item& item : packet.items)
            REQUIRE_FALSE(item.file.bytes.empty());
        REQUIRE_NOTHROW(nlohmann::json::parse(packet.items.back().file.bytes));
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
