// New and full Moon by apparent ecliptic longitude (Explanatory Supplement to the Astronomical
// Almanac 1992, ch. 9), as starting points for eclipses.
#include "events/syzygies.hpp"

#include <algorithm>

#include "events/search.hpp"

namespace duskleaf {

std::vector<Tt> syzygies_near_node(const YearEphemeris& ephemeris, Syzygy syzygy, Angle latitude,
                                   Ut from, Ut to) {
  std::vector<Tt> found;
  if (!(from < to)) return found;
  SearchOptions options;
  options.step = Days(1);
  options.look_for_grazes = false;
  options.falling = false;  // those of the other kind
  options.tolerance = Seconds(60);
  const Body ahead = syzygy == Syzygy::new_moon ? Body::moon : Body::sun;
  const Body behind = syzygy == Syzygy::new_moon ? Body::sun : Body::moon;
  const auto elongation = [&](Ut t) {
    const Tt tt = to_tt(t);
    return sin(ephemeris.ecliptic_longitude(ahead, tt) - ephemeris.ecliptic_longitude(behind, tt));
  };
  // Greatest eclipse is within an hour of its syzygy.
  const Days margin(1.0 / 12.0);
  const Ut first = std::max(from - margin, to_ut(ephemeris.from())),
           last = std::min(to + margin, to_ut(ephemeris.to()));
  for (const Crossing& crossing : find_crossings(elongation, first, last, options)) {
    const Tt at = to_tt(crossing.at);
    const Angle moon = ephemeris.ecliptic_latitude(Body::moon, at);
    if (moon <= latitude && -moon <= latitude) found.push_back(at);
  }
  return found;
}

}  // namespace duskleaf
