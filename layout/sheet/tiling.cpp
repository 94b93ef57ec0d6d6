// SPDX-License-Identifier: MIT
#include "layout/sheet/tiling.hpp"

#include "layout/drawing/clipping.hpp"
#include "layout/sheet/measuring.hpp"
#include "layout/sheet/note_width.hpp"
#include "layout/sheet/tile_grid.hpp"
#include "layout/sheet/tile_map.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <optional>
#include <tuple>

namespace dialwright::layout {
namespace {

constexpr double k_largest_page_mm = 5080.0; // 14,400 points
constexpr double k_least_opening_mm = 30.0;
constexpr int k_most_sheets = 1000;
constexpr double k_cross_mm = 5.0, k_ring_mm = 1.5, k_hair_mm = 0.12;

/// One way to lay the work on paper.
struct Plan {
    double width_mm = 0, height_mm = 0; // of the page
    bool turned = false;
    Surround surround;
    Box opening;
    TileGrid grid; // over the (turned) work
    std::vector<bool> used;
    int sheets = 0;
};

Box turned_box(const Box& box, bool turned) {
    return turned ? Box{-box.top_mm, box.left_mm, -box.bottom_mm, box.right_mm} : box;
}

void require_work(const Drawing& drawing) {
    for (const Mark& mark : drawing.marks) {
        if (!is_finite(mark)) {
            throw ExportError(fmt::format("“{}” has a point that is no number, so it can't be put on paper.",
                                          mark.name.empty() ? name_of(mark.layer) : mark.name));
        }
    }
    const Box box = bounds_of(drawing);
    if (box.empty()) {
        throw ExportError("There is nothing to print: the drawing is empty.");
    }
    if (box.width_mm() + box.height_mm() > 1e6) {
        throw ExportError("The drawing is more than a kilometre across, so it can't be put on paper.");
    }
}

std::optional<Plan> plan_on(double width_mm, double height_mm, bool turned, bool one_sheet, const Box& work,
                            const PrintOptions& options) {
    Plan plan;
    plan.width_mm = width_mm;
    plan.height_mm = height_mm;
    plan.turned = turned;
    // With the longest label and numbers that a sheet may carry, so that each sheet has the same strips.
    const SheetWords words{paper_words(options, width_mm, height_mm), options.title, one_sheet ? "" : "MM88", 888, 888};
    plan.surround = surround_of(width_mm, height_mm, options.margin_mm, options.inches, words);
    plan.opening = opening_of(width_mm, height_mm, options.margin_mm, plan.surround);
    const double width = plan.opening.width_mm(), height = plan.opening.height_mm();
    if (std::min(width, height) < k_least_opening_mm + (one_sheet ? 0.0 : options.overlap_mm)) {
        return std::nullopt;
    }
    plan.grid = grid_over(turned_box(work, turned), width, height, one_sheet ? 0.0 : options.overlap_mm);
    return plan;
}

/// A roll's page is cut off as short as the work lets it.
void shorten(Plan& plan, const Box& work, bool one_sheet, const PrintOptions& options) {
    const double needed = turned_box(work, plan.turned).height_mm();
    const double spare = plan.grid.rows == 1 ? plan.opening.height_mm() - needed : 0.0;
    const double least_mm = 180.0; // the bar in y and the notes
    const double height = std::max(least_mm, std::ceil(plan.height_mm - spare));
    if (height < plan.height_mm) {
        if (auto shorter = plan_on(plan.width_mm, height, plan.turned, one_sheet, work, options);
            shorter && shorter->grid.rows == 1) {
            plan = *shorter;
        }
    }
}

std::vector<Plan> plans_for(const Box& work, bool one_sheet, const PrintOptions& options) {
    std::vector<Plan> plans;
    for (const bool turned : {false, true}) {
        for (const bool lying : {false, true}) {
            const double width = lying ? options.paper.long_mm : options.paper.short_mm;
            const double height = lying ? options.paper.short_mm : options.paper.long_mm;
            if (lying && (options.paper.roll || width == height)) {
                continue;
            }
            if (!options.paper.roll && width != height &&
                options.turn == (lying ? PaperTurn::upright : PaperTurn::lying)) {
                continue;
            }
            if (auto plan = plan_on(width, height, turned, one_sheet, work, options)) {
                if (options.paper.roll) {
                    shorten(*plan, work, one_sheet, options);
                }
                plans.push_back(std::move(*plan));
            }
        }
    }
    return plans;
}

/// The plan with one sheet for all; the work as it stands before the work turned, less paper before more.
std::optional<Plan> one_sheet_plan(const Box& work, const PrintOptions& options) {
    std::optional<Plan> best;
    for (Plan& plan : plans_for(work, true, options)) {
        const bool fits = plan.grid.rows == 1 && plan.grid.columns == 1;
        if (fits && (!best || plan.height_mm * plan.width_mm < best->height_mm * best->width_mm)) {
            plan.used = {true};
            plan.sheets = 1;
            best = std::move(plan);
        }
    }
    return best;
}

[[noreturn]] void refuse_room(const PrintOptions& options) {
    const SheetWords words{paper_words(options, options.paper.short_mm, options.paper.long_mm), options.title, "MM88",
                           888, 888};
    const Surround surround =
        surround_of(options.paper.short_mm, options.paper.long_mm, options.margin_mm, options.inches, words);
    const Box opening = opening_of(options.paper.short_mm, options.paper.long_mm, options.margin_mm, surround);
    throw ExportError(
        fmt::format("{} leaves no room for the work: with margins of {:.1f} mm and the strips for bars and notes, "
                    "{:.1f} × {:.1f} mm "
                    "are left, and {:.1f} mm of that overlap. Each side needs {:.0f} mm more than the overlap: choose "
                    "a larger paper, "
                    "a smaller margin or a smaller overlap.",
                    options.paper.name, options.margin_mm, std::max(0.0, opening.right_mm - opening.left_mm),
                    std::max(0.0, opening.top_mm - opening.bottom_mm), options.overlap_mm, k_least_opening_mm));
}

Plan best_tiles(const FlatDrawing& drawing, const Box& work, const PrintOptions& options) {
    std::vector<Plan> plans = plans_for(work, false, options);
    if (plans.empty()) {
        refuse_room(options);
    }
    const auto all = [](const Plan& plan) {
        return static_cast<double>(plan.grid.rows) * static_cast<double>(plan.grid.columns);
    };
    const auto fewest =
        std::min_element(plans.begin(), plans.end(), [&](const Plan& a, const Plan& b) { return all(a) < all(b); });
    if (all(*fewest) > k_most_sheets) {
        throw ExportError(fmt::format("The work of {:.0f} × {:.0f} mm would take {:.0f} sheets of {}: choose a larger "
                                      "paper, at most {} sheets are made.",
                                      work.width_mm(), work.height_mm(), all(*fewest), options.paper.name,
                                      k_most_sheets));
    }
    const Plan* best = nullptr;
    const auto cost = [&](const Plan& plan) {
        return std::tuple{plan.sheets, all(plan), plan.height_mm * plan.width_mm};
    };
    for (Plan& plan : plans) {
        if (all(plan) > 4.0 * k_most_sheets) {
            continue;
        }
        plan.used = occupied(plan.grid, drawing, plan.turned);
        plan.sheets = static_cast<int>(std::count(plan.used.begin(), plan.used.end(), true));
        if (best == nullptr || cost(plan) < cost(*best)) {
            best = &plan;
        }
    }
    return *best;
}

Placing placing_on(const Plan& plan, const Box& tile) {
    return {plan.turned ? Angle::degrees(90) : Angle{},
            {plan.opening.left_mm - tile.left_mm, plan.opening.bottom_mm - tile.bottom_mm}};
}

/// Everything of one sheet's joining marks, drawn from the grid's own seams so that they fall on the same point of the
/// work on every sheet that shows it.
class JoiningMarks {
  public:
    JoiningMarks(Sheet& sheet, const Plan& plan, int row, int column)
        : sheet_{sheet}, plan_{plan}, row_{row}, column_{column}, tile_{plan.grid.box(row, column)} {}

