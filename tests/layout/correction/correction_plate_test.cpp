// SPDX-License-Identifier: MIT
#include "layout/correction/correction_plate.hpp"

#include "layout/correction/words.hpp"
#include "layout/plate/points.hpp"

#include <catch2/catch.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <random>

using namespace dialwright;
using namespace dialwright::layout;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinAbs;

namespace {

Correction correction(double longitude_deg, const char* zone_name = "Europe/London", HourTime time = HourTime::sun) {
    static const MeanYear year{2027, 2046};
    const auto zone = Zone::find(zone_name);
    REQUIRE(zone);
    return {year, time, Angle::degrees(longitude_deg), zone->meridian(2027), summer_time_of(*zone, 2027, 2046)};
}

CorrectionSpec spec(CorrectionForm form, double width_mm, double height_mm, double letter_mm) {
    CorrectionSpec made;
    made.form = form;
    made.width_mm = width_mm;
    made.height_mm = height_mm;
    made.letter_height_mm = letter_mm;
    return made;
}

std::vector<Point> points_of(const Mark& mark, double tolerance_mm = 0.02) {
    std::vector<Point> points;
    for (const Path& path : mark.paths)
        for (const Point& p : flattened(path, tolerance_mm))
            points.push_back(p);
    return points;
}

const Mark& mark(const CorrectionPlate& plate, const std::string& name) {
    const auto found = std::find_if(plate.drawing.marks.begin(), plate.drawing.marks.end(),
                                    [&](const Mark& one) { return one.name == name; });
    INFO(name);
    REQUIRE(found != plate.drawing.marks.end());
    return *found;
}

double distance_to_segment(Point p, Point a, Point b) {
    const Point along = b - a;
    const double size = dot(along, along);
    return distance(p, a + (size > 0 ? std::clamp(dot(p - a, along) / size, 0.0, 1.0) : 0.0) * along);
}

/// No lettering runs into other lettering or into a line, but for the graph's curve and lines, which its words interrupt.
void check_clear(const CorrectionPlate& plate, double least_mm) {
    struct Letters {
        const Mark* mark;
        std::vector<Point> points;
        Box box;
    };
    std::vector<Letters> letters;
    std::vector<std::pair<const Mark*, std::vector<Point>>> strokes;
    for (const Mark& one : plate.drawing.marks) {
        auto points = points_of(one, 0.05);
        Box box;
        for (const Point& p : points)
            box.add(p);
        if (one.filled)
            letters.push_back({&one, std::move(points), box});
        else
            strokes.emplace_back(&one, std::move(points));
    }
    REQUIRE(letters.size() > 20);
    for (std::size_t i = 0; i < letters.size(); ++i) {
        for (std::size_t k = i + 1; k < letters.size(); ++k)
            if (letters[i].box.grown(least_mm).meets(letters[k].box))
                for (const Point& p : letters[i].points)
                    for (const Point& q : letters[k].points)
                        if (distance(p, q) < least_mm)
                            FAIL(letters[i].mark->name << " runs into " << letters[k].mark->name);
        for (const auto& [stroke, points] : strokes)
            for (std::size_t n = 0; n + 1 < points.size(); ++n) {
                Box piece;
                piece.add(points[n]);
                piece.add(points[n + 1]);
                if (!piece.grown(least_mm + stroke->width_mm).meets(letters[i].box))
                    continue;
                for (const Point& p : letters[i].points)
                    if (distance_to_segment(p, points[n], points[n + 1]) < least_mm + stroke->width_mm / 2)
                        FAIL(letters[i].mark->name << " runs into " << stroke->name << " at " << p.x_mm << ", "
                                                   << p.y_mm);
            }
    }
}

void check_on_plate(const CorrectionPlate& plate) {
    const Box edge = bounds_of(mark(plate, "outline").paths.front());
    for (const Mark& one : plate.drawing.marks) {
        CHECK(is_finite(one));
        if (one.layer != Layer::cut)
            CHECK(edge.grown(-1.0).contains(bounds_of(one)));
    }
}

} // namespace

