// Besselian elements by vectors: Explanatory Supplement to the Astronomical Almanac (1992),
// ch. 8.3. The axis of the Moon's shadow runs from the Sun's apparent centre through the Moon's;
// the fundamental plane passes through the Earth's centre at right angles to it, x to the east and
// y to the north.
//
// Radii: the Sun's 959.63" at 1 au (Auwers 1891, as the Explanatory Supplement has it); the Moon's,
// in Earth's equatorial radii, k1 = 0.272488 for the penumbra and k2 = 0.272281 for the umbra, the
// two that F. Espenak and J. Meeus, Five Millennium Canon of Solar Eclipses (NASA/TP-2006-214141),
// use. The centres are those of mass: no correction for the Moon's figure. The canon's mu counts
// from the ephemeris meridian; here it is the true one, so that no Delta T is left for the site.
//
// Cubics through nine Chebyshev points over eight hours: they leave the places computed directly by
// less than 3e-7 of the Earth's radius in x and y, 1e-8 in l1 and l2, 1e-10 radian in d and mu (the
// eclipses of every fourth year of 1900-2100), a metre or two on the ground.
//
// Against the canon's of 2023-2031 (20 eclipses, three hours on both sides): x and y 1.1e-5, l1 and
// l2 1.4e-6, d 0.00002, mu 0.00005 degree.
#include "events/besselian_elements.hpp"

#include <Eigen/Dense>
#include <cmath>
#include <numbers>

#include "ephemeris/constants.hpp"

namespace duskleaf {
namespace {

constexpr double half_span_hours = 4.0;
constexpr int points = 9, coefficients = 4;
constexpr double turn = 2.0 * std::numbers::pi;
constexpr double k1 = 0.272488, k2 = 0.272281;
const double sun_radius = std::sin(sun_semidiameter) / earth_radius_au;

struct Cones {
  double x, y, l1, l2, d, mu, tan_f1, tan_f2;
};

Cones cones_at(const YearEphemeris& ephemeris, Tt t) {
  const Eigen::Vector3d sun = ephemeris.apparent(Body::sun, t) / earth_radius_au,
                        moon = ephemeris.apparent(Body::moon, t) / earth_radius_au;
  const Eigen::Vector3d between = sun - moon;
  const double g = between.norm();
  const Eigen::Vector3d axis = between / g;
  const double a = std::atan2(axis.y(), axis.x()), cosine_d = std::hypot(axis.x(), axis.y());
  const Eigen::Vector3d east(-std::sin(a), std::cos(a), 0.0), north = axis.cross(east);
  const double sine_f1 = (sun_radius + k1) / g, sine_f2 = (sun_radius - k2) / g;
  const double tan_f1 = sine_f1 / std::sqrt(1.0 - sine_f1 * sine_f1),
               tan_f2 = sine_f2 / std::sqrt(1.0 - sine_f2 * sine_f2);
  const double z = moon.dot(axis);
  return {moon.dot(east),
          moon.dot(north),
          (z + k1 / sine_f1) * tan_f1,
          (z - k2 / sine_f2) * tan_f2,
          std::atan2(axis.z(), cosine_d),
          ephemeris.apparent_sidereal_time(to_ut(t)).radians() - a,
          tan_f1,
          tan_f2};
}

double cubic(const std::array<double, coefficients>& c, double t) {
  return c[0] + t * (c[1] + t * (c[2] + t * c[3]));
}

}  // namespace

BesselianElements besselian_elements(const YearEphemeris& ephemeris, Tt t0) {
  using Column = Eigen::Matrix<double, points, 1>;
  // Powers of the time in units of the half span: well-conditioned.
  Eigen::Matrix<double, points, coefficients> powers;
  Column x, y, l1, l2, d, mu;
  for (int i = 0; i < points; ++i) {
    const double u = -std::cos((i + 0.5) / points * std::numbers::pi);
    powers.row(i) << 1.0, u, u * u, u * u * u;
    const Cones c = cones_at(ephemeris, t0 + Days(u * half_span_hours / 24.0));
    x(i) = c.x, y(i) = c.y, l1(i) = c.l1, l2(i) = c.l2, d(i) = c.d;
    mu(i) = i == 0 ? c.mu : mu(i - 1) + std::remainder(c.mu - mu(i - 1), turn);
  }
  const Eigen::ColPivHouseholderQR<Eigen::Matrix<double, points, coefficients>> fit(powers);
  const auto solve = [&](const Column& values) {
    const Eigen::Matrix<double, coefficients, 1> c = fit.solve(values);
    const double h = half_span_hours;
    return std::array<double, coefficients>{c(0), c(1) / h, c(2) / (h * h), c(3) / (h * h * h)};
  };
  const Cones middle = cones_at(ephemeris, t0);
  BesselianElements e{t0,       solve(x),  solve(y),      solve(l1),    solve(l2),
                      solve(d), solve(mu), middle.tan_f1, middle.tan_f2};
  e.mu[0] = Angle::from_radians(e.mu[0]).positive().radians();
  return e;
}

ShadowAxis shadow_axis(const BesselianElements& e, double t) {
  const double d = cubic(e.d, t);
  return {cubic(e.x, t), cubic(e.y, t), cubic(e.l1, t), cubic(e.l2, t),
          std::sin(d),   std::cos(d),   cubic(e.mu, t)};
}

}  // namespace duskleaf
