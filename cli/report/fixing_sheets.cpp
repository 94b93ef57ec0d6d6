// SPDX-License-Identifier: MIT
#include "cli/report/fixing.hpp"

#include "cli/report/fixing_words.hpp"
#include "cli/report/say.hpp"
#include "layout/sheet/flow.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <map>

namespace dialwright::cli {
namespace {

using layout::Align;
using layout::Flow;

constexpr std::size_t k_most_pages = 2;
constexpr double k_row_mm = 3.3; ///< of the smaller tables

/// How much goes on the sheet.
struct Extent {
    std::size_t dates = 4;
    int step_min = 15;
    bool gauge = true;
    double size_mm = 2.3;
};

/// So many dates of the run, its first and last among them.
std::vector<const FixingDate*> chosen_dates(const Fixing& fixing, std::size_t most) {
    std::vector<const FixingDate*> chosen;
    const std::size_t all = fixing.dates.size(), count = std::min(all, most);
    for (std::size_t i = 0; i < count; ++i)
        chosen.push_back(&fixing.dates[count == 1 ? 0 : i * (all - 1) / (count - 1)]);
    return chosen;
}

class FixingPages {
  public:
    FixingPages(const Fixing& fixing, const layout::PrintOptions& options, const Extent& extent)
        : fixing_{fixing}, commission_{*fixing.commission}, words_{plate_words(commission_.design)}, extent_{extent},
          flow_{options, "Fixing"}, dates_{chosen_dates(fixing, extent.dates)} {}

    std::vector<layout::Sheet> pages() {
        put_heading();
        for (std::size_t face = 0; face < commission_.plans.size(); ++face)
            put_quarters(face);
        put_north();
        for (std::size_t face = 0; face < commission_.plans.size(); ++face)
            put_moves(face);
        put_cautions();
        if (extent_.gauge)
            put_gauges();
        return flow_.sheets();
    }

  private:
    void put_heading() {
        const Design& design = commission_.design;
        flow_.paragraph("Fixing: " + design.title, "", true, 5.0);
        flow_.space(0.6);
        flow_.paragraph(fmt::format("{}{}{}, {}, {}. Clock times are what a watch shows there, summer time included. "
                                    "Set the watch to the second first.",
                                    design.place.name, design.place.name.empty() ? "" : ": ",
                                    say_latitude(design.place.site.latitude),
                                    say_longitude(design.place.site.longitude), design.place.zone),
                        "", false, 2.6);
        flow_.space(1);
        std::vector<TableRow> rows;
        for (const FixingDate* date : dates_)
            rows.push_back(noon_row(fixing_, *date));
        flow_.table(noon_columns(), rows, 2.5);
        if (dates_.size() < fixing_.dates.size())
            flow_.paragraph(fmt::format("The {} dates between have no room here: take what lies between, or ask "
                                        "dialwright fix for a shorter run.",
                                        fixing_.dates.size() - dates_.size()),
                            "", false, 2.5);
    }

    /// What a face must show, a row for each time by the clock at which it is lit on some chosen date.
    void put_quarters(std::size_t face) {
        std::map<std::string, std::vector<const FixingRow*>> by_clock;
        bool off_plate = false;
        for (std::size_t i = 0; i < dates_.size(); ++i)
            for (const FixingRow& row : dates_[i]->rows) {
                const std::string clock = say_clock(fixing_.zone, row.shadow.at).substr(0, 5);
                if (row.shadow.face != face || std::stoi(clock.substr(3)) % extent_.step_min != 0)
                    continue;
                auto& cells = by_clock[clock];
                cells.resize(dates_.size());
                cells[i] = &row;
                off_plate = off_plate || !row.on_plate;
            }
        const std::string& name = commission_.plans[face].spec.name;
        flow_.heading("What it must read" + (name.empty() ? "" : ", " + name));
        if (by_clock.empty()) {
            flow_.paragraph("The Sun does not light this face on these dates.");
            return;
        }
        std::vector<Flow::Column> columns{{"clock", Align::left}};
        for (const FixingDate* date : dates_) {
            const auto day = date->day.date;
            columns.push_back(
                {dates_.size() == 1 ? "reads" : say_date(day).substr(0, say_date(day).size() - 5), Align::right});
            columns.push_back({words_.right + (inches() ? " in" : " mm"), Align::right});
            columns.push_back({words_.up + (inches() ? " in" : " mm"), Align::right});
        }
        std::vector<TableRow> rows;
        for (const auto& [clock, cells] : by_clock) {
            rows.push_back({clock});
            for (const FixingRow* row : cells)
                add_cells(rows.back(), row);
        }
        flow_.table(columns, rows, extent_.size_mm);
        flow_.paragraph(fmt::format("The nodus' shadow in {} from the nodus' foot, {} and {}{}.",
                                    inches() ? "inches" : "mm", words_.right, words_.up,
                                    off_plate ? "; – where it falls beyond the plate: read the style's shadow" : ""),
                        "", false, 2.5);
    }

