// Which moment shows the Moon of a date: this project's rule (MoonLook). The angle itself:
// sky/moon_look.hpp.
#include "sky/moon_look.hpp"

#include <algorithm>
#include <chrono>
#include <cmath>

#include "almanac/evening_sky.hpp"
#include "almanac/nights.hpp"
#include "almanac/time_spans.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

// The moment of some spans that is nearest to t; nullopt where there are none.
std::optional<Ut> nearest_moment(const std::vector<TimeSpan>& spans, Ut t) {
  std::optional<Ut> best;
  for (const TimeSpan& span : spans) {
    const Ut candidate = std::clamp(t, span.from, span.to);
    if (!best || std::abs((candidate - t).count()) < std::abs((*best - t).count()))
      best = candidate;
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
    const std::vector<TimeSpan> moon_up = moon_up_spans(night);
    std::optional<Ut> other = nearest_moment(intersection(moon_up, night.sun_down), evening);
    if (!other) other = nearest_moment(moon_up, evening);
    look.at = other.value_or(evening);
  }
  const Observer& site = sky.observer();
  look.lit = moon_lit_fraction(sky.ephemeris(), to_tt(look.at));
  look.bright_limb_from_zenith = bright_limb_from_zenith(sky.ephemeris(), site.latitude,
                                                         site.longitude, site.elevation_m, look.at);
  return look;
}

}  // namespace duskleaf
