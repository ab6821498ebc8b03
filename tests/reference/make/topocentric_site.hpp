// What the generators of occultations and transits share: bodies and stars of the Swiss Ephemeris
// library as a site on the ground sees them. The geometry is written here, apart from the project's
// code; the library gives geocentric apparent places and the nutation alone.
#pragma once

#include <vector>

#include "swiss_positions.hpp"

struct Vec {
  double x, y, z;
};
inline Vec operator-(Vec a, Vec b) { return {a.x - b.x, a.y - b.y, a.z - b.z}; }
inline double dot(Vec a, Vec b) { return a.x * b.x + a.y * b.y + a.z * b.z; }
inline double length(Vec a) { return std::sqrt(dot(a, a)); }
inline Vec cross(Vec a, Vec b) {
  return {a.y * b.z - a.z * b.y, a.z * b.x - a.x * b.z, a.x * b.y - a.y * b.x};
}
inline double angle_between(Vec a, Vec b) { return std::atan2(length(cross(a, b)), dot(a, b)); }
inline Vec vector_of(const Place& p) {
  return {p.distance_km * std::cos(p.dec) * std::cos(p.ra),
          p.distance_km * std::cos(p.dec) * std::sin(p.ra), p.distance_km * std::sin(p.dec)};
}

struct Site {
  const char* name;
  double latitude, longitude, elevation_m;  // degrees, east positive
};

// The site from the Earth's centre, km, true equator and equinox of date; WGS 84.
inline Vec site_vector(const Site& site, double sidereal) {
  constexpr double a = 6378.137, f = 1 / 298.257223563, e2 = f * (2 - f);
  const double phi = site.latitude * degree, theta = sidereal + site.longitude * degree;
  const double n = a / std::sqrt(1 - e2 * std::sin(phi) * std::sin(phi)),
               h = site.elevation_m / 1000;
  const double across = (n + h) * std::cos(phi);
  return {across * std::cos(theta), across * std::sin(theta), (n * (1 - e2) + h) * std::sin(phi)};
}
// Altitude of a direction, radians, no refraction.
inline double altitude_of(Vec v, const Site& site, double sidereal) {
  const double phi = site.latitude * degree, theta = sidereal + site.longitude * degree;
  const Vec up{std::cos(phi) * std::cos(theta), std::cos(phi) * std::sin(theta), std::sin(phi)};
  return std::asin(dot(v, up) / length(v));
}
// Position angle of `other` about `body`, radians in [0, 2 pi): from celestial north through east.
inline double position_angle_of(Vec body, Vec other) {
  const double a1 = std::atan2(body.y, body.x), a2 = std::atan2(other.y, other.x);
  const double d1 = std::asin(body.z / length(body)), d2 = std::asin(other.z / length(other));
  const double p =
      std::atan2(std::sin(a2 - a1) * std::cos(d2),
                 std::cos(d1) * std::sin(d2) - std::sin(d1) * std::cos(d2) * std::cos(a2 - a1));
  return p < 0 ? p + 2 * pi : p;
}

// Apparent direction of a star of sefstars.txt: proper motion, parallax, light deflection,
// aberration.
inline Vec star_of(const std::string& designation, double ut) {
  char name[80], message[AS_MAXCH];
  std::snprintf(name, sizeof name, ",%s", designation.c_str());
  double xx[6];
  if (swe_fixstar2(name, tt_of(ut), SEFLG_SWIEPH | SEFLG_EQUATORIAL, xx, message) < 0) {
    std::fprintf(stderr, "no star: %s\n", message);
    std::exit(2);
  }
  return vector_of({xx[0] * degree, xx[1] * degree, 1.0});
}

inline std::string iso_instant(double ut) {
  const double rounded = std::round((ut - j2000) * 8640000.0) / 8640000.0 + j2000;
  const double day = std::floor(rounded - 0.5) + 0.5;
  return iso_date(day) + "T" + clock(day, rounded) + "Z";
}

// Five invented sites.
const Site sites[] = {{"isle", 54.2, -4.6, 20},
                      {"ridge", -0.4, 37.0, 1900},
                      {"southern", -43.4, 171.6, 350},
                      {"fjord", 69.6, 19.4, 10},
                      {"far-north", 78.0, 15.6, 0}};
