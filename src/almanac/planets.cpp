// When a planet counts as visible: this project's conventions (header). Magnitudes:
// sky/planet_magnitude.hpp; rise and set at -34' (events/site_sky.hpp).
#include "almanac/planets.hpp"

#include <algorithm>
#include <cmath>

#include "almanac/evening_moment.hpp"
#include "catalogue/constellations.hpp"
#include "sky/brightness.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

constexpr Angle refraction_ends = Angle::from_degrees(-1);

std::optional<Ut> nearest(const std::vector<Ut>& instants, Ut to) {
  if (instants.empty()) return {};
  return *std::min_element(instants.begin(), instants.end(), [&](Ut a, Ut b) {
    return std::abs((a - to).count()) < std::abs((b - to).count());
  });
}

}  // namespace

SkyLight sky_light(const SiteSky& sky, double site_limit, Ut t) {
  const YearEphemeris& ephemeris = sky.ephemeris();
  const Angle sidereal_time = sky.local_sidereal_time(t);
  const Observer& site = sky.observer();
  const Eigen::Vector3d moon = ephemeris.apparent(Body::moon, to_tt(t)) -
                               observer_vector_au(site.latitude, site.elevation_m, sidereal_time);
  SkyLight light;
  light.sun_altitude = sky.altitude(Body::sun, t);
  light.moon = to_horizontal(moon, sidereal_time, site.latitude);
  light.moon_lit = moon_lit_fraction(ephemeris, to_tt(t));
  light.faintest_star =
      faintest_star(site_limit, light.sun_altitude, light.moon.altitude, light.moon_lit);
  return light;
}

Horizontal apparent_place(const SiteSky& sky, Body planet, Ut t) {
  Horizontal place = to_horizontal(sky.ephemeris().apparent(planet, to_tt(t)),
                                   sky.local_sidereal_time(t), sky.observer().latitude);
  // Far below the horizon there is no light to bend.
  if (place.altitude > refraction_ends)
    place.altitude = place.altitude + refraction(place.altitude);
  return place;
}

Angle least_height(Body planet) {
  return Angle::from_degrees(planet == Body::uranus || planet == Body::neptune ? 10.0 : 5.0);
}

bool bare_eye_visible(Body planet, double magnitude, Angle apparent_altitude,
                      double faintest_star) {
  const double margin = planet == Body::uranus ? 0.5 : 0.0;
  return planet != Body::neptune && magnitude + margin < faintest_star &&
         apparent_altitude >= least_height(planet);
}

Angle signed_elongation(const YearEphemeris& ephemeris, Body planet, Tt t) {
  const Eigen::Vector3d a = ephemeris.apparent(planet, t), b = ephemeris.apparent(Body::sun, t);
  const Angle distance = angle_between(a, b);
  const Angle east =
      (ephemeris.ecliptic_longitude(planet, t) - ephemeris.ecliptic_longitude(Body::sun, t))
          .centred();
  return east < Angle() ? -distance : distance;
}

int constellation_of(const YearEphemeris& ephemeris, Body body, Tt t) {
  return constellation_at(ephemeris.icrs_to_date(t).transpose() *
                          ephemeris.apparent(body, t).normalized());
}

PlanetEvening planet_evening(const SiteSky& sky, Body planet, Ut moment, double faintest_star,
                             const TimeSpan& night) {
  const YearEphemeris& ephemeris = sky.ephemeris();
  const Tt tt = to_tt(moment);
  PlanetEvening row{};
  row.planet = planet;
  row.place = apparent_place(sky, planet, moment);
  row.magnitude = planet_magnitude(planet, planet_aspect(ephemeris, planet, tt));
  row.visible = bare_eye_visible(planet, row.magnitude, row.place.altitude, faintest_star);
  row.elongation = signed_elongation(ephemeris, planet, tt);
  row.constellation = constellation_of(ephemeris, planet, tt);
  const RiseSet times = planet_rise_set(sky, planet, night.from, night.to);
  row.rises = nearest(times.rises, moment);
  row.highest = nearest(times.transits, moment);
  row.sets = nearest(times.sets, moment);
  return row;
}

std::vector<PlanetDay> planet_days(const YearEphemeris& ephemeris, const SiteYear& year) {
  std::vector<PlanetDay> rows;
  if (year.nights.empty()) return rows;
  const SiteSky sky(ephemeris, year.place.observer, year.nights.front().from,
                    year.nights.back().to);
  for (const Night& night : year.nights) {
    const int day = day_of(night.date);
    if ((day != 1 && day != 11 && day != 21) || night.from == night.to) continue;
    const ChartHour& hour =
        year.place.chart_hours[static_cast<std::size_t>(month_of(night.date) - 1)];
    const Ut moment = chart_moment(sky, year.place.zone, hour, night);
    for (Body planet : planets) {
      const PlanetEvening p = planet_evening(sky, planet, moment, 0.0, {night.from, night.to});
      rows.push_back({night.date, planet, ephemeris.place(planet, to_tt(moment)), p.magnitude,
                      p.elongation, p.constellation, p.rises, p.highest, p.sets, p.place.altitude});
    }
  }
  return rows;
}

}  // namespace duskleaf
