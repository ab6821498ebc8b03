// Radii: B. A. Archinal et al. 2018, "Report of the IAU Working Group on Cartographic Coordinates
// and Rotational Elements: 2015", Celestial Mechanics and Dynamical Astronomy 130, 22 (equatorial;
// from memory, the planets' as text kernels made from that report carry them). Sun: nominal radius,
// IAU 2015 resolution B3. Lit part and Saturn's tilt: planet_magnitude.cpp.
#include "sky/planet_disc.hpp"

#include <stdexcept>

#include "ephemeris/constants.hpp"
#include "sky/planet_magnitude.hpp"

namespace duskleaf {
namespace {

double equatorial_radius_km(Body body) {
  switch (body) {
    case Body::sun:
      return 695700.0;
    case Body::moon:
      return 1737.4;
    case Body::mercury:
      return 2440.53;
    case Body::venus:
      return 6051.8;  // its surface; the clouds that are seen end some 60 km higher (1 %)
    case Body::mars:
      return 3396.19;
    case Body::jupiter:
      return 71492.0;
    case Body::saturn:
      return 60268.0;
    case Body::uranus:
      return 25559.0;
    case Body::neptune:
      return 24764.0;
  }
  throw std::invalid_argument("no such body");
}

}  // namespace

Angle disc_radius(Body body, double distance_au) {
  return arcsin(equatorial_radius_km(body) / km_per_au / distance_au);
}

PlanetDisc planet_disc(const YearEphemeris& ephemeris, Body planet, Tt t) {
  const PlanetAspect aspect = planet_aspect(ephemeris, planet, t);
  return {2.0 * disc_radius(planet, aspect.earth_distance), lit_fraction(aspect.phase_angle),
          planet == Body::saturn ? aspect.sub_earth_latitude : Angle()};
}

}  // namespace duskleaf
