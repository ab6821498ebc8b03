// How faint a star the sky lets through: luminances of the site's own sky, of twilight and of
// moonlight are added, and the eye's limit is read from the sum.
//
// Eye: B. E. Schaefer 1990, "Telescopic limiting magnitudes", PASP 102, 212, its relations for
// night (averted) and day (direct) vision; the first is the same as 7.93 - 5 log10(10^(4.316 - B/5)
// + 1) for a sky of B magnitudes per square arcsecond. Twilight: F. Patat, O. S. Ugolnikov & O. V.
// Postylyakov 2006, "UBVRI twilight sky brightness at ESO-Paranal", A&A 455, 385: V at the zenith,
// Sun 5 to 15 degrees down. Moonlight: K. Krisciunas & B. E. Schaefer 1991, "A model of the
// brightness of moonlight", PASP 103, 1033, eqs. 3, 15, 19-21.
//
// Departures, all this project's own: above 1500 nL, where Schaefer's night relation gives too
// little and his day relation too much, their mean (magnitude 1.5 with the Sun 6 degrees down, when
// common practice says that the first stars show); the continuations of twilight beyond the
// measured range; moonlight fading in over the Moon's first five degrees.
#include "sky/brightness.hpp"

#include <algorithm>
#include <cmath>

namespace duskleaf {
namespace {

// Magnitudes per square arcsecond to nanolamberts: Krisciunas & Schaefer 1991, eq. 1.
double nanolamberts(double surface_brightness) {
  return 34.08 * std::exp(20.7233 - 0.92104 * surface_brightness);
}

// The eye's two relations: limit = zero - 5 log10(1 + factor * sqrt(sky in nanolamberts)).
struct EyeRelation {
  double zero, factor;
  double limit(double sky_nl) const {
    return zero - 5.0 * std::log10(1.0 + factor * std::sqrt(sky_nl));
  }
};
const EyeRelation night{7.93, std::sqrt(0.0126)}, day{4.305, std::sqrt(1.259e-6)};

double eye_limit(double sky_nl) {
  const double by_night = night.limit(sky_nl), by_day = day.limit(sky_nl);
  return by_night >= by_day ? by_night : 0.5 * (by_night + by_day);
}

/// The sky that gives the limit, nanolamberts: eye_limit turned round.
double sky_for_limit(double limit) {
  constexpr double darkest = 1e-3;
  const double root = (std::pow(10.0, 0.2 * (night.zero - limit)) - 1.0) / night.factor;
  const double night_sky = root > 0.0 ? std::max(darkest, root * root) : darkest;
  if (night.limit(night_sky) >= day.limit(night_sky)) return night_sky;
  // The mean: (1 + a x) (1 + b x) = k for x, the root of the sky.
  const double k = std::pow(10.0, 0.2 * (night.zero + day.zero) - 0.4 * limit);
  const double product = night.factor * day.factor, sum = night.factor + day.factor;
  const double x = (std::sqrt(sum * sum + 4.0 * product * (k - 1.0)) - sum) / (2.0 * product);
  return x * x;
}

double twilight_nl(Angle sun_altitude) {
  constexpr double first = 95.0, last = 105.0, gone = 108.0;  // Sun's zenith distance, degrees
  constexpr double dark_sky =
      21.6;  // Paranal's zenith without twilight (Patat 2003, A&A 400, 1183)
  const double z = 90.0 - sun_altitude.degrees();
  if (z >= gone) return 0.0;
  if (z < first) {
    // A parabola that leaves 95 degrees with the fit's slope and meets some 300 cd/m2, 6.4
    // mag/arcsec2, at sunset (from memory). It is level from its vertex on: by day nothing depends
    // on it.
    const double x = std::max(z - first, -1.518 / (2.0 * 0.086));
    return nanolamberts(11.84 + x * (1.518 + 0.086 * x));
  }
  const double x = std::min(z, last) - first;
  const double whole = nanolamberts(11.84 + x * (1.518 - 0.057 * x));
  // What is measured holds the night sky too. Near 95 degrees that is nothing.
  const double excess = whole - nanolamberts(dark_sky);
  if (z <= last) return excess;
  // To zero at 108 degrees, leaving 105 with the slope of the fit.
  const double fall_per_degree = 0.92104 * (1.518 - 2.0 * 0.057 * x) * whole / excess;
  return excess * std::pow((gone - z) / (gone - last), fall_per_degree * (gone - last));
}

/// At the zenith, or 45 degrees from the Moon when the Moon stands nearer to the zenith than that.
double moonlight_nl(Angle altitude, double lit_fraction) {
  constexpr double extinction =
      0.25;  // magnitudes per air mass in V, an ordinary site (common practice)
  const double h = altitude.degrees();
  if (h <= 0.0) return 0.0;
  const double phase_angle = arccos(2.0 * lit_fraction - 1.0).degrees();
  const double moon =
      std::pow(10.0, -0.4 * (3.84 + 0.026 * phase_angle + 4e-9 * std::pow(phase_angle, 4)));
  const double distance = std::max(45.0, 90.0 - h);
  const double c = cos(Angle::from_degrees(distance));
  const double scattering =
      std::pow(10.0, 5.36) * (1.06 + c * c) + std::pow(10.0, 6.15 - distance / 40.0);
  const double air_mass = 1.0 / std::sqrt(1.0 - 0.96 * cos(altitude) * cos(altitude));
  const double light = scattering * moon * std::pow(10.0, -0.4 * extinction * air_mass) *
                       (1.0 - std::pow(10.0, -0.4 * extinction));
  return light * std::min(1.0, h / 5.0);
}

}  // namespace

double faintest_star(double site_limit, Angle sun_altitude, Angle moon_altitude,
                     double moon_lit_fraction) {
  const double extra = twilight_nl(sun_altitude) + moonlight_nl(moon_altitude, moon_lit_fraction);
  if (extra <= 0.0) return site_limit;
  return std::min(site_limit, eye_limit(sky_for_limit(site_limit) + extra));
}

}  // namespace duskleaf
