// Apparent geocentric ecliptic longitudes of date (Explanatory Supplement to the Astronomical
// Almanac, 3rd ed. 2012, ch. 11; Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 36): opposition
// and conjunction where the planet's less the Sun's is 180 or 0 degrees, stations where the
// planet's rate is 0. Greatest elongation: greatest angular distance from the Sun.
//
// Budget: a place wrong by 1 arcsecond moves an opposition by 24 s or less. Stations lose what the
// difference's base bends: Mercury's rate turns most. Neptune's longitude turns by 1.7 arcseconds a
// day^2, so that its noise of 0.001 arcsecond over half a day is 100 s at worst. Largest
// differences from the DE431-based reference, 639 instants of 2020-2035: oppositions (69) and
// conjunctions (69) 40 s (Uranus, Neptune; others 8 s), inferior and superior conjunctions
// (121) 1.1 s, stations of Mercury (100) 67 s, of the others (159) 56 s, greatest elongations (121)
// 21 s and 0.00001 degree.
#include "events/configurations.hpp"

#include <algorithm>

#include "events/search.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {
namespace {

bool inner(Body planet) { return planet == Body::mercury || planet == Body::venus; }

// Half the base of differences, days.
constexpr double longitude_half_base = 0.25, elongation_half_base = 0.1;
// Mercury, the quickest, is retrograde for three weeks at least.
constexpr Days step(4.0);

/// The instants a half base before and after; at the tables' ends the base is cut.
struct Base {
  Tt before, after;
};
Base base_about(const YearEphemeris& ephemeris, Ut t, double half_base) {
  const double at = to_tt(t).days();
  return {Tt(Days(std::max(at - half_base, ephemeris.from().days()))),
          Tt(Days(std::min(at + half_base, ephemeris.to().days())))};
}

Angle from_sun(const YearEphemeris& ephemeris, Body planet, Tt t) {
  return angle_between(ephemeris.apparent(planet, t), ephemeris.apparent(Body::sun, t));
}

}  // namespace

std::vector<Event> planet_configurations(const YearEphemeris& ephemeris, Ut from, Ut to) {
  std::vector<Event> events;
  if (!(from < to)) return events;
  SearchOptions options;
  options.step = step;
  for (const Body planet : planets) {
    const auto beyond_sun = [&](Tt t) {
      return (ephemeris.ecliptic_longitude(planet, t) - ephemeris.ecliptic_longitude(Body::sun, t))
          .centred();
    };
    options.look_for_grazes = false;
    for (const Crossing& c :
         find_crossings([&](Ut t) { return sin(beyond_sun(to_tt(t))); }, from, to, options)) {
      const Tt tt = to_tt(c.at);
      const double distance = ephemeris.apparent(planet, tt).norm();
      if (cos(beyond_sun(tt)) < 0.0)
        events.push_back({EventKind::opposition, planet, c.at, distance});
      else if (!inner(planet))
        events.push_back({EventKind::conjunction, planet, c.at, {}});
      else
        events.push_back({distance < ephemeris.apparent(Body::sun, tt).norm()
                              ? EventKind::inferior_conjunction
                              : EventKind::superior_conjunction,
                          planet,
                          c.at,
                          {}});
    }
    options.look_for_grazes = true;
    const auto rate = [&](Ut t) {
      const Base base = base_about(ephemeris, t, longitude_half_base);
      return (ephemeris.ecliptic_longitude(planet, base.after) -
              ephemeris.ecliptic_longitude(planet, base.before))
          .centred()
          .radians();
    };
    for (const Crossing& c : find_crossings(rate, from, to, options))
      events.push_back(
          {c.rising ? EventKind::stationary_then_direct : EventKind::stationary_then_retrograde,
           planet,
           c.at,
           {}});
    if (!inner(planet)) continue;
    const auto receding = [&](Ut t) {
      const Base base = base_about(ephemeris, t, elongation_half_base);
      return (from_sun(ephemeris, planet, base.after) - from_sun(ephemeris, planet, base.before))
          .radians();
    };
    for (const Crossing& c : find_crossings(receding, from, to, options)) {
      const Tt tt = to_tt(c.at);
      // A least distance rises through 0; it has one greatest between two conjunctions.
      if (!c.rising)
        events.push_back({beyond_sun(tt) > Angle() ? EventKind::greatest_elongation_east
                                                   : EventKind::greatest_elongation_west,
                          planet, c.at, from_sun(ephemeris, planet, tt).degrees()});
    }
  }
  std::sort(events.begin(), events.end(), [](const Event& a, const Event& b) {
    return a.at != b.at ? a.at < b.at : a.body < b.body;
  });
  return events;
}

}  // namespace duskleaf
