// SPDX-License-Identifier: MIT
#include "layout/export/pdf_layers.hpp"

#include "layout/sheet/export_error.hpp"

#include <hpdf_doc.h>
#include <hpdf_objects.h>
#include <hpdf_pages.h>

#include <string>

namespace dialwright::layout {
namespace {

/// What the library gives back, or an end: it gives nothing only where no memory is left.
template <class T>
T* made(T* object) {
    if (object == nullptr)
        throw ExportError("The PDF could not be made: no memory is left.");
    return object;
}

} // namespace

PdfLayers::PdfLayers(HPDF_Doc document) : document_{document} {
    HPDF_MMgr memory = document->mmgr;
    const auto list = [&] { return made(HPDF_Array_New(memory)); };
    HPDF_Array groups = list(), order = list(), shown = list();
    for (std::size_t i = 0; i < groups_.size(); ++i) {
        HPDF_Dict group = groups_[i] = made(HPDF_Dict_New(memory));
        HPDF_Xref_Add(document->xref, group); // what is named from several places stands by itself
        HPDF_Dict_AddName(group, "Type", "OCG");
        HPDF_Dict_Add(group, "Name", made(HPDF_String_New(memory, std::string{name_of(k_layers[i])}.c_str(), nullptr)));
        for (HPDF_Array one : {groups, order, shown})
            HPDF_Array_Add(one, group);
    }
    HPDF_Dict usual = made(HPDF_Dict_New(memory)), all = made(HPDF_Dict_New(memory));
    HPDF_Dict_Add(usual, "Order", order);
    HPDF_Dict_Add(usual, "ON", shown);
    HPDF_Dict_Add(all, "OCGs", groups);
    HPDF_Dict_Add(all, "D", usual);
    HPDF_Dict_Add(document->catalog, "OCProperties", all);
}

void PdfLayers::use_on(HPDF_Page page) {
    auto* resources = static_cast<HPDF_Dict>(HPDF_Page_GetInheritableItem(page, "Resources", HPDF_OCLASS_DICT));
    HPDF_Dict names = made(HPDF_Dict_New(document_->mmgr));
    HPDF_Dict_Add(made(resources), "Properties", names);
    for (std::size_t i = 0; i < groups_.size(); ++i)
        HPDF_Dict_Add(names, std::string{pdf_name_of(k_layers[i])}.c_str(), groups_[i]);
}

std::string_view pdf_name_of(Layer layer) {
    switch (layer) {
    case Layer::cut:
        return "Cut";
    case Layer::engrave:
        return "Engrave";
    case Layer::fill:
        return "Fill";
    case Layer::drill:
        return "Drill";
    case Layer::score:
        return "Score";
    case Layer::guide:
        return "Guide";
    }
    return "Engrave";
}

} // namespace dialwright::layout
