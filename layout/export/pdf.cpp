// SPDX-License-Identifier: MIT
#include "layout/export/pdf.hpp"

#include "layout/export/pdf_font.hpp"
#include "layout/export/pdf_layers.hpp"
#include "layout/export/pdf_page.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <future>
#include <map>
#include <memory>
#include <optional>
#include <set>
#include <vector>

namespace dialwright::layout {
namespace {

/// What the library has complained of so far. Its callback writes here; whoever called it throws.
struct PdfTrouble {
    HPDF_STATUS error = HPDF_OK, detail = 0;
    void check() const {
        if (error != HPDF_OK) {
            throw ExportError(fmt::format(
                "The PDF could not be made: the PDF library stopped with error 0x{:04X} ({}).", error, detail));
        }
    }
};

void record_trouble(HPDF_STATUS error, HPDF_STATUS detail, void* data) {
    auto* trouble = static_cast<PdfTrouble*>(data);
    if (trouble->error == HPDF_OK) { // what follows the first is only its echo
        trouble->error = error;
        trouble->detail = detail;
    }
}

/// A document of the library, and the fonts of its notes.
class PdfDocument {
  public:
    PdfDocument() : document_{HPDF_New(&record_trouble, &trouble_)} {
        if (document_ == nullptr) {
            throw ExportError("The PDF could not be made: no memory is left.");
        }
        HPDF_UseUTFEncodings(document_);
        HPDF_SetCurrentEncoder(document_, "UTF-8");
    }
    ~PdfDocument() { HPDF_Free(document_); }
    PdfDocument(const PdfDocument&) = delete;
    PdfDocument& operator=(const PdfDocument&) = delete;

    [[nodiscard]] HPDF_Doc get() const { return document_; }
    void check() const { trouble_.check(); }
    void load_fonts(const SheetBook& book);
    [[nodiscard]] const PdfFont& font(bool bold) const { return bold ? *bold_ : *regular_; }
    [[nodiscard]] std::string bytes();

  private:
    PdfTrouble trouble_;
    HPDF_Doc document_;
    std::unique_ptr<PdfFont> regular_, bold_;
};

/// With the characters that all notes use together, so that each font is embedded once.
void PdfDocument::load_fonts(const SheetBook& book) {
    std::set<char32_t> regular, bold;
    for (const Sheet& sheet : book.sheets) {
        for (const Note& note : sheet.notes) {
            const std::u32string characters = note_characters(note.text, sheet_font(note.bold));
            (note.bold ? bold : regular).insert(characters.begin(), characters.end());
        }
    }
    if (!regular.empty()) {
        regular_ = std::make_unique<PdfFont>(document_, sheet_font(false), regular);
    }
    if (!bold.empty()) {
        bold_ = std::make_unique<PdfFont>(document_, sheet_font(true), bold);
    }
    check();
}

/// Kept in memory and handed over: the library's own way to a file does not notice a full disk.
std::string PdfDocument::bytes() {
    // Once and last, because each call takes back the one before and a later call of another kind lowers the version.
    HPDF_SetViewerPreference(document_, HPDF_PRINT_SCALING_NONE);
    HPDF_SaveToStream(document_);
    check();
    HPDF_UINT32 left = HPDF_GetStreamSize(document_);
    std::string all(left, '\0');
    HPDF_ReadFromStream(document_, reinterpret_cast<HPDF_BYTE*>(all.data()), &left);
    check();
    if (left != all.size()) {
        throw ExportError("The PDF could not be made: the PDF library gave back only a part of it.");
    }
    return all;
}

void require_finite(const Mark& mark) {
    if (!is_finite(mark)) {
        throw ExportError(fmt::format("“{}” has a point that is no number, so no PDF was made.",
                                      mark.name.empty() ? name_of(mark.layer) : mark.name));
    }
}

/// The boxes of each drawing's marks, found once for all the sheets that show it.
class BoxesOfMarks {
  public:
    explicit BoxesOfMarks(const SheetBook& book) {
        for (const Sheet& sheet : book.sheets) {
            for (const Window& window : sheet.windows) {
                if (window.drawing != nullptr) {
                    add(*window.drawing);
                }
            }
        }
    }
    [[nodiscard]] const std::vector<Box>& of(const Drawing& drawing) const { return boxes_.at(&drawing); }

  private:
    void add(const Drawing& drawing) {
        const auto [place, is_new] = boxes_.try_emplace(&drawing);
        if (!is_new) {
            return;
        }
        for (const Mark& mark : drawing.marks) {
            require_finite(mark);
            place->second.push_back(bounds_of(mark));
        }
    }

