// The bright limb points along the great circle to the Sun: J. Meeus, Astronomical Algorithms, 2nd
// ed. 1998, ch. 48; here with vectors, and from the zenith in place of the celestial pole.
#include "sky/moon_look.hpp"

namespace duskleaf {
namespace {

Angle local_sidereal_time(const YearEphemeris& ephemeris, Angle longitude, Ut t) {
  return ephemeris.apparent_sidereal_time(t) + longitude;
}

}  // namespace

Angle position_angle(const Eigen::Vector3d& body, const Eigen::Vector3d& other,
                     const Eigen::Vector3d& top) {
  const Eigen::Vector3d forward = body.normalized();
  const Eigen::Vector3d up = (top - top.dot(forward) * forward).normalized();
  const Eigen::Vector3d left = up.cross(forward);
  return arctan2(other.dot(left), other.dot(up)).positive();
}

Eigen::Vector3d topocentric(const YearEphemeris& ephemeris, Body body, Angle latitude,
                            Angle longitude, double elevation_m, Ut t) {
  return ephemeris.apparent(body, to_tt(t)) -
         observer_vector_au(latitude, elevation_m, local_sidereal_time(ephemeris, longitude, t));
}

Horizontal topocentric_horizontal(const YearEphemeris& ephemeris, Body body, Angle latitude,
                                  Angle longitude, double elevation_m, Ut t) {
  return to_horizontal(topocentric(ephemeris, body, latitude, longitude, elevation_m, t),
                       local_sidereal_time(ephemeris, longitude, t), latitude);
}

Angle bright_limb_from_zenith(const YearEphemeris& ephemeris, Angle latitude, Angle longitude,
                              double elevation_m, Ut t) {
  return position_angle(topocentric(ephemeris, Body::moon, latitude, longitude, elevation_m, t),
                        topocentric(ephemeris, Body::sun, latitude, longitude, elevation_m, t),
                        zenith(latitude, local_sidereal_time(ephemeris, longitude, t)));
}

}  // namespace duskleaf
