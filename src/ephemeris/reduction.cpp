// From geometric to apparent places by ERFA's routines, which follow the IERS Conventions (2010)
// and the Explanatory Supplement to the Astronomical Almanac, 3rd ed. (2012), ch. 7.
//
// Departure: behind the Sun the deflection is softened inside the Sun's disc, where no ray passes.
#include "ephemeris/reduction.hpp"

#include <algorithm>
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

}  // namespace

void earth_state(Tt t, Vector& from_sun, Vector& from_barycentre, Vector& velocity) {
  double heliocentric[2][3], barycentric[2][3];
  // Its status 1 says "outside 1900-2100": the span's last days may be, and lose nothing there.
  eraEpv00(j2000, t.days(), heliocentric, barycentric);
  from_sun = Vector(heliocentric[0]);
  from_barycentre = Vector(barycentric[0]);
  velocity = Vector(barycentric[1]);
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
  Vector p = from_earth / distance, q = planet_from_sun.normalized(),
         e = earth.from_sun / sun_distance, bent;
  // eraLd divides by 1 + q.e, and bounds it from below: here at its value where the ray grazes the
  // Sun's limb.
  const double limb_angle = sun_radius_au / sun_distance * distance / planet_from_sun.norm();
  eraLd(1.0, p.data(), q.data(), e.data(), sun_distance, 0.5 * limb_angle * limb_angle,
        bent.data());
  return distance * bent.normalized();
}

}  // namespace duskleaf
