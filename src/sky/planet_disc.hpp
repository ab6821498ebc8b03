#pragma once

#include "base/angle.hpp"
#include "ephemeris/year_ephemeris.hpp"

namespace duskleaf {

/// How large and how lit a planet looks from the Earth's centre.
struct PlanetDisc {
  Angle diameter;   // equatorial
  double lit;       // fraction, 0..1
  Angle ring_tilt;  // Saturn: sub-Earth latitude on the rings, positive when the north face shows;
                    // 0 for others
};
PlanetDisc planet_disc(const YearEphemeris&, Body planet, Tt);
/// Equatorial angular radius of a body's disc at a distance.
Angle disc_radius(Body, double distance_au);

}  // namespace duskleaf
