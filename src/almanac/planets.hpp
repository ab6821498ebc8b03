#pragma once

#include <vector>

#include "almanac/site_year.hpp"
#include "events/site_sky.hpp"

namespace duskleaf {

/// What a site sees of the light of the sky at a moment.
struct SkyLight {
  Angle sun_altitude;  // geocentric, no refraction
  Horizontal moon;     // topocentric, no refraction
  double moon_lit;
  double faintest_star;  // see sky/brightness.hpp
};
SkyLight sky_light(const SiteSky&, double site_limit, Ut);

/// Place of a planet with refraction; below a true altitude of -1 degree, without.
Horizontal apparent_place(const SiteSky&, Body planet, Ut);
/// Least height at which a planet counts as visible: 5 degrees, 10 for Uranus and Neptune.
Angle least_height(Body planet);
/// Brighter than the faintest star and high enough; Uranus half a magnitude brighter (who does not
/// know where to look needs a margin); Neptune never by the bare eye.
bool bare_eye_visible(Body planet, double magnitude, Angle apparent_altitude, double faintest_star);

/// No planet is said to be visible while the Sun is higher than this.
inline constexpr Angle planets_visible_below = Angle::from_degrees(-4);

/// Angular distance from the Sun, positive east of it (evening sky).
Angle signed_elongation(const YearEphemeris&, Body planet, Tt);
/// Index of the constellation in which a body stands.
int constellation_of(const YearEphemeris&, Body, Tt);

/// A planet at `moment`; rises, highest, sets in the night: the one that is nearest to the moment
/// where the night has two.
PlanetEvening planet_evening(const SiteSky&, Body planet, Ut moment, double faintest_star,
                             const TimeSpan& night);

/// One row of the table of planets: at the chart hour of its date.
struct PlanetDay {
  Date date;
  Body planet;
  EquatorialPlace place;  // apparent, geocentric
  double magnitude;
  Angle elongation;  // 0 to 180 degrees, positive east
  int constellation;
  std::optional<Ut> rises, highest, sets;  // in the night of the date
  Angle altitude_at_chart_hour;            // as apparent_place
};
/// The 1st, 11th and 21st of each month of the span, skipped dates left out; by date, then outward.
std::vector<PlanetDay> planet_days(const YearEphemeris&, const SiteYear&);

}  // namespace duskleaf
