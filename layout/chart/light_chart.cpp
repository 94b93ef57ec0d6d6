// SPDX-License-Identifier: MIT
#include "layout/chart/light_chart.hpp"

#include "layout/sheet/note_width.hpp"

#include <algorithm>
#include <array>
#include <fmt/format.h>

namespace dialwright::layout {
namespace {

constexpr std::array<const char*, 12> k_months{"Jan", "Feb", "Mar", "Apr", "May", "Jun",
                                               "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"};
constexpr std::array<int, 12> k_lengths{31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31};
constexpr double k_side_mm = 8.0, k_months_mm = 5.0, k_key_mm = 7.0, k_note_mm = 2.5;
/// Neighbouring days lie over each other by this much, so that no viewer shows a seam between them.
constexpr double k_over_mm = 0.05;

/// "25" is the next day's "1".
std::string hour_text(double hour) {
    return fmt::format("{:g}", hour > 24 ? hour - 24 : hour);
}

class ChartDrawer {
  public:
    explicit ChartDrawer(const LightChartPlan& plan) : plan_{plan} {
        field_ = {k_side_mm, k_key_mm + k_months_mm, plan.width_mm - k_side_mm, plan.height_mm};
    }

    Chart drawn() {
        add_days(Layer::guide, "Sun behind the plate", &LightChartDay::behind);
        add_days(Layer::fill, "shade of the skyline", &LightChartDay::shaded);
        add_days(Layer::score, "lit", &LightChartDay::lit);
        add_grid();
        add_noons();
        add_key();
        chart_.box = {0, 0, plan_.width_mm, plan_.height_mm + 1.2};
        return std::move(chart_);
    }

  private:
    [[nodiscard]] double x_of(double day) const {
        return field_.left_mm + field_.width_mm() * day / double(plan_.days.size());
    }
    [[nodiscard]] double y_of(double hour) const { return field_.bottom_mm + field_.height_mm() * hour / 24.0; }

    void add_days(Layer layer, const char* name, std::vector<HourSpan> LightChartDay::*spans) {
        Mark mark{layer, {}, 0.0, true, name};
        for (std::size_t day = 0; day < plan_.days.size(); ++day)
            for (const HourSpan& span : plan_.days[day].*spans)
                mark.paths.push_back(rectangle({x_of(double(day)), y_of(std::max(0.0, span.from_h)),
                                                std::min(x_of(double(day) + 1) + k_over_mm, field_.right_mm),
                                                y_of(std::min(24.0, span.to_h))}));
        if (!mark.paths.empty())
            chart_.marks.push_back(std::move(mark));
    }

    void line(Point from, Point to, double width_mm, const char* name) {
        chart_.marks.push_back({Layer::engrave, {polyline({from, to})}, width_mm, false, name});
    }

    void add_grid() {
        int day = 0;
        const bool leap = plan_.days.size() > 365;
        for (std::size_t month = 0; month < k_months.size(); ++month) {
            const int length = k_lengths[month] + (leap && month == 1 ? 1 : 0);
            if (month > 0)
                line({x_of(day), field_.bottom_mm}, {x_of(day), field_.top_mm}, 0.08, "month");
            chart_.notes.push_back({{x_of(day + length / 2.0), field_.bottom_mm - 3.4},
                                    k_months[month],
                                    k_note_mm,
                                    Align::middle,
                                    false,
                                    {}});
            day += length;
        }
        for (int hour = 0; hour <= 24; hour += 3) {
            if (hour > 0 && hour < 24)
                line({field_.left_mm, y_of(hour)}, {field_.right_mm, y_of(hour)}, 0.08, "hour");
            const double base = y_of(hour) - 0.9;
            chart_.notes.push_back(
                {{field_.left_mm - 1.2, base}, fmt::format("{}", hour), k_note_mm, Align::right, false, {}});
            if (plan_.summer_shift_h > 0)
                chart_.notes.push_back({{field_.right_mm + 1.2, base},
                                        hour_text(hour + plan_.summer_shift_h),
                                        k_note_mm,
                                        Align::left,
                                        false,
                                        {}});
        }
        chart_.marks.push_back({Layer::engrave, {rectangle(field_)}, 0.25, false, "frame"});
    }

    void add_noons() {
        std::vector<Point> points;
        for (std::size_t day = 0; day < plan_.days.size(); ++day) {
            const Point here{x_of(double(day) + 0.5), y_of(plan_.days[day].noon_h)};
            const bool next_day = !points.empty() && std::abs(here.y_mm - points.back().y_mm) > field_.height_mm() / 2;
            if (next_day && points.size() > 1)
                chart_.marks.push_back({Layer::engrave, {polyline(points)}, 0.3, false, "noon"});
            if (next_day)
                points.clear();
            points.push_back(here);
        }
        if (points.size() > 1)
            chart_.marks.push_back({Layer::engrave, {polyline(points)}, 0.3, false, "noon"});
    }

    void add_key() {
        double x = field_.left_mm;
        const auto add = [&](const char* words) {
            chart_.notes.push_back({{x + 6.5, 1.2}, words, k_note_mm, Align::left, false, {}});
            x += 6.5 + note_width_mm(words, k_note_mm) + 5;
        };
        const auto swatch = [&](Layer layer, const char* words) {
            const Box box{x, 0.8, x + 5, 3.6};
            chart_.marks.push_back({layer, {rectangle(box)}, 0.0, true, "key"});
            chart_.marks.push_back({Layer::engrave, {rectangle(box)}, 0.1, false, "key"});
            add(words);
        };
        swatch(Layer::score, "lit");
        swatch(Layer::fill, "shaded by the skyline");
        swatch(Layer::guide, "Sun behind the plate");
        line({x, 2.2}, {x + 5, 2.2}, 0.3, "key");
        add("the Sun's noon");
        if (plan_.summer_shift_h > 0)
            chart_.notes.push_back({{field_.right_mm, 1.2},
                                    "left: standard time, right: summer time",
                                    k_note_mm,
                                    Align::right,
                                    false,
                                    {}});
    }

    const LightChartPlan& plan_;
    Box field_;
    Chart chart_;
};

} // namespace

Chart light_chart(const LightChartPlan& plan) {
    return ChartDrawer{plan}.drawn();
}

} // namespace dialwright::layout
