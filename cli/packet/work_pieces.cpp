// SPDX-License-Identifier: MIT
#include "cli/packet/work_pieces.hpp"

namespace dialwright::cli {
namespace {

/// Of a drawing that the commission owns.
std::shared_ptr<const layout::Drawing> shared(const layout::Drawing& drawing) {
    return {std::shared_ptr<void>{}, &drawing};
}

std::string hyphenated(std::string text) {
    for (char& c : text)
        c = c == ' ' ? '-' : c;
    return text;
}

} // namespace

std::vector<WorkPiece> work_pieces(const Commission& commission) {
    std::vector<WorkPiece> pieces;
    const auto suffix = [&](std::size_t i) {
        return commission.plans[i].name.empty() ? "" : "-" + commission.plans[i].name;
    };
    const auto of_face = [&](std::size_t i) {
        return commission.plans[i].spec.name.empty() ? "" : ", " + commission.plans[i].spec.name;
    };
    for (std::size_t i = 0; i < commission.faces.size(); ++i)
        pieces.push_back(
            {"plate" + suffix(i), "Plate" + of_face(i), shared(commission.faces[i].drawing), true, true, nullptr, i});
    for (std::size_t i = 0; i < commission.gnomons.size(); ++i)
        for (const layout::Part& part : commission.gnomons[i])
            for (std::size_t j = 0; j < part.drawings.size(); ++j) {
                const layout::Drawing& drawing = part.drawings[j];
                const std::string title = j == 0 ? part.title : "The " + drawing.name;
                pieces.push_back({hyphenated(drawing.name) + suffix(i), title + of_face(i), shared(drawing),
                                  part.from_sheet, false, &part, i});
            }
    if (commission.correction_plate) {
        static constexpr const char* k_forms[] = {"graph", "ring", "table"};
        const std::string form = k_forms[static_cast<std::size_t>(commission.design.correction.form)];
        pieces.push_back({"correction-" + form, "Correction " + form, shared(commission.correction_plate->drawing),
                          true, false, nullptr, 0});
    }
    return pieces;
}

std::shared_ptr<const layout::Drawing> mirrored(const layout::Drawing& drawing) {
    const layout::Placing over{{}, {}, 1.0, 1.0, true};
    auto made = std::make_shared<layout::Drawing>();
    made->name = drawing.name + ", mirrored";
    for (const layout::Mark& mark : drawing.marks)
        made->marks.push_back(over(mark));
    return made;
}

} // namespace dialwright::cli
