// SPDX-License-Identifier: MIT
#pragma once

#include "engine/path/sun_path.hpp"
#include "engine/site/skyline.hpp"
#include "engine/surface/surface.hpp"

#include <optional>

namespace dialwright {

/// A nodus' shadow and the edge of the gnomon that threw it.
struct Cast {
    PlatePoint point;
    Edge edge;
};

/// Throws the shadow of a gnomon's nodus onto a surface at a site: the one way from the sky to the work.
template <Surface S> class Caster {
  public:
    Caster(Angle latitude, S surface, GnomonEdges edges, Skyline skyline)
        : latitude_{latitude}, surface_{std::move(surface)}, edges_{edges}, skyline_{std::move(skyline)} {}

    [[nodiscard]] Angle latitude() const { return latitude_; }
    [[nodiscard]] const S& surface() const { return surface_; }
    [[nodiscard]] const GnomonEdges& edges() const { return edges_; }
    [[nodiscard]] const Skyline& skyline() const { return skyline_; }

    /// @return nothing where the Sun does not light the work, or (Light::seen) is hidden
    [[nodiscard]] std::optional<Cast> cast(const SkyPlace& sky, Light light, std::optional<Edge> told = {}) const {
        const SiteDirection sun = to_site(sky, latitude_);
        if (!(surface_.light(sun) > 0) || (light == Light::seen && !(skyline_.clearance(sun) > 0)))
            return std::nullopt;
        const Edge edge = told ? *told : edges_.casting(sky.hour_angle);
        const auto point = surface_.shadow_of_nodus(sun, edges_.shift(edge));
        return point ? std::optional<Cast>{{*point, edge}} : std::nullopt;
    }

    /// True if at some declination of the season the Sun of this hour angle lights the work and is seen.
    /// Told apart to about 0.05° of declination; an hour that is lit for less is not lit.
    [[nodiscard]] bool ever_lit(Angle hour_angle, const Season& season) const;

  private:
    Angle latitude_;
    S surface_;
    GnomonEdges edges_;
    Skyline skyline_;
};

template <Surface S> bool Caster<S>::ever_lit(Angle hour_angle, const Season& season) const {
    constexpr int k_parts = 94;
    constexpr double k_grazing = 1e-6; // sine: a Sun nearer to the plate's plane or the horizon throws no shadow to cut
    const auto lit = [&](int part) {
        const Angle declination = season.least + (season.greatest - season.least) * (part / double{k_parts});
        const SiteDirection sun = to_site({hour_angle, declination}, latitude_);
        return surface_.light(sun) > k_grazing && skyline_.clearance(sun) > k_grazing;
    };
    // The ends of the season light the most hours: try them first.
    if (lit(0) || lit(k_parts))
        return true;
    for (int part = 1; part < k_parts; ++part)
        if (lit(part))
            return true;
    return false;
}

} // namespace dialwright