    void add() {
        crosses();
        ticks();
        neighbours();
        sheet_.furniture.push_back({Layer::guide, {rectangle(plan_.opening)}, k_hair_mm, false, "frame"});
    }

  private:
    [[nodiscard]] Point on_page(double x, double y) const {
        return {plan_.opening.left_mm + x - tile_.left_mm, plan_.opening.bottom_mm + y - tile_.bottom_mm};
    }
    void crosses();
    void ticks();
    void neighbours();
    void neighbour(int row, int column, Point at, Angle turn, const char* before, const char* after);

    Sheet& sheet_;
    const Plan& plan_;
    int row_, column_;
    Box tile_;
};

void JoiningMarks::crosses() {
    Mark mark{Layer::engrave, {}, k_hair_mm, false, "crosses"};
    for (int i = column_; i <= column_ + 1; ++i) {
        for (int j = row_; j <= row_ + 1; ++j) {
            const bool outer_x = i == 0 || i == plan_.grid.columns, outer_y = j == 0 || j == plan_.grid.rows;
            if (outer_x && outer_y) {
                continue; // nothing joins at the corners of the whole
            }
            const Point at = on_page(plan_.grid.seam_x(i), plan_.grid.seam_y(j));
            const Path parts[] = {polyline({{at.x_mm - k_cross_mm, at.y_mm}, {at.x_mm + k_cross_mm, at.y_mm}}),
                                  polyline({{at.x_mm, at.y_mm - k_cross_mm}, {at.x_mm, at.y_mm + k_cross_mm}}),
                                  circle(at, k_ring_mm)};
            for (const Path& part : parts) {
                for (Path& inside : line_inside(part, plan_.opening)) {
                    mark.paths.push_back(std::move(inside));
                }
            }
        }
    }
    sheet_.furniture.push_back(std::move(mark));
}

/// Short lines beside the opening, in line with the crosses: for the rule that the sheet is cut along.
void JoiningMarks::ticks() {
    Mark mark{Layer::engrave, {}, k_hair_mm, false, "cutting ticks"};
    const Box& o = plan_.opening;
    constexpr double k_from = 0.8, k_to = 3.6;
    if (column_ > 0) {
        const double x = on_page(plan_.grid.seam_x(column_), 0).x_mm;
        mark.paths.push_back(polyline({{x, o.bottom_mm - k_from}, {x, o.bottom_mm - k_to}}));
        mark.paths.push_back(polyline({{x, o.top_mm + k_from}, {x, o.top_mm + k_to}}));
    }
    if (row_ > 0) {
        const double y = on_page(0, plan_.grid.seam_y(row_)).y_mm;
        mark.paths.push_back(polyline({{o.left_mm - k_from, y}, {o.left_mm - k_to, y}}));
        mark.paths.push_back(polyline({{o.right_mm + k_from, y}, {o.right_mm + k_to, y}}));
    }
    sheet_.furniture.push_back(std::move(mark));
}

void JoiningMarks::neighbour(int row, int column, Point at, Angle turn, const char* before, const char* after) {
    if (row < 0 || column < 0 || row >= plan_.grid.rows || column >= plan_.grid.columns) {
        return;
    }
    const bool blank = !plan_.used[plan_.grid.index(row, column)];
    sheet_.notes.push_back(
        {at, fmt::format("{}{}{}{}", before, tile_label(row, column), blank ? " (blank, left out)" : "", after), 2.6,
         Align::middle, false, turn});
}

void JoiningMarks::neighbours() {
    const Box& o = plan_.opening;
    const Point middle = o.middle();
    neighbour(row_ - 1, column_, {middle.x_mm, o.top_mm + 1.3}, {}, "↑ ", " ↑");
    neighbour(row_ + 1, column_, {middle.x_mm, o.bottom_mm - 3.2}, {}, "↓ ", " ↓");
    neighbour(row_, column_ - 1, {o.left_mm - 1.3, middle.y_mm}, Angle::degrees(90), "↑ ", " ↑");
    neighbour(row_, column_ + 1, {o.right_mm + 1.3, middle.y_mm}, Angle::degrees(-90), "↑ ", " ↑");
}

Sheet sheet_of(const Plan& plan, const std::shared_ptr<const Drawing>& drawing, const Box& tile,
               const PrintOptions& options, const SheetWords& words, const std::string& paper_name) {
    Sheet sheet;
    sheet.width_mm = plan.width_mm;
    sheet.height_mm = plan.height_mm;
    sheet.paper = paper_name;
    const std::string part = options.part.empty() ? "Full size" : options.part;
    sheet.title = words.label.empty() ? part : part + ", sheet " + words.label;
    sheet.printable = Box{0, 0, plan.width_mm, plan.height_mm}.grown(-options.margin_mm);
    sheet.label = words.label;
    sheet.windows.push_back({drawing, placing_on(plan, tile), plan.opening});
    furnish(sheet, plan.opening, plan.surround, words);
    return sheet;
}

void require_options(const PrintOptions& options) {
    if (!(options.margin_mm >= 0 && options.margin_mm <= 1000) ||
        !(options.overlap_mm >= 0 && options.overlap_mm <= 1000)) {
        throw ExportError(
            fmt::format("A margin of {:.1f} mm and an overlap of {:.1f} mm can't be printed: give 0 or more.",
                        options.margin_mm, options.overlap_mm));
    }
}

} // namespace

std::string paper_words(const PrintOptions& options, double width_mm, double height_mm) {
    const std::string mm = fmt::format("{:.4g} × {:.4g} mm", width_mm, height_mm);
    const std::string remark = options.remark.empty() ? "" : ", " + options.remark;
    return (options.inches
                ? fmt::format("{}, {:.4g} × {:.4g} in ({})", options.paper.name, width_mm / 25.4, height_mm / 25.4, mm)
                : options.paper.name + ", " + mm) +
           remark;
}

Tiling tile(std::shared_ptr<const Drawing> drawing, const PrintOptions& options) {
    require_options(options);
    require_work(*drawing);
    const FlatDrawing flat{*drawing};
    const Box work = options.frame.value_or(flat.box());
    const std::optional<Plan> single = one_sheet_plan(work, options);
    const Plan plan = single ? *single : best_tiles(flat, work, options);
    Tiling tiling;
    tiling.rows = plan.grid.rows;
    tiling.columns = plan.grid.columns;
    SheetWords words{paper_words(options, plan.width_mm, plan.height_mm), options.title, "", 0, plan.sheets};
    for (int row = 0; row < plan.grid.rows; ++row) {
        for (int column = 0; column < plan.grid.columns; ++column) {
            if (!plan.used[plan.grid.index(row, column)]) {
                tiling.blank.push_back(tile_label(row, column));
                continue;
            }
            words.label = single ? "" : tile_label(row, column);
            ++words.number;
            tiling.sheets.push_back(
                sheet_of(plan, drawing, plan.grid.box(row, column), options, words, options.paper.name));
            if (!single) {
                JoiningMarks{tiling.sheets.back(), plan, row, column}.add();
            }
        }
    }
    draw_tile_map(tiling, *drawing, plan.grid, plan.used, plan.turned);
    return tiling;
}

Sheet own_size_sheet(std::shared_ptr<const Drawing> drawing, const PrintOptions& options) {
    require_options(options);
    require_work(*drawing);
    const Box work = options.frame.value_or(bounds_of(*drawing));
    Plan plan;
    SheetWords words{"own size", options.title, "", 1, 1};
    // Wide enough for the bar in x; then as high as the notes and the bar in y ask for.
    const double least_opening_mm = 124.0;
    const auto named = [&] {
        words.paper = fmt::format("own size, {:.1f} × {:.1f} mm", plan.width_mm, plan.height_mm);
        plan.surround = surround_of(plan.width_mm, plan.height_mm, options.margin_mm, options.inches, words);
    };
    plan.width_mm = plan.height_mm = 1000.0;
    named();
    const double sides = plan.surround.left_mm + plan.surround.right_mm + 2 * options.margin_mm;
    plan.width_mm = std::max(work.width_mm(), least_opening_mm) + sides;
    plan.height_mm = k_largest_page_mm; // for the words only: the longest that the size can be
    named();
    const double ends = plan.surround.bottom_mm + plan.surround.top_mm + 2 * options.margin_mm;
    plan.height_mm = std::max(work.height_mm(), least_opening_mm) + ends;
    if (plan.width_mm > k_largest_page_mm || plan.height_mm > k_largest_page_mm) {
        throw ExportError(
            fmt::format("The work of {:.1f} × {:.1f} mm needs a sheet of {:.1f} × {:.1f} mm with its bars; "
                        "a PDF page takes at most {:.0f} mm a side: print it on tiles.",
                        work.width_mm(), work.height_mm(), plan.width_mm, plan.height_mm, k_largest_page_mm));
    }
    named();
    plan.opening = opening_of(plan.width_mm, plan.height_mm, options.margin_mm, plan.surround);
    const TileGrid grid = grid_over(work, plan.opening.width_mm(), plan.opening.height_mm(), 0.0);
    return sheet_of(plan, drawing, grid.box(0, 0), options, words, words.paper);
}

} // namespace dialwright::layout
