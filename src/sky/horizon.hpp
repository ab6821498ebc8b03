#pragma once

#include <Eigen/Dense>

#include "base/angle.hpp"

namespace duskleaf {

/// A direction in a site's sky.
struct Horizontal {
  Angle altitude;
  Angle azimuth;  // from north through east, [0, 360) degrees
};

/// A direction of date (true equator and equinox) seen from a latitude at a local apparent sidereal
/// time. No refraction.
Horizontal to_horizontal(const Eigen::Vector3d& of_date, Angle local_sidereal_time, Angle latitude);
/// sin(altitude) alone, the fast inner step of searches.
double sine_of_altitude(const Eigen::Vector3d& unit_of_date, Angle local_sidereal_time,
                        Angle latitude);
/// Local hour angle in (-180, 180] degrees, west positive.
Angle hour_angle(const Eigen::Vector3d& of_date, Angle local_sidereal_time);

/// Vector from the Earth's centre to the site in au, true equator of date axes (WGS 84).
Eigen::Vector3d observer_vector_au(Angle latitude, double elevation_m, Angle local_sidereal_time);

/// Direction of the zenith, a unit vector on the same axes.
Eigen::Vector3d zenith(Angle latitude, Angle local_sidereal_time);
/// Angle between two directions, 0 to 180 degrees; exact where it is small, too.
Angle angle_between(const Eigen::Vector3d&, const Eigen::Vector3d&);

/// Refraction to add to a true altitude (Saemundsson 1986, 1010 hPa, 10 C); altitudes below -1
/// degree use its value there.
Angle refraction(Angle true_altitude);

}  // namespace duskleaf
