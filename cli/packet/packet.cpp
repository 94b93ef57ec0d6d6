// SPDX-License-Identifier: MIT
#include "cli/packet/packet.hpp"

#include "cli/packet/bench_pages.hpp"
#include "cli/packet/contents.hpp"
#include "cli/packet/cover_words.hpp"
#include "cli/packet/machine_files.hpp"
#include "cli/packet/owner_card.hpp"
#include "cli/packet/print_options.hpp"
#include "cli/packet/work_pieces.hpp"
#include "cli/plan/feasible.hpp"
#include "cli/report/accuracy.hpp"
#include "cli/report/fixing.hpp"
#include "cli/report/numbers.hpp"
#include "cli/report/say.hpp"
#include "layout/export/pdf.hpp"
#include "layout/sheet/cover.hpp"

#include <algorithm>
#include <fmt/format.h>
#include <future>

namespace dialwright::cli {
namespace {

using layout::Drawing;
using layout::Sheet;

/// The pieces as they are printed: mirrored where the design asks for that.
std::vector<WorkPiece> printed_pieces(const Commission& commission) {
    std::vector<WorkPiece> pieces = work_pieces(commission);
    if (commission.design.print.mirrored)
        for (WorkPiece& piece : pieces) {
            piece.drawing = mirrored(*piece.drawing);
            piece.title += " (MIRRORED)";
        }
    return pieces;
}

/// The marks of some layers, and nothing else.
std::shared_ptr<const Drawing> only(const Drawing& drawing, const std::vector<layout::Layer>& layers) {
    auto made = std::make_shared<Drawing>();
    made->name = drawing.name;
    for (const layout::Mark& mark : drawing.marks)
        if (std::find(layers.begin(), layers.end(), mark.layer) != layers.end())
            made->marks.push_back(mark);
    return made;
}

/// The sheets of the book while they are gathered.
class Book {
  public:
    Book(const Commission& commission, Packet& packet)
        : commission_{commission}, design_{commission.design}, packet_{packet}, options_{print_options(design_)},
          pieces_{printed_pieces(commission)} {}

    [[nodiscard]] layout::SheetBook whole() {
        const auto tilings = plate_tilings();
        add(cover(tilings));
        for (const auto& of_piece : tilings)
            for (const layout::Tiling& tiling : of_piece)
                add(tiling.sheets);
        add(gnomon_pages(commission_, pieces_, options_));
        for (std::size_t i = 0; i < commission_.faces.size(); ++i)
            add(setting_out_pages(commission_, i, options_));
        add(accuracy_sheets(commission_, accuracy_of(commission_), options_));
        if (design_.fixing.first)
            add(fixing_sheets(fixing_of(commission_, *design_.fixing.first, *design_.fixing.last), options_));
        add(owner_card(commission_, options_));
        for (const WorkPiece& piece : pieces_)
            if (is_correction(piece)) {
                for (const layout::Tiling& tiling : tilings_of(piece))
                    add(tiling.sheets);
                if (design_.print.own_size)
                    add_own_size(piece);
            }
        for (const WorkPiece& piece : pieces_)
            if (design_.print.own_size && piece.is_plate)
                add_own_size(piece);
        return finished();
    }

    [[nodiscard]] layout::SheetBook chosen(const PrintChoice& choice) {
        for (const WorkPiece& piece : pieces_) {
            layout::PrintOptions options = options_of(piece);
            auto drawing = piece.drawing;
            if (!choice.layers.empty()) {
                options.frame = layout::bounds_of(*piece.drawing);
                drawing = only(*piece.drawing, choice.layers);
                if (drawing->marks.empty())
                    continue;
            }
            for (const Sheet& sheet : layout::tile(drawing, options).sheets)
                if (choice.sheet.empty() || sheet.label == choice.sheet)
                    add({sheet});
        }
        return finished();
    }

  private:
    [[nodiscard]] static bool is_correction(const WorkPiece& piece) { return !piece.is_plate && piece.part == nullptr; }

    [[nodiscard]] layout::PrintOptions options_of(const WorkPiece& piece) const {
        layout::PrintOptions options = options_;
        options.title = design_.title + ", " + piece.title;
        options.part = piece.title;
        return options;
    }

    /// The whole piece, or one for each of its layers.
    [[nodiscard]] std::vector<layout::Tiling> tilings_of(const WorkPiece& piece) const {
        layout::PrintOptions options = options_of(piece);
        if (design_.print.layers != PrintedLayers::one_by_one)
            return {layout::tile(piece.drawing, options)};
        std::vector<layout::Tiling> all;
        options.frame = layout::bounds_of(*piece.drawing);
        for (const layout::Layer layer : layout::k_layers) {
            const auto drawing = only(*piece.drawing, {layer});
            if (drawing->marks.empty())
                continue;
            const std::string name = fmt::format("{}, layer {}", piece.title, layout::name_of(layer));
            options.title = design_.title + ", " + name;
            options.part = name;
            all.push_back(layout::tile(drawing, options));
        }
        return all;
    }

    [[nodiscard]] std::vector<std::vector<layout::Tiling>> plate_tilings() const {
        std::vector<std::vector<layout::Tiling>> all;
        for (const WorkPiece& piece : pieces_)
            if (piece.is_plate)
                all.push_back(tilings_of(piece));
        return all;
    }

