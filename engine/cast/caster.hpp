// SPDX-License-Identifier: MIT
#pragma once

#include "engine/path/sun_path.hpp"
#include "engine/site/skyline.hpp"
#include "engine/surface/surface.hpp"

#include <algorithm>
#include <optional>

namespace dialwright {

/// A nodus' shadow and the edge of the gnomon that threw it.
struct Cast {
    PlatePoint point;
    Edge edge;
};

/// Throws the shadow of a gnomon's nodus onto a surface at a site: the one way from the sky to the work.
template <Surface S>
class Caster {
  public:
    Caster(Angle latitude, S surface, GnomonEdges edges, Skyline skyline)
        : latitude_{latitude}, sines_{latitude}, surface_{std::move(surface)}, edges_{edges}, skyline_{
                                                                                                  std::move(skyline)} {}

    [[nodiscard]] Angle latitude() const { return latitude_; }
    [[nodiscard]] const S& surface() const { return surface_; }
    [[nodiscard]] const GnomonEdges& edges() const { return edges_; }
    [[nodiscard]] const Skyline& skyline() const { return skyline_; }

    /// @return nothing where the Sun does not light the work, or (Light::seen) is hidden
    [[nodiscard]] std::optional<Cast> cast(const SkyPlace& sky, Light light, std::optional<Edge> told = {}) const {
        const SiteDirection sun = to_site(sky, sines_);
        if (!(surface_.light(sun) > 0) || (light == Light::seen && !skyline_.sees(sun)))
            return std::nullopt;
        const Edge edge = told ? *told : edges_.casting(sun);
        const auto point = surface_.shadow_of_nodus(sun, edges_.shift(edge));
        return point ? std::optional<Cast>{{*point, edge}} : std::nullopt;
    }

    /// True if at some declination of the season the Sun of this hour angle lights the work and is seen.
    /// Behind hills told apart to half a degree of declination: an hour that is lit for less may count as unlit.
    [[nodiscard]] bool ever_lit(Angle hour_angle, const Season& season) const;

  private:
    Angle latitude_;
    LatitudeSines sines_;
    S surface_;
    GnomonEdges edges_;
    Skyline skyline_;
};

template <Surface S>
bool Caster<S>::ever_lit(Angle hour_angle, const Season& season) const {
    constexpr double k_grazing = 1e-6; // sine: a Sun nearer to the plate's plane or the horizon throws no shadow to cut
    constexpr int k_parts = 94;
    const Eigen::Vector3d equator = to_site({hour_angle, Angle{}}, sines_).enu, pole = north_pole(latitude_).enu;
    const auto light = [&](double part) {
        const Angle declination = season.least + (season.greatest - season.least) * (part / k_parts);
        const SiteDirection sun{cos(declination) * equator + sin(declination) * pole};
        return std::min(surface_.light(sun), skyline_.clearance(sun));
    };
    // The ends of the season light the most hours: try them first.
    if (light(0) > k_grazing || light(k_parts) > k_grazing)
        return true;
    int best = 0;
    double most = -1;
    for (int part = 1; part < k_parts; ++part)
        if (const double here = light(part); here > most) {
            if (here > k_grazing)
                return true;
            most = here;
            best = part;
        }
    // A stretch between two parts: climb to the brightest. The light of a plate, and of a level horizon, is concave.
    double low = best - 1.0, high = best + 1.0;
    while (high - low > 1e-4) {
        const double third = (high - low) / 3;
        if (light(low + third) < light(high - third))
            low += third;
        else
            high -= third;
    }
    return light((low + high) / 2) > k_grazing;
}

} // namespace dialwright
