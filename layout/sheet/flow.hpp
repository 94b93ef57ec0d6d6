// SPDX-License-Identifier: MIT
#pragma once

#include "layout/sheet/tiling.hpp"

#include <memory>
#include <string>
#include <vector>

namespace dialwright::layout {

/// Lays blocks of text, tables and pictures down upright pages of the options' paper, and begins another page where one
/// is full. Each page has its bars, as every sheet that goes to a bench.
class Flow {
  public:
    static constexpr double k_text_mm = 2.9, k_line_mm = 4.1; ///< the em of the text, and from line to line

    /// @param page_title  the bookmark of the pages; from the second on with their number
    /// @throws ExportError  margins leave no room on the paper
    Flow(const PrintOptions& options, std::string page_title);

    /// @param first  stands before the first line, "1." or "•"; the other lines are set in under it
    void paragraph(const std::string& text, const std::string& first = "", bool bold = false,
                   double size_mm = k_text_mm);
    void heading(const std::string& text); ///< never alone at the foot of a page
    /// Heading and items; nothing where there are none.
    void list(const std::string& title, const std::vector<std::string>& items, bool numbered = false);

    struct Column {
        std::string head;
        Align align = Align::left;
    };
    /// Columns as wide as what stands in them; the heads again on every page. A cell that would leave the page to the right
    /// is broken into lines; where that is not enough, the letters are smaller. Long narrow tables stand in two or more
    /// blocks side by side.
    void table(const std::vector<Column>& columns, const std::vector<std::vector<std::string>>& rows,
               double size_mm = k_text_mm);

    /// The drawing within a box of this size on the left, enlarged or reduced to fill it, and a line of words under it.
    void picture(const std::shared_ptr<const Drawing>& drawing, double width_mm, double height_mm,
                 const std::string& under = "");
    /// The drawing at full scale, in the middle of the page. False, and nothing is drawn, where no page has room for it.
    [[nodiscard]] bool full_size(const std::shared_ptr<const Drawing>& drawing, const std::string& under = "");

    void space(double mm) { y_ -= mm; }
    void need(double mm); ///< another page where there is less room than this
    [[nodiscard]] double width() const { return field_.width_mm(); }
    [[nodiscard]] double left() const { return field_.left_mm; }
    [[nodiscard]] double y() const { return y_; } ///< page millimetres, of the lowest that is written
    [[nodiscard]] double room() const { return y_ - field_.bottom_mm; }
    [[nodiscard]] double whole_room() const { return field_.height_mm(); }
    [[nodiscard]] Sheet& sheet() { return sheets_.back(); }
    void note(Point at, std::string text, double size_mm, bool bold = false, Align align = Align::left);

    /// The pages; the flow is at its end.
    [[nodiscard]] std::vector<Sheet> sheets() { return std::move(sheets_); }

  private:
    void begin();
    void place(const std::shared_ptr<const Drawing>& drawing, Point lower_left, double width_mm, double height_mm,
               double scale);

    PrintOptions options_;
    std::string page_title_;
    std::vector<Sheet> sheets_;
    Box field_;
    double y_ = 0;
};

} // namespace dialwright::layout
