// The stereographic projection: J. P. Snyder, "Map projections: a working manual", USGS
// Professional Paper 1395 (1987), ch. 21.
#include "sky/projection.hpp"

#include <algorithm>
#include <cmath>

namespace duskleaf {

FacingProjection::FacingProjection(Angle azimuth) : azimuth_(azimuth) {}

Eigen::Vector2d FacingProjection::operator()(const Horizontal& direction) const {
  const Angle off = direction.azimuth - azimuth_;
  const double forward = cos(direction.altitude) * cos(off);
  const double right = cos(direction.altitude) * sin(off);
  const double scale = 1.0 / std::max(1.0 + forward, 1e-10);
  return {scale * right, scale * sin(direction.altitude)};
}

Horizontal FacingProjection::inverse(const Eigen::Vector2d& point) const {
  const double square = point.squaredNorm();
  const double forward = 1.0 - square, right = 2.0 * point.x(), up = 2.0 * point.y();
  return {arctan2(up, std::hypot(forward, right)), (azimuth_ + arctan2(right, forward)).positive()};
}

}  // namespace duskleaf
