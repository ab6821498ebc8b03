#pragma once

#include <optional>
#include <vector>

#include "almanac/planet_months.hpp"
#include "almanac/planets.hpp"

namespace duskleaf {

/// One night in samples 5 minutes apart while the Sun is 5 degrees down or lower, shared by the
/// planets; each body's place by a parabola through three moments of the night (planets and Sun
/// within 0.0001 degree, the Moon within 0.001).
class PlanetNight {
 public:
  PlanetNight(const SiteSky&, const SiteYear&, const Night&);

  enum class Part { evening, between_before_darkest, between_after_darkest, morning };
  struct Sample {
    Ut at;
    double day_part;      // -1 at the night's beginning, 1 at its end
    double cosine, sine;  // of the local sidereal time
    double faintest_star, faintest_moonless;
    Part part;
    bool dark;  // the Sun below -12 degrees
  };
  const std::vector<Sample>& samples() const { return samples_; }
  const Night& night() const { return *night_; }

 private:
  const Night* night_;
  std::vector<Sample> samples_;
};

/// What a night shows of a planet: indices into the samples.
struct PlanetSeen {
  PlanetSight sight = PlanetSight::not_visible;
  std::optional<std::size_t> best;              // of the part of the night that `sight` names first
  std::optional<std::size_t> evening, morning;  // highest while visible in each that it names
};
/// `optics`: binoculars show what the bare eye does not, in a dark sky.
PlanetSeen see_planet(const SiteSky&, const PlanetNight&, Body planet, double magnitude,
                      bool optics);

/// The stretch of the night's visibility, moonlight left out, that holds a sample in which the
/// planet is visible.
PlanetWindow planet_window(const SiteSky&, double site_limit, const PlanetNight&, Body planet,
                           double magnitude, bool optics, std::size_t best);

}  // namespace duskleaf