    [[nodiscard]] bool inches() const { return commission_.design.units == Units::inches; }

    void add_cells(TableRow& cells, const FixingRow* row) const {
        if (row == nullptr) {
            cells.insert(cells.end(), 3, "");
            return;
        }
        cells.push_back(row->shadow.reads_h ? reading_words(*row->shadow.reads_h) : "none");
        cells.push_back(row->on_plate ? layout::bare_length(row->shadow.shadow->u_mm, inches()) : "–");
        cells.push_back(row->on_plate ? layout::bare_length(row->shadow.shadow->v_mm, inches()) : "–");
    }

    void put_north() {
        std::vector<TableRow> rows;
        const std::vector<const FixingDate*> ends =
            dates_.size() > 1 ? std::vector{dates_.front(), dates_.back()} : std::vector{dates_.front()};
        for (const FixingDate* date : ends)
            for (TableRow& row : pair_rows(fixing_, *date)) {
                row.insert(row.begin(), say_date(date->day.date));
                rows.push_back(std::move(row));
            }
        // Words and table on one page.
        flow_.need(34 + k_row_mm * double(rows.size()));
        flow_.heading("North by shadows");
        flow_.paragraph(north_words(), "", false, 2.6);
        if (rows.empty()) {
            flow_.paragraph("The Sun stands too low or too near overhead on these dates for equal shadows.");
            return;
        }
        std::vector<Flow::Column> columns = pair_columns();
        columns.insert(columns.begin(), {"date", Align::right});
        flow_.space(0.6);
        flow_.table(columns, rows, 2.3);
    }

    void put_moves(std::size_t face) {
        const std::string& name = commission_.plans[face].spec.name;
        const std::string of_face = name.empty() ? "" : ", " + name;
        flow_.heading("Level and plumb" + of_face);
        for (const std::string& line : level_words(fixing_, face))
            flow_.paragraph(line, "•", false, 2.6);
        if (fixing_.answers[face].empty())
            return;
        flow_.heading("Which way to move it" + of_face);
        for (const std::string& line : move_words(fixing_, face))
            flow_.paragraph(line, "•", false, 2.6);
        flow_.need(10 + k_row_mm * double(fixing_.answers[face].size()));
        flow_.space(0.6);
        flow_.paragraph(fmt::format("Minutes by which the reading goes on for a degree, {}:",
                                    say_date(fixing_.dates.front().day.date)),
                        "", false, 2.5);
        flow_.table(answer_columns(fixing_), answer_rows(fixing_, face), 2.3);
    }

    void put_cautions() {
        flow_.list("Take care",
                   {"Never look at the Sun to align a dial, not even for a moment: work from the shadow.",
                    "A plate that is not yet held can fall or tip: prop it, keep hands and feet from under it, and let "
                    "a second person hold it while you read."});
    }

    void put_gauges() {
        for (std::size_t face = 0; face < commission_.gnomons.size(); ++face)
            for (const layout::Part& part : commission_.gnomons[face])
                if (part.title.starts_with("The gauge") && !part.drawings.empty())
                    put_gauge(part);
    }

    void put_gauge(const layout::Part& part) {
        flow_.space(2);
        const std::shared_ptr<const layout::Drawing> drawing{std::shared_ptr<void>{}, &part.drawings.front()};
        if (!flow_.full_size(drawing,
                             part.title + ", full size: measure the bars first, and cut it from card or sheet."))
            flow_.paragraph(part.title + " is on the packet's own sheets.");
    }

    const Fixing& fixing_;
    const Commission& commission_;
    PlateWords words_;
    Extent extent_;
    Flow flow_;
    std::vector<const FixingDate*> dates_;
};

} // namespace

std::vector<layout::Sheet> fixing_sheets(const Fixing& fixing, const layout::PrintOptions& options) {
    std::vector<layout::Sheet> pages;
    for (const Extent& extent :
         {Extent{4, 15, true, 2.3}, Extent{4, 15, true, 2.0}, Extent{2, 15, true, 2.3}, Extent{2, 15, false, 2.0},
          Extent{1, 15, true, 2.0}, Extent{1, 15, false, 2.0}, Extent{1, 30, false, 2.0}, Extent{1, 60, false, 2.0}}) {
        pages = FixingPages{fixing, options, extent}.pages();
        if (pages.size() <= k_most_pages)
            break;
    }
    return pages;
}

} // namespace dialwright::cli
