#pragma once

#include <Eigen/Dense>

#include "base/time.hpp"

namespace duskleaf {

/// The Earth at one instant; ICRS axes, au and au/day.
struct EarthState {
  Eigen::Vector3d from_sun;      // heliocentric position
  Eigen::Vector3d velocity;      // barycentric
  Eigen::Vector3d sun_velocity;  // of the Sun, barycentric
};
/// By ERFA's eraEpv00: within some 5 km and 5 mm/s of the JPL's DE405 over 1900-2100 (its own
/// notes).
EarthState earth_state(Tt);

/// Nutation in longitude and obliquity (IAU 2000B) and the equation of origins (IAU 2006
/// precession), radians.
Eigen::Vector3d nutation_and_origins(Tt);
/// Bias, precession (IAU 2006) and the given nutation: ICRS to true equator and equinox of date.
Eigen::Matrix3d rotation_to_date(Tt, double nutation_longitude, double nutation_obliquity);
/// Mean obliquity of date, IAU 2006, radians.
double mean_obliquity(Tt);

/// Turns the direction of `from_earth` by the Earth's velocity (special relativity, and the Sun's
/// potential); keeps its length.
Eigen::Vector3d with_aberration(const Eigen::Vector3d& from_earth, const EarthState&);
/// Bends the direction of a planet by the Sun's gravity; keeps its length.
Eigen::Vector3d with_deflection(const Eigen::Vector3d& from_earth,
                                const Eigen::Vector3d& planet_from_sun, const EarthState&);

}  // namespace duskleaf