TEST_CASE("the graph's curve is the correction", "[correction]") {
    const Correction one = correction(-1.7);
    const CorrectionPlate plate = draw_correction(one, spec(CorrectionForm::graph, 360, 200, 4));
    check_on_plate(plate);
    check_clear(plate, 0.2);
    const Box field = bounds_of(mark(plate, "field").paths.front());
    const double nothing = mark(plate, "minutes 0").paths.front().start.y_mm;
    const double minute = mark(plate, "minutes 1").paths.front().start.y_mm - nothing;
    CHECK_THAT(mark(plate, "minutes -5").paths.front().start.y_mm, WithinAbs(nothing - 5 * minute, 1e-9));
    const auto points = points_of(mark(plate, "curve"), 0.001);
    CHECK_THAT(points.front().x_mm, WithinAbs(field.left_mm, 1e-9));
    CHECK_THAT(points.back().x_mm, WithinAbs(field.right_mm, 1e-9));
    for (const Point& p : points) {
        const double day = (p.x_mm - field.left_mm) / field.width_mm() * MeanYear::k_length_days;
        CHECK_THAT(p.y_mm, WithinAbs(nothing + one.add_min(day) * minute, 0.01));
    }
    CHECK(bounds_of(mark(plate, k_add_words)).bottom_mm > nothing);
    CHECK(bounds_of(mark(plate, k_take_words)).top_mm < nothing);
    // The start of a month stands at its first day's own start.
    const double july = mark(plate, "start of July").paths.front().start.x_mm;
    CHECK_THAT((july - field.left_mm) / field.width_mm() * 365.25, WithinAbs(31 + 28.25 + 31 + 30 + 31 + 30, 1e-6));
}

TEST_CASE("the ring's marks stand on the days of whole minutes", "[correction]") {
    for (const double longitude : {-1.7, -8.7, 12.0, 4.0}) {
        const Correction one = correction(longitude);
        const CorrectionPlate plate = draw_correction(one, spec(CorrectionForm::ring, 260, 260, 3.5));
        INFO("longitude " << longitude);
        check_on_plate(plate);
        check_clear(plate, 0.15);
        int marks = 0;
        for (const Mark& m : plate.drawing.marks) {
            if (!m.name.starts_with("minute "))
                continue;
            ++marks;
            const Point at = m.paths.front().start;
            const double day = Angle::radians(std::atan2(at.x_mm, at.y_mm)).positive_turn().in_degrees() / 360 * 365.25;
            CHECK_THAT(one.add_min(day), WithinAbs(std::stod(m.name.substr(7)), 1e-4));
        }
        CHECK(marks > 50);
        // Words say what becomes of the minutes on their own stretch of the year.
        int words = 0;
        for (const Mark& m : plate.drawing.marks)
            if (m.name == k_add_words || m.name == k_take_words) {
                ++words;
                const Point at = bounds_of(m).middle();
                const double day =
                    Angle::radians(std::atan2(at.x_mm, at.y_mm)).positive_turn().in_degrees() / 360 * 365.25;
                CHECK((one.add_min(day) > 0) == (m.name == k_add_words));
            }
        CHECK(words >= 2);
    }
}

TEST_CASE("a table holds the minutes of its dates, and thins to letters that can be cut", "[correction]") {
    const Correction one = correction(-1.7);
    const auto cells = [](const CorrectionPlate& plate) {
        return std::count_if(plate.drawing.marks.begin(), plate.drawing.marks.end(), [](const Mark& m) {
            return m.name.find(": ") != std::string::npos && !m.name.starts_with("day of ");
        });
    };
    const CorrectionPlate close = draw_correction(one, spec(CorrectionForm::table, 320, 180, 3.5));
    const CorrectionPlate wide = draw_correction(one, spec(CorrectionForm::table, 160, 110, 3.5));
    CHECK(close.steps == TableSteps::five_days);
    CHECK(cells(close) == 72);
    CHECK((wide.steps == TableSteps::ten_days || wide.steps == TableSteps::fifteen_days));
    CHECK(wide.letter_height_mm == 3.5);
    for (const CorrectionPlate* plate : {&close, &wide}) {
        check_on_plate(*plate);
        check_clear(*plate, 0.2);
    }
    for (const auto& [day, month, name] : {std::tuple{1U, 1U, "1 Jan"}, {11U, 11U, "11 Nov"}, {26U, 7U, "26 Jul"}}) {
        const double minutes = one.add_min(std::chrono::month{month} / std::chrono::day{day});
        mark(close, std::string{name} + ": " + add_or_take(minutes));
    }
    // Small plates get smaller letters, told to the maker, and none that can't be cut.
    CorrectionSpec small = spec(CorrectionForm::table, 110, 80, 4);
    small.cutting.line_width_mm = 0.3;
    small.cutting.least_gap_mm = 0.4;
    const CorrectionPlate shrunk = draw_correction(one, small);
    CHECK(shrunk.letter_height_mm < 4);
    CHECK(shrunk.letter_height_mm >= least_letter_mm(small.cutting));
    REQUIRE(shrunk.warnings.size() == 1);
    CHECK_THAT(shrunk.warnings.front(), Contains("instead of 4.0 mm"));
}

