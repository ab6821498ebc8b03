// From geometric to apparent places by ERFA's routines, which follow the IERS Conventions (2010)
// and the Explanatory Supplement to the Astronomical Almanac, 3rd ed. (2012), ch. 7.
//
// Departure: a planet behind the Sun's disc is deflected as if the Sun were transparent, by the
// mass within the ray's distance from the centre, so that its (unseen) place stays smooth.
#include "ephemeris/reduction.hpp"

#include <cmath>
#include <erfa.h>

#include "ephemeris/constants.hpp"

namespace duskleaf {
namespace {

using Vector = Eigen::Vector3d;
using Matrix = Eigen::Matrix3d;

constexpr double j2000 = 2451545.0;
constexpr double sun_radius_au =
    695700.0 / km_per_au;  // nominal solar radius, IAU 2015 resolution B3

Matrix from_rows(const double m[3][3]) {
  return Matrix{
      {m[0][0], m[0][1], m[0][2]}, {m[1][0], m[1][1], m[1][2]}, {m[2][0], m[2][1], m[2][2]}};
}

/// Part of the Sun's mass within a distance from its centre, in solar radii: 1 - exp(-(r/a)^b)
/// through two points of the standard solar model (from memory): half within 0.25, 0.976 within
/// 0.713.
double sun_mass_within(double radii) { return -std::expm1(-std::pow(radii / 0.314, 1.606)); }

}  // namespace

EarthState earth_state(Tt t) {
  double heliocentric[2][3], barycentric[2][3];
  // Its status 1 says "outside 1900-2100": a span's last days may be, and lose nothing there.
  eraEpv00(j2000, t.days(), heliocentric, barycentric);
  const Vector velocity(barycentric[1]);
  return {Vector(heliocentric[0]), velocity, velocity - Vector(heliocentric[1])};
}

Vector nutation_and_origins(Tt t) {
  double longitude, obliquity, mean, bias[3][3], precession[3][3], mean_of_date[3][3],
      nutation[3][3], true_of_date[3][3];
  eraNut00b(j2000, t.days(), &longitude, &obliquity);
  eraPn06(j2000, t.days(), longitude, obliquity, &mean, bias, precession, mean_of_date, nutation,
          true_of_date);
  double x, y;
  eraBpn2xy(true_of_date, &x, &y);
  return {longitude, obliquity, eraEors(true_of_date, eraS06(j2000, t.days(), x, y))};
}

Matrix rotation_to_date(Tt t, double nutation_longitude, double nutation_obliquity) {
  double mean, bias[3][3], precession[3][3], mean_of_date[3][3], nutation[3][3], true_of_date[3][3];
  eraPn06(j2000, t.days(), nutation_longitude, nutation_obliquity, &mean, bias, precession,
          mean_of_date, nutation, true_of_date);
  return from_rows(true_of_date);
}

double mean_obliquity(Tt t) { return eraObl06(j2000, t.days()); }

Vector with_aberration(const Vector& from_earth, const EarthState& earth) {
  const double distance = from_earth.norm();
  Vector natural = from_earth / distance, apparent;
  Vector v = earth.velocity / light_speed_au_per_day;
  eraAb(natural.data(), v.data(), earth.from_sun.norm(), std::sqrt(1.0 - v.squaredNorm()),
        apparent.data());
  return distance * apparent.normalized();
}

Vector with_deflection(const Vector& from_earth, const Vector& planet_from_sun,
                       const EarthState& earth) {
  const double distance = from_earth.norm();
  const double sun_distance = earth.from_sun.norm();
  Vector p = from_earth / distance, q = planet_from_sun.normalized();
  Vector e = earth.from_sun / sun_distance, bent;
  double mass = 1.0;
  if (p.dot(e) < 0.0) mass = sun_mass_within(p.cross(e).norm() * sun_distance / sun_radius_au);
  // The bound on 1 + q.e only keeps eraLd from dividing by zero.
  eraLd(mass, p.data(), q.data(), e.data(), sun_distance, 1e-12, bent.data());
  return distance * bent.normalized();
}

}  // namespace duskleaf
