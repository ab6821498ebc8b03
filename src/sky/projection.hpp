#pragma once

#include <Eigen/Dense>

#include "sky/horizon.hpp"

namespace duskleaf {

/// The sky as someone sees it who faces a direction: stereographic projection about the horizon's
/// point at that azimuth. x to the right, y up, no unit: the zenith is at (0, 1), the horizon's
/// point to the right at (1, 0). Facing south, east is to the left. Shapes stay true; circles stay
/// circles.
class FacingProjection {
 public:
  explicit FacingProjection(Angle azimuth);

  /// The point opposite, behind the observer, is at infinity: directions within a thousandth of a
  /// degree of it come out very far.
  Eigen::Vector2d operator()(const Horizontal&) const;
  Horizontal inverse(const Eigen::Vector2d&) const;

 private:
  Angle azimuth_;
};

}  // namespace duskleaf
