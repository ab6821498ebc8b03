// Definitions: see site_sky.cpp. Transit: local apparent hour angle 0 (Explanatory Supplement 1992,
// ch. 9).
//
// The Sun and the Moon are sampled once an hour; all searches share the samples and ask again only
// within brackets.
#include <algorithm>

#include "events/search.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {
namespace {

struct Samples {
  std::vector<Ut> times;
  std::vector<double> altitude, excess, west;
};

Samples sample(const SiteSky& sky, Body body, Ut from, Ut to) {
  Samples s;
  const double length = (to - from).count();
  const auto steps = static_cast<std::size_t>(std::max(2.0, std::ceil(length * 24.0 - 1e-9)));
  for (auto* list : {&s.altitude, &s.west, &s.excess}) list->reserve(steps + 1);
  s.times.reserve(steps + 1);
  for (std::size_t i = 0; i <= steps; ++i) {
    const Ut t =
        i == steps ? to : from + Days(length * static_cast<double>(i) / static_cast<double>(steps));
    const SiteSky::Sight sight = sky.sight(body, t);
    s.times.push_back(t);
    s.altitude.push_back(sight.altitude);
    s.west.push_back(sight.west);
    if (body == Body::moon) s.excess.push_back(SiteSky::moon_excess(sight));
  }
  return s;
}

}  // namespace

std::vector<Event> site_events(const YearEphemeris& ephemeris, const Observer& observer, Ut from,
                               Ut to) {
  std::vector<Event> events;
  if (!(from < to)) return events;
  const SiteSky sky(ephemeris, observer, from, to);
  const auto add = [&](const std::vector<Crossing>& crossings, Body body, EventKind rising,
                       EventKind falling) {
    for (const Crossing& c : crossings)
      events.push_back({c.rising ? rising : falling, body, c.at, {}});
  };
  SearchOptions transits;
  transits.falling = false;  // hour angle 180 degrees is a falling zero
  transits.look_for_grazes = false;
  const auto add_transits = [&](const Samples& s, Body body, EventKind kind) {
    const auto west = [&](Ut t) { return sky.sight(body, t).west; };
    add(find_crossings_between(west, s.times, s.west, transits), body, kind, kind);
  };

  const Samples sun = sample(sky, Body::sun, from, to);
  struct Level {
    Angle altitude;
    EventKind dawn, dusk;
  };
  std::vector<double> values(sun.altitude.size());
  for (const Level& level :
       {Level{sun_rise_altitude, EventKind::sunrise, EventKind::sunset},
        Level{civil_altitude, EventKind::civil_dawn, EventKind::civil_dusk},
        Level{nautical_altitude, EventKind::nautical_dawn, EventKind::nautical_dusk},
        Level{astronomical_altitude, EventKind::astronomical_dawn, EventKind::astronomical_dusk}}) {
    const double limit = sin(level.altitude);
    std::transform(sun.altitude.begin(), sun.altitude.end(), values.begin(),
                   [&](double s) { return s - limit; });
    const auto above = [&](Ut t) { return sky.sight(Body::sun, t).altitude - limit; };
    add(find_crossings_between(above, sun.times, values), Body::sun, level.dawn, level.dusk);
  }
  add_transits(sun, Body::sun, EventKind::sun_transit);

  const Samples moon = sample(sky, Body::moon, from, to);
  const auto excess = [&](Ut t) { return SiteSky::moon_excess(sky.sight(Body::moon, t)); };
  add(find_crossings_between(excess, moon.times, moon.excess), Body::moon, EventKind::moonrise,
      EventKind::moonset);
  add_transits(moon, Body::moon, EventKind::moon_transit);

  std::sort(events.begin(), events.end(), [](const Event& a, const Event& b) {
    return a.at != b.at ? a.at < b.at : a.kind < b.kind;
  });
  return events;
}

}  // namespace duskleaf
