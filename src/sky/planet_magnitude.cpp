// A. Mallama & J. L. Hilton 2018, "Computing apparent planetary magnitudes for The Astronomical
// Almanac", Astronomy and Computing 25, 10. Poles of Saturn and Uranus (ICRF) as the IAU working
// group on cartographic coordinates gives them; Uranus' flattening from its radii 25559 and 24973
// km (same source, from memory).
//
// Departures: Mars without the terms for its rotation and orbit (up to 0.07 mag).
#include "sky/planet_magnitude.hpp"

#include <algorithm>
#include <cmath>
#include <stdexcept>
#include <string>

#include "sky/horizon.hpp"

namespace duskleaf {
namespace {

const Eigen::Vector3d saturn_pole(0.08547883, 0.07323576, 0.99364475);
const Eigen::Vector3d uranus_pole(-0.21199958, -0.94155916, -0.26176809);
constexpr double uranus_axes = 24973.0 / 25559.0;  // polar over equatorial

double venus(double a) {
  return a < 163.7 ? -4.384 + a * (-1.044e-3 + a * (3.687e-4 + a * (-2.814e-6 + a * 8.938e-9)))
                   : 236.05828 + a * (-2.81914 + a * 8.39034e-3);
}

double jupiter(double a) {
  if (a <= 12.0) return -9.395 + a * (-3.7e-4 + a * 6.16e-4);
  const double x = a / 180.0;
  return -9.428 -
         2.5 *
             std::log10(1.0 + x * (-1.507 + x * (-0.363 + x * (-0.062 + x * (2.809 - x * 1.876)))));
}

double saturn_globe(double a) {
  return a <= 6.5 ? -8.95 + a * (-3.7e-4 + a * 6.16e-4)
                  : -8.94 + a * (2.446e-4 + a * (2.672e-4 + a * (-1.506e-6 + a * 4.767e-9)));
}

double saturn_with_rings(double a, Angle sun_latitude, Angle earth_latitude) {
  const double product = sun_latitude.degrees() * earth_latitude.degrees();
  const double tilt = sin(Angle::from_degrees(product > 0.0 ? std::sqrt(product) : 0.0));
  return -8.914 - 1.825 * tilt + 0.026 * a - 0.378 * tilt * std::exp(-2.25 * a);
}

double uranus(double a, Angle sun_latitude, Angle earth_latitude) {
  const double mean_latitude =
      0.5 * (std::abs(sun_latitude.degrees()) + std::abs(earth_latitude.degrees()));
  return -7.110 - 8.4e-4 * mean_latitude + (a > 3.1 ? a * (6.587e-3 + a * 1.045e-4) : 0.0);
}

double neptune(double a, double year) {
  const double level = std::clamp(-6.89 - 0.0054 * (year - 1980.0), -7.00, -6.89);
  return level + (a > 1.9 ? a * (7.944e-3 + a * 9.617e-5) : 0.0);
}

double distance_term(const PlanetAspect& aspect) {
  return 5.0 * std::log10(aspect.sun_distance * aspect.earth_distance);
}

}  // namespace

PlanetAspect planet_aspect(const YearEphemeris& ephemeris, Body planet, Tt t) {
  const Eigen::Vector3d from_earth = ephemeris.apparent(planet, t);
  // Aberration is common to both, and their difference in light-time moves nothing that a magnitude
  // could show.
  const Eigen::Vector3d from_sun = from_earth - ephemeris.apparent(Body::sun, t);
  PlanetAspect aspect{ephemeris.heliocentric_distance_au(planet, t),
                      from_earth.norm(),
                      angle_between(from_sun, from_earth),
                      Angle(),
                      Angle(),
                      2000.0 + (t.days() + 0.5) / 365.25};
  if (planet == Body::saturn || planet == Body::uranus) {
    const Eigen::Vector3d pole =
        ephemeris.icrs_to_date(t) * (planet == Body::saturn ? saturn_pole : uranus_pole);
    // Planetocentric to planetographic: tan B' = tan B / (polar over equatorial radius)^2.
    const double stretch = planet == Body::uranus ? 1.0 / (uranus_axes * uranus_axes) : 1.0;
    const auto latitude = [&](const Eigen::Vector3d& to_planet) {
      return Angle::from_radians(
          std::atan(std::tan(arcsin(-pole.dot(to_planet.normalized())).radians()) * stretch));
    };
    aspect.sub_solar_latitude = latitude(from_sun);
    aspect.sub_earth_latitude = latitude(from_earth);
  }
  return aspect;
}

double planet_magnitude(Body planet, const PlanetAspect& aspect) {
  const double a = aspect.phase_angle.degrees();
  const double d = distance_term(aspect);
  switch (planet) {
    case Body::mercury:
      return d - 0.613 +
             a * (6.3280e-2 +
                  a * (-1.6336e-3 +
                       a * (3.3644e-5 + a * (-3.4265e-7 + a * (1.6893e-9 - a * 3.0334e-12)))));
    case Body::venus:
      return d + venus(a);
    case Body::mars:
      return d + (a <= 50.0 ? -1.601 + a * (2.267e-2 - a * 1.302e-4)
                            : -0.367 + a * (-0.02573 + a * 3.445e-4));
    case Body::jupiter:
      return d + jupiter(a);
    case Body::saturn:
      return d + (a <= 6.5
                      ? saturn_with_rings(a, aspect.sub_solar_latitude, aspect.sub_earth_latitude)
                      : saturn_globe(a));
    case Body::uranus:
      return d + uranus(a, aspect.sub_solar_latitude, aspect.sub_earth_latitude);
    case Body::neptune:
      return d + neptune(a, aspect.year);
    default:
      throw std::invalid_argument("no planet: " + std::string(body_name(planet)));
  }
}

double saturn_globe_magnitude(const PlanetAspect& aspect) {
  return distance_term(aspect) + saturn_globe(aspect.phase_angle.degrees());
}

double lit_fraction(Angle phase_angle) { return 0.5 * (1.0 + cos(phase_angle)); }

double moon_lit_fraction(const YearEphemeris& ephemeris, Tt t) {
  const Eigen::Vector3d moon = ephemeris.apparent(Body::moon, t);
  const Eigen::Vector3d sun = ephemeris.apparent(Body::sun, t);
  return lit_fraction(angle_between(sun - moon, -moon));
}

}  // namespace duskleaf
