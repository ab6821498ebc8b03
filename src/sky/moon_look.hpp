#pragma once

#include <Eigen/Dense>

#include "base/angle.hpp"
#include "base/time.hpp"
#include "ephemeris/year_ephemeris.hpp"
#include "sky/horizon.hpp"

namespace duskleaf {

/// Angle at `body` from the direction of `top` to that of `other`, counterclockwise as seen from
/// the origin, [0, 360) degrees. With the celestial pole as `top` it is a position angle (through
/// east).
Angle position_angle(const Eigen::Vector3d& body, const Eigen::Vector3d& other,
                     const Eigen::Vector3d& top);

/// A body's vector from a site on the ground, au, true equator and equinox of date. Latitude
/// geodetic, longitude east positive. Diurnal aberration (0.3") is left out.
Eigen::Vector3d topocentric(const YearEphemeris&, Body, Angle latitude, Angle longitude,
                            double elevation_m, Ut);
/// Where a site sees the body. No refraction.
Horizontal topocentric_horizontal(const YearEphemeris&, Body, Angle latitude, Angle longitude,
                                  double elevation_m, Ut);

/// Where the middle of the Moon's bright limb points, from the zenith counterclockwise as the
/// observer faces the Moon, [0, 360) degrees: 90 is lit on the left, 270 on the right. Without
/// meaning within a degree of new and full Moon.
Angle bright_limb_from_zenith(const YearEphemeris&, Angle latitude, Angle longitude,
                              double elevation_m, Ut);

}  // namespace duskleaf
