// SPDX-License-Identifier: MIT
#include "layout/chart/accuracy_chart.hpp"

#include "layout/sheet/note_width.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr double k_side_mm = 9.0, k_hours_mm = 5.0, k_key_mm = 7.0, k_note_mm = 2.5, k_cut_off_min = 15.0;
constexpr std::array<Layer, 3> k_tones{Layer::score, Layer::guide, Layer::fill};

class ChartDrawer {
  public:
    explicit ChartDrawer(const AccuracyChartPlan& plan) : plan_{plan} {
        field_ = {k_side_mm, k_key_mm + k_hours_mm, plan.width_mm, plan.height_mm - 4};
        double most = std::max(1.0, plan.supported_min);
        for (const auto& hour : plan.hours)
            for (const auto& minutes : hour.minutes)
                most = std::max(most, minutes.value_or(0.0));
        step_min_ = most > 8 ? 5 : (most > 4 ? 2 : 1);
        top_min_ = std::min(k_cut_off_min, step_min_ * std::ceil(most / step_min_ - 1e-9));
    }

    Chart drawn() {
        add_grid();
        for (std::size_t i = 0; i < plan_.hours.size(); ++i)
            add_hour(i);
        if (plan_.supported_min > 0 && plan_.supported_min < top_min_)
            chart_.marks.push_back({Layer::engrave,
                                    {polyline({{field_.left_mm, y_of(plan_.supported_min)},
                                               {field_.right_mm, y_of(plan_.supported_min)}})},
                                    0.35,
                                    false,
                                    "supported"});
        chart_.marks.push_back({Layer::engrave, {rectangle(field_)}, 0.25, false, "frame"});
        add_key();
        chart_.box = {0, 0, plan_.width_mm, plan_.height_mm};
        return std::move(chart_);
    }

  private:
    [[nodiscard]] double y_of(double minutes) const {
        return field_.bottom_mm + field_.height_mm() * minutes / top_min_;
    }

    void note(Point at, std::string text, Align align) {
        chart_.notes.push_back({at, std::move(text), k_note_mm, align, false, {}});
    }

    void add_grid() {
        for (int minutes = 0; minutes <= int(top_min_ + 0.5); minutes += step_min_) {
            const double y = y_of(minutes);
            if (minutes > 0 && y < field_.top_mm - 0.01)
                chart_.marks.push_back(
                    {Layer::engrave, {polyline({{field_.left_mm, y}, {field_.right_mm, y}})}, 0.08, false, "minutes"});
            note({field_.left_mm - 1.2, y - 0.9}, fmt::format("{}", minutes), Align::right);
        }
    }

    void add_hour(std::size_t i) {
        const double column = field_.width_mm() / double(plan_.hours.size()),
                     left = field_.left_mm + column * double(i);
        const double bar = std::min(0.26 * column, 4.0);
        note({left + column / 2, field_.bottom_mm - 3.4}, plan_.hours[i].label, Align::middle);
        double cut_off = 0;
        for (std::size_t season = 0; season < 3; ++season) {
            const auto& minutes = plan_.hours[i].minutes[season];
            if (!minutes)
                continue;
            const double x = left + column / 2 + bar * (double(season) - 1.5);
            const Box box{x, field_.bottom_mm, x + bar, y_of(std::min(*minutes, top_min_))};
            chart_.marks.push_back({k_tones[season], {rectangle(box)}, 0.0, true, plan_.seasons[season]});
            if (*minutes > top_min_)
                cut_off = std::max(cut_off, *minutes);
        }
        if (cut_off > 0)
            note({left + column / 2, field_.top_mm + 1.2}, cut_off > 99 ? "over 99" : fmt::format("{:.0f}", cut_off),
                 Align::middle);
    }

    void add_key() {
        double x = field_.left_mm;
        for (std::size_t season = 0; season < 3; ++season) {
            const Box box{x, 0.8, x + 5, 3.6};
            chart_.marks.push_back({k_tones[season], {rectangle(box)}, 0.0, true, "key"});
            chart_.marks.push_back({Layer::engrave, {rectangle(box)}, 0.1, false, "key"});
            note({x + 6.5, 1.2}, plan_.seasons[season], Align::left);
            x += 6.5 + note_width_mm(plan_.seasons[season], k_note_mm) + 6;
        }
        note({field_.right_mm, 1.2}, "minutes of error, by squares of all slips", Align::right);
    }

    const AccuracyChartPlan& plan_;
    Box field_;
    int step_min_ = 1;
    double top_min_ = 1;
    Chart chart_;
};

} // namespace

Chart accuracy_chart(const AccuracyChartPlan& plan) {
    return ChartDrawer{plan}.drawn();
}

} // namespace dialwright::layout