    [[nodiscard]] std::vector<Sheet> cover(const std::vector<std::vector<layout::Tiling>>& tilings) const {
        std::vector<layout::CoverFace> faces;
        bool has_tiles = false;
        for (std::size_t i = 0; i < tilings.size(); ++i) {
            const layout::Tiling& tiling = tilings[i].front();
            faces.push_back({commission_.plans[i].spec.name, pieces_[i].drawing, key_numbers(commission_, i), &tiling});
            has_tiles = has_tiles || tiling.sheets.size() > 1;
        }
        const std::string where =
            design_.place.name.empty() ? say_latitude(design_.place.site.latitude) : design_.place.name;
        return layout::cover_sheets({design_.title, "Full-scale templates for a sundial at " + where,
                                     steps(design_, has_tiles), packet_.cautions, packet_.warnings},
                                    faces, options_);
    }

    /// A PDF's page has a largest size: a larger work goes on tiles alone, and the maker is told. Never stretched: it
    /// goes to another printer.
    void add_own_size(const WorkPiece& piece) {
        layout::PrintOptions options = options_of(piece);
        options.part = piece.title + ", own size";
        options.margin_mm = design_.print.margin_mm;
        options.remark.clear();
        try {
            sheets_.push_back(layout::own_size_sheet(piece.drawing, options));
        } catch (const layout::ExportError& trouble) {
            packet_.warnings.push_back(std::string{"no page of the work's own size: "} + trouble.what());
        }
    }

    void add(std::vector<Sheet> sheets) {
        for (Sheet& sheet : sheets) {
            layout::compensate(sheet, design_.print.printer, options_.paper.roll);
            sheets_.push_back(std::move(sheet));
        }
    }

    [[nodiscard]] layout::SheetBook finished() {
        layout::SheetBook book;
        book.title = design_.title;
        book.subject = "Full-scale templates of a sundial";
        book.layers = design_.print.layers == PrintedLayers::in_viewer;
        book.sheets = std::move(sheets_);
        return book;
    }

    const Commission& commission_;
    const Design& design_;
    Packet& packet_;
    layout::PrintOptions options_;
    std::vector<WorkPiece> pieces_;
    std::vector<Sheet> sheets_;
};

std::string hand_of(const Design& design) {
    return design.print.mirrored ? "-mirrored" : "";
}

} // namespace

std::optional<Packet> take_packet(const Commission& commission, const PrintChoice& choice) {
    const bool all = choice.layers.empty() && choice.sheet.empty();
    try {
        return all ? make_packet(commission) : chosen_sheets(commission, choice);
    } catch (const layout::ExportError& trouble) {
        const Design& design = commission.design;
        tell({error_at(
            design,
            first_given(design, {"cutting: kerf", "print: margin", "print: overlap", "print: paper", "print", "plate"}),
            trouble.what(), "")});
        return std::nullopt;
    }
}

Packet make_packet(const Commission& commission) {
    Packet packet;
    for (std::size_t i = 0; i < commission.faces.size(); ++i)
        for (const std::string& warning : commission.faces[i].warnings)
            packet.warnings.push_back(
                commission.plans[i].spec.name.empty() ? warning : commission.plans[i].spec.name + ": " + warning);

    if (commission.correction_plate)
        packet.warnings.insert(packet.warnings.end(), commission.correction_plate->warnings.begin(),
                               commission.correction_plate->warnings.end());
    packet.cautions = cautions(commission.design);
    // The sheets take the longest: beside all others.
    auto printing = std::async(std::launch::async, [&commission, printed = packet]() mutable {
        Book book{commission, printed};
        const layout::SheetBook sheets = book.whole();
        printed.sheets = sheets.sheets.size();
        printed.items.push_back({{"sheets" + hand_of(commission.design) + ".pdf", layout::pdf_of(sheets)},
                                 "full-scale sheets: print this, and read its first page"});
        return printed;
    });
    packet.items.emplace_back(); // the sheets, first of all
    add_machine_files(packet, commission, work_pieces(commission));
    for (std::size_t i = 0; i < commission.faces.size(); ++i) {
        const std::string& name = commission.plans[i].name;
        packet.items.push_back({{"setting-out" + (name.empty() ? "" : "-" + name) + ".csv",
                                 layout::csv_of(setting_out_of(commission, i, true))},
                                "every point, for setting out by rule, square and dividers"});
    }
    packet.items.push_back({{"hour-lines.csv", hour_lines_csv(commission)}, "angles and ends of the hour lines"});
    packet.items.push_back({{"numbers.txt", numbers_text(commission)}, "all numbers, to read"});
    packet.items.push_back({{"numbers.json", numbers_json(commission)}, "all numbers, for programs"});
    Packet printed = printing.get();
    packet.items.front() = std::move(printed.items.front());
    packet.sheets = printed.sheets;
    packet.warnings = std::move(printed.warnings); // with those of the sheets
    packet.items.push_back(
        {{"contents.txt", contents_of(commission, packet)}, "what each file is for, and in which order"});
    return packet;
}

Packet chosen_sheets(const Commission& commission, const PrintChoice& choice) {
    Packet packet;
    Book book{commission, packet};
    const layout::SheetBook sheets = book.chosen(choice);
    packet.sheets = sheets.sheets.size();
    if (sheets.sheets.empty())
        return packet;
    std::string name = "sheets" + hand_of(commission.design);
    for (const layout::Layer layer : choice.layers)
        name += "-" + std::string{layout::name_of(layer)};
    if (!choice.sheet.empty())
        name += "-" + choice.sheet;
    packet.items.push_back({{name + ".pdf", layout::pdf_of(sheets)}, "the sheets that were asked for"});
    return packet;
}

} // namespace dialwright::cli
