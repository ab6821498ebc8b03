// Which moment shows the Moon of a date: this project's rule (MoonLook). The angle itself:
// sky/moon_look.hpp.
#include "sky/moon_look.hpp"

#include <chrono>

#include "almanac/evening_sky.hpp"
#include "almanac/time_spans.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

// The highest of the Moon's places at its transits and at the ends of some spans; nullopt when it
// is not up at any of them.
std::optional<Ut> highest_up(const SiteSky& sky, const Night& night,
                             const std::vector<TimeSpan>& spans) {
  std::vector<Ut> candidates;
  for (const TimeSpan& span : spans) {
    candidates.push_back(span.from);
    candidates.push_back(span.to);
    for (const Event& e : night.events)
      if (e.kind == EventKind::moon_transit && span.from <= e.at && e.at <= span.to)
        candidates.push_back(e.at);
  }
  std::optional<Ut> best;
  double altitude = 0.0;
  for (const Ut t : candidates) {
    const SiteSky::Sight sight = sky.sight(Body::moon, t);
    if (SiteSky::moon_excess(sight) <= 0.0 || (best && sight.altitude <= altitude)) continue;
    best = t;
    altitude = sight.altitude;
  }
  return best;
}

}  // namespace

MoonLook moon_look(const SiteSky& sky, const Zone& zone, const Night& night,
                   std::chrono::minutes clock) {
  const bool next_date = clock <= std::chrono::hours(12);
  const Ut evening = zone.instant(night.date + std::chrono::days(next_date ? 1 : 0), clock);
  MoonLook look{};
  look.up = sky.moon_up(evening);
  look.at = evening;
  if (!look.up) {
    std::optional<Ut> other = highest_up(sky, night, night.sun_down);
    if (!other) other = highest_up(sky, night, {{night.from, night.to}});
    look.at = other.value_or(evening);
  }
  const Observer& site = sky.observer();
  look.lit = moon_lit_fraction(sky.ephemeris(), to_tt(look.at));
  look.bright_limb_from_zenith = bright_limb_from_zenith(sky.ephemeris(), site.latitude,
                                                         site.longitude, site.elevation_m, look.at);
  return look;
}

}  // namespace duskleaf
