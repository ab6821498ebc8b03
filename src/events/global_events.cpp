// Phases and seasons: apparent geocentric ecliptic longitudes (Explanatory Supplement to the
// Astronomical Almanac 1992, ch. 9; Meeus, Astronomical Algorithms, 2nd ed. 1998, ch. 27, 49).
// Apsides: extremes of the geometric distance of the centres.
//
// Budget of time: the Moon gains 0.51 arcsecond a second on the Sun, so 0.2 arcsecond in longitude
// is 0.4 s of a phase; the Sun moves 1 arcsecond in 24 s, so a season within 1 s needs 0.04
// arcsecond. The Moon's distance turns by 1,100 km/day^2 at an apsis: 0.04 km over its own period
// of days is seconds. The Earth's turns by some 500 to 1,000 km/day^2.
#include <algorithm>
#include <cmath>

#include "ephemeris/constants.hpp"
#include "events/events.hpp"
#include "events/search.hpp"

namespace duskleaf {
namespace {

constexpr double half_base =
    0.01;  // days; half the base of the distance's rate, whose bias is then below 1 s

void add_longitude_events(const YearEphemeris& ephemeris, Ut from, Ut to,
                          std::vector<Event>& events) {
  const auto add = [&](const auto& f, Days step, Body body, EventKind rising, EventKind falling) {
    SearchOptions options;
    options.step = step;
    options.look_for_grazes = false;
    for (const Crossing& c : find_crossings(f, from, to, options))
      events.push_back({c.rising ? rising : falling, body, c.at, {}});
  };
  const auto elongation = [&](Ut t) {
    const Tt tt = to_tt(t);
    return ephemeris.ecliptic_longitude(Body::moon, tt) -
           ephemeris.ecliptic_longitude(Body::sun, tt);
  };
  const auto sun = [&](Ut t) { return ephemeris.ecliptic_longitude(Body::sun, to_tt(t)); };
  add([&](Ut t) { return sin(elongation(t)); }, Days(1), Body::moon, EventKind::new_moon,
      EventKind::full_moon);
  add([&](Ut t) { return cos(elongation(t)); }, Days(1), Body::moon, EventKind::last_quarter,
      EventKind::first_quarter);
  add([&](Ut t) { return sin(sun(t)); }, Days(10), Body::sun, EventKind::march_equinox,
      EventKind::september_equinox);
  add([&](Ut t) { return cos(sun(t)); }, Days(10), Body::sun, EventKind::december_solstice,
      EventKind::june_solstice);
}

void add_apsides(const YearEphemeris& ephemeris, Ut from, Ut to, std::vector<Event>& events) {
  const auto add = [&](Body body, Days step, double unit, EventKind nearest, EventKind farthest) {
    const auto distance = [&](double day) {
      return ephemeris.geometric_distance_au(body, Tt(Days(day)));
    };
    SearchOptions options;
    options.step = step;
    options.look_for_grazes = false;
    const auto rate = [&](Ut t) {
      const double day = to_tt(t).days();
      return distance(day + half_base) - distance(day - half_base);
    };
    for (const Crossing& c : find_crossings(rate, from, to, options))
      events.push_back(
          {c.rising ? nearest : farthest, body, c.at, distance(to_tt(c.at).days()) * unit});
  };
  add(Body::moon, Days(1), km_per_au, EventKind::perigee, EventKind::apogee);
  add(Body::sun, Days(5), 1.0, EventKind::perihelion, EventKind::aphelion);
}

}  // namespace

std::vector<Event> global_events(const YearEphemeris& ephemeris, Ut from, Ut to) {
  std::vector<Event> events;
  if (!(from < to)) return events;
  add_longitude_events(ephemeris, from, to, events);
  add_apsides(ephemeris, from, to, events);
  std::sort(events.begin(), events.end(), [](const Event& a, const Event& b) {
    return a.at != b.at ? a.at < b.at : a.kind < b.kind;
  });
  return events;
}

}  // namespace duskleaf