    std::map<const Drawing*, std::vector<Box>> boxes_;
};

/// A box that the placed box lies in.
Box placed(const Placing& placing, const Box& box) {
    Box out;
    if (!box.empty()) {
        out.add(placing(Point{box.left_mm, box.bottom_mm}));
        out.add(placing(Point{box.right_mm, box.bottom_mm}));
        out.add(placing(Point{box.right_mm, box.top_mm}));
        out.add(placing(Point{box.left_mm, box.top_mm}));
    }
    return out;
}

void draw_window(PdfPage& page, const Window& window, const BoxesOfMarks& boxes) {
    const Placing& p = window.placing;
    const bool good = std::isfinite(p.turn.in_radians()) && std::isfinite(p.shift.x_mm) &&
                      std::isfinite(p.shift.y_mm) && p.scale_x > 0 && p.scale_y > 0 && std::isfinite(p.scale_x) &&
                      std::isfinite(p.scale_y);
    if (!good) {
        throw ExportError("A view of the work has a place or a scale that is no number, so no PDF was made.");
    }
    if (window.drawing == nullptr || window.opening.empty()) {
        return;
    }
    const std::vector<Box>& marks = boxes.of(*window.drawing);
    page.open(window.opening);
    for (std::size_t i = 0; i < marks.size(); ++i) {
        if (placed(p, marks[i]).meets(window.opening)) {
            page.mark(p(window.drawing->marks[i]), window.opening);
        }
    }
    page.close();
}

PdfPage page_for(PdfDocument& document, const Sheet& sheet, PdfLayers* layers) {
    const auto fits = [](double side) { return side >= 5.0 && side <= 5080.0; };
    if (!fits(sheet.width_mm) || !fits(sheet.height_mm)) {
        throw ExportError(fmt::format("A sheet of {:.1f} × {:.1f} mm is no PDF page: each side takes 5 to 5080 mm.",
                                      sheet.width_mm, sheet.height_mm));
    }
    const auto sound = [](double stretch) { return stretch > 0.5 && stretch < 2.0; };
    if (!sound(sheet.stretch_x) || !sound(sheet.stretch_y)) {
        throw ExportError("A sheet is stretched to less than half or more than double, so no PDF was made.");
    }
    HPDF_Page page = HPDF_AddPage(document.get());
    document.check();
    HPDF_Page_SetWidth(page, static_cast<HPDF_REAL>(sheet.width_mm * 72.0 / 25.4));
    HPDF_Page_SetHeight(page, static_cast<HPDF_REAL>(sheet.height_mm * 72.0 / 25.4));
    PdfPage paper{page};
    if (layers != nullptr) {
        layers->use_on(page);
        paper.use_layers(true);
    }
    for (const bool bold : {false, true}) {
        if (std::any_of(sheet.notes.begin(), sheet.notes.end(),
                        [&](const Note& note) { return note.bold == bold && !note.text.empty(); })) {
            paper.use_font(bold, document.font(bold));
        }
    }
    HPDF_Outline bookmark =
        HPDF_CreateOutline(document.get(), nullptr, sheet.title.c_str(), HPDF_GetEncoder(document.get(), "UTF-8"));
    document.check();
    HPDF_Outline_SetDestination(bookmark, HPDF_Page_CreateDestination(page));
    document.check();
    return paper;
}

void draw(PdfPage& paper, const Sheet& sheet, const BoxesOfMarks& boxes) {
    paper.stretch(sheet.stretch_x, sheet.stretch_y, sheet.width_mm, sheet.height_mm);
    for (const Window& window : sheet.windows) {
        draw_window(paper, window, boxes);
    }
    paper.use_layers(false); // bars, names and notes are on every print
    const Box whole{0, 0, sheet.width_mm, sheet.height_mm};
    for (const Mark& mark : sheet.furniture) {
        require_finite(mark);
        paper.mark(mark, whole);
    }
    for (const Note& note : sheet.notes) {
        paper.note(note);
    }
    paper.pack();
}

/// Every second page in a thread of its own.
void draw_all(std::vector<PdfPage>& pages, const SheetBook& book) {
    const BoxesOfMarks boxes{book};
    const auto draw_from = [&](std::size_t first) {
        for (std::size_t i = first; i < pages.size(); i += 2) {
            draw(pages[i], book.sheets[i], boxes);
        }
    };
    auto others = std::async(std::launch::async, draw_from, 1U);
    draw_from(0);
    others.get();
}

} // namespace

std::string pdf_of(const SheetBook& book) {
    if (book.sheets.empty()) {
        throw ExportError("There is nothing to print: the book has no sheets.");
    }
    PdfDocument document;
    if (!book.title.empty()) {
        HPDF_SetInfoAttr(document.get(), HPDF_INFO_TITLE, book.title.c_str());
    }
    if (!book.subject.empty()) {
        HPDF_SetInfoAttr(document.get(), HPDF_INFO_SUBJECT, book.subject.c_str());
    }
    document.check();
    document.load_fonts(book);
    std::optional<PdfLayers> layers;
    if (book.layers) {
        layers.emplace(document.get());
    }
    std::vector<PdfPage> pages;
    for (const Sheet& sheet : book.sheets) {
        pages.push_back(page_for(document, sheet, layers ? &*layers : nullptr));
    }
    draw_all(pages, book);
    for (PdfPage& page : pages) {
        page.finish();
    }
    document.check();
    return document.bytes();
}

} // namespace dialwright::layout
