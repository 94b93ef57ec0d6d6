// SPDX-License-Identifier: MIT
#pragma once

#include "cli/commission.hpp"
#include "engine/sun/apparent_sun.hpp"

#include <span>
#include <string>

namespace dialwright::cli {

/// Where the shadow of the nodus falls at one instant, and what the dial shows.
struct ShadowReport {
    Instant at;
    ApparentSun sun;
    SkyPlace sky;
    SiteDirection towards_sun;
    std::size_t face = 0; ///< of the commission
    bool lit = false;
    std::optional<PlatePoint> shadow;                ///< of the casting edge's nodus
    std::optional<double> reads_h;                   ///< by the chapter ring's hours
    std::vector<std::optional<double>> also_reads_h; ///< by each more set of hours, beside the plan's more_hours
};

/// @param face  of a dial with several; nothing: the one that is lit, else the first
[[nodiscard]] std::vector<ShadowReport> shadow_reports(const Commission& commission, std::span<const Instant> instants,
                                                       std::optional<std::size_t> face);

/// docs/output-formats.md. @param texts  the instants as they were asked for
[[nodiscard]] std::string shadow_json(const Commission& commission, const std::vector<ShadowReport>& reports,
                                      std::span<const std::string> texts);
[[nodiscard]] std::string shadow_text(const Commission& commission, const std::vector<ShadowReport>& reports);

} // namespace dialwright::cli