TEST_CASE("a table by whole minutes names every change, and each holds until the next", "[correction]") {
    const Correction one = correction(-8.0, "Europe/Madrid");
    CorrectionSpec wanted = spec(CorrectionForm::table, 420, 320, 3);
    wanted.steps = TableSteps::whole_minutes;
    const CorrectionPlate plate = draw_correction(one, wanted);
    check_clear(plate, 0.2);
    std::vector<std::string> names;
    for (const Mark& m : plate.drawing.marks)
        names.push_back(m.name);
    std::string now;
    for (const std::chrono::month_day date : dates_of_year()) {
        const std::string here = say_date(date, true) + ": " + minutes_figure(one.add_min(date));
        if (const auto changed = std::find(names.begin(), names.end(), here); changed != names.end())
            now = minutes_figure(one.add_min(date));
        CHECK(now == minutes_figure(one.add_min(date)));
    }
}

TEST_CASE("an engraving point gets single strokes", "[correction]") {
    for (const CorrectionForm form : {CorrectionForm::graph, CorrectionForm::ring, CorrectionForm::table}) {
        CorrectionSpec wanted = spec(form, 260, form == CorrectionForm::ring ? 260 : 180, 3.5);
        wanted.cutting.single_strokes = true;
        const CorrectionPlate plate = draw_correction(correction(-1.7), wanted);
        check_on_plate(plate);
        for (const Mark& one : plate.drawing.marks)
            CHECK_FALSE(one.filled);
        CHECK(mark(plate, "heading").paths.size() > 20);
    }
}

TEST_CASE("plates of random sizes, places and tools are clear, or refused in plain words", "[correction]") {
    std::mt19937 random{20};
    INFO("seed 20");
    const auto number = [&](double least, double most) { return std::uniform_real_distribution{least, most}(random); };
    int made = 0;
    for (int i = 0; i < 60; ++i) {
        const auto form = static_cast<CorrectionForm>(i % 3);
        const double width = number(60, 500), height = form == CorrectionForm::ring ? width : number(50, 400);
        CorrectionSpec wanted = spec(form, width, height, number(1.5, 6));
        wanted.cutting.line_width_mm = number(0.1, 0.8);
        wanted.cutting.least_gap_mm = number(0.2, 1.2);
        const double longitude = number(-12, 12);
        INFO("plate " << i << ": " << width << " × " << height << ", longitude " << longitude << ", line "
                      << wanted.cutting.line_width_mm);
        try {
            const CorrectionPlate plate = draw_correction(correction(longitude), wanted);
            ++made;
            check_on_plate(plate);
            check_clear(plate, 0.05);
            CHECK(plate.letter_height_mm >= std::min(wanted.letter_height_mm, least_letter_mm(wanted.cutting)) - 1e-9);
        } catch (const std::invalid_argument& refused) {
            CHECK_THAT(refused.what(), Contains("is too small for"));
        }
    }
    CHECK(made > 30);
}

TEST_CASE("the words have no sign that can be read backwards", "[correction]") {
    CHECK(add_or_take(3.2) == "add 3");
    CHECK(add_or_take(-16.4) == "take 16");
    CHECK(add_or_take(-0.3) == "0");
    CHECK(add_or_take(104.6) == "add 1 h 45");
    CHECK(add_or_take_exactly(-0.05) == "take 0 min 03 s");
    CHECK(add_or_take_exactly(7.5) == "add 7 min 30 s");
    CHECK_THAT(say_rule(correction(-1.7)), Contains("added to it or taken from it"));
    CHECK_THAT(say_rule(correction(-8.7, "Europe/Madrid")), Contains("added to it, is clock time"));
    CHECK_THAT(say_rule(correction(8.0)), Contains("taken from it, is clock time"));
    CHECK(say_summer(correction(-1.7).summer(), false) ==
          "From the last Sunday of March to the last Sunday of October, also add one hour for summer time.");
    CHECK(say_summer(correction(151, "Australia/Lord_Howe").summer(), false) ==
          "From the first Sunday of October to the first Sunday of April, also add 30 minutes for summer time.");
    CHECK_THAT(say_summer(correction(-1.7).summer(), true), Contains("read the summer numerals"));
    CHECK(say_summer(correction(139, "Asia/Tokyo").summer(), false).empty());
    CHECK_THAT(say_summer(correction(31, "Africa/Cairo").summer(), false),
               Contains("to the end of the last Thursday of October"));
}
