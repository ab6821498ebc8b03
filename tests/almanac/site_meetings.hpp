#pragma once

#include <algorithm>
#include <cmath>
#include <string>
#include <vector>

#include "almanac/meetings.hpp"
#include "almanac/sites.hpp"
#include "sky/moon_look.hpp"

namespace duskleaf {

/// A site's year with its meetings.
struct Made {
  SiteYear year;
  std::vector<Approach> approaches;
  std::vector<Meeting> all;

  const YearEphemeris& ephemeris() const { return ephemeris_of(year.span); }
  const Meeting* find(const char* pair, int month, int day) const {
    const Ut about = ut_midnight(make_date(year.span.first_year, month, day));
    for (const Meeting& m : all)
      if (pair_name(m.closest.a, m.closest.b) == pair &&
          std::abs((m.closest.at - about).count()) < 2.0)
        return &m;
    return nullptr;
  }
  std::string clock(const Look& look) const { return year.place.zone.civil(look.at).iso(); }
};
inline Made make(const Place& place, int y) {
  Made m{year_of_site(place, y), {}, {}};
  const Ut first = m.year.nights.front().from, last = m.year.nights.back().to;
  m.approaches = closest_approaches(m.ephemeris(), first - Days(2), last + Days(1));
  m.all = meetings(SiteSky(m.ephemeris(), place.observer, first, last), m.year, m.approaches);
  return m;
}

inline bool with_moon(const Meeting& m) { return m.closest.a == target_index(Body::moon); }

inline Horizontal refracted_place(const Made& m, const Target& t, Ut at) {
  const Observer& o = m.year.place.observer;
  const Angle sidereal = m.ephemeris().apparent_sidereal_time(at) + o.longitude;
  Horizontal place =
      t.sort == Target::Sort::body
          ? topocentric_horizontal(m.ephemeris(), t.body, o.latitude, o.longitude, o.elevation_m,
                                   at)
          : to_horizontal(apparent_direction(m.ephemeris(), t, to_tt(at)), sidereal, o.latitude);
  place.altitude = place.altitude + refraction(place.altitude);
  return place;
}

/// The lower one's refracted altitude, degrees.
inline double lower_of(const Made& m, const Meeting& x, Ut at) {
  return std::min(refracted_place(m, target_at(x.closest.a), at).altitude,
                  refracted_place(m, target_at(x.closest.b), at).altitude)
      .degrees();
}
inline Angle sun_altitude(const Made& m, Ut at) {
  const Observer& o = m.year.place.observer;
  return arcsin(sine_of_altitude(m.ephemeris().apparent(Body::sun, to_tt(at)).normalized(),
                                 m.ephemeris().apparent_sidereal_time(at) + o.longitude,
                                 o.latitude));
}
inline bool is_faint(const Target& t) {
  return t.sort == Target::Sort::cluster || t.name == "uranus" || t.name == "neptune";
}

inline Place northern() { return test_place(54.18, -4.62, "Europe/London"); }
inline Place high_arctic() { return test_place(78.22, 15.65, "Arctic/Longyearbyen"); }

}  // namespace duskleaf
