#pragma once

#include "base/angle.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

/// What the magnitude depends on. Distances in au. Latitudes (planetocentric; planetographic for
/// Uranus) matter for Saturn and Uranus.
struct PlanetAspect {
  double sun_distance, earth_distance;
  Angle phase_angle;
  Angle sub_solar_latitude, sub_earth_latitude;
  double year;  // with fraction; Neptune brightens
};

PlanetAspect planet_aspect(const YearEphemeris&, Body planet, Tt);
/// Apparent V magnitude after Mallama & Hilton (2018), within 0.001 mag of the authors' own values.
/// Mars without its rotation and orbit terms (up to 0.07 mag). Saturn with its rings up to a phase
/// angle of 6.5 degrees (never more from the Earth), beyond it the globe. Throws
/// std::invalid_argument for the Sun and the Moon.
double planet_magnitude(Body planet, const PlanetAspect&);
/// Saturn without its rings (its aspect's latitudes are not used).
double saturn_globe_magnitude(const PlanetAspect&);
/// Lit fraction of the disc, 0..1.
double lit_fraction(Angle phase_angle);
/// Moon: lit fraction of the disc as seen from the Earth's centre.
double moon_lit_fraction(const YearEphemeris&, Tt);

}  // namespace duskleaf
