// Spherical astronomy as in the Explanatory Supplement to the Astronomical Almanac, 3rd ed. (2012),
// ch. 7; the site by ERFA's eraGd2gc (WGS 84). Refraction: T. Saemundsson, "Atmospheric
// refraction", Sky and Telescope 72 (1986) 70.
#include "sky/horizon.hpp"

#include <algorithm>
#include <cmath>
#include <erfa.h>
#include <numbers>

#include "ephemeris/constants.hpp"

namespace duskleaf {
namespace {

constexpr double metres_per_au = km_per_au * 1000.0;
constexpr int wgs84 = 1;  // ERFA_WGS84

/// Components towards the meridian's point of the equator, the east point and the pole.
Eigen::Vector3d turned_to_meridian(const Eigen::Vector3d& v, Angle local_sidereal_time) {
  const double c = cos(local_sidereal_time), s = sin(local_sidereal_time);
  return {c * v.x() + s * v.y(), c * v.y() - s * v.x(), v.z()};
}

}  // namespace

Horizontal to_horizontal(const Eigen::Vector3d& of_date, Angle local_sidereal_time,
                         Angle latitude) {
  const Eigen::Vector3d v = turned_to_meridian(of_date, local_sidereal_time);
  const double up = sin(latitude) * v.z() + cos(latitude) * v.x();
  const double north = cos(latitude) * v.z() - sin(latitude) * v.x();
  return {arctan2(up, std::hypot(north, v.y())), arctan2(v.y(), north).positive()};
}

double sine_of_altitude(const Eigen::Vector3d& unit_of_date, Angle local_sidereal_time,
                        Angle latitude) {
  const double towards_meridian =
      cos(local_sidereal_time) * unit_of_date.x() + sin(local_sidereal_time) * unit_of_date.y();
  return sin(latitude) * unit_of_date.z() + cos(latitude) * towards_meridian;
}

Angle hour_angle(const Eigen::Vector3d& of_date, Angle local_sidereal_time) {
  const Eigen::Vector3d v = turned_to_meridian(of_date, local_sidereal_time);
  const Angle h = arctan2(-v.y(), v.x());
  return h.radians() <= -std::numbers::pi ? Angle::from_radians(std::numbers::pi) : h;
}

Eigen::Vector3d observer_vector_au(Angle latitude, double elevation_m, Angle local_sidereal_time) {
  // With the sidereal time in the longitude's place the axes are those of date. Polar motion (0.3")
  // is left out.
  Eigen::Vector3d metres;
  eraGd2gc(wgs84, local_sidereal_time.radians(), latitude.radians(), elevation_m, metres.data());
  return metres / metres_per_au;
}

Eigen::Vector3d zenith(Angle latitude, Angle local_sidereal_time) {
  return {cos(latitude) * cos(local_sidereal_time), cos(latitude) * sin(local_sidereal_time),
          sin(latitude)};
}

Angle angle_between(const Eigen::Vector3d& a, const Eigen::Vector3d& b) {
  return arctan2(a.cross(b).norm(), a.dot(b));
}

Angle refraction(Angle true_altitude) {
  const double h = std::max(true_altitude.degrees(), -1.0);
  // The last term brings the formula's -0.0019' at the zenith to nothing.
  const double arcminutes = 1.02 / tan(Angle::from_degrees(h + 10.3 / (h + 5.11))) + 0.0019279;
  return Angle::from_arcminutes(arcminutes);
}

}  // namespace duskleaf
